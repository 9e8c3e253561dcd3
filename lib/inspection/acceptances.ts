import type { Entry, EntryOf } from './entry';
import { listOf, type Facts } from './facts';

/** The dispositions in force: the last one of each nonconformance that was not withdrawn. */
export function dispositionsInForce(
  facts: Facts,
  withdrawn: (nonconformanceId: string) => boolean,
): Map<string, EntryOf<'disposition'>> {
  const latest = new Map<string, EntryOf<'disposition'>>();
  for (const entry of listOf(facts, 'disposition')) {
    if (!withdrawn(entry.body.nonconformanceId)) latest.set(entry.body.nonconformanceId, entry);
  }
  return latest;
}

/** Which entries a signed disposition accepts (use as is, or repair), by entry id. */
export function acceptances(
  inForce: Map<string, EntryOf<'disposition'>>,
): Map<string, EntryOf<'disposition'>> {
  const accepted = new Map<string, EntryOf<'disposition'>>();
  for (const disposition of inForce.values()) {
    if (disposition.body.decision !== 'use-as-is' && disposition.body.decision !== 'repair') continue;
    for (const id of disposition.body.accepts) accepted.set(id, disposition);
  }
  return accepted;
}

/**
 * A disposition accepts the value its signer saw. An amendment recorded since, and not seen by the signer, is another
 * value: it is not accepted.
 */
export function acceptedAsSeen(
  facts: Facts,
  entry: Entry,
  accepted: Map<string, EntryOf<'disposition'>>,
): EntryOf<'disposition'> | null {
  const disposition = accepted.get(entry.id);
  if (!disposition) return null;
  const amendments = facts.amendmentsByRoot.get(entry.id) ?? [];
  const seen = amendments.every(
    (amendment) => amendment.seq !== null && amendment.seq <= disposition.seenSeq,
  );
  return seen ? disposition : null;
}
