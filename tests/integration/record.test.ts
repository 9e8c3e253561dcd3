import { gzipSync } from 'node:zlib';
import { v7 as uuid } from 'uuid';
import { beforeAll, describe, expect, it } from 'vitest';
import type { EntryEnvelope } from '@/lib/inspection/entry';
import { outcomesOf, planPour, pointsOf, pull, push, pushKept, registerGauge } from './record-routes';
import { openWorld, type TestDevice } from './world';

const world = openWorld();
let pourId: string;
let points: string[];
let phone: TestDevice;

beforeAll(async () => {
  await registerGauge(world());
  pourId = await planPour(world(), 'P-01');
  points = await pointsOf(world(), pourId);
  phone = world().device(world().team.inspector, pourId);
});

const countEntries = async () =>
  Number((await world().owner('entries').where({ pour_id: pourId }).count({ n: '*' }))[0]?.n);

describe('push', () => {
  it('answers the same batch again with the receipts of the first time, and adds nothing', async () => {
    const entries = points.slice(0, 3).map((point) => phone.reading(point, 52));
    const first = await pushKept(world(), phone, entries);
    const before = await countEntries();
    const again = outcomesOf(await push(world(), phone, entries));
    expect(again.map((one) => one.outcome)).toEqual(['known', 'known', 'known']);
    expect(again.map((one) => one.outcome === 'known' && one.receipt)).toEqual(first);
    expect(await countEntries()).toBe(before);
  });

  it('keeps a batch once that is delivered twice at the same time', async () => {
    const entries = points.map((point) => phone.reading(point, 53));
    const before = await countEntries();
    const answers = await Promise.all([push(world(), phone, entries), push(world(), phone, entries)]);
    const outcomes = answers.map((answer) => new Set(outcomesOf(answer).map((one) => one.outcome)));
    expect(outcomes.map((set) => [...set]).sort()).toEqual([['kept'], ['known']]);
    expect(await countEntries()).toBe(before + entries.length);
  });

  it('refuses another entry under an id that is taken, and keeps the first', async () => {
    const entry = phone.reading(points[0]!, 52);
    await pushKept(world(), phone, [entry]);
    const [outcome] = outcomesOf(await push(world(), phone, [{ ...entry, seenSeq: 3 }]));
    expect(outcome).toMatchObject({ outcome: 'refused', code: 'id-reused', id: entry.id });
    const stored = await world().owner('entries').where({ id: entry.id }).first('seen_seq');
    expect(Number(stored.seen_seq)).toBe(0);
  });

  const poison: [string, (entry: EntryEnvelope) => unknown, string][] = [
    [
      'U+0000 deep in a body',
      (e) => ({ ...e, type: 'amendment', body: amendmentOf({ a: ['\u0000'] }) }),
      'invalid',
    ],
    ['half a surrogate pair in a key', (e) => ({ ...e, body: { ...e.body, ['\ud800']: 1 } }), 'invalid'],
    [
      'a number beyond double precision',
      (e) => ({ ...e, body: { ...e.body, extra: 'INFINITY' } }),
      'invalid',
    ],
    ['nesting without end', (e) => ({ ...e, body: { ...e.body, extra: nested(4000) } }), 'invalid'],
    ['a year before PostgreSQL counts', (e) => ({ ...e, recordedAt: '0000-01-01T00:00:00.000Z' }), 'invalid'],
    ['a revision beyond an integer', (e) => ({ ...e, planRevision: 9_000_000_000 }), 'invalid'],
    [
      'a value without a unit',
      (e) => ({ ...e, body: { ...e.body, value: { text: '5', unit: null, mm: 5 } } }),
      'invalid',
    ],
    ['a point of another plan', (e) => ({ ...e, body: { ...e.body, pointId: 'deck-top.Z99' } }), 'not-found'],
    ['an author who is somebody else', (e) => ({ ...e, authorId: world().team.engineer.id }), 'wrong-author'],
    ['a type of a newer version', (e) => ({ ...e, v: 2 }), 'too-new'],
    ['a type nobody knows', (e) => ({ ...e, type: 'divination' }), 'too-new'],
    ['a type that only the server writes', (e) => ({ ...e, type: 'release', body: {} }), 'server-only'],
    ['a decision', (e) => ({ ...e, type: 'disposition', body: {} }), 'not-allowed'],
    ['no entry at all', () => 'a string', 'invalid'],
  ];
  it.each(poison)('keeps 499 of 500 when one holds %s', async (_, spoil, code) => {
    const entries = Array.from({ length: 500 }, (_one, index) =>
      phone.reading(points[index % points.length]!, 52),
    );
    const batch: unknown[] = [...entries];
    batch[250] = spoil(entries[250]!);
    const before = await countEntries();
    // Sent as text: what is no number in JSON arrives as Infinity.
    const text = JSON.stringify(phone.batch(batch)).replace('"INFINITY"', '1e999');
    const { POST } = await import('@/app/api/sync/push/route');
    const answer = await world().call(POST, {
      as: phone.person,
      body: gzipSync(text),
      headers: { 'content-encoding': 'gzip' },
    });
    expect(answer.status).toBe(200);
    const refused = outcomesOf(answer).filter((one) => one.outcome === 'refused');
    expect(refused).toHaveLength(1);
    expect(refused[0]).toMatchObject({ code });
    expect(refused[0]?.outcome === 'refused' && refused[0].sentence).toBeTruthy();
    expect(await countEntries()).toBe(before + 499);
  });

  it('refuses with an entry all that depend on it, and nothing else', async () => {
    const bad = phone.entry('nonconformance', { title: '' });
    const onBad = phone.entry('recheck', {
      about: { kind: 'nonconformance', id: bad.id },
      outcome: 'met',
      text: '',
    });
    const good = phone.reading(points[0]!, 55);
    const onGood = phone.entry('amendment', {
      ...amendmentOf({ ...good.body, value: { text: '54', unit: 'mm', mm: 54 } }),
      rootId: good.id,
    });
    const outcomes = outcomesOf(await push(world(), phone, [bad, onBad, good, onGood]));
    expect(outcomes.map((one) => (one.outcome === 'refused' ? one.code : one.outcome))).toEqual([
      'invalid',
      'depends-on-refused',
      'kept',
      'kept',
    ]);
  });

  it('is not taken from another origin, unread, or too large', async () => {
    const { POST } = await import('@/app/api/sync/push/route');
    const as = phone.person;
    const body = phone.batch([phone.reading(points[0]!, 52)]);
    const foreign = await world().call(POST, {
      as,
      body,
      headers: { origin: 'https://elsewhere.example.test' },
    });
    expect(foreign).toMatchObject({ status: 403, body: { code: 'not-allowed' } });
    const unread = await world().call(POST, { as, body: Buffer.from('{"entries": [') });
    expect(unread).toMatchObject({ status: 400, body: { code: 'invalid' } });
    const bomb = gzipSync(Buffer.alloc(40_000_000, 32));
    const large = await world().call(POST, { as, body: bomb, headers: { 'content-encoding': 'gzip' } });
    expect(large).toMatchObject({ status: 413, body: { code: 'too-large' } });
  });
});

describe('pull', () => {
  it('gives page after page in order, from any cursor, with the plan when it is another', async () => {
    const { engineer } = world().team;
    const all = await streamOf(engineer);
    expect(all.map((entry) => entry.seq)).toEqual([...all.map((entry) => entry.seq)].sort((a, b) => a - b));
    expect(all).toHaveLength(await countEntries());
    const middle = all[Math.floor(all.length / 2)]!;
    const rest = (
      await pull(world(), engineer, pourId, { after: middle.seq, headHash: middle.hash, planRevision: 1 })
    ).pours[0]!;
    expect(rest.entries[0]?.seq).toBeGreaterThan(middle.seq);
    expect(rest.plan).toBeNull();
  });

  it('says so when the head of a device is not in the record', async () => {
    const { engineer } = world().team;
    const unknown = (await pull(world(), engineer, pourId, { after: 3, headHash: 'f'.repeat(64) })).pours[0]!;
    expect(unknown).toMatchObject({ headKnown: false, entries: [] });
    const beyond = (await pull(world(), engineer, pourId, { after: 9_999_999, headHash: 'f'.repeat(64) }))
      .pours[0]!;
    expect(beyond.headKnown).toBe(false);
  });

  it('gives crew no stream, and of pours that are not theirs not even that they exist', async () => {
    const { crew } = world().team;
    const before = (await pull(world(), crew, pourId)).pours[0]!;
    expect(before).toMatchObject({ found: false, entries: [], plan: null });
    await world()
      .owner('assignments')
      .insert({ project_id: world().projectId, pour_id: pourId, person_id: crew.id });
    const assigned = (await pull(world(), crew, pourId)).pours[0]!;
    expect(assigned).toMatchObject({ found: true, entries: [], plan: null });
  });
});

describe('two devices', () => {
  it('that read one point without seeing each other: both kept, and a conflict hold until somebody reads in sight of both', async () => {
    const w = world();
    const pour = await planPour(w, 'P-02');
    const [point] = await pointsOf(w, pour);
    const first = w.device(w.team.inspector, pour);
    const secondPerson = await w.addPerson(w.projectId, 'inspector', 'second.inspector');
    const second = w.device(secondPerson, pour);
    await pushKept(w, first, [first.reading(point!, 52)]);
    await pushKept(w, second, [second.reading(point!, 31)]);
    const { loadSheet } = await import('@/lib/server/load-sheet');
    const { holds } = await import('@/lib/inspection/holds');
    const kinds = async () => {
      const { database } = await import('@/db/connection');
      const { enterProject } = await import('@/db/stores/session-store');
      return database().transaction(async (tx) => {
        await enterProject(tx, w.projectId);
        const sheet = await loadSheet(tx, pour);
        return {
          head: sheet.headSeq,
          kinds: holds(sheet, new Date().toISOString()).map((hold) => hold.kind),
        };
      });
    };
    const apart = await kinds();
    expect(apart.kinds).toContain('conflict');
    expect(apart.kinds).toContain('cover-not-met');
    await pushKept(w, first, [first.reading(point!, 31, { seenSeq: apart.head })]);
    expect((await kinds()).kinds).not.toContain('conflict');
  });
});

async function streamOf(as: Parameters<typeof pull>[1]) {
  const all: { seq: number; hash: string }[] = [];
  let cursor: { after: number; headHash: string | null } = { after: 0, headHash: null };
  for (;;) {
    const page = (await pull(world(), as, pourId, cursor)).pours[0]!;
    all.push(...page.entries);
    if (!page.more) return all;
    cursor = { after: page.head, headHash: page.headHash };
  }
}

const amendmentOf = (replacement: Record<string, unknown>) => ({
  rootId: uuid(),
  sawAmendmentId: null,
  reason: 'Recording error',
  replacement,
  photoId: null,
});

function nested(depth: number): unknown {
  let value: unknown = 1;
  for (let level = 0; level < depth; level += 1) value = [value];
  return value;
}
