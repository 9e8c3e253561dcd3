import type { PourState } from '@/lib/inspection/sheet-types';
import type { Role } from '@/lib/inspection/roles';
import type { Tx } from '@/db/connection';
import { readProjectPeople, type ProjectPerson } from './project-people';

export interface PourHeaderRelease {
  number: number;
  releaseId: string;
  token: string;
  releasedBy: string;
  releasedAt: string;
  validUntil: string;
  voidedAt: string | null;
  voidReason: string | null;
}

/** What the title block and the frame of a pour's page need beside its sheet. */
export interface PourHeader {
  pour: {
    id: string;
    projectId: string;
    number: string;
    title: string;
    location: string;
    plannedAt: string | null;
    planRevision: number;
  };
  project: { id: string; name: string; place: string; timeZone: string };
  /** Derived figures as of the last write; null before the first plan. Validity is judged against `now`. */
  summary: {
    state: PourState;
    holdsTotal: number;
    holdsByRole: Partial<Record<Role, number>>;
    notMet: number;
    pointsRead: number;
    pointsTotal: number;
    validUntil: string | null;
    headSeq: number;
  } | null;
  people: ProjectPerson[];
  assignedIds: string[];
  /** Oldest first. */
  revisions: { revision: number; issuedAt: string; authorId: string; reason: string; digest: string }[];
  /** Newest first. */
  releases: PourHeaderRelease[];
}

interface Row {
  pour: PourHeader['pour'];
  project: PourHeader['project'];
  summary: PourHeader['summary'];
  assigned: string[];
  revisions: PourHeader['revisions'];
  releases: PourHeaderRelease[];
}

/** Instants inside a JSON document come out of PostgreSQL in another spelling; here they are spelt as entries do. */
const instant = (column: string) => `to_char(${column} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')`;

/** The header of one pour of the transaction's projects, or null. Two statements whatever the pour holds. */
export async function readPourHeader(tx: Tx, pourId: string, now: string): Promise<PourHeader | null> {
  const { rows } = await tx.raw<{ rows: Row[] }>(
    `select
       jsonb_build_object('id', p.id, 'projectId', p.project_id, 'number', p.number, 'title', p.title,
         'location', p.location, 'plannedAt', ${instant('p.planned_at')}, 'planRevision', p.plan_revision) as pour,
       jsonb_build_object('id', j.id, 'name', j.name, 'place', j.place, 'timeZone', j.time_zone) as project,
       case when s.pour_id is null then null else jsonb_build_object('state',
         case when s.state = 'released' and s.valid_until < cast(:now as timestamptz) then 'held' else s.state end,
         'holdsTotal', s.holds_total, 'holdsByRole', s.holds_by_role, 'notMet', s.not_met,
         'pointsRead', s.points_read, 'pointsTotal', s.points_total, 'validUntil', ${instant('s.valid_until')},
         'headSeq', s.head_seq) end as summary,
       (select coalesce(jsonb_agg(a.person_id), '[]') from assignments a
         where a.project_id = p.project_id and a.pour_id = p.id) as assigned,
       (select coalesce(jsonb_agg(jsonb_build_object('revision', l.revision, 'issuedAt', ${instant('l.issued_at')},
           'authorId', l.author_id, 'reason', l.reason, 'digest', l.digest) order by l.revision), '[]')
         from plans l where l.project_id = p.project_id and l.pour_id = p.id) as revisions,
       (select coalesce(jsonb_agg(jsonb_build_object('number', r.number, 'releaseId', r.entry_id, 'token', r.token,
           'releasedBy', r.released_by, 'releasedAt', ${instant('r.released_at')},
           'validUntil', ${instant('r.valid_until')}, 'voidedAt', ${instant('r.voided_at')},
           'voidReason', r.void_reason) order by r.number desc), '[]')
         from releases r where r.project_id = p.project_id and r.pour_id = p.id) as releases
     from pours p join projects j on j.id = p.project_id
       left join pour_summaries s on s.project_id = p.project_id and s.pour_id = p.id
     where p.id = :pourId`,
    { now, pourId },
  );
  const row = rows[0];
  if (!row) return null;
  return {
    pour: row.pour,
    project: row.project,
    summary: row.summary,
    assignedIds: row.assigned,
    revisions: row.revisions,
    releases: row.releases,
    people: await readProjectPeople(tx, row.pour.projectId),
  };
}
