import { describe, expect } from 'vitest';
import {
  hookExtension,
  leastBendDiameter,
  leastBetweenBends,
  leastScheduledRadius,
} from '@/lib/concrete/bends';
import { numberAt, textAt, Topic } from './load-records';

const topic = new Topic('06-bends');
const IN = 25.4;

/** ASTM sizes that stand for the rows of the ACI tables, number and diameter in inches. */
const SIZES = [
  [3, 0.375],
  [5, 0.625],
  [6, 0.75],
  [8, 1],
  [9, 1.128],
  [11, 1.41],
  [14, 1.693],
  [18, 2.257],
] as const;

const times = (text: string) => Number.parseFloat(text);

/** "max(6 db, 3 in)" or "12 db" for a bar, in inches. */
function extension(rule: string, db: number): number {
  const greatest = /^max\((\d+) db, ([\d.]+) in\)$/.exec(rule);
  return greatest ? Math.max(Number(greatest[1]) * db, Number(greatest[2])) : times(rule) * db;
}

describe('ACI 318-19 bends and hooks', () => {
  topic.check('bend.aci.main', (values) => {
    for (const [number, db] of SIZES) {
      const row = number <= 8 ? 'No3_to_No8' : number <= 11 ? 'No9_to_No11' : 'No14_No18';
      const found = leastBendDiameter({ basis: 'aci-318-19', use: 'main', diameterMm: db * IN });
      expect(found.leastMm / IN).toBeCloseTo(times(textAt(values, row)) * db, 9);
      for (const angle of [90, 180] as const) {
        const hook = hookExtension({ use: 'main', angle, diameterMm: db * IN });
        expect(hook.leastMm / IN).toBeCloseTo(extension(textAt(values, `ext_${angle}`), db), 9);
      }
    }
  });

  topic.check('bend.aci.stirrup', (values) => {
    for (const [number, db] of SIZES.filter(([size]) => size <= 8)) {
      const row = number <= 5 ? 'No3_to_No5' : 'No6_to_No8';
      const found = leastBendDiameter({ basis: 'aci-318-19', use: 'tie', diameterMm: db * IN });
      expect(found.leastMm / IN).toBeCloseTo(times(textAt(values, row)) * db, 9);
      const straight = hookExtension({ use: 'tie', angle: 90, diameterMm: db * IN }).leastMm / IN;
      expect(straight).toBeCloseTo(extension(textAt(values, 'ext_90', row), db), 9);
      for (const angle of [135, 180] as const) {
        const hook = hookExtension({ use: 'tie', angle, diameterMm: db * IN }).leastMm / IN;
        expect(hook).toBeCloseTo(extension(textAt(values, `ext_${angle}`), db), 9);
      }
    }
    expect(() => leastBendDiameter({ basis: 'aci-318-19', use: 'tie', diameterMm: 1.41 * IN })).toThrow(/#8/);
  });
});

describe('EN 1992-1-1 and BS 8666', () => {
  topic.check('bend.ec2', (values) => {
    for (const phi of [8, 12, 16, 20, 25, 32, 40]) {
      const row = phi <= 16 ? 'phi_le_16' : 'phi_gt_16';
      const found = leastBendDiameter({ basis: 'en-1992-1-1', use: 'main', diameterMm: phi });
      expect(found.leastMm).toBe(times(textAt(values, row)) * phi);
    }
  });

  topic.checkAll('bend.bs8666', (values, entry) => {
    const found = leastScheduledRadius(numberAt(values, 'd_mm'));
    expect(found.radiusMm).toBe(numberAt(values, 'r_mm'));
    expect(found.factor).toBe(numberAt(values, 'factor'));
    expect(found.trail[0]?.provenance).toBe(entry.provenance);
  });

  topic.checkAll('bend.check.bs8666', (values) => {
    const found = leastBetweenBends(numberAt(values, 'inputs', 'd_mm'));
    expect(found.leastMm).toBe(numberAt(values, 'expected', 'x_mm'));
  });
});

describe('worked checks', () => {
  const rows = [
    ['bend.check.1', 'aci-318-19', 'tie', IN],
    ['bend.check.2', 'aci-318-19', 'main', IN],
    ['bend.check.4', 'aci-318-19', 'main', IN],
    ['bend.check.5', 'en-1992-1-1', 'main', 1],
  ] as const;
  for (const [id, basis, use, perUnit] of rows) {
    topic.check(id, (values) => {
      const diameterMm = numberAt(values, 'inputs', 'db') * perUnit;
      const found = leastBendDiameter({ basis, use, diameterMm });
      expect(found.factor).toBe(numberAt(values, 'inputs', 'factor'));
      expect(found.leastMm / perUnit).toBeCloseTo(numberAt(values, 'expected', 'D'), 9);
    });
  }
});
