'use client';

import { useState } from 'react';
import { EmptyState } from '@/components/ui/empty-state';
import { mayRecord } from '@/lib/inspection/entry-access';
import { fieldPaths } from './field-routes';
import { faceOfPlan, type FaceOfPlan, type OpenSheet } from './open-sheet';
import { ReadingDesk } from './reading-desk';
import { Screen } from './screen';
import { walkProgress } from './walk-order';
import { FaceSection, FaceTable, WorkingMap } from './face-drawings';
import { PointReadings } from './point-readings';
import { Dialog } from '@/components/ui/dialog';
import { pointOf } from './subject-words';

/** Reading cover on one face; those who only read see the drawings and what was read. */
export function ReadingScreen({
  open,
  faceId,
  pointKey,
}: {
  open: OpenSheet;
  faceId: string;
  /** The point to be lit first; null: the next of the walk. */
  pointKey: string | null;
}) {
  const place = faceOfPlan(open.sheet, faceId);
  const state = open.sheet.faces.find((one) => one.faceId === faceId);
  const back = { href: fieldPaths.pour(open.sheet.pourId), words: open.pour.number };
  if (!place || !state) {
    return (
      <Screen title="Face" back={back}>
        <EmptyState title="This face is not in the plan">
          A plan revision may have taken it out. What was read there stays in the record.
        </EmptyState>
      </Screen>
    );
  }
  const { read, total } = walkProgress(state.points);
  const title = `${open.pour.number} ${place.face.name}`;
  const aside = `${read} of ${total} read · ${place.element.mark}`;
  if (!mayRecord('reading', open.project.role)) {
    return (
      <Screen title={title} aside={aside} back={back}>
        <FaceOnly open={open} place={place} faceId={faceId} />
      </Screen>
    );
  }
  return (
    <Screen title={title} aside={aside} back={back} tight>
      <ReadingDesk open={open} place={place} state={state} firstKey={pointKey} />
    </Screen>
  );
}

function FaceOnly({ open, place, faceId }: { open: OpenSheet; place: FaceOfPlan; faceId: string }) {
  const [shown, setShown] = useState<string | null>(null);
  const state = open.sheet.faces.find((one) => one.faceId === faceId);
  const point = shown ? pointOf(open.sheet, shown) : null;
  if (!state) return null;
  return (
    <div className="border border-ink bg-sheet">
      <WorkingMap
        place={place}
        state={state}
        unit={open.sheet.plan.units}
        selected={shown}
        spot={null}
        onPoint={setShown}
        onSpot={() => setShown(null)}
      />
      {place.face.requirements.map((requirement) => (
        <FaceSection
          key={requirement.id}
          place={place}
          state={state}
          requirement={requirement}
          unit={open.sheet.plan.units}
          dropId={null}
        />
      ))}
      <FaceTable place={place} state={state} unit={open.sheet.plan.units} />
      <Dialog
        open={point !== null}
        title={`Readings at ${point?.label ?? ''}`}
        onClose={() => setShown(null)}
        closeOutside
      >
        {point && <PointReadings open={open} point={point} />}
      </Dialog>
    </div>
  );
}
