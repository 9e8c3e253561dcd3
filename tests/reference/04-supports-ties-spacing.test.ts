import { describe, expect } from 'vitest';
import {
  greatestSpacing,
  leastClearDistance,
  type SpacingBasis,
  type SpacingUse,
} from '@/lib/concrete/bar-spacing';
import { supportClasses, supportSpacingLimit, supportSuitsCoating } from '@/lib/concrete/supports';
import { requiredTies, tieRules, BUNDLE_TIES_MOST_MM } from '@/lib/concrete/ties';
import { numberAt, textAt, Topic } from './load-records';

const topic = new Topic('04-supports-ties-spacing');
const FOOT = 304.8;

describe('bar supports', () => {
  topic.check('sup.classes', (values) => {
    expect(supportClasses).toHaveLength(Object.keys(values).length);
    for (const { id, what } of supportClasses) {
      const published = textAt(values, id.replace('-', '').replace('1a', '1A'));
      const words = published.match(/[a-z]{4,}/gi)?.filter((word) => word !== 'used' && word !== 'with');
      expect(words?.filter((word) => !what.toLowerCase().includes(word))).toEqual([]);
    }
  });

  topic.check('sup.md', (values) => {
    expect(textAt(values, 'ties')).toContain('plastic-coated');
    expect(supportSuitsCoating('class-3', 'epoxy').suits).toBe(false);
    expect(supportSuitsCoating('class-1a', 'epoxy').suits).toBe(true);
    expect(supportSuitsCoating('non-metallic', 'epoxy').suits).toBe(true);
    expect(supportSuitsCoating('class-3', 'none').suits).toBe(true);
  });

  topic.check('sup.spacing.crsi', (values) => {
    const mostFt = (inches: number) => {
      const { mostMm, trail } = supportSpacingLimit({ rule: 'common-practice', diameterMm: inches * 25.4 });
      expect(trail[0]?.provenance).toBe('memory');
      return mostMm / FOOT;
    };
    expect(mostFt(0.375)).toBeCloseTo(numberAt(values, 'No3_ft'), 12);
    expect(mostFt(0.5)).toBeCloseTo(numberAt(values, 'No4_ft'), 12);
    expect(mostFt(0.625)).toBeCloseTo(numberAt(values, 'No5_ft'), 12);
    for (const inches of [0.75, 1, 1.41]) {
      expect(mostFt(inches)).toBeCloseTo(numberAt(values, 'No6_and_larger_ft'), 12);
    }
  });

  topic.check('sup.bs7973.bars', (values) => {
    const times = Number.parseInt(textAt(values, 'max_spacing'), 10);
    expect(supportSpacingLimit({ rule: 'bs-7973-2-bars', diameterMm: 12 }).mostMm).toBe(times * 12);
  });

  topic.check('sup.bs7973.members', (values) => {
    const cap = numberAt(values, 'beam_and_column_max_mm');
    expect(supportSpacingLimit({ rule: 'bs-7973-2-bars', diameterMm: 25 }).mostMm).toBe(cap);
  });

  topic.check('sup.bs7973.fabric', (values) => {
    const fabric = numberAt(values, 'max_spacing_mm');
    expect(supportSpacingLimit({ rule: 'bs-7973-2-fabric', diameterMm: 8 }).mostMm).toBe(fabric);
  });
});

describe('ties', () => {
  const perimeterFirst = (rule: 'common-practice' | 'bs-7973-2') => {
    // 7 × 7 intersections, 24 on the perimeter, 25 inside: 24 + 13.
    const sample = { pattern: tieRules[rule].pattern, intersections: 49, onPerimeter: 24 };
    expect(requiredTies(sample).required).toBe(37);
  };

  topic.check('tie.general', (values) => {
    expect(textAt(values, 'perimeter')).toBe('every intersection');
    expect(textAt(values, 'interior')).toContain('alternate');
    perimeterFirst('common-practice');
  });

  topic.check('tie.bs7973', (values, { provenance }) => {
    expect(textAt(values, 'slab_perimeter')).toContain('every intersection');
    expect(textAt(values, 'slab_interior')).toContain('alternate');
    expect(tieRules['bs-7973-2'].step.provenance).toBe(provenance);
    perimeterFirst('bs-7973-2');
  });

  const everyFrom12in = (rule: 'wsdot' | 'txdot' | 'fp-14', provenance: string) => {
    const { pattern, step } = tieRules[rule];
    const at = (x: number, y: number) =>
      requiredTies({ pattern, intersections: 49, spacingXMm: x, spacingYMm: y }).required;
    expect(at(12 * 25.4, 12 * 25.4)).toBe(49);
    expect(at(304.7, 304.8)).toBe(49);
    expect(at(304.7, 304.7)).toBe(25);
    expect(step.provenance).toBe(provenance);
  };

  topic.check('tie.wsdot', (values, { provenance }) => {
    expect(textAt(values, 'spacing_ge_12in')).toBe('all intersections');
    expect(textAt(values, 'spacing_lt_12in')).toBe('every other intersection');
    expect(BUNDLE_TIES_MOST_MM / FOOT).toBeCloseTo(numberAt(values, 'bundled_max_ft'), 12);
    everyFrom12in('wsdot', provenance);
  });

  topic.check('tie.txdot', (values, { provenance }) => {
    expect(textAt(values, 'bridge_slab')).toContain('alternate where spacing < 12 in each direction');
    everyFrom12in('txdot', provenance);
  });

  topic.check('tie.fp14', (values, { provenance }) => {
    expect(textAt(values, 'rule')).toContain('alternate where spacing < 12 in in each direction');
    everyFrom12in('fp-14', provenance);
  });
});

describe('clear distance', () => {
  topic.check('spc.aci318.clear', (values) => {
    expect(textAt(values, 'expr')).toBe('max(1 in, db, 4/3 dagg)');
    expect(textAt(values, 'columns')).toBe('max(1.5 in, 1.5 db, 4/3 dagg)');
    const least = (place: 'layer' | 'column' | 'between-layers', db: number, agg: number) =>
      leastClearDistance({
        basis: 'aci-318-19',
        place,
        diameterMm: db * 25.4,
        aggregateMm: agg * 25.4,
      }).leastMm / 25.4;
    expect(least('layer', 0.625, 0.75)).toBeCloseTo(1, 12);
    expect(least('layer', 1.41, 0.75)).toBeCloseTo(1.41, 12);
    expect(least('layer', 0.5, 1.5)).toBeCloseTo(2, 12);
    expect(least('column', 0.625, 0.75)).toBeCloseTo(1.5, 12);
    expect(least('column', 1.41, 0.75)).toBeCloseTo(2.115, 12);
    expect(least('column', 0.625, 1.5)).toBeCloseTo(2, 12);
    expect(least('between-layers', 1.41, 1.5)).toBeCloseTo(numberAt(values, 'layers_clear_in'), 12);
  });

  const least = (phi: number, dg: number) =>
    leastClearDistance({ basis: 'en-1992-1-1', place: 'layer', diameterMm: phi, aggregateMm: dg }).leastMm;

  topic.check('spc.ec2.clear', (values) => {
    expect(least(40, 20)).toBe(40 * numberAt(values, 'k1'));
    expect(least(12, 32)).toBe(32 + numberAt(values, 'k2_mm'));
    expect(least(8, 10)).toBe(20);
  });

  topic.check('spc.check.ec2.1', (values) => {
    const phi = numberAt(values, 'inputs', 'phi');
    expect(least(phi, numberAt(values, 'inputs', 'dg'))).toBe(numberAt(values, 'expected', 's_min'));
  });
});

describe('greatest spacing', () => {
  /** "min(3h, 18 in)" at a thickness in the same unit. */
  function most(rule: string, thickness: number): number {
    const match = /^min\(([\d.]+)h, (\d+)/.exec(rule);
    if (!match) throw new Error(`Not a rule: ${rule}`);
    return Math.min(Number(match[1]) * thickness, Number(match[2]));
  }

  const uses: Record<string, { basis: SpacingBasis; perUnitMm: number; uses: Record<string, SpacingUse> }> = {
    'spc.aci318.max': {
      basis: 'aci-318-19',
      perUnitMm: 25.4,
      uses: {
        two_way_critical: 'two-way-critical',
        two_way_other: 'two-way-other',
        one_way: 'one-way-slab',
        shrinkage_temperature: 'shrinkage-temperature',
        walls: 'wall',
      },
    },
    'spc.ec2.max': {
      basis: 'en-1992-1-1',
      perUnitMm: 1,
      uses: {
        principal: 'slab-principal',
        secondary: 'slab-secondary',
        principal_high_moment: 'slab-principal-high-moment',
        secondary_high_moment: 'slab-secondary-high-moment',
      },
    },
  };

  for (const [id, { basis, perUnitMm, uses: rows }] of Object.entries(uses)) {
    topic.check(id, (values) => {
      expect(Object.keys(rows).sort()).toEqual(Object.keys(values).sort());
      const thicknesses = basis === 'aci-318-19' ? [2.5, 4, 6, 10] : [80, 120, 150, 300];
      for (const [key, use] of Object.entries(rows)) {
        for (const thickness of thicknesses) {
          const found = greatestSpacing({ basis, use, thicknessMm: thickness * perUnitMm });
          expect(found.mostMm).toBeCloseTo(most(textAt(values, key), thickness) * perUnitMm, 9);
          expect(found.trail[0]?.provenance).toBe('memory');
        }
      }
    });
  }
});
