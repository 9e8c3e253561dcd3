import { checklistTemplate } from '@/lib/inspection/checklist-templates';
import type { MeasurementItem, Plan, ReadingPoint } from '@/lib/inspection/plan';
import { smallPlan } from '../../stories/pour-story';

const rows = ['A', 'B', 'C'];
const offsets = [0.31, 0.62, 0.44, 0.55, 0.38, 0.7, 0.26, 0.5, 0.6, 0.33, 0.47, 0.58, 0.4, 0.65, 0.36];

function gridPoints(faceId: string, widthMm: number, heightMm: number, columns: number): ReadingPoint[] {
  return rows.flatMap((row, y) =>
    Array.from({ length: columns }, (_, x) => {
      const offset = offsets[(y * columns + x) % offsets.length] ?? 0.5;
      return {
        id: `${faceId}.${row}${x + 1}`,
        label: `${row}${x + 1}`,
        kind: 'drawn' as const,
        xMm: Math.round((x + offset) * (widthMm / columns)),
        yMm: Math.round((y + 1 - offset) * (heightMm / rows.length)),
      };
    }),
  );
}

const measurement = (
  part: Partial<MeasurementItem> & Pick<MeasurementItem, 'id' | 'title' | 'kind'>,
): MeasurementItem => ({
  elementId: 'deck',
  quantity: 'length',
  least: null,
  most: null,
  expected: null,
  required: 3,
  loaded: false,
  trail: [
    {
      rule: 'Limit of the plan',
      clause: 'S-204 note 7',
      edition: 'rev 5',
      value: 'as drawn',
      provenance: 'contract',
    },
  ],
  ...part,
});

/** A whole bay: soffit and side with openings and chosen points, every check of a deck, one measurement of each quantity. */
export function berthPlan(over: Partial<Plan> = {}): Plan {
  const small = smallPlan();
  const deck = small.elements[0];
  const soffit = deck?.faces[0];
  const outer = soffit?.requirements[0];
  if (!deck || !soffit || !outer) throw new Error('The small plan has lost its face.');
  const requirement = {
    ...outer,
    codeMinimumMm: 50,
    trail: [
      {
        rule: 'Specified cover',
        clause: 'S-204 note 3',
        edition: 'rev 5',
        value: '50 mm',
        provenance: 'contract' as const,
      },
      {
        rule: 'Permitted minus deviation',
        clause: 'S-204 note 3',
        edition: 'rev 5',
        value: '12 mm',
        provenance: 'contract' as const,
      },
      {
        rule: 'Least accepted: 50 - 12',
        clause: '',
        edition: '',
        value: '38 mm',
        provenance: 'computed' as const,
      },
    ],
  };
  return smallPlan({
    elements: [
      {
        ...deck,
        faces: [
          {
            ...soffit,
            name: 'Soffit',
            requirements: [
              requirement,
              { ...requirement, id: 'ties', steel: 'ties', barDesignation: '10', barDiameterMm: 10 },
            ],
            openings: [
              { id: 'hatch', name: 'Drain hatch', xMm: 2900, yMm: 300, widthMm: 1200, heightMm: 700 },
            ],
            recesses: [
              {
                id: 'drip',
                name: 'Drip groove',
                depthMm: 12,
                xMm: 0,
                yMm: 3800,
                widthMm: 7200,
                heightMm: 60,
              },
            ],
            points: [
              ...gridPoints('soffit', 7200, 4000, 5),
              {
                id: 'soffit.k1',
                label: 'K1',
                kind: 'chosen',
                xMm: 5450,
                yMm: 850,
                reason: 'edge of the drain hatch',
              },
            ],
          },
          {
            ...soffit,
            id: 'north',
            name: 'North side',
            soffit: false,
            heightMm: 600,
            requirements: [{ ...requirement, id: 'north.outer' }],
            points: gridPoints('north', 7200, 600, 3).slice(0, 6),
          },
        ],
      },
    ],
    measurements: [
      measurement({
        id: 'chairs',
        title: 'Spacing of supports, top mat',
        kind: 'support-spacing',
        most: 1200,
      }),
      measurement({
        id: 'height',
        title: 'Support height',
        kind: 'support-height',
        least: 190,
        most: 200,
        loaded: true,
        required: 1,
      }),
      measurement({
        id: 'ties',
        title: 'Ties, top mat',
        kind: 'tie-share',
        quantity: 'share',
        least: 50,
        required: 1,
      }),
      measurement({
        id: 'count',
        title: 'Bars B1 between C and D',
        kind: 'bar-count',
        quantity: 'count',
        least: 24,
        required: 1,
      }),
      measurement({
        id: 'size',
        title: 'Bar B1',
        kind: 'bar-size',
        quantity: 'designation',
        expected: '16',
        required: 1,
      }),
    ],
    checklist: checklistTemplate('deck'),
    ...over,
  });
}
