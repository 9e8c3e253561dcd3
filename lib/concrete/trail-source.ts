import type { TrailStep } from '@/lib/concrete/trail';

/** What is put beside every number that was not read in its standard. */
export const FROM_MEMORY = 'from memory, check against the edition in force';

/**
 * A writer of trail steps for one source: `clause` names the standard and the place in it. A step whose provenance is
 * memory always carries the words that say so.
 */
export function trailSource(clause: string, edition: string, provenance: TrailStep['provenance']) {
  return (rule: string, value: string, note?: string): TrailStep => {
    const notes = [provenance === 'memory' ? FROM_MEMORY : undefined, note].filter(
      (part) => part !== undefined,
    );
    const step = { rule, clause, edition, value, provenance };
    return notes.length > 0 ? { ...step, note: notes.join('. ') } : step;
  };
}

/** Steps that are plain arithmetic on what was entered. */
export const arithmetic = trailSource('arithmetic', '', 'computed');

/** Steps that rest on what the contract documents or the plan say. */
export const fromContract = trailSource('contract documents', '', 'contract');

/** Steps that rest on what the trade does, without a clause behind it. */
export const commonPractice = trailSource('common practice', '', 'common-practice');
