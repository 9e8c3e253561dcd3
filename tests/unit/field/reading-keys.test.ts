import { describe, expect, test } from 'vitest';
import {
  pressed,
  readPresses,
  shownPresses,
  type FractionKey,
  type Press,
} from '@/components/field/reading-keys';

const press = (...keys: string[]): readonly Press[] =>
  keys.reduce<readonly Press[]>(
    (presses, key) =>
      pressed(
        presses,
        key.includes('/') && key.length > 1
          ? { kind: 'fraction', key: key as FractionKey }
          : { kind: 'char', char: key },
      ),
    [],
  );
const mm = (presses: readonly Press[], unit: 'mm' | 'in') => {
  const read = readPresses(presses, unit);
  return read.ok ? read.value.mm : read.problem;
};

describe('the keypad in inches', () => {
  test('fraction keys add up to the fraction of the tape', () => {
    expect(shownPresses(press('1', '1/4', '1/8'), 'in')).toBe('1 3/8');
    expect(mm(press('1', '1/4', '1/8'), 'in')).toBeCloseTo(34.925, 9);
  });

  test('the fraction may come before the whole inches', () => {
    expect(shownPresses(press('1/2', '2'), 'in')).toBe('2 1/2');
  });

  test('sixteen sixteenths are one more inch, and it is shown', () => {
    expect(shownPresses(press('1', '1/2', '1/2'), 'in')).toBe('2');
  });

  test('deleting takes back the last key only', () => {
    expect(shownPresses(press('1', '1/4', '1/8').slice(0, -1), 'in')).toBe('1 1/4');
  });

  test('every sixteenth of two inches can be entered in at most five keys and is exact', () => {
    const keys: FractionKey[] = ['1/2', '1/4', '1/8', '1/16'];
    for (let sixteenths = 16; sixteenths < 32; sixteenths += 1) {
      const parts = keys.filter((_, index) => (sixteenths % 16) & (8 >> index));
      const presses = press('1', ...parts);
      expect(presses.length).toBeLessThanOrEqual(5);
      expect(mm(presses, 'in')).toBeCloseTo((sixteenths / 16) * 25.4, 9);
    }
  });
});

describe('the keypad in millimetres', () => {
  test('two digits are a reading, kept as entered', () => {
    const read = readPresses(press('4', '6'), 'mm');
    expect(read).toEqual({ ok: true, value: { text: '46', unit: 'mm', mm: 46 } });
  });

  test('a second point is not taken', () => {
    expect(shownPresses(press('4', '.', '5', '.', '1'), 'mm')).toBe('4.51');
  });

  test('nothing typed is no reading', () => {
    expect(mm([], 'mm')).toBe('Type the reading first.');
  });
});

describe('a gauge that types', () => {
  test('its digits, point and unit are read as a length, whatever the field shows', () => {
    expect(mm(press(...'1.375'), 'in')).toBeCloseTo(34.925, 9);
    expect(mm(press(...'38.2mm'), 'in')).toBeCloseTo(38.2, 9);
    expect(mm(press(...'1 3', '/', '8'), 'in')).toBeCloseTo(34.925, 9);
  });

  test('a letter that no length holds is not taken', () => {
    expect(shownPresses(press('4', 'x', '6'), 'mm')).toBe('46');
  });
});
