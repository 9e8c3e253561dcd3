import type { PlanInput } from '@/lib/inspection/plan-input';

/** A quay deck with one face to be read at eight points, 50 mm specified and 40 mm the least accepted, and two checks. */
export function deckPlan(more: Partial<PlanInput> = {}): PlanInput {
  const check = (id: string, question: string) => ({
    id,
    group: 'steel' as const,
    question,
    basis: 'drawings',
    evidence: 'none' as const,
    critical: true,
    notApplicable: true,
    attendance: 'none' as const,
    closedBy: 'inspector' as const,
    elementId: null,
  });
  return {
    units: 'mm',
    basis: 'contract',
    decisionRule: { kind: 'simple' },
    validityHours: 24,
    rainLimitMm: 5,
    mix: { id: 'mix-1', name: 'C35 marine', aggregateMm: 20 },
    elements: [
      {
        id: 'deck',
        type: 'deck',
        mark: 'Quay deck D2',
        location: 'Grid C to D',
        level: '',
        thicknessMm: 350,
        effectiveDepthMm: null,
        drawing: { number: 'FL-S-201', revision: 'B' },
        faces: [
          {
            id: 'deck-top',
            name: 'Top',
            meeting: 'finished-top',
            soffit: false,
            exposure: 'tidal',
            widthMm: 8000,
            heightMm: 4000,
            openings: [],
            recesses: [],
            requirements: [
              {
                id: 'top-bars',
                steel: 'outermost bar T1',
                barDesignation: '16 mm',
                contractSpecifiedMm: 50,
                contractMinusMm: 10,
                contractPlusMm: null,
                neverLess: false,
              },
            ],
            drawnPoints: 8,
            chosenPoints: [],
          },
        ],
        layers: [],
      },
    ],
    measurements: [],
    checklist: {
      template: 'Bridge or quay deck',
      version: 1,
      items: [check('bars', 'Bars as drawn?'), check('clean', 'Form clean?')],
    },
    lastWalk: false,
    ...more,
  };
}

/** What a person types to plan the quay deck. */
export const deckPour = (projectId: string, number: string, more: Partial<PlanInput> = {}) => ({
  projectId,
  number,
  title: 'Quay deck, bay 2',
  location: 'Grid C to D',
  plannedAt: new Date(Date.now() + 86_400_000).toISOString(),
  reason: 'First issue',
  plan: deckPlan(more),
});
