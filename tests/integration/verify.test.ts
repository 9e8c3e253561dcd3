import { beforeAll, describe, expect, it } from 'vitest';
import { planPour, pointsOf, pushKept, registerGauge } from './record-routes';
import { openWorld } from './world';

const world = openWorld();

beforeAll(async () => {
  const w = world();
  await registerGauge(w);
  for (const number of ['P-01', 'P-02', 'P-03']) {
    const pourId = await planPour(w, number);
    const phone = w.device(w.team.inspector, pourId);
    const points = await pointsOf(w, pourId);
    await pushKept(w, phone, [
      ...points.map((point, index) => phone.reading(point, 30 + 5 * index)),
      phone.entry('answer', { checkId: 'bars', answer: 'not-met' }),
      phone.entry('nonconformance', {
        title: 'Bars short',
        about: [{ kind: 'check', id: 'bars' }],
        where: { elementId: 'deck', faceId: null, text: 'Grid D' },
        extent: 'Two bars',
        description: '',
        proposal: '',
        neededBy: null,
      }),
    ]);
  }
});

const verify = async () => (await import('@/lib/server/record-verify')).verifyRecord();

/** Changes rows as their owner, with the triggers off: behind the application's back. */
async function tamper(table: string, sql: string): Promise<void> {
  const { owner } = world();
  await owner.transaction(async (tx) => {
    await tx.raw(`alter table ${table} disable trigger user`);
    await tx.raw(sql);
    await tx.raw(`alter table ${table} enable trigger user`);
  });
}

describe('record:verify', () => {
  it('finds nothing in a record that nobody touched', async () => {
    const verified = await verify();
    expect(verified.problems).toEqual([]);
    expect(verified.entries).toBe(1 + 3 * 11);
    expect(verified.heads).toHaveLength(2 + 3);
  });

  const second = `(select seq from entries where type = 'reading' order by seq limit 1 offset 1)`;
  const tampering: [string, string, string, string][] = [
    [
      'one digit of one reading',
      'entries',
      `update entries set body = jsonb_set(body, '{value,mm}', '36') where seq = ${second}`,
      `update entries set body = jsonb_set(body, '{value,mm}', '35') where seq = ${second}`,
    ],
    [
      'the time of an entry by a millisecond',
      'entries',
      `update entries set recorded_at = recorded_at + interval '1 ms' where seq = ${second}`,
      `update entries set recorded_at = recorded_at - interval '1 ms' where seq = ${second}`,
    ],
    [
      'the role of its author',
      'entries',
      `update entries set author_role = 'engineer' where seq = ${second}`,
      `update entries set author_role = 'inspector' where seq = ${second}`,
    ],
    [
      'one number of one plan',
      'plans',
      `update plans set document = jsonb_set(document, '{rainLimitMm}', '6') where pour_id = (select min(pour_id::text)::uuid from plans)`,
      `update plans set document = jsonb_set(document, '{rainLimitMm}', '5') where pour_id = (select min(pour_id::text)::uuid from plans)`,
    ],
  ];
  it.each(tampering)('notices %s changed behind its back', async (_, table, change, back) => {
    await tamper(table, change);
    expect((await verify()).problems).toHaveLength(1);
    await tamper(table, back);
    expect((await verify()).problems).toEqual([]);
  });

  it('notices an entry taken out of the middle, and one cut off the end', async () => {
    for (const which of ['reading', 'nonconformance']) {
      const row = await world().owner('entries').where({ type: which }).orderBy('seq', 'desc').first('*');
      await tamper('entries', `delete from entries where seq = ${Number(row.seq)}`);
      const { problems } = await verify();
      expect(problems.length).toBeGreaterThan(0);
      await world()
        .owner('entries')
        .insert({ ...row, body: JSON.stringify(row.body) });
      expect((await verify()).problems).toEqual([]);
    }
  });
});

describe('summaries', () => {
  const all = async () => ({
    pours: await world().owner('pour_summaries').orderBy('pour_id').select('*'),
    nonconformances: await world().owner('nonconformance_summaries').orderBy('id').select('*'),
  });

  it('rebuilt from plans and entries are the same as those that were kept up', async () => {
    const kept = await all();
    expect(kept.pours).toHaveLength(3);
    expect(kept.nonconformances).toHaveLength(3);
    await world().owner('nonconformance_summaries').update({ title: 'wrong' });
    await world().owner('pour_summaries').update({ state: 'placed', holds_total: 0 });
    const { rebuildSummaries } = await import('@/lib/server/rebuild-summaries');
    expect(await rebuildSummaries(new Date().toISOString())).toBe(3);
    expect(await all()).toEqual(kept);
  });
});

describe('a cached sheet', () => {
  it('is thrown away when the record under it is another (a restored database)', async () => {
    const w = world();
    const { loadSheet, forgetFolded } = await import('@/lib/server/load-sheet');
    const { database } = await import('@/db/connection');
    const { enterProject } = await import('@/db/stores/session-store');
    const pourId = await planPour(w, 'P-09');
    const [point] = await pointsOf(w, pourId);
    const phone = w.device(w.team.inspector, pourId);
    await pushKept(w, phone, [phone.reading(point!, 52)]);
    const sheet = () =>
      database().transaction(async (tx) => {
        await enterProject(tx, w.projectId);
        return loadSheet(tx, pourId);
      });
    const readings = async () => (await sheet()).entries.filter((entry) => entry.type === 'reading').length;
    expect(await readings()).toBe(1);
    await tamper('entries', `delete from entries where pour_id = '${pourId}' and type = 'reading'`);
    expect(await readings()).toBe(0);
    forgetFolded();
    expect(await readings()).toBe(0);
  });
});
