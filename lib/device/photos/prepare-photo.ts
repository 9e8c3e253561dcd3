import { DeviceError } from '../device-types';

export type PhotoType = 'image/jpeg' | 'image/png' | 'image/webp';

/** A photo as it is stored and sent. */
export interface PreparedPhoto {
  bytes: ArrayBuffer;
  contentType: PhotoType;
  /** SHA-256 of the bytes, lower-case hex. */
  sha256: string;
}

/** What the preparation needs of the browser. */
export interface PhotoTools {
  /** Rejects when the bytes are no picture that can be shown. */
  sizeOf(file: Blob): Promise<{ width: number; height: number }>;
  compress(file: Blob): Promise<Blob>;
  digest(bytes: ArrayBuffer): Promise<ArrayBuffer>;
}

const LARGEST_FILE = 60_000_000;
const LARGEST_SENT = 15_000_000;
const MOST_PIXELS = 120_000_000;

/**
 * A picture from the camera or a file, made small enough to send, with the digest of what is sent.
 * @throws DeviceError `not-an-image` when it is no picture, is empty, or is too large; the sentence says which
 */
export async function preparePhoto(file: Blob, tools: PhotoTools): Promise<PreparedPhoto> {
  if (file.size === 0) throw refused('This file is empty. Take the photo again.');
  if (file.size > LARGEST_FILE)
    throw refused('This file is too large (more than 60 MB). Take the photo with the camera of this device.');
  const size = await tools.sizeOf(file).catch(() => null);
  if (!size)
    throw refused('This file is not a picture that can be shown, or it was cut off. Take the photo again.');
  if (size.width * size.height > MOST_PIXELS)
    throw refused('This picture has too many pixels. Take the photo with the camera of this device.');
  const small = await tools.compress(file).catch(() => null);
  if (!small || small.size === 0)
    throw refused('This picture could not be made smaller. Take the photo again.');
  const bytes = await small.arrayBuffer();
  const contentType = photoTypeOf(new Uint8Array(bytes));
  if (!contentType) throw refused('This picture has a format that cannot be kept. Use JPEG, PNG or WebP.');
  if (bytes.byteLength > LARGEST_SENT)
    throw refused('This picture is still too large after making it smaller. Take the photo again.');
  return { bytes, contentType, sha256: hex(await tools.digest(bytes)) };
}

const refused = (sentence: string) => new DeviceError('not-an-image', `${sentence} Nothing was added.`);

/** The type by the first bytes: what a file calls itself is not asked. */
export function photoTypeOf(bytes: Uint8Array): PhotoType | null {
  const starts = (signature: readonly number[], at = 0) =>
    signature.every((byte, index) => bytes[at + index] === byte);
  if (starts([0xff, 0xd8, 0xff])) return 'image/jpeg';
  if (starts([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a])) return 'image/png';
  if (starts([0x52, 0x49, 0x46, 0x46]) && starts([0x57, 0x45, 0x42, 0x50], 8)) return 'image/webp';
  return null;
}

const hex = (digest: ArrayBuffer): string =>
  Array.from(new Uint8Array(digest), (byte) => byte.toString(16).padStart(2, '0')).join('');
