import 'fake-indexeddb/auto';
import fc from 'fast-check';
import { openDB, type DBSchema } from 'idb';
import { describe, expect, it } from 'vitest';
import { deleteMany, getMany } from '@/lib/device/store/many-keys';

interface Numbers extends DBSchema {
  all: { key: string; value: { id: string; number: number } };
}

const idOf = (number: number) => String(number).padStart(6, '0');

async function holding(numbers: Iterable<number>) {
  const db = await openDB<Numbers>(`many-${Math.random()}`, 1, {
    upgrade: (fresh) => void fresh.createObjectStore('all', { keyPath: 'id' }),
  });
  const tx = db.transaction('all', 'readwrite');
  for (const number of numbers) void tx.store.put({ id: idOf(number), number });
  await tx.done;
  return db;
}

const upTo = (count: number) => Array.from({ length: count }, (_, number) => number);
const subsets = fc.tuple(
  fc.uniqueArray(fc.nat(60), { maxLength: 40 }),
  fc.uniqueArray(fc.nat(60), { maxLength: 40 }),
);

describe('many records at once', () => {
  it('deletes what was named and nothing else, whatever lies between', async () => {
    await fc.assert(
      fc.asyncProperty(subsets, async ([there, going]) => {
        const db = await holding(there);
        const tx = db.transaction('all', 'readwrite');
        await deleteMany(tx.store, going.map(idOf));
        await tx.done;
        const left = there.filter((number) => !going.includes(number)).map(idOf);
        expect(await db.getAllKeys('all')).toEqual(left.sort());
        db.close();
      }),
      { numRuns: 60 },
    );
  });

  it('gives those that are there of the ones asked for', async () => {
    await fc.assert(
      fc.asyncProperty(subsets, async ([there, asked]) => {
        const db = await holding(there);
        const found = await getMany(db.transaction('all').store, asked.map(idOf));
        expect([...found.keys()].sort()).toEqual(
          asked
            .filter((number) => there.includes(number))
            .map(idOf)
            .sort(),
        );
        db.close();
      }),
      { numRuns: 60 },
    );
  });

  it('reads two records that lie far apart without all that lies between them', async () => {
    const db = await holding(upTo(1200));
    const { store } = db.transaction('all');
    let wholeRanges = 0;
    const watched = {
      count: (range: IDBKeyRange) => store.count(range),
      get: (id: string) => store.get(id),
      getAll: (range: IDBKeyRange) => {
        wholeRanges += 1;
        return store.getAll(range);
      },
    };
    const far = await getMany(watched, [idOf(3), idOf(1100)]);
    expect([...far.values()].map(({ number }) => number).sort()).toEqual([1100, 3]);
    expect(wholeRanges).toBe(0);
    db.close();
  });
});
