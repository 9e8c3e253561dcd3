import { describe, expect, it } from 'vitest';
import { coverSectionScale } from '@/components/drawings/cover-section-scale';

const base = { specifiedMm: 50, mostAcceptedMm: null, barDiameterMm: 16, labelLength: 2 };

describe('coverSectionScale', () => {
  it('draws depth and bar to one scale', () => {
    const scale = coverSectionScale({ ...base, readingsMm: [52, 31] });
    expect(scale.barPx / 16).toBeCloseTo(scale.perMm, 9);
    expect(scale.depthPx / scale.deepestMm).toBeCloseTo(scale.perMm, 9);
  });

  it('shows the deepest reading whole while it is no more than 1.8 times what is asked', () => {
    expect(coverSectionScale({ ...base, readingsMm: [84] }).deepestMm).toBe(84);
    expect(coverSectionScale({ ...base, readingsMm: [400] }).deepestMm).toBe(90);
  });

  it('keeps a column at least as wide as its bar, so that neighbours never overlap', () => {
    for (const count of [1, 15, 50, 200]) {
      const scale = coverSectionScale({ ...base, barDiameterMm: 40, readingsMm: Array(count).fill(50) });
      expect(scale.columnPx).toBeGreaterThan(scale.barPx);
    }
  });
});
