import { v7 as uuid } from 'uuid';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Entry } from '@/lib/inspection/entry';
import { planPour, pointsOf, registerGauge } from '@/tests/integration/record-routes';
import { openWorld, type TestPerson } from '@/tests/integration/world';
import { violations, type History } from './world/check-history';
import { allCalm, fetchedAfresh, hand, onPhone, type Hand } from './world/hand';
import { bodyOf, contentOf } from './world/model-server';
import { Clock, type Line } from './world/phone';
import { cutConnections, deckReading, lineOf, recordOf } from './world/real-routes';
import { chance, pick, seeded, seeds } from './world/seeded';

const world = openWorld();
let colleague: TestPerson;

beforeAll(async () => {
  await registerGauge(world());
  colleague = await world().addPerson(world().projectId, 'inspector', 'own.colleague');
});

/** Two phones on one pour, the real routes and PostgreSQL behind a line that does its worst. */
async function run(
  seed: number,
  name: string,
  server: (person: TestPerson) => Line = lineOf,
): Promise<{ found: string[]; recorded: number; log: string }> {
  const { team, projectId, gaugeId } = world();
  const random = seeded(seed * 7919);
  const pourId = await planPour(world(), name);
  const points = await pointsOf(world(), pourId);
  const at = { projectId, pourId };
  const clock = new Clock(new Date().toISOString());
  const hands: Hand[] = [];
  for (const person of [team.inspector, colleague])
    hands.push(await hand(server(person), random, clock, pourId));
  const history: History = { recorded: new Map() };
  const noted = (by: Hand, entry: Entry, poison = false) =>
    history.recorded.set(entry.id, { content: contentOf(entry), phone: by.phone.name, poison });

  for (let step = 0; step < 40; step += 1) {
    const who = chance(random, hands);
    const tab = chance(random, who.tabs);
    const what = pick(random, [
      [20, 'read'],
      [2, 'poison'],
      [12, 'sync'],
      [4, 'sync everywhere'],
      [3, 'sync while the database goes down'],
      [3, 'kill'],
      [6, 'late'],
    ] as const);
    switch (what) {
      case 'read': {
        const mm = Math.round(30 + random() * 30);
        noted(who, await tab.record(at, 'reading', deckReading(chance(random, points), mm, gaugeId)));
        break;
      }
      case 'poison':
        noted(who, await tab.record(at, 'answer', { checkId: 'no-such-check', answer: 'met' }), true);
        break;
      case 'sync':
        await tab.syncNow();
        break;
      case 'sync everywhere':
        await Promise.all(hands.flatMap((one) => one.tabs.map((other) => other.syncNow())));
        break;
      case 'sync while the database goes down':
        await Promise.all([tab.syncNow(), cutConnections(world())]);
        break;
      case 'kill': {
        const syncing = tab.syncNow();
        await who.phone.kill();
        await syncing;
        who.tabs = [await who.phone.tab()];
        break;
      }
      case 'late':
        await who.line.deliverLate();
        break;
    }
  }
  await allCalm(hands, clock);

  const found = violations({
    history,
    server: await recordOf(world(), pourId),
    phones: await Promise.all(hands.map(onPhone)),
    secondDevice: await fetchedAfresh(lineOf(team.engineer), clock, pourId),
    writtenByServer: ['plan-issued'],
  });
  for (const one of hands) await one.phone.kill();
  const log = hands.map((one) => one.line.log.join('\n')).join('\n--\n');
  return { found, recorded: history.recorded.size, log };
}

describe('two phones, the real routes and PostgreSQL, on a line that does its worst', () => {
  it.each(seeds(4))(
    'seed %d: nothing is lost, doubled, changed or invented, and the chains verify',
    { timeout: 120_000 },
    async (seed) => {
      const { found, recorded, log } = await run(seed, `P-${seed}`);
      expect(found, `FAULT_SEED=${seed}\n${log}`).toEqual([]);
      expect(recorded).toBeGreaterThan(5);
      const { verifyRecord } = await import('@/lib/server/record-verify');
      expect((await verifyRecord()).problems).toEqual([]);
    },
  );
});

describe('negative control', () => {
  it('a server that gives every row an id of its own doubles and loses entries, and is found out', async () => {
    const numbering =
      (person: TestPerson): Line =>
      async (address, init) => {
        if (!address.endsWith('/push')) return lineOf(person)(address, init);
        const request = (await bodyOf(init)) as { entries: { id: string }[] };
        const own = new Map(request.entries.map((entry) => [uuid(), entry.id]));
        const entries = [...own].map(([id], index) => ({ ...request.entries[index], id }));
        const answer = await lineOf(person)(address, {
          method: 'POST',
          headers: { 'content-type': 'application/json' },
          body: JSON.stringify({ ...request, entries }),
        });
        const body = (await answer.json()) as { outcomes?: { id: string }[] };
        const outcomes = body.outcomes?.map((one) => ({ ...one, id: own.get(one.id) ?? one.id }));
        return Response.json(outcomes ? { ...body, outcomes } : body, { status: answer.status });
      };
    const { found } = await run(1, 'P-numbering', numbering);
    const kinds = new Set(found.map((one) => one.split(':')[0]));
    expect(kinds).toContain('invented');
    expect(found.some((one) => /^(lost|never sent)/.test(one))).toBe(true);
  });
});
