import type { Phone } from '@/tests/faults/world/phone';

/** Everything that a phone keeps, stores and cookies, as one text: what somebody finds who takes it apart. */
export async function wholeStore(phone: Phone): Promise<string> {
  const names = (await indexedDB.databases())
    .map((one) => one.name ?? '')
    .filter((name) => name.startsWith(phone.name));
  const parts = await Promise.all(names.map(textOf));
  return [...parts, JSON.stringify([...phone.cookies])].join('\n');
}

function done<T>(request: IDBRequest<T>): Promise<T> {
  return new Promise((resolve, reject) => {
    request.onsuccess = () => resolve(request.result);
    request.onerror = () => reject(new Error('The store could not be read.'));
  });
}

async function textOf(name: string): Promise<string> {
  const db = await done(indexedDB.open(name));
  const texts: string[] = [];
  for (const store of db.objectStoreNames) {
    const kept = db.transaction(store).objectStore(store);
    texts.push(JSON.stringify([await done(kept.getAllKeys()), await done(kept.getAll())], plain));
  }
  db.close();
  return texts.join('\n');
}

/** Bytes as text, so that nothing hides in them. */
const plain = (_key: string, value: unknown): unknown =>
  value instanceof ArrayBuffer || ArrayBuffer.isView(value)
    ? Buffer.from(
        value instanceof ArrayBuffer ? new Uint8Array(value) : new Uint8Array(value.buffer),
      ).toString('latin1')
    : value;
