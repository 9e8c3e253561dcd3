import { given } from '@/lib/concrete/check-input';
import type { LengthUnit } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import { defaultPointCount, drawPoints, type DrawnPoint } from '@/lib/concrete/reading-points';
import { shareBelow, successRun, toleranceFactor } from '@/lib/concrete/statistics';
import type { TrailStep } from '@/lib/concrete/trail';
import { commonPractice } from '@/lib/concrete/trail-source';
import { defineCalculation, type Figure } from '../calculation';
import type { ValuesOf } from '../field-spec';
import { choice, length, number, unitsField } from '../fields';

const elements = {
  slab: 'Slab',
  deck: 'Bridge or quay deck',
  mat: 'Mat',
  wall: 'Wall',
  footing: 'Footing',
  pier: 'Pier or shaft',
  column: 'Column',
  beam: 'Beam',
  stair: 'Stair',
} as const;

const fields = {
  units: unitsField,
  element: choice('Element', elements, 'deck', { refusedAs: ['element'] }),
  width: length('Width of the face', ['7200', "24'"], { refusedAs: ['widthMm', 'areaMm2'] }),
  height: length('Height of the face', ['5400', "18'"], { refusedAs: ['heightMm'] }),
  mostBelow: number('At most this share below', '5', [0.0001, 99.9999], {
    unit: '%',
    hint: 'p, of the whole face',
    refusedAs: ['share below', 'share'],
  }),
  confidence: number('Shown with confidence', '95', [0.0001, 99.9999], {
    unit: '%',
    hint: 'γ, one-sided',
    refusedAs: ['confidence'],
  }),
  taken: number('Readings taken', '', [1, 500], {
    hint: 'Empty: the default number',
    optional: true,
    whole: true,
    refusedAs: ['readings', 'count'],
  }),
  below: number('Of them below', '0', [0, 500], {
    whole: true,
    hint: 'Less than the least accepted',
    refusedAs: ['readings below'],
  }),
} as const;

type Values = ValuesOf<typeof fields>;

export interface ReadingsScene {
  units: LengthUnit;
  widthMm: number;
  heightMm: number;
  points: DrawnPoint[];
}

function faceOf(values: Values) {
  const widthMm = given('width', values.width);
  const heightMm = given('height', values.height);
  const area = widthMm * heightMm;
  const usual = defaultPointCount(values.element, area);
  const step: TrailStep = commonPractice(
    'Readings by element and area, at least 5 and at most 60',
    `${elements[values.element]}, ${numberText(area / 1e6, 2)} m²: ${usual}`,
    'The planner may ask for more.',
  );
  return { widthMm, heightMm, usual, step };
}

/** What the readings taken can show: the factor of a tolerance bound, and the share that may still lie below. */
function shownBy(n: number, values: Values, share: number, confidence: number) {
  const below = given('readings below', values.below);
  const bound = shareBelow(below, n, confidence);
  const factor = n < 2 ? null : toleranceFactor(n, 1 - share, confidence);
  const figures: Figure[] = [
    {
      id: 'bound',
      label: `With ${below} of ${n} below, the face may have below at most`,
      text: `${numberText(100 * bound.value.upperBound, 2)} %`,
      value: bound.value.upperBound,
      formula: bound.trail[0]?.rule,
      source: bound.trail[0]?.clause,
    },
    factor
      ? {
          id: 'factor',
          label: `Tolerance factor k of ${n} readings`,
          text: numberText(factor.value, 4),
          value: factor.value,
          formula: 'lower bound = mean − k s',
          source: factor.trail[0]?.clause,
        }
      : { id: 'factor', label: 'Tolerance factor k', text: 'needs two readings', value: null, words: true },
  ];
  return {
    figures,
    trail: [...bound.trail, ...(factor?.trail ?? [])],
    cautions: [bound.caution, ...(factor ? [factor.caution] : [])],
  };
}

/** How many places of a face to read, and what that many readings can show. */
export const readingsCalculation = defineCalculation({
  fields,
  groups: [
    { legend: 'Face', names: ['element', 'width', 'height'] },
    { legend: 'To be shown', names: ['mostBelow', 'confidence'] },
    { legend: 'Taken', names: ['taken', 'below'] },
  ],
  compute: (values) => {
    const { widthMm, heightMm, usual, step } = faceOf(values);
    const share = given('share below', values.mostBelow) / 100;
    const confidence = given('confidence', values.confidence) / 100;
    const run = successRun(share, confidence);
    const n = values.taken ?? usual;
    const shown = shownBy(n, values, share, confidence);
    const points = drawPoints({ seed: 'an example', widthMm, heightMm, count: n });
    const percent = (part: number) => `${numberText(100 * part, 4)} %`;
    return {
      figures: [
        {
          id: 'usual',
          label: 'Readings by element and area',
          text: String(usual),
          value: usual,
          source: step.clause,
          main: true,
        },
        {
          id: 'run',
          label: `Readings without one below that show at most ${percent(share)} below, ${percent(confidence)} confidence`,
          text: String(run.value),
          value: run.value,
          formula: 'n = ln(1 − γ)/ln(1 − p), rounded up',
        },
        ...shown.figures,
      ],
      warnings: [],
      trail: [step, ...run.trail, ...shown.trail],
      cautions: [...new Set([run.caution, ...shown.cautions])],
      scene: { units: values.units, widthMm, heightMm, points } satisfies ReadingsScene,
    };
  },
});
