import type { Ground } from '@/components/drawings/hatch';
import { given } from '@/lib/concrete/check-input';
import type { CoverRequirementInput } from '@/lib/concrete/cover-input';
import { coverRequirement } from '@/lib/concrete/cover-requirement';
import type { LengthUnit } from '@/lib/concrete/length';
import { defineCalculation, type Figure } from '../calculation';
import type { ValuesOf } from '../field-spec';
import { lengthTexts, tapeText } from '../length-text';
import { coverFields } from './cover-fields';

type Values = ValuesOf<typeof coverFields>;

export interface CoverScene {
  units: LengthUnit;
  specifiedMm: number;
  leastAcceptedMm: number;
  mostAcceptedMm: number | null;
  meeting: Ground;
  barDiameterMm: number;
}

function exposureOf(values: Values): string {
  switch (values.basis) {
    case 'aci-318-19':
      return values.aciExposure;
    case 'en-1992':
      return [values.enExposure, values.enExposure2].filter((name) => name !== 'none').join(', ');
    case 'is-456':
      return values.isExposure;
    case 'as-3600':
      return values.asExposure;
    case 'csa-a23.1':
      return values.csaExposure;
    case 'contract':
      return '';
  }
}

/** The structural class as entered, or what it is worked out from. */
function classOf(values: Values): Partial<CoverRequirementInput> {
  if (values.enClass !== 'life50' && values.enClass !== 'life100') return { structuralClass: values.enClass };
  return {
    workingLifeYears: values.enClass === 'life50' ? 50 : 100,
    strengthClass: values.strengthClass === 'none' ? undefined : values.strengthClass,
    slabGeometry: values.slabGeometry,
    specialQualityControl: values.qualityControl,
  };
}

function inputOf(values: Values): CoverRequirementInput {
  return {
    ...classOf(values),
    basis: values.basis,
    element: values.element,
    meeting: values.meeting,
    soffit: values.soffit && values.meeting === 'formed',
    exposure: exposureOf(values),
    barDiameterMm: given('bar', values.bar).diameterMm,
    bundleOf: Number(values.bundle),
    behindTiesMm: values.ties?.diameterMm,
    thicknessMm: values.thickness,
    effectiveDepthMm: values.depth,
    aggregateMm: values.aggregate,
    showIn: values.units,
    aciUnits: values.aciUnits,
    deltaCdevMm: values.deltaCdev,
    toleranceClass: values.toleranceClass === '1' ? 1 : 2,
    strengthMpa: values.strength,
    leastDimensionMm: values.leastDimension,
    barRole: values.barRole,
    membrane: values.membrane,
    contractSpecifiedMm: values.contractCover,
    contractMinusMm: values.minus,
    contractPlusMm: values.plus,
    neverLess: values.deviation === 'never-less',
  };
}

/** The required cover of one steel on one face, with what execution permits. */
export const coverCalculation = defineCalculation({
  fields: coverFields,
  groups: [
    { legend: 'Basis', names: ['basis', 'aciUnits'] },
    {
      legend: 'Face',
      names: [
        'element',
        'meeting',
        'soffit',
        'thickness',
        'depth',
        'aciExposure',
        'enExposure',
        'enExposure2',
        'isExposure',
        'asExposure',
        'csaExposure',
        'membrane',
        'leastDimension',
      ],
    },
    {
      legend: 'Concrete',
      names: ['enClass', 'strengthClass', 'strength', 'aggregate', 'slabGeometry', 'qualityControl'],
    },
    { legend: 'Steel', names: ['bar', 'bundle', 'ties', 'barRole'] },
    {
      legend: 'Contract and execution',
      names: ['contractCover', 'deltaCdev', 'toleranceClass', 'deviation', 'minus', 'plus'],
    },
  ],
  compute: (values) => {
    const input = inputOf(values);
    const found = coverRequirement(input);
    const { units } = values;
    const figure = (id: string, label: string, mm: number): Figure => {
      const texts = lengthTexts(mm, units);
      const tape = tapeText(mm, units);
      return { id, label, ...texts, also: tape ? `${texts.also}; ${tape}` : texts.also };
    };
    return {
      figures: [
        { ...figure('specified', 'Specified cover', found.specifiedMm), main: true },
        figure('least', 'Least accepted', found.leastAcceptedMm),
        found.mostAcceptedMm === null
          ? { id: 'most', label: 'Most accepted', text: 'no upper limit', value: null, words: true }
          : figure('most', 'Most accepted', found.mostAcceptedMm),
        found.codeMinimumMm === null
          ? { id: 'code', label: 'Code minimum', text: 'not known', value: null, words: true }
          : figure('code', 'Code minimum, for comparison', found.codeMinimumMm),
      ],
      warnings: found.warnings,
      trail: found.trail,
      cautions: [
        'The contract value governs where it was entered. Cover for fire is not in here: the engineer enters it in the contract value.',
      ],
      scene: {
        units,
        specifiedMm: found.specifiedMm,
        leastAcceptedMm: found.leastAcceptedMm,
        mostAcceptedMm: found.mostAcceptedMm,
        meeting: input.meeting,
        barDiameterMm: input.barDiameterMm,
      } satisfies CoverScene,
    };
  },
});
