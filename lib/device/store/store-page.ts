import type { CrewList } from '@/lib/inspection/fix-list-item';
import type { Plan } from '@/lib/inspection/plan';
import type { RecordedEntry } from '@/lib/inspection/sheet';
import type { StoredEntry } from '@/lib/inspection/wire';
import { allOrNothing } from './all-or-nothing';
import { envelopeOf } from './envelope';
import { deleteMany } from './many-keys';
import type { CursorRecord, OutboxRecord, PersonDatabase, PhotoRecord } from './person-database';

/** One page of one stream, as pulled. */
export interface StreamPage {
  stream: string;
  entries: StoredEntry[];
  head: number;
  headHash: string | null;
  /** Nothing follows: the stream is complete up to `head`. */
  complete: boolean;
  plan: Plan | null;
  /** Crew get this in place of the plan. */
  crewList?: CrewList | null;
}

export interface StoredPage {
  cursor: CursorRecord;
  /** How far the store was before. */
  afterBefore: number;
  photos: PhotoRecord[];
  /** Sent and acknowledged before, but not in the complete stream: put back into the outbox. */
  offeredAgain: OutboxRecord[];
}

/** How many answers of "this photo cannot be used" are met by sending the same bytes once more. */
const REFUSALS_TO_RETRY = 1;

/**
 * Writes one pulled page and its cursor in one transaction, so that the cursor never runs ahead of what is kept.
 * Entries that were acknowledged and are missing from a complete stream are offered again. (SPEC 20, 22, 24)
 */
export async function storePage(db: PersonDatabase, page: StreamPage): Promise<StoredPage> {
  const tx = db.transaction(
    ['entries', 'cursors', 'plans', 'acked', 'outbox', 'photos', 'strays', 'crewLists'],
    'readwrite',
  );
  return allOrNothing(tx, async () => {
    const [before, acked, strays, photosNamed] = await Promise.all([
      tx.objectStore('cursors').get(page.stream),
      tx.objectStore('acked').index('stream').getAllKeys(page.stream),
      tx.objectStore('strays').getAllKeys(),
      Promise.all(
        page.entries.map((entry) => {
          const photoId = photoNamedBy(entry);
          return photoId === null ? undefined : tx.objectStore('photos').get(photoId);
        }),
      ),
    ]);
    const cursor: CursorRecord = {
      stream: page.stream,
      after: page.head,
      headHash: page.headHash,
      planRevision: page.plan?.revision ?? page.crewList?.planRevision ?? before?.planRevision ?? 0,
    };
    const pulled = new Set(page.entries.map((entry) => entry.id));
    const missing = page.complete ? acked.filter((id) => !pulled.has(id)) : [];
    const keptMissing = await Promise.all(missing.map((id) => tx.objectStore('entries').get(id)));

    const writes: Promise<unknown>[] = [tx.objectStore('cursors').put(cursor)];
    if (page.plan) writes.push(tx.objectStore('plans').put(page.plan));
    if (page.crewList)
      writes.push(tx.objectStore('crewLists').put({ pourId: page.stream, list: page.crewList }));
    for (const entry of page.entries) {
      writes.push(tx.objectStore('entries').put({ id: entry.id, stream: page.stream, entry }));
    }
    // Set aside after a restore, and here again.
    for (const id of strays) if (pulled.has(id)) writes.push(tx.objectStore('strays').delete(id));
    const seen = page.complete ? acked : acked.filter((id) => pulled.has(id));
    writes.push(deleteMany(tx.objectStore('acked'), seen));
    const offeredAgain: OutboxRecord[] = [];
    for (const kept of keptMissing) {
      if (!kept) continue;
      const record = offerAgain(kept.entry, kept.stream);
      offeredAgain.push(record);
      writes.push(tx.objectStore('outbox').put(record));
    }
    const photos = new Map<string, PhotoRecord>();
    page.entries.forEach((entry, index) => {
      const photo = photos.get(photoNamedBy(entry) ?? '') ?? photosNamed[index];
      const next = photo && photoAfter(photo, entry);
      if (next) photos.set(next.photoId, next);
    });
    for (const photo of photos.values()) writes.push(tx.objectStore('photos').put(photo));
    await Promise.all(writes);
    return { cursor, afterBefore: before?.after ?? 0, photos: [...photos.values()], offeredAgain };
  });
}

/** An entry that the server had taken in, as an outbox record once more. Its id is its own: nothing is doubled. */
function offerAgain(entry: RecordedEntry, stream: string): OutboxRecord {
  return {
    id: entry.id,
    deviceSeq: entry.deviceSeq,
    stream,
    envelope: envelopeOf(entry),
    offeredAgain: true,
    problem: null,
  };
}

function photoNamedBy(entry: StoredEntry): string | null {
  if (entry.type !== 'photo-stored' && entry.type !== 'photo-refused') return null;
  return typeof entry.body.photoId === 'string' ? entry.body.photoId : null;
}

function photoAfter(photo: PhotoRecord, entry: StoredEntry): PhotoRecord | null {
  if (entry.type === 'photo-stored') return { ...photo, progress: 'stored', problem: null };
  if (photo.progress === 'stored' || photo.refusals.includes(entry.id)) return null;
  const refusals = [...photo.refusals, entry.id];
  const problem =
    typeof entry.body.problem === 'string' ? entry.body.problem : 'The server could not use this photo.';
  return refusals.length > REFUSALS_TO_RETRY
    ? { ...photo, refusals, problem, progress: 'refused' }
    : { ...photo, refusals, problem: null, progress: 'waiting', sentAt: null };
}

/** What starting a stream afresh has moved. */
export interface RestartedStream {
  offeredAgain: OutboxRecord[];
  /** Own entries, waiting once more. */
  waiting: RecordedEntry[];
  /** Others' entries taken out of the sheet. */
  strays: string[];
}

/**
 * The server does not know this stream's head: it was restored from an older copy. What this device had sent is
 * offered again; what others had sent is set aside until it comes back; the stream is pulled from its start. (SPEC 23)
 */
export async function restartStream(
  db: PersonDatabase,
  stream: string,
  own: { personId: string; deviceId: string },
): Promise<RestartedStream> {
  const tx = db.transaction(['entries', 'cursors', 'acked', 'outbox', 'strays'], 'readwrite', {
    durability: 'strict',
  });
  return allOrNothing(tx, async () => {
    const [kept, acked] = await Promise.all([
      tx.objectStore('entries').index('stream').getAll(stream),
      tx.objectStore('acked').index('stream').getAllKeys(stream),
    ]);
    const restarted: RestartedStream = { offeredAgain: [], waiting: [], strays: [] };
    const writes: Promise<unknown>[] = [
      // Revision 0 asks for the plan too: the restored one may be older than ours.
      tx.objectStore('cursors').put({ stream, after: 0, headHash: null, planRevision: 0 }),
      ...acked.map((id) => tx.objectStore('acked').delete(id)),
    ];
    for (const one of kept) {
      const { entry } = one;
      if (entry.seq === undefined) continue;
      if (entry.authorId === own.personId && entry.deviceId === own.deviceId) {
        const record = offerAgain(entry, stream);
        const waiting: RecordedEntry = { ...envelopeOf(entry), authorRole: entry.authorRole };
        restarted.offeredAgain.push(record);
        restarted.waiting.push(waiting);
        writes.push(
          tx.objectStore('outbox').put(record),
          tx.objectStore('entries').put({ ...one, entry: waiting }),
        );
      } else {
        restarted.strays.push(one.id);
        writes.push(tx.objectStore('strays').put(one), tx.objectStore('entries').delete(one.id));
      }
    }
    await Promise.all(writes);
    return restarted;
  });
}
