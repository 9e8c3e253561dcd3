import type { Page } from '@playwright/test';

export interface WaitingEntry {
  id: string;
  type: string;
  body: Record<string, unknown>;
}

/** What waits to be sent in this browser's own store, oldest first: read from the disk, not from the screen. */
export function outboxOf(page: Page): Promise<WaitingEntry[]> {
  return page.evaluate(async () => {
    const done = <T>(request: IDBRequest<T>) =>
      new Promise<T>((resolve, reject) => {
        request.onsuccess = () => resolve(request.result);
        request.onerror = () => reject(new Error(String(request.error)));
      });
    interface Kept {
      deviceSeq: number;
      envelope: { id: string; type: string; body: Record<string, unknown> };
    }
    const found: Kept[] = [];
    for (const { name } of await indexedDB.databases()) {
      if (!name?.startsWith('cagewright-') || name === 'cagewright-device') continue;
      const db = await done(indexedDB.open(name));
      found.push(...(await done<Kept[]>(db.transaction('outbox').objectStore('outbox').getAll())));
      db.close();
    }
    found.sort((a, b) => a.deviceSeq - b.deviceSeq);
    return found.map(({ envelope: { id, type, body } }) => ({ id, type, body }));
  });
}
