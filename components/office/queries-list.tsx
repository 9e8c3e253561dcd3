import { MarkIcon } from '@/components/drawings/mark';
import { LeaveLink } from '@/components/ui/leave-link';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { personName, subjectWords, type WordContext } from './entry-words';
import type { OfficeViewer } from './office-viewer';
import { dayAndTime } from './project-time';
import { entryHref } from './record-page';
import { RowAction } from './row-action';

/** Questions about entries with their answers, the open ones first. */
export function QueriesList({
  sheet,
  context,
  viewer,
}: {
  sheet: Sheet;
  context: WordContext;
  viewer: OfficeViewer;
}) {
  const by = (authorId: string, at: string) =>
    `${personName(authorId, viewer.people)}, ${dayAndTime(at, viewer.timeZone)}`;
  const ordered = [...sheet.queries].sort(
    (a, b) =>
      Number(a.answer !== null) - Number(b.answer !== null) || (b.entry.seq ?? 0) - (a.entry.seq ?? 0),
  );
  return (
    <ul>
      {ordered.map(({ entry, answer }) => (
        <li
          key={entry.id}
          className="grid grid-cols-[auto_1fr] gap-x-3 border-b border-rule py-2 sm:grid-cols-[auto_1fr_auto]"
        >
          <MarkIcon kind={answer ? 'met' : 'met-flagged'} className="mt-0.5" />
          <div>
            <p>
              <span className="font-label font-semibold">{entry.body.text}</span>{' '}
              <span className="text-label text-pencil">
                About:{' '}
                <LeaveLink
                  href={entryHref(sheet.pourId, entry.body.entryId)}
                  className="underline decoration-rule underline-offset-4 hover:text-chalk"
                >
                  {subjectWords(context, { kind: 'entry', id: entry.body.entryId })}
                </LeaveLink>
                . {by(entry.authorId, entry.recordedAt)}
              </span>
            </p>
            {answer ? (
              <p>
                {answer.body.text}{' '}
                <span className="text-label text-pencil">{by(answer.authorId, answer.recordedAt)}</span>
              </p>
            ) : (
              <p className="text-pencil">Not answered yet; it holds the pour.</p>
            )}
          </div>
          {!answer && mayRecord('query-answered', viewer.role) && (
            <div className="col-start-2 -ml-pad sm:col-start-3 print:hidden">
              <RowAction
                kind="answer-query"
                id={entry.id}
                pourId={sheet.pourId}
                seenSeq={sheet.headSeq}
                about={entry.body.text}
              />
            </div>
          )}
        </li>
      ))}
    </ul>
  );
}
