import { enBondCondition } from '@/lib/concrete/anchorage-en';
import { given } from '@/lib/concrete/check-input';
import { enLapArrangement } from '@/lib/concrete/lap-layout';
import { enLapLength } from '@/lib/concrete/laps';
import { numberText } from '@/lib/concrete/number-text';
import type { TrailStep } from '@/lib/concrete/trail';
import type { ValuesOf } from '../field-spec';
import { lengthTexts } from '../length-text';
import type { ComputedLap } from './lap-aci';
import type { lapFields } from './lap-fields';

type Values = ValuesOf<typeof lapFields>;

function conditionOf(values: Values): { condition: 'good' | 'other'; trail: TrailStep[] } {
  if (values.bond !== 'place') return { condition: values.bond, trail: [] };
  return enBondCondition({
    depthMm: given('member depth', values.memberDepth),
    aboveUndersideMm: given('height of the bar', values.aboveUnderside),
    inclinationDegrees: given('inclination', values.inclination),
  });
}

/** A lap by EN 1992-1-1 8.4 and 8.7, and how laps lie beside each other. */
export function lapByEn(values: Values): ComputedLap {
  const bar = given('bar', values.bar);
  const { condition, trail } = conditionOf(values);
  const lap = enLapLength({
    strengthClass: values.strengthClass,
    diameterMm: bar.diameterMm,
    condition,
    gammaC: values.gammaC,
    alphaCt: values.alphaCt,
    bondVerifiedAboveC60: values.bondVerified,
    alpha1: values.alpha1,
    alpha2: values.alpha2,
    alpha3: values.alpha3,
    alpha5: values.alpha5,
    sigmaSdMPa: given('σsd', values.sigma),
    sharePercent: given('share lapped', values.lapped),
  });
  const arrangement = enLapArrangement({ diameterMm: bar.diameterMm, lapMm: lap.lengthMm });
  const { units } = values;
  return {
    lengthMm: lap.lengthMm,
    trail: [...trail, ...lap.trail, ...arrangement.trail],
    formula: 'α1 α2 α3 α5 α6 lb,rqd ≥ l0,min',
    figures: [
      {
        id: 'basic',
        label: 'Basic anchorage lb,rqd',
        ...lengthTexts(lap.basicMm, units),
        source: 'EN 1992-1-1, 8.4.3',
      },
      {
        id: 'alpha6',
        label: 'α6',
        text: numberText(lap.alpha6, 3),
        value: lap.alpha6,
        source: 'EN 1992-1-1, Table 8.3',
      },
      {
        id: 'stagger',
        label: 'Ends of adjacent laps apart, at least',
        ...lengthTexts(arrangement.leastStaggerMm, units),
      },
      { id: 'apart', label: 'Bars of a lap apart, at most', ...lengthTexts(arrangement.mostApartMm, units) },
      {
        id: 'between',
        label: 'Adjacent laps apart across, at least',
        ...lengthTexts(arrangement.leastBetweenLapsMm, units),
      },
    ],
  };
}
