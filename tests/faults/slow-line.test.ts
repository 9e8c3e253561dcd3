import { describe, expect, it } from 'vitest';
import type { Entry } from '@/lib/inspection/entry';
import { violations, type History } from './world/check-history';
import { onPhone } from './world/hand';
import { FaultyLine } from './world/faulty-line';
import { contentOf } from './world/model-server';
import { jpeg, settle, type Clock, type Line } from './world/phone';
import { at, note, pourId, reading, site } from './world/site';
import { chance, seeded, seeds } from './world/seeded';

/** 50 kbit/s. */
const BYTES_PER_MS = 6.25;
const DELAY_MS = 2_000;

interface Passed {
  what: 'entries' | 'bytes of a photo' | 'other';
  began: number;
  ended: number | null;
  /** Entries that waited on the phone when it began. */
  waited: number;
}

/** A line of 50 kbit/s with two seconds of delay, on which every sixth request is reset half-way. */
function slowLine(straight: Line, clock: Clock, random: () => number, waited: () => number) {
  const passed: Passed[] = [];
  const time = (milliseconds: number) => new Promise<void>((over) => void clock.after(milliseconds, over));
  const line: Line = async (address, init) => {
    const what = address.endsWith('/push')
      ? 'entries'
      : address.startsWith('/store/')
        ? 'bytes of a photo'
        : 'other';
    const one: Passed = { what, began: clock.now(), ended: null, waited: waited() };
    passed.push(one);
    // A photo's bytes here stand for many more: 120 kB each.
    const bytes = what === 'bytes of a photo' ? 120_000 : 800;
    const reset = random() < 1 / 6;
    await time(DELAY_MS + (bytes / BYTES_PER_MS) * (reset ? random() : 1));
    if (reset || init.signal?.aborted) throw new TypeError('Failed to fetch');
    const answer = await straight(address, init);
    await time(500);
    one.ended = clock.now();
    return answer;
  };
  return { line, passed };
}

/** What is wrong with the order in which things went: a photo that began before entries that waited then. */
const photosBeforeEntries = (passed: readonly Passed[]): number =>
  passed.filter((one) => one.what === 'bytes of a photo' && one.waited > 0).length;

/** Lets virtual time pass from one thing that is due to the next. */
async function passTime(clock: Clock, until: () => boolean): Promise<void> {
  const give = Date.now() + 20_000;
  while (!until()) {
    if (Date.now() > give) throw new Error('It does not come to an end.');
    await settle(15);
    await new Promise((done) => setTimeout(done, 1));
    clock.advance(Math.max(1, clock.next() ?? 1_000));
  }
}

describe('50 kbit/s with two seconds of delay, and resets', () => {
  it.each(seeds(4))('seed %d: readings arrive before photos, and everything arrives once', async (seed) => {
    const random = seeded(seed * 24_593);
    const { phone, server, clock, straight } = site();
    const tab = await phone.tab();
    const history: History = { recorded: new Map() };
    const noted = (entry: Entry) =>
      history.recorded.set(entry.id, { content: contentOf(entry), phone: phone.name, poison: false });
    const { line, passed } = slowLine(straight, clock, random, () => tab.snapshot().sync.waitingEntries);
    phone.line = line;
    for (let count = 0; count < 3; count += 1) {
      const photo = { about: { kind: 'pour' as const, id: pourId }, shot: 'wide' as const, caption: '' };
      noted(await tab.addPhoto(at, jpeg(count), photo));
    }
    for (let count = 0; count < 12; count += 1)
      noted(await tab.record(at, 'reading', reading(chance(random, ['A1', 'A2', 'B1']), 40 + count)));
    const sent = (entry: Entry) => server.entries.some((one) => one.id === entry.id);
    await passTime(clock, () => passed.some((one) => one.what === 'bytes of a photo'));
    // A reading made while a photo crawls over the line does not wait for it.
    const late = await tab.record(at, 'note', note('made while a photo was on its way'));
    noted(late);
    await passTime(clock, () => sent(late));
    const { sync } = tab.snapshot();
    await passTime(clock, () => tab.snapshot().photos.every((one) => one.progress === 'stored'));

    expect(photosBeforeEntries(passed), `FAULT_SEED=${seed}`).toBe(0);
    expect(sync.waitingPhotos, 'photos still under way when the late reading had arrived').toBeGreaterThan(0);
    const order = server.entries.map((one) => one.type);
    expect(order.lastIndexOf('reading')).toBeLessThan(order.indexOf('photo-stored'));
    const found = violations({
      history,
      server: server.entries,
      phones: [await onPhone({ phone, tabs: [tab], line: new FaultyLine(straight, random, clock) })],
      secondDevice: server.entries.map((one) => one.id),
    });
    expect(found, `FAULT_SEED=${seed}`).toEqual([]);
    await phone.kill();
  });

  it('a client that sends in the order in which things were made sends photos first (negative control)', async () => {
    const { clock, straight } = site();
    const things = ['/store/1', '/store/2', '/api/sync/push'];
    let left = things.length;
    const { line, passed } = slowLine(
      straight,
      clock,
      () => 0.9,
      () => left - 1,
    );
    const sending = (async () => {
      for (const address of things) {
        await line(address, { method: 'PUT', body: 'x' }).catch(() => undefined);
        left -= 1;
      }
    })();
    await passTime(clock, () => left === 0);
    await sending;
    expect(photosBeforeEntries(passed)).toBe(2);
  });
});
