import type { DeviceIndex } from '@/lib/inspection/wire';
import { projectStream, type PersonDatabase } from './person-database';

/**
 * Streams of which this device holds what the person's role does not give them (any more): a record where they are
 * crew now, a crew's list where they are not, anything of a pour that crew are no longer assigned to.
 * @param withCrewList pours of which a crew's list is kept
 */
export async function streamsNotTheirs(
  db: PersonDatabase,
  { projects }: DeviceIndex,
  withCrewList: readonly string[],
): Promise<string[]> {
  const crewOf = new Map(
    projects.flatMap(({ role, pours }) => pours.map(({ id }) => [id, role === 'crew'] as const)),
  );
  const cursors = await db.getAll('cursors');
  const followed = new Set(cursors.filter(({ after }) => after > 0).map(({ stream }) => stream));
  const withPlan = await db.getAllKeys('plans');
  return [
    ...withPlan.filter((pourId) => crewOf.get(pourId) === true),
    ...withCrewList.filter((pourId) => crewOf.get(pourId) !== true),
    // Crew are given nothing of the project's own stream.
    ...projects
      .filter(({ role }) => role === 'crew')
      .map(({ id }) => projectStream(id))
      .filter((stream) => followed.has(stream)),
  ];
}
