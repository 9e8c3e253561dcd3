import type { Role } from '@/lib/inspection/roles';
import type { Tx } from '@/db/connection';

export interface NewRelease {
  projectId: string;
  number: number;
  entryId: string;
  pourId: string;
  token: string;
  releasedBy: string;
  releasedAt: string;
  validUntil: string;
}

export async function insertRelease(tx: Tx, release: NewRelease): Promise<void> {
  await tx('releases').insert({
    project_id: release.projectId,
    number: release.number,
    entry_id: release.entryId,
    pour_id: release.pourId,
    token: release.token,
    released_by: release.releasedBy,
    released_at: release.releasedAt,
    valid_until: release.validUntil,
  });
}

export interface VoidMark {
  releaseId: string;
  voidEntryId: string;
  at: string;
  reason: string;
}

/** Marks releases as void beside the entries that say so, with one statement. */
export async function markVoids(tx: Tx, projectId: string, voids: readonly VoidMark[]): Promise<void> {
  if (voids.length === 0) return;
  await tx.raw(
    `update releases r set void_entry_id = v."voidEntryId", voided_at = v.at, void_reason = v.reason
     from jsonb_to_recordset(?::jsonb) as v("releaseId" uuid, "voidEntryId" uuid, at timestamptz, reason text)
     where r.project_id = ? and r.entry_id = v."releaseId" and r.void_entry_id is null`,
    [JSON.stringify(voids), projectId],
  );
}

/** Who gave the pour's release that is not void, with the role held then. */
export async function standingReleaseAuthor(
  tx: Tx,
  projectId: string,
  pourId: string,
): Promise<{ id: string; role: Role } | null> {
  const row = await tx('releases as r')
    .join('entries as e', { 'e.project_id': 'r.project_id', 'e.id': 'r.entry_id' })
    .where({ 'r.project_id': projectId, 'r.pour_id': pourId, 'r.void_entry_id': null })
    .orderBy('r.number', 'desc')
    .first<{ id: string; role: Role } | undefined>('e.author_id as id', 'e.author_role as role');
  return row ?? null;
}

/** Number, pour and token of the release that an entry gave, or null. */
export async function releaseByEntry(
  tx: Tx,
  projectId: string,
  entryId: string,
): Promise<{ number: number; pourId: string; token: string } | null> {
  const row = await tx('releases')
    .where({ project_id: projectId, entry_id: entryId })
    .first<{ number: number; pour_id: string; token: string } | undefined>('number', 'pour_id', 'token');
  return row ? { number: row.number, pourId: row.pour_id, token: row.token } : null;
}

/** Project and pour of the release behind a token; the one question that needs no session. */
export async function releaseByToken(
  tx: Tx,
  token: string,
): Promise<{ projectId: string; pourId: string; number: number } | null> {
  const { rows } = await tx.raw<{ rows: { project_id: string; pour_id: string; number: number }[] }>(
    'select * from app_release_by_token(?)',
    [token],
  );
  const row = rows[0];
  return row ? { projectId: row.project_id, pourId: row.pour_id, number: row.number } : null;
}

/** Pours whose release has run out of validity and is not yet written as void, over all projects. */
export async function releasesDue(tx: Tx, at: string): Promise<{ projectId: string; pourId: string }[]> {
  const { rows } = await tx.raw<{ rows: { project_id: string; pour_id: string }[] }>(
    'select * from app_releases_due(?)',
    [at],
  );
  return rows.map((row) => ({ projectId: row.project_id, pourId: row.pour_id }));
}

export async function allProjectIds(tx: Tx): Promise<string[]> {
  const { rows } = await tx.raw<{ rows: { app_all_projects: string }[] }>('select app_all_projects()');
  return rows.map((row) => row.app_all_projects);
}
