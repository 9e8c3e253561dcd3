import { LeaveLink } from '@/components/ui/leave-link';
import { isAmendable } from '@/lib/inspection/amendments';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { AmendEntry } from './amend-entry';
import { unknownEntryWords } from './entry-words';
import type { OfficeViewer } from './office-viewer';
import { fullTime } from './project-time';
import { byWords, type AmendmentLine, type RecordLine } from './record-lines';
import { entryHref } from './record-page';
import { RowAction } from './row-action';

/** Types that nobody queries: the server's own words, and what is itself a question. */
const notQueried = new Set<RecordLine['type']>([
  'query',
  'query-answered',
  'photo-stored',
  'photo-refused',
  'plan-issued',
  'release-refused',
  'signature-confirmed',
  'member-changed',
]);

/** Entries in words, as ordered; what was amended stays, struck through, with who, when and why. */
export function RecordList({
  sheet,
  lines,
  viewer,
}: {
  sheet: Sheet;
  lines: readonly RecordLine[];
  viewer: OfficeViewer;
}) {
  return (
    <ol className="border-t border-ink">
      {sheet.unknown.map((entry) => {
        const words = unknownEntryWords(entry);
        return (
          <li key={entry.id} className="border-b border-rule py-2">
            <p className="font-label font-semibold text-hold">{words.title}</p>
            {words.lines.map((line) => (
              <p key={line}>{line}</p>
            ))}
          </li>
        );
      })}
      {lines.map((line) => (
        <li
          key={line.id}
          id={`entry-${line.id}`}
          className="grid gap-x-4 border-b border-rule py-2 target:bg-paper sm:grid-cols-[8.5rem_1fr_auto]"
        >
          <div className="font-figure text-label text-pencil">
            {line.seq === null ? (
              'not received'
            ) : (
              <LeaveLink
                href={entryHref(sheet.pourId, line.id)}
                className="inline-block min-h-6 decoration-rule underline-offset-4 hover:text-chalk [&:not(:hover)]:no-underline"
              >
                no. {line.seq}
              </LeaveLink>
            )}{' '}
            <span className="sm:block">{line.hash ? line.hash.slice(0, 10) : ''}</span>
            {line.ofProject && <span className="font-label sm:block"> of the project</span>}
          </div>
          <div className="min-w-0">
            <Wording line={line} />
            {line.amendments.map((amendment) => (
              <Amended key={amendment.id} amendment={amendment} timeZone={viewer.timeZone} />
            ))}
            <p className="text-label text-pencil">
              {byWords(line)}, {fullTime(line.recordedAt, viewer.timeZone)}
              {line.clockDoubtful && ', by a device whose clock was off'}
            </p>
          </div>
          <LineActions {...{ line, sheet, viewer }} />
        </li>
      ))}
    </ol>
  );
}

/** One's own entry can be amended, another's can be queried, by those whose role may. */
function LineActions({ line, sheet, viewer }: { line: RecordLine; sheet: Sheet; viewer: OfficeViewer }) {
  if (line.seq === null || line.ofProject) return null;
  const own = line.authorId === viewer.personId;
  const withdrawn = line.amendments.at(-1)?.withdraws ?? false;
  const common = { pourId: sheet.pourId, seenSeq: sheet.headSeq, about: line.wording.title };
  if (own && isAmendable(line.type) && !withdrawn && mayRecord('amendment', viewer.role)) {
    return (
      <div className="print:hidden">
        <AmendEntry
          amended={{
            id: line.id,
            sawAmendmentId: line.amendments.at(-1)?.id ?? null,
            correctable: line.correctable,
          }}
          {...common}
        />
      </div>
    );
  }
  if (own || notQueried.has(line.type) || !mayRecord('query', viewer.role)) return null;
  return (
    <div className="print:hidden">
      <RowAction kind="query" id={line.id} {...common} />
    </div>
  );
}

function Wording({ line }: { line: RecordLine }) {
  const struck = line.amendments.some((amendment) => amendment.problem === null);
  const body = (
    <>
      <span className="font-label font-semibold">{line.wording.title}</span>
      {line.wording.lines.map((text, index) => (
        <span key={`${index}-${text}`} className="block break-words">
          {text}
        </span>
      ))}
    </>
  );
  return struck ? <del className="block">{body}</del> : <p>{body}</p>;
}

function Amended({ amendment, timeZone }: { amendment: AmendmentLine; timeZone: string }) {
  const words = amendment.withdraws ? 'Withdrawn' : 'Amended';
  return (
    <div className="border-l-[6px] border-watch pl-3">
      <p>
        {words} by {amendment.by}, {fullTime(amendment.at, timeZone)}: {amendment.reason}
      </p>
      {amendment.now && <p className="font-label font-semibold">{amendment.now}</p>}
      {amendment.problem && <p className="text-hold">It does not count. {amendment.problem}</p>}
    </div>
  );
}
