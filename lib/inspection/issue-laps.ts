import { strengthClasses } from '@/lib/concrete/anchorage-en';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import {
  aciDevelopmentGeneral,
  aciDevelopmentSimple,
  simpleCase,
  type AciBar,
  type DevelopmentCoating,
} from '@/lib/concrete/development';
import { enLeastStagger, lapSection } from '@/lib/concrete/lap-layout';
import {
  aciCompressionLap,
  aciLapClass,
  aciTensionLap,
  enLapLength,
  lapTolerance,
  typedLap,
  type RequiredLap,
} from '@/lib/concrete/laps';
import { lengthArithmetic, withUnit } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
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
import type { LapBy, RuleOf } from './measurement-rule';
import type { Layer } from './plan';

const fields = {
  'bar diameter': 'layerId',
  fy: 'fyMpa',
  'f’c': 'fcMpa',
  'strength class': 'strengthClass',
  σsd: 'stressMpa',
  'share lapped': 'sharePercent',
  'share spliced': 'sharePercent',
  'As provided / As required': 'providedOverRequired',
  'tension lap': 'tensionLapMm',
  'lap length on the drawing': 'lengthMm',
  'lap tolerance': 'ownMinus',
};

/** A lap of a layer: required length typed or computed, less what the basis lets a placed lap fall short by. */
export function issueLap(rule: RuleOf<'lap-length'>, context: MeasurementContext): IssuedLimits {
  const layer = layerOf(context, rule.layerId);
  return atFields(fields, () => {
    const required = requiredLap(rule.length, layer, context);
    const tolerance = toleranceOf(rule, context, layer, required.lengthMm);
    return limits({
      kind: 'lap-length',
      quantity: 'length',
      least: tolerance.leastMm,
      trail: [...required.trail, ...tolerance.trail],
    });
  });
}

function requiredLap(length: LapBy, layer: Layer, context: MeasurementContext): RequiredLap {
  const diameterMm = layer.barDiameterMm;
  if (length.by !== 'typed' && layer.coating === 'frp')
    throw new ConcreteError('lengthBy', 'Laps of FRP bars are not computed here: enter the drawing’s.');
  switch (length.by) {
    case 'typed':
      return typedLap(length.lengthMm, context.units);
    case 'aci-tension':
      return aciTension(length, layer, context);
    case 'aci-compression':
      return aciCompressionLap({
        diameterMm,
        fyMPa: length.fyMpa,
        fcMPa: length.fcMpa,
        ...(length.tensionLapMm === null ? {} : { tensionLapMm: length.tensionLapMm }),
      });
    case 'en': {
      const strengthClass = strengthClasses.find((one) => one === length.strengthClass.trim().toUpperCase());
      if (!strengthClass)
        throw new ConcreteError(
          'strengthClass',
          `No such class. Write one of ${strengthClasses.join(', ')}.`,
        );
      return enLapLength({
        strengthClass,
        diameterMm,
        condition: length.goodBond ? 'good' : 'other',
        sigmaSdMPa: length.stressMpa,
        sharePercent: length.sharePercent,
      });
    }
  }
}

const coatings: Record<Exclude<Layer['coating'], 'frp'>, DevelopmentCoating> = {
  none: 'uncoated',
  stainless: 'uncoated',
  epoxy: 'epoxy',
  galvanised: 'galvanised',
};

function aciTension(
  length: Extract<LapBy, { by: 'aci-tension' }>,
  layer: Layer,
  context: MeasurementContext,
): RequiredLap {
  const cover = coverToLayer(layer, context);
  const diameterMm = layer.barDiameterMm;
  const clearSpacingMm = spacingOf(layer) - diameterMm;
  const bar: AciBar = {
    diameterMm,
    fyMPa: length.fyMpa,
    fcMPa: length.fcMpa,
    lightweight: length.lightweight,
    coating: layer.coating === 'frp' ? 'uncoated' : coatings[layer.coating],
    topBar: length.topBar,
    clearCoverMm: cover.mm,
    clearSpacingMm,
  };
  const between = arithmetic(
    'Clear spacing = spacing − bar',
    lengthArithmetic([spacingOf(layer), diameterMm], '−', clearSpacingMm, context.units),
  );
  const development =
    length.equation === 'simple'
      ? aciDevelopmentSimple(bar, simpleCase(bar, length.tiesAlongLap))
      : aciDevelopmentGeneral(bar, {
          cbMm: Math.min(cover.mm + diameterMm / 2, spacingOf(layer) / 2),
          transverse: null,
        });
  const { lapClass, trail } = aciLapClass(length.providedOverRequired, length.sharePercent / 100);
  const lap = aciTensionLap({ diameterMm, development, lapClass });
  return { lengthMm: lap.lengthMm, trail: [...cover.trail, between, ...trail, ...lap.trail] };
}

/** Cover to the bars of a layer: what is specified for its face, and the layers outside it. */
function coverToLayer(layer: Layer, context: MeasurementContext) {
  const { requirement, faceName } = outermostOf(context, layer.faceId, 'layerId');
  const outside = context.element.layers.filter(
    (other) => other.faceId === layer.faceId && other.order < layer.order,
  );
  const mm = outside.reduce((sum, other) => sum + other.barDiameterMm, requirement.specifiedMm);
  const terms = [requirement.specifiedMm, ...outside.map((other) => other.barDiameterMm)];
  const rule = `Clear cover of ${layer.name} = specified cover of ${faceName}${outside.length > 0 ? ' + layers outside it' : ''}`;
  return { mm, trail: [arithmetic(rule, lengthArithmetic(terms, '+', mm, context.units))] };
}

const byBasis: Partial<Record<MeasurementContext['basis'], 'aci-117-10' | 'en-13670'>> = {
  'aci-318-19': 'aci-117-10',
  'en-1992': 'en-13670',
};

function toleranceOf(
  rule: Pick<RuleOf<'lap-length'>, 'tolerance' | 'ownMinusMm'>,
  context: MeasurementContext,
  layer: Layer,
  requiredMm: number,
) {
  const bar = { diameterMm: layer.barDiameterMm, requiredMm, showIn: context.units };
  if (rule.tolerance === 'own') {
    if (rule.ownMinusMm === null)
      throw new ConcreteError('ownMinus', 'Enter how much shorter the contract lets it be.', 'absent');
    return lapTolerance({ minusMm: rule.ownMinusMm }, bar);
  }
  return lapTolerance(rule.tolerance === 'basis' ? (byBasis[context.basis] ?? 'none') : rule.tolerance, bar);
}

/** Ends of neighbouring laps along the bars: typed, or 0.3 l0 of EN 1992-1-1. */
export function issueStagger(rule: RuleOf<'lap-stagger'>, context: MeasurementContext): IssuedLimits {
  if (rule.leastMm === null && context.basis !== 'en-1992')
    throw new ConcreteError('leastMm', 'Enter the least stagger of the drawing.', 'absent');
  const { leastMm, trail } =
    rule.leastMm === null
      ? enLeastStagger(rule.lapMm)
      : {
          leastMm: rule.leastMm,
          trail: [fromContract('Least stagger of neighbouring laps', withUnit(rule.leastMm, context.units))],
        };
  return limits({ kind: 'lap-stagger', quantity: 'length', least: leastMm, trail });
}

/** Share of the bars lapped in one section. */
export function issueShareLapped(rule: RuleOf<'share-lapped'>, { units }: MeasurementContext): IssuedLimits {
  const { trail } = lapSection(rule.code, rule.lapMm, units);
  const most = fromContract('Bars lapped in one section, at most', `${numberText(rule.mostPercent, 2)} %`);
  return limits({ kind: 'share-lapped', quantity: 'part', most: rule.mostPercent, trail: [...trail, most] });
}

/** A coupler: its type, both bars in to their marks, threads left in sight. */
export function issueCoupler(rule: RuleOf<'coupler'>): IssuedLimits {
  const { type, mostThreads } = rule;
  return limits({
    kind: 'coupler',
    quantity: 'coupler',
    expected: type.slice(0, 40),
    against: { by: 'coupler', type, mostThreads },
    trail: [
      fromContract('Coupler on the drawing', type),
      fromContract('Both bars reach their witness marks', 'each of them'),
      ...(mostThreads === null ? [] : [fromContract('Threads in sight, at most', String(mostThreads))]),
    ],
  });
}

/** Embedded length of a starter, a hook or a bar end, less what the basis permits; a starter is pulled as well. */
export function issueEmbedment(rule: RuleOf<'embedment'>, context: MeasurementContext): IssuedLimits {
  const layer = layerOf(context, rule.layerId);
  const tolerance = atFields(fields, () => toleranceOf(rule, context, layer, rule.lengthMm));
  const length = fromContract('Embedded length on the drawing', withUnit(rule.lengthMm, context.units));
  return limits({
    kind: 'embedment',
    quantity: rule.starter ? 'starter' : 'length',
    least: tolerance.leastMm,
    trail: [
      length,
      ...tolerance.trail,
      ...(rule.starter ? [fromContract('Each starter is pulled', 'it does not move')] : []),
    ],
  });
}
