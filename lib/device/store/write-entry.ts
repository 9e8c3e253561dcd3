import type { RecordedEntry } from '@/lib/inspection/sheet';
import { allOrNothing } from './all-or-nothing';
import { envelopeOf } from './envelope';
import { onceMoreIfReopened } from './lasting-database';
import {
  isDeviceFull,
  streamOf,
  type OutboxRecord,
  type PersonDatabase,
  type PhotoRecord,
} from './person-database';

/** A photo that goes into the store in one piece with its entry. */
export interface PhotoToStore {
  record: PhotoRecord;
  bytes: ArrayBuffer;
}

/**
 * Writes an entry, its outbox record and (for a photo) the bytes in one strict transaction, and resolves once it is
 * complete: from then on the entry survives the browser being killed. (SPEC 1, 2, 26)
 * @param floor the highest deviceSeq known from outside of the store
 * @param build makes the entry for the deviceSeq that it gets
 * @throws what the store throws, QuotaExceededError included; nothing is written then
 */
export async function writeEntry(
  db: PersonDatabase,
  floor: number,
  build: (deviceSeq: number) => RecordedEntry,
  photo?: PhotoToStore,
): Promise<{ entry: RecordedEntry; outbox: OutboxRecord }> {
  try {
    return await onceMoreIfReopened(db, () => writeOnce(db, floor, build, photo));
  } catch (error) {
    if (!isDeviceFull(error)) throw error;
    // Photos already on the server can be shown from there; a reading can also have the room that was set aside.
    const freed = await makeRoom(db, photo === undefined);
    if (!freed) throw error;
    return writeOnce(db, floor, build, photo);
  }
}

async function writeOnce(
  db: PersonDatabase,
  floor: number,
  build: (deviceSeq: number) => RecordedEntry,
  photo?: PhotoToStore,
): Promise<{ entry: RecordedEntry; outbox: OutboxRecord }> {
  const tx = db.transaction(
    photo ? ['entries', 'outbox', 'meta', 'photos', 'photoBytes'] : ['entries', 'outbox', 'meta'],
    'readwrite',
    { durability: 'strict' },
  );
  return allOrNothing(tx, async () => {
    const last = ((await tx.objectStore('meta').get('deviceSeq')) as number | undefined) ?? 0;
    const deviceSeq = Math.max(last, floor) + 1;
    const entry = build(deviceSeq);
    const stream = streamOf(entry);
    const outbox: OutboxRecord = {
      id: entry.id,
      deviceSeq,
      stream,
      envelope: envelopeOf(entry),
      offeredAgain: false,
      problem: null,
    };
    await Promise.all([
      tx.objectStore('meta').put(deviceSeq, 'deviceSeq'),
      tx.objectStore('entries').put({ id: entry.id, stream, entry }),
      tx.objectStore('outbox').put(outbox),
      photo && tx.objectStore('photos').put(photo.record),
      photo && tx.objectStore('photoBytes').put({ photoId: photo.record.photoId, bytes: photo.bytes }),
    ]);
    return { entry, outbox };
  });
}

const BALLAST_BYTES = 512 * 1024;

/** Sets room aside for the day the device is full. Does nothing when there is none to set aside. */
export async function setRoomAside(db: PersonDatabase): Promise<void> {
  if (await db.getKey('meta', 'ballast')) return;
  await db.put('meta', new Uint8Array(BALLAST_BYTES), 'ballast').catch(() => undefined);
}

async function makeRoom(db: PersonDatabase, withBallast: boolean): Promise<boolean> {
  const tx = db.transaction(['photos', 'photoBytes', 'meta'], 'readwrite');
  let freed = false;
  for (const photo of await tx.objectStore('photos').getAll()) {
    if (photo.progress !== 'stored') continue;
    if (!(await tx.objectStore('photoBytes').getKey(photo.photoId))) continue;
    await tx.objectStore('photoBytes').delete(photo.photoId);
    freed = true;
  }
  if (withBallast && !freed && (await tx.objectStore('meta').getKey('ballast'))) {
    await tx.objectStore('meta').delete('ballast');
    freed = true;
  }
  await tx.done;
  return freed;
}
