import type { Tx } from '@/db/connection';

export interface NewPhoto {
  id: string;
  pourId: string;
  entryId: string;
  authorId: string;
  sha256: string;
  bytes: number;
  contentType: string;
}

export interface KeptPhoto extends NewPhoto {
  projectId: string;
  state: 'waiting' | 'stored' | 'refused';
  objectKey: string | null;
  widthPx: number | null;
  heightPx: number | null;
  problem: string | null;
}

/** Announces photos whose bytes are still to come; one that is known already stays as it is. */
export async function insertPhotos(tx: Tx, projectId: string, photos: readonly NewPhoto[]): Promise<void> {
  if (photos.length === 0) return;
  await tx('photos')
    .insert(
      photos.map((photo) => ({
        project_id: projectId,
        id: photo.id,
        pour_id: photo.pourId,
        entry_id: photo.entryId,
        author_id: photo.authorId,
        sha256: photo.sha256,
        bytes: photo.bytes,
        content_type: photo.contentType,
      })),
    )
    .onConflict(['project_id', 'id'])
    .ignore();
}

interface PhotoRow {
  project_id: string;
  id: string;
  pour_id: string;
  entry_id: string;
  author_id: string;
  sha256: string;
  bytes: number;
  content_type: string;
  state: KeptPhoto['state'];
  object_key: string | null;
  width_px: number | null;
  height_px: number | null;
  problem: string | null;
}

/** The photo with this id, if it is in one of the projects opened to this transaction. */
export async function findPhoto(tx: Tx, photoId: string): Promise<KeptPhoto | null> {
  const row = await tx('photos').where({ id: photoId }).first<PhotoRow | undefined>('*');
  if (!row) return null;
  return {
    projectId: row.project_id,
    id: row.id,
    pourId: row.pour_id,
    entryId: row.entry_id,
    authorId: row.author_id,
    sha256: row.sha256,
    bytes: row.bytes,
    contentType: row.content_type,
    state: row.state,
    objectKey: row.object_key,
    widthPx: row.width_px,
    heightPx: row.height_px,
    problem: row.problem,
  };
}

/**
 * Notes how a photo ended. One that was refused can still be stored, when it was sent again; what is stored stays so,
 * and a refusal is noted once.
 * @returns false when nothing was left to note: then nothing is changed
 */
export async function settlePhoto(
  tx: Tx,
  projectId: string,
  photoId: string,
  outcome:
    | { state: 'stored'; objectKey: string; widthPx: number; heightPx: number; at: string }
    | { state: 'refused'; problem: string; at: string },
): Promise<boolean> {
  const stored = outcome.state === 'stored';
  const changed = await tx('photos')
    .where({ project_id: projectId, id: photoId })
    .whereIn('state', stored ? ['waiting', 'refused'] : ['waiting'])
    .update({
      state: outcome.state,
      object_key: stored ? outcome.objectKey : null,
      width_px: stored ? outcome.widthPx : null,
      height_px: stored ? outcome.heightPx : null,
      problem: stored ? null : outcome.problem,
      settled_at: outcome.at,
    });
  return changed === 1;
}
