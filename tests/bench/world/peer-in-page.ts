import type { Page } from '@playwright/test';

/** As much of the peer as these functions use. */
interface PeerDatabase {
  bulkDocs(docs: object[]): Promise<{ ok?: boolean }[]>;
  replicate: Record<
    'to' | 'from',
    (other: PeerDatabase, options: { batch_size: number }) => Promise<{ docs_written: number }>
  >;
}
declare global {
  interface Window {
    PouchDB: new (name: string) => PeerDatabase;
  }
}

/** The peer gets batches of the same size as ours. */
const BATCH = 500;

/** Keeps these entries in a store of the peer's in this page, as documents; not timed. */
export async function keepAsDocuments(page: Page, entries: readonly { id: string }[]): Promise<void> {
  await page.evaluate(
    async ({ all, size }) => {
      const local = new window.PouchDB('local');
      for (let from = 0; from < all.length; from += size) {
        const docs = all.slice(from, from + size).map((entry) => ({ _id: entry.id, ...entry }));
        if (!(await local.bulkDocs(docs)).every((kept) => kept.ok)) throw new Error('Not all were kept.');
      }
    },
    { all: entries, size: BATCH },
  );
}

/** Replicates between this page's store and a database of the peer's server. @returns milliseconds */
export function replicate(
  page: Page,
  way: 'to' | 'from',
  database: string,
  documents: number,
): Promise<number> {
  return page.evaluate(
    async ({ direction, name, size, expected }) => {
      const local = new window.PouchDB('local');
      const remote = new window.PouchDB(`${location.origin}/db/${name}`);
      const started = performance.now();
      const { docs_written: written } = await local.replicate[direction](remote, { batch_size: size });
      const ms = performance.now() - started;
      if (written !== expected) throw new Error(`${written} of ${expected} documents were replicated.`);
      return ms;
    },
    { direction: way, name: database, size: BATCH, expected: documents },
  );
}
