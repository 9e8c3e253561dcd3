import { describe, expect } from 'vitest';
import { instrumentSees, materialRules } from '@/lib/concrete/bar-materials';
import { judgeFieldBend } from '@/lib/concrete/bends';
import {
  D3963_LIMITS,
  FRP_DAMAGE_MOST_PERCENT,
  judgeEpoxyCoating,
  judgeFrpDamage,
} from '@/lib/concrete/coatings';
import { judgeFibreTicket } from '@/lib/concrete/fibres';
import { numberAt, textAt, Topic } from './load-records';

const topic = new Topic('07-coated-frp-stainless-fibre');

const rule = (material: 'epoxy' | 'frp' | 'stainless', name: string) =>
  materialRules(material).find((step) => step.rule === name)?.value;

describe('epoxy', () => {
  topic.check('epoxy.damage.total', (values, { provenance }) => {
    expect(D3963_LIMITS.damagedMostPercent).toBe(numberAt(values, 'damage_before_repair_max_percent_per_ft'));
    expect(D3963_LIMITS.patchedMostPercent).toBe(numberAt(values, 'patched_max_percent_per_ft'));
    const bar = { diameterMm: 16, lengthMm: 6000 };
    const { trail } = judgeEpoxyCoating(bar, { spots: [], bareCutEnds: 0, flameCutEnds: 0 });
    expect(trail.filter((step) => step.clause.startsWith('ASTM')).map((step) => step.provenance)).toEqual([
      provenance,
      provenance,
    ]);
  });

  topic.check('coat.check.2', (values) => {
    const found = judgeEpoxyCoating(
      { diameterMm: 25.4, lengthMm: numberAt(values, 'inputs', 'length_ft') * 304.8 },
      {
        spots: [
          {
            kind: 'damaged',
            fromMm: 100,
            lengthMm: 0,
            areaMm2: numberAt(values, 'inputs', 'damaged_area_in2') * 25.4 ** 2,
          },
        ],
        bareCutEnds: 0,
        flameCutEnds: 0,
      },
    );
    expect(found.damaged.percent).toBeCloseTo(numberAt(values, 'expected', 'percent'), 2);
    const surface = (100 * found.damaged.areaMm2) / found.damaged.percent / 25.4 ** 2;
    expect(surface).toBeCloseTo(numberAt(values, 'expected', 'surface_in2'), 1);
    expect(found.outcome).toBe('repair');
  });

  topic.check('epoxy.ties', (values) => {
    expect(rule('epoxy', 'Ties')).toBe(textAt(values, 'ties'));
    expect(rule('epoxy', 'Supports')).toBe(textAt(values, 'supports'));
  });

  topic.check('epoxy.cut', (values) => {
    expect(textAt(values, 'flame_cutting')).toBe('prohibited');
    expect(rule('epoxy', 'Cutting')).toContain(textAt(values, 'method'));
    const bar = { diameterMm: 16, lengthMm: 6000 };
    const flame = judgeEpoxyCoating(bar, { spots: [], bareCutEnds: 0, flameCutEnds: 1 });
    expect(flame.outcome).toBe('more-than-repair');
  });
});

describe('FRP, stainless, fibres', () => {
  topic.check('frp.damage', (values) => {
    const percent = numberAt(values, 'max_unrepaired_visible_percent_per_m');
    expect(FRP_DAMAGE_MOST_PERCENT).toBe(percent);
    const bar = { diameterMm: 20, lengthMm: 4000 };
    const limit = (percent / 100) * Math.PI * 20 * 1000;
    const judge = (areaMm2: number) => judgeFrpDamage(bar, [{ fromMm: 500, lengthMm: 200, areaMm2 }]).verdict;
    expect(judge(limit)).toBe('met');
    expect(judge(limit * 1.0001)).toBe('not-met');
  });

  topic.check('frp.bend', (values) => {
    expect(values.allowed).toBe(false);
    expect(judgeFieldBend({ material: 'frp', permittedByEngineer: true }).verdict).toBe('not-met');
  });

  topic.check('frp.ties', (values) => {
    expect(rule('frp', 'Ties')).toBe(textAt(values, 'ties'));
    expect(rule('frp', 'Supports')).toBe(textAt(values, 'supports'));
    expect(textAt(values, 'note')).toContain('flotation');
    expect(rule('frp', 'Flotation')).toContain('tied down');
  });

  topic.check('frp.meter', (values) => {
    expect(textAt(values, 'electromagnetic')).toContain('not detected');
    expect(instrumentSees('magnetic', 'frp').sees).toBe(false);
    expect(instrumentSees('radar', 'frp').sees).toBe(false);
    expect(instrumentSees('tape', 'frp').sees).toBe(true);
  });

  topic.check('stainless.contact', (values) => {
    expect(textAt(values, 'separation')).toContain('1 in or a sleeve');
    expect(rule('stainless', 'Contact with carbon steel')).toContain('1 in apart, or a sleeve');
  });

  topic.check('fibre.c1116', (values) => {
    expect(values.ticket_items).toEqual(expect.arrayContaining(['fibre type', 'fibre quantity per volume']));
    const specified = { fibreType: 'Macro synthetic', fibreKgPerM3: 4, minusPercent: 0 };
    const judge = (fibreType: string | null, fibreKgPerM3: number | null) =>
      judgeFibreTicket({ fibreType, fibreKgPerM3 }, specified).verdict;
    expect(judge('macro synthetic', 4)).toBe('met');
    expect(judge('macro synthetic', 3.999)).toBe('not-met');
    expect(judge('steel, hooked', 30)).toBe('not-met');
    expect(judge(null, 4)).toBe('not-verified');
    expect(judge('macro synthetic', null)).toBe('not-verified');
  });
});
