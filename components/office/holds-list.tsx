import { MarkIcon } from '@/components/drawings/mark';
import type { MarkKind } from '@/components/drawings/mark-words';
import { mayRecord } from '@/lib/inspection/entry-access';
import { roleWords } from '@/lib/inspection/roles';
import type { Hold, HoldKind, Sheet } from '@/lib/inspection/sheet-types';
import { holdsByRole } from './holds-by-role';
import type { OfficeViewer } from './office-viewer';
import { timeAway } from './project-time';
import { RowAction } from './row-action';

/** What is wrong is a square, what is decided or read again a ring with a bar, what is undone a cross. */
const markOfHold: Partial<Record<HoldKind, MarkKind>> = {
  'not-verified': 'not-verified',
  'readings-missing': 'unread',
  'measurement-missing': 'unread',
  'check-open': 'unread',
  'photo-missing': 'unread',
  'last-walk-missing': 'unread',
  'signature-missing': 'unread',
  attendance: 'unread',
  'disposition-awaited': 'met-flagged',
  'recheck-awaited': 'met-flagged',
  'query-open': 'met-flagged',
  'condition-not-verified': 'met-flagged',
};

/** Every hold: what, where, who clears it, what is needed; grouped by who clears them. */
export function HoldsList({
  sheet,
  holds,
  viewer,
}: {
  sheet: Sheet;
  holds: readonly Hold[];
  viewer: OfficeViewer;
}) {
  if (holds.length === 0) {
    return (
      <p className="text-body text-pencil">No hold stands, at the points read and for the items checked.</p>
    );
  }
  return (
    <div className="grid gap-4">
      {holdsByRole(holds).map((group) => (
        <section key={group.role} aria-label={`Cleared by ${roleWords[group.role].toLowerCase()}`}>
          <h3 className="flex items-baseline justify-between border-b border-ink pb-0.5 text-lead">
            {roleWords[group.role]}
            <span className="font-figure text-label font-medium text-pencil">{group.holds.length}</span>
          </h3>
          <ul>
            {group.holds.map((hold) => (
              <li
                key={hold.id}
                className="grid grid-cols-[auto_1fr] gap-x-3 border-b border-rule py-2 lg:grid-cols-[auto_1fr_minmax(0,24rem)_7rem]"
              >
                <MarkIcon kind={markOfHold[hold.kind] ?? 'not-met-low'} className="mt-1" />
                <div className="min-w-0">
                  <p className="font-label text-lead font-semibold break-words">{hold.title}</p>
                  <p className="text-pencil">
                    {sentences(
                      hold.where,
                      hold.detail,
                      hold.since && `Standing for ${timeAway(hold.since, viewer.now).replace(' ago', '')}`,
                    )}
                  </p>
                </div>
                <p className="col-start-2 lg:col-start-3">{hold.need}</p>
                <div className="col-start-2 justify-self-start lg:col-start-4 lg:justify-self-end">
                  <HoldAnswer {...{ sheet, hold, viewer }} />
                </div>
              </li>
            ))}
          </ul>
        </section>
      ))}
    </div>
  );
}

const sentences = (...parts: (string | null)[]): string =>
  parts.flatMap((part) => (part ? [/[.!?]$/.test(part) ? part : `${part}.`] : [])).join(' ');

/** The one thing that can be done about a hold from here, where the person may do it. */
function HoldAnswer({ sheet, hold, viewer }: { sheet: Sheet; hold: Hold; viewer: OfficeViewer }) {
  const entryId = hold.subjects.find((subject) => subject.kind === 'entry')?.id;
  const common = { pourId: sheet.pourId, seenSeq: sheet.headSeq, about: hold.title };
  if (
    hold.kind === 'manual' &&
    entryId &&
    hold.clearedBy === viewer.role &&
    mayRecord('hold-lifted', viewer.role)
  ) {
    return <RowAction kind="lift" id={entryId} {...common} />;
  }
  if (hold.kind === 'query-open' && entryId && mayRecord('query-answered', viewer.role)) {
    return <RowAction kind="answer-query" id={entryId} {...common} />;
  }
  const nonconformance = hold.subjects.find((subject) => subject.kind === 'nonconformance')?.id;
  if (nonconformance) {
    return (
      <a
        className="inline-flex min-h-6 items-center self-start font-label font-medium text-chalk underline underline-offset-4"
        href={`/nonconformances/${nonconformance}`}
        aria-label={`Open the decision sheet: ${hold.title}`}
      >
        Decision sheet
      </a>
    );
  }
  return null;
}
