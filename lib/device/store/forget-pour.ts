import { allOrNothing } from './all-or-nothing';
import type { PersonDatabase } from './person-database';

/**
 * Drops from the store what the server holds of a pour anyway. Whatever waits to be sent, was refused, or is a photo
 * not stored yet, stays. (SPEC 28)
 * @returns ids of the photos that went
 */
export async function forgetPour(db: PersonDatabase, pourId: string): Promise<string[]> {
  const tx = db.transaction(
    ['entries', 'acked', 'cursors', 'plans', 'crewLists', 'photos', 'photoBytes', 'outbox'],
    'readwrite',
  );
  return allOrNothing(tx, async () => {
    const [entries, acked, waiting, photos] = await Promise.all([
      tx.objectStore('entries').index('stream').getAllKeys(pourId),
      tx.objectStore('acked').index('stream').getAllKeys(pourId),
      tx.objectStore('outbox').getAllKeys(),
      tx.objectStore('photos').getAll(),
    ]);
    const waits = new Set(waiting);
    const gone = photos
      .filter((photo) => photo.pourId === pourId && photo.progress === 'stored')
      .map((photo) => photo.photoId);
    await Promise.all([
      tx.objectStore('cursors').delete(pourId),
      tx.objectStore('plans').delete(pourId),
      tx.objectStore('crewLists').delete(pourId),
      ...entries.filter((id) => !waits.has(id)).map((id) => tx.objectStore('entries').delete(id)),
      ...acked.map((id) => tx.objectStore('acked').delete(id)),
      ...gone.flatMap((id) => [tx.objectStore('photos').delete(id), tx.objectStore('photoBytes').delete(id)]),
    ]);
    return gone;
  });
}

/** Deletes a photo with its bytes. */
export async function forgetPhoto(db: PersonDatabase, photoId: string): Promise<void> {
  const tx = db.transaction(['photos', 'photoBytes'], 'readwrite');
  await Promise.all([
    tx.objectStore('photos').delete(photoId),
    tx.objectStore('photoBytes').delete(photoId),
    tx.done,
  ]);
}
