import { AppError } from '@/lib/inspection/app-error';
import { assignedPourIds, findPour, type Pour } from '@/db/stores/pour-store';
import type { Person } from '@/db/stores/session-store';
import type { Tx } from '@/db/connection';

/**
 * The pour, if the person may know of it: it is in one of their projects, and crew are assigned to it.
 * @throws AppError not-found
 */
export async function requirePour(tx: Tx, person: Person, pourId: string): Promise<Pour> {
  const pour = await findPour(tx, pourId);
  if (!pour) throw new AppError('not-found');
  if (person.roles.get(pour.projectId) === 'crew') {
    const assigned = await assignedPourIds(tx, pour.projectId, person.id);
    if (!assigned.has(pourId)) throw new AppError('not-found');
  }
  return pour;
}
