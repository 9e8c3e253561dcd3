import { PutObjectCommand, S3Client } from '@aws-sdk/client-s3';
import { existsSync, readdirSync } from 'node:fs';
import path from 'node:path';
import { beforeAll, describe, expect, it, vi } from 'vitest';
import { testSecrets } from '../../scripts/setup/test-cluster.mjs';
import { startLocalServices, type LocalServices } from './local-services';
import {
  announce,
  askUploadAddress,
  photoEntry,
  photograph,
  put,
  sayUploaded,
  send,
  uploadAddressOf,
  type PutAddress,
  type TakenPhoto,
} from './photo-routes';
import { putCut } from './put-raw';
import { outcomesOf, planPour, push } from './record-routes';
import { runJobs } from './run-jobs';
import { APP_ORIGIN, openWorld, type TestDevice, type TestPerson } from './world';

let services: LocalServices;
const world = openWorld(async () => (services = await startLocalServices()));
let phone: TestDevice;
let inspector: TestPerson;
let taken: TakenPhoto;
let address: PutAddress;

beforeAll(async () => {
  inspector = world().team.inspector;
  phone = world().device(inspector, await planPour(world(), 'P-01'));
  taken = await announce(world(), phone, await photograph());
  address = await uploadAddressOf(world(), inspector, taken.photoId);
});

/** Every file that the store keeps, those being written included. */
const kept = (): string[] =>
  existsSync(services.objectsFolder)
    ? readdirSync(services.objectsFolder, { recursive: true, encoding: 'utf8' }).filter((name) =>
        /\/(incoming|photos)\/./.test(name),
      )
    : [];
const codeOf = async (answer: Response) =>
  `${answer.status} ${/<Code>(\w+)<\/Code>/.exec(await answer.text())?.[1] ?? ''}`.trim();
const changed = (change: (url: URL) => void): PutAddress => {
  const url = new URL(address.url);
  change(url);
  return { ...address, url: url.href };
};

describe('the address for a photograph', () => {
  it('is given only to the person who took it, and only once its entry is there', async () => {
    const w = world();
    expect(await askUploadAddress(w, w.team.superintendent, taken.photoId)).toMatchObject({
      status: 403,
      body: { code: 'not-allowed' },
    });
    expect(await askUploadAddress(w, w.otherTeam.inspector, taken.photoId)).toMatchObject({ status: 404 });
    const unannounced = photoEntry(phone, await photograph());
    expect(await askUploadAddress(w, inspector, String(unannounced.body.photoId))).toMatchObject({
      status: 404,
      body: { code: 'not-found' },
    });
  });

  it('is not given for more bytes than a photograph may have', async () => {
    const entry = photoEntry(phone, await photograph());
    const large = { ...entry, body: { ...entry.body, bytes: 20_000_001 } };
    const [outcome] = outcomesOf(await push(world(), phone, [large]));
    expect(outcome).toMatchObject({ id: entry.id, outcome: 'refused', field: 'bytes' });
    expect(await askUploadAddress(world(), inspector, String(entry.body.photoId))).toMatchObject({
      status: 404,
    });
  });
});

describe('the object store refuses', () => {
  it.each<[string, () => PutAddress, string]>([
    [
      'a changed signature',
      () =>
        changed(({ searchParams }) => {
          const signature = searchParams.get('X-Amz-Signature') ?? '';
          const last = signature.endsWith('0') ? '1' : '0';
          searchParams.set('X-Amz-Signature', signature.slice(0, -1) + last);
        }),
      '403 SignatureDoesNotMatch',
    ],
    ['no signature', () => changed((url) => (url.search = '')), '403 AccessDenied'],
    [
      'an address made to last longer',
      () => changed(({ searchParams }) => searchParams.set('X-Amz-Expires', '604800')),
      '403 SignatureDoesNotMatch',
    ],
    [
      'an address led to another key',
      () => changed((url) => (url.pathname = url.pathname.replace('/incoming/', '/photos/'))),
      '403 SignatureDoesNotMatch',
    ],
    [
      'an address that no longer signs the length',
      () => changed(({ searchParams }) => searchParams.set('X-Amz-SignedHeaders', 'content-type;host')),
      '403 SignatureDoesNotMatch',
    ],
    [
      'another type than announced',
      () => ({ ...address, headers: { 'Content-Type': 'text/html' } }),
      '403 SignatureDoesNotMatch',
    ],
    [
      'a header that asks for more than was signed',
      () => ({ ...address, headers: { ...address.headers, 'x-amz-copy-source': '/photos/photos/other' } }),
      '403 AccessDenied',
    ],
  ])('%s', async (_what, wrong, code) => {
    expect(await codeOf(await put(wrong(), taken.bytes))).toBe(code);
    expect(kept()).toEqual([]);
  });

  it.each([-1, 1])('another length than announced: %i', async (more) => {
    const body = more < 0 ? taken.bytes.subarray(0, more) : Buffer.concat([taken.bytes, Buffer.from('x')]);
    expect(await codeOf(await put(address, body))).toBe('403 SignatureDoesNotMatch');
    expect(kept()).toEqual([]);
  });

  it('an address that is a quarter of an hour old', async () => {
    const old = await longAgo(15 * 60_000 + 5000, () => uploadAddressOf(world(), inspector, taken.photoId));
    expect(await codeOf(await put(old, taken.bytes))).toBe('403 AccessDenied');
    expect(kept()).toEqual([]);
    // The same, a little younger, is taken: it is the age that was refused.
    const young = await longAgo(14 * 60_000, () => uploadAddressOf(world(), inspector, taken.photoId));
    expect((await put(young, taken.bytes)).status).toBe(200);
  });

  it('pages of another origin, before they send anything', async () => {
    const ask = (origin: string) =>
      fetch(address.url, {
        method: 'OPTIONS',
        headers: {
          origin,
          'access-control-request-method': 'PUT',
          'access-control-request-headers': 'content-type',
        },
      });
    const own = await ask(APP_ORIGIN);
    expect([own.status, own.headers.get('access-control-allow-origin')]).toEqual([204, APP_ORIGIN]);
    const other = await ask('http://elsewhere.example.test');
    expect([other.status, other.headers.get('access-control-allow-origin')]).toEqual([403, null]);
    const answer = await fetch(address.url, { headers: { origin: 'http://elsewhere.example.test' } });
    expect(answer.headers.get('access-control-allow-origin')).toBeNull();
  });

  it('a body of other bytes than the server signed', async () => {
    const client = new S3Client({
      endpoint: services.objectsUrl,
      region: 'local',
      forcePathStyle: true,
      credentials: { accessKeyId: testSecrets.S3_ACCESS_KEY, secretAccessKey: testSecrets.S3_SECRET_KEY },
      requestChecksumCalculation: 'WHEN_REQUIRED',
    });
    const write = (Key: string) =>
      client.send(new PutObjectCommand({ Bucket: 'photos', Key, Body: Buffer.from('signed so') }));
    await write('photos/as-signed');
    client.middlewareStack.add(
      (next) => (args) => {
        Object.assign(args.request as object, { body: Buffer.from('sent thus') });
        return next(args);
      },
      { step: 'finalizeRequest', priority: 'low' },
    );
    await expect(write('photos/otherwise')).rejects.toThrow('not the one that was signed');
    const names = kept().filter((name) => !name.includes('incoming'));
    expect(names.map((name) => path.basename(name)).sort()).toEqual(['as-signed', 'as-signed.meta']);
    client.destroy();
  });

  it.each([1, 50, 99])(
    'a body that ends after %i per cent, and takes it whole afterwards',
    async (percent) => {
      const w = world();
      const photo = await announce(w, phone, await photograph(400, 300));
      const place = await uploadAddressOf(w, inspector, photo.photoId);
      const cut = Math.max(1, Math.floor((photo.bytes.length * percent) / 100));
      expect(await putCut(place, photo.bytes, cut)).not.toContain(' 200 ');
      await vi.waitFor(() => expect(kept().filter((name) => name.includes(photo.photoId))).toEqual([]));
      // Said all the same, nothing counts: the photograph waits, and a job that finds nothing is done with it.
      await sayUploaded(w, inspector, photo.photoId);
      await runJobs(w);
      expect(await w.owner('photos').where({ id: photo.photoId }).first()).toMatchObject({
        state: 'waiting',
      });
      await send(w, inspector, photo);
      await runJobs(w);
      expect(await w.owner('photos').where({ id: photo.photoId }).first()).toMatchObject({ state: 'stored' });
    },
  );
});

/** Carries out what would have been asked for some time ago. */
async function longAgo<T>(ms: number, work: () => Promise<T>): Promise<T> {
  vi.useFakeTimers({ toFake: ['Date'], now: Date.now() - ms });
  try {
    return await work();
  } finally {
    vi.useRealTimers();
  }
}
