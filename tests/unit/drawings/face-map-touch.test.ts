import { describe, expect, it } from 'vitest';
import { facePlace, faceProportion, gridSteps } from '@/components/drawings/face-map-geometry';
import { nearestPoint, placeOnFace } from '@/components/drawings/face-map-touch';

const face = { widthPx: 360, heightPx: 200, widthMm: 7200, heightMm: 4000 };

describe('touching a face map', () => {
  it('means the nearer of two points whose targets overlap', () => {
    const points = [
      { id: 'a', xMm: 1000, yMm: 2000 },
      { id: 'b', xMm: 1400, yMm: 2000 },
    ];
    expect(nearestPoint(points, { xPx: 58, yPx: 100 }, face, 22)).toBe('a');
    expect(nearestPoint(points, { xPx: 62, yPx: 100 }, face, 22)).toBe('b');
  });

  it('means no point where none is within reach', () => {
    expect(nearestPoint([{ id: 'a', xMm: 1000, yMm: 2000 }], { xPx: 90, yPx: 100 }, face, 22)).toBeNull();
  });

  it('counts up from the lower edge, and never off the face', () => {
    expect(placeOnFace({ xPx: 90, yPx: 50 }, face)).toEqual({ xMm: 1800, yMm: 3000 });
    expect(placeOnFace({ xPx: -4, yPx: 230 }, face)).toEqual({ xMm: 0, yMm: 0 });
  });

  it('puts a point where a touch on it is read', () => {
    const place = facePlace(1800, 3000, 7200, 4000);
    expect(place).toEqual({ left: 25, top: 25 });
  });
});

describe('drawing a face', () => {
  it('is to scale for common shapes, and says when it is not', () => {
    expect(faceProportion(7200, 4000)).toEqual({ aspect: 1.8, toScale: true });
    expect(faceProportion(30_000, 1200)).toEqual({ aspect: 4, toScale: false });
  });

  it('rules a face in even steps and never in a crowd', () => {
    expect(gridSteps(7200)).toEqual([1000, 2000, 3000, 4000, 5000, 6000, 7000]);
    for (const mm of [37, 250, 999, 4100, 63_000]) {
      expect(gridSteps(mm).length).toBeGreaterThanOrEqual(3);
      expect(gridSteps(mm).length).toBeLessThanOrEqual(12);
    }
  });
});
