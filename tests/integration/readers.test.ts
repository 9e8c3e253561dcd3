import { setTimeout as wait } from 'node:timers/promises';
import { v7 as uuid } from 'uuid';
import { expect, it } from 'vitest';
import { planPour, pointsOf, pull, pushKept, registerGauge } from './record-routes';
import { openWorld } from './world';

const world = openWorld();

interface Row {
  seq: number;
  id: string;
}

/** Follows a stream by its cursor while others write, as a device does; what lies below the cursor is never asked again. */
async function follow(
  readAfter: (last: Row | null) => Promise<Row[]>,
  writing: Promise<unknown>,
): Promise<string[]> {
  const read: Row[] = [];
  let ended = false;
  void writing.finally(() => (ended = true));
  for (;;) {
    const last = ended;
    const page = await readAfter(read.at(-1) ?? null);
    read.push(...page);
    if (last && page.length === 0) return read.map((row) => row.id);
    await wait(1);
  }
}

it('a reader who follows writers misses nothing, and seq has no gap', async () => {
  const w = world();
  await registerGauge(w);
  const pourId = await planPour(w, 'P-01');
  const points = await pointsOf(w, pourId);
  const writers = await Promise.all(
    [1, 2, 3, 4].map((n) => w.addPerson(w.projectId, 'inspector', `writer${n}.inspector`)),
  );
  const writing = Promise.all(
    writers.map(async (person) => {
      const device = w.device(person, pourId);
      for (let batch = 0; batch < 8; batch += 1) {
        await pushKept(
          w,
          device,
          points.slice(0, 3).map((point) => device.reading(point, 52)),
        );
      }
    }),
  );
  const hashes = new Map<number, string>();
  const read = await follow(async (last) => {
    const cursor = last ? { after: last.seq, headHash: hashes.get(last.seq)! } : { after: 0, headHash: null };
    const page = (await pull(w, w.team.viewer, pourId, cursor)).pours[0]!;
    for (const entry of page.entries) hashes.set(entry.seq, entry.hash);
    return page.entries;
  }, writing);
  await writing;

  const stored = await w
    .owner('entries')
    .where({ project_id: w.projectId })
    .orderBy('seq')
    .select('seq', 'id', 'pour_id');
  expect(new Set(read)).toEqual(new Set(stored.filter((row) => row.pour_id === pourId).map((row) => row.id)));
  expect(stored.map((row) => Number(row.seq))).toEqual(stored.map((_, index) => index + 1));
});

it('the same reader misses rows of a writer who takes numbers without the lock (negative control)', async () => {
  const { owner } = world();
  await owner.raw('create sequence naive_seq; create table naive (seq bigint primary key, id uuid not null)');
  const writing = Promise.all(
    [1, 2, 3, 4].map(async () => {
      for (let count = 0; count < 12; count += 1) {
        await owner.transaction(async (tx) => {
          const { rows } = await tx.raw(`select nextval('naive_seq') as seq`);
          await tx.raw('select pg_sleep(random() * 0.02)');
          await tx('naive').insert({ seq: rows[0].seq, id: uuid() });
        });
      }
    }),
  );
  const { appReader } = await reader();
  const read = await follow(async (last) => {
    const rows = await appReader('naive')
      .where('seq', '>', last?.seq ?? 0)
      .orderBy('seq')
      .select('seq', 'id');
    return rows.map((row) => ({ seq: Number(row.seq), id: String(row.id) }));
  }, writing);
  await writing;
  await appReader.destroy();
  const stored = await owner('naive').select('id');
  expect(stored).toHaveLength(48);
  expect(read.length).toBeLessThan(stored.length);
});

/** The reader has connections of its own: the writers' four are busy. */
async function reader() {
  const { connect } = await import('@/db/connection');
  return { appReader: connect(world().database.ownerUrl, 1) };
}
