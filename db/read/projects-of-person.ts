import type { Role } from '@/lib/inspection/roles';
import type { Person } from '@/db/stores/session-store';
import type { Tx } from '@/db/connection';

export interface ProjectOfPerson {
  id: string;
  name: string;
  place: string;
  timeZone: string;
  role: Role;
}

interface Row {
  id: string;
  name: string;
  place: string;
  time_zone: string;
}

/** The person's projects with the role held in each, by name. */
export async function readProjectsOfPerson(
  tx: Tx,
  person: Pick<Person, 'roles'>,
): Promise<ProjectOfPerson[]> {
  const rows = await tx('projects')
    .whereRaw('id = any(?::uuid[])', [[...person.roles.keys()]])
    .orderBy(['name', 'id'])
    .select<Row[]>('id', 'name', 'place', 'time_zone');
  return rows.flatMap((row) => {
    const role = person.roles.get(row.id);
    return role ? [{ id: row.id, name: row.name, place: row.place, timeZone: row.time_zone, role }] : [];
  });
}
