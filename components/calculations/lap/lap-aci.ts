import { given, positive } from '@/lib/concrete/check-input';
import type { Bar } from '@/lib/concrete/bars';
import {
  aciDevelopmentCompression,
  aciDevelopmentGeneral,
  aciDevelopmentSimple,
  simpleCase,
  type AciBar,
  type DevelopmentLength,
} from '@/lib/concrete/development';
import { aciCompressionLap, aciLapClass, aciTensionLap, type RequiredLap } from '@/lib/concrete/laps';
import { withUnit } from '@/lib/concrete/length';
import { arithmetic } from '@/lib/concrete/trail-source';
import type { Figure } from '../calculation';
import type { ValuesOf } from '../field-spec';
import { lengthTexts } from '../length-text';
import type { lapFields } from './lap-fields';

type Values = ValuesOf<typeof lapFields>;

/** A lap that was computed, with the numbers it was made of. */
export interface ComputedLap extends RequiredLap {
  figures: Figure[];
  formula: string;
}

function barOf(values: Values, bar: Bar): AciBar {
  return {
    diameterMm: bar.diameterMm,
    fyMPa: given('fy', values.fy),
    fcMPa: given('f’c', values.fc),
    lightweight: values.lightweight,
    coating: values.coating,
    topBar: values.topBar,
    clearCoverMm: given('clear cover', values.clearCover),
    clearSpacingMm: given('clear spacing', values.clearSpacing),
  };
}

/** cb of the general equation from clear cover and clear spacing, as a step of its own. */
function withCb(bar: AciBar, values: Values): DevelopmentLength {
  const toSurface = bar.clearCoverMm + bar.diameterMm / 2;
  const halfCentres = (bar.clearSpacingMm + bar.diameterMm) / 2;
  const cbMm = Math.min(toSurface, halfCentres);
  const transverse = values.transverse
    ? {
        areaMm2: given('Atr', values.tieBar).areaMm2 * given('tieLegs', values.tieLegs),
        spacingMm: given('s', values.tieSpacing),
        bars: given('n', values.tieBars),
      }
    : null;
  const found = aciDevelopmentGeneral(bar, { cbMm, transverse });
  const say = (mm: number) => withUnit(mm, values.units);
  const step = arithmetic(
    'cb = lesser of cover + db/2 and half of the centre spacing',
    `${say(toSurface)}; ${say(halfCentres)}: ${say(cbMm)}`,
  );
  return { ...found, trail: [step, ...found.trail] };
}

function developmentOf(values: Values, bar: Bar): DevelopmentLength {
  const aciBar = barOf(values, bar);
  return values.method === 'simple'
    ? aciDevelopmentSimple(aciBar, simpleCase(aciBar, values.codeTies))
    : withCb(aciBar, values);
}

function tensionLap(values: Values, bar: Bar): ComputedLap {
  const development = developmentOf(values, bar);
  const { lapClass, factor, trail } = aciLapClass(
    given('excess', values.excess),
    given('share spliced', values.spliced) / 100,
  );
  const larger = values.largerBar;
  const ofLarger = larger && developmentOf(values, larger);
  const lap = aciTensionLap({
    diameterMm: bar.diameterMm,
    development,
    lapClass,
    largerBar: larger && ofLarger && { diameterMm: larger.diameterMm, development: ofLarger },
  });
  return {
    lengthMm: lap.lengthMm,
    trail: [
      ...trail,
      ...(ofLarger?.trail ?? []).map((step) => ({ ...step, rule: `Larger bar: ${step.rule}` })),
      ...lap.trail,
    ],
    formula: `${factor === 1 ? '1.0' : '1.3'} ld, at least 12 in`,
    figures: [
      { id: 'class', label: 'Class of the lap', text: lapClass, value: null },
      {
        id: 'ld',
        label: 'Development length ld',
        ...lengthTexts(development.lengthMm, values.units),
        source: values.method === 'simple' ? 'ACI 318-19, Table 25.4.2.3' : 'ACI 318-19, 25.4.2.4',
      },
    ],
  };
}

function compressionLap(values: Values, bar: Bar): ComputedLap {
  const steel = { fyMPa: given('fy', values.fy), fcMPa: given('f’c', values.fc) };
  const larger = values.largerBar;
  const development =
    larger &&
    aciDevelopmentCompression({
      ...steel,
      diameterMm: positive('larger bar', larger.diameterMm),
      lightweight: values.lightweight,
      confined: values.confined,
    });
  const lap = aciCompressionLap({
    ...steel,
    diameterMm: bar.diameterMm,
    tensionLapMm: values.tensionLap,
    largerBar: larger &&
      development && { diameterMm: larger.diameterMm, compressionDevelopmentMm: development.lengthMm },
  });
  return {
    lengthMm: lap.lengthMm,
    trail: [...(development?.trail ?? []), ...lap.trail],
    formula: lap.trail[0]?.rule.replace('Compression lap ', '') ?? '',
    figures: development
      ? [{ id: 'ldc', label: 'ldc of the larger bar', ...lengthTexts(development.lengthMm, values.units) }]
      : [],
  };
}

/** A lap by ACI 318-19 25.5, in tension or in compression. */
export function lapByAci(values: Values): ComputedLap {
  const bar = given('bar', values.bar);
  return values.force === 'tension' ? tensionLap(values, bar) : compressionLap(values, bar);
}
