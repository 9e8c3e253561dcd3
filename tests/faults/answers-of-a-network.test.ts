import { describe, expect, it } from 'vitest';
import { uuid } from '@/tests/stories/pour-story';
import { violations, type History } from './world/check-history';
import { answersOfANetwork } from './world/answers-of-a-network';
import { allCalm, onPhone } from './world/hand';
import { FaultyLine } from './world/faulty-line';
import { contentOf } from './world/model-server';
import { NaivePhone } from './world/naive-phone';
import { jpeg, settle, type Line } from './world/phone';
import { at, inspector, note, projectId, reading, site } from './world/site';

/** The requests that a phone makes, in the order of a round. */
const requests = {
  'who is signed in': /\/sync\/index$/,
  'a batch': /\/sync\/push$/,
  'a page': /\/sync\/pull$/,
  'an address for a photo': /\/upload-address$/,
  'the bytes of a photo': /^\/store\//,
  'that the bytes are there': /\/uploaded$/,
};
const photo = { about: { kind: 'pour' as const, id: at.pourId }, shot: 'wide' as const, caption: '' };

describe.each(Object.entries(answersOfANetwork))('a network that answers %s', (_name, network) => {
  it.each(Object.entries(requests))(
    'to %s: nothing leaves the outbox, and all goes once it is over',
    async (_what, which) => {
      const { phone, server, clock, straight } = site();
      const tab = await phone.tab();
      const history: History = { recorded: new Map() };
      const recorded = [
        await tab.record(at, 'reading', reading('A1', 44)),
        await tab.addPhoto(at, jpeg(), photo),
        await tab.record(at, 'note', note('kept')),
      ];
      for (const entry of recorded)
        history.recorded.set(entry.id, { content: contentOf(entry), phone: phone.name, poison: false });
      let answered = 0;
      const faulty = network.line(clock);
      phone.line = async (address, init) => {
        if (!which.test(new URL(address, 'http://phone.example.test').pathname))
          return straight(address, init);
        answered += 1;
        return faulty(address, init);
      };
      // Who is signed in is not asked again for a while.
      clock.advance(31_000);
      await tab.syncNow();
      await settle();
      expect(answered).toBeGreaterThan(0);
      const entriesFirst = ['who is signed in', 'a batch'].includes(_what);
      const { sync, photos } = tab.snapshot();
      expect(sync.waitingEntries).toBe(entriesFirst ? recorded.length : 0);
      expect(['waiting', 'sending', 'sent']).toContain(photos[0]?.progress);
      if (entriesFirst || _what === 'a page') {
        expect(sync.phase).toBe(network.phase);
        expect(sync.message).toMatch(network.says);
        if (entriesFirst) expect(sync.message).toMatch(/3 entries are kept on this device/);
      }

      phone.line = straight;
      const line = new FaultyLine(straight, () => 0, clock);
      await allCalm([{ phone, line, tabs: [tab] }], clock);
      expect(tab.snapshot().sync).toMatchObject({
        waitingEntries: 0,
        waitingPhotos: 0,
        phase: 'idle',
        message: null,
      });
      const found = violations({
        history,
        server: server.entries,
        phones: [await onPhone({ phone, line, tabs: [tab] })],
        secondDevice: server.entries.map((one) => one.id),
      });
      expect(found).toEqual([]);
      expect(server.entries.filter((one) => one.type === 'photo-stored')).toHaveLength(1);
      await phone.kill();
    },
  );

  it('loses what a client sends that takes any answer for a yes (negative control)', async () => {
    const { server, clock } = site();
    const naive = new NaivePhone(network.line(clock));
    const entry = {
      id: uuid(77, 1),
      ...at,
      type: 'note',
      v: 1,
      body: note('lost'),
      planRevision: 1,
      authorId: inspector.id,
      deviceId: uuid(78, 1),
      deviceSeq: 1,
      recordedAt: '2026-12-01T07:00:00.000Z',
      clockOffsetMs: null,
      seenSeq: 0,
    };
    naive.record(entry);
    await naive.sync(projectId, entry.deviceId);
    const found = violations({
      history: {
        recorded: new Map([[entry.id, { content: contentOf(entry), phone: 'naive', poison: false }]]),
      },
      server: server.entries,
      phones: [{ name: 'naive', waiting: naive.waiting.map((one) => one.id), refused: [] }],
      secondDevice: server.entries.map((one) => one.id),
    });
    // Where no answer comes at all, even this one keeps what it had, and never sends it.
    expect(found).toEqual([
      network.answers
        ? `lost: ${entry.id}, recorded on naive`
        : `never sent, though the line was good: ${entry.id}`,
    ]);
  });
});

describe('one request at a time', () => {
  it('is under way for the entries of a device, whatever is recorded and however often it is woken', async () => {
    const { phone, straight } = site();
    let underWay = 0;
    let most = 0;
    const counting: Line = async (address, init) => {
      const own = address.startsWith('/api/sync/');
      if (own) most = Math.max(most, (underWay += 1));
      await settle(3);
      const answer = await straight(address, init);
      if (own) underWay -= 1;
      return answer;
    };
    const tabs = [await phone.tab(), await phone.tab(), await phone.tab()];
    await settle();
    phone.line = counting;
    const rounds: Promise<void>[] = [];
    for (let step = 0; step < 12; step += 1) {
      const tab = tabs[step % 3];
      await tab?.record(at, 'note', note(`n${step}`));
      rounds.push(...tabs.map((one) => one.syncNow()));
      phone.wakes.forEach((wake) => wake());
    }
    await Promise.all(rounds);
    expect(most).toBe(1);
    await phone.kill();
  });

  it('is not, where each tab sends for itself (negative control)', async () => {
    const { phone, straight } = site();
    let underWay = 0;
    let most = 0;
    const free = { ifFree: async <T>(_lock: string, go: () => Promise<T>) => go() };
    const tabs = [await phone.tab(free), await phone.tab(free), await phone.tab(free)];
    await settle();
    phone.line = async (address, init) => {
      most = Math.max(most, (underWay += 1));
      await settle(3);
      const answer = await straight(address, init);
      underWay -= 1;
      return answer;
    };
    await tabs[0]?.record(at, 'note', note('n'));
    await Promise.all(tabs.map((one) => one.syncNow()));
    expect(most).toBeGreaterThan(1);
    await phone.kill();
  });
});
