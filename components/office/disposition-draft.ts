import { officeBodies } from '@/lib/inspection/entry-bodies';
import type { BodyOf } from '@/lib/inspection/entry';
import type { FieldProblem } from '@/lib/inspection/app-error';
import { instantFromField } from './project-time';

/** The decision as it is typed. */
export interface DispositionDraft {
  decision: '' | BodyOf<'disposition'>['decision'];
  reason: string;
  extent: string;
  accepts: string[];
  conditions: {
    id: string;
    text: string;
    criterion: string;
    stage: 'before-pour' | 'during-placing' | 'after-pour';
    dueAt: string;
  }[];
  licence: string;
  password: string;
}

export type ReadDisposition =
  { ok: true; body: BodyOf<'disposition'> } | { ok: false; problems: FieldProblem[] };

/** Only what stays as found, or is repaired, has readings to accept. */
export const mayAccept = (decision: DispositionDraft['decision']): boolean =>
  decision === 'use-as-is' || decision === 'repair';

/** The body that is signed, or what is missing, by the form's own field names. */
export function dispositionFromDraft(
  draft: DispositionDraft,
  nonconformanceId: string,
  timeZone: string,
): ReadDisposition {
  const problems: FieldProblem[] = [];
  const conditions = draft.conditions.map((condition, index) => {
    const dueAt = condition.dueAt === '' ? null : instantFromField(condition.dueAt, timeZone);
    if (condition.dueAt !== '' && dueAt === null) {
      problems.push({
        path: `conditions.${index}.dueAt`,
        message: "That time does not exist in the project's time zone.",
      });
    }
    return { ...condition, dueAt };
  });
  if (draft.decision === '') problems.push({ path: 'decision', message: 'Choose what is to be done.' });
  if (draft.decision === 'use-as-is' && draft.accepts.length === 0) {
    problems.push({ path: 'accepts', message: 'Tick what is accepted as it is.' });
  }
  if (draft.password === '') problems.push({ path: 'password', message: 'Your password signs it.' });
  const parsed = officeBodies.disposition.safeParse({
    nonconformanceId,
    decision: draft.decision === '' ? 'rework' : draft.decision,
    reason: draft.reason,
    accepts: mayAccept(draft.decision) ? draft.accepts : [],
    extent: draft.extent,
    conditions,
    licence: draft.licence,
  });
  for (const issue of parsed.error?.issues ?? []) {
    problems.push({ path: issue.path.join('.'), message: issue.message });
  }
  return parsed.success && problems.length === 0 ? { ok: true, body: parsed.data } : { ok: false, problems };
}
