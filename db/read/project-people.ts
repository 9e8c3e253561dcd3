import type { Role } from '@/lib/inspection/roles';
import type { Tx } from '@/db/connection';

export interface ProjectPerson {
  id: string;
  name: string;
  email: string;
  role: Role;
  licence: string;
  certification: string;
  /** False: no longer a member, but named in the record. */
  active: boolean;
}

/** Everybody who is or was a member of the project, by name. */
export async function readProjectPeople(tx: Tx, projectId: string): Promise<ProjectPerson[]> {
  const rows = await tx('memberships as m')
    .join('users as u', 'u.id', 'm.person_id')
    .where('m.project_id', projectId)
    .orderBy('u.name')
    .select<(Omit<ProjectPerson, 'active'> & { removed_at: string | null; disabled_at: string | null })[]>(
      'u.id',
      'u.name',
      'u.email',
      'm.role',
      'u.licence',
      'u.certification',
      'm.removed_at',
      'u.disabled_at',
    );
  return rows.map(({ removed_at, disabled_at, ...person }) => ({
    ...person,
    active: removed_at === null && disabled_at === null,
  }));
}
