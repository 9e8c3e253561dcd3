import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Entry } from '@/lib/inspection/entry';
import { planPour, pointsOf, registerGauge } from '@/tests/integration/record-routes';
import { openWorld, type TestPerson } from '@/tests/integration/world';
import { violations, type History } from './world/check-history';
import { allCalm, fetchedAfresh, hand, onPhone, type Hand } from './world/hand';
import { contentOf } from './world/model-server';
import { Clock, until, type Line } from './world/phone';
import { asAdmin, cutConnections, deckReading, lineOf, recordOf } from './world/real-routes';
import { chance, seeded, seeds } from './world/seeded';

const world = openWorld();
let colleague: TestPerson;
let third: TestPerson;

beforeAll(async () => {
  await registerGauge(world());
  colleague = await world().addPerson(world().projectId, 'inspector', 'own.colleague');
  third = await world().addPerson(world().projectId, 'inspector', 'own.third');
});

const backupName = () => `${world().database.name}_copy`;

afterAll(() => asAdmin(world(), 'postgres', `drop database if exists ${backupName()} with (force)`));

/** Puts a database in the place of another, as a restore does: whoever was connected is cut off. */
async function copyDatabase(from: string, to: string): Promise<void> {
  await cutConnections(world());
  await asAdmin(
    world(),
    'postgres',
    `select pg_terminate_backend(pid) from pg_stat_activity where datname in ('${from}', '${to}')`,
    `drop database if exists ${to} with (force)`,
    `create database ${to} template ${from} strategy file_copy owner cagewright_owner`,
  );
}

/**
 * Two phones work, a copy of the database is made, they go on, and the copy is put in place of what was there. A third
 * phone may be quicker than they are, so that the server's record goes on from the copy before they come back.
 */
async function run(seed: number, name: string, through: (line: Line) => Line = (line) => line) {
  const { team, projectId, gaugeId, database } = world();
  const random = seeded(seed * 65_537);
  const pourId = await planPour(world(), name);
  const points = await pointsOf(world(), pourId);
  const at = { projectId, pourId };
  const clock = new Clock(new Date().toISOString());
  const history: History = { recorded: new Map() };
  const hands: Hand[] = [];
  for (const person of [team.inspector, colleague, third])
    hands.push(await hand(through(lineOf(person)), random, clock, pourId));
  const record = async (who: Hand) => {
    const mm = Math.round(30 + random() * 30);
    const body = deckReading(chance(random, points), mm, gaugeId);
    const entry: Entry | undefined = await who.tabs[0]?.record(at, 'reading', body);
    if (entry)
      history.recorded.set(entry.id, { content: contentOf(entry), phone: who.phone.name, poison: false });
  };
  const work = async (who: readonly Hand[], steps: number) => {
    for (let step = 0; step < steps; step += 1) {
      const one = chance(random, who);
      if (random() < 0.6) await record(one);
      else await one.tabs[0]?.syncNow();
    }
  };
  const [first, second, quick] = hands;
  if (!first || !second || !quick) throw new Error('nobody there');

  await work([first, second], 12);
  await copyDatabase(database.name, backupName());
  const before = (await recordOf(world(), pourId)).length;
  await work([first, second], 14);
  for (const one of [first, second]) {
    one.line.calm = true;
    await one.tabs[0]?.syncNow();
    one.line.calm = false;
  }
  const lost = (await recordOf(world(), pourId)).length - before;
  if (random() < 0.5) await record(first);
  await copyDatabase(backupName(), database.name);
  if (random() < 0.5) {
    quick.line.calm = true;
    await record(quick);
    await quick.tabs[0]?.syncNow();
  }
  await work(hands, 10);
  await allCalm(hands, clock);
  // Everybody's own comes first; what others had is there for all only after that.
  await allCalm(hands, clock);

  const found = violations({
    history,
    server: await recordOf(world(), pourId),
    phones: await Promise.all(hands.map(onPhone)),
    secondDevice: await fetchedAfresh(lineOf(team.engineer), clock, pourId),
    writtenByServer: ['plan-issued'],
  });
  // And each of them sees the same sheet again.
  const held = (await recordOf(world(), pourId)).map((entry) => entry.id).sort();
  for (const one of hands) {
    const shown = () => one.tabs[0]?.pour(pourId)?.sheet?.entries;
    await until(() => Boolean(shown()), 'the pour is open');
    const own = shown()?.filter((entry) => entry.pourId === pourId);
    if (
      own
        ?.map((entry) => entry.id)
        .sort()
        .join() !== held.join()
    )
      found.push('a phone shows another set');
    await one.phone.kill();
  }
  const log = hands.map((one) => one.line.log.join('\n')).join('\n--\n');
  return { found, lost, log };
}

describe('a server that is restored from an older copy', () => {
  it.each(seeds(4))(
    'seed %d: the phones notice, and offer again what they had sent',
    { timeout: 120_000 },
    async (seed) => {
      const { found, lost, log } = await run(seed, `R-${seed}`);
      expect(found, `FAULT_SEED=${seed}\n${log}`).toEqual([]);
      expect(lost, 'entries that the copy had not').toBeGreaterThan(0);
      const { verifyRecord } = await import('@/lib/server/record-verify');
      expect((await verifyRecord()).problems).toEqual([]);
    },
  );

  it(
    'is not noticed where the server says that it knows every head (negative control)',
    { timeout: 120_000 },
    async () => {
      const pretending =
        (line: Line): Line =>
        async (address, init) => {
          const answer = await line(address, init);
          if (!address.endsWith('/pull') || answer.status !== 200) return answer;
          const body = (await answer.json()) as { project: object; pours: object[] };
          const known = (page: object) => ({ ...page, headKnown: true });
          return Response.json({ ...body, project: known(body.project), pours: body.pours.map(known) });
        };
      const { found } = await run(1, 'R-pretending', pretending);
      expect(found.some((one) => one.startsWith('lost'))).toBe(true);
    },
  );
});
