import type { DeviceEnvironment } from '../device-environment';
import type { AnswerOf } from '../record-schemas';
import { askServer, type Trouble } from '../sync/ask-server';

export type Upload = { kind: 'sent' } | { kind: 'refused'; sentence: string } | Trouble;

/** 50 kbit/s is about the slowest line on which a photo is worth trying. */
const SLOWEST_BYTES_PER_MS = 6;

/**
 * Sends one photo: asks for an address, puts the bytes there, says that they are there. The photo counts as stored
 * only once the server has read them and written so into the record. (SPEC 27)
 */
export async function uploadPhoto(
  env: Pick<DeviceEnvironment, 'fetch' | 'now' | 'after'>,
  photo: { photoId: string; bytes: ArrayBuffer },
): Promise<Upload> {
  const base = `/api/photos/${photo.photoId}`;
  const address = await askServer(
    env,
    { method: 'POST', path: `${base}/upload-address`, json: {} },
    'uploadAddress',
  );
  if (address.kind === 'trouble') return refusal(address) ?? address;
  const put = await putBytes(env, address.data, photo.bytes);
  if (put) return put;
  const told = await askServer(env, { method: 'POST', path: `${base}/uploaded`, json: {} }, 'done');
  if (told.kind === 'trouble') return refusal(told) ?? told;
  return { kind: 'sent' };
}

/**
 * The server has looked at this photo and does not want it: sending it again is of no use. What may not be sent (403)
 * says nothing of the photo: somebody else may have signed in meanwhile. (SPEC 11, 16)
 */
function refusal(trouble: Trouble): Upload | null {
  const final = trouble.aboutRequest && [400, 413, 415, 422].includes(trouble.status ?? 0);
  return final ? { kind: 'refused', sentence: trouble.sentence } : null;
}

async function putBytes(
  env: Pick<DeviceEnvironment, 'fetch' | 'after'>,
  address: AnswerOf<'uploadAddress'>,
  bytes: ArrayBuffer,
): Promise<Trouble | null> {
  const stop = new AbortController();
  const stopTimer = env.after(60_000 + bytes.byteLength / SLOWEST_BYTES_PER_MS, () => stop.abort());
  try {
    const response = await env.fetch(address.url, {
      method: 'PUT',
      headers: address.headers,
      body: bytes,
      redirect: 'manual',
      credentials: 'omit',
      signal: stop.signal,
    });
    const text = await response.text();
    const page =
      /html/i.test(response.headers.get('content-type') ?? '') || /^\s*<(!doctype|html)/i.test(text);
    if (response.type === 'opaqueredirect' || page)
      return trouble('strange-network', 'Something on this network answers in place of the photo store.');
    if (!response.ok) return trouble('server-trouble', 'The photo store did not take the photo.');
    return null;
  } catch {
    return stop.signal.aborted
      ? trouble('server-trouble', 'The photo took too long to send.')
      : trouble('offline', 'The connection was lost while a photo was sent.');
  } finally {
    stopTimer();
  }
}

const trouble = (phase: Trouble['phase'], sentence: string): Trouble => ({
  kind: 'trouble',
  phase,
  sentence,
  aboutRequest: false,
  status: null,
  retryAfterMs: null,
});
