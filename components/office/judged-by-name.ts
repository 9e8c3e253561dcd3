import { requirementSource, type JudgedSource, type JudgedWords } from '@/lib/inspection/judged-words';
import type { Plan } from '@/lib/inspection/plan';

const requirementName = (faceId: string, requirementId: string): string => `${faceId}/${requirementId}`;

/** The trails of all requirements and measurements of a plan, by the name that a verdict gives of them. */
export function namedSources(plan: Plan): Record<string, JudgedSource> {
  const requirements = plan.elements
    .flatMap((element) => element.faces)
    .flatMap((face) =>
      face.requirements.map((one) => [requirementName(face.id, one.id), requirementSource(one)] as const),
    );
  return Object.fromEntries(requirements);
}

/** The same words with the requirement's trail by name: it is kept once on the page, not once a reading. */
export function byName(judged: JudgedWords, faceId: string, requirementId: string | null) {
  const [first, ...rest] = judged.sources;
  if (requirementId === null || !first) return judged;
  return { ...judged, sources: [{ kept: requirementName(faceId, requirementId) }, ...rest] };
}
