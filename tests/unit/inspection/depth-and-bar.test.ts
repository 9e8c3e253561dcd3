import { describe, expect, it } from 'vitest';
import { holds } from '@/lib/inspection/holds';
import { issuePlan } from '@/lib/inspection/issue-plan';
import type { PlanInput } from '@/lib/inspection/plan-input';
import { foldSheet } from '@/lib/inspection/sheet';
import { people, pourId, PourStory } from '../../stories/pour-story';

/** A beam soffit by ACI 318-19, read to the main bar, with a planned effective depth of 21.5 in in a 24 in section. */
const input = (
  over: Partial<PlanInput['elements'][number]['faces'][number]['requirements'][number]> = {},
): PlanInput => ({
  units: 'in',
  basis: 'aci-318-19',
  decisionRule: { kind: 'simple' },
  validityHours: 24,
  rainLimitMm: 5,
  mix: null,
  elements: [
    {
      id: 'beam',
      type: 'slab',
      mark: 'Ramp slab',
      location: 'grid A',
      level: '',
      thicknessMm: 203.2,
      effectiveDepthMm: 152.4,
      drawing: { number: 'S-301', revision: '2' },
      layers: [],
      faces: [
        {
          id: 'soffit',
          name: 'soffit',
          meeting: 'formed',
          soffit: false,
          exposure: 'weather-or-ground',
          widthMm: 6000,
          heightMm: 3000,
          openings: [],
          recesses: [],
          drawnPoints: 5,
          chosenPoints: [],
          requirements: [
            {
              id: 'outer',
              steel: 'main bars B1',
              barDesignation: '#5',
              contractSpecifiedMm: null,
              contractMinusMm: null,
              contractPlusMm: null,
              neverLess: false,
              mainBar: true,
              ...over,
            },
          ],
        },
      ],
    },
  ],
  measurements: [],
  checklist: { template: 'none', version: 1, items: [] },
  lastWalk: false,
});

const plan = issuePlan(input(), {
  pourId,
  revision: 1,
  issuedAt: '2026-11-30T08:00:00.000Z',
  authorId: people.engineer,
  reason: 'First issue',
});
const firstPoint = plan.elements[0]!.faces[0]!.points[0]!.id;

function readOnce(mm: number, asFoundBar: string | null = null) {
  const story = new PourStory();
  story.reads('', mm, 'inspector', {
    pointId: firstPoint,
    asFoundBar,
    value: { text: `${mm} mm`, unit: 'mm', mm },
  });
  const sheet = foldSheet(plan, story.recorded);
  return { kinds: holds(sheet, story.now).map((hold) => hold.kind), point: sheet.faces[0]!.points[0]! };
}

describe('effective depth, a second verdict', () => {
  it('a bar that lies too high in the section meets its cover and fails its depth', () => {
    // Cover 55 mm: d = 203.2 - 55 - 7.9 = 140.3; planned 152.4 less 3/8 in is 142.9.
    const { kinds, point } = readOnce(55);
    expect(point.mark).toBe('met');
    expect(kinds).toContain('effective-depth');
    expect(kinds).not.toContain('cover-not-met');
  });

  it('within its tolerance it does not hold', () => {
    expect(readOnce(45).kinds).not.toContain('effective-depth');
  });
});

describe('another bar than planned', () => {
  it('is judged by the stricter of the two, and holds as a departure even where it is larger', () => {
    // Weather, #5: 1 1/2 in; #8: 2 in, each less 3/8 in: 28.6 mm and 41.3 mm.
    const planned = readOnce(35);
    expect(planned.point.mark).toBe('met');
    expect(planned.kinds).not.toContain('bar-departs');
    const found = readOnce(35, '#8');
    expect(found.point.mark).toBe('not-met-low');
    expect(found.kinds).toContain('bar-departs');
  });

  it('the planned size written in another way is no departure', () => {
    expect(readOnce(35, ' #5 ').kinds).not.toContain('bar-departs');
  });
});
