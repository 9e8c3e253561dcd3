import { describe, expect, it } from 'vitest';
import { jpeg, settle, until, Phone, type Line } from '@/tests/faults/world/phone';
import { at, opened, note, pourId, reading, site } from '@/tests/faults/world/site';
import { bodyOf } from '@/tests/faults/world/model-server';

const json = (status: number, body: unknown, headers: Record<string, string> = {}) =>
  new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json', ...headers } });
const page = (status: number) =>
  new Response('<!doctype html><title>Welcome</title>', { status, headers: { 'content-type': 'text/html' } });
const never: Line = (_address, init) =>
  new Promise((_answer, fail) => init.signal?.addEventListener('abort', () => fail(new Error('aborted'))));

/** Every way in which a push may go unanswered, and what the person is told. */
const troubles: { name: string; line: Line; phase: string; says: RegExp }[] = [
  {
    name: 'lost (SPEC 12)',
    line: () => Promise.reject(new TypeError('failed')),
    phase: 'offline',
    says: /no connection/,
  },
  {
    name: 'cut in the middle (SPEC 12, 13)',
    line: async () => new Response('{"serverTime":"20', { headers: { 'content-type': 'application/json' } }),
    phase: 'strange-network',
    says: /answers in place/,
  },
  {
    name: 'captive portal, 200 with HTML (SPEC 13)',
    line: async () => page(200),
    phase: 'strange-network',
    says: /sign-in page/,
  },
  {
    name: 'captive portal, 401 with HTML (SPEC 13)',
    line: async () => page(401),
    phase: 'strange-network',
    says: /sign-in page/,
  },
  {
    name: 'redirect (SPEC 13)',
    line: async () =>
      new Response(null, { status: 302, headers: { location: 'http://portal.example.test/' } }),
    phase: 'strange-network',
    says: /sign-in page/,
  },
  {
    name: 'network sign-in needed, 511 (SPEC 13)',
    line: async () => json(511, {}),
    phase: 'strange-network',
    says: /sign-in page/,
  },
  {
    name: 'session expired (SPEC 14)',
    line: async () => json(401, { code: 'sign-in-needed', sentence: 'x' }),
    phase: 'sign-in-needed',
    says: /Sign in to send/,
  },
  {
    name: '500 (SPEC 15)',
    line: async () => json(500, { code: 'internal', sentence: 'x' }),
    phase: 'server-trouble',
    says: /had a fault/,
  },
  {
    name: '502 with HTML (SPEC 15)',
    line: async () => page(502),
    phase: 'server-trouble',
    says: /had a fault/,
  },
  { name: '503 (SPEC 15)', line: async () => page(503), phase: 'server-trouble', says: /not ready/ },
  {
    name: '429 (SPEC 17)',
    line: async () => json(429, {}, { 'retry-after': '90' }),
    phase: 'server-trouble',
    says: /asks to wait/,
  },
  {
    name: 'JSON of another shape (SPEC 15)',
    line: async () => json(200, { hello: 'world' }),
    phase: 'server-trouble',
    says: /does not understand/,
  },
  {
    name: 'an answer that claims everything was kept, without ids (SPEC 7)',
    line: async () => json(200, { serverTime: '2026-12-01T07:00:00.000Z', outcomes: 'all' }),
    phase: 'server-trouble',
    says: /does not understand/,
  },
];

describe('what keeps an entry in the outbox', () => {
  it.each(troubles)('$name', async ({ line, phase, says }) => {
    const { phone, server, straight } = site();
    const tab = await phone.tab();
    phone.line = (address, init) =>
      address.endsWith('/push') ? line(address, init) : straight(address, init);
    const entry = await tab.record(at, 'note', note('keep me'));
    await tab.syncNow();
    const { sync } = tab.snapshot();
    expect(sync.waitingEntries).toBe(1);
    expect(sync.phase).toBe(phase);
    expect(sync.message).toMatch(says);
    expect(sync.message).toMatch(/1 entry is kept on this device/);

    phone.line = straight;
    await tab.syncNow();
    expect(tab.snapshot().sync).toMatchObject({ waitingEntries: 0, phase: 'idle', message: null });
    expect(server.entries.filter((one) => one.id === entry.id)).toHaveLength(1);
    await phone.kill();
  });

  it('an answer slower than the time-out (SPEC 12)', async () => {
    const { phone, server, straight, clock } = site();
    const tab = await phone.tab();
    let asked = false;
    phone.line = (address, init) => {
      asked = address.endsWith('/push');
      return asked ? never(address, init) : straight(address, init);
    };
    await tab.record(at, 'note', note('slow'));
    const synced = tab.syncNow();
    await until(() => asked, 'the push is on its way');
    clock.advance(61_000);
    await synced;
    expect(tab.snapshot().sync).toMatchObject({ waitingEntries: 1, phase: 'server-trouble' });
    expect(tab.snapshot().sync.message).toMatch(/did not answer in time/);
    phone.line = straight;
    await tab.syncNow();
    expect(server.entries.filter((one) => one.type === 'note')).toHaveLength(1);
    await phone.kill();
  });

  it('a reply lost after the server had kept it: sent again, known, not doubled (SPEC 7, 8)', async () => {
    const { phone, server, straight } = site();
    const tab = await phone.tab();
    phone.line = async (address, init) => {
      const answer = await straight(address, init);
      if (address.endsWith('/push')) throw new TypeError('reply lost');
      return answer;
    };
    const entry = await tab.record(at, 'note', note('twice on the line'));
    await tab.syncNow();
    expect(server.entries.some((one) => one.id === entry.id)).toBe(true);
    expect(tab.snapshot().sync.waitingEntries).toBe(1);
    phone.line = straight;
    await tab.syncNow();
    expect(tab.snapshot().sync.waitingEntries).toBe(0);
    expect(server.entries.filter((one) => one.id === entry.id)).toHaveLength(1);
    await phone.kill();
  });

  it('ids that an answer does not name, while those named go (SPEC 7)', async () => {
    const { phone, straight } = site();
    const tab = await phone.tab();
    phone.line = async (address, init) => {
      const answer = await straight(address, init);
      if (!address.endsWith('/push')) return answer;
      const body = (await answer.json()) as { outcomes: unknown[] };
      return json(200, { ...body, outcomes: body.outcomes.slice(0, 2) });
    };
    await tab.record(at, 'note', note('one'));
    await tab.record(at, 'note', note('two'));
    await tab.record(at, 'note', note('three'));
    await tab.syncNow();
    expect(tab.snapshot().sync.waitingEntries).toBe(1);
    await phone.kill();
  });
});

describe('batches', () => {
  it('hold at most 500 entries, in the order in which they were made (SPEC 6)', async () => {
    const { phone, server, straight } = site();
    const tab = await phone.tab();
    phone.line = () => Promise.reject(new TypeError('down'));
    const made: string[] = [];
    for (let index = 0; index < 620; index += 1) {
      made.push((await tab.record(at, 'note', note(`n${index}`))).id);
    }
    const sizes: number[] = [];
    phone.line = async (address, init) => {
      if (address.endsWith('/push'))
        sizes.push(((await bodyOf(init)) as { entries: unknown[] }).entries.length);
      return straight(address, init);
    };
    await tab.syncNow();
    expect(sizes).toEqual([500, 120]);
    expect(server.entries.filter((one) => one.type === 'note').map((one) => one.id)).toEqual(made);
    await phone.kill();
  });

  it('an answer is written while the next batch is on its way, and a batch that is lost takes nothing with it', async () => {
    const { phone, server, straight } = site();
    const tab = await phone.tab();
    phone.line = () => Promise.reject(new TypeError('down'));
    for (let index = 0; index < 620; index += 1) await tab.record(at, 'note', note(`n${index}`));
    let lose: (error: Error) => void = () => undefined;
    let pushes = 0;
    phone.line = (address, init) => {
      if (!address.endsWith('/push')) return straight(address, init);
      pushes += 1;
      if (pushes === 1) return straight(address, init);
      return new Promise((_answer, fail) => (lose = fail));
    };
    const synced = tab.syncNow();
    await until(() => pushes === 2, 'the second batch is on its way');
    await until(() => tab.snapshot().sync.waitingEntries === 120, 'the first answer is written');
    lose(new TypeError('lost'));
    await synced;
    expect(tab.snapshot().sync).toMatchObject({ waitingEntries: 120, phase: 'offline' });
    phone.line = straight;
    await tab.syncNow();
    const kept = server.entries.filter((one) => one.type === 'note');
    expect(new Set(kept.map((one) => one.id)).size).toBe(620);
    expect(kept).toHaveLength(620);
    expect(tab.snapshot().sync.waitingEntries).toBe(0);
    await phone.kill();
  });

  it('one poison entry leaves the others kept, and lies in the tray with its reason (SPEC 9)', async () => {
    const { phone, server } = site();
    const tab = await phone.tab();
    await opened(tab);
    for (let index = 0; index < 9; index += 1) await tab.record(at, 'note', note(`fine ${index}`));
    const bad = await tab.record(at, 'note', note('poison'));
    await tab.syncNow();
    expect(server.entries.filter((one) => one.type === 'note')).toHaveLength(9);
    const { sync, refused } = tab.snapshot();
    expect(sync).toMatchObject({ waitingEntries: 0, refusedEntries: 1 });
    expect(refused).toMatchObject([
      { entry: { id: bad.id }, code: 'invalid', sentence: 'This cannot be used.', field: 'text' },
    ]);
    expect(tab.pour(pourId)?.sheet?.entries.some((entry) => entry.id === bad.id)).toBe(false);

    await phone.kill();
    const reopened = await phone.tab();
    expect(reopened.snapshot().refused).toHaveLength(1);
    await reopened.forgetRefused(bad.id);
    await settle();
    expect(reopened.snapshot().refused).toEqual([]);
    await phone.kill();
  });

  it.each([400, 413])(
    'refused as a whole with %d: offered in halves until the one is found (SPEC 10)',
    async (status) => {
      const { phone, server, straight } = site();
      const tab = await phone.tab();
      phone.line = async (address, init) => {
        if (!address.endsWith('/push')) return straight(address, init);
        const text = JSON.stringify(await bodyOf(init));
        return text.includes('unreadable')
          ? json(status, { code: 'invalid', sentence: 'What was sent cannot be read.' })
          : straight(address, init);
      };
      for (let index = 0; index < 6; index += 1) await tab.record(at, 'note', note(`fine ${index}`));
      await tab.record(at, 'note', note('unreadable'));
      for (let index = 0; index < 6; index += 1) await tab.record(at, 'note', note(`fine too ${index}`));
      await tab.syncNow();
      expect(server.entries.filter((one) => one.type === 'note')).toHaveLength(12);
      expect(tab.snapshot().sync).toMatchObject({ waitingEntries: 1 });
      expect(tab.snapshot().sync.message).toMatch(/cannot be read.*1 entry is kept/);
      await phone.kill();
    },
  );

  it('are packed, and a reading takes few bytes on the line', async () => {
    const { phone, straight } = site();
    const tab = await phone.tab();
    let bytes = 0;
    phone.line = async (address, init) => {
      if (address.endsWith('/push')) {
        expect(new Headers(init.headers).get('content-encoding')).toBe('gzip');
        bytes += (init.body as ArrayBuffer).byteLength;
      }
      return straight(address, init);
    };
    const down = phone.line;
    phone.line = () => Promise.reject(new TypeError('down'));
    for (let index = 0; index < 200; index += 1)
      await tab.record(at, 'reading', reading('A1', 40 + (index % 9)));
    phone.line = down;
    await tab.syncNow();
    expect(bytes / 200).toBeLessThan(120);
    await phone.kill();
  });
});

describe('when it is tried again', () => {
  it('waits as long as the server asks, even when the network comes back (SPEC 17)', async () => {
    const { phone, straight, clock, requests } = site();
    const tab = await phone.tab();
    phone.line = async (address, init) =>
      address.endsWith('/push') ? json(429, {}, { 'retry-after': '90' }) : straight(address, init);
    await tab.record(at, 'note', note('later'));
    await tab.syncNow();
    phone.line = straight;
    const before = requests.length;
    phone.wakes.forEach((wake) => wake());
    clock.advance(60_000);
    await settle();
    expect(requests.length).toBe(before);
    clock.advance(60_000);
    await until(() => tab.snapshot().sync.waitingEntries === 0, 'sent after the wait');
    await phone.kill();
  });

  it('spaces failed tries further and further, at most five minutes, and tries at once on waking (SPEC 18)', async () => {
    const { phone, straight, clock } = site();
    const tab = await phone.tab();
    let tries = 0;
    phone.line = () => {
      tries += 1;
      return Promise.reject(new TypeError('down'));
    };
    await tab.record(at, 'note', note('x'));
    await tab.syncNow();
    const waits: number[] = [];
    for (let turn = 0; turn < 12; turn += 1) {
      const wait = clock.next() ?? 0;
      waits.push(wait);
      clock.advance(wait);
      await settle();
    }
    expect(tries).toBe(13);
    expect(waits.slice(0, 3)).toEqual([1500, 3000, 6000]);
    expect(Math.max(...waits)).toBeLessThanOrEqual(300_000);
    expect(waits.every((wait, index) => index === 0 || wait >= (waits[index - 1] ?? 0))).toBe(true);
    phone.line = straight;
    phone.wakes.forEach((wake) => wake());
    await until(() => tab.snapshot().sync.waitingEntries === 0, 'sent on waking');
    await phone.kill();
  });

  it('sends by itself shortly after something was recorded', async () => {
    const { phone, server, clock } = site();
    const tab = await phone.tab();
    await tab.record(at, 'note', note('by itself'));
    clock.advance(500);
    await until(() => tab.snapshot().sync.waitingEntries === 0, 'sent by itself');
    expect(server.entries.some((one) => one.type === 'note')).toBe(true);
    await phone.kill();
  });

  it('one tab of three sends (SPEC 19)', async () => {
    const { phone, server, straight } = site();
    const tabs = [await phone.tab(), await phone.tab(), await phone.tab()];
    let inFlight = 0;
    let most = 0;
    phone.line = async (address, init) => {
      inFlight += 1;
      most = Math.max(most, inFlight);
      await settle(2);
      const answer = await straight(address, init);
      inFlight -= 1;
      return answer;
    };
    await Promise.all(tabs.map((tab, index) => tab.record(at, 'note', note(`tab ${index}`))));
    await Promise.all(tabs.map((tab) => tab.syncNow()));
    await settle();
    await tabs[0]?.syncNow();
    await settle();
    expect(most).toBe(1);
    expect(server.entries.filter((one) => one.type === 'note')).toHaveLength(3);
    expect(tabs.map((tab) => tab.snapshot().sync.waitingEntries)).toEqual([0, 0, 0]);
    await phone.kill();
  });
});

describe('a cleared store', () => {
  it('tells how many entries were lost, fetches again, and numbers on above (SPEC 4, 5)', async () => {
    const { phone, straight, server } = site();
    const tab = await phone.tab();
    await tab.record(at, 'note', note('sent'));
    await tab.syncNow();
    phone.line = () => Promise.reject(new TypeError('down'));
    await tab.record(at, 'note', note('lost 1'));
    const last = await tab.record(at, 'note', note('lost 2'));
    await phone.emptyStore();

    phone.line = straight;
    const fresh = await phone.tab();
    expect(fresh.snapshot().sync.lostEntries).toBe(2);
    await fresh.syncNow();
    await opened(fresh);
    expect(fresh.pour(pourId)?.sheet?.entries.some((entry) => entry.type === 'note')).toBe(true);
    const next = await fresh.record(at, 'note', note('after'));
    expect(next.deviceId).toBe(last.deviceId);
    expect(next.deviceSeq).toBeGreaterThan(last.deviceSeq);
    await fresh.acknowledgeLost?.();
    await settle();
    expect(fresh.snapshot().sync.lostEntries).toBeNull();
    await fresh.syncNow();
    expect(server.entries.filter((one) => one.type === 'note')).toHaveLength(2);
    await phone.kill();
  });

  it('does not count as lost what the server turns out to hold (SPEC 5)', async () => {
    const { phone, straight } = site();
    const tab = await phone.tab();
    phone.line = async (address, init) => {
      const answer = await straight(address, init);
      if (address.endsWith('/push')) throw new TypeError('reply lost');
      return answer;
    };
    await tab.record(at, 'note', note('arrived, unknown to us'));
    await tab.syncNow();
    await phone.emptyStore();
    phone.line = straight;
    const fresh = await phone.tab();
    await fresh.syncNow();
    expect(fresh.snapshot().sync.lostEntries).toBeNull();
    await phone.kill();
  });

  it('tells of a photo too that was lost before its bytes were sent, until that was read (SPEC 5)', async () => {
    const { phone, straight } = site();
    const tab = await phone.tab();
    phone.line = (address, init) =>
      address.startsWith('/api/photos/') ? Promise.reject(new TypeError('down')) : straight(address, init);
    const about = { kind: 'pour' as const, id: pourId };
    await tab.addPhoto(at, jpeg(), { about, shot: 'wide', caption: '' });
    await tab.syncNow();
    await until(() => tab.snapshot().sync.waitingEntries === 0, 'its entry is sent');
    await phone.emptyStore();
    const fresh = await phone.tab();
    expect(fresh.snapshot().sync).toMatchObject({ lostEntries: null, lostPhotos: 1 });
    await fresh.syncNow();
    expect(fresh.snapshot().sync.lostPhotos).toBe(1);
    await fresh.acknowledgeLost?.();
    await settle();
    expect(fresh.snapshot().sync.lostPhotos).toBeNull();
    await phone.kill();
  });

  it('does not tell of a photo that had been sent', async () => {
    const { phone } = site();
    const tab = await phone.tab();
    const about = { kind: 'pour' as const, id: pourId };
    await tab.addPhoto(at, jpeg(), { about, shot: 'wide', caption: '' });
    await tab.syncNow();
    expect(tab.snapshot().photos[0]?.progress).toBe('sent');
    await phone.emptyStore();
    const fresh = await phone.tab();
    expect(fresh.snapshot().sync).toMatchObject({ lostEntries: null, lostPhotos: null });
    await phone.kill();
  });

  it('tells it without a network too, before anybody has signed in', async () => {
    const { phone } = site();
    const tab = await phone.tab();
    phone.line = () => Promise.reject(new TypeError('down'));
    await tab.record(at, 'note', note('lost'));
    await phone.emptyStore();
    const fresh = await phone.tab();
    expect(fresh.snapshot()).toMatchObject({ person: null, sync: { lostEntries: 1, phase: 'offline' } });
    await phone.kill();
  });

  it('says nothing when a new phone is new', async () => {
    const { clock, straight } = site();
    const phone = new Phone(clock, straight);
    const tab = await phone.tab();
    expect(tab.snapshot().sync.lostEntries).toBeNull();
    await phone.kill();
  });
});
