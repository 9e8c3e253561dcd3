import { readFile, writeFile } from 'node:fs/promises';
import path from 'node:path';
import sharp from 'sharp';
import { beforeAll, describe, expect, it, vi } from 'vitest';
import type { Hold } from '@/lib/inspection/sheet-types';
import { startLocalServices, type LocalServices } from './local-services';
import { photoProblems } from './photo-problems';
import {
  announce,
  askAddress,
  askUploadAddress,
  photograph,
  put,
  sayUploaded,
  send,
  uploadAddressOf,
  type TakenPhoto,
} from './photo-routes';
import { planPour, pull, pushKept } from './record-routes';
import { runJobs, waitingJobs } from './run-jobs';
import { deckPlan, openWorld, type TestDevice, type TestPerson } from './world';

let services: LocalServices;
const world = openWorld(async () => (services = await startLocalServices()));
let pourId: string;
let phone: TestDevice;
let inspector: TestPerson;

beforeAll(async () => {
  const { checklist } = deckPlan();
  const items = checklist.items.map((item) => ({ ...item, evidence: 'photo' as const }));
  inspector = world().team.inspector;
  pourId = await planPour(world(), 'P-01', undefined, { checklist: { ...checklist, items } });
  phone = world().device(inspector, pourId);
});

const taken = async (more?: Parameters<typeof announce>[3]): Promise<TakenPhoto> =>
  announce(world(), phone, await photograph(), more);

/** What the record says of a photograph's bytes, as any device pulls it. */
async function saidOf({ photoId }: TakenPhoto) {
  const { entries } = (await pull(world(), inspector, pourId)).pours[0]!;
  return entries.filter((entry) => entry.type !== 'photo' && entry.body.photoId === photoId);
}

const stateOf = async ({ photoId }: TakenPhoto) =>
  (await world().owner('photos').where({ id: photoId }).first<{ state: string }>('state')).state;

const objectFile = (key: string) => path.join(services.objectsFolder, 'photos', key);

async function written(key: string, bytes: Buffer): Promise<void> {
  const { writeObject } = await import('@/lib/server/object-storage');
  await writeObject(key, bytes, 'image/jpeg');
}

describe('a photograph that was sent', () => {
  it('is on record as stored once, is seen by its project, and by nobody else', async () => {
    const w = world();
    const photo = await taken();
    await send(w, inspector, photo);
    expect(await askAddress(w, inspector, photo.photoId)).toMatchObject({
      status: 404,
      body: { code: 'not-found' },
    });
    await runJobs(w);
    expect(await saidOf(photo)).toMatchObject([
      {
        type: 'photo-stored',
        authorId: inspector.id,
        body: { bytes: photo.bytes.length, contentType: 'image/jpeg', widthPx: 64, heightPx: 48 },
      },
    ]);

    const { status, body } = await askAddress(w, w.team.viewer, photo.photoId);
    expect(status).toBe(200);
    const shown = await fetch(String(body.url));
    expect(Buffer.from(await shown.arrayBuffer()).equals(photo.bytes)).toBe(true);
    expect(Object.fromEntries(shown.headers)).toMatchObject({
      'content-type': 'image/jpeg',
      'x-content-type-options': 'nosniff',
      'content-security-policy': expect.stringContaining('sandbox') as string,
    });
    for (const stranger of [w.otherTeam.inspector, w.otherTeam.coordinator])
      expect(await askAddress(w, stranger, photo.photoId)).toMatchObject({ status: 404 });

    // The address is for a while, for reading, and for this photograph.
    const other = await taken();
    await send(w, inspector, other);
    await runJobs(w);
    const otherUrl = new URL(String((await askAddress(w, inspector, other.photoId)).body.url));
    const swapped = new URL(String(body.url));
    swapped.pathname = otherUrl.pathname;
    expect((await fetch(swapped)).status).toBe(403);
    expect((await fetch(String(body.url), { method: 'DELETE' })).status).toBe(403);
    vi.useFakeTimers({ toFake: ['Date'], now: Date.now() - 5 * 60_000 - 5000 });
    const old = await askAddress(w, inspector, photo.photoId).finally(() => vi.useRealTimers());
    expect((await fetch(String(old.body.url))).status).toBe(403);
    expect(await photoProblems(w)).toEqual([]);
  });

  it('is stored once, also when the job runs twice, one after the other or at once', async () => {
    const w = world();
    const { verifyPhoto } = await import('@/lib/server/photos/verify-photo');
    const now = () => new Date().toISOString();
    const photos = await Promise.all(Array.from({ length: 6 }, () => taken()));
    for (const photo of photos) {
      await send(w, inspector, photo);
      await sayUploaded(w, inspector, photo.photoId);
      await Promise.all([1, 2, 3].map(() => verifyPhoto(w.projectId, photo.photoId, now)));
    }
    // Each was said to be there twice, so two jobs wait for each of them.
    expect((await waitingJobs(w)).filter((job) => job.name === 'verify-photo')).toHaveLength(12);
    await Promise.all([runJobs(w), runJobs(w)]);
    for (const photo of photos) expect(await saidOf(photo)).toMatchObject([{ type: 'photo-stored' }]);
    expect(await photoProblems(w)).toEqual([]);
    expect(await askUploadAddress(w, inspector, photos[0]!.photoId)).toMatchObject({
      status: 409,
      body: { code: 'conflict' },
    });
  });

  it('keeps its bytes, whatever is put to its address later', async () => {
    const w = world();
    const photo = await taken();
    const address = await uploadAddressOf(w, inspector, photo.photoId);
    expect((await put(address, photo.bytes)).status).toBe(200);
    await sayUploaded(w, inspector, photo.photoId);
    await runJobs(w);

    const other = Buffer.from(photo.bytes);
    other.reverse();
    expect((await put(address, other)).status).toBe(200);
    expect(await sayUploaded(w, inspector, photo.photoId)).toMatchObject({ body: { state: 'stored' } });
    const { verifyPhoto } = await import('@/lib/server/photos/verify-photo');
    await verifyPhoto(w.projectId, photo.photoId, () => new Date().toISOString());
    expect(await saidOf(photo)).toHaveLength(1);
    const shown = await fetch(String((await askAddress(w, inspector, photo.photoId)).body.url));
    expect(Buffer.from(await shown.arrayBuffer()).equals(photo.bytes)).toBe(true);
    expect(await photoProblems(w)).toEqual([]);
  });
});

describe('bytes that are not those announced', () => {
  const flipped = (bytes: Buffer) => {
    const copy = Buffer.from(bytes);
    copy[copy.length >> 1]! ^= 1;
    return copy;
  };
  it.each<[string, (bytes: Buffer) => Buffer]>([
    ['one flipped bit', flipped],
    ['cut at 1 per cent', (bytes) => bytes.subarray(0, Math.ceil(bytes.length / 100))],
    ['cut at 50 per cent', (bytes) => bytes.subarray(0, bytes.length >> 1)],
    ['cut at 99 per cent', (bytes) => bytes.subarray(0, Math.floor(bytes.length * 0.99))],
    ['larger than any photograph may be', (bytes) => Buffer.concat([bytes, Buffer.alloc(26_000_000)])],
  ])('are never stored, and may be sent again: %s', async (_what, harm) => {
    const w = world();
    const photo = await taken();
    // Bytes of the announced length pass through the address. For the others the store is taken to have let them in.
    const harmed = harm(photo.bytes);
    if (harmed.length === photo.bytes.length)
      expect((await put(await uploadAddressOf(w, inspector, photo.photoId), harmed)).status).toBe(200);
    else await written(`incoming/${photo.photoId}`, harmed);
    await sayUploaded(w, inspector, photo.photoId);
    await runJobs(w);
    expect(await waitingJobs(w)).toEqual([]);
    expect([await stateOf(photo), await saidOf(photo)]).toEqual(['waiting', []]);
    expect(await askAddress(w, inspector, photo.photoId)).toMatchObject({ status: 404 });

    await send(w, inspector, photo);
    await runJobs(w);
    expect(await saidOf(photo)).toMatchObject([{ type: 'photo-stored' }]);
    expect(await photoProblems(w)).toEqual([]);
  });
});

describe('bytes that are as announced, and no photograph', () => {
  const script = Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>');
  const plain = (widthPx: number, heightPx: number) =>
    sharp({ create: { width: widthPx, height: heightPx, channels: 3, background: 'grey' } })
      .png()
      .toBuffer();

  it.each<[string, () => Promise<Buffer>, string, RegExp]>([
    ['text', () => Promise.resolve(Buffer.from('no image at all')), 'image/jpeg', /not a photograph/],
    ['a drawing with a script', () => Promise.resolve(script), 'image/png', /not a photograph/],
    ['another type of image', () => plain(10, 10), 'image/jpeg', /is image\/png.*announced as image\/jpeg/],
    ['half an image', async () => (await photograph(400, 300)).subarray(0, 2000), 'image/jpeg', /damaged/],
    ['too many pixels', () => plain(9000, 7000), 'image/png', /63 megapixels, and at most 60/],
  ])('are refused on record, with the reason: %s', async (_what, make, contentType, reason) => {
    const w = world();
    const { verifyPhoto } = await import('@/lib/server/photos/verify-photo');
    const photo = await announce(w, phone, await make(), { contentType });
    await send(w, inspector, photo);
    // Two workers at once, and the job itself: still refused once.
    const now = () => new Date().toISOString();
    await Promise.all([1, 2].map(() => verifyPhoto(w.projectId, photo.photoId, now)));
    await runJobs(w);
    expect(await saidOf(photo)).toMatchObject([
      { type: 'photo-refused', body: { problem: expect.stringMatching(reason) as string } },
    ]);
    expect(await sayUploaded(w, inspector, photo.photoId)).toMatchObject({ body: { state: 'refused' } });
    expect(await askAddress(w, inspector, photo.photoId)).toMatchObject({ status: 404 });
    await runJobs(w);
    expect(await photoProblems(w)).toEqual([]);
  });
});

describe('a check that asks for a photograph', () => {
  /** The holds about a check's photograph, as the refusal of a release tells them. */
  async function photoHolds(checkId: string): Promise<Hold[]> {
    const { POST } = await import('@/app/api/pours/[pourId]/release/route');
    const answer = await world().call(POST, {
      as: world().team.superintendent,
      params: { pourId },
      body: { scope: { elementIds: null, limits: '' } },
    });
    const { holds } = answer.body.detail as { holds: Hold[] };
    return holds.filter((hold) => hold.id === `photo-missing:check:${checkId}`);
  }

  it('holds until the photograph is stored, and not once it is', async () => {
    const w = world();
    await pushKept(w, phone, [phone.entry('answer', { checkId: 'bars', answer: 'met' })]);
    expect(await photoHolds('bars')).toHaveLength(1);
    const photo = await taken({ about: { kind: 'check', id: 'bars' } });
    expect(await photoHolds('bars')).toHaveLength(1);
    await send(w, inspector, photo);
    expect(await photoHolds('bars')).toHaveLength(1);
    await runJobs(w);
    expect(await photoHolds('bars')).toEqual([]);
  });

  it('goes on holding when the photograph is refused, and says why', async () => {
    const w = world();
    await pushKept(w, phone, [phone.entry('answer', { checkId: 'clean', answer: 'met' })]);
    const photo = await announce(w, phone, Buffer.from('no image'), {
      about: { kind: 'check', id: 'clean' },
    });
    await send(w, inspector, photo);
    await runJobs(w);
    const [hold] = await photoHolds('clean');
    expect(JSON.stringify(hold)).toContain('not a photograph');
  });
});

describe('the checker of these tests', () => {
  it('finds changed bytes, missing bytes, a second entry and one that is missing', async () => {
    const w = world();
    const photos = await Promise.all(Array.from({ length: 4 }, () => taken()));
    for (const photo of photos) await send(w, inspector, photo);
    await runJobs(w);
    expect(await photoProblems(w)).toEqual([]);

    const [changed, missing, doubled, unsaid] = photos as [TakenPhoto, TakenPhoto, TakenPhoto, TakenPhoto];
    const keyOf = async (photo: TakenPhoto) => String((await saidOf(photo))[0]!.body.key);
    const file = objectFile(await keyOf(changed));
    const bytes = await readFile(file);
    bytes[100]! ^= 1;
    await writeFile(file, bytes);
    const { deleteObject } = await import('@/lib/server/object-storage');
    await deleteObject(await keyOf(missing));
    const again = (await saidOf(doubled))[0]!;
    await w.owner.raw(
      `insert into entries select (jsonb_populate_record(e, '{"id": "${crypto.randomUUID()}", "seq": 99999}')).*
       from entries e where e.id = ?`,
      [again.id],
    );
    const waiting = await taken();
    const asStored = await w.owner('photos').where({ id: unsaid.photoId }).first<{ object_key: string }>();
    await w
      .owner('photos')
      .where({ id: waiting.photoId })
      .update({ state: 'stored', object_key: asStored.object_key });

    const problems = await photoProblems(w);
    const about = (photo: TakenPhoto) =>
      problems.filter((one) => one.startsWith(photo.photoId)).map((one) => one.slice(38));
    expect(about(changed)).toEqual([
      'the bytes are not those that were announced',
      'the record names other bytes',
    ]);
    expect(about(missing)).toEqual(['stored, and no bytes are there']);
    expect(about(doubled)).toEqual(['stored, with 2 entries that say it is stored']);
    expect(about(waiting)).toContain('stored, with 0 entries that say it is stored');
    expect(about(unsaid)).toEqual([]);
  });
});
