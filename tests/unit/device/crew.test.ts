import { openDB } from 'idb';
import { describe, expect, it } from 'vitest';
import type { RunningDevice } from '@/lib/device/create-device';
import type { CrewList } from '@/lib/inspection/fix-list-item';
import { openPersonDatabase } from '@/lib/device/store/person-database';
import type { ModelPerson } from '@/tests/faults/world/model-server';
import { jpeg, settle, until } from '@/tests/faults/world/phone';
import {
  at,
  inspector,
  note,
  opened,
  pourId,
  reading,
  site,
  superintendent,
} from '@/tests/faults/world/site';
import { uuid } from '@/tests/stories/pour-story';
import { wholeStore } from './whole-store';

const elias: ModelPerson = { id: uuid(4, 9), name: 'Elías', role: 'crew' };
const adaAsCrew: ModelPerson = { ...inspector, role: 'crew' };
const point = { kind: 'point' as const, id: 'soffit.A1' };

const list = (digest: string, part: Partial<CrewList> = {}): CrewList => ({
  digest: digest.repeat(64),
  planRevision: 1,
  units: 'mm',
  drawings: ['FL-S-201 rev B'],
  items: [
    {
      id: 'cover-not-met:soffit:outer:1',
      about: point,
      where: 'Quay deck, Soffit, A1',
      what: { kind: 'cover', accepted: '38 mm', high: false, values: [{ label: 'A1', value: '31 mm' }] },
      together: [point],
      choices: [],
      place: { elementId: 'deck', faceId: 'soffit', text: 'Quay deck, Soffit, A1' },
      face: null,
      photoIds: [],
    },
  ],
  awaited: [],
  ...part,
});

const correction = {
  about: [point],
  text: 'Chair set under the bar',
  where: { elementId: 'deck', faceId: 'soffit', text: '' },
};

/** Elías' phone, with the list of his pour on it. */
async function withList() {
  const place = site();
  place.server.session = elias;
  place.server.crewLists.set(pourId, list('a'));
  place.server.writes(pourId, 'note', note('what the inspector wrote'));
  const tab = await place.phone.tab();
  await opened(tab);
  return { ...place, tab };
}

const crewOf = (tab: RunningDevice) => tab.pour(pourId)?.crew;

describe('crew on the phone', () => {
  it('have their list without a network, and no record (SPEC 35)', async () => {
    const { phone, tab } = await withList();
    expect(crewOf(tab)?.list?.items[0]?.where).toBe('Quay deck, Soffit, A1');
    expect(tab.snapshot().pours[0]).toMatchObject({ planRevision: 1, serverPlanRevision: 1 });
    await phone.kill();
    phone.line = () => Promise.reject(new TypeError('no network'));
    const cold = await phone.tab();
    await opened(cold);
    expect(crewOf(cold)?.list).toEqual(list('a'));
    expect(cold.pour(pourId)?.sheet).toBeNull();
    await phone.kill();
    const found = await wholeStore(phone);
    expect(found.includes('Quay deck, Soffit, A1')).toBe(true);
    expect(found.includes('what the inspector wrote')).toBe(false);
  });

  it('report a correction with a photo offline; it is sent as theirs, in sight of what the list rests on', async () => {
    const { phone, server, straight, tab } = await withList();
    const head = server.entries.at(-1)?.seq;
    phone.line = () => Promise.reject(new TypeError('no network'));
    const entry = await tab.record(at, 'correction', correction);
    await tab.addPhoto(at, jpeg(), { about: point, shot: 'after', caption: '' });
    expect(entry).toMatchObject({ seenSeq: head, planRevision: 1, authorRole: 'crew' });
    await settle();
    expect(crewOf(tab)?.own.map((one) => [one.type, one.seq])).toEqual([
      ['correction', null],
      ['photo', null],
    ]);

    phone.line = straight;
    server.crewLists.set(
      pourId,
      list('b', { items: [], awaited: [{ id: 'recheck-awaited', where: 'Quay deck, Soffit, A1' }] }),
    );
    await tab.syncNow();
    await tab.syncNow();
    await settle();
    expect(crewOf(tab)?.list).toMatchObject({ items: [], awaited: [{ where: 'Quay deck, Soffit, A1' }] });
    expect(crewOf(tab)?.own.every((one) => one.seq !== null)).toBe(true);
    expect(tab.snapshot().photos.map((photo) => photo.progress)).toEqual(['stored']);
    expect(tab.snapshot().sync).toMatchObject({ waitingEntries: 0, waitingPhotos: 0, phase: 'idle' });
    await phone.kill();
  });

  it('lose the list with the assignment, and keep what is not sent (SPEC 36)', async () => {
    const { phone, server, straight, tab } = await withList();
    phone.line = () => Promise.reject(new TypeError('no network'));
    await tab.record(at, 'correction', correction);
    phone.line = straight;
    const [pour] = server.pours.splice(0, 1);
    await tab.refreshPerson();
    await until(() => tab.snapshot().pours.length === 0, 'the pour is not listed any more');
    await phone.kill();
    expect((await wholeStore(phone)).includes('Quay deck, Soffit, A1')).toBe(false);

    if (pour) server.pours.push(pour);
    const again = await phone.tab();
    await again.syncNow();
    expect(server.entries.filter((one) => one.type === 'correction')).toHaveLength(1);
    await phone.kill();
  });

  it('who becomes crew loses the record on the device, and whoever stops being crew gets it (SPEC 36)', async () => {
    const { phone, server } = site();
    server.crewLists.set(pourId, list('a'));
    server.writes(pourId, 'note', note('what the inspector wrote'), superintendent);
    const tab = await phone.tab();
    await opened(tab);
    await tab.record(at, 'reading', reading('A1', 31));
    await tab.syncNow();
    expect(tab.pour(pourId)?.sheet?.instruments).toHaveLength(1);
    expect(tab.pour(pourId)?.sheet?.entries.some((one) => one.type === 'note')).toBe(true);
    await phone.kill();

    server.session = adaAsCrew;
    const asCrew = await phone.tab();
    await asCrew.syncNow();
    await opened(asCrew);
    expect(asCrew.pour(pourId)?.sheet).toBeNull();
    expect(crewOf(asCrew)?.list).toEqual(list('a'));
    await phone.kill();
    const kept = await wholeStore(phone);
    expect(kept.includes('what the inspector wrote')).toBe(false);
    expect(kept.includes('instrument-status')).toBe(false);

    server.session = inspector;
    const back = await phone.tab();
    await back.syncNow();
    await opened(back);
    expect(back.pour(pourId)?.crew).toBeNull();
    expect(back.pour(pourId)?.sheet?.instruments).toHaveLength(1);
    expect(back.pour(pourId)?.sheet?.entries.map((one) => one.type)).toEqual(
      expect.arrayContaining(['note', 'reading']),
    );
    await phone.kill();
  });
});

it('a store of the version before keeps what waits in it', async () => {
  const name = `before-${crypto.randomUUID()}`;
  const old = await openDB(name, 1, {
    upgrade(db) {
      db.createObjectStore('plans', { keyPath: 'pourId' });
      db.createObjectStore('entries', { keyPath: 'id' }).createIndex('stream', 'stream');
      db.createObjectStore('outbox', { keyPath: 'id' }).createIndex('deviceSeq', 'deviceSeq');
      db.createObjectStore('meta');
    },
  });
  await old.put('outbox', { id: 'waiting', deviceSeq: 1 });
  old.close();
  const db = await openPersonDatabase(name);
  expect(await db.count('outbox')).toBe(1);
  expect(await db.count('crewLists')).toBe(0);
  db.close();
});
