import { MarkIcon } from '@/components/drawings/mark';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { ConditionState } from '@/lib/inspection/sheet-types';
import type { OfficeViewer } from './office-viewer';
import { dayAndTime } from './project-time';
import { RowAction } from './row-action';
import { stageWords } from './state-words';

/** Conditions of the engineer's decisions: what, met when, by when, and whether it has been verified. */
export function ConditionsList({
  conditions,
  pourId,
  seenSeq,
  viewer,
}: {
  conditions: readonly ConditionState[];
  pourId: string;
  seenSeq: number;
  viewer: OfficeViewer;
}) {
  if (conditions.length === 0) return <p className="text-pencil">No decision carries a condition.</p>;
  return (
    <ul>
      {conditions.map(({ condition, verified }) => (
        <li
          key={condition.id}
          className="grid grid-cols-[auto_1fr] gap-x-3 border-b border-rule py-2 sm:grid-cols-[auto_1fr_auto]"
        >
          <MarkIcon
            kind={verified ? (verified.body.outcome === 'met' ? 'met' : 'not-met-low') : 'unread'}
            className="mt-0.5"
          />
          <div>
            <p>
              <span className="font-label font-semibold">{condition.text}</span>,{' '}
              {stageWords[condition.stage]}
            </p>
            <p className="text-label text-pencil">
              Met when: {condition.criterion}.
              {condition.dueAt && ` Due ${dayAndTime(condition.dueAt, viewer.timeZone)}.`}{' '}
              {verified
                ? `${verified.body.outcome === 'met' ? 'Verified' : 'Found not met'} ${dayAndTime(verified.recordedAt, viewer.timeZone)}${verified.body.text ? `: ${verified.body.text}` : ''}.`
                : 'Not verified yet; the inspector verifies it.'}
            </p>
          </div>
          {verified?.body.outcome !== 'met' && mayRecord('condition-verified', viewer.role) && (
            <div className="col-start-2 -ml-pad sm:col-start-3 print:hidden">
              <RowAction
                kind="verify"
                id={condition.id}
                pourId={pourId}
                seenSeq={seenSeq}
                about={condition.text}
              />
            </div>
          )}
        </li>
      ))}
    </ul>
  );
}
