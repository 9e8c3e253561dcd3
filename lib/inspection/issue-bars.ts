import {
  barsAcrossBay,
  greatestSpacing,
  leastClearDistance,
  specifiedSpacingStep,
} from '@/lib/concrete/bar-spacing';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { formatLength, withUnit } from '@/lib/concrete/length';
import { spacingTolerance } from '@/lib/concrete/spacing-tolerance';
import { arithmetic, fromContract } from '@/lib/concrete/trail-source';
import {
  atFields,
  layerOf,
  limits,
  spacingOf,
  type IssuedLimits,
  type MeasurementContext,
} from './measurement-context';
import type { RuleOf } from './measurement-rule';
import type { Layer } from './plan';
import type { TrailStep } from './trail-step';

/** The bar of a layer, by its mark. */
export function issueBarSize(rule: RuleOf<'bar-size'>, context: MeasurementContext): IssuedLimits {
  const { name, barDesignation, grade } = layerOf(context, rule.layerId);
  const value = [barDesignation, grade].filter(Boolean).join(', ');
  return limits({
    kind: 'bar-size',
    quantity: 'designation',
    expected: barDesignation,
    trail: [fromContract(`Bar of layer ${name} on the drawing`, value, 'A larger bar is a departure too.')],
  });
}

/** Bars across a bay: as the layer counts them, or as many as its spacing needs. */
export function issueBarCount(rule: RuleOf<'bar-count'>, context: MeasurementContext): IssuedLimits {
  const layer = layerOf(context, rule.layerId);
  const note = 'Never fewer, even where every gap is within its tolerance.';
  if (rule.bay === null) {
    if (layer.count === null)
      throw new ConcreteError('bayWidth', 'The layer has no count: give the width of the bay.', 'absent');
    const step = fromContract(`Bars of layer ${layer.name}`, String(layer.count), note);
    return limits({ kind: 'bar-count', quantity: 'count', least: layer.count, trail: [step] });
  }
  const { widthMm, edgeMm } = rule.bay;
  const spacingMm = spacingOf(layer);
  const { count, trail } = atFields({ 'bay width': 'bayWidth', 'first bar from the edge': 'edge' }, () =>
    barsAcrossBay({ widthMm, firstBarFromEdgeMm: edgeMm, spacingMm, showIn: context.units }),
  );
  const steps = trail.map((step) => ({ ...step, note }));
  return limits({
    kind: 'bar-count',
    quantity: 'count',
    least: count,
    trail: [specifiedSpacingStep(spacingMm, context.units), ...steps],
  });
}

/**
 * Spacing over several gaps, as one tape length between the same edges of the first and the last bar. The deviation
 * counts once over the run and not for each gap, which is the stricter reading; the code's greatest spacing holds for
 * the mean.
 */
export function issueBarSpacing(rule: RuleOf<'bar-spacing'>, context: MeasurementContext): IssuedLimits {
  const layer = layerOf(context, rule.layerId);
  const spacingMm = spacingOf(layer);
  const deviation = spacingDeviation(rule, context, spacingMm);
  const run = rule.gaps * spacingMm;
  const byCode = rule.use === null ? null : codeMost(rule.use, layer, context);
  const least = run - deviation.minusMm;
  const most = Math.min(run + deviation.plusMm, byCode ? rule.gaps * byCode.mostMm : Infinity);
  const shown = (mm: number) => formatLength(mm, context.units);
  const runStep = arithmetic(
    `Over ${rule.gaps} gaps, the deviation once`,
    `${rule.gaps} × ${shown(spacingMm)} = ${shown(run)}: ${least > 0 ? `${shown(least)} to ` : 'at most '}${withUnit(most, context.units)}`,
  );
  if (least > most) {
    throw new ConcreteError('layerId', 'The specified spacing is more than the code lets bars be apart.');
  }
  return limits({
    kind: 'bar-spacing',
    quantity: 'length',
    least: least > 0 ? least : null,
    most,
    trail: [
      specifiedSpacingStep(spacingMm, context.units),
      ...deviation.trail,
      ...(byCode?.trail ?? []),
      runStep,
    ],
  });
}

function spacingDeviation(
  rule: RuleOf<'bar-spacing'>,
  { basis, element, units }: MeasurementContext,
  specifiedMm: number,
): { minusMm: number; plusMm: number; trail: TrailStep[] } {
  if (rule.ownMm) {
    const { minus, plus } = rule.ownMm;
    const value = `−${formatLength(minus, units)} / +${withUnit(plus, units)}`;
    return { minusMm: minus, plusMm: plus, trail: [fromContract('Permitted deviation of spacing', value)] };
  }
  return atFields({ 'spacing deviation': 'ownPlus' }, () =>
    spacingTolerance({ basis, steel: rule.steel, specifiedMm, memberMm: element.thicknessMm }),
  );
}

function codeMost(
  use: RuleOf<'greatest-spacing'>['use'],
  layer: Layer,
  { element, units }: MeasurementContext,
): { mostMm: number; trail: TrailStep[] } {
  const code = use.startsWith('slab-') ? 'en-1992-1-1' : 'aci-318-19';
  return greatestSpacing({ basis: code, use, thicknessMm: element.thicknessMm, showIn: units });
}

/** The greatest gap between the bars of a layer, each gap by itself, by the code's own limit. */
export function issueGreatestSpacing(
  rule: RuleOf<'greatest-spacing'>,
  context: MeasurementContext,
): IssuedLimits {
  const { mostMm, trail } = codeMost(rule.use, layerOf(context, rule.layerId), context);
  return limits({ kind: 'greatest-spacing', quantity: 'length', most: mostMm, trail });
}

/** Clear distance between bars, each gap by itself, against the bar and the aggregate of the plan's mix. */
export function issueClearDistance(
  rule: RuleOf<'clear-distance'>,
  context: MeasurementContext,
): IssuedLimits {
  const layer = layerOf(context, rule.layerId);
  const { mix, units } = context;
  if (!mix)
    throw new ConcreteError(
      'aggregateMm',
      'Name the mix with its largest aggregate: the bars have to let it through.',
      'absent',
    );
  const { leastMm, trail } = leastClearDistance({
    basis: rule.code,
    place: rule.place,
    diameterMm: layer.barDiameterMm,
    aggregateMm: mix.aggregateMm,
    showIn: units,
  });
  const gap = layer.spacingMm === null ? null : layer.spacingMm - layer.barDiameterMm;
  if (gap !== null && rule.place !== 'between-layers' && gap < leastMm - 1e-6) {
    throw new ConcreteError(
      'layerId',
      `Bars ${layer.barDesignation} at ${withUnit(layer.spacingMm ?? 0, units)} leave ${withUnit(gap, units, leastMm)} between them, and ${withUnit(leastMm, units, gap)} are needed: they do not fit.`,
    );
  }
  const aggregate = fromContract(`Largest aggregate of ${mix.name}`, withUnit(mix.aggregateMm, units));
  return limits({
    kind: 'clear-distance',
    quantity: 'length',
    least: leastMm,
    trail: [
      aggregate,
      ...trail.map((step) => ({ ...step, note: step.note ?? 'No minus tolerance: concrete has to pass.' })),
    ],
  });
}
