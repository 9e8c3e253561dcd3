import { z } from 'zod';
import type { NonconformanceStatus } from '@/lib/inspection/sheet-types';
import type { Tx } from '@/db/connection';
import { readCursor, writeCursor } from './page-cursor';

export interface NonconformanceListRow {
  id: string;
  title: string;
  status: NonconformanceStatus;
  where: string;
  extent: string;
  proposal: string;
  neededBy: string | null;
  raisedById: string;
  raisedByName: string;
  raisedAt: string;
  photos: number;
  conditionsOpen: number;
  pour: { id: string; number: string; title: string; plannedAt: string | null };
}

export interface NonconformanceListFilter {
  projectId: string;
  statuses?: readonly NonconformanceStatus[];
  /** Only those with a condition that is still to be verified. */
  conditionsOpen?: boolean;
  cursor?: string | null;
  /** 1 to 200, 50 unless told. */
  limit?: number;
}

interface Row {
  id: string;
  seq: number;
  title: string;
  status: NonconformanceStatus;
  where_text: string;
  extent: string;
  proposal: string;
  needed_by: string | null;
  raised_by: string;
  raised_by_name: string;
  raised_at: string;
  photos: number;
  conditions_open: number;
  pour_id: string;
  pour_number: string;
  pour_title: string;
  planned_at: string | null;
}

const listKey = z.tuple([z.number().int().nonnegative().max(Number.MAX_SAFE_INTEGER)]);

/** Nonconformances of a project, newest first. */
export async function readNonconformanceList(
  tx: Tx,
  filter: NonconformanceListFilter,
): Promise<{ rows: NonconformanceListRow[]; next: string | null }> {
  const limit = Math.min(Math.max(filter.limit ?? 50, 1), 200);
  const query = tx('nonconformance_summaries as n')
    .join('pours as p', { 'p.project_id': 'n.project_id', 'p.id': 'n.pour_id' })
    .join('users as u', 'u.id', 'n.raised_by')
    .where('n.project_id', filter.projectId)
    .orderBy('n.seq', 'desc')
    .limit(limit + 1)
    .select(
      'n.*',
      'u.name as raised_by_name',
      'p.number as pour_number',
      'p.title as pour_title',
      'p.planned_at',
    );
  if (filter.conditionsOpen) void query.where('n.conditions_open', '>', 0);
  if (filter.statuses) void query.whereIn('n.status', filter.statuses);
  const after = filter.cursor ? readCursor(filter.cursor, listKey) : null;
  if (after) void query.where('n.seq', '<', after[0]);
  const rows = (await query) as Row[];
  const page = rows.slice(0, limit);
  const last = page.at(-1);
  return {
    rows: page.map((row) => ({
      id: row.id,
      title: row.title,
      status: row.status,
      where: row.where_text,
      extent: row.extent,
      proposal: row.proposal,
      neededBy: row.needed_by,
      raisedById: row.raised_by,
      raisedByName: row.raised_by_name,
      raisedAt: row.raised_at,
      photos: row.photos,
      conditionsOpen: row.conditions_open,
      pour: { id: row.pour_id, number: row.pour_number, title: row.pour_title, plannedAt: row.planned_at },
    })),
    next: rows.length > limit && last ? writeCursor([last.seq]) : null,
  };
}

/** Where a nonconformance belongs, or null when it is not in one of the transaction's projects. */
export async function findNonconformance(
  tx: Tx,
  nonconformanceId: string,
): Promise<{ projectId: string; pourId: string } | null> {
  const row = await tx('nonconformance_summaries')
    .where({ id: nonconformanceId })
    .first<{ project_id: string; pour_id: string } | undefined>('project_id', 'pour_id');
  return row ? { projectId: row.project_id, pourId: row.pour_id } : null;
}
