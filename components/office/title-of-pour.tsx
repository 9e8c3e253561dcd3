import { TitleBlock } from '@/components/ui/title-block';
import type { Plan } from '@/lib/inspection/plan';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import { pourStateWords } from '@/lib/inspection/pour-state';
import type { PourState } from '@/lib/inspection/sheet-types';
import { dayAndTime } from './project-time';
import { pourStateTones } from './state-words';

/** What every page of a pour has at its head: number, element and location, planned time, plan, drawings, state. */
export function TitleOfPour({
  number,
  title,
  location,
  plannedAt,
  plan,
  state,
  holds,
  timeZone,
}: {
  number: string;
  title: string;
  location: string;
  plannedAt: string | null;
  plan: Plan | null;
  state: PourState;
  holds: number;
  timeZone: string;
}) {
  const drawings = [
    ...new Set((plan?.elements ?? []).map(({ drawing }) => `${drawing.number} rev ${drawing.revision}`)),
  ];
  const stands = state === 'held' || state === 'not-read' ? holds : 0;
  return (
    <TitleBlock
      label={`Pour ${number}`}
      cells={[
        { label: 'Pour', value: number },
        { label: 'Element and location', value: `${title}, ${location}`, grow: 3 },
        { label: 'Planned', value: plannedAt ? dayAndTime(plannedAt, timeZone) : 'not planned', grow: 2 },
        { label: 'Plan', value: plan ? `rev ${revisionLetter(plan.revision)}` : 'missing' },
        {
          label: drawings.length > 1 ? 'Drawings' : 'Drawing',
          value: drawings.join(', ') || 'none',
          grow: 2,
        },
        {
          label: 'State',
          value: `${pourStateWords[state]}${stands ? ` · ${stands}` : ''}`,
          tone: pourStateTones[state],
        },
      ]}
    />
  );
}
