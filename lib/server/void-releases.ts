import { AppError } from '@/lib/inspection/app-error';
import { standingReleaseAuthor } from '@/db/stores/release-store';
import type { Tx } from '@/db/connection';
import { OpenRecord, type Author } from './open-record';

/**
 * Voids a release because a person says so. A void is never lifted: a new release has a new number.
 * @throws AppError not-found for a release of another pour, conflict when it is void already
 */
export async function voidRelease(
  tx: Tx,
  author: Author,
  pour: { id: string; projectId: string },
  wanted: { releaseId: string; reason: string },
  now: string,
): Promise<string> {
  const record = await OpenRecord.open(tx, pour.projectId, author, now);
  await record.load([pour.id]);
  const release = record.sheet(pour.id).releases.find(({ entry }) => entry.id === wanted.releaseId);
  if (!release) throw new AppError('not-found');
  if (release.voided) throw new AppError('conflict', 'This release is void already.');
  const entry = record.write(pour.id, 'release-void', {
    releaseId: wanted.releaseId,
    cause: 'manual',
    reason: wanted.reason,
    at: now,
    causedBy: null,
  });
  await record.close();
  return entry.id;
}

/**
 * Writes the void of releases whose validity is over. The author of such a void is whoever gave the release: nobody
 * else had a part in it.
 * @returns how many were written
 */
export async function expireReleases(
  tx: Tx,
  pour: { id: string; projectId: string },
  now: string,
): Promise<number> {
  const author = await standingReleaseAuthor(tx, pour.projectId, pour.id);
  if (!author) return 0;
  const record = await OpenRecord.open(tx, pour.projectId, author, now);
  await record.load([pour.id]);
  return record.close('loaded');
}
