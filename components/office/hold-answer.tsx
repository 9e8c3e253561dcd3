import { mayRecord } from '@/lib/inspection/entry-access';
import type { Hold, Sheet } from '@/lib/inspection/sheet-types';
import type { OfficeViewer } from './office-viewer';
import { RowAction } from './row-action';

const linkClass =
  'inline-flex min-h-target items-center self-start font-label font-medium text-chalk underline underline-offset-4';

/** The one thing that can be done about a hold from here, where this person may do it. */
export function HoldAnswer({ sheet, hold, viewer }: { sheet: Sheet; hold: Hold; viewer: OfficeViewer }) {
  const entryId = hold.subjects.find((subject) => subject.kind === 'entry')?.id;
  const common = { pourId: sheet.pourId, seenSeq: sheet.headSeq, about: hold.title };
  const lifts = hold.kind === 'manual' || hold.kind === 'verbal-instruction';
  if (lifts && entryId && hold.clearedBy === viewer.role && mayRecord('hold-lifted', viewer.role)) {
    return <RowAction kind="lift" id={entryId} {...common} />;
  }
  if (hold.kind === 'query-open' && entryId && mayRecord('query-answered', viewer.role)) {
    return <RowAction kind="answer-query" id={entryId} {...common} />;
  }
  const condition = sheet.conditions.find((one) => hold.id === `condition-not-verified:${one.condition.id}`);
  if (condition && mayRecord('condition-verified', viewer.role)) {
    return <RowAction kind="verify" id={condition.condition.id} {...common} />;
  }
  const signs = hold.kind === 'signature-missing' || hold.kind === 'plan-revised';
  if (signs && hold.clearedBy === viewer.role) {
    return (
      <a className={linkClass} href={`/field/pours/${sheet.pourId}/sign`} aria-label={`Sign: ${hold.title}`}>
        Sign on the field side
      </a>
    );
  }
  const nonconformance = hold.subjects.find((subject) => subject.kind === 'nonconformance')?.id;
  if (nonconformance) {
    return (
      <a
        className={linkClass}
        href={`/nonconformances/${nonconformance}`}
        aria-label={`Open the decision sheet: ${hold.title}`}
      >
        Decision sheet
      </a>
    );
  }
  return null;
}
