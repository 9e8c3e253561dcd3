import { describe, expect, it } from 'vitest';
import { jpeg, settle } from '@/tests/faults/world/phone';
import { at, note, pourId, site } from '@/tests/faults/world/site';

const of = { about: { kind: 'pour' as const, id: pourId }, shot: 'close' as const, caption: 'B1 at grid C' };
const down = () => Promise.reject(new TypeError('down'));

describe('photos', () => {
  it('are kept with their entry, sent after it, and stored only once the record says so (SPEC 25, 26, 27)', async () => {
    const { phone, server, requests } = site();
    const tab = await phone.tab();
    const entry = await tab.addPhoto(at, jpeg(), of);
    await settle();
    expect(tab.snapshot().photos).toMatchObject([
      { progress: 'waiting', caption: 'B1 at grid C', bytes: 44 },
    ]);
    await tab.syncNow();
    expect(tab.snapshot().photos[0]?.progress).toBe('sent');
    await tab.syncNow();
    expect(tab.snapshot().photos[0]?.progress).toBe('stored');
    expect(server.entries.some((one) => one.type === 'photo-stored')).toBe(true);
    const order = requests
      .filter((one) => /push|upload-address|PUT|uploaded/.test(one))
      .map((one) => one.split(' ')[0]);
    expect(order).toEqual(['POST', 'POST', 'PUT', 'POST']);
    expect(entry.type).toBe('photo');
    await phone.kill();
  });

  it('wait behind readings (SPEC 25)', async () => {
    const { phone, straight, requests } = site();
    const tab = await phone.tab();
    await tab.addPhoto(at, jpeg(), of);
    phone.line = (address, init) => (address.endsWith('/push') ? down() : straight(address, init));
    await tab.record(at, 'note', note('first'));
    await tab.syncNow();
    expect(requests.some((one) => one.includes('/photos/'))).toBe(false);
    await phone.kill();
  });

  it('survive the page being killed, bytes and all (SPEC 26)', async () => {
    const { phone, straight, server } = site();
    const tab = await phone.tab();
    phone.line = down;
    await tab.addPhoto(at, jpeg(3), of);
    await phone.kill();
    const reopened = await phone.tab();
    const photo = reopened.snapshot().photos[0];
    expect(await reopened.photoAddress(photo?.photoId ?? '')).toBe('blob:image/jpeg');
    phone.line = straight;
    await reopened.syncNow();
    expect([...(server.photos.get(photo?.photoId ?? '') ?? [])].slice(4)).toEqual(Array(40).fill(3));
    await phone.kill();
  });

  it.each([
    ['text that calls itself a picture', new Blob(['hello'], { type: 'image/jpeg' }), /not a picture/],
    ['an empty file', new Blob([], { type: 'image/jpeg' }), /empty/],
    ['a file of more than 60 MB', new Blob([new Uint8Array(60_000_001)]), /too large/],
  ])('refuse %s, and add nothing (SPEC 26)', async (_name, file, says) => {
    const { phone } = site();
    const tab = await phone.tab();
    await expect(tab.addPhoto(at, file, of)).rejects.toMatchObject({
      code: 'not-an-image',
      message: expect.stringMatching(says) as string,
    });
    await settle();
    expect(tab.snapshot().photos).toEqual([]);
    expect(tab.snapshot().sync.waitingEntries).toBe(0);
    await phone.kill();
  });

  it.each(['cut', 'portal', 'refused by the store'])('an upload that is %s is sent again', async (how) => {
    const { phone, straight, server, clock } = site();
    const tab = await phone.tab();
    phone.line = (address, init) => {
      if (init.method !== 'PUT') return straight(address, init);
      if (how === 'cut') return down();
      return Promise.resolve(
        new Response(how === 'portal' ? '<html>' : 'denied', { status: how === 'portal' ? 200 : 403 }),
      );
    };
    await tab.addPhoto(at, jpeg(), of);
    await tab.syncNow();
    expect(tab.snapshot().photos[0]?.progress).toBe('waiting');
    expect(tab.snapshot().photos[0]?.problem).not.toBeNull();
    expect(server.photos.size).toBe(0);
    phone.line = straight;
    clock.advance(10_000);
    await tab.syncNow();
    await tab.syncNow();
    expect(tab.snapshot().photos[0]).toMatchObject({ progress: 'stored', problem: null });
    await phone.kill();
  });

  it('with a flipped byte on the way are sent once more, then shown as refused (SPEC 27)', async () => {
    const { phone, straight, server } = site();
    const tab = await phone.tab();
    let puts = 0;
    phone.line = (address, init) => {
      if (init.method !== 'PUT') return straight(address, init);
      puts += 1;
      const bytes = new Uint8Array(init.body as ArrayBuffer).slice();
      bytes[9] = 255;
      return straight(address, { ...init, body: bytes });
    };
    await tab.addPhoto(at, jpeg(), of);
    for (let turn = 0; turn < 5; turn += 1) await tab.syncNow();
    expect(puts).toBe(2);
    expect(server.entries.some((one) => one.type === 'photo-stored')).toBe(false);
    const photo = tab.snapshot().photos[0];
    expect(photo).toMatchObject({
      progress: 'refused',
      problem: expect.stringMatching(/not those/) as string,
    });
    await tab.forgetPhoto(photo?.photoId ?? '');
    await settle();
    expect(tab.snapshot().photos).toEqual([]);
    await phone.kill();
  });

  it('that were sent and never heard of again are sent again after a while', async () => {
    const { phone, straight, clock } = site();
    const tab = await phone.tab();
    let swallow = true;
    phone.line = (address, init) =>
      address.endsWith('/uploaded') && swallow
        ? Promise.resolve(new Response('{}', { headers: { 'content-type': 'application/json' } }))
        : straight(address, init);
    await tab.addPhoto(at, jpeg(), of);
    await tab.syncNow();
    expect(tab.snapshot().photos[0]?.progress).toBe('sent');
    swallow = false;
    clock.advance(11 * 60_000);
    await tab.syncNow();
    await tab.syncNow();
    expect(tab.snapshot().photos[0]?.progress).toBe('stored');
    await phone.kill();
  });

  it('whose entry the server refused are shown with that reason', async () => {
    const { phone, server } = site();
    const tab = await phone.tab();
    await tab.addPhoto(at, jpeg(), { ...of, caption: 'poison' });
    await tab.syncNow();
    expect(tab.snapshot().photos[0]).toMatchObject({ progress: 'refused', problem: 'This cannot be used.' });
    expect(server.photos.size).toBe(0);
    await phone.kill();
  });

  it('are shown from the server where the bytes are not here', async () => {
    const { phone } = site();
    const tab = await phone.tab();
    await tab.addPhoto(at, jpeg(), of);
    await tab.syncNow();
    const id = tab.snapshot().photos[0]?.photoId ?? '';
    await tab.syncNow();
    await tab.dropPour(pourId);
    expect(await tab.photoAddress(id)).toBe(`/store/${id}?signed`);
    await phone.kill();
  });
});
