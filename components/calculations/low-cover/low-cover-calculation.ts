import { given } from '@/lib/concrete/check-input';
import { atLeast, type LengthUnit } from '@/lib/concrete/length';
import { defineCalculation } from '../calculation';
import { lowCoverFields } from './low-cover-fields';
import {
  bondAndFire,
  carbonationEstimates,
  chlorideEstimates,
  coversOf,
  depthEstimates,
} from './low-cover-estimates';

export interface LowCoverScene {
  units: LengthUnit;
  specifiedMm: number;
  measuredMm: number;
  diameterMm: number;
}

/** What cover that is not as specified does to durability, strength, bond and fire: advice, never a score. */
export const lowCoverCalculation = defineCalculation({
  fields: lowCoverFields,
  groups: [
    { legend: 'Cover', names: ['specified', 'measured', 'bar'] },
    { legend: 'Carbonation', names: ['carbonation', 'carbonDepth', 'carbonAge'] },
    {
      legend: 'Chloride',
      names: ['ageing', 'm', 'chloride', 'surface', 'initial', 'critical', 'age', 'diffusion'],
    },
    { legend: 'Strength and fire', names: ['depth', 'planned', 'found', 'fire', 'fireRequired'] },
  ],
  compute: (values) => {
    const covers = coversOf(values);
    const estimates = [
      ...carbonationEstimates(values, covers),
      ...chlorideEstimates(values, covers),
      ...depthEstimates(values),
      ...bondAndFire(values, covers),
    ];
    return {
      figures: estimates.flatMap(({ figures }) => figures),
      warnings: atLeast(covers.measuredMm, covers.specifiedMm)
        ? ['The measured cover is not less than the specified one.']
        : [],
      trail: estimates.flatMap(({ trail }) => trail),
      cautions: [...new Set(estimates.flatMap(({ cautions }) => cautions))],
      scene: {
        units: values.units,
        ...covers,
        diameterMm: given('bar', values.bar).diameterMm,
      } satisfies LowCoverScene,
    };
  },
});
