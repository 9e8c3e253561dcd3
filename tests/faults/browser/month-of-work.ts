import type { Page } from '@playwright/test';
import sharp from 'sharp';
import type { BuildingSite, SitePerson } from './building-site';

/**
 * Fills a person's store with a month of work, as the program itself would have written it: every record is a copy of
 * the first one that waits, which was recorded on the screen, under an id, a number and a time of its own. Photos are
 * pictures of the size that the program makes, no two with the same bytes. What is open of the program has to be
 * loaded again afterwards.
 * @returns ids of what was added
 */
export async function workAMonth(
  page: Page,
  site: BuildingSite,
  person: SitePerson,
  { readings, photos }: { readings: number; photos: number },
): Promise<string[]> {
  const noise = { type: 'gaussian', mean: 128, sigma: 12 } as const;
  const jpeg = await sharp({
    create: { width: 1280, height: 960, channels: 3, background: '#7a7468', noise },
  })
    .jpeg({ quality: 70 })
    .toBuffer();
  return page.evaluate(inPage, {
    name: `cagewright-${person.id}`,
    points: site.points,
    readings,
    photos,
    jpeg: jpeg.toString('base64'),
  });
}

/** Runs in the page: it may use nothing from outside of itself. */
async function inPage(given: {
  name: string;
  points: string[];
  readings: number;
  photos: number;
  jpeg: string;
}): Promise<string[]> {
  type Kept = { id: string; stream: string; entry: Record<string, unknown> };
  type Waiting = { id: string; envelope: Record<string, unknown>; deviceSeq: number };
  const done = <T>(request: IDBRequest<T>) =>
    new Promise<T>((read, failed) => {
      request.onsuccess = () => read(request.result);
      request.onerror = () => failed(request.error ?? new Error('failed'));
    });
  const hex = (bytes: ArrayBuffer) =>
    [...new Uint8Array(bytes)].map((byte) => byte.toString(16).padStart(2, '0')).join('');
  const jpeg = Uint8Array.from(atob(given.jpeg), (char) => char.charCodeAt(0));
  /** The same picture with a comment of its own behind the first marker. */
  const picture = async (number: number) => {
    const words = new TextEncoder().encode(`photo ${number}`);
    const comment = [0xff, 0xfe, 0, words.length + 2, ...words];
    const bytes = Uint8Array.from([...jpeg.subarray(0, 2), ...comment, ...jpeg.subarray(2)]).buffer;
    return { bytes, sha256: hex(await crypto.subtle.digest('SHA-256', bytes)) };
  };

  const db = await done(indexedDB.open(given.name));
  const first = db.transaction(['outbox', 'entries', 'meta']);
  const [[outbox], kept, last] = await Promise.all([
    done(first.objectStore('outbox').getAll() as IDBRequest<Waiting[]>),
    done(first.objectStore('entries').getAll() as IDBRequest<Kept[]>),
    done(first.objectStore('meta').get('deviceSeq') as IDBRequest<number>),
  ]);
  const model = kept.find((one) => one.id === outbox?.id);
  if (!outbox || !model) throw new Error('Nothing waits yet.');
  const { projectId, pourId } = outbox.envelope as { projectId: string; pourId: string };
  const month = 30 * 86_400_000;
  const began = Date.now() - month;
  const all = given.readings + given.photos;
  const added: string[] = [];
  while (added.length < all) {
    const from = added.length;
    const until = Math.min(from + 250, all);
    const isPhoto = (one: number) => one >= given.readings;
    // A transaction ends by itself while something else is waited for: the pictures are made first.
    const pictures = new Map<number, Awaited<ReturnType<typeof picture>>>();
    for (let one = from; one < until; one += 1) if (isPhoto(one)) pictures.set(one, await picture(one));
    const tx = db.transaction(['outbox', 'entries', 'meta', 'photos', 'photoBytes'], 'readwrite');
    const over = new Promise<void>((complete, failed) => {
      tx.oncomplete = () => complete();
      tx.onabort = () => failed(tx.error ?? new Error('not written'));
    });
    for (let one = from; one < until; one += 1) {
      const id = crypto.randomUUID();
      const deviceSeq = last + one + 1;
      const at = new Date(began + (month * one) / all).toISOString();
      const taken = pictures.get(one);
      const mm = 42 + (one % 20);
      const photo = taken && {
        photoId: crypto.randomUUID(),
        sha256: taken.sha256,
        bytes: taken.bytes.byteLength,
        contentType: 'image/jpeg',
        takenAt: at,
        about: { kind: 'pour', id: pourId },
        shot: 'wide',
        caption: '',
      };
      const reading = {
        ...(model.entry.body as object),
        pointId: given.points[one % given.points.length],
        value: { text: String(mm), unit: 'mm', mm },
        measuredAt: at,
      };
      const own = {
        id,
        deviceSeq,
        recordedAt: at,
        type: photo ? 'photo' : 'reading',
        body: photo ?? reading,
      };
      tx.objectStore('entries').put({ ...model, id, entry: { ...model.entry, ...own } });
      tx.objectStore('outbox').put({ ...outbox, id, deviceSeq, envelope: { ...outbox.envelope, ...own } });
      if (photo && taken) {
        const waits = { progress: 'waiting', problem: null, sentAt: null, refusals: [] };
        tx.objectStore('photos').put({ ...photo, entryId: id, projectId, pourId, ...waits });
        tx.objectStore('photoBytes').put({ photoId: photo.photoId, bytes: taken.bytes });
      }
      added.push(id);
    }
    tx.objectStore('meta').put(last + until, 'deviceSeq');
    await over;
  }
  db.close();
  return added;
}
