import type { PersonWork } from './person-work';

/**
 * Everything that is on this device only, as one JSON file: entries that wait, refused ones with their reasons,
 * others' entries that a restored server no longer knows, and photos not stored yet (bytes in Base64).
 * @param now ms
 */
export async function exportUnsent(work: PersonWork, now: number): Promise<Blob> {
  const [outbox, refused, strays] = await Promise.all([
    work.db.getAll('outbox'),
    work.db.getAll('refused'),
    work.db.getAll('strays'),
  ]);
  const head = JSON.stringify({
    format: 'cagewright-unsent',
    version: 1,
    person: work.person,
    deviceId: work.deviceId,
    savedAt: new Date(now).toISOString(),
    entries: outbox.map((record) => record.envelope),
    refused: refused.map(({ envelope, code, sentence, field, at }) => ({
      envelope,
      code,
      sentence,
      field,
      at,
    })),
    notOnServer: strays.map((stray) => stray.entry),
  });
  // Photos are added as parts: one text of all of them could be larger than a string may be.
  const parts: string[] = [head.slice(0, -1), ',"photos":['];
  let first = true;
  for (const photo of work.photos.values()) {
    if (photo.progress === 'stored') continue;
    const stored = await work.db.get('photoBytes', photo.photoId);
    if (!stored) continue;
    const { photoId, entryId, sha256, contentType } = photo;
    parts.push(
      `${first ? '' : ','}${JSON.stringify({ photoId, entryId, sha256, contentType, base64: base64(stored.bytes) })}`,
    );
    first = false;
  }
  return new Blob([...parts, ']}'], { type: 'application/json' });
}

/** In steps that are a multiple of three bytes, so that the pieces join without padding in between. */
const STEP = 3 * 8192;

function base64(buffer: ArrayBuffer): string {
  const bytes = new Uint8Array(buffer);
  let text = '';
  for (let at = 0; at < bytes.length; at += STEP) {
    text += btoa(String.fromCharCode(...bytes.subarray(at, at + STEP)));
  }
  return text;
}
