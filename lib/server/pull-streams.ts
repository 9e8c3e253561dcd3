import type { Role } from '@/lib/inspection/roles';
import { PULL_PAGE, type PullRequest, type PullResponse } from '@/lib/inspection/wire';
import { hashesAt, readPages, type SealedEntry } from '@/db/stores/entry-store';
import { assignedPourIds, currentPlans, poursByIds } from '@/db/stores/pour-store';
import type { Tx } from '@/db/connection';

type Page = PullResponse['project'];
type Cursor = PullRequest['project'];

/** No answer carries more entries than this, however many streams are asked for. */
const MOST_IN_ANSWER = 2 * PULL_PAGE;

/**
 * What a device does not hold yet of the streams it follows: pages in `seq` order, and plans that are not the ones it
 * has. `seq` is given under a lock, so nothing can appear later below a cursor. Crew get no stream.
 */
export async function pullStreams(
  tx: Tx,
  request: PullRequest,
  person: { id: string; role: Role },
): Promise<Omit<PullResponse, 'serverTime'>> {
  const { projectId, project, pours } = request;
  const found = await poursByIds(
    tx,
    projectId,
    pours.map((pour) => pour.pourId),
  );
  if (person.role === 'crew') {
    const assigned = await assignedPourIds(tx, projectId, person.id);
    const seen = (pourId: string) => assigned.has(pourId) && found.some((pour) => pour.id === pourId);
    return {
      project: untouched(project),
      pours: pours.map((cursor) => ({
        pourId: cursor.pourId,
        found: seen(cursor.pourId),
        plan: null,
        ...untouched(cursor),
      })),
    };
  }

  const known = new Map(found.map((pour) => [pour.id, pour]));
  const followed = pours.filter((pour) => known.has(pour.pourId));
  const hashes = await hashesAt(
    tx,
    projectId,
    [project, ...followed].map((cursor) => cursor.after).filter((after) => after > 0),
  );
  const holdsHead = (cursor: Cursor) => cursor.after === 0 || hashes.get(cursor.after) === cursor.headHash;
  const wanted = [{ pourId: null, ...project }, ...followed].filter(holdsHead);
  const most = Math.max(50, Math.min(PULL_PAGE, Math.floor(MOST_IN_ANSWER / Math.max(1, wanted.length))));
  const entries = await readPages(tx, projectId, wanted, most);
  const plans = await currentPlans(
    tx,
    projectId,
    followed
      .filter((cursor) => known.get(cursor.pourId)?.planRevision !== cursor.planRevision)
      .map((one) => one.pourId),
  );
  const page = (pourId: string | null, cursor: Cursor): Page =>
    holdsHead(cursor)
      ? pageOf(entries.get(pourId) ?? [], cursor, most)
      : { ...untouched(cursor), headKnown: false };
  return {
    project: page(null, project),
    pours: pours.map((cursor) =>
      known.has(cursor.pourId)
        ? {
            pourId: cursor.pourId,
            found: true,
            plan: plans.get(cursor.pourId) ?? null,
            ...page(cursor.pourId, cursor),
          }
        : { pourId: cursor.pourId, found: false, plan: null, ...untouched(cursor) },
    ),
  };
}

const untouched = (cursor: Cursor): Page => ({
  entries: [],
  head: cursor.after,
  headHash: cursor.headHash,
  more: false,
  headKnown: true,
});

function pageOf(stream: readonly SealedEntry[], cursor: Cursor, most: number): Page {
  const entries = stream.slice(0, most);
  const last = entries.at(-1);
  return {
    entries,
    head: last?.seq ?? cursor.after,
    headHash: last?.hash ?? cursor.headHash,
    more: stream.length > most,
    headKnown: true,
  };
}
