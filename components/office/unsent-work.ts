import { openPersonDatabase } from '@/lib/device/store/person-database';

/** How much of a person's work waits on this device: entries not sent or refused, and photos not stored yet. */
export async function unsentWork(personId: string): Promise<{ entries: number; photos: number }> {
  const name = `cagewright-${personId}`;
  try {
    const known = await indexedDB.databases();
    if (!known.some((database) => database.name === name)) return { entries: 0, photos: 0 };
    const database = await openPersonDatabase(name);
    try {
      const [waiting, refused, photos] = await Promise.all([
        database.count('outbox'),
        database.count('refused'),
        database.getAll('photos'),
      ]);
      return {
        entries: waiting + refused,
        photos: photos.filter((photo) => photo.progress !== 'stored').length,
      };
    } finally {
      database.close();
    }
  } catch {
    // A browser that keeps no store holds no work either; one that cannot say must not keep a person signed in.
    return { entries: 0, photos: 0 };
  }
}
