import { createHash } from 'node:crypto';
import sharp from 'sharp';

/** More than any phone makes, and little enough to decode without harm. */
const MOST_PIXELS = 60_000_000;

const signatures: { contentType: string; matches: (bytes: Buffer) => boolean }[] = [
  {
    contentType: 'image/jpeg',
    matches: (bytes) => bytes[0] === 0xff && bytes[1] === 0xd8 && bytes[2] === 0xff,
  },
  {
    contentType: 'image/png',
    matches: (bytes) => bytes.subarray(0, 8).equals(Buffer.from('89504e470d0a1a0a', 'hex')),
  },
  {
    contentType: 'image/webp',
    matches: (bytes) =>
      bytes.toString('latin1', 0, 4) === 'RIFF' && bytes.toString('latin1', 8, 12) === 'WEBP',
  },
];

export interface Announced {
  bytes: number;
  sha256: string;
  contentType: string;
}

/** `again`: the bytes are not those announced, and may still come whole; `refused`: they never can be a photograph. */
export type Inspected =
  | { kind: 'good'; widthPx: number; heightPx: number }
  | { kind: 'again'; problem: string }
  | { kind: 'refused'; problem: string };

/**
 * Looks at uploaded bytes once, before they count: length, digest, type by content, and that they can be drawn to the
 * last row.
 */
export async function inspectImage(bytes: Buffer, announced: Announced): Promise<Inspected> {
  if (bytes.length !== announced.bytes) {
    const came = bytes.length < announced.bytes ? String(bytes.length) : 'More than the announced';
    return { kind: 'again', problem: `${came} of ${announced.bytes} bytes came. It has to be sent again.` };
  }
  if (createHash('sha256').update(bytes).digest('hex') !== announced.sha256) {
    return {
      kind: 'again',
      problem: 'The bytes that came are not those of the photograph. It has to be sent again.',
    };
  }
  const found = signatures.find((signature) => signature.matches(bytes));
  if (!found) return { kind: 'refused', problem: 'This file is not a photograph. Take it again.' };
  if (found.contentType !== announced.contentType) {
    return {
      kind: 'refused',
      problem: `This file is ${found.contentType}, and was announced as ${announced.contentType}. Take it again.`,
    };
  }
  return draw(bytes);
}

/** Reads the head first, so that an image made to fill the memory is never decoded; then all of it. */
async function draw(bytes: Buffer): Promise<Inspected> {
  try {
    const head = await sharp(bytes, { limitInputPixels: false }).metadata();
    if (head.width * head.height > MOST_PIXELS) {
      const [found, most] = [head.width * head.height, MOST_PIXELS].map((pixels) => Math.ceil(pixels / 1e6));
      const problem = `This image has ${found} megapixels, and at most ${most} can be shown. Take it again, smaller.`;
      return { kind: 'refused', problem };
    }
    const { info } = await sharp(bytes, { limitInputPixels: MOST_PIXELS, failOn: 'truncated' })
      .rotate()
      .raw()
      .toBuffer({ resolveWithObject: true });
    return { kind: 'good', widthPx: info.width, heightPx: info.height };
  } catch {
    return { kind: 'refused', problem: 'This photograph is damaged and cannot be shown. Take it again.' };
  }
}
