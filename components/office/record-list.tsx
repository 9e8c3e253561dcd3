import { LinkButton } from '@/components/ui/link-button';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { Sheet } from '@/lib/inspection/sheet-types';
import { unknownEntryWords } from './entry-words';
import type { OfficeViewer } from './office-viewer';
import { fullTime } from './project-time';
import { byWords, recordLines, wordContextOf, type AmendmentLine, type RecordLine } from './record-lines';
import { RowAction } from './row-action';

/** Whether the chain of a pour's entries holds, as checked on the server. */
export interface ChainCheck {
  intact: boolean;
  entries: number;
  headSeq: number;
  headHash: string | null;
  /** Where it does not hold. */
  problem: string | null;
}

const LATEST = 60;

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

/** Every entry in words, newest first; what was amended stays, struck through, with who, when and why. */
export function RecordList({
  sheet,
  chain,
  viewer,
  whole,
}: {
  sheet: Sheet;
  chain: ChainCheck | null;
  viewer: OfficeViewer;
  /** Every entry; otherwise the latest ones, with a link to the rest. */
  whole: boolean;
}) {
  const all = recordLines(sheet, wordContextOf(sheet, viewer.people, viewer.timeZone)).reverse();
  const lines = whole ? all : all.slice(0, LATEST);
  const mayQuery = mayRecord('query', viewer.role);
  return (
    <div className="grid gap-2">
      <ChainState chain={chain} />
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
            className="grid gap-x-4 border-b border-rule py-2 sm:grid-cols-[8.5rem_1fr_auto]"
          >
            <div className="font-figure text-label text-pencil">
              {line.seq === null ? 'not received' : `no. ${line.seq}`}
              <span className="block">{line.hash ? line.hash.slice(0, 10) : ''}</span>
              {line.ofProject && <span className="block font-label">of the project</span>}
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
            {mayQuery && line.seq !== null && !line.ofProject && !notQueried.has(line.type) && (
              <div>
                <RowAction
                  kind="query"
                  id={line.id}
                  pourId={sheet.pourId}
                  seenSeq={sheet.headSeq}
                  about={line.wording.title}
                />
              </div>
            )}
          </li>
        ))}
      </ol>
      {lines.length < all.length && (
        <div>
          <LinkButton href={`/pours/${sheet.pourId}?record=whole#record`}>
            Show all {all.length} entries
          </LinkButton>
        </div>
      )}
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

/** Whether the chain holds, in one line. */
export function ChainState({ chain }: { chain: ChainCheck | null }) {
  if (!chain) return null;
  return (
    <p className={chain.intact ? 'text-body text-pencil' : 'text-body font-semibold text-hold'}>
      {chain.intact
        ? `Chain checked: ${chain.entries} ${chain.entries === 1 ? 'entry' : 'entries'} of this pour, unbroken to no. ${chain.headSeq}`
        : `The chain is broken. ${chain.problem ?? ''}`}
      {chain.headHash && <span className="font-figure text-label"> {chain.headHash.slice(0, 16)}</span>}
    </p>
  );
}
