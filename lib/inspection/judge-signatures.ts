import { saw } from './causality';
import type { Entry } from './entry';
import { listOf, type Facts } from './facts';
import { namesAnotherMix } from './mix-change';
import type { Plan } from './plan';
import { elementsOf } from './scope';
import type { SignatureState } from './sheet-types';

/**
 * Does this entry change what was signed for? A failed block check does so only where readings rest on the instrument:
 * they are then not verified, which holds, and reading them again is what sets a signature aside. Photographs, notes,
 * requests, signatures and releases do not; a passed last walk and a condition found met say nothing against it.
 */
export function isMaterial(entry: Entry, plan: Plan): boolean {
  switch (entry.type) {
    case 'reading':
      return entry.body.phase === 'before';
    case 'last-walk':
    case 'condition-verified':
      return entry.body.outcome === 'not-met';
    case 'drawing-received':
      return plan.elements.some(
        ({ drawing }) => drawing.number === entry.body.number && drawing.revision !== entry.body.revision,
      );
    case 'mix-changed':
      return namesAnotherMix(entry, plan);
    case 'site-event':
      return (
        entry.body.kind !== 'rain' || entry.body.amountMm === null || entry.body.amountMm >= plan.rainLimitMm
      );
    case 'answer':
    case 'measurement':
    case 'nonconformance':
    case 'correction':
    case 'recheck':
    case 'verbal-instruction':
    case 'amendment':
    case 'hold':
    case 'disposition':
    case 'plan-issued':
    case 'release-void':
      return true;
    default:
      return false;
  }
}

const overlaps = (a: string[] | null, b: string[] | null): boolean =>
  a === null || b === null || a.some((id) => b.includes(id));

/** Signatures with what sets them aside: the first material entry in their scope that the signer had not seen. */
export function judgeSignatures(facts: Facts, plan: Plan): SignatureState[] {
  return listOf(facts, 'signature').map((entry) => {
    const setAsideBy =
      facts.entries.find(
        (other) =>
          !saw(entry, other) &&
          isMaterial(other, plan) &&
          overlaps(entry.body.elementIds, elementsOf(other, facts.byId, plan)),
      ) ?? null;
    const confirmed =
      listOf(facts, 'signature-confirmed').find((one) => one.body.signatureId === entry.id) ?? null;
    return {
      entry,
      confirmed,
      setAsideBy,
      stands: confirmed !== null && setAsideBy === null && entry.authorRole === entry.body.as,
    };
  });
}
