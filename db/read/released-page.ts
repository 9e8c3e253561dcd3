import type { BodyOf } from '@/lib/inspection/entry';
import type { DecisionRule } from '@/lib/inspection/plan';
import type { Tx } from '@/db/connection';

/** What anybody who holds the address of a release may read of it. */
export interface ReleasedPage {
  projectName: string;
  place: string;
  timeZone: string;
  pour: { number: string; title: string; location: string };
  number: number;
  releasedAt: string;
  releasedByName: string;
  validUntil: string;
  /** What the release entry says: scope, digest, drawings, mix, conditions, head of the chain when it was given. */
  body: BodyOf<'release'>;
  /** Marks of the elements in its scope, from the plan that it rests on; null: the whole pour. */
  scopeMarks: string[] | null;
  decisionRule: DecisionRule;
  entryHash: string;
  seq: number;
  signers: { name: string; role: string; licence: string; certification: string; at: string }[];
  voided: { at: string; reason: string } | null;
  placedAt: string | null;
}

interface Row {
  project_name: string;
  place: string;
  time_zone: string;
  pour_number: string;
  title: string;
  location: string;
  number: number;
  released_at: string;
  released_by_name: string;
  valid_until: string;
  body: BodyOf<'release'>;
  decision_rule: DecisionRule;
  elements: { id: string; mark: string }[];
  hash: string;
  seq: number;
  voided_at: string | null;
  void_reason: string | null;
  placed_at: string | null;
}

/** The release with this number; the transaction has been opened for its project. */
export async function readReleasedPage(
  tx: Tx,
  projectId: string,
  number: number,
): Promise<ReleasedPage | null> {
  const row = await tx('releases as r')
    .join('entries as e', { 'e.project_id': 'r.project_id', 'e.id': 'r.entry_id' })
    .join('pours as p', { 'p.project_id': 'r.project_id', 'p.id': 'r.pour_id' })
    .joinRaw(
      `join plans as l on l.project_id = r.project_id and l.pour_id = r.pour_id
         and l.revision = cast(e.body ->> 'planRevision' as integer)`,
    )
    .join('projects as j', 'j.id', 'r.project_id')
    .join('users as u', 'u.id', 'r.released_by')
    .where({ 'r.project_id': projectId, 'r.number': number })
    .first<Row | undefined>(
      'j.name as project_name',
      'j.place',
      'j.time_zone',
      'p.number as pour_number',
      'p.title',
      'p.location',
      'r.number',
      'r.released_at',
      'u.name as released_by_name',
      'r.valid_until',
      'e.body',
      tx.raw(`l.document -> 'decisionRule' as decision_rule`),
      tx.raw(`l.document -> 'elements' as elements`),
      'e.hash',
      'e.seq',
      'r.voided_at',
      'r.void_reason',
      tx.raw(`(select max(x.body ->> 'at') from entries x where x.project_id = r.project_id
        and x.pour_id = r.pour_id and x.type = 'placement' and x.body ->> 'event' = 'started') as placed_at`),
    );
  if (!row) return null;
  const signers = await tx('entries as e')
    .join('users as u', 'u.id', 'e.author_id')
    .where('e.project_id', projectId)
    .whereRaw('e.id = any(?::uuid[])', [row.body.signatureIds])
    .orderBy('e.seq')
    .select<ReleasedPage['signers']>(
      'u.name',
      'e.author_role as role',
      'u.licence',
      'u.certification',
      'e.recorded_at as at',
    );
  return {
    projectName: row.project_name,
    place: row.place,
    timeZone: row.time_zone,
    pour: { number: row.pour_number, title: row.title, location: row.location },
    number: row.number,
    releasedAt: row.released_at,
    releasedByName: row.released_by_name,
    validUntil: row.valid_until,
    body: row.body,
    scopeMarks:
      row.body.scope.elementIds?.map((id) => row.elements.find((one) => one.id === id)?.mark ?? id) ?? null,
    decisionRule: row.decision_rule,
    entryHash: row.hash,
    seq: row.seq,
    signers,
    voided: row.voided_at ? { at: row.voided_at, reason: row.void_reason ?? '' } : null,
    placedAt: row.placed_at,
  };
}
