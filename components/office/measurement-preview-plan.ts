import { ConcreteError } from '@/lib/concrete/concrete-error';
import { issuePlan } from '@/lib/inspection/issue-plan';
import type { MeasurementItem } from '@/lib/inspection/plan';
import { EXAMPLE_POUR } from './face-preview-plan';
import { emptyPlanDraft, type PlanDraft } from './plan-draft';
import { planFromDraft } from './plan-from-draft';
import { previewElement } from './preview-element';

export type MeasurementPreviewOf =
  { kind: 'item'; item: MeasurementItem } | { kind: 'waiting'; sentence: string };

/** The parts of the form that the limits of a measurement come from. */
export type MeasurementSources = Pick<
  PlanDraft,
  'units' | 'basis' | 'mixName' | 'mixAggregate' | 'concrete' | 'elements' | 'measurements'
>;

/** One measurement as it would be issued from what is typed so far, by the very computation that issues it. */
export function previewMeasurement(typed: MeasurementSources, index: number): MeasurementPreviewOf {
  const draft = typed.measurements[index];
  const element = typed.elements.find((one) => one.id === draft?.elementId);
  if (!draft || !element) return { kind: 'waiting', sentence: 'Choose the element.' };
  const read = planFromDraft({
    ...emptyPlanDraft(),
    ...typed,
    checklist: { template: 'none', version: 1, items: [] },
    elements: [previewElement(element)],
    measurements: [draft],
  });
  if (!read.ok) {
    const own = read.problems.find((problem) => problem.path.startsWith('measurements.'));
    return {
      kind: 'waiting',
      sentence: own
        ? 'Still to be given: what is asked for beside it.'
        : 'Give the element its numbers first.',
    };
  }
  try {
    const [item] = issuePlan(read.input, {
      pourId: EXAMPLE_POUR,
      revision: 1,
      issuedAt: '2000-01-01T00:00:00.000Z',
      authorId: EXAMPLE_POUR,
      reason: 'preview',
    }).measurements;
    return item ? { kind: 'item', item } : { kind: 'waiting', sentence: '' };
  } catch (error) {
    if (error instanceof ConcreteError) return { kind: 'waiting', sentence: error.reason };
    throw error;
  }
}
