'use client';

import { mayRecord } from '@/lib/inspection/entry-access';
import type { Plan } from '@/lib/inspection/plan';
import type { Role } from '@/lib/inspection/roles';
import type { Hold } from '@/lib/inspection/sheet-types';
import type { EntryAction } from './entry-action';
import {
  correctionAction,
  holdAction,
  inspectionAskedAction,
  noteAction,
  placementAction,
  releaseAskedAction,
  siteEventAction,
  verbalInstructionAction,
} from './entry-actions';
import { EntryButton } from './entry-button';

/** What this person may record of the pour from here, one button each. */
export function PourActions({
  plan,
  seenSeq,
  holds,
  role,
  now,
  timeZone,
  placing,
}: {
  plan: Plan;
  seenSeq: number;
  holds: Hold[];
  role: Role;
  now: string;
  timeZone: string;
  placing: 'before' | 'started' | 'finished';
}) {
  const offered: (EntryAction | null)[] = [
    correctionAction(holds, plan),
    placing === 'before' ? inspectionAskedAction(now, timeZone) : null,
    placing === 'before' ? releaseAskedAction(plan) : null,
    holdAction(plan),
    noteAction(plan),
    verbalInstructionAction(),
    placing === 'finished' ? null : siteEventAction(plan, now, timeZone),
    placing === 'before' ? placementAction('started', plan, now, timeZone) : null,
    placing === 'started' ? placementAction('finished', plan, now, timeZone) : null,
  ];
  const actions = offered.filter(
    (action): action is EntryAction => action !== null && mayRecord(action.type, role),
  );
  if (actions.length === 0) return null;
  return (
    <ul aria-label="What you can record here" className="flex flex-wrap gap-2">
      {actions.map((action) => (
        <li key={action.label}>
          <EntryButton pourId={plan.pourId} seenSeq={seenSeq} action={action} />
        </li>
      ))}
    </ul>
  );
}
