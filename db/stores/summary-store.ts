import type { Role } from '@/lib/inspection/roles';
import type { NonconformanceStatus, PourState } from '@/lib/inspection/sheet-types';
import type { Tx } from '@/db/connection';

/** What lists show of a pour, derived from its sheet; `state` is as of the last write, `validUntil` says until when. */
export interface PourSummary {
  pourId: string;
  state: PourState;
  holdsTotal: number;
  holdsByRole: Partial<Record<Role, number>>;
  notMet: number;
  readings: number;
  pointsRead: number;
  pointsTotal: number;
  releaseId: string | null;
  releaseNumber: number | null;
  validUntil: string | null;
  planRevision: number;
  headSeq: number;
  foldVersion: number;
}

export interface NonconformanceSummary {
  id: string;
  pourId: string;
  seq: number;
  title: string;
  status: NonconformanceStatus;
  whereText: string;
  extent: string;
  proposal: string;
  neededBy: string | null;
  raisedBy: string;
  raisedAt: string;
  photos: number;
  conditionsOpen: number;
}

/** Puts the summaries of several pours in place of what was there, with a statement for each table. */
export async function replaceSummaries(
  tx: Tx,
  projectId: string,
  pours: readonly PourSummary[],
  nonconformances: readonly NonconformanceSummary[],
): Promise<void> {
  if (pours.length === 0) return;
  await tx.raw(
    `insert into pour_summaries (project_id, pour_id, state, holds_total, holds_by_role, not_met, readings,
       points_read, points_total, release_id, release_number, valid_until, plan_revision, head_seq, fold_version)
     select cast(:projectId as uuid), "pourId", state, "holdsTotal", "holdsByRole", "notMet", readings, "pointsRead",
       "pointsTotal", "releaseId", "releaseNumber", "validUntil", "planRevision", "headSeq", "foldVersion"
     from jsonb_to_recordset(cast(:pours as jsonb)) as r("pourId" uuid, state text, "holdsTotal" integer,
       "holdsByRole" jsonb, "notMet" integer, readings integer, "pointsRead" integer, "pointsTotal" integer,
       "releaseId" uuid, "releaseNumber" integer, "validUntil" timestamptz, "planRevision" integer,
       "headSeq" bigint, "foldVersion" integer)
     on conflict (project_id, pour_id) do update set state = excluded.state, holds_total = excluded.holds_total,
       holds_by_role = excluded.holds_by_role, not_met = excluded.not_met, readings = excluded.readings,
       points_read = excluded.points_read, points_total = excluded.points_total, release_id = excluded.release_id,
       release_number = excluded.release_number, valid_until = excluded.valid_until,
       plan_revision = excluded.plan_revision, head_seq = excluded.head_seq, fold_version = excluded.fold_version`,
    { projectId, pours: JSON.stringify(pours) },
  );
  if (nonconformances.length === 0) return;
  await tx.raw(
    `insert into nonconformance_summaries (project_id, id, pour_id, seq, title, status, where_text, extent, proposal,
       needed_by, raised_by, raised_at, photos, conditions_open)
     select cast(:projectId as uuid), id, "pourId", seq, title, status, "whereText", extent, proposal, "neededBy", "raisedBy",
       "raisedAt", photos, "conditionsOpen"
     from jsonb_to_recordset(cast(:list as jsonb)) as r(id uuid, "pourId" uuid, seq bigint, title text, status text,
       "whereText" text, extent text, proposal text, "neededBy" timestamptz, "raisedBy" uuid,
       "raisedAt" timestamptz, photos integer, "conditionsOpen" integer)
     on conflict (project_id, id) do update set seq = excluded.seq, title = excluded.title, status = excluded.status,
       where_text = excluded.where_text, extent = excluded.extent, proposal = excluded.proposal,
       needed_by = excluded.needed_by, photos = excluded.photos, conditions_open = excluded.conditions_open`,
    { projectId, list: JSON.stringify(nonconformances) },
  );
}

/** Throws a project's summaries away, before they are rebuilt from plans and entries. */
export async function dropSummaries(tx: Tx, projectId: string): Promise<void> {
  await tx('nonconformance_summaries').where({ project_id: projectId }).delete();
  await tx('pour_summaries').where({ project_id: projectId }).delete();
}
