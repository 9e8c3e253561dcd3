import { entryTypes } from '@/lib/inspection/entry';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { Role } from '@/lib/inspection/roles';
import { PULL_PAGE } from '@/lib/inspection/protocol';
import type { PullRequest, PullResponse } from '@/lib/inspection/wire';
import { hashesAt, readPages, type SealedEntry } from '@/db/stores/entry-store';
import { assignedPourIds, currentPlans, poursByIds } from '@/db/stores/pour-store';
import type { Tx } from '@/db/connection';
import { pullCrewLists } from './pull-crew-lists';

type Page = PullResponse['project'];
type Pour = PullResponse['pours'][number];
type Cursor = PullRequest['project'];
type PourCursor = PullRequest['pours'][number];

/** No answer carries more entries than this, however many streams are asked for. */
const MOST_IN_ANSWER = 2 * PULL_PAGE;

/**
 * What a device does not hold yet of the streams it follows: pages in `seq` order, and plans that are not the ones it
 * has. `seq` is given under a lock, so nothing can appear later below a cursor.
 * @param now the server's clock, ISO 8601
 */
export async function pullStreams(
  tx: Tx,
  request: PullRequest,
  person: { id: string; role: Role },
  now: string,
): Promise<Omit<PullResponse, 'serverTime'>> {
  const { projectId, project, pours } = request;
  const found = await poursByIds(
    tx,
    projectId,
    pours.map((pour) => pour.pourId),
  );
  if (person.role === 'crew') return pullForCrew(tx, request, person.id, found, now);

  const known = new Map(found.map((pour) => [pour.id, pour]));
  const followed = pours.filter((pour) => known.has(pour.pourId));
  const page = await pagesOf(tx, projectId, [{ pourId: null, ...project }, ...followed]);
  const plans = await currentPlans(
    tx,
    projectId,
    followed
      .filter((cursor) => known.get(cursor.pourId)?.planRevision !== cursor.planRevision)
      .map((one) => one.pourId),
  );
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
        : notFound(cursor),
    ),
  };
}

/** What crew record, and what the server then writes of their photos, under their name. */
const ofCrew = new Set<string>([
  ...entryTypes.filter((type) => mayRecord(type, 'crew')),
  'photo-stored',
  'photo-refused',
]);

/**
 * Crew get of the pours they are assigned to what they must put right, in place of plan and record; and of the record
 * their own entries only, with what became of their own photos.
 */
async function pullForCrew(
  tx: Tx,
  { projectId, project, pours }: PullRequest,
  personId: string,
  found: readonly { id: string }[],
  now: string,
): Promise<Omit<PullResponse, 'serverTime'>> {
  const assigned = await assignedPourIds(tx, projectId, personId);
  const theirs = new Set(found.map(({ id }) => id).filter((id) => assigned.has(id)));
  const followed = pours.filter(({ pourId }) => theirs.has(pourId));
  const page = await pagesOf(tx, projectId, followed);
  const lists = await pullCrewLists(tx, projectId, followed, now);
  return {
    project: untouched(project),
    pours: pours.map((cursor): Pour => {
      const { pourId } = cursor;
      if (!theirs.has(pourId)) return notFound(cursor);
      const whole = page(pourId, cursor);
      const entries = whole.entries.filter(({ authorId, type }) => authorId === personId && ofCrew.has(type));
      // A list goes with the last page: whoever holds it has seen the record up to there.
      const crewList = whole.more ? null : (lists.get(pourId) ?? null);
      return { pourId, found: true, plan: null, crewList, ...whole, entries };
    }),
  };
}

/** Reads the next page of each stream; tells a stream whose head the server does not hold. */
async function pagesOf(
  tx: Tx,
  projectId: string,
  streams: readonly (Cursor & { pourId: string | null })[],
): Promise<(pourId: string | null, cursor: Cursor) => Page> {
  const hashes = await hashesAt(
    tx,
    projectId,
    streams.map((cursor) => cursor.after).filter((after) => after > 0),
  );
  const holdsHead = (cursor: Cursor) => cursor.after === 0 || hashes.get(cursor.after) === cursor.headHash;
  const wanted = streams.filter(holdsHead);
  const most = Math.max(50, Math.min(PULL_PAGE, Math.floor(MOST_IN_ANSWER / Math.max(1, wanted.length))));
  const entries = await readPages(tx, projectId, wanted, most);
  return (pourId, cursor) =>
    holdsHead(cursor)
      ? pageOf(entries.get(pourId) ?? [], cursor, most)
      : { ...untouched(cursor), headKnown: false };
}

const notFound = (cursor: PourCursor): Pour => ({
  pourId: cursor.pourId,
  found: false,
  plan: null,
  ...untouched(cursor),
});

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
