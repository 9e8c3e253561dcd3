import { createDevice, type RunningDevice } from '@/lib/device/create-device';
import type { BodyOf } from '@/lib/inspection/entry';

/** Runs in a page: the device without screens, and beside it a bare store to hold it against. */
interface Place {
  projectId: string;
  pourId: string;
}
export interface SavePage {
  /** Starts the device and waits until the pour is on it and open. */
  open(at: Place): Promise<void>;
  /** Saves each reading once by the device and once barely. @returns milliseconds each */
  saveInTurns(at: Place, readings: readonly object[]): Promise<{ device: number[]; bare: number[] }>;
}
declare global {
  interface Window {
    savePage: SavePage;
  }
}

let device: RunningDevice | null = null;

const isOpen = (pourId: string) => Boolean(device?.pour(pourId)?.sheet);

async function open({ pourId }: Place): Promise<void> {
  device = createDevice();
  const giveUp = performance.now() + 30_000;
  while (!isOpen(pourId)) {
    if (performance.now() > giveUp) throw new Error('The pour did not reach the device.');
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
}

function bareStore(): Promise<IDBDatabase> {
  return new Promise((resolve, reject) => {
    const opening = indexedDB.open('bare', 1);
    opening.onupgradeneeded = () => void opening.result.createObjectStore('records', { keyPath: 'id' });
    opening.onsuccess = () => resolve(opening.result);
    opening.onerror = () => reject(opening.error);
  });
}

function putBarely(db: IDBDatabase, record: object): Promise<void> {
  return new Promise((resolve, reject) => {
    const tx = db.transaction('records', 'readwrite', { durability: 'strict' });
    tx.objectStore('records').put(record);
    tx.oncomplete = () => resolve();
    tx.onabort = () => reject(tx.error);
  });
}

async function timed(work: () => Promise<unknown>): Promise<number> {
  const started = performance.now();
  await work();
  return performance.now() - started;
}

async function saveInTurns(at: Place, readings: readonly object[]) {
  const running = device;
  if (!running) throw new Error('The device is not open.');
  const bare = await bareStore();
  const times = { device: [] as number[], bare: [] as number[] };
  for (const body of readings) {
    const entry = await (async () => {
      let recorded: object = {};
      times.device.push(
        await timed(async () => {
          recorded = await running.record(at, 'reading', body as BodyOf<'reading'>);
        }),
      );
      return recorded;
    })();
    times.bare.push(await timed(() => putBarely(bare, entry)));
    // A person takes a moment from one reading to the next; what a save leaves to be done is done in it.
    await new Promise((resolve) => setTimeout(resolve, 30));
  }
  return times;
}

window.savePage = { open, saveInTurns };
