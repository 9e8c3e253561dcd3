import { randomBytes } from 'node:crypto';
import { AppError } from '@/lib/inspection/app-error';
import type { ReleaseScope } from '@/lib/inspection/entry-bodies';
import { decideRelease } from '@/lib/inspection/release-decision';
import { sheetStatement } from '@/lib/inspection/sheet-statement';
import { insertRelease } from '@/db/stores/release-store';
import type { Tx } from '@/db/connection';
import { sha256 } from './entry-hash';
import { enqueueJob } from './jobs/enqueue-job';
import { OpenRecord, type Author } from './open-record';

export interface GivenRelease {
  releaseId: string;
  number: number;
  token: string;
}

/**
 * Gives the release of a scope, or puts on record that it was refused. The record stays locked from the question to
 * the answer, so that nothing can come between.
 * @returns the release; or, once the refused attempt is written, the error that lists the holds
 * @throws AppError conflict when it is not a matter of holds (placing has begun, a release stands already)
 */
export async function giveRelease(
  tx: Tx,
  author: Author,
  pour: { id: string; projectId: string },
  scope: ReleaseScope,
  reason: string,
  now: string,
): Promise<GivenRelease | AppError> {
  const record = await OpenRecord.open(tx, pour.projectId, author, now);
  await record.load([pour.id]);
  const sheet = record.sheet(pour.id);
  const decision = decideRelease(sheet, scope, now);
  if (decision.kind === 'impossible') throw new AppError('conflict', decision.sentence);
  if (decision.kind === 'refused') {
    const holds = decision.holds.map((hold) => `${hold.title} (${hold.where})`.slice(0, 300));
    record.write(pour.id, 'release-refused', { scope, holds, reason });
    await record.close();
    return new AppError('held', 'No release: something stands in the way. The attempt is on record.', {
      detail: { holds: decision.holds },
    });
  }

  const number = record.nextReleaseNumber();
  const { id: releaseId } = record.write(pour.id, 'release', {
    ...decision.rests,
    number,
    sheetDigest: sha256(sheetStatement(sheet)),
    headSeq: sheet.headSeq,
    headHash: record.headHash(pour.id),
  });
  await record.close();
  const token = randomBytes(24).toString('base64url');
  await insertRelease(tx, {
    projectId: pour.projectId,
    number,
    entryId: releaseId,
    pourId: pour.id,
    token,
    releasedBy: author.id,
    releasedAt: now,
    validUntil: decision.rests.validUntil,
  });
  await enqueueJob(tx, 'certificate', { projectId: pour.projectId, pourId: pour.id, entryId: releaseId });
  return { releaseId, number, token };
}
