import { AppError } from '@/lib/inspection/app-error';
import { findPhoto, type KeptPhoto } from '@/db/stores/photo-store';
import type { Person } from '@/db/stores/session-store';
import type { Tx } from '@/db/connection';
import { requirePour } from '../require-pour';

/**
 * The photo, if the person may know of its pour.
 * @throws AppError not-found, also for a photo whose entry has not arrived yet
 */
export async function requirePhoto(tx: Tx, person: Person, photoId: string): Promise<KeptPhoto> {
  const photo = await findPhoto(tx, photoId);
  if (!photo) throw new AppError('not-found');
  await requirePour(tx, person, photo.pourId);
  return photo;
}

/** @throws AppError not-allowed for anybody but the person who took it */
export async function requireOwnPhoto(tx: Tx, person: Person, photoId: string): Promise<KeptPhoto> {
  const photo = await requirePhoto(tx, person, photoId);
  if (photo.authorId !== person.id)
    throw new AppError('not-allowed', 'Only the person who took a photograph sends it.');
  return photo;
}
