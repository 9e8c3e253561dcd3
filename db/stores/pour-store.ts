import type { Plan } from '@/lib/inspection/plan';
import type { Tx } from '@/db/connection';

export interface Pour {
  id: string;
  projectId: string;
  number: string;
  title: string;
  location: string;
  plannedAt: string | null;
  planRevision: number;
}

interface PourRow {
  id: string;
  project_id: string;
  number: string;
  title: string;
  location: string;
  planned_at: string | null;
  plan_revision: number;
}

const columns = ['id', 'project_id', 'number', 'title', 'location', 'planned_at', 'plan_revision'] as const;

const pour = (row: PourRow): Pour => ({
  id: row.id,
  projectId: row.project_id,
  number: row.number,
  title: row.title,
  location: row.location,
  plannedAt: row.planned_at,
  planRevision: row.plan_revision,
});

/** The pour with this id, if it is in one of the projects opened to this transaction. */
export async function findPour(tx: Tx, pourId: string): Promise<Pour | null> {
  const row = await tx('pours')
    .where({ id: pourId })
    .first<PourRow | undefined>(...columns);
  return row ? pour(row) : null;
}

export async function poursByIds(tx: Tx, projectId: string, ids: readonly string[]): Promise<Pour[]> {
  if (ids.length === 0) return [];
  const rows = await tx('pours')
    .where({ project_id: projectId })
    .whereRaw('id = any(?::uuid[])', [[...ids]])
    .select<PourRow[]>(...columns);
  return rows.map(pour);
}

/** Pours that an entry of the project's own stream can still change: those not placed. */
export async function openPourIds(tx: Tx, projectId: string): Promise<string[]> {
  const rows = await tx('pours as p')
    .leftJoin('pour_summaries as s', { 's.project_id': 'p.project_id', 's.pour_id': 'p.id' })
    .where('p.project_id', projectId)
    .whereRaw(`coalesce(s.state, 'no-plan') not in ('placed', 'placed-without-release')`)
    .select<{ id: string }[]>('p.id');
  return rows.map(({ id }) => id);
}

export async function allPourIds(tx: Tx, projectId: string): Promise<string[]> {
  const rows = await tx('pours')
    .where({ project_id: projectId })
    .orderBy('id')
    .select<{ id: string }[]>('id');
  return rows.map(({ id }) => id);
}

/** Which of these pours the person is assigned to. */
export async function assignedPourIds(
  tx: Tx,
  projectId: string,
  personId: string,
): Promise<ReadonlySet<string>> {
  const rows = await tx('assignments')
    .where({ project_id: projectId, person_id: personId })
    .select<{ pour_id: string }[]>('pour_id');
  return new Set(rows.map((row) => row.pour_id));
}

/** @returns false when the project has a pour of this number already */
export async function insertPour(
  tx: Tx,
  created: Omit<Pour, 'planRevision'> & { createdBy: string },
): Promise<boolean> {
  const rows = await tx('pours')
    .insert({
      project_id: created.projectId,
      id: created.id,
      number: created.number,
      title: created.title,
      location: created.location,
      planned_at: created.plannedAt,
      created_by: created.createdBy,
    })
    .onConflict(['project_id', 'number'])
    .ignore()
    .returning<{ id: string }[]>('id');
  return rows.length === 1;
}

/** Keeps an issued revision and makes it the pour's current one. */
export async function insertPlan(tx: Tx, projectId: string, plan: Plan, digest: string): Promise<void> {
  await tx('plans').insert({
    project_id: projectId,
    pour_id: plan.pourId,
    revision: plan.revision,
    document: JSON.stringify(plan),
    digest,
    author_id: plan.authorId,
    reason: plan.reason,
    issued_at: plan.issuedAt,
  });
  await tx('pours')
    .where({ project_id: projectId, id: plan.pourId })
    .update({ plan_revision: plan.revision });
}

export interface PlanMark {
  pourId: string;
  revision: number;
  digest: string;
}

/** Revision and digest of these pours' current plans; a pour without one is left out. */
export async function currentPlanMarks(
  tx: Tx,
  projectId: string,
  pourIds: readonly string[],
): Promise<PlanMark[]> {
  const { rows } = await tx.raw<{ rows: { pour_id: string; revision: number; digest: string }[] }>(
    `select l.pour_id, l.revision, l.digest from pours p
       join plans l on l.project_id = p.project_id and l.pour_id = p.id and l.revision = p.plan_revision
     where p.project_id = ? and p.id = any(?::uuid[])`,
    [projectId, [...pourIds]],
  );
  return rows.map((row) => ({ pourId: row.pour_id, revision: row.revision, digest: row.digest }));
}

/** The current plans of these pours; a pour without one is left out. */
export async function currentPlans(
  tx: Tx,
  projectId: string,
  pourIds: readonly string[],
): Promise<Map<string, Plan>> {
  if (pourIds.length === 0) return new Map();
  const { rows } = await tx.raw<{ rows: { pour_id: string; document: Plan }[] }>(
    `select l.pour_id, l.document from pours p
       join plans l on l.project_id = p.project_id and l.pour_id = p.id and l.revision = p.plan_revision
     where p.project_id = ? and p.id = any(?::uuid[])`,
    [projectId, [...pourIds]],
  );
  return new Map(rows.map((row) => [row.pour_id, row.document]));
}

export interface KeptPlan {
  revision: number;
  document: Plan;
  digest: string;
}

/** Every revision of a pour's plan, oldest first. */
export async function planRevisions(tx: Tx, projectId: string, pourId: string): Promise<KeptPlan[]> {
  return tx('plans')
    .where({ project_id: projectId, pour_id: pourId })
    .orderBy('revision')
    .select<KeptPlan[]>('revision', 'document', 'digest');
}
