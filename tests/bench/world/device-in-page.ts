import type { Page } from '@playwright/test';
import type { EntryEnvelope } from '@/lib/inspection/entry';

/** The id that this phone has given itself. */
export function deviceIdOf(page: Page): Promise<string> {
  return page.evaluate(
    () =>
      new Promise<string>((resolve, reject) => {
        const opening = indexedDB.open('cagewright-device');
        opening.onerror = () => reject(opening.error);
        opening.onsuccess = () => {
          const asked = opening.result.transaction('settings').objectStore('settings').get('deviceId');
          asked.onsuccess = () => {
            opening.result.close();
            resolve(asked.result as string);
          };
        };
      }),
  );
}

/**
 * Puts entries into a person's store on this phone as if they had been recorded there: exactly the records that
 * `lib/device/store/write-entry.ts` writes, in one transaction instead of ten thousand.
 */
export function fillOutbox(page: Page, personId: string, entries: readonly EntryEnvelope[]): Promise<void> {
  return page.evaluate(
    ({ name, all }) =>
      new Promise<void>((resolve, reject) => {
        const envelopes = JSON.parse(all) as Pick<EntryEnvelope, 'id' | 'deviceSeq' | 'pourId'>[];
        const opening = indexedDB.open(name);
        opening.onerror = () => reject(opening.error);
        opening.onsuccess = () => {
          const tx = opening.result.transaction(['entries', 'outbox', 'meta'], 'readwrite');
          tx.onabort = () => reject(tx.error);
          tx.oncomplete = () => {
            opening.result.close();
            resolve();
          };
          for (const envelope of envelopes) {
            const { id, deviceSeq, pourId: stream } = envelope;
            tx.objectStore('entries').put({ id, stream, entry: { ...envelope, authorRole: 'inspector' } });
            const waits = { id, deviceSeq, stream, envelope, offeredAgain: false, problem: null };
            tx.objectStore('outbox').put(waits);
          }
          tx.objectStore('meta').put(envelopes.at(-1)?.deviceSeq, 'deviceSeq');
        };
      }),
    // As text: the protocol's own types of nested values are too deep for the compiler.
    { name: `cagewright-${personId}`, all: JSON.stringify(entries) },
  );
}

/** Waits until the device says at the top of its screen what is expected. @returns milliseconds of the page's clock */
export function saysAtTop(page: Page, words: string, timeoutMs = 120_000): Promise<number> {
  return page.evaluate(
    ({ expected, most }) =>
      new Promise<number>((resolve, reject) => {
        const started = performance.now();
        const look = setInterval(() => {
          const text = document.querySelector('header')?.textContent ?? '';
          const now = performance.now();
          if (!text.includes(expected) && now - started < most) return;
          clearInterval(look);
          if (text.includes(expected)) resolve(now);
          else reject(new Error(`The device says "${text}", and not "${expected}".`));
        }, 20);
      }),
    { expected: words, most: timeoutMs },
  );
}

/**
 * Watches a person's store from the first request for entries on, until it holds so many.
 * @returns milliseconds between the two
 */
export function fetchedInto(page: Page, personId: string, entries: number): Promise<number> {
  return page.evaluate(
    ({ name, wanted }) =>
      new Promise<number>((resolve, reject) => {
        const giveUp = performance.now() + 120_000;
        const asked = () =>
          performance.getEntriesByType('resource').find((request) => request.name.endsWith('/api/sync/pull'))
            ?.startTime;
        const count = (db: IDBDatabase) => {
          const counting = db.transaction('entries').objectStore('entries').count();
          counting.onerror = () => reject(counting.error);
          counting.onsuccess = () => {
            const now = performance.now();
            if (counting.result >= wanted) resolve(now - (asked() ?? Number.NaN));
            else if (now > giveUp) reject(new Error(`Only ${counting.result} of ${wanted} were fetched.`));
            else setTimeout(() => count(db), 20);
          };
        };
        // The store is made by the device; it is only looked into once there is something to wait for.
        const begin = setInterval(() => {
          if (asked() === undefined && performance.now() < giveUp) return;
          clearInterval(begin);
          const opening = indexedDB.open(name);
          opening.onerror = () => reject(opening.error);
          opening.onsuccess = () => count(opening.result);
        }, 5);
      }),
    { name: `cagewright-${personId}`, wanted: entries },
  );
}
