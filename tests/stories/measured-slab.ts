import { issuePlan } from '@/lib/inspection/issue-plan';
import type { MeasurementItem } from '@/lib/inspection/measurement-item';
import type { MeasurementRule } from '@/lib/inspection/measurement-rule';
import type { Plan } from '@/lib/inspection/plan';
import type { PlanInput } from '@/lib/inspection/plan-input';
import { people, pourId } from './pour-story';

type Layer = PlanInput['elements'][number]['layers'][number];

const layer = (
  id: string,
  faceId: string,
  order: number,
  barDesignation: string,
  over: Partial<Layer> = {},
): Layer => ({
  id,
  name: id.toUpperCase(),
  faceId,
  order,
  barDesignation,
  grade: '',
  coating: 'none',
  spacingMm: 150,
  count: null,
  direction: 'across',
  ...over,
});

const face = (id: string, name: string, soffit: boolean): PlanInput['elements'][number]['faces'][number] => ({
  id,
  name,
  meeting: soffit ? 'formed' : 'finished-top',
  soffit: false,
  exposure: '',
  widthMm: 7200,
  heightMm: 4000,
  openings: [],
  recesses: [],
  drawnPoints: 5,
  chosenPoints: [],
  requirements: [
    {
      id: `${id}-outer`,
      steel: `outermost bar of the ${name}`,
      barDesignation: '16 mm',
      contractSpecifiedMm: 50,
      contractMinusMm: 10,
      contractPlusMm: null,
      neverLess: false,
    },
  ],
});

/** A slab 300 mm thick with cover 50 −10 on both faces and a layer of every coating; what is typed can be changed. */
export function slabInput(over: Partial<PlanInput> = {}): PlanInput {
  return {
    units: 'mm',
    basis: 'contract',
    decisionRule: { kind: 'simple' },
    validityHours: 24,
    rainLimitMm: 5,
    mix: { id: 'mix', name: 'Marine 40/20', aggregateMm: 20 },
    elements: [
      {
        id: 'slab',
        type: 'slab',
        mark: 'Ramp slab',
        location: 'grid A',
        level: '',
        thicknessMm: 300,
        effectiveDepthMm: null,
        drawing: { number: 'S-301', revision: '2' },
        faces: [face('soffit', 'soffit', true), face('top', 'top', false)],
        layers: [
          layer('b1', 'soffit', 1, '16 mm'),
          layer('b2', 'soffit', 2, '12 mm', { count: 27 }),
          layer('t1', 'top', 1, '16 mm'),
          layer('t2', 'top', 2, '12 mm'),
          layer('epoxy', 'top', 3, '16 mm', { coating: 'epoxy' }),
          layer('frp', 'top', 4, '16 mm', { coating: 'frp' }),
          layer('stainless', 'top', 5, '16 mm', { coating: 'stainless' }),
        ],
      },
    ],
    measurements: [],
    checklist: { template: 'none', version: 1, items: [] },
    lastWalk: false,
    ...over,
  };
}

export const issueContext = {
  pourId,
  revision: 1,
  issuedAt: '2026-11-30T08:00:00.000Z',
  authorId: people.engineer,
  reason: 'First issue',
};

/** The slab's plan with one measurement by this rule, at one place unless said otherwise. */
export function planMeasuring(
  rule: MeasurementRule,
  over: { input?: Partial<PlanInput>; required?: number; loaded?: boolean } = {},
): { plan: Plan; item: MeasurementItem } {
  const measurement = {
    id: 'item',
    title: 'What is measured',
    elementId: 'slab',
    required: over.required ?? 1,
    loaded: over.loaded ?? false,
    rule,
  };
  const plan = issuePlan(slabInput({ ...over.input, measurements: [measurement] }), issueContext);
  return { plan, item: plan.measurements[0]! };
}
