import { expect, test } from '@playwright/test';
import { setTimeout as wait } from 'node:timers/promises';
import { v7 as uuid } from 'uuid';
import type { EntryEnvelope } from '@/lib/inspection/entry';
import { openBuildingSite, type BuildingSite, type SitePerson } from '../faults/browser/building-site';
import { OwnProduct } from '../faults/browser/own-product';
import { violations, type History } from '../faults/world/check-history';
import { fetchedAfresh, onPhone } from '../faults/world/hand';
import { FaultyLine } from '../faults/world/faulty-line';
import { httpLine } from '../faults/world/http-line';
import { contentOf } from '../faults/world/model-server';
import { NaivePhone } from '../faults/world/naive-phone';
import { Clock, Phone, type Line } from '../faults/world/phone';
import { deckReading } from '../faults/world/real-routes';
import { chance, seeded, seeds } from '../faults/world/seeded';

/** Requests that nobody answers any more are given up: a process that was killed does not always say so. */
const patient =
  (line: Line): Line =>
  (address, init) =>
    line(address, { ...init, signal: AbortSignal.timeout(15_000) });

for (const seed of seeds(1)) {
  test(`seed ${seed}: PostgreSQL is killed twice and the application once, under load, and all that was acknowledged is there`, async () => {
    test.setTimeout(240_000);
    const random = seeded(seed * 40_961);
    const product = await OwnProduct.start();
    let site: BuildingSite | undefined;
    try {
      site = await openBuildingSite(product.app, product.database);
      await underKills(product, site, random, seed);
    } finally {
      await site?.close();
      await product.remove();
    }
  });
}

async function underKills(product: OwnProduct, site: BuildingSite, random: () => number, seed: number) {
  const { first, second, engineer } = site.people;
  const at = { projectId: site.projectId, pourId: site.pourId };
  const clock = new Clock(new Date().toISOString());
  const history: History = { recorded: new Map() };
  let pushesUnderWay = 0;
  let acknowledged = 0;
  const watched =
    (line: Line): Line =>
    async (address, init) => {
      if (!address.endsWith('/push')) return line(address, init);
      pushesUnderWay += 1;
      try {
        const answer = await line(address, init);
        if (answer.status === 200) acknowledged += 1;
        return answer;
      } finally {
        pushesUnderWay -= 1;
      }
    };
  const open = async (person: SitePerson) => {
    const phone = new Phone(clock, patient(watched(httpLine(site.app, site.cookieOf(person)))), random);
    const tab = await phone.tab();
    await tab.keepPour(site.pourId);
    await tab.syncNow();
    return { phone, tab };
  };
  const hands = [await open(first), await open(second)];

  let over = false;
  const working = hands.map(async ({ phone, tab }) => {
    while (!over) {
      for (let count = 1 + Math.floor(random() * 6); count > 0; count -= 1) {
        const body = deckReading(chance(random, site.points), Math.round(30 + random() * 30), site.gaugeId);
        const entry = await tab.record(at, 'reading', body);
        history.recorded.set(entry.id, { content: contentOf(entry), phone: phone.name, poison: false });
      }
      await tab.syncNow();
      await wait(20);
    }
  });
  const naive = hasty(site, first);
  const hurrying = (async () => {
    for (let count = 0; !over; count += 1) {
      await naive.recordOne(count);
      await wait(100);
    }
  })();

  /** More is acknowledged than before, by the same processes, without anybody's help. */
  const goesOn = async (what: string) => {
    const before = acknowledged;
    await expect
      .poll(() => acknowledged > before + 3, { message: `goes on after ${what}`, timeout: 60_000 })
      .toBe(true);
  };
  const whileAPushIsUnderWay = async (kill: () => Promise<void>) => {
    await expect.poll(() => pushesUnderWay > 0, { intervals: [1], timeout: 30_000 }).toBe(true);
    await kill();
  };
  await goesOn('the start');
  await whileAPushIsUnderWay(() => product.killDatabase(600 + random() * 600));
  await goesOn('the first kill of PostgreSQL');
  await whileAPushIsUnderWay(() => product.killApplication());
  await product.startApplication();
  await goesOn('the kill of the application');
  await whileAPushIsUnderWay(() => product.killDatabase(600 + random() * 600));
  await goesOn('the second kill of PostgreSQL');
  over = true;
  await Promise.all([...working, hurrying]);

  for (const { tab } of hands) {
    await expect
      .poll(
        async () => {
          await tab.syncNow();
          return tab.snapshot().sync.waitingEntries;
        },
        { timeout: 30_000 },
      )
      .toBe(0);
  }
  const server = await site.record();
  const ofPhones = server.filter((entry) => !naive.recorded.has(entry.id));
  const secondDevice = await fetchedAfresh(httpLine(site.app, site.cookieOf(engineer)), clock, site.pourId);
  const phones = await Promise.all(
    hands.map(({ phone, tab }) =>
      onPhone({ phone, tabs: [tab], line: new FaultyLine(phone.line, random, clock) }),
    ),
  );
  const found = violations({
    history: { recorded: new Map([...history.recorded, ...naive.kept(server)]) },
    server,
    phones,
    secondDevice,
    writtenByServer: ['plan-issued'],
  });
  expect(found, `FAULT_SEED=${seed}`).toEqual([]);
  expect(ofPhones.length).toBeGreaterThan(20);

  // Negative control: beside them, a client that takes every answer for a yes has lost what it sent meanwhile.
  const lost = [...naive.recorded.keys()].filter((id) => !server.some((entry) => entry.id === id));
  expect(lost.length).toBeGreaterThan(0);
  for (const { phone } of hands) await phone.kill();
}

/** A client made in a hurry that sends notes of the first person's, one at a time. */
function hasty(site: BuildingSite, person: SitePerson) {
  const phone = new NaivePhone(patient(httpLine(site.app, site.cookieOf(person))));
  const deviceId = uuid();
  const recorded = new Map<string, History['recorded'] extends Map<string, infer One> ? One : never>();
  return {
    recorded,
    async recordOne(count: number): Promise<void> {
      const entry: EntryEnvelope = {
        ...{
          id: uuid(),
          projectId: site.projectId,
          pourId: site.pourId,
          type: 'note',
          v: 1,
          planRevision: 1,
        },
        ...{ authorId: person.id, deviceId, deviceSeq: count + 1, recordedAt: new Date().toISOString() },
        ...{ clockOffsetMs: 0, seenSeq: 0 },
        body: { about: { kind: 'pour', id: site.pourId }, text: `In a hurry ${count}` },
      };
      recorded.set(entry.id, { content: contentOf(entry), phone: 'hasty', poison: false });
      phone.record(entry);
      await phone.sync(site.projectId, deviceId);
    },
    /** Those of its notes that arrived. */
    kept: (server: readonly { id: string }[]) =>
      [...recorded].filter(([id]) => server.some((entry) => entry.id === id)),
  };
}
