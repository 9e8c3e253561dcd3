import { ConcreteError } from '@/lib/concrete/concrete-error';
import { issuePlan } from '@/lib/inspection/issue-plan';
import type { Face } from '@/lib/inspection/plan';
import { emptyPlanDraft, type ElementDraft, type PlanDraft } from './plan-draft';
import { planFromDraft } from './plan-from-draft';
import { previewElement } from './preview-element';

export type FacePreviewOf = { kind: 'face'; face: Face } | { kind: 'waiting'; sentences: string[] };

/** A pour that does not exist yet: its drawn points are an example of how many and how spread. */
export const EXAMPLE_POUR = '00000000-0000-4000-8000-000000000000';

/**
 * One face as it would be issued from what is typed so far, by the very computation that issues it. Names that are
 * still empty do not stand in the way; numbers do.
 */
export function previewFace(
  element: ElementDraft,
  faceIndex: number,
  rules: Pick<PlanDraft, 'units' | 'basis' | 'mixName' | 'mixAggregate' | 'concrete'>,
  pourId: string,
): FacePreviewOf {
  const face = element.faces[faceIndex];
  if (!face) return { kind: 'waiting', sentences: [] };
  const read = planFromDraft({
    ...emptyPlanDraft(),
    ...rules,
    checklist: { template: 'none', version: 1, items: [] },
    elements: [
      {
        ...previewElement(element),
        layers: [],
        faces: previewElement(element).faces.filter((one) => one.id === face.id),
      },
    ],
  });
  if (!read.ok) return { kind: 'waiting', sentences: missing(read.problems.map((problem) => problem.path)) };
  try {
    const plan = issuePlan(read.input, {
      pourId,
      revision: 1,
      issuedAt: '2000-01-01T00:00:00.000Z',
      authorId: EXAMPLE_POUR,
      reason: 'preview',
    });
    const drawn = plan.elements[0]?.faces[0];
    return drawn ? { kind: 'face', face: drawn } : { kind: 'waiting', sentences: [] };
  } catch (error) {
    if (error instanceof ConcreteError) return { kind: 'waiting', sentences: [error.reason] };
    throw error;
  }
}

const words: [RegExp, string][] = [
  [/thickness$/, 'the thickness of the element'],
  [/\.width$/, 'the width of the face'],
  [/\.height$/, 'its height'],
  [/barDesignation$/, 'the bar'],
  [/contractMinus$/, 'the permitted minus'],
  [/contractSpecified$/, 'the specified cover'],
  [/mix/, 'the mix'],
];

function missing(paths: string[]): string[] {
  const named = words.filter(([pattern]) => paths.some((path) => pattern.test(path))).map(([, word]) => word);
  return named.length > 0
    ? [`Still to be given: ${named.join(', ')}.`]
    : ['Something above is not valid yet.'];
}
