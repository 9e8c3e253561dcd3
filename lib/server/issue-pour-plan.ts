import { v7 as uuid } from 'uuid';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { AppError } from '@/lib/inspection/app-error';
import { issuePlan } from '@/lib/inspection/issue-plan';
import type { Plan } from '@/lib/inspection/plan';
import { revisionLetter } from '@/lib/inspection/revision-letter';
import type { PlanInput, PourInput } from '@/lib/inspection/plan-input';
import { currentPlans, insertPlan, insertPour } from '@/db/stores/pour-store';
import type { Tx } from '@/db/connection';
import { planDigestOf } from './entry-hash';
import { OpenRecord, type Author } from './open-record';
import { loosenedRequirements } from './loosened-requirements';

/**
 * Plans a pour: the pour, its first plan and the entry that says so.
 * @throws AppError invalid with the field, when the number is taken or a cover cannot be computed
 */
export async function createPour(tx: Tx, author: Author, input: PourInput, now: string): Promise<string> {
  const record = await OpenRecord.open(tx, input.projectId, author, now);
  const pourId = uuid();
  const { projectId, number, title, location, plannedAt, reason } = input;
  const created = await insertPour(tx, {
    id: pourId,
    projectId,
    number,
    title,
    location,
    plannedAt,
    createdBy: author.id,
  });
  if (!created) {
    throw new AppError('invalid', undefined, {
      fields: [{ path: 'number', message: 'There is a pour of this number in the project already.' }],
    });
  }
  const context = { pourId, revision: 1, issuedAt: now, authorId: author.id, reason };
  const plan = withFields(() => issuePlan(input.plan, context));
  await writePlan(record, plan);
  return pourId;
}

export interface Revision {
  plan: PlanInput;
  reason: string;
  /** The revision that the person had on the screen. */
  basedOn?: number;
}

/**
 * Issues the next revision of a pour's plan.
 * @throws AppError conflict when somebody issued one meanwhile, not-allowed when it asks for less cover than before
 *   and its author is not the engineer
 */
export async function revisePlan(
  tx: Tx,
  author: Author,
  pour: { id: string; projectId: string },
  wanted: Revision,
  now: string,
): Promise<number> {
  const record = await OpenRecord.open(tx, pour.projectId, author, now);
  const previous = (await currentPlans(tx, pour.projectId, [pour.id])).get(pour.id);
  if (!previous) throw new AppError('not-found');
  if (wanted.basedOn !== undefined && wanted.basedOn !== previous.revision) {
    throw new AppError(
      'conflict',
      `Plan rev ${revisionLetter(previous.revision)} was issued meanwhile; nothing was issued now. What you typed is still here: open the plan in another tab, compare, and carry over what differs.`,
    );
  }
  const revision = previous.revision + 1;
  const context = { pourId: pour.id, revision, issuedAt: now, authorId: author.id, reason: wanted.reason };
  const plan = withFields(() => issuePlan(wanted.plan, context));
  const loosened = author.role === 'engineer' ? [] : loosenedRequirements(previous, plan);
  if (loosened.length > 0) {
    throw new AppError(
      'not-allowed',
      `Only the engineer changes what cover is required: ${loosened.join(', ')}.`,
    );
  }
  await writePlan(record, plan);
  return revision;
}

/** Keeps the document, and its digest in the chain: a plan changed behind the application's back breaks it. */
async function writePlan(record: OpenRecord, plan: Plan): Promise<void> {
  const digest = planDigestOf(plan);
  await insertPlan(record.tx, record.projectId, plan, digest);
  await record.load([plan.pourId]);
  record.write(plan.pourId, 'plan-issued', { revision: plan.revision, digest, reason: plan.reason });
  await record.close();
}

/** A number that the trade's computation refuses belongs to a field of the form. */
function withFields<T>(compute: () => T): T {
  try {
    return compute();
  } catch (error) {
    if (!(error instanceof ConcreteError)) throw error;
    throw new AppError('invalid', undefined, {
      fields: [{ path: `plan.${error.field}`, message: error.reason }],
    });
  }
}
