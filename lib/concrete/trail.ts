/** Where a number comes from: typed from the contract, read in a source, only remembered, worked out, or habit. */
export type Provenance = 'contract' | 'seen' | 'partly-seen' | 'memory' | 'computed' | 'common-practice';

/** One step by which a requirement was found: what was applied, from which clause, and the number it gave. */
export interface TrailStep {
  rule: string;
  clause: string;
  edition: string;
  value: string;
  provenance: Provenance;
  note?: string;
}

/** True where a screen has to show "verify against your edition" beside the result. */
export function needsEditionCheck(trail: readonly { provenance: string }[]): boolean {
  return trail.some((step) => step.provenance === 'memory');
}

/** Where a step's number comes from, in words. */
export const provenanceWords: Record<Provenance, string> = {
  contract: 'contract documents',
  seen: 'text seen',
  'partly-seen': 'text partly seen',
  memory: 'from memory',
  computed: 'computed',
  'common-practice': 'common practice',
};

/** Clause, edition and provenance of a step on one line, none of them twice, and its note. */
export function stepSource(step: TrailStep): string {
  const words = [...new Set([step.clause, step.edition, provenanceWords[step.provenance]])];
  return [words.filter(Boolean).join(', '), step.note].filter(Boolean).join('. ');
}
