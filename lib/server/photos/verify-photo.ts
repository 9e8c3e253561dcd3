import type { BodyOf } from '@/lib/inspection/entry';
import type { Role } from '@/lib/inspection/roles';
import { findPhoto, settlePhoto, type KeptPhoto } from '@/db/stores/photo-store';
import { findEntry } from '@/db/stores/entry-store';
import { enterProject } from '@/db/stores/session-store';
import { database } from '@/db/connection';
import { deleteObject, readObject, writeObject } from '../object-storage';
import { OpenRecord } from '../open-record';
import { inspectImage, type Inspected } from './inspect-image';
import { incomingKey, storedKey } from './photo-keys';

interface PhotoWithRole {
  photo: KeptPhoto;
  role: Role;
}

/**
 * Reads an uploaded photograph once and settles it: stored under its digest, or refused with the reason. A cut or
 * altered upload is neither: it waits to be sent again.
 * @returns what became of it, in a word for the log
 */
export async function verifyPhoto(projectId: string, photoId: string, now: () => string): Promise<string> {
  const found = await load(projectId, photoId);
  if (!found) return 'unknown';
  if (found.photo.state === 'stored') return 'stored before';
  const bytes = await readObject(incomingKey(photoId), found.photo.bytes);
  if (!bytes) return 'nothing came';
  const inspected = await inspectImage(bytes, found.photo);
  // The key holds the digest, so writing it again changes nothing; these very bytes were looked at, not a later upload.
  if (inspected.kind === 'good')
    await writeObject(storedKey(found.photo.sha256), bytes, found.photo.contentType);
  if (inspected.kind !== 'again') await settle(found, inspected, now());
  await deleteObject(incomingKey(photoId));
  return inspected.kind === 'good' ? 'stored' : `${inspected.kind}: ${inspected.problem}`;
}

async function load(projectId: string, photoId: string): Promise<PhotoWithRole | null> {
  return database().transaction(async (tx) => {
    await enterProject(tx, projectId);
    const photo = await findPhoto(tx, photoId);
    const entry = photo && (await findEntry(tx, photo.entryId));
    return photo && entry ? { photo, role: entry.authorRole } : null;
  });
}

async function settle(
  { photo, role }: PhotoWithRole,
  inspected: Exclude<Inspected, { kind: 'again' }>,
  now: string,
): Promise<void> {
  await database().transaction(async (tx) => {
    await enterProject(tx, photo.projectId);
    const good = inspected.kind === 'good';
    const changed = await settlePhoto(
      tx,
      photo.projectId,
      photo.id,
      good
        ? {
            state: 'stored',
            objectKey: storedKey(photo.sha256),
            widthPx: inspected.widthPx,
            heightPx: inspected.heightPx,
            at: now,
          }
        : { state: 'refused', problem: inspected.problem, at: now },
    );
    if (!changed) return;
    const record = await OpenRecord.open(tx, photo.projectId, { id: photo.authorId, role }, now);
    await record.load([photo.pourId]);
    if (good) record.write(photo.pourId, 'photo-stored', storedBody(photo, inspected));
    else record.write(photo.pourId, 'photo-refused', { photoId: photo.id, problem: inspected.problem });
    await record.close();
  });
}

function storedBody(photo: KeptPhoto, size: { widthPx: number; heightPx: number }): BodyOf<'photo-stored'> {
  const { id: photoId, sha256, bytes, contentType } = photo;
  return {
    photoId,
    key: storedKey(sha256),
    sha256,
    bytes,
    contentType,
    widthPx: size.widthPx,
    heightPx: size.heightPx,
  };
}
