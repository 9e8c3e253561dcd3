import type { PlanInput } from '@/lib/inspection/plan-input';

type Measurement = PlanInput['measurements'][number];

const measured = (
  id: string,
  title: string,
  elementId: string,
  required: number,
  rule: Measurement['rule'],
): Measurement => ({ id, title, elementId, required, loaded: false, rule });

/** Limits as the drawing gives them, where nothing of the plan leads to them. */
const typedLimits = (
  kind: Extract<Measurement['rule'], { rule: 'typed' }>['kind'],
  quantity: 'length' | 'count',
  least: number | null,
  most: number | null,
): Measurement['rule'] => ({ rule: 'typed', kind, quantity, least, most, expected: null });

/** Quay deck: chairs, ties, a lap and a spacing, computed from its layers. */
export const deckMeasurements: Measurement[] = [
  measured('chair-height', 'Height of chairs under the top mat', 'deck', 3, {
    rule: 'support-height',
    faceId: 'top',
    carriedLayerIds: ['t1', 't2'],
    standsOn: { faceId: 'soffit', layerIds: ['b1', 'b2'], otherMm: 0 },
    ownMinusMm: 10,
  }),
  measured('chair-spacing', 'Spacing of chairs', 'deck', 3, {
    rule: 'support-spacing',
    layerId: 't2',
    by: 'plan',
    planMm: 1200,
  }),
  measured('ties-top', 'Ties of the top mat', 'deck', 3, {
    rule: 'tie-share',
    layerId: 't1',
    otherLayerId: 't2',
    pattern: 'alternate',
    sharePercent: null,
  }),
  measured('lap-t1', 'Laps of T1 at the joint', 'deck', 2, {
    rule: 'lap-length',
    layerId: 't1',
    tolerance: 'none',
    ownMinusMm: null,
    length: { by: 'typed', lengthMm: 860 },
  }),
  measured('gaps-b1', 'Spacing of B1 over ten gaps', 'deck', 2, {
    rule: 'bar-spacing',
    layerId: 'b1',
    gaps: 10,
    ownMm: { minus: 50, plus: 50 },
    steel: 'slab-or-wall',
    use: null,
  }),
];

/** Beam line C: the lap of the drawing with the deviation of its basis, the rest as the drawing gives it. */
export const beamMeasurements: Measurement[] = [
  measured('lap-bottom', 'Laps of the bottom bars', 'beam-c', 2, {
    rule: 'lap-length',
    layerId: 'main',
    tolerance: 'basis',
    ownMinusMm: null,
    length: { by: 'typed', lengthMm: 1193.8 },
  }),
  measured(
    'tie-spacing',
    'Spacing of ties over six gaps',
    'beam-c',
    2,
    typedLimits('bar-spacing', 'length', null, 1219.2),
  ),
  measured('bottom-count', 'Bottom bars', 'beam-c', 1, typedLimits('bar-count', 'count', 5, null)),
];
