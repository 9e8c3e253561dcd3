import { describe, expect, it } from 'vitest';
import type { Entry } from '@/lib/inspection/entry';
import { uuid } from '@/tests/stories/pour-story';
import { violations, type History } from './world/check-history';
import { allCalm, hand, onPhone, type Hand } from './world/hand';
import { FaultyLine } from './world/faulty-line';
import { contentOf, type ModelFlaws, type ModelPerson } from './world/model-server';
import { NaivePhone } from './world/naive-phone';
import { Phone, jpeg } from './world/phone';
import {
  at,
  inspector,
  note,
  pourId,
  projectId,
  reading,
  site,
  superintendent,
  type Site,
} from './world/site';
import { pick, seeded, seeds } from './world/seeded';

const second: ModelPerson = { ...superintendent, role: 'inspector' };

interface Run {
  site: Site;
  history: History;
  hands: Hand[];
  found: string[];
}

/** Two people with a phone each, on a line that does its worst, and then on a good one. */
async function run(seed: number, flaws: ModelFlaws = {}): Promise<Run> {
  const random = seeded(seed);
  const place = site(flaws);
  const { server, clock } = place;
  const history: History = { recorded: new Map() };
  const hands: Hand[] = [];
  for (const person of [inspector, second]) {
    hands.push(await hand((address, init) => server.handle(address, init, person), random, clock));
  }
  const noted = (by: Hand, entry: Entry, poison = false) =>
    history.recorded.set(entry.id, { content: contentOf(entry), phone: by.phone.name, poison });

  for (let step = 0; step < 60; step += 1) {
    const who = hands[Math.floor(random() * hands.length)] ?? hands[0];
    const tab = who?.tabs[Math.floor(random() * who.tabs.length)];
    if (!who || !tab) throw new Error('nobody there');
    const what = pick(random, [
      [20, 'read'],
      [2, 'poison'],
      [3, 'photo'],
      [14, 'sync'],
      [3, 'sync everywhere'],
      [3, 'kill'],
      [2, 'another tab'],
      [6, 'late'],
      [3, 'time'],
    ] as const);
    const label = ['A1', 'A2', 'A3', 'B1', 'B2'][Math.floor(random() * 5)] ?? 'A1';
    switch (what) {
      case 'read':
        noted(who, await tab.record(at, 'reading', reading(label, Math.round(30 + random() * 30))));
        break;
      case 'poison':
        noted(who, await tab.record(at, 'note', note(`poison ${step}`)), true);
        break;
      case 'photo':
        noted(
          who,
          await tab.addPhoto(at, jpeg(step), {
            about: { kind: 'pour', id: pourId },
            shot: 'wide',
            caption: '',
          }),
        );
        break;
      case 'sync':
        await tab.syncNow();
        break;
      case 'sync everywhere':
        await Promise.all(hands.flatMap((one) => one.tabs.map((other) => other.syncNow())));
        break;
      case 'kill': {
        // In the middle of a round, when one is under way.
        const syncing = tab.syncNow();
        if (random() < 0.5) await syncing;
        await who.phone.kill();
        await syncing;
        who.tabs = [await who.phone.tab()];
        break;
      }
      case 'another tab':
        if (who.tabs.length < 3) who.tabs.push(await who.phone.tab());
        break;
      case 'late':
        await who.line.deliverLate();
        break;
      case 'time':
        clock.advance(Math.floor(random() * 120_000));
        break;
    }
  }

  await allCalm(hands, clock);
  const found = violations({
    history,
    server: server.entries,
    phones: await Promise.all(hands.map(onPhone)),
    secondDevice: await fetchedAfresh(place, inspector),
  });
  for (const one of hands) await one.phone.kill();
  return { site: place, history, hands, found };
}

async function fetchedAfresh({ server, clock }: Site, person: ModelPerson): Promise<string[]> {
  const phone = new Phone(clock, (address, init) => server.handle(address, init, person));
  const tab = await phone.tab();
  await tab.syncNow();
  let entries: Entry[] | undefined;
  while (!entries) {
    entries = tab.pour(pourId)?.sheet?.entries;
    await new Promise((done) => setImmediate(done));
  }
  await phone.kill();
  return entries.map((entry) => entry.id);
}

describe('two phones on a line that does its worst', () => {
  it.each(seeds(12))(
    'seed %d: nothing is lost, doubled, changed or invented',
    { timeout: 60_000 },
    async (seed) => {
      const { found, history, site: place, hands } = await run(seed);
      const log = hands.map((one) => one.line.log.join('\n')).join('\n--\n');
      expect(found, `FAULT_SEED=${seed}\n${log}`).toEqual([]);
      expect(history.recorded.size).toBeGreaterThan(5);
      // Every stored photo has the digest that was recorded.
      const stored = place.server.entries.filter((one) => one.type === 'photo-stored');
      const photos = place.server.entries.filter((one) => one.type === 'photo');
      expect(new Set(stored.map((one) => one.body.sha256))).toEqual(
        new Set(photos.map((one) => one.body.sha256)),
      );
    },
  );
});

describe('negative controls: the checker has teeth', () => {
  it(
    'a server that inserts whatever comes doubles entries, and is found out',
    { timeout: 120_000 },
    async () => {
      const kinds = new Set<string>();
      for (const seed of [1, 2, 3, 4, 5, 6]) {
        const { found } = await run(seed, { naiveInsert: true });
        for (const one of found) kinds.add(one.split(':')[0] ?? one);
      }
      expect(kinds).toContain('doubled');
    },
  );

  it('a client that forgets on any answer loses entries, and is found out', async () => {
    const kinds = new Set<string>();
    for (const seed of [1, 2, 3, 4, 5, 6]) {
      const random = seeded(seed);
      const { server, clock } = site();
      const line = new FaultyLine((address, init) => server.handle(address, init, inspector), random, clock);
      const naive = new NaivePhone(line.line);
      const history: History = { recorded: new Map() };
      for (let step = 1; step <= 40; step += 1) {
        const entry = {
          id: uuid(77, seed * 1000 + step),
          ...at,
          type: 'note',
          v: 1,
          body: note(`n${step}`),
          planRevision: 1,
          authorId: inspector.id,
          deviceId: uuid(78, 1),
          deviceSeq: step,
          recordedAt: '2026-12-01T07:00:00.000Z',
          clockOffsetMs: null,
          seenSeq: 0,
        };
        naive.record(entry);
        history.recorded.set(entry.id, { content: contentOf(entry), phone: 'naive', poison: false });
        if (random() < 0.4) await naive.sync(projectId, entry.deviceId);
      }
      line.calm = true;
      await naive.sync(projectId, uuid(78, 1));
      const found = violations({
        history,
        server: server.entries,
        phones: [{ name: 'naive', waiting: naive.waiting.map((one) => one.id), refused: [] }],
        secondDevice: server.entries.map((one) => one.id),
      });
      for (const one of found) kinds.add(one.split(':')[0] ?? one);
    }
    expect(kinds).toContain('lost');
  });

  it('tells a changed entry, an invented one, a broken chain and another set from a sound record', async () => {
    const { site: place, history } = await run(3);
    const { entries } = place.server;
    const [first] = history.recorded.keys();
    const all = entries.map((one) => one.id);
    const sound = {
      history,
      phones: [{ name: 'x', waiting: [], refused: refusedOf(history) }],
      secondDevice: all,
    };
    expect(violations({ ...sound, server: entries })).toEqual([]);
    const changed = entries.map((one) =>
      one.id === first ? { ...one, recordedAt: '2026-12-02T07:00:00.000Z' } : one,
    );
    expect(violations({ ...sound, server: changed })).toEqual([`changed: ${first}`]);
    const cut = entries.filter((one) => one.id !== first);
    expect(violations({ ...sound, server: cut }).map((one) => one.split(':')[0])).toContain('lost');
    expect(violations({ ...sound, server: cut }).some((one) => one.startsWith('chain broken'))).toBe(true);
    const missing = all.slice(1);
    expect(violations({ ...sound, server: entries, secondDevice: missing })).toHaveLength(1);
    history.recorded.delete(first ?? '');
    expect(violations({ ...sound, server: entries })).toEqual([`invented: ${first}`]);
  });
});

const refusedOf = (history: History) =>
  [...history.recorded]
    .filter(([, one]) => one.poison)
    .map(([id]) => ({ id, sentence: 'This cannot be used.' }));
