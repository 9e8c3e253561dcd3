import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { defaultPointCount, drawPoints, neighboursOf } from '@/lib/concrete/reading-points';

const face = fc.record({
  seed: fc.string({ maxLength: 20 }),
  widthMm: fc.integer({ min: 300, max: 30_000 }),
  heightMm: fc.integer({ min: 300, max: 30_000 }),
  count: fc.integer({ min: 1, max: 60 }),
});
const share = fc.double({ min: 0, max: 1, noNaN: true });

describe('drawing points', () => {
  test('gives one point per cell, each with its own label, all on the face', () => {
    fc.assert(
      fc.property(face, (input) => {
        const points = drawPoints(input);
        expect(points).toHaveLength(input.count);
        expect(new Set(points.map((point) => point.cell)).size).toBe(input.count);
        for (const point of points) {
          expect(point.xMm >= 0 && point.xMm <= input.widthMm).toBe(true);
          expect(point.yMm >= 0 && point.yMm <= input.heightMm).toBe(true);
        }
      }),
    );
  });

  test('draws the same for the same pour and face, and otherwise for another', () => {
    const input = { seed: 'pour/face', widthMm: 6000, heightMm: 3000, count: 8 };
    expect(drawPoints(input)).toEqual(drawPoints({ ...input }));
    expect(drawPoints({ ...input, seed: 'pour/other' })).not.toEqual(drawPoints(input));
  });

  test('never changes: the draw of an issued plan can be made again in any year', () => {
    expect(drawPoints({ seed: 'pour 12/top', widthMm: 6000, heightMm: 3000, count: 5 }))
      .toMatchInlineSnapshot(`
      [
        {
          "cell": "A1",
          "xMm": 116,
          "yMm": 898,
        },
        {
          "cell": "A2",
          "xMm": 2430,
          "yMm": 617,
        },
        {
          "cell": "A3",
          "xMm": 4152,
          "yMm": 1429,
        },
        {
          "cell": "B1",
          "xMm": 1751,
          "yMm": 1777,
        },
        {
          "cell": "B2",
          "xMm": 5610,
          "yMm": 2564,
        },
      ]
    `);
  });

  test('cells are as square as the shape allows', () => {
    const rows = (widthMm: number, heightMm: number, count: number) =>
      new Set(
        drawPoints({ seed: 's', widthMm, heightMm, count }).map((point) => point.cell.replace(/\d/g, '')),
      ).size;
    expect(rows(8000, 4000, 8)).toBe(2);
    expect(rows(4000, 8000, 8)).toBe(4);
    expect(rows(12_000, 300, 6)).toBe(1);
    expect(rows(3000, 3000, 9)).toBe(3);
  });

  test('keeps clear of openings', () => {
    const opening = fc.record({ x: share, y: share, w: share, h: share });
    fc.assert(
      fc.property(face, fc.array(opening, { maxLength: 4 }), (input, shares) => {
        const openings = shares.map(({ x, y, w, h }) => ({
          xMm: x * input.widthMm * 0.8,
          yMm: y * input.heightMm * 0.8,
          widthMm: w * input.widthMm * 0.4 + 1,
          heightMm: h * input.heightMm * 0.4 + 1,
        }));
        for (const point of drawPoints({ ...input, openings })) {
          const inside = openings.some(
            (o) =>
              point.xMm > o.xMm &&
              point.xMm < o.xMm + o.widthMm &&
              point.yMm > o.yMm &&
              point.yMm < o.yMm + o.heightMm,
          );
          expect(inside).toBe(false);
        }
      }),
    );
  });

  test('a cell that is all opening gives its point to a neighbour, so that none is lost', () => {
    const openings = [{ xMm: 0, yMm: 0, widthMm: 2000, heightMm: 2000 }];
    const points = drawPoints({ seed: 's', widthMm: 4000, heightMm: 4000, count: 4, openings });
    expect(points.map((point) => point.cell)).toEqual(['A1', 'A2', 'B1', 'B2']);
    expect(points.every((point) => point.xMm >= 2000 || point.yMm >= 2000)).toBe(true);
  });

  test('an opening moves only the points of the cells it touches', () => {
    const plain = { seed: 's', widthMm: 6000, heightMm: 4000, count: 6 };
    const before = drawPoints(plain);
    const openings = [{ xMm: 200, yMm: 200, widthMm: 1500, heightMm: 1500 }];
    const after = drawPoints({ ...plain, openings });
    expect(after.slice(1)).toEqual(before.slice(1));
  });

  test('another number keeps the points of the cells that stay as they were', () => {
    const five = drawPoints({ seed: 's', widthMm: 6000, heightMm: 4000, count: 5 });
    const six = drawPoints({ seed: 's', widthMm: 6000, heightMm: 4000, count: 6 });
    const row = (points: typeof five, letter: string) =>
      points.filter((point) => point.cell.startsWith(letter));
    expect(row(five, 'A')).toHaveLength(3);
    expect(row(six, 'A')).toEqual(row(five, 'A'));
    expect(row(six, 'B')).not.toEqual(row(five, 'B'));
  });

  test('spreads evenly within a cell over many faces', () => {
    const points = Array.from({ length: 4000 }, (_, index) =>
      drawPoints({ seed: `face ${index}`, widthMm: 1000, heightMm: 1000, count: 1 }),
    ).flat();
    for (const axis of ['xMm', 'yMm'] as const) {
      const tenths = Array.from(
        { length: 10 },
        (_, tenth) => points.filter((point) => Math.floor(point[axis] / 100) === tenth).length,
      );
      // 400 expected in each; five standard deviations are 95.
      for (const count of tenths) expect(Math.abs(count - 400)).toBeLessThan(95);
    }
  });

  test.each([
    ['widthMm', { widthMm: 0 }],
    ['heightMm', { heightMm: Number.NaN }],
    ['count', { count: 0 }],
    ['count', { count: 2.5 }],
    ['count', { count: 501 }],
    ['openings', { openings: [{ xMm: 0, yMm: 0, widthMm: 2000, heightMm: 2000 }] }],
    ['openings', { openings: [{ xMm: Number.NaN, yMm: 0, widthMm: 1, heightMm: 1 }] }],
  ])('refuses an impossible %s', (field, over) => {
    const input = { seed: 's', widthMm: 1000, heightMm: 1000, count: 4, ...over };
    expect(() => drawPoints(input)).toThrow(expect.objectContaining({ field }));
  });
});

describe('how many points', () => {
  test('at least five, more with the area, and denser on small members', () => {
    expect(defaultPointCount('slab', 1e6)).toBe(5);
    expect(defaultPointCount('slab', 60e6)).toBe(12);
    expect(defaultPointCount('column', 8e6)).toBe(8);
    expect(defaultPointCount('slab', 5e9)).toBe(60);
    expect(() => defaultPointCount('roof', 1e6)).toThrow(expect.objectContaining({ field: 'element' }));
    expect(() => defaultPointCount('slab', 0)).toThrow(expect.objectContaining({ field: 'areaMm2' }));
  });
});

describe('neighbours', () => {
  const grid = [0, 1, 2].flatMap((y) =>
    [0, 1, 2].map((x) => ({ xMm: x * 100, yMm: y * 100, name: `${x}${y}` })),
  );

  test('are the nearest to each side', () => {
    const names = (point: { xMm: number; yMm: number }) =>
      neighboursOf(point, grid)
        .map((other) => other.name)
        .sort();
    expect(names({ xMm: 100, yMm: 100 })).toEqual(['01', '10', '12', '21']);
    expect(names({ xMm: 0, yMm: 0 })).toEqual(['01', '10']);
  });

  test('along a beam they are the one before and the one after', () => {
    const line = [0, 1, 2, 3].map((x) => ({ xMm: x * 1000, yMm: 150 }));
    expect(neighboursOf({ xMm: 2000, yMm: 150 }, line)).toEqual([line[1], line[3]]);
  });
});
