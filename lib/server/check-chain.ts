import type { Tx } from '@/db/connection';
import { readStreams, type SealedEntry } from '@/db/stores/entry-store';
import { planRevisions, type KeptPlan } from '@/db/stores/pour-store';
import { entryHash, planDigestOf } from './entry-hash';

/** What checking one stream of the record came to. */
export interface ChainCheck {
  entries: number;
  headSeq: number;
  headHash: string | null;
  intact: boolean;
  /** The first thing that does not fit, in words. */
  problem: string | null;
}

/**
 * Checks the chain of one stream: every entry hashes to what it says, names the hash before it, and every plan
 * revision is the document whose digest was issued.
 * @param pourId null for the project's own stream
 */
export async function checkChain(tx: Tx, projectId: string, pourId: string | null): Promise<ChainCheck> {
  const stream = (await readStreams(tx, projectId, [{ pourId, from: 0 }])) as SealedEntry[];
  const plans = pourId === null ? [] : await planRevisions(tx, projectId, pourId);
  const last = stream.at(-1);
  const problem = brokenLink(stream) ?? changedPlan(stream, plans);
  return {
    entries: stream.length,
    headSeq: last?.seq ?? 0,
    headHash: last?.hash ?? null,
    intact: problem === null,
    problem,
  };
}

/** The first entry of a stream that does not fit its hash or its predecessor. */
export function brokenLink(stream: readonly SealedEntry[]): string | null {
  let before: string | null = null;
  for (const entry of stream) {
    if (entry.prevHash !== before) return `Entry no. ${entry.seq} does not follow the one before it.`;
    if (entryHash(entry, entry) !== entry.hash) return `Entry no. ${entry.seq} is not what was recorded.`;
    before = entry.hash;
  }
  return null;
}

/** A plan revision that is not what its `plan-issued` entry says, or that was never issued. */
export function changedPlan(stream: readonly SealedEntry[], plans: readonly KeptPlan[]): string | null {
  const issued = stream.filter((entry) => entry.type === 'plan-issued');
  for (const plan of plans) {
    const entry = issued.find(({ body }) => body.revision === plan.revision);
    if (!entry) return `Plan revision ${plan.revision} was never issued.`;
    if (entry.body.digest !== planDigestOf(plan.document) || plan.digest !== entry.body.digest)
      return `Plan revision ${plan.revision} is not what was issued.`;
  }
  const missing = issued.find(({ body }) => !plans.some((plan) => plan.revision === body.revision));
  return missing ? `Plan revision ${String(missing.body.revision)} is missing.` : null;
}
