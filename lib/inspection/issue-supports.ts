import { ConcreteError } from '@/lib/concrete/concrete-error';
import { supportHeight, supportHeightLimits, supportSpacingLimit } from '@/lib/concrete/supports';
import { formatLength, lengthArithmetic, withUnit } from '@/lib/concrete/length';
import { tendonBand } from '@/lib/concrete/tendons';
import {
  intersectionsPerSquareMetre,
  requiredTies,
  tieSampleSquares,
  type TiePattern,
} from '@/lib/concrete/ties';
import { depthTolerance } from '@/lib/concrete/tolerances';
import { arithmetic, fromContract } from '@/lib/concrete/trail-source';
import {
  atFields,
  layerOf,
  limits,
  outermostOf,
  spacingOf,
  type IssuedLimits,
  type MeasurementContext,
} from './measurement-context';
import type { RuleOf } from './measurement-rule';
import type { TrailStep } from './trail-step';

/**
 * Height of the supports under a top mat, from the section's arithmetic: what the cover may lose is how much too high
 * they may be, and what the effective depth may lose is how much too low.
 */
export function issueSupportHeight(
  rule: RuleOf<'support-height'>,
  context: MeasurementContext,
): IssuedLimits {
  const top = outermostOf(context, rule.faceId);
  const { specifiedMm, leastAcceptedMm } = top.requirement;
  const carried = rule.carriedLayerIds.map((id) => layerOf(context, id, 'carriedLayerIds'));
  const below = rule.standsOn.faceId ? outermostOf(context, rule.standsOn.faceId, 'standsOnFaceId') : null;
  const under = rule.standsOn.layerIds.map((id) => layerOf(context, id, 'standsOnLayerIds'));
  const asPart = ({ name, barDiameterMm }: (typeof under)[number]) => ({ name, sizeMm: barDiameterMm });
  const height = supportHeight({
    thicknessMm: context.element.thicknessMm,
    topCoverMm: specifiedMm,
    carried: carried.map(({ name, barDiameterMm }) => ({ name, diameterMm: barDiameterMm })),
    standsOn: [
      ...(below ? [{ name: `Cover of ${below.faceName}`, sizeMm: below.requirement.specifiedMm }] : []),
      ...under.map(asPart),
      ...(rule.standsOn.otherMm > 0
        ? [{ name: 'What else it stands on', sizeMm: rule.standsOn.otherMm }]
        : []),
    ],
    showIn: context.units,
  });
  const depth = depthMinus(rule, context, top.requirement.depth);
  const found = atFields({ 'effective depth tolerance': 'ownMinus' }, () =>
    supportHeightLimits(
      height.heightMm,
      { coverMinusMm: specifiedMm - leastAcceptedMm, depthMinusMm: depth.minusMm },
      context.units,
    ),
  );
  const cover = arithmetic(
    `What the cover of ${top.faceName} may lose: specified less least accepted`,
    lengthArithmetic([specifiedMm, leastAcceptedMm], '−', specifiedMm - leastAcceptedMm, context.units),
  );
  return limits({
    kind: 'support-height',
    quantity: 'length',
    least: found.leastMm,
    most: found.mostMm,
    trail: [...height.trail, cover, ...depth.trail, ...found.trail],
  });
}

function depthMinus(
  rule: RuleOf<'support-height'>,
  { basis, element, units }: MeasurementContext,
  judged: { minusMm: number; trail: TrailStep[] } | undefined,
): { minusMm: number; trail: TrailStep[] } {
  if (rule.ownMinusMm !== null) {
    const step = fromContract('What the effective depth may lose', withUnit(rule.ownMinusMm, units));
    return { minusMm: rule.ownMinusMm, trail: [step] };
  }
  if (judged) return judged;
  const planned = element.effectiveDepthMm ?? null;
  if (planned === null || basis === 'contract') {
    throw new ConcreteError(
      'ownMinus',
      'Enter how much too low a support may be: no effective depth with a tolerance is planned here.',
      'absent',
    );
  }
  return depthTolerance(
    { basis, element: element.type, meeting: 'formed', thicknessMm: element.thicknessMm, showIn: units },
    planned,
  );
}

/** Greatest spacing of the supports under one layer; it depends on the size of its bars. */
export function issueSupportSpacing(
  rule: RuleOf<'support-spacing'>,
  context: MeasurementContext,
): IssuedLimits {
  const { name, barDiameterMm } = layerOf(context, rule.layerId);
  const names = { 'support spacing in the plan': 'planMm', 'bar diameter': 'layerId' };
  const { mostMm, trail } = atFields(names, () =>
    supportSpacingLimit({
      rule: rule.by,
      diameterMm: barDiameterMm,
      ...(rule.planMm === null ? {} : { planLimitMm: rule.planMm }),
      showIn: context.units,
    }),
  );
  const note = `Under layer ${name}. Over it fails even where the cover is met.`;
  return limits({
    kind: 'support-spacing',
    quantity: 'length',
    most: mostMm,
    trail: trail.map((step) => ({ ...step, note: [step.note, note].filter(Boolean).join(' ') })),
  });
}

/** Ties of a mat: the pattern's share, counted in squares of which one lies at an edge. */
export function issueTies(rule: RuleOf<'tie-share'>, context: MeasurementContext): IssuedLimits {
  const [x, y] = [layerOf(context, rule.layerId), layerOf(context, rule.otherLayerId, 'otherLayerId')];
  if (x.id === y.id) throw new ConcreteError('otherLayerId', 'Choose the layer that crosses the first one.');
  const spacingXMm = spacingOf(x);
  const spacingYMm = spacingOf(y, 'otherLayerId');
  const perArea = intersectionsPerSquareMetre(spacingXMm, spacingYMm);
  const squares = tieSampleSquares(context.units);
  const perimeterApart = rule.pattern === 'perimeter-every';
  const sample = { pattern: patternOf(rule), intersections: 100, spacingXMm, spacingYMm };
  const required = atFields({ 'share of ties': 'sharePercent' }, () => requiredTies(sample));
  return limits({
    kind: 'tie-share',
    quantity: 'share',
    // With the perimeter apart the share follows from each square's own edge.
    least: perimeterApart ? null : 100 * required.share,
    against: { by: 'tie-pattern', perimeterApart, oneAtEdge: true },
    trail: [...perArea.trail, ...required.trail.map(withoutSample), ...squares.trail],
  });
}

/** The step of a pattern computed on a sample of a hundred: its number of ties is that sample's and nobody else's. */
const withoutSample = (step: TrailStep): TrailStep => ({ ...step, value: 'counted in each square' });

function patternOf(rule: RuleOf<'tie-share'>): TiePattern {
  if (rule.pattern !== 'share') return { kind: rule.pattern };
  if (rule.sharePercent === null)
    throw new ConcreteError('sharePercent', 'Enter the share of the intersections.', 'absent');
  return { kind: 'share', share: rule.sharePercent / 100 };
}

/** Height of a tendon at a high or a low point, from a named surface to a named part of it, with its band. */
export function issueTendonHeight(rule: RuleOf<'tendon-height'>, context: MeasurementContext): IssuedLimits {
  const { from, to, heightMm } = rule;
  const { units } = context;
  if (heightMm >= context.element.thicknessMm)
    throw new ConcreteError('heightMm', 'The tendon would lie outside the member.');
  if (rule.band === 'own' && !rule.ownMm)
    throw new ConcreteError('ownPlus', 'Enter the minus and the plus of the band.', 'absent');
  const own = { minusMm: rule.ownMm?.minus ?? 0, plusMm: rule.ownMm?.plus ?? 0 };
  const band = tendonBand(rule.band === 'own' ? own : rule.band, context.element.thicknessMm, units);
  const words = `Height from ${from} to ${to} of the tendon`;
  return limits({
    kind: 'tendon-height',
    quantity: 'height',
    least: heightMm - band.minusMm,
    most: heightMm + band.plusMm,
    against: { by: 'datum', from, to },
    trail: [
      fromContract(words, withUnit(heightMm, units)),
      ...band.trail,
      arithmetic(
        'Band',
        `${formatLength(heightMm - band.minusMm, units)} to ${withUnit(heightMm + band.plusMm, units)}`,
      ),
    ],
  });
}
