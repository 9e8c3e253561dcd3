'use client';

import { Dialog } from '@/components/ui/dialog';
import type { LengthUnit } from '@/lib/concrete/length';
import type { ReadingState } from '@/lib/inspection/sheet-types';
import { onTape } from './face-drawings';
import { JudgedPanel } from './judged-panel';
import type { OpenSheet } from './open-sheet';
import { PointActions, PointReadings } from './point-readings';
import type { ReadingTarget } from './reading-target';

export type Panel = 'how' | 'point';

/** What opens over the reading screen: how the last reading was judged, and what was read at the lit point. */
export function ReadingPanels({
  which,
  open,
  last,
  target,
  unit,
  onClose,
}: {
  which: Panel | null;
  open: OpenSheet;
  /** The reading kept last. */
  last: ReadingState | null;
  target: ReadingTarget | null;
  unit: LengthUnit;
  onClose: () => void;
}) {
  const point = target?.point;
  const instrument = open.sheet.instruments.find((one) => one.instrumentId === last?.entry.body.instrumentId);
  return (
    <>
      <Dialog
        open={which === 'how' && last !== null}
        title="How was this judged?"
        onClose={onClose}
        closeOutside
      >
        {last && (
          <JudgedPanel reading={last} plan={open.sheet.plan} instrument={instrument ?? null} unit={unit} />
        )}
      </Dialog>
      <Dialog
        open={which === 'point' && point !== undefined}
        title={`Readings at ${target?.label ?? ''}`}
        onClose={onClose}
        closeOutside
      >
        {point && (
          <>
            <PointReadings open={open} point={point} />
            <PointActions open={open} point={point} />
          </>
        )}
        {point?.point?.reason && <p className="mt-3 text-pencil">Chosen: {point.point.reason}.</p>}
        {target && (
          <p className="mt-3 text-label text-pencil">
            {onTape(target.place.xMm, unit)} {unit} from the left, {onTape(target.place.yMm, unit)} {unit} up.
          </p>
        )}
      </Dialog>
    </>
  );
}
