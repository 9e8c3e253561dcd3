import { describe, expect, it } from 'vitest';
import type { Entry } from '@/lib/inspection/entry';
import { violations, type History } from './world/check-history';
import { fetchedAfresh, hand, allCalm, onPhone, type Hand } from './world/hand';
import { contentOf, type ModelPerson } from './world/model-server';
import { jpeg, settle, until } from './world/phone';
import { at, inspector, note, otherPourId, pourId, reading, site, superintendent } from './world/site';
import { chance, pick, seeded, seeds } from './world/seeded';

const HOUR = 3_600_000;
const YEAR = 365 * 24 * HOUR;
const second: ModelPerson = { ...superintendent, role: 'inspector' };

/** What happens to a device's clock: a wrong year, a year back in mid-work, summer time that begins and ends. */
const clocks = [
  [3, YEAR],
  [3, -YEAR],
  [3, HOUR],
  [3, -HOUR],
  [2, 7 * 60_000],
  [4, 0],
] as const;

/** Two phones whose clocks do what they want, or (the same acts) show the right time. Nothing is sent by itself. */
async function run(seed: number, wrong: boolean) {
  const random = seeded(seed * 31_337);
  const { server, clock, straight } = site();
  const history: History = { recorded: new Map() };
  const hands: Hand[] = [];
  for (const person of [inspector, second]) {
    const one = await hand(
      (address, init) => server.handle(address, init, person),
      () => 0.5,
      clock,
    );
    one.line.calm = true;
    hands.push(one);
  }
  const known = hands.map(() => 0);
  const marked: string[] = [];
  for (let step = 0; step < 60; step += 1) {
    const index = random() < 0.5 ? 0 : 1;
    const who = hands[index];
    const tab = who?.tabs[0];
    if (!who || !tab) throw new Error('nobody there');
    const what = pick(random, [
      [20, 'read'],
      [8, 'sync'],
      [8, 'clock'],
      [3, 'kill'],
    ] as const);
    const skew = pick(random, clocks);
    const label = chance(random, ['A1', 'A2', 'A3', 'B1', 'B2']);
    const mm = Math.round(30 + random() * 30);
    switch (what) {
      case 'read': {
        const entry: Entry = await tab.record(at, 'reading', reading(label, mm));
        history.recorded.set(entry.id, { content: contentOf(entry), phone: who.phone.name, poison: false });
        if (entry.clockOffsetMs !== known[index])
          marked.push(`${entry.id}: ${entry.clockOffsetMs} in place of ${known[index]}`);
        break;
      }
      case 'sync':
        await tab.syncNow();
        known[index] = 0 - who.phone.clockSkewMs;
        break;
      case 'clock':
        if (wrong) who.phone.clockSkewMs = skew;
        break;
      case 'kill':
        await who.phone.kill();
        who.tabs = [await who.phone.tab()];
        known[index] = 0 - who.phone.clockSkewMs;
        break;
    }
  }
  await allCalm(hands, clock);
  // The first has sent before the second did: once more, so that what is looked at is all of it.
  await hands[0]?.tabs[0]?.syncNow();
  const found = violations({
    history,
    server: server.entries.filter((one) => one.pourId === pourId),
    phones: await Promise.all(hands.map(onPhone)),
    secondDevice: await fetchedAfresh(straight, clock, pourId),
  });
  const [tab] = hands[0]?.tabs ?? [];
  await until(() => Boolean(tab?.pour(pourId)?.sheet), 'the pour is open');
  const open = tab?.pour(pourId);
  const sheet = {
    marks: open?.sheet?.faces[0]?.points.map((point) => [
      point.label,
      point.mark,
      point.conflict,
      point.governing.map((one) => one.current?.value?.mm),
    ]),
    holds: open?.holds.map((hold) => hold.kind),
  };
  for (const one of hands) await one.phone.kill();
  return { found, sheet, marked, server };
}

/** Entries of a device that the record holds in another order than they were made in. */
function outOfOrder(entries: readonly { deviceId: string; deviceSeq: number }[]): number {
  const last = new Map<string, number>();
  return entries.filter(({ deviceId, deviceSeq }) => {
    const before = last.get(deviceId) ?? 0;
    last.set(deviceId, Math.max(before, deviceSeq));
    return deviceSeq < before;
  }).length;
}

describe('clocks that are a year off, set back in mid-work, or go to summer time', () => {
  it.each(seeds(8))('seed %d: order, cursor and sheet are as with the right time', async (seed) => {
    const { found, sheet, server, marked } = await run(seed, true);
    expect(found, `FAULT_SEED=${seed}`).toEqual([]);
    expect(outOfOrder(server.entries), `FAULT_SEED=${seed}`).toBe(0);
    expect(sheet, `FAULT_SEED=${seed}`).toEqual((await run(seed, false)).sheet);
    // Each entry carries by how much its clock was known to be off.
    expect(marked, `FAULT_SEED=${seed}`).toEqual([]);
  });

  it('whoever orders by the clocks of devices gets another order (negative control)', async () => {
    let wrong = 0;
    for (const seed of [1, 2, 3, 4]) {
      const { server } = await run(seed, true);
      wrong += outOfOrder(server.entries.toSorted((a, b) => (a.recordedAt < b.recordedAt ? -1 : 1)));
    }
    expect(wrong).toBeGreaterThan(0);
  });
});

describe('a clock that is set back by a year', () => {
  it('does not keep the phone from hearing of new pours', async () => {
    const { phone, server, clock } = site();
    phone.clockSkewMs = YEAR;
    const tab = await phone.tab();
    phone.clockSkewMs = 0;
    const [pour] = server.pours;
    if (!pour) throw new Error('no pour');
    server.pours.push({ ...pour, id: otherPourId, number: 'P-15' });
    clock.advance(2 * 60_000);
    await tab.syncNow();
    expect(tab.snapshot().pours.map((one) => one.number)).toContain('P-15');
    await phone.kill();
  });

  it('does not take a pour off the phone, without a network either', async () => {
    const { phone, server, clock } = site();
    const [pour] = server.pours;
    if (!pour) throw new Error('no pour');
    pour.plannedAt = new Date(clock.now() + 48 * HOUR).toISOString();
    const tab = await phone.tab();
    await tab.syncNow();
    phone.clockSkewMs = -YEAR;
    phone.line = () => Promise.reject(new TypeError('Failed to fetch'));
    await phone.kill();
    const later = await phone.tab();
    expect(later.snapshot().pours.map((one) => one.kept)).toEqual([true]);
    await until(() => Boolean(later.pour(pourId)?.sheet), 'the pour is open');
    await phone.kill();
  });

  it('does not keep it waiting where the server asked to wait before', async () => {
    const { phone, server, clock, straight } = site();
    const tab = await phone.tab();
    phone.clockSkewMs = YEAR;
    phone.line = async () =>
      new Response('{}', {
        status: 503,
        headers: { 'retry-after': '60', 'content-type': 'application/json' },
      });
    await tab.record(at, 'note', note('later'));
    await tab.syncNow();
    phone.clockSkewMs = 0;
    phone.line = straight;
    clock.advance(20_000);
    phone.wakes.forEach((wake) => wake());
    await settle();
    expect(server.entries.some((one) => one.type === 'note')).toBe(false);
    clock.advance(41_000);
    phone.wakes.forEach((wake) => wake());
    await until(() => server.entries.some((one) => one.type === 'note'), 'the note is sent');
    await phone.kill();
  });

  it('does not keep a photo that nobody answered for from being sent again', async () => {
    const { phone, server, clock, straight } = site();
    const tab = await phone.tab();
    phone.clockSkewMs = YEAR;
    // The server is told, and loses it.
    phone.line = async (address, init) =>
      address.endsWith('/uploaded') ? Response.json({}) : straight(address, init);
    await tab.addPhoto(at, jpeg(), { about: { kind: 'pour', id: pourId }, shot: 'wide', caption: '' });
    await tab.syncNow();
    expect(tab.snapshot().photos[0]?.progress).toBe('sent');
    phone.clockSkewMs = 0;
    phone.line = straight;
    clock.advance(11 * 60_000);
    await tab.syncNow();
    await tab.syncNow();
    expect(server.entries.filter((one) => one.type === 'photo-stored')).toHaveLength(1);
    await phone.kill();
  });
});
