import { checklistTemplate } from '@/lib/inspection/checklist-templates';
import type { TemplateFor } from '@/lib/inspection/checklist-items';
import type { PlanInput } from '@/lib/inspection/plan-input';
import { beamMeasurements, deckMeasurements } from './demo-measurements';

type ElementInput = PlanInput['elements'][number];
type FaceInput = ElementInput['faces'][number];
type RequirementInput = FaceInput['requirements'][number];

const contract = (
  specified: number,
  minus: number,
): Pick<RequirementInput, 'contractSpecifiedMm' | 'contractMinusMm' | 'contractPlusMm' | 'neverLess'> => ({
  contractSpecifiedMm: specified,
  contractMinusMm: minus,
  contractPlusMm: null,
  neverLess: false,
});
const byCode = { contractSpecifiedMm: null, contractMinusMm: null, contractPlusMm: null, neverLess: false };

const face = (
  of: Partial<FaceInput> & Pick<FaceInput, 'id' | 'name' | 'widthMm' | 'heightMm' | 'requirements'>,
): FaceInput => ({
  meeting: 'formed',
  soffit: false,
  exposure: '',
  openings: [],
  recesses: [],
  drawnPoints: null,
  chosenPoints: [],
  ...of,
});

const element = (
  of: Partial<ElementInput> &
    Pick<ElementInput, 'id' | 'type' | 'mark' | 'thicknessMm' | 'drawing' | 'faces'>,
): ElementInput => ({
  location: 'Ferry landing',
  level: '',
  effectiveDepthMm: null,
  layers: [],
  ...of,
});

const layer = (
  id: string,
  name: string,
  faceId: string,
  order: number,
  bar: string,
  spacingMm: number,
  direction: string,
): ElementInput['layers'][number] => ({
  id,
  name,
  faceId,
  order,
  barDesignation: bar,
  grade: 'B500B',
  coating: 'none',
  spacingMm,
  count: null,
  direction,
});

const plan = (template: TemplateFor, elements: ElementInput[], over: Partial<PlanInput> = {}): PlanInput => ({
  units: 'mm',
  basis: 'contract',
  decisionRule: { kind: 'simple' },
  validityHours: 24,
  rainLimitMm: 5,
  mix: { id: 'marine-40', name: 'Marine 40/20', aggregateMm: 20 },
  elements,
  measurements: [],
  checklist: checklistTemplate(template),
  lastWalk: true,
  ...over,
});

/** Quay deck, bay 3: the pour that shows most of what can stand in the way. */
export const quayDeck = (): PlanInput =>
  plan(
    'deck',
    [
      element({
        id: 'deck',
        type: 'deck',
        mark: 'Quay deck, bay 3',
        location: 'grid C to D, 3 to 5',
        level: '+2.40',
        thicknessMm: 300,
        drawing: { number: 'S-204', revision: '5' },
        layers: [
          layer('b1', 'B1', 'soffit', 1, '16 mm', 150, 'across the quay'),
          layer('b2', 'B2', 'soffit', 2, '12 mm', 150, 'along the quay'),
          layer('t1', 'T1', 'top', 1, '16 mm', 150, 'across the quay'),
          layer('t2', 'T2', 'top', 2, '12 mm', 150, 'along the quay'),
        ],
        faces: [
          face({
            id: 'soffit',
            name: 'Soffit',
            soffit: true,
            exposure: 'tidal splash',
            widthMm: 7200,
            heightMm: 4000,
            drawnPoints: 15,
            openings: [{ id: 'drain', name: 'Drain', xMm: 5600, yMm: 3000, widthMm: 900, heightMm: 600 }],
            recesses: [
              {
                id: 'drip',
                name: 'Drip groove',
                depthMm: 15,
                xMm: 100,
                yMm: 60,
                widthMm: 7000,
                heightMm: 40,
              },
            ],
            chosenPoints: [{ id: 'drain-edge', xMm: 5500, yMm: 3300, reason: 'edge of the drain' }],
            requirements: [
              { id: 'outer', steel: 'outermost bar B1', barDesignation: '16 mm', ...contract(50, 12) },
            ],
          }),
          face({
            id: 'top',
            name: 'Top',
            meeting: 'finished-top',
            exposure: 'tidal splash',
            widthMm: 7200,
            heightMm: 4000,
            drawnPoints: 12,
            chosenPoints: [{ id: 'runway', xMm: 3600, yMm: 700, reason: 'traffic route to bay 2' }],
            requirements: [
              { id: 'outer', steel: 'outermost bar T1', barDesignation: '16 mm', ...contract(50, 12) },
            ],
          }),
        ],
      }),
    ],
    {
      measurements: deckMeasurements,
    },
  );

/** Pump pit walls: two faces, read and released. */
export const pumpPitWalls = (): PlanInput =>
  plan('wall', [
    element({
      id: 'wall-n',
      type: 'wall',
      mark: 'Pump pit, north wall',
      location: 'pump pit',
      level: '-1.80 to +0.60',
      thicknessMm: 350,
      drawing: { number: 'S-211', revision: '3' },
      layers: [
        layer('wo1', 'outer verticals', 'outer', 1, '16 mm', 150, 'upright'),
        layer('wi1', 'inner verticals', 'inner', 1, '16 mm', 150, 'upright'),
      ],
      faces: (['outer', 'inner'] as const).map((id) =>
        face({
          id,
          name: id === 'outer' ? 'Soil side' : 'Pit side',
          widthMm: 5200,
          heightMm: 2400,
          exposure: id === 'outer' ? 'soil' : 'wet',
          drawnPoints: 8,
          requirements: [
            { id: 'outer', steel: 'horizontal bars', barDesignation: '12 mm', ...contract(45, 10) },
          ],
        }),
      ),
    }),
  ]);

/** Beam line C in inches by ACI 318-19: ties govern the sides, main bars are read beside them. */
export const beamLine = (): PlanInput =>
  plan(
    'beam',
    [
      element({
        id: 'beam-c',
        type: 'beam',
        mark: 'Beam line C',
        location: 'piles C1 to C4',
        level: '+1.10',
        thicknessMm: 609.6,
        effectiveDepthMm: 533.4,
        drawing: { number: 'S-207', revision: '2' },
        layers: [layer('main', 'bottom bars', 'bottom', 2, '#8', 150, 'along the beam')],
        faces: [
          face({
            id: 'bottom',
            name: 'Bottom',
            soffit: true,
            exposure: 'weather-or-ground',
            widthMm: 9144,
            heightMm: 457.2,
            drawnPoints: 8,
            requirements: [
              { id: 'ties', steel: 'ties', barDesignation: '#4', ...byCode },
              { id: 'main', steel: 'main bars', barDesignation: '#8', ...byCode },
            ],
          }),
          face({
            id: 'side',
            name: 'River side',
            exposure: 'weather-or-ground',
            widthMm: 9144,
            heightMm: 609.6,
            drawnPoints: 8,
            requirements: [{ id: 'ties', steel: 'ties', barDesignation: '#4', ...byCode }],
          }),
        ],
      }),
    ],
    {
      units: 'in',
      basis: 'aci-318-19',
      mix: { id: 'marine-5000', name: 'Marine 5000 psi, 3/4 in', aggregateMm: 19.05 },
      measurements: beamMeasurements,
    },
  );

const slabOnGround = (id: string, mark: string, drawing: string, bottomCover: number): ElementInput =>
  element({
    id,
    type: 'mat',
    mark,
    thicknessMm: 400,
    drawing: { number: drawing, revision: '1' },
    layers: [layer('t1', 'T1', `${id}-top`, 1, '16 mm', 200, 'across')],
    faces: [
      face({
        id: `${id}-top`,
        name: 'Top',
        meeting: 'finished-top',
        widthMm: 8000,
        heightMm: 5000,
        drawnPoints: 9,
        requirements: [
          { id: 'outer', steel: 'outermost bar T1', barDesignation: '16 mm', ...contract(50, 12) },
        ],
      }),
      face({
        id: `${id}-ground`,
        name: 'Underside',
        meeting: 'cast-against-ground',
        widthMm: 8000,
        heightMm: 5000,
        drawnPoints: 6,
        requirements: [
          { id: 'outer', steel: 'outermost bar B1', barDesignation: '16 mm', ...contract(bottomCover, 10) },
        ],
      }),
    ],
  });

/** Boat ramp, upper part: planned, nothing read yet. */
export const boatRamp = (): PlanInput =>
  plan('slab-on-ground', [slabOnGround('ramp', 'Boat ramp, upper', 'S-220', 75)]);

/** Bollard bases: released, and then it rained. */
export const bollardBases = (): PlanInput =>
  plan('footing', [slabOnGround('base', 'Bollard bases 1 to 3', 'S-224', 75)]);

/** Wave wall, unit 2: one formed face to the river. */
export const waveWall = (coverMm: number): PlanInput =>
  plan('wall', [
    element({
      id: 'wave',
      type: 'wall',
      mark: 'Wave wall, unit 2',
      location: 'chainage 12 to 24',
      thicknessMm: 300,
      drawing: { number: 'S-230', revision: '4' },
      faces: [
        face({
          id: 'river',
          name: 'River side',
          widthMm: 12000,
          heightMm: 1400,
          exposure: 'splash',
          drawnPoints: 10,
          requirements: [
            { id: 'outer', steel: 'outer horizontals', barDesignation: '12 mm', ...contract(coverMm, 10) },
          ],
        }),
      ],
    }),
  ]);

/** Stair from the quay to the pontoon: placed yesterday. */
export const pontoonStair = (): PlanInput =>
  plan('stair', [
    element({
      id: 'stair',
      type: 'stair',
      mark: 'Pontoon stair',
      location: 'grid D, 1',
      thicknessMm: 200,
      drawing: { number: 'S-216', revision: '2' },
      faces: [
        face({
          id: 'stair-soffit',
          name: 'Soffit',
          soffit: true,
          widthMm: 5600,
          heightMm: 1600,
          drawnPoints: 8,
          requirements: [
            { id: 'outer', steel: 'outermost bar', barDesignation: '12 mm', ...contract(45, 10) },
          ],
        }),
      ],
    }),
  ]);

const shortChecks = ['drawings-current', 'bar-size-grade', 'chairs-stand', 'debris'];

/** Pump pit roof slab, in inches: twelve points and four checks, ready for somebody to try the phone on. */
export const pumpPitRoof = (): PlanInput => {
  const template = checklistTemplate('slab');
  return plan(
    'slab',
    [
      element({
        id: 'roof',
        type: 'slab',
        mark: 'Pump pit roof slab',
        location: 'pump pit',
        level: '+0.60',
        thicknessMm: 203.2,
        drawing: { number: 'S-212', revision: '1' },
        faces: [
          face({
            id: 'roof-top',
            name: 'Top',
            meeting: 'finished-top',
            exposure: 'weather-or-ground',
            widthMm: 6096,
            heightMm: 3657.6,
            drawnPoints: 10,
            openings: [{ id: 'hatch', name: 'Hatch', xMm: 4300, yMm: 400, widthMm: 900, heightMm: 900 }],
            chosenPoints: [
              { id: 'hatch-corner', xMm: 4200, yMm: 1400, reason: 'corner of the hatch' },
              { id: 'runway', xMm: 700, yMm: 600, reason: 'traffic route' },
            ],
            requirements: [{ id: 'outer', steel: 'top bars', barDesignation: '#5', ...byCode }],
          }),
        ],
      }),
    ],
    {
      units: 'in',
      basis: 'aci-318-19',
      mix: { id: 'marine-5000', name: 'Marine 5000 psi, 3/4 in', aggregateMm: 19.05 },
      checklist: {
        ...template,
        template: 'Suspended slab, short',
        items: template.items.filter((item) => shortChecks.includes(item.id)),
      },
    },
  );
};
