import { AppError } from '@/lib/inspection/app-error';
import { findEntry } from '@/db/stores/entry-store';
import type { Person } from '@/db/stores/session-store';
import type { Tx } from '@/db/connection';
import { OpenRecord, type Author } from './open-record';
import { requirePour } from './require-pour';

export interface SignatureFound {
  projectId: string;
  pourId: string;
  signatureId: string;
  authorId: string;
}

/** @throws AppError not-found when there is no such signature in the person's projects */
export async function requireSignature(tx: Tx, person: Person, signatureId: string): Promise<SignatureFound> {
  const entry = await findEntry(tx, signatureId);
  if (entry?.type !== 'signature' || entry.pourId === null) throw new AppError('not-found');
  const pour = await requirePour(tx, person, entry.pourId);
  return { projectId: pour.projectId, pourId: pour.id, signatureId, authorId: entry.authorId };
}

/**
 * Writes that the author has confirmed a signature; again is the same answer.
 * @returns id of the confirming entry
 * @throws AppError not-allowed for anybody but its author
 */
export async function confirmSignature(
  tx: Tx,
  author: Author,
  signature: SignatureFound,
  now: string,
): Promise<string> {
  if (signature.authorId !== author.id)
    throw new AppError('not-allowed', 'Only the person who signed can confirm it.');
  const record = await OpenRecord.open(tx, signature.projectId, author, now);
  await record.load([signature.pourId]);
  const state = record
    .sheet(signature.pourId)
    .signatures.find(({ entry }) => entry.id === signature.signatureId);
  if (state?.confirmed) return state.confirmed.id;
  const entry = record.write(signature.pourId, 'signature-confirmed', { signatureId: signature.signatureId });
  await record.close();
  return entry.id;
}
