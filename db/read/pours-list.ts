import { z } from 'zod';
import { instant, recordId } from '@/lib/inspection/primitives';
import type { Role } from '@/lib/inspection/roles';
import type { PourState } from '@/lib/inspection/sheet-types';
import type { Tx } from '@/db/connection';
import { readCursor, writeCursor } from './page-cursor';

export interface PoursListRow {
  id: string;
  number: string;
  title: string;
  location: string;
  plannedAt: string | null;
  planRevision: number;
  state: PourState;
  holdsTotal: number;
  holdsByRole: Partial<Record<Role, number>>;
  notMet: number;
  readings: number;
  pointsRead: number;
  pointsTotal: number;
  releaseNumber: number | null;
  validUntil: string | null;
}

export interface PoursListFilter {
  projectId: string;
  /** Only pours in one of these states. */
  states?: readonly PourState[];
  /** Only pours with a hold that this role clears. */
  clearedBy?: Role;
  /** Part of a number, title or location. */
  text?: string;
  plannedFrom?: string;
  plannedBefore?: string;
  /** Only pours that this person is assigned to (crew see no other). */
  assignedTo?: string;
  cursor?: string | null;
  /** 1 to 200, 50 unless told. */
  limit?: number;
}

interface Row {
  id: string;
  number: string;
  title: string;
  location: string;
  planned_at: string | null;
  plan_revision: number;
  state: PourState;
  holds_total: number;
  holds_by_role: Partial<Record<Role, number>>;
  not_met: number;
  readings: number;
  points_read: number;
  points_total: number;
  release_number: number | null;
  valid_until: string | null;
}

/** A summary is as of the last write; a release whose validity ended since is judged here, whenever it is read. */
const stateNow = `case when s.state = 'released' and s.valid_until < cast(:now as timestamptz) then 'held'
  else coalesce(s.state, 'no-plan') end`;

/** As PostgreSQL spells the time of what has none: after everything that has one. */
const UNPLANNED = 'infinity';
const listKey = z.tuple([z.union([instant, z.literal(UNPLANNED)]), recordId]);

/**
 * Pours of a project by planned time, those without a time last; page by page from a key, so that the last page costs
 * what the first does.
 * @param now ISO instant by which validity is judged
 */
export async function readPoursList(
  tx: Tx,
  filter: PoursListFilter,
  now: string,
): Promise<{ rows: PoursListRow[]; next: string | null }> {
  const limit = Math.min(Math.max(filter.limit ?? 50, 1), 200);
  const after = filter.cursor ? readCursor(filter.cursor, listKey) : null;
  const [afterTime, afterId] = after ?? [null, null];
  const conditions = [
    'p.project_id = :projectId',
    after ? '(p.planned_order, p.id) > (cast(:afterTime as timestamptz), cast(:afterId as uuid))' : null,
    filter.plannedFrom ? 'p.planned_order >= :plannedFrom' : null,
    filter.plannedBefore ? 'p.planned_order < :plannedBefore' : null,
    filter.text ? `(p.number || ' ' || p.title || ' ' || p.location) ilike :pattern` : null,
    filter.states ? `${stateNow} = any(:states)` : null,
    filter.clearedBy ? `coalesce(cast(s.holds_by_role ->> :clearedBy as integer), 0) > 0` : null,
    filter.assignedTo
      ? `exists (select from assignments a
          where a.project_id = p.project_id and a.pour_id = p.id and a.person_id = :assignedTo)`
      : null,
  ].filter((condition) => condition !== null);
  const { rows } = await tx.raw<{ rows: Row[] }>(
    `select p.id, p.number, p.title, p.location, p.planned_at, p.plan_revision,
       ${stateNow} as state, coalesce(s.holds_total, 0) as holds_total, coalesce(s.holds_by_role, '{}') as holds_by_role,
       coalesce(s.not_met, 0) as not_met, coalesce(s.readings, 0) as readings,
       coalesce(s.points_read, 0) as points_read, coalesce(s.points_total, 0) as points_total,
       s.release_number, s.valid_until
     from pours p left join pour_summaries s on s.project_id = p.project_id and s.pour_id = p.id
     where ${conditions.join(' and ')}
     order by p.planned_order, p.id limit :more`,
    {
      now,
      projectId: filter.projectId,
      afterTime,
      afterId,
      plannedFrom: filter.plannedFrom ?? null,
      plannedBefore: filter.plannedBefore ?? null,
      pattern: `%${(filter.text ?? '').replace(/[\\%_]/g, '\\$&')}%`,
      states: filter.states ? [...filter.states] : null,
      clearedBy: filter.clearedBy ?? null,
      assignedTo: filter.assignedTo ?? null,
      more: limit + 1,
    },
  );
  const page = rows.slice(0, limit);
  const last = page.at(-1);
  return {
    rows: page.map((row) => ({
      id: row.id,
      number: row.number,
      title: row.title,
      location: row.location,
      plannedAt: row.planned_at,
      planRevision: row.plan_revision,
      state: row.state,
      holdsTotal: row.holds_total,
      holdsByRole: row.holds_by_role,
      notMet: row.not_met,
      readings: row.readings,
      pointsRead: row.points_read,
      pointsTotal: row.points_total,
      releaseNumber: row.release_number,
      validUntil: row.valid_until,
    })),
    next: rows.length > limit && last ? writeCursor([last.planned_at ?? UNPLANNED, last.id]) : null,
  };
}
