import { MarkIcon } from '@/components/drawings/mark';
import type { MarkKind } from '@/components/drawings/mark-words';
import { checkGroupWords } from '@/lib/inspection/holds-work';
import { judgedCheck } from '@/lib/inspection/judged-words';
import { checkGroups } from '@/lib/inspection/plan';
import type { CheckState, Sheet } from '@/lib/inspection/sheet-types';
import { personName } from './entry-words';
import { Fold } from './fold';
import { JudgedDetails } from './judged-details';
import type { OfficeViewer } from './office-viewer';
import { dayAndTime } from './project-time';

const answered: Record<'met' | 'not-met' | 'not-applicable', { mark: MarkKind; word: string }> = {
  met: { mark: 'met', word: 'met' },
  'not-met': { mark: 'not-met-low', word: 'not met' },
  'not-applicable': { mark: 'not-verified', word: 'not applicable' },
};

/** Is there nothing more to see to: answered, and not against it? */
const settled = (check: CheckState): boolean =>
  check.governing !== null &&
  !check.conflict &&
  (check.governing.body.answer !== 'not-met' || check.acceptedBy !== null);

/** The checklist as it stands, by group; groups in which nothing is left are folded away. */
export function ChecksList({ sheet, viewer }: { sheet: Sheet; viewer: OfficeViewer }) {
  if (sheet.checks.length === 0) return <p className="text-pencil">The plan asks for no checks.</p>;
  return (
    <div className="gap-x-8 lg:columns-2">
      {checkGroups.map((group) => {
        const checks = sheet.checks.filter((check) => check.item.group === group);
        if (checks.length === 0) return null;
        const left = checks.filter((check) => !settled(check)).length;
        return (
          <section
            key={group}
            aria-label={checkGroupWords[group]}
            className="min-w-0 break-inside-avoid pb-2 print:break-inside-auto"
          >
            <Fold
              open={left > 0}
              summary={checkGroupWords[group]}
              aside={left > 0 ? `${left} of ${checks.length} to see to` : `all ${checks.length} answered`}
            >
              <ul>
                {checks.map((check) => (
                  <Check key={check.item.id} {...{ check, viewer }} />
                ))}
              </ul>
            </Fold>
          </section>
        );
      })}
    </div>
  );
}

function Check({ check, viewer }: { check: CheckState; viewer: OfficeViewer }) {
  const answer = check.governing?.body ?? null;
  const shown = answer ? answered[answer.answer] : { mark: 'unread' as const, word: 'not answered' };
  return (
    <li
      id={`check-${check.item.id}`}
      className="grid grid-cols-[auto_1fr] gap-x-2.5 border-b border-rule py-1.5 target:bg-paper"
    >
      <MarkIcon kind={shown.mark} className="mt-0.5" />
      <div>
        <p>
          {check.item.question}
          {check.item.critical && <span className="font-label font-semibold"> (critical)</span>}
        </p>
        <p className="text-label text-pencil">
          <span
            className={answer?.answer === 'not-met' ? 'font-semibold text-hold' : 'font-semibold text-ink'}
          >
            {shown.word}
          </span>
          {check.governing &&
            `, ${personName(check.governing.authorId, viewer.people)}, ${dayAndTime(check.governing.recordedAt, viewer.timeZone)}`}
          {`. ${check.item.basis}`}
          {check.item.attendance !== 'none' &&
            `. ${check.item.attendance === 'hold-point' ? 'Hold point' : 'Witness point'}`}
          {check.item.evidence === 'photo' &&
            `. ${check.photoIds.length} ${check.photoIds.length === 1 ? 'photo' : 'photos'}`}
        </p>
        {answer?.reason && <p className="text-label">{answer.reason}</p>}
        {answer?.note && <p className="text-label">{answer.note}</p>}
        {check.conflict && (
          <p className="text-label text-hold">
            Two answers had not seen each other; the less favourable governs.
          </p>
        )}
        {check.correctedSince && (
          <p className="text-label">Corrected since: {check.correctedSince.body.text}</p>
        )}
        {check.acceptedBy && <p className="text-label">Accepted by a decision of the engineer.</p>}
        {check.governing && <JudgedDetails about={check.item.question} judged={judgedCheck(check)} />}
      </div>
    </li>
  );
}
