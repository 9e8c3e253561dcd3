import { describe, expect, it } from 'vitest';
import { sectionScale, spreadLabels, type SectionLayer } from '@/components/drawings/element-section-layout';
import { stackLayers } from '@/components/drawings/stack-layers';

const layer = (face: 'near' | 'far', depthMm: number): SectionLayer => ({
  id: `${face}${depthMm}`,
  label: '',
  face,
  depthMm,
  diameterMm: 16,
  run: 'cut',
});

describe('stackLayers', () => {
  it('lays each layer on the bars before it, from the outermost, whatever order they come in', () => {
    const stacked = stackLayers(40, [
      { id: 'T2', order: 2, diameterMm: 16 },
      { id: 'T1', order: 1, diameterMm: 20 },
    ]);
    expect(stacked.map((l) => [l.id, l.depthMm])).toEqual([
      ['T1', 40],
      ['T2', 60],
    ]);
  });
});

describe('sectionScale', () => {
  it('draws a thin element whole: both faces agree on every place', () => {
    const scale = sectionScale(350, [layer('near', 40), layer('far', 50)], 160);
    expect(scale.breakPx).toBeNull();
    expect(scale.at('near', 100)).toBeCloseTo(scale.at('far', 250), 9);
  });

  it('leaves out the middle of a thick one and keeps covers readable', () => {
    const scale = sectionScale(1500, [layer('near', 40), layer('far', 75)], 160);
    expect(scale.breakPx).not.toBeNull();
    expect(scale.at('near', 40)).toBeGreaterThan(12);
    // A chair that reaches the top mat ends at the top mat, through the break.
    expect(scale.at('far', 1460)).toBeCloseTo(scale.at('near', 40), 9);
  });
});

describe('spreadLabels', () => {
  it('keeps labels apart, in order and inside', () => {
    const placed = spreadLabels([150, 152, 158], 15, 160);
    expect(placed.at(-1)).toBeLessThanOrEqual(160);
    for (let i = 1; i < placed.length; i += 1)
      expect((placed[i] ?? 0) - (placed[i - 1] ?? 0)).toBeGreaterThanOrEqual(15);
  });
});
