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
import { Fold } from './fold';

/** How many stand in sight; the rest is a press away, so that the holds are not pushed down by buttons. */
const IN_SIGHT = 3;

/** What this person may record of the pour from here, one button each, the likeliest first. */
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
  const before = placing === 'before';
  const offered: (EntryAction | null)[] = [
    placing === 'started' ? placementAction('finished', plan, now, timeZone) : null,
    before ? correctionAction(holds, plan) : null,
    before ? inspectionAskedAction(now, timeZone) : null,
    before ? releaseAskedAction(plan) : null,
    before ? holdAction(plan) : null,
    noteAction(plan),
    placing === 'finished' ? null : siteEventAction(plan, now, timeZone),
    before ? verbalInstructionAction() : null,
    before ? placementAction('started', plan, now, timeZone) : null,
  ];
  const actions = offered.filter(
    (action): action is EntryAction => action !== null && mayRecord(action.type, role),
  );
  if (actions.length === 0) return null;
  const buttons = (some: EntryAction[]) =>
    some.map((action) => (
      <li key={action.label}>
        <EntryButton pourId={plan.pourId} seenSeq={seenSeq} action={action} />
      </li>
    ));
  return (
    <div className="grid gap-2 border-t border-ink pt-3 print:hidden">
      <ul aria-label="What you can record here" className="flex flex-wrap gap-2">
        {buttons(actions.slice(0, IN_SIGHT))}
      </ul>
      {actions.length > IN_SIGHT && (
        <Fold summary="Record something else">
          <ul aria-label="What else you can record here" className="flex flex-wrap gap-2">
            {buttons(actions.slice(IN_SIGHT))}
          </ul>
        </Fold>
      )}
    </div>
  );
}
