import { materialRules } from '@/lib/concrete/bar-materials';
import { epoxyLimits, frpLimit } from '@/lib/concrete/coatings';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { judgeFibreTicket } from '@/lib/concrete/fibres';
import { atFields, layerOf, limits, type IssuedLimits, type MeasurementContext } from './measurement-context';
import type { RuleOf } from './measurement-rule';
import type { Layer } from './plan';

function coated(
  context: MeasurementContext,
  layerId: string,
  coating: Layer['coating'],
  words: string,
): Layer {
  const layer = layerOf(context, layerId);
  if (layer.coating !== coating)
    throw new ConcreteError('layerId', `The bars of layer ${layer.name} are not ${words}.`);
  return layer;
}

/** Damage and patches of an epoxy coating, on the worst foot of a bar. */
export function issueCoating(rule: RuleOf<'coating-damage'>, context: MeasurementContext): IssuedLimits {
  const { barDiameterMm } = coated(context, rule.layerId, 'epoxy', 'epoxy-coated');
  const names = { 'damage limit': 'damagedMostPercent', 'patch limit': 'patchedMostPercent' };
  const { limits: most, trail } = atFields(names, () => epoxyLimits(rule));
  return limits({
    kind: 'coating-damage',
    quantity: 'damage',
    against: { by: 'epoxy', diameterMm: barDiameterMm, ...most },
    trail,
  });
}

/** Visible damage of an FRP bar, on its worst metre. */
export function issueFrp(rule: RuleOf<'frp-damage'>, context: MeasurementContext): IssuedLimits {
  const { barDiameterMm } = coated(context, rule.layerId, 'frp', 'of fibre-reinforced polymer');
  const { mostPercent, trail } = atFields({ 'damage limit': 'mostPercent' }, () =>
    frpLimit(rule.mostPercent),
  );
  return limits({
    kind: 'frp-damage',
    quantity: 'damage',
    against: { by: 'frp', diameterMm: barDiameterMm, mostPercent },
    trail,
  });
}

/** Places where carbon steel touches stainless bars: none, where the contract forbids it. */
export function issueStainlessContact(
  rule: RuleOf<'stainless-contact'>,
  context: MeasurementContext,
): IssuedLimits {
  coated(context, rule.layerId, 'stainless', 'stainless');
  const trail = materialRules('stainless').filter((step) => step.rule.startsWith('Contact'));
  return limits({ kind: 'stainless-contact', quantity: 'count', most: 0, trail });
}

/** Fibres by the batch ticket: type, and dosage in kg/m³. */
export function issueFibres(rule: RuleOf<'fibre-dosage'>): IssuedLimits {
  const { fibreType, kgPerM3, minusPercent } = rule;
  const names = {
    'dosage tolerance': 'minusPercent',
    'specified dosage': 'kgPerM3',
    'specified fibre': 'fibreType',
  };
  const specified = { fibreType, kgPerM3: kgPerM3, minusPercent };
  const { trail } = atFields(names, () =>
    judgeFibreTicket(
      { fibreType, fibreKgPerM3: kgPerM3 },
      { fibreType, fibreKgPerM3: specified.kgPerM3, minusPercent },
    ),
  );
  return limits({
    kind: 'fibre-dosage',
    quantity: 'ticket',
    least: kgPerM3 * (1 - minusPercent / 100),
    against: { by: 'fibre', type: fibreType },
    trail,
  });
}
