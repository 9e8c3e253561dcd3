import type { Person } from '@/db/stores/session-store';
import type { DeviceIndex } from '@/lib/inspection/wire';
import type { Role } from '@/lib/inspection/roles';
import type { Tx } from '@/db/connection';
import { readProjectsOfPerson } from './projects-of-person';

/** How many pours of one project a device hears of, the next ones first. */
const MOST_POURS = 300;

interface PourRow {
  project_id: string;
  id: string;
  number: string;
  title: string;
  location: string;
  planned_at: string | null;
  plan_revision: number;
  assigned: boolean;
  state: string;
  holds: number;
}

/**
 * What the person's device may keep: projects, people's names, and pours from two weeks back on. Crew hear only of
 * the pours they are assigned to.
 * @param now ISO instant
 */
export async function readDeviceIndex(tx: Tx, person: Person, now: string): Promise<DeviceIndex['projects']> {
  const projects = await readProjectsOfPerson(tx, person);
  const ids = projects.map((project) => project.id);
  const people = await tx('memberships as m')
    .join('users as u', 'u.id', 'm.person_id')
    .whereRaw('m.project_id = any(?::uuid[])', [ids])
    .orderBy('u.name')
    .select<{ project_id: string; id: string; name: string; role: Role }[]>(
      'm.project_id',
      'u.id',
      'u.name',
      'm.role',
    );
  const crewIn = projects.filter((project) => project.role === 'crew').map((project) => project.id);
  const { rows } = await tx.raw<{ rows: PourRow[] }>(
    `select l.* from unnest(cast(:ids as uuid[])) as j(id)
       cross join lateral (
         select p.project_id, p.id, p.number, p.title, p.location, p.planned_at, p.plan_revision,
           a.person_id is not null as assigned, coalesce(s.holds_total, 0) as holds,
           case when s.state = 'released' and s.valid_until < cast(:now as timestamptz) then 'held'
             else coalesce(s.state, 'no-plan') end as state
         from pours p
           left join pour_summaries s on s.project_id = p.project_id and s.pour_id = p.id
           left join assignments a on a.project_id = p.project_id and a.pour_id = p.id and a.person_id = :personId
         where p.project_id = j.id and p.planned_order > cast(:now as timestamptz) - interval '14 days'
           and (a.person_id is not null or p.project_id <> all (cast(:crewIn as uuid[])))
         order by p.planned_order, p.id limit ${MOST_POURS}
       ) as l`,
    { ids, crewIn, now, personId: person.id },
  );
  return projects.map((project) => ({
    id: project.id,
    name: project.name,
    timeZone: project.timeZone,
    role: project.role,
    people: people
      .filter((one) => one.project_id === project.id)
      .map(({ id, name, role }) => ({ id, name, role })),
    pours: rows
      .filter((row) => row.project_id === project.id)
      .map((row) => ({
        id: row.id,
        number: row.number,
        title: row.title,
        location: row.location,
        plannedAt: row.planned_at,
        planRevision: row.plan_revision,
        assigned: row.assigned,
        state: row.state,
        holds: row.holds,
      })),
  }));
}
