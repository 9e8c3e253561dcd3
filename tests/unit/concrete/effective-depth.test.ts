import { describe, expect, test } from 'vitest';
import { effectiveDepth, judgeEffectiveDepth, type DepthReading } from '@/lib/concrete/effective-depth';
import { depthTolerance } from '@/lib/concrete/tolerances';

const section = { sectionMm: 200, barDiameterMm: 16 };
const slab: DepthReading = {
  section,
  plannedMm: 162,
  readingMm: 30,
  touched: 'main',
  tolerance: { minusMm: 10, plusMm: 10 },
};
const judge = (over: Partial<DepthReading>) => judgeEffectiveDepth({ ...slab, ...over }, 'mm');

describe('effective depth', () => {
  test('is the section less cover and half a bar, and less the way to the centroid', () => {
    expect(effectiveDepth(section, 30)).toBe(162);
    expect(effectiveDepth({ ...section, toCentroidMm: 20 }, 30)).toBe(142);
  });

  test('falls short by the tolerance at most', () => {
    expect(judge({ readingMm: 40 })).toMatchObject({ verdict: 'met', depthMm: 152, flags: ['at-limit'] });
    expect(judge({ readingMm: 40.001 })).toMatchObject({ verdict: 'not-met', side: 'low' });
    expect(judge({ readingMm: 45 }).reason).toBe(
      'Effective depth 147 mm is 5 mm less than the least accepted 152 mm.',
    );
  });

  test('more depth than planned does not fail here, and the reason points at the cover', () => {
    expect(judge({ readingMm: 15 })).toMatchObject({ verdict: 'met' });
    expect(judge({ readingMm: 15 }).reason).toContain('look at the cover');
  });

  test('swapped layers: the cover is there and the depth is not', () => {
    // Main bars laid inside the distribution bars of 12 mm.
    expect(judge({ readingMm: 30 + 12 }).verdict).toBe('not-met');
  });

  test('from the outermost steel it is indicative and never a verdict', () => {
    const judged = judge({ touched: 'outermost', betweenMm: 12, readingMm: 60 });
    expect(judged).toMatchObject({ verdict: 'not-verified', flags: ['indicative'], depthMm: 120 });
    expect(() => judge({ touched: 'outermost' })).toThrow(expect.objectContaining({ field: 'betweenMm' }));
  });

  test('is not verified without a unit, or where the reading is not plausible', () => {
    expect(judge({ readingMm: null })).toMatchObject({ verdict: 'not-verified', depthMm: null });
    expect(judge({ readingMm: 201 }).verdict).toBe('not-verified');
    expect(judge({ readingMm: -1 }).verdict).toBe('not-verified');
  });

  test('refuses a section that cover and bar do not fit into', () => {
    expect(() => effectiveDepth(section, 195)).toThrow(expect.objectContaining({ field: 'sectionMm' }));
  });
});

describe('tolerance where the basis has none for depth', () => {
  test('EN 13670: lower by the permitted increase of cover, higher by its reduction', () => {
    expect(
      depthTolerance({ basis: 'en-1992', element: 'slab', meeting: 'formed', thicknessMm: 400 }, 360),
    ).toMatchObject({ minusMm: 15, plusMm: 10 });
  });

  test('the contract has to say it', () => {
    expect(() => depthTolerance({ basis: 'contract', element: 'slab', meeting: 'formed' }, 100)).toThrow(
      expect.objectContaining({ field: 'toleranceMm' }),
    );
  });
});
