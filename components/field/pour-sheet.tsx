'use client';

import { SheetFrame } from '@/components/ui/sheet-frame';
import { TitleBlock } from '@/components/ui/title-block';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import { pourStateWords } from '@/lib/inspection/pour-state';
import { fieldPaths } from './field-routes';
import { dayAndTime, timeAway } from './field-time';
import { LeftForYou } from './left-for-you';
import type { OpenSheet } from './open-sheet';
import { OthersOnPour } from './others-waiting';
import { Screen } from './screen';
import { CheckLines, FaceLines, MeasurementLines, NonconformanceLines, SiteLines } from './sheet-lines';
import { pourStateTone } from './state-tone';
import { useNow } from './use-now';

/** A pour's sheet in walking order: what it is, what is left for you, checks, faces, measurements, the rest, sign. */
export function PourSheet({ open }: { open: OpenSheet }) {
  const now = useNow();
  const { pour, project, sheet, holds, state } = open;
  const drawings = [
    ...new Set(sheet.plan.elements.map(({ drawing }) => `${drawing.number} rev ${drawing.revision}`)),
  ];
  return (
    <Screen
      title={`${pour.number} ${pour.title}`}
      aside={
        pour.plannedAt
          ? `${dayAndTime(pour.plannedAt, project.timeZone)} · ${timeAway(pour.plannedAt, now)}`
          : pour.location
      }
      back={{ href: fieldPaths.pours, words: 'pours' }}
    >
      <div className="grid gap-6">
        <SheetFrame
          flush
          titleBlock={
            <TitleBlock
              cells={[
                { label: 'Pour', value: pour.number, figure: true },
                { label: 'Element', value: pour.title, grow: 2 },
                { label: 'Location', value: pour.location, grow: 2 },
                {
                  label: 'Planned',
                  value: pour.plannedAt ? dayAndTime(pour.plannedAt, project.timeZone) : 'no time yet',
                  grow: 2,
                },
                { label: 'Plan', value: `rev ${revisionLetter(sheet.plan.revision)}` },
                { label: drawings.length > 1 ? 'Drawings' : 'Drawing', value: drawings.join(', '), grow: 2 },
                {
                  label: 'State',
                  value: `${pourStateWords[state]}${holds.length > 0 ? ` · ${holds.length}` : ''}`,
                  tone: pourStateTone[state],
                },
              ]}
            />
          }
        >
          <LeftForYou open={open} />
        </SheetFrame>
        <OthersOnPour pourId={sheet.pourId} />
        <div className="grid gap-6 md:grid-cols-2 md:items-start">
          <CheckLines open={open} />
          <div className="grid gap-6">
            <FaceLines open={open} />
            <MeasurementLines open={open} />
            <NonconformanceLines open={open} />
            <SiteLines open={open} />
          </div>
        </div>
      </div>
    </Screen>
  );
}
