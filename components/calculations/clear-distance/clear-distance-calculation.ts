import { judgeClearDistances, leastClearDistance } from '@/lib/concrete/bar-spacing';
import { barsInWidth } from '@/lib/concrete/bars-in-width';
import { given } from '@/lib/concrete/check-input';
import { withUnit, type LengthUnit } from '@/lib/concrete/length';
import { defineCalculation, type Figure } from '../calculation';
import type { ValuesOf } from '../field-spec';
import { bar, choice, length, number, unitsField } from '../fields';
import { lengthTexts, setOutText } from '../length-text';

const aci = { basis: ['aci-318-19'] };
const en = { basis: ['en-1992'] };
const inWidth = { layout: ['width'] };

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
  layout: choice(
    'Bars in a width',
    { none: 'not asked', width: 'of a beam or a wall end, between its ties' },
    'none',
  ),
  width: length('Width', ['300', '12'], { hint: 'Of the concrete', when: inWidth }),
  sideCover: length('Side cover', ['40', '1 1/2'], {
    hint: 'To the ties',
    when: inWidth,
    refusedAs: ['side cover'],
  }),
  ties: bar('Ties', ['8 mm', '#3'], {
    hint: 'Left empty: none',
    optional: true,
    when: inWidth,
    refusedAs: ['tie'],
  }),
  bars: number('Bars in the layer', '4', [1, 200], { whole: true, when: inWidth }),
} as const;

type Values = ValuesOf<typeof fields>;

/** What fits between the ties, and what the number of bars asked for leaves between them. */
function widthFigures(values: Values, diameterMm: number, leastClearMm: number) {
  const { units } = values;
  const bars = given('bars', values.bars);
  const found = barsInWidth({
    widthMm: given('width', values.width),
    sideCoverMm: given('side cover', values.sideCover),
    tieDiameterMm: values.ties?.diameterMm ?? 0,
    diameterMm,
    leastClearMm,
    bars,
    showIn: units,
  });
  const fits = bars <= found.mostBars;
  const figures: Figure[] = [
    {
      id: 'most-bars',
      label: 'Most bars that fit in one layer',
      text: String(found.mostBars),
      value: found.mostBars,
    },
    {
      id: 'clear-as-drawn',
      label: `Clear distance with ${bars} ${bars === 1 ? 'bar' : 'bars'}`,
      text: found.clearMm === null ? 'one bar, no gap' : withUnit(found.clearMm, units, leastClearMm),
      also: fits ? 'they fit' : 'they do not fit: too narrow',
      value: found.clearMm,
      mark: fits ? 'met' : 'not-met-low',
    },
  ];
  return { figures, trail: found.trail };
}

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
    { legend: 'In a width', names: ['layout', 'width', 'sideCover', 'ties', 'bars'] },
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
    const trail = [...least.trail];
    const cautions = [
      'Each gap is judged by itself and has no minus tolerance: concrete has to pass. A wide gap does not mend a narrow one beside it.',
    ];
    if (values.layout === 'width') {
      const layer = widthFigures(values, diameterMm, least.leastMm);
      figures.push(...layer.figures);
      trail.push(...layer.trail);
      cautions.push(
        'Bars in a width: plain arithmetic between straight ties. A bar that lies in the bend of a tie, a lap or a vibrator needs more room.',
      );
    }
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
      trail,
      cautions,
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
