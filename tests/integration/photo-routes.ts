import { createHash } from 'node:crypto';
import sharp from 'sharp';
import { v7 as uuid } from 'uuid';
import { pushKept } from './record-routes';
import type { Answer, TestDevice, TestPerson, World } from './world';

/** Bytes that are a photograph, each unlike the others. */
export function photograph(widthPx = 64, heightPx = 48): Promise<Buffer> {
  const noise = { type: 'gaussian', mean: 128, sigma: 60 } as const;
  return sharp({ create: { width: widthPx, height: heightPx, channels: 3, background: 'black', noise } })
    .jpeg()
    .toBuffer();
}

export interface TakenPhoto {
  photoId: string;
  entryId: string;
  bytes: Buffer;
}

interface PhotoMore {
  contentType?: string;
  about?: { kind: string; id: string };
}

/** The entry that announces a photograph, as the phone writes it. */
export function photoEntry(device: TestDevice, bytes: Buffer, more: PhotoMore = {}) {
  return device.entry('photo', {
    photoId: uuid(),
    sha256: createHash('sha256').update(bytes).digest('hex'),
    bytes: bytes.length,
    contentType: more.contentType ?? 'image/jpeg',
    takenAt: new Date().toISOString(),
    about: more.about ?? { kind: 'pour', id: device.pourId ?? '' },
    shot: 'close',
    caption: '',
  });
}

/** Announces a photograph; its bytes are still to come. */
export async function announce(
  world: World,
  device: TestDevice,
  bytes: Buffer,
  more: PhotoMore = {},
): Promise<TakenPhoto> {
  const entry = photoEntry(device, bytes, more);
  await pushKept(world, device, [entry]);
  return { photoId: String(entry.body.photoId), entryId: entry.id, bytes };
}

export interface PutAddress {
  url: string;
  headers: Record<string, string>;
  expiresAt: string;
}

export async function askUploadAddress(world: World, as: TestPerson, photoId: string): Promise<Answer> {
  const { POST } = await import('@/app/api/photos/[photoId]/upload-address/route');
  return world.call(POST, { as, params: { photoId }, body: {} });
}

/** The address at which a photograph's bytes are put. */
export async function uploadAddressOf(world: World, as: TestPerson, photoId: string): Promise<PutAddress> {
  const answer = await askUploadAddress(world, as, photoId);
  if (answer.status !== 200) throw new Error(`no address: ${JSON.stringify(answer.body)}`);
  return answer.body as unknown as PutAddress;
}

export function put(address: PutAddress, bytes: Buffer): Promise<Response> {
  return fetch(address.url, { method: 'PUT', headers: address.headers, body: new Uint8Array(bytes) });
}

/** Says that the bytes are there, as the phone does once they were put. */
export async function sayUploaded(world: World, as: TestPerson, photoId: string): Promise<Answer> {
  const { POST } = await import('@/app/api/photos/[photoId]/uploaded/route');
  return world.call(POST, { as, params: { photoId }, body: {} });
}

export async function askAddress(world: World, as: TestPerson, photoId: string): Promise<Answer> {
  const { GET } = await import('@/app/api/photos/[photoId]/address/route');
  return world.call(GET, { as, params: { photoId } });
}

/** Puts the bytes and says so; the job that looks at them is still to be run. */
export async function send(world: World, as: TestPerson, { photoId, bytes }: TakenPhoto): Promise<void> {
  const answer = await put(await uploadAddressOf(world, as, photoId), bytes);
  if (answer.status !== 200) throw new Error(`not taken: ${await answer.text()}`);
  const told = await sayUploaded(world, as, photoId);
  if (told.status !== 200) throw new Error(`not heard: ${JSON.stringify(told.body)}`);
}
