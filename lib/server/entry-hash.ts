import { createHash } from 'node:crypto';
import canonicalize from 'canonicalize';
import type { EntryEnvelope, Receipt } from '@/lib/inspection/entry';
import type { Plan } from '@/lib/inspection/plan';

export const sha256 = (text: string): string => createHash('sha256').update(text, 'utf8').digest('hex');

/** Canonical JSON (RFC 8785). The values given here were JSON before, so there always is one. */
export const canonical = (value: unknown): string => canonicalize(value) ?? 'null';

/** Field by field what was received, whatever else the object at hand carries. */
export const envelopeOf = (entry: EntryEnvelope): EntryEnvelope => ({
  id: entry.id,
  projectId: entry.projectId,
  pourId: entry.pourId,
  type: entry.type,
  v: entry.v,
  body: entry.body,
  planRevision: entry.planRevision,
  authorId: entry.authorId,
  deviceId: entry.deviceId,
  deviceSeq: entry.deviceSeq,
  recordedAt: entry.recordedAt,
  clockOffsetMs: entry.clockOffsetMs,
  seenSeq: entry.seenSeq,
});

/**
 * Hash of an entry: SHA-256 over the canonical JSON of what was received, its place in the record and the hash before
 * it in its stream (the pour's, or the project's own).
 */
export function entryHash(entry: EntryEnvelope, receipt: Omit<Receipt, 'hash'>): string {
  const { seq, receivedAt, authorRole, prevHash } = receipt;
  return sha256(canonical({ received: envelopeOf(entry), seq, receivedAt, authorRole, prevHash }));
}

/** Digest of a plan revision, as its `plan-issued` entry carries it. */
export const planDigestOf = (plan: Plan): string => sha256(canonical(plan));
