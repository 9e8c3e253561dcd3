import { LeaveLink } from '@/components/ui/leave-link';
import type { NonconformanceState } from '@/lib/inspection/sheet-types';
import type { OfficeViewer } from './office-viewer';
import { personName, subjectWords, type WordContext } from './entry-words';
import { fullTime } from './project-time';
import { entryHref } from './record-page';
import { decisionWords, stageWords } from './state-words';

/** The decisions on a nonconformance, the one in force first, earlier ones struck through. */
export function DecisionList({
  state,
  context,
  viewer,
  pourId,
}: {
  state: NonconformanceState;
  pourId: string;
  context: WordContext;
  viewer: OfficeViewer;
}) {
  if (state.dispositions.length === 0) return <p className="text-pencil">Not decided yet.</p>;
  return (
    <ol className="grid gap-3">
      {[...state.dispositions].reverse().map((entry) => {
        const { body } = entry;
        const inForce = state.disposition?.id === entry.id;
        const head = (
          <span className="font-label text-lead font-semibold">
            {decisionWords[body.decision]}
            {inForce ? '' : ', no longer in force'}
          </span>
        );
        return (
          <li key={entry.id} className="grid gap-1 border-b border-rule pb-2">
            {inForce ? head : <del>{head}</del>}
            <p>{body.reason}</p>
            <p className="text-pencil">Reaches: {body.extent}</p>
            {body.accepts.length > 0 && (
              <p>
                Accepts: {body.accepts.map((id) => subjectWords(context, { kind: 'entry', id })).join('; ')}
              </p>
            )}
            {body.conditions.map((condition) => (
              <p key={condition.id}>
                Condition {stageWords[condition.stage]}: {condition.text}. Met when: {condition.criterion}.
              </p>
            ))}
            <p className="text-label text-pencil">
              {personName(entry.authorId, viewer.people)}, licence {body.licence},{' '}
              {fullTime(entry.recordedAt, viewer.timeZone)}, entry{' '}
              <LeaveLink
                href={entryHref(pourId, entry.id)}
                className="underline decoration-rule underline-offset-4 hover:text-chalk"
              >
                no. {entry.seq ?? '–'}
              </LeaveLink>
            </p>
          </li>
        );
      })}
    </ol>
  );
}
