import { MarkIcon } from '@/components/drawings/mark';
import type { MarkKind } from '@/components/drawings/mark-words';
import { roleWords } from '@/lib/inspection/roles';
import type { Hold, HoldKind, Sheet } from '@/lib/inspection/sheet-types';
import { HoldAnswer } from './hold-answer';
import { holdPlace } from './hold-place';
import { holdsByRole } from './holds-by-role';
import type { OfficeViewer } from './office-viewer';
import { timeAway } from './project-time';

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

/** Every hold: what, where, who clears it, what is needed; grouped by who clears them, the reader's own first. */
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
      {holdsByRole(holds, viewer.role).map(({ role, holds: group }) => (
        <section key={role} id={`holds-${role}`} aria-label={`Cleared by ${roleWords[role].toLowerCase()}`}>
          <h3 className="flex items-baseline justify-between gap-4 border-b border-ink pb-0.5 text-lead">
            <span>
              {roleWords[role]}
              {role === viewer.role && <span className="font-medium text-pencil">, for you to clear</span>}
            </span>
            <span className="font-figure text-label font-medium text-pencil">{group.length}</span>
          </h3>
          <ul>
            {group.map((hold) => (
              <HoldRow key={hold.id} {...{ sheet, hold, viewer }} />
            ))}
          </ul>
        </section>
      ))}
    </div>
  );
}

function HoldRow({ sheet, hold, viewer }: { sheet: Sheet; hold: Hold; viewer: OfficeViewer }) {
  const place = holdPlace(hold, sheet);
  const standing = hold.since && `Standing for ${timeAway(hold.since, viewer.now).replace(' ago', '')}`;
  return (
    <li
      id={`hold-${hold.id}`}
      className="grid grid-cols-[auto_1fr] gap-x-3 border-b border-rule py-2 target:bg-paper xl:grid-cols-[auto_1fr_minmax(0,17rem)]"
    >
      <MarkIcon kind={markOfHold[hold.kind] ?? 'not-met-low'} className="mt-1" />
      <div className="min-w-0">
        <p className="font-label text-lead font-semibold break-words">{hold.title}</p>
        <p className="text-pencil">
          {place ? (
            <a href={place} className="underline decoration-rule underline-offset-4 hover:text-chalk">
              {sentence(hold.where)}
            </a>
          ) : (
            sentence(hold.where)
          )}{' '}
          {[hold.detail, standing].map((part) => (part ? sentence(part) : '')).join(' ')}
        </p>
      </div>
      <div className="col-start-2 xl:col-start-3">
        <p>{hold.need}</p>
        <div className="*:[button]:-ml-pad print:hidden">
          <HoldAnswer {...{ sheet, hold, viewer }} />
        </div>
      </div>
    </li>
  );
}

const sentence = (text: string): string => (/[.!?]$/.test(text) ? text : `${text}.`);
