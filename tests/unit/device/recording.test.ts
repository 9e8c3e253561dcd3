import { describe, expect, it, vi } from 'vitest';
import { createDevice } from '@/lib/device/create-device';
import { DeviceError } from '@/lib/device/device-types';
import { jpeg, settle } from '@/tests/faults/world/phone';
import { at, opened, inspector, note, pourId, projectId, reading, site } from '@/tests/faults/world/site';

const whole = IDBObjectStore.prototype.put;
const wholeDelete = IDBObjectStore.prototype.delete;
interface Failing {
  _abort(reason: string): void;
}
const noNetwork = () => Promise.reject(new TypeError('no network'));

describe('recording on the device', () => {
  it('keeps an entry through the page being killed right after it was saved (SPEC 1, 2)', async () => {
    const { phone } = site();
    await phone.tab();
    await phone.kill();
    phone.line = noNetwork;
    const tab = await phone.tab();
    const entry = await tab.record(at, 'reading', reading('A1', 44));
    await phone.kill();

    const reopened = await phone.tab();
    await opened(reopened);
    const points = reopened.pour(pourId)?.sheet?.faces[0]?.points;
    expect(points?.find((point) => point.label === 'A1')?.readings.map((one) => one.entry.id)).toEqual([
      entry.id,
    ]);
    expect(reopened.snapshot().sync.waitingEntries).toBe(1);
    expect(reopened.snapshot().sync.oldestWaitingAt).toBe(entry.recordedAt);
    await phone.kill();
  });

  it('folds an entry in at once, with the verdict that the office will see', async () => {
    const { phone } = site();
    const tab = await phone.tab();
    await opened(tab);
    await tab.record(at, 'reading', reading('A1', 30));
    const open = tab.pour(pourId);
    expect(open?.holds.some((hold) => hold.kind === 'cover-not-met')).toBe(true);
    expect(open?.sheet?.faces[0]?.points[0]?.mark).toBe('not-met-low');
    await phone.kill();
  });

  it('says at which field a body is wrong, and writes nothing', async () => {
    const { phone } = site();
    const tab = await phone.tab();
    const wrong = { ...reading('A1', 44), pointId: null };
    await expect(tab.record(at, 'note', note('  '))).rejects.toMatchObject({
      code: 'invalid',
      fields: [{ path: 'text', message: 'Write something here.' }],
    });
    await expect(tab.record(at, 'reading', wrong)).rejects.toBeInstanceOf(DeviceError);
    expect(tab.snapshot().sync.waitingEntries).toBe(0);
    await phone.kill();
  });

  it('refuses to record while nobody is signed in', async () => {
    const { phone, server } = site();
    server.session = null;
    const tab = await phone.tab();
    expect(tab.snapshot().person).toBeNull();
    expect(tab.snapshot().sync.phase).toBe('sign-in-needed');
    await expect(tab.record(at, 'note', note('x'))).rejects.toMatchObject({ code: 'signed-out' });
    await phone.kill();
  });

  it('writes what the fold orders by: rising deviceSeq over tabs, seenSeq as pulled in this tab (SPEC 3)', async () => {
    const { phone, server } = site();
    const first = await phone.tab();
    const second = await phone.tab();
    const made = await Promise.all(
      Array.from({ length: 12 }, (_, index) =>
        (index % 2 ? first : second).record(at, 'note', note(`note ${index}`)),
      ),
    );
    const seqs = made.map((entry) => entry.deviceSeq);
    expect(new Set(seqs).size).toBe(12);
    expect(made.every((entry) => entry.seenSeq === 0)).toBe(true);
    await first.syncNow();
    await second.syncNow();
    await settle();
    const after = await first.record(at, 'note', note('after the pull'));
    expect(after.seenSeq).toBe(server.entries.at(-1)?.seq);
    expect(after.deviceSeq).toBeGreaterThan(Math.max(...seqs));
    expect(server.entries.filter((one) => one.type === 'note')).toHaveLength(12);
    await phone.kill();
  });

  it('stamps the device clock and the offset last known, and keeps order when the clock is set back', async () => {
    const { phone, clock } = site();
    phone.clockSkewMs = 365 * 86_400_000;
    const tab = await phone.tab();
    const first = await tab.record(at, 'note', note('a year ahead'));
    phone.clockSkewMs = -3_600_000;
    const second = await tab.record(at, 'note', note('an hour behind'));
    expect(first.clockOffsetMs).toBe(-365 * 86_400_000);
    expect(second.recordedAt < first.recordedAt).toBe(true);
    expect(second.deviceSeq).toBeGreaterThan(first.deviceSeq);
    await tab.syncNow();
    expect(tab.snapshot().sync.clockOffsetMs).toBe(3_600_000);
    expect(Date.parse(tab.snapshot().sync.lastSuccessAt ?? '')).toBe(clock.now() - 3_600_000);
    await phone.kill();
  });

  it('gives the same objects as long as nothing changes, and tells listeners when something does', async () => {
    const { phone } = site();
    const tab = await phone.tab();
    await opened(tab);
    let told = 0;
    const stop = tab.subscribe(() => (told += 1));
    expect(tab.snapshot()).toBe(tab.snapshot());
    const before = tab.pour(pourId);
    expect(tab.pour(pourId)).toBe(before);
    await tab.record(at, 'note', note('something'));
    await settle();
    expect(told).toBeGreaterThan(0);
    expect(tab.pour(pourId)).not.toBe(before);
    stop();
    await phone.kill();
  });

  it('shows in one tab what another has recorded', async () => {
    const { phone } = site();
    const first = await phone.tab();
    const second = await phone.tab();
    await opened(second);
    await first.record(at, 'reading', reading('B1', 50));
    await settle();
    const point = second.pour(pourId)?.sheet?.faces[0]?.points.find((one) => one.label === 'B1');
    expect(point?.mark).toBe('met');
    expect(second.snapshot().sync.waitingEntries).toBe(1);
    await phone.kill();
  });

  it('records into the project stream, which every pour of it folds in', async () => {
    const { phone } = site();
    const tab = await phone.tab();
    await opened(tab);
    await tab.record({ projectId, pourId: null }, 'instrument-status', {
      instrumentId: '00000003-0000-7000-8000-000000000002',
      name: 'DG-3',
      kind: 'depth-gauge',
      serial: 'Q-118',
      calibrationDue: null,
      uncertaintyMm: 1,
      inService: true,
    });
    expect(tab.pour(pourId)?.sheet?.instruments.map((one) => one.name)).toEqual(['DG-2', 'DG-3']);
    await phone.kill();
  });

  it('opens what it holds on a full device, says all that waits, and gives it out as a file', async () => {
    const { phone } = site();
    const tab = await phone.tab();
    phone.line = noNetwork;
    const kept = await tab.record(at, 'reading', reading('A1', 44));
    await phone.kill();

    const put = vi.spyOn(IDBObjectStore.prototype, 'put').mockImplementation(function (
      this: IDBObjectStore,
      ...given: Parameters<IDBObjectStore['put']>
    ) {
      queueMicrotask(() => (this.transaction as unknown as Failing)._abort('QuotaExceededError'));
      return whole.apply(this, given);
    });
    const reopened = await phone.tab();
    await opened(reopened);
    const { store, person, sync } = reopened.snapshot();
    expect({ store, name: person?.name, waiting: sync.waitingEntries }).toEqual({
      store: 'open',
      name: expect.any(String),
      waiting: 1,
    });
    expect(await (await reopened.exportUnsent()).text()).toContain(kept.id);
    put.mockRestore();
    await phone.kill();
  });

  it('never says that nothing is there while the store cannot be opened', async () => {
    const { phone } = site();
    const open = vi.spyOn(indexedDB, 'open').mockImplementation(() => {
      throw new DOMException('no room', 'UnknownError');
    });
    const tab = createDevice(phone.environment());
    await expect(tab.record(at, 'note', note('lost'))).rejects.toMatchObject({ code: 'store-failed' });
    await settle();
    expect(tab.snapshot().store).toBe('failed');
    open.mockRestore();
    await tab.close();
  });

  it('saves a reading on a full device though a photo found no room, and says so when neither fits', async () => {
    const { phone } = site();
    const tab = await phone.tab();
    let fullFor: 'nothing' | 'photos' | 'until room is made' | 'everything' = 'photos';
    const put = vi.spyOn(IDBObjectStore.prototype, 'put').mockImplementation(function (
      this: IDBObjectStore,
      ...given: Parameters<IDBObjectStore['put']>
    ) {
      const full =
        fullFor === 'everything' ||
        (fullFor === 'photos' && this.name === 'photoBytes') ||
        (fullFor === 'until room is made' && this.name === 'outbox');
      // As a browser does: the request is taken, and the transaction ends with the reason.
      if (full) queueMicrotask(() => (this.transaction as unknown as Failing)._abort('QuotaExceededError'));
      return whole.apply(this, given);
    });
    const remove = vi.spyOn(IDBObjectStore.prototype, 'delete').mockImplementation(function (
      this: IDBObjectStore,
      key,
    ) {
      if (key === 'ballast') fullFor = 'nothing';
      return wholeDelete.call(this, key);
    });
    const photo = tab.addPhoto(at, jpeg(), {
      about: { kind: 'pour', id: pourId },
      shot: 'wide',
      caption: '',
    });
    await expect(photo).rejects.toMatchObject({ code: 'device-full' });
    fullFor = 'until room is made';
    const kept = await tab.record(at, 'reading', reading('A1', 44));
    fullFor = 'everything';
    await expect(tab.record(at, 'note', note('no room'))).rejects.toMatchObject({ code: 'device-full' });
    put.mockRestore();
    remove.mockRestore();
    await phone.kill();
    const reopened = await phone.tab();
    expect(reopened.snapshot().photos).toEqual([]);
    await reopened.syncNow();
    await settle();
    await opened(reopened);
    const own = reopened.pour(pourId)?.sheet?.entries.filter((one) => one.pourId === pourId);
    expect(own?.map((one) => one.id)).toEqual([kept.id]);
    await phone.kill();
  });

  it('saves to a file everything that is only here', async () => {
    const { phone } = site();
    const tab = await phone.tab();
    phone.line = noNetwork;
    const entry = await tab.record(at, 'note', note('only here'));
    const file = JSON.parse(await (await tab.exportUnsent()).text()) as Record<string, unknown>;
    expect(file).toMatchObject({
      format: 'cagewright-unsent',
      person: { id: inspector.id },
      entries: [{ id: entry.id, body: { text: 'only here' } }],
      photos: [],
    });
    await phone.kill();
  });
});
