import { describe, expect, test } from 'vitest';
import { barsOf, findBar, findBarFor } from '@/lib/concrete/bars';

describe('finding a bar', () => {
  test.each([
    ['#5', 'astm', 15.875],
    [' # 5 '.replace(' 5', '5'), 'astm', 15.875],
    ['No. 11', 'astm', 35.814],
    ['no.4', 'astm', 12.7],
    ['Ø16', 'en', 16],
    ['16 mm', 'en', 16],
    ['16mm', 'en', 16],
    ['H20', 'en', 20],
    ['15M', 'csa', 16],
    ['15m', 'csa', 16],
    ['N24', 'as-nzs', 24],
    ['IS 12', 'is', 12],
  ])('%s', (designation, system, diameterMm) => {
    const bar = findBar(designation);
    expect(bar?.system).toBe(system);
    expect(bar?.diameterMm).toBeCloseTo(diameterMm, 9);
  });

  test.each(['', '16', '#12', '#2', '17 mm', 'Ø5', '12M', 'N11', 'IS 7', 'rebar', '#5 bars'])(
    'knows no "%s", and guesses none',
    (designation) => {
      expect(findBar(designation)).toBeNull();
    },
  );

  test('a bare number needs the system that goes with the basis', () => {
    expect(findBarFor('5', 'aci-318-19')?.designation).toBe('#5');
    expect(findBarFor('10', 'aci-318-19')?.diameterMm).toBeCloseTo(32.258, 9);
    expect(findBarFor('10', 'en-1992')?.diameterMm).toBe(10);
    expect(findBarFor('16', 'contract')).toBeNull();
    expect(findBarFor('N16', 'aci-318-19')?.system).toBe('as-nzs');
    expect(findBar('15M', 'en')).toBeNull();
  });

  test('every tabled designation finds its own row', () => {
    for (const system of ['astm', 'en', 'csa', 'as-nzs', 'is'] as const) {
      for (const bar of barsOf(system)) expect(findBar(bar.designation)).toEqual(bar);
    }
  });
});
