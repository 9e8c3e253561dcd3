import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  atLeast,
  atMost,
  formatLength,
  LENGTH_SLACK_MM,
  parseLength,
  tapeNeighbours,
  withUnit,
  type LengthUnit,
} from '@/lib/concrete/length';

const mmOf = (text: string, field?: LengthUnit) => {
  const parsed = parseLength(text, field);
  return parsed.ok ? parsed.length.mm : parsed.problem;
};

describe('reading a length', () => {
  test.each([
    ['38 mm', 38],
    ['38mm', 38],
    ['3.8 cm', 38],
    ['0.038 m', 38],
    ['1.375 in', 34.925],
    ['1 3/8 in', 34.925],
    ['1-3/8"', 34.925],
    ['1 - 3/8 "', 34.925],
    ['1⅜"', 34.925],
    ['1 3⁄8 in', 34.925],
    ['11/8 in', 34.925],
    ['3/4 inch', 19.05],
    ['½ in', 12.7],
    ['.5 in', 12.7],
    ['2 inches', 50.8],
    ['2\' 6"', 762],
    ['2’ 6”', 762],
    ["2' 6''", 762],
    ['2\'-6 1/2"', 774.7],
    ['2 ft 6 in', 762],
    ["2'", 609.6],
    ['2.5 ft', 762],
    ['0 mm', 0],
    ['2/3 in', 25.4 * (2 / 3)],
  ])('%s', (text, mm) => {
    expect(mmOf(text)).toBeCloseTo(mm, 9);
  });

  test('keeps what was entered, and the unit as it was stated', () => {
    expect(parseLength('  1-3/8" ')).toEqual({
      ok: true,
      length: { text: '1-3/8"', unit: 'in', mm: 34.925 },
    });
    expect(parseLength('2\' 6"')).toMatchObject({ length: { unit: 'ft' } });
    expect(parseLength('3.8 cm', 'in')).toMatchObject({ length: { unit: 'cm', mm: 38 } });
  });

  test('a bare number takes the unit of its field, and without one none is guessed', () => {
    expect(mmOf('38', 'mm')).toBe(38);
    expect(mmOf('1 3/8', 'in')).toBeCloseTo(34.925, 9);
    for (const text of ['38', '1.5', '1 3/8']) {
      expect(parseLength(text)).toEqual({ ok: true, length: { text, unit: null, mm: null } });
    }
  });

  test.each([
    ['3,8 cm', /point/],
    ['1,200 mm', /point/],
    ['-38 mm', /minus/],
    ['−38 mm', /not a length/],
    ['', /Write a length/],
    ['abc', /not a length/],
    ['38 yd', /not a unit/],
    ['1/0 in', /zero/],
    ['1 11/8 in', /less than one/],
    ['1 3/8 mm', /decimal/],
    ['2\' 14"', /less than 12/],
    ["2' 6", /Mark the inches/],
    ['2.5\' 6"', /whole feet/],
    ['1e3 mm', /not a length|not a unit/],
    ['Infinity mm', /not a length/],
    ['2000000 mm', /one kilometre/],
    ['1 2 3 mm', /not a length/],
    ['9'.repeat(60), /too long/],
  ])('refuses %s and says why', (text, problem) => {
    expect(mmOf(text)).toMatch(problem);
  });

  test('a fraction in a field of millimetres asks for its unit', () => {
    expect(mmOf('1 3/8', 'mm')).toMatch(/Write the unit/);
  });

  test('whatever is typed, it answers with a finite length, none, or a sentence', () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 50 }), fc.constantFrom('mm', 'in', undefined), (text, field) => {
        const parsed = parseLength(text, field as LengthUnit | undefined);
        if (!parsed.ok) return parsed.problem.endsWith('.');
        const { mm, unit } = parsed.length;
        return mm === null ? unit === null : Number.isFinite(mm) && mm >= 0;
      }),
    );
  });

  test('what is shown as inches reads back as the same length', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 16 * 400 }), (sixteenths) => {
        const mm = (sixteenths * 25.4) / 16;
        return Math.abs(Number(mmOf(withUnit(mm, 'in'))) - mm) < LENGTH_SLACK_MM;
      }),
    );
  });
});

describe('comparing', () => {
  test('is inclusive, with slack for binary rounding only', () => {
    expect(atLeast(0.1 + 0.2, 0.3)).toBe(true);
    expect(atLeast(1.5 * 25.4, 38.1)).toBe(true);
    expect(atLeast(38.1 - 2e-6, 38.1)).toBe(false);
    expect(atMost(38.1 + 2e-6, 38.1)).toBe(false);
    expect(atMost(38.1 + 5e-7, 38.1)).toBe(true);
  });
});

describe('showing', () => {
  test.each<[number, LengthUnit, string]>([
    [38, 'mm', '38'],
    [38.1, 'mm', '38.1'],
    [34.925, 'mm', '34.925'],
    [16.933333333, 'mm', '16.93'],
    [34.925, 'in', '1 3/8'],
    [50.8, 'in', '2'],
    [19.05, 'in', '3/4'],
    [0, 'in', '0'],
    [(25.4 * 2) / 3, 'in', '2/3'],
    [38, 'in', '1.496'],
    [25.4 / 32, 'in', '0.03125'],
  ])('%f mm in %s is %s', (mm, unit, text) => {
    expect(formatLength(mm, unit)).toBe(text);
  });

  test('adds digits where rounding would show a failure as the limit', () => {
    expect(formatLength(37.999, 'mm', 38)).toBe('37.999');
    expect(formatLength(37.9996, 'mm', 38)).toBe('37.9996');
    expect(formatLength(16.9333, 'mm', (25.4 * 2) / 3)).toBe('16.93330');
    expect(formatLength(16.92, 'in', (25.4 * 2) / 3)).toBe('0.666');
    expect(formatLength(38.0999, 'in', 38.1)).toBe('1.499996');
    expect(withUnit(37.9996, 'mm', 38)).toBe('37.9996 mm');
  });

  test('a length beyond a limit is never shown as the limit, nor on its other side', () => {
    const near = fc.tuple(
      fc.double({ min: 1, max: 400, noNaN: true }),
      fc.oneof(
        fc.double({ min: 2e-6, max: 2, noNaN: true }),
        fc.constantFrom(2e-6, 1e-5, 1e-4, 0.001, 0.004, 0.01),
      ),
      fc.boolean(),
      fc.constantFrom<LengthUnit>('mm', 'in'),
      fc.constantFrom(1, 25.4 / 16, 25.4 / 24, 1 / 3),
    );
    const valueOf = (text: string) =>
      text
        .split(' ')
        .map((part) => part.split('/').map(Number))
        .reduce((sum, [upper = 0, lower = 1]) => sum + upper / lower, 0);
    fc.assert(
      fc.property(near, ([size, gap, below, unit, grid]) => {
        const limit = Math.max(1, Math.round(size / grid)) * grid;
        const value = below ? limit - gap : limit + gap;
        const shown = formatLength(value, unit, limit);
        const shownLimit = formatLength(limit, unit, value);
        expect(shown).not.toBe(shownLimit);
        expect(shown).not.toBe(formatLength(limit, unit));
        expect(valueOf(shown) < valueOf(shownLimit)).toBe(below);
      }),
      { numRuns: 2000 },
    );
  });

  test('refuses what is not finite', () => {
    expect(() => formatLength(Number.NaN, 'mm')).toThrow('finite');
  });
});

describe('marks of a tape', () => {
  test('a limit between two marks names both, a limit on a mark names it twice', () => {
    const two = tapeNeighbours((25.4 * 2) / 3);
    expect([two.below.text, two.above.text]).toEqual(['5/8', '11/16']);
    const one = tapeNeighbours(38.1);
    expect([one.below.text, one.above.text]).toEqual(['1 1/2', '1 1/2']);
  });

  test('every length lies between its marks, at most a sixteenth apart', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 1000, noNaN: true }), (mm) => {
        const { below, above } = tapeNeighbours(mm);
        return (
          atMost(below.mm, mm) && atLeast(above.mm, mm) && above.mm - below.mm <= 25.4 / 16 + LENGTH_SLACK_MM
        );
      }),
    );
  });
});
