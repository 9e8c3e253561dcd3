import { describe, expect, it } from 'vitest';
import { contentOf } from '@/tests/faults/world/model-server';
import { Phone, settle } from '@/tests/faults/world/phone';
import { at, opened, note, pourId, reading, site, superintendent } from '@/tests/faults/world/site';
import type { RunningDevice } from '@/lib/device/create-device';

/** Ids of the pour's own notes and readings as its sheet shows them on this tab. */
async function shown(tab: RunningDevice): Promise<string[]> {
  await opened(tab);
  const entries = tab.pour(pourId)?.sheet?.entries ?? [];
  return entries.filter((one) => one.pourId === pourId).map((one) => one.id);
}

describe('fetching', () => {
  it('gives a second device exactly what the server holds, page by page (SPEC 20, 21)', async () => {
    const { phone, server, clock, straight } = site();
    server.pageSize = 7;
    const first = await phone.tab();
    for (let index = 0; index < 30; index += 1) await first.record(at, 'reading', reading('A1', 40 + index));
    await first.syncNow();
    const second = new Phone(clock, straight);
    const other = await second.tab();
    expect(await shown(other)).toEqual(
      server.entries.filter((one) => one.pourId === pourId).map((one) => one.id),
    );
    const ours = other.pour(pourId)?.sheet?.entries.find((one) => one.seq === server.entries.at(-1)?.seq);
    expect(contentOf(ours ?? {})).toBe(contentOf(server.entries.at(-1) ?? {}));
    expect(other.snapshot().pours[0]).toMatchObject({ kept: true, planRevision: 1, serverPlanRevision: 1 });
    await phone.kill();
    await second.kill();
  });

  it('misses nothing while somebody else writes between the pages (SPEC 21)', async () => {
    const { phone, server, straight } = site();
    server.pageSize = 3;
    for (let index = 0; index < 8; index += 1) server.writes(pourId, 'note', note(`before ${index}`));
    let more = 5;
    phone.line = async (address, init) => {
      const answer = await straight(address, init);
      if (address.endsWith('/pull') && more > 0)
        server.writes(pourId, 'note', note(`meanwhile ${(more -= 1)}`));
      return answer;
    };
    const tab = await phone.tab();
    await tab.syncNow();
    expect(more).toBe(0);
    await tab.syncNow();
    expect(await shown(tab)).toEqual(
      server.entries.filter((one) => one.pourId === pourId).map((one) => one.id),
    );
    await phone.kill();
  });

  it('takes up what another tab fetched and was closed before it could tell (SPEC 38)', async () => {
    const { phone, server, straight } = site();
    const all = () => server.entries.filter((one) => one.pourId === pourId).map((one) => one.id);
    server.writes(pourId, 'note', note('first'));
    phone.line = (address, init) =>
      address.endsWith('/pull') ? Promise.reject(new TypeError('down')) : straight(address, init);
    const silent = { channel: () => ({ post: () => undefined, close: () => undefined }) };
    const closing = await phone.tab(silent);
    const staying = await phone.tab();
    expect(await shown(staying)).toEqual([]);
    phone.line = straight;
    await closing.syncNow();
    await staying.syncNow();
    expect(await shown(staying)).toEqual(all());

    server.writes(pourId, 'note', note('second'));
    await closing.syncNow();
    server.writes(pourId, 'note', note('third'));
    await staying.syncNow();
    expect(await shown(staying)).toEqual(all());
    const { seenSeq } = await staying.record(at, 'note', note('in sight of all of them'));
    expect(seenSeq).toBe(server.entries.findLast((one) => one.pourId === pourId)?.seq);
    await phone.kill();
  });

  it('tries again soon where another tab had its turn and may have been closed in the middle of it (SPEC 19)', async () => {
    const { phone, clock, straight } = site();
    let answer: () => void = () => undefined;
    let held = false;
    phone.line = async (address, init) => {
      if (!address.endsWith('/pull') || held) return straight(address, init);
      held = true;
      await new Promise<void>((done) => (answer = done));
      throw new TypeError('closed');
    };
    const closing = phone.tab();
    await settle();
    const staying = await phone.tab();
    await opened(staying);
    expect(staying.pour(pourId)?.sheet).toBeNull();
    answer();
    await (await closing).close();
    clock.advance(7_000);
    await settle();
    expect(staying.pour(pourId)?.sheet).not.toBeNull();
    await phone.kill();
  });

  it('keeps what it had when the line breaks between two pages, and goes on from there (SPEC 20)', async () => {
    const { phone, server, straight, requests } = site();
    server.pageSize = 4;
    for (let index = 0; index < 10; index += 1) server.writes(pourId, 'note', note(`n${index}`));
    let pulls = 0;
    phone.line = (address, init) => {
      if (address.endsWith('/pull') && (pulls += 1) === 2) return Promise.reject(new TypeError('cut'));
      return straight(address, init);
    };
    const tab = await phone.tab();
    expect(await shown(tab)).toHaveLength(4);
    const before = requests.filter((one) => one.endsWith('/pull')).length;
    await tab.syncNow();
    expect(await shown(tab)).toHaveLength(10);
    expect(requests.filter((one) => one.endsWith('/pull')).length - before).toBe(2);
    await phone.kill();
  });

  it('shows two people who had not seen each other as a conflict, in whatever order they arrive', async () => {
    for (const firstToSend of [0, 1]) {
      const { phone, server, clock, straight } = site();
      const ben = { ...superintendent, role: 'inspector' as const };
      const other = new Phone(clock, straight);
      const ada = await phone.tab();
      server.session = ben;
      const bens = await other.tab();
      const made = [
        await ada.record(at, 'reading', reading('A1', 45)),
        await bens.record(at, 'reading', reading('A1', 30)),
      ];
      const sessions = [server.people[0] ?? null, ben];
      const tabs = [ada, bens];
      for (const turn of [firstToSend, 1 - firstToSend, firstToSend]) {
        server.session = sessions[turn] ?? null;
        await tabs[turn]?.syncNow();
      }
      const seen = tabs[firstToSend];
      if (!seen) throw new Error('no tab');
      expect((await shown(seen)).sort()).toEqual(made.map((one) => one.id).sort());
      const point = seen.pour(pourId)?.sheet?.faces[0]?.points.find((one) => one.label === 'A1');
      expect(point?.conflict).toBe(true);
      expect(point?.mark).toBe('not-met-low');
      await phone.kill();
      await other.kill();
    }
  });

  it('offers again what a restored server no longer holds, and sets others’ entries aside (SPEC 23)', async () => {
    const { phone, server } = site();
    const tab = await phone.tab();
    const early = await tab.record(at, 'note', note('before the backup'));
    await tab.syncNow();
    const backup = server.backup();
    const late = await tab.record(at, 'note', note('after the backup'));
    await tab.syncNow();
    const foreign = server.writes(pourId, 'note', note('somebody else, after the backup'));
    await tab.syncNow();
    expect(await shown(tab)).toContain(foreign.id);

    server.restore(backup);
    server.writes(pourId, 'note', note('written after the restore'));
    await tab.syncNow();
    await tab.syncNow();
    const held = server.entries.filter((one) => one.pourId === pourId);
    expect(held.filter((one) => one.id === late.id)).toHaveLength(1);
    expect(held.filter((one) => one.id === early.id)).toHaveLength(1);
    expect((await shown(tab)).sort()).toEqual(held.map((one) => one.id).sort());
    expect(tab.snapshot().sync).toMatchObject({ waitingEntries: 0, refusedEntries: 0, phase: 'idle' });
    expect(await (await tab.exportUnsent()).text()).toContain(foreign.id);
    await phone.kill();
  });

  it('offers again an entry that was acknowledged and then lost before it was ever fetched (SPEC 22)', async () => {
    const { phone, server, straight } = site();
    const tab = await phone.tab();
    await tab.record(at, 'note', note('first'));
    await tab.syncNow();
    const backup = server.backup();
    phone.line = (address, init) =>
      address.endsWith('/pull') ? Promise.reject(new TypeError('cut')) : straight(address, init);
    const entry = await tab.record(at, 'note', note('acknowledged only'));
    await tab.syncNow();
    expect(tab.snapshot().sync.waitingEntries).toBe(0);
    server.restore(backup);
    phone.line = straight;
    await tab.syncNow();
    expect(server.entries.filter((one) => one.id === entry.id)).toHaveLength(1);
    await phone.kill();
  });

  it('does not go round in circles where the stream given out is not all of it (SPEC 24)', async () => {
    const { phone, straight, requests } = site();
    const tab = await phone.tab();
    phone.line = async (address, init) => {
      const answer = await straight(address, init);
      if (!address.endsWith('/pull')) return answer;
      const body = (await answer.json()) as { pours: { entries: unknown[] }[] };
      const pours = body.pours.map((pour) => ({ ...pour, entries: [] }));
      return new Response(JSON.stringify({ ...body, pours }), {
        headers: { 'content-type': 'application/json' },
      });
    };
    await tab.record(at, 'note', note('not given out to the crew'));
    await tab.syncNow();
    await tab.syncNow();
    const before = requests.filter((one) => one.endsWith('/push')).length;
    await tab.syncNow();
    await tab.syncNow();
    expect(requests.filter((one) => one.endsWith('/push')).length).toBe(before);
    expect(tab.snapshot().sync.waitingEntries).toBe(0);
    await phone.kill();
  });
});

describe('keeping', () => {
  it('drops a pour from the device without touching what waits, and fetches it anew (SPEC 28)', async () => {
    const { phone, server, straight } = site();
    const tab = await phone.tab();
    await tab.record(at, 'note', note('sent'));
    await tab.syncNow();
    phone.line = () => Promise.reject(new TypeError('down'));
    const waiting = await tab.record(at, 'note', note('waits'));
    await tab.dropPour(pourId);
    await settle();
    expect(tab.snapshot().pours[0]).toMatchObject({ kept: false, planRevision: 0, notSent: 1 });
    phone.line = straight;
    await tab.syncNow();
    expect(server.entries.some((one) => one.id === waiting.id)).toBe(true);
    await tab.keepPour(pourId);
    await tab.syncNow();
    expect(await shown(tab)).toHaveLength(2);
    expect(tab.pour(pourId)?.sheet?.entries.find((one) => one.id === waiting.id)?.seq).not.toBeNull();
    await phone.kill();
  });

  it('confirms a signature online, after sending it', async () => {
    const { phone } = site();
    const tab = await phone.tab();
    const entry = await tab.record(at, 'signature', {
      as: 'inspector',
      elementIds: null,
      words: 'I have inspected this pour.',
      strokes: [[1, 2, 3, 4]],
      sheetDigest: 'b'.repeat(64),
    });
    expect(await tab.confirmSignature(entry.id, 'wrong')).toEqual({
      ok: false,
      sentence: 'That password is not right. Nothing was signed.',
    });
    expect(await tab.confirmSignature(entry.id, 'right')).toEqual({ ok: true });
    phone.line = () => Promise.reject(new TypeError('down'));
    expect(await tab.confirmSignature(entry.id, 'right')).toMatchObject({ ok: false });
    await phone.kill();
  });
});
