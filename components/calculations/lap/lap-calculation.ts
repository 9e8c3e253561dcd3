import { given } from '@/lib/concrete/check-input';
import { lapTolerance, typedLap, type LapToleranceRule } from '@/lib/concrete/laps';
import { atLeast, withUnit, type LengthUnit } from '@/lib/concrete/length';
import { defineCalculation, type Figure } from '../calculation';
import type { ValuesOf } from '../field-spec';
import { lengthTexts, setOutText } from '../length-text';
import { lapByAci, type ComputedLap } from './lap-aci';
import { lapByEn } from './lap-en';
import { lapFields } from './lap-fields';

type Values = ValuesOf<typeof lapFields>;

export interface LapScene {
  units: LengthUnit;
  lapMm: number;
  leastMm: number;
  diameterMm: number;
  largerMm: number;
}

function toleranceOf(values: Values): LapToleranceRule {
  return values.tolerance === 'contract'
    ? { minusMm: given('lap tolerance', values.toleranceMinus) }
    : values.tolerance;
}

/** The lap that governs: the drawing's where it was entered, else the computed one. */
function governing(values: Values, computed: ComputedLap) {
  const { units } = values;
  const main: Figure = {
    id: 'lap',
    label: 'Required lap',
    ...lengthTexts(computed.lengthMm, units),
    formula: computed.formula,
    source: values.basis === 'en-1992' ? 'EN 1992-1-1, 8.7.3' : 'ACI 318-19, 25.5',
    main: true,
  };
  if (values.drawn === undefined)
    return { lap: computed, main, rest: [] as Figure[], warnings: [] as string[] };
  const drawn = typedLap(values.drawn, units);
  const short = !atLeast(drawn.lengthMm, computed.lengthMm);
  return {
    lap: { ...drawn, trail: [...computed.trail, ...drawn.trail] },
    main: {
      ...main,
      ...lengthTexts(drawn.lengthMm, units),
      label: 'Required lap, from the drawing',
      formula: undefined,
      source: 'contract documents',
    },
    rest: [{ ...main, id: 'computed', label: 'Computed, for comparison', main: false }],
    warnings: short
      ? [
          `The drawing asks for ${withUnit(drawn.lengthMm, units, computed.lengthMm)}, less than the computed ${withUnit(computed.lengthMm, units, drawn.lengthMm)}. The drawing governs here: ask the engineer.`,
        ]
      : [],
  };
}

/** The lap that is required, by which rule, and how much shorter it may be placed. */
export const lapCalculation = defineCalculation({
  fields: lapFields,
  groups: [
    { legend: 'Basis', names: ['basis', 'force'] },
    { legend: 'Bars', names: ['bar', 'largerBar', 'fy', 'sigma', 'coating', 'confined', 'tensionLap'] },
    {
      legend: 'Concrete around them',
      names: [
        'fc',
        'strengthClass',
        'bond',
        'memberDepth',
        'aboveUnderside',
        'inclination',
        'clearCover',
        'clearSpacing',
        'lightweight',
        'topBar',
        'bondVerified',
      ],
    },
    {
      legend: 'Method',
      names: ['method', 'codeTies', 'transverse', 'tieBar', 'tieLegs', 'tieSpacing', 'tieBars'],
    },
    { legend: 'Factors', names: ['alpha1', 'alpha2', 'alpha3', 'alpha5', 'gammaC', 'alphaCt'] },
    { legend: 'Lapped together', names: ['spliced', 'lapped', 'excess'] },
    { legend: 'Contract and placing', names: ['drawn', 'tolerance', 'toleranceMinus'] },
  ],
  compute: (values) => {
    const computed = values.basis === 'en-1992' ? lapByEn(values) : lapByAci(values);
    const { lap, main, rest, warnings } = governing(values, computed);
    const bar = given('bar', values.bar);
    const { units } = values;
    const least = lapTolerance(toleranceOf(values), {
      diameterMm: bar.diameterMm,
      requiredMm: lap.lengthMm,
      showIn: units,
    });
    return {
      figures: [
        main,
        { id: 'set-out', label: 'Set out as', text: setOutText(lap.lengthMm, units), value: null },
        { id: 'least', label: 'Least accepted as placed', ...lengthTexts(least.leastMm, units) },
        ...rest,
        ...computed.figures,
      ],
      warnings,
      trail: [...lap.trail, ...least.trail],
      cautions: [
        'The lap on the drawing governs. Factors above least cover, confinement and stress are the designer’s: 1 is the safe value of each α.',
      ],
      scene: {
        units,
        lapMm: lap.lengthMm,
        leastMm: least.leastMm,
        diameterMm: bar.diameterMm,
        largerMm: values.largerBar?.diameterMm ?? bar.diameterMm,
      } satisfies LapScene,
    };
  },
});
