import { describe, expect, it } from 'vitest';
import type { RunningDevice } from '@/lib/device/create-device';
import { jpeg, settle, type Phone } from '@/tests/faults/world/phone';
import {
  at,
  inspector,
  note,
  opened,
  pourId,
  reading,
  site,
  superintendent,
  type Site,
} from '@/tests/faults/world/site';
import type { ModelPerson } from '@/tests/faults/world/model-server';
import { wholeStore } from './whole-store';

const ada = inspector;
const ben: ModelPerson = { ...superintendent, role: 'inspector' };
const noNetwork = () => Promise.reject(new TypeError('no network'));

/** Signs in with the password in a new tab, as coming back from the sign-in page does, and chooses a PIN. */
async function signIn({ phone, server }: Site, person: ModelPerson, pin?: string): Promise<RunningDevice> {
  server.session = person;
  const tab = await phone.tab();
  if (pin) expect(await tab.setPin(pin, null)).toEqual({ ok: true });
  await settle();
  return tab;
}

/** A tablet on which Ada and Ben have signed in, each with a PIN; locked, and without a network. */
async function sharedTablet(): Promise<Site & { tab: RunningDevice }> {
  const place = site();
  await signIn(place, ada, '2580');
  await place.phone.kill();
  const tab = await signIn(place, ben, '7391');
  await tab.handOver();
  place.phone.line = noNetwork;
  return { ...place, tab };
}

const waits = (tab: RunningDevice) =>
  Object.fromEntries(tab.snapshot().people.map((one) => [one.name, one.waiting.entries]));

describe('a shared tablet', () => {
  it('sends an outbox only in its author’s own session, and shows whose work waits (SPEC 11, 29)', async () => {
    const place = site();
    const { phone, server, requests, clock } = place;
    const adas = await phone.tab();
    const entry = await adas.record(at, 'note', note('Ada’s'));
    await settle();
    server.session = ben;
    requests.length = 0;
    clock.advance(31_000);
    await adas.syncNow();
    expect(adas.snapshot().sync).toMatchObject({
      phase: 'sign-in-needed',
      waitingEntries: 1,
      signedInAs: 'Ben',
    });
    expect(adas.snapshot().sync.message).toMatch(/Ben is signed in.*Ada signs in/);
    expect(requests.some((one) => one.endsWith('/push'))).toBe(false);
    await phone.kill();

    const bens = await signIn(place, ben);
    expect(bens.snapshot().person?.id).toBe(ben.id);
    expect(bens.snapshot().sync.waitingEntries).toBe(0);
    expect(bens.snapshot().people.find((one) => one.id === ada.id)?.waiting).toEqual({
      entries: 1,
      photos: 0,
      oldestAt: entry.recordedAt,
      pours: { [pourId]: 1 },
    });
    await bens.syncNow();
    expect(server.entries.some((one) => one.id === entry.id)).toBe(false);
    await phone.kill();

    const again = await signIn(place, ada);
    await again.syncNow();
    expect(server.entries.find((one) => one.id === entry.id)?.authorId).toBe(ada.id);
    expect(again.snapshot().people.find((one) => one.id === ada.id)?.waiting.entries).toBe(0);
    await phone.kill();
  });

  it('keeps everything when the session changes hands between the question and the push (SPEC 11)', async () => {
    const { phone, server, straight } = site();
    const tab = await phone.tab();
    phone.line = (address, init) => {
      if (address.endsWith('/push')) server.session = ben;
      return straight(address, init);
    };
    await tab.record(at, 'note', note('mine'));
    await tab.syncNow();
    expect(tab.snapshot().sync).toMatchObject({
      waitingEntries: 1,
      refusedEntries: 0,
      phase: 'sign-in-needed',
    });
    await phone.kill();
  });

  it('sends no photo in another person’s session either, and does not take it for refused (SPEC 11)', async () => {
    const place = site();
    const { phone, server, straight, clock, requests } = place;
    const tab = await phone.tab();
    phone.line = (address, init) => (address.includes('/photos/') ? noNetwork() : straight(address, init));
    await tab.addPhoto(at, jpeg(), { about: { kind: 'pour', id: pourId }, shot: 'wide', caption: '' });
    await tab.syncNow();
    expect(tab.snapshot().sync).toMatchObject({ waitingEntries: 0, waitingPhotos: 1 });
    phone.line = straight;
    server.session = ben;
    clock.advance(31_000);
    await tab.syncNow();
    requests.length = 0;
    clock.advance(600_000);
    await settle();
    await tab.syncNow();
    expect(requests.filter((one) => one.includes('/photos/'))).toEqual([]);
    expect(tab.snapshot().photos.map((photo) => photo.progress)).toEqual(['waiting']);
    await phone.kill();

    const again = await signIn(place, ada);
    await again.syncNow();
    await again.syncNow();
    expect(again.snapshot().photos.map((photo) => photo.progress)).toEqual(['stored']);
    await phone.kill();
  });

  it('hides and keeps unsent work after signing out (SPEC 29)', async () => {
    const { phone, server } = site();
    const tab = await phone.tab();
    server.session = null;
    await tab.record(at, 'note', note('before going'));
    await tab.handOver();
    await settle();
    expect(tab.snapshot()).toMatchObject({ person: null, pours: [] });
    await phone.kill();
    const later = await phone.tab();
    expect(later.snapshot().person).toBeNull();
    await phone.kill();
    server.session = inspector;
    const back = await phone.tab();
    await back.syncNow();
    expect(server.entries.filter((one) => one.type === 'note')).toHaveLength(1);
    await phone.kill();
  });

  it('opens straight for the only person without a PIN, and asks who holds it once there are two (SPEC 30)', async () => {
    const place = site();
    const { phone } = place;
    await signIn(place, ada);
    await phone.kill();
    phone.line = noNetwork;
    expect((await phone.tab()).snapshot().person?.id).toBe(ada.id);
    await phone.kill();

    phone.line = place.straight;
    await signIn(place, ben);
    await phone.kill();
    phone.line = noNetwork;
    const cold = await phone.tab();
    expect(cold.snapshot()).toMatchObject({ person: null, asks: true, pours: [] });
    expect(cold.snapshot().people.map((one) => one.name)).toEqual(['Ben', 'Ada']);
    await expect(cold.record(at, 'note', note('whose?'))).rejects.toMatchObject({ code: 'signed-out' });
    await phone.kill();
  });

  it('goes on through a reload of the tab that had it open, and not once it was handed over (SPEC 30)', async () => {
    const { phone } = await sharedTablet();
    await phone.kill();
    let noted: string | null = null;
    const tabNote = { read: () => noted, write: (personId: string) => void (noted = personId) };
    const first = await phone.tab({ tabNote });
    expect(await first.openPerson(ada.id, '2580')).toEqual({ ok: true });
    await phone.kill();
    const reloaded = await phone.tab({ tabNote });
    expect(reloaded.snapshot().person?.id).toBe(ada.id);
    await reloaded.handOver();
    await phone.kill();
    expect((await phone.tab({ tabNote })).snapshot()).toMatchObject({ person: null, asks: true });
    await phone.kill();
  });

  it('keeps who measured through a hand-over in the middle of a pour, offline (SPEC 31)', async () => {
    const place = await sharedTablet();
    const { phone, server, tab, straight } = place;
    await tab.openPerson(ada.id, '2580');
    const first = await tab.record(at, 'reading', reading('A1', 44));
    await tab.record(at, 'reading', reading('A2', 45));
    await tab.handOver();
    expect(await tab.openPerson(ben.id, '7391')).toEqual({ ok: true });
    await opened(tab);
    expect(waits(tab)).toEqual({ Ben: 0, Ada: 2 });
    expect(tab.pour(pourId)?.sheet?.entries.filter((one) => one.type === 'reading')).toEqual([]);
    const last = await tab.record(at, 'reading', reading('A3', 46));
    expect([first.authorId, last.authorId]).toEqual([ada.id, ben.id]);
    expect(first.deviceId).toBe(last.deviceId);
    expect(last.deviceSeq).toBe(1);
    await phone.kill();

    phone.line = straight;
    for (const person of [ben, ada]) {
      const own = await signIn(place, person);
      await own.syncNow();
      await phone.kill();
    }
    const authors = server.entries
      .filter((one) => one.type === 'reading')
      .map((one) => [one.body.pointId, one.authorId]);
    expect(Object.fromEntries(authors)).toEqual({
      'soffit.A1': ada.id,
      'soffit.A2': ada.id,
      'soffit.A3': ben.id,
    });
  });

  it('opens by PIN while another’s session is live: what is recorded waits, and nobody else sends it (SPEC 11, 31)', async () => {
    const place = await sharedTablet();
    const { phone, server, tab, straight, clock } = place;
    phone.line = straight;
    await tab.openPerson(ada.id, '2580');
    const entry = await tab.record(at, 'reading', reading('A1', 44));
    clock.advance(31_000);
    await tab.syncNow();
    expect(tab.snapshot().sync).toMatchObject({ signedInAs: 'Ben', waitingEntries: 1 });
    await tab.refreshPerson();
    expect(tab.snapshot().person?.id).toBe(ada.id);
    expect(server.entries.some((one) => one.id === entry.id)).toBe(false);
    await phone.kill();

    const own = await signIn(place, ada);
    await own.syncNow();
    expect(server.entries.find((one) => one.id === entry.id)?.authorId).toBe(ada.id);
    expect(server.sentBy.get(entry.id)).toBe(ada.id);
    await phone.kill();
  });

  it('keeps everything when the server itself is wrong about whose session it has (SPEC 11)', async () => {
    const { phone, server, tab, straight } = await sharedTablet();
    // A server that says of every session that it is Ada’s: the device offers, and Ben’s session would take it in.
    phone.line = async (address, init) => {
      if (!address.endsWith('/index')) return straight(address, init);
      return server.handle(address, init, ada);
    };
    await tab.openPerson(ada.id, '2580');
    const entry = await tab.record(at, 'reading', reading('A1', 44));
    const pushed: string[] = [];
    const line = phone.line;
    phone.line = (address, init) => {
      if (address.endsWith('/push')) pushed.push(address);
      return line(address, init);
    };
    await tab.syncNow();
    expect(pushed.length).toBeGreaterThan(0);
    expect(server.entries.some((one) => one.id === entry.id)).toBe(false);
    expect(tab.snapshot().sync).toMatchObject({ waitingEntries: 1, refusedEntries: 0 });

    // Negative control: with a server that takes anybody's entries, it is seen in whose session they came.
    server.flaws.takesFromAnybody = true;
    await tab.syncNow();
    expect(server.sentBy.get(entry.id)).toBe(ben.id);
    await phone.kill();
  });

  it('never records in the name of the next person what was entered on the last one’s screen (SPEC 31)', async () => {
    const { phone, tab } = await sharedTablet();
    const second = await phone.tab();
    const outcomes = new Set<string>();
    for (let steps = 0; steps < 40; steps += 1) {
      await tab.openPerson(ada.id, '2580');
      await settle();
      expect(second.snapshot().person?.id).toBe(ada.id);
      await tab.openPerson(ben.id, '7391');
      for (let step = 0; step < steps; step += 1) await new Promise((done) => setImmediate(done));
      const shown = second.snapshot().person?.id;
      const by = await second.record(at, 'note', note('on the screen')).then(
        (entry) => entry.authorId,
        () => 'nobody',
      );
      expect([shown, 'nobody']).toContain(by);
      outcomes.add(by);
      await settle();
    }
    expect(outcomes.size).toBeGreaterThan(1);
    await phone.kill();
  });

  it('leaves the device to who opened it by PIN when somebody’s session comes up, through a reload (SPEC 33)', async () => {
    const { phone, server, straight, clock } = await sharedTablet();
    await phone.kill();
    let noted: string | null = null;
    const tabNote = { read: () => noted, write: (personId: string) => void (noted = personId) };
    const tab = await phone.tab({ tabNote });
    await tab.openPerson(ada.id, '2580');
    phone.line = straight;
    server.session = ben;
    clock.advance(31_000);
    await tab.syncNow();
    expect(tab.snapshot()).toMatchObject({ person: { id: ada.id }, sync: { signedInAs: 'Ben' } });
    await phone.kill();
    const reloaded = await phone.tab({ tabNote });
    expect(reloaded.snapshot().person?.id).toBe(ada.id);
    await phone.kill();
  });

  it('hands over in every tab at once, and opens in every tab (SPEC 30)', async () => {
    const { phone, tab } = await sharedTablet();
    const second = await phone.tab();
    await tab.openPerson(ben.id, '7391');
    await settle();
    expect(second.snapshot().person?.id).toBe(ben.id);
    await second.handOver();
    await settle();
    expect(tab.snapshot()).toMatchObject({ person: null, asks: true });
    await phone.kill();
  });
});

describe('the PIN of a person on this device', () => {
  const pin = '80351947';

  async function withPin(): Promise<{ phone: Phone; tab: RunningDevice; place: Site }> {
    const place = site();
    const tab = await signIn(place, ada, pin);
    await tab.record(at, 'note', note('a note with 61728394 in it'));
    await tab.handOver();
    return { phone: place.phone, tab, place };
  }

  it('is kept nowhere, only what it was slowly made into (SPEC 32)', async () => {
    const { phone } = await withPin();
    await phone.kill();
    const found = await wholeStore(phone);
    expect(found.includes(pin)).toBe(false);
    expect(found.includes(Buffer.from(pin).toString('base64').slice(0, 10))).toBe(false);
    // The same search finds what is kept plainly.
    expect(found.includes('61728394')).toBe(true);
    const kept = JSON.parse(/\{"salt":[^}]*\}/.exec(found)?.[0] ?? '{}') as Record<string, unknown>;
    expect(kept.iterations).toBeGreaterThanOrEqual(200_000);
    expect(Buffer.from(String(kept.salt), 'base64').length).toBe(16);
    expect(Buffer.from(String(kept.hash), 'base64').length).toBe(32);
  });

  it('is salted: the same digits of two people are kept as two different hashes', async () => {
    const place = site();
    await signIn(place, ada, pin);
    await place.phone.kill();
    await signIn(place, ben, pin);
    await place.phone.kill();
    const hashes = [...(await wholeStore(place.phone)).matchAll(/"hash":"([^"]{44})"/g)].map(
      ([, one]) => one,
    );
    expect(new Set(hashes).size).toBe(2);
  });

  it('makes wrong tries wait longer and longer, through a reload (SPEC 32)', async () => {
    const { phone, tab, place } = await withPin();
    const tries: (number | null)[] = [];
    let current = tab;
    for (let count = 0; count < 5; count += 1) {
      const answer = await current.openPerson(ada.id, '0000');
      if (answer.ok) throw new Error('opened');
      expect(answer.reason).toBe('wrong');
      tries.push(answer.waitUntil === null ? null : answer.waitUntil - place.clock.now());
      await phone.kill();
      current = await phone.tab();
      if (answer.waitUntil !== null) {
        // Even the right one is not looked at before the wait is over.
        expect(await current.openPerson(ada.id, pin)).toMatchObject({ ok: false, reason: 'wait' });
        place.clock.advance(answer.waitUntil - place.clock.now());
      }
    }
    expect(tries).toEqual([null, null, 15_000, 30_000, 60_000]);
    expect(await current.openPerson(ada.id, pin)).toEqual({ ok: true });
    await current.handOver();
    expect(await current.openPerson(ada.id, '0000')).toMatchObject({ reason: 'wrong', waitUntil: null });
    await phone.kill();
  });

  it('is closed after ten wrong tries, until its person signs in with the password (SPEC 32)', async () => {
    const { phone, tab, place } = await withPin();
    for (let count = 0; count < 10; count += 1) {
      await tab.openPerson(ada.id, '0000');
      place.clock.advance(3_600_000);
    }
    expect(await tab.openPerson(ada.id, pin)).toMatchObject({ ok: false, reason: 'closed' });
    expect(tab.snapshot().people[0]?.pin.state).toBe('closed');
    await phone.kill();
    expect(await (await phone.tab()).openPerson(ada.id, pin)).toMatchObject({ reason: 'closed' });
    await phone.kill();

    const other = await signIn(place, ben);
    expect(await other.openPerson(ada.id, pin)).toMatchObject({ reason: 'closed' });
    await phone.kill();
    const own = await signIn(place, ada);
    expect(own.snapshot().person?.id).toBe(ada.id);
    await own.handOver();
    expect(await own.openPerson(ada.id, pin)).toEqual({ ok: true });
    await phone.kill();
  });

  it('ends a wait that a clock set back would have made endless', async () => {
    const { phone, tab, place } = await withPin();
    for (let count = 0; count < 3; count += 1) await tab.openPerson(ada.id, '0000');
    phone.clockSkewMs = -86_400_000;
    expect(await tab.openPerson(ada.id, pin)).toMatchObject({ reason: 'wait' });
    place.clock.advance(15_000);
    expect(await tab.openPerson(ada.id, pin)).toEqual({ ok: true });
    await phone.kill();
  });

  it('is changed with the one so far, or after signing in with the password (SPEC 32)', async () => {
    const { phone, tab, place } = await withPin();
    await tab.openPerson(ada.id, pin);
    await settle();
    expect(tab.snapshot().pin).toEqual({ set: true, needsCurrent: true });
    expect(await tab.setPin('2468', null)).toMatchObject({ ok: false, reason: 'wrong' });
    expect(await tab.setPin('2468', '1357')).toMatchObject({ ok: false, reason: 'wrong' });
    expect(await tab.setPin('2468', pin)).toEqual({ ok: true });
    await tab.handOver();
    expect(await tab.openPerson(ada.id, pin)).toMatchObject({ reason: 'wrong' });
    await phone.kill();
    const own = await signIn(place, ada);
    expect(own.snapshot().pin).toEqual({ set: true, needsCurrent: false });
    expect(await own.setPin('97531', null)).toEqual({ ok: true });
    await own.handOver();
    expect(await own.openPerson(ada.id, '97531')).toEqual({ ok: true });
    await phone.kill();
  });

  it.each([
    ['123', /4 to 8 digits/],
    ['123456789', /4 to 8 digits/],
    ['12a4', /digits only/],
    ['1111', /try this one first/],
    ['3456', /try this one first/],
    ['8765', /try this one first/],
  ])('cannot be %s', async (unfit, says) => {
    const place = site();
    const tab = await signIn(place, ada);
    const answer = await tab.setPin(unfit, null);
    expect(answer).toMatchObject({ ok: false, reason: 'unfit' });
    if (!answer.ok) expect(answer.sentence).toMatch(says);
    await place.phone.kill();
  });
});
