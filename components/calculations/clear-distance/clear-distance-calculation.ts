import { judgeClearDistances, leastClearDistance } from '@/lib/concrete/bar-spacing';
import { given } from '@/lib/concrete/check-input';
import type { LengthUnit } from '@/lib/concrete/length';
import { defineCalculation, type Figure } from '../calculation';
import { bar, choice, length, number, unitsField } from '../fields';
import { lengthTexts, setOutText } from '../length-text';

const aci = { basis: ['aci-318-19'] };
const en = { basis: ['en-1992'] };

const fields = {
  units: unitsField,
  basis: choice('Basis', { 'aci-318-19': 'ACI 318-19', 'en-1992': 'EN 1992-1-1' }, ['en-1992', 'aci-318-19']),
  place: choice(
    'Bars',
    {
      layer: 'of one layer: beam, slab, wall',
      'between-layers': 'of two layers, one above the other',
      column: 'of a column, along its length',
    },
    'layer',
    { when: aci },
  ),
  bar: bar('Largest bar', ['25 mm', '#8'], { hint: '#8, 25 mm, 25M, N24', refusedAs: ['bar diameter'] }),
  aggregate: length('Largest aggregate', ['20', '3/4'], {
    hint: 'Nominal size',
    mostMm: 500,
    refusedAs: ['largest aggregate'],
  }),
  k1: number('k1', '1', [0, 10], { hint: 'National annex', when: en }),
  k2: length('k2', ['5', '5 mm'], { hint: 'National annex', when: en, mostMm: 500 }),
  found: length('Narrowest gap found', '', {
    optional: true,
    mostMm: 10_000,
    refusedAs: ['clear distance', 'clear distances'],
  }),
} as const;

export interface ClearDistanceScene {
  units: LengthUnit;
  leastMm: number;
  foundMm: number | null;
  diameterMm: number;
  aggregateMm: number;
  upright: boolean;
}

/** The least clear distance between bars, and a gap that was found against it. */
export const clearDistanceCalculation = defineCalculation({
  fields,
  groups: [
    { legend: 'Rule', names: ['basis', 'place'] },
    { legend: 'Bars and mix', names: ['bar', 'aggregate', 'k1', 'k2'] },
    { legend: 'Measured', names: ['found'] },
  ],
  compute: (values) => {
    const { units } = values;
    const { diameterMm } = given('bar', values.bar);
    const aggregateMm = given('aggregate', values.aggregate);
    const least = leastClearDistance({
      basis: values.basis === 'en-1992' ? 'en-1992-1-1' : 'aci-318-19',
      place: values.basis === 'en-1992' ? 'layer' : values.place,
      diameterMm,
      aggregateMm,
      k1: values.k1,
      k2Mm: values.k2,
      showIn: units,
    });
    const figures: Figure[] = [
      {
        id: 'least',
        label: 'Least clear distance',
        ...lengthTexts(least.leastMm, units),
        main: true,
        formula: least.trail[0]?.rule,
        source: least.trail[0]?.clause,
      },
      { id: 'governs', label: 'Governs', text: least.governs, value: null },
      { id: 'set-out', label: 'Set out as', text: setOutText(least.leastMm, units), value: null },
      {
        id: 'centres',
        label: 'Centre to centre',
        ...lengthTexts(least.leastMm + diameterMm, units),
        formula: 'clear distance + bar',
      },
    ];
    if (values.found !== undefined) {
      const judged = judgeClearDistances([values.found], least.leastMm);
      figures.push({
        id: 'found',
        label: 'The gap found',
        text: judged.verdict === 'met' ? 'met' : 'not met: too narrow',
        also: lengthTexts(values.found, units).text,
        value: values.found,
        mark: judged.verdict === 'met' ? 'met' : 'not-met-low',
        words: true,
      });
    }
    return {
      figures,
      warnings: [],
      trail: least.trail,
      cautions: [
        'Each gap is judged by itself and has no minus tolerance: concrete has to pass. A wide gap does not mend a narrow one beside it.',
      ],
      scene: {
        units,
        leastMm: least.leastMm,
        foundMm: values.found ?? null,
        diameterMm,
        aggregateMm,
        upright: values.basis === 'aci-318-19' && values.place === 'between-layers',
      } satisfies ClearDistanceScene,
    };
  },
});
