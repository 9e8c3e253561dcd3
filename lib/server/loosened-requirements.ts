import type { Plan, Requirement } from '@/lib/inspection/plan';

/**
 * Where a revision would accept less than the one before: a lower specified or least accepted cover, a plus limit
 * raised or dropped, a requirement left out of a face that stays, or another basis or decision rule.
 * @returns in words, for the person who tried
 */
export function loosenedRequirements(previous: Plan, next: Plan): string[] {
  const words: string[] = [];
  if (previous.basis !== next.basis) words.push('the acceptance basis');
  if (JSON.stringify(previous.decisionRule) !== JSON.stringify(next.decisionRule))
    words.push('the decision rule');
  const faces = new Map(next.elements.flatMap((element) => element.faces).map((face) => [face.id, face]));
  for (const before of previous.elements.flatMap((element) => element.faces)) {
    const after = faces.get(before.id);
    if (!after) continue;
    for (const requirement of before.requirements) {
      const now = after.requirements.find((one) => one.id === requirement.id);
      if (!now || isLooser(requirement, now)) words.push(`${before.name}, ${requirement.steel}`);
    }
  }
  return words;
}

const isLooser = (before: Requirement, after: Requirement) =>
  after.specifiedMm < before.specifiedMm ||
  after.leastAcceptedMm < before.leastAcceptedMm ||
  (before.mostAcceptedMm !== null && (after.mostAcceptedMm ?? Infinity) > before.mostAcceptedMm);
