import { promisify } from 'node:util';
import { gunzip } from 'node:zlib';
import { AppError } from '@/lib/inspection/app-error';

const unzip = promisify(gunzip);

/**
 * The JSON of a request's body, plain or gzip.
 * @param most bytes that are taken, before and after unpacking
 * @throws AppError too-large, or invalid when it is no JSON
 */
export async function readBody(request: Request, most: number): Promise<unknown> {
  const raw = await readBytes(request, most);
  const bytes = request.headers.get('content-encoding') === 'gzip' ? await unpack(raw, most) : raw;
  try {
    return JSON.parse(bytes.toString('utf8'));
  } catch {
    throw new AppError('invalid', 'What was sent cannot be read.');
  }
}

async function readBytes(request: Request, most: number): Promise<Buffer> {
  const parts: Uint8Array[] = [];
  let length = 0;
  if (!request.body) return Buffer.alloc(0);
  const reader = request.body.getReader();
  for (;;) {
    const { done, value } = await reader.read();
    if (done) return Buffer.concat(parts);
    length += value.byteLength;
    if (length > most) {
      await reader.cancel();
      throw new AppError('too-large');
    }
    parts.push(value);
  }
}

async function unpack(packed: Buffer, most: number): Promise<Buffer> {
  try {
    return await unzip(packed, { maxOutputLength: most });
  } catch (error) {
    const tooLarge = error instanceof RangeError;
    throw new AppError(
      tooLarge ? 'too-large' : 'invalid',
      tooLarge ? undefined : 'What was sent cannot be unpacked.',
    );
  }
}
