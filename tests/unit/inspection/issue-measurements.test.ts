import { describe, expect, it } from 'vitest';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { needsEditionCheck } from '@/lib/concrete/trail';
import type { MeasurementRule, RuleOf } from '@/lib/inspection/measurement-rule';
import { issuePlan } from '@/lib/inspection/issue-plan';
import { limitWords } from '@/lib/inspection/measured-words';
import type { PlanInput } from '@/lib/inspection/plan-input';
import { issueContext, planMeasuring, slabInput } from '../../stories/measured-slab';

const IN = 25.4;
const issue = (rule: MeasurementRule, input: Partial<PlanInput> = {}) => planMeasuring(rule, { input }).item;

function refusal(rule: MeasurementRule, input: Partial<PlanInput> = {}): { field: string; reason: string } {
  try {
    issue(rule, input);
  } catch (error) {
    if (error instanceof ConcreteError) return { field: error.field, reason: error.reason };
    throw error;
  }
  throw new Error('It was issued.');
}

/** The slab with one of its layers changed. */
function withLayer(id: string, over: object): Partial<PlanInput> {
  const { elements } = slabInput();
  return {
    elements: elements.map((element) => ({
      ...element,
      layers: element.layers.map((layer) => (layer.id === id ? { ...layer, ...over } : layer)),
    })),
  };
}

describe('bars', () => {
  it('the size is the layer’s own, and the count is what the bay needs at its spacing', () => {
    expect(issue({ rule: 'bar-size', layerId: 'b1' }).expected).toBe('16 mm');
    expect(issue({ rule: 'bar-count', layerId: 'b2', bay: null }).least).toBe(27);
    // (4000 − 2 × 75) / 150 = 25.67 gaps: 26 of them, 27 bars.
    expect(issue({ rule: 'bar-count', layerId: 'b1', bay: { widthMm: 4000, edgeMm: 75 } }).least).toBe(27);
    expect(refusal({ rule: 'bar-count', layerId: 'b1', bay: null }).field).toBe('measurements.item.bayWidth');
    expect(refusal({ rule: 'bar-count', layerId: 'b1', bay: { widthMm: 100, edgeMm: 75 } }).field).toBe(
      'measurements.item.edge',
    );
  });

  const spacing: RuleOf<'bar-spacing'> = {
    rule: 'bar-spacing',
    layerId: 'b1',
    gaps: 10,
    ownMm: null,
    steel: 'slab-or-wall',
    use: null,
  };

  it('the deviation of a spacing comes from the basis, once over the run', () => {
    // ACI 117-10: 3 in in slabs; the code’s greatest spacing holds for the mean: min(3 × 300, 457.2).
    const { elements } = slabInput();
    const aci = (over: Partial<typeof spacing>) =>
      issue(
        { ...spacing, ...over },
        {
          basis: 'aci-318-19',
          elements: elements.map((element) => ({
            ...element,
            faces: element.faces.map((face) => ({ ...face, exposure: 'not-exposed' })),
          })),
        },
      );
    expect(aci({})).toMatchObject({ least: 1500 - 3 * IN, most: 1500 + 3 * IN });
    // 300 mm deep: 1 in per foot of depth is less than 3 in.
    expect(aci({ steel: 'stirrups' }).most).toBeCloseTo(1500 + (300 / 304.8) * IN, 9);
    expect(aci({ gaps: 1, use: 'one-way-slab' }).most).toBeCloseTo(150 + 3 * IN, 9);
    const wide = { ...spacing, gaps: 2, use: 'slab-principal' as const, ownMm: { minus: 30, plus: 200 } };
    expect(issue(wide, withLayer('b1', { spacingMm: 390 })).most).toBe(800);
  });

  it('a basis that gives no deviation asks for the contract’s', () => {
    expect(refusal(spacing)).toEqual({
      field: 'measurements.item.ownPlus',
      reason: 'This basis gives none here: enter the deviation that the contract permits.',
    });
  });

  it('clear distance looks at bar and aggregate, has no minus, and refuses bars that do not fit', () => {
    const rule = { rule: 'clear-distance', layerId: 'b1', place: 'layer', code: 'aci-318-19' } as const;
    // max(1 in, 16 mm, 4/3 × 20 mm) = 26.67; in a column max(1.5 in, 24 mm, 26.67 mm).
    expect(issue(rule).least).toBeCloseTo(80 / 3, 9);
    expect(issue({ ...rule, place: 'column' }).least).toBeCloseTo(38.1, 9);
    expect(issue({ ...rule, code: 'en-1992-1-1' }).least).toBe(25);
    expect(refusal(rule, { mix: null }).field).toBe('measurements.item.aggregateMm');
    const tight = refusal(rule, withLayer('b1', { spacingMm: 40 }));
    expect(tight.field).toBe('measurements.item.layerId');
    expect(tight.reason).toContain('leave 24 mm between them, and 26.67 mm are needed: they do not fit');
  });

  it('greatest spacing follows the thickness and says that it is from memory', () => {
    const item = issue({ rule: 'greatest-spacing', layerId: 'b1', use: 'slab-principal-high-moment' });
    expect(item.most).toBe(250);
    expect(needsEditionCheck(item.trail)).toBe(true);
  });
});

describe('a plan kept in inches', () => {
  const shown = (rule: MeasurementRule, input: Partial<PlanInput> = {}) =>
    issue(rule, { units: 'in', ...input }).trail.map((step) => step.value);

  it('explains its limits in inches, and judges by the same millimetres', () => {
    const bay = { rule: 'bar-count', layerId: 'b1', bay: { widthMm: 160 * IN, edgeMm: 3 * IN } } as const;
    const six = withLayer('b1', { spacingMm: 6 * IN });
    expect(shown(bay, six)).toEqual(['6 in', '(160 − 2 × 3) / 6, up, + 1 = 27']);
    expect(issue(bay, { units: 'in', ...six }).least).toBe(issue(bay, six).least);
    const clear = { rule: 'clear-distance', layerId: 'b1', place: 'column', code: 'aci-318-19' } as const;
    const mix = { name: 'M', aggregateMm: 0.75 * IN };
    expect(shown(clear, { mix } as Partial<PlanInput>)).toEqual([
      '3/4 in',
      '1 1/2 in; 1.5 db = 0.945 in; 4/3 aggregate = 1 in; 1 1/2 in governs',
    ]);
  });

  it('a rule typed in inches is told in inches', () => {
    const typed = {
      rule: 'typed',
      kind: 'lap-length',
      quantity: 'length',
      least: 24 * IN,
      most: 30.5 * IN,
      expected: null,
    } as const;
    expect(shown(typed as MeasurementRule)).toEqual(['24 to 30 1/2 in']);
  });

  it('no step of a rule that is not of a metric standard is left in millimetres', () => {
    const rules: MeasurementRule[] = [
      { rule: 'hook-extension', layerId: 'b1', use: 'main', angle: 180 },
      { rule: 'bend-diameter', layerId: 'b1', use: 'main', code: 'aci-318-19' },
      { rule: 'greatest-spacing', layerId: 'b1', use: 'one-way-slab' },
      { rule: 'share-lapped', lapMm: 600, mostPercent: 50, code: 'aci-318-19' },
      {
        rule: 'support-height',
        faceId: 'top',
        carriedLayerIds: ['t1', 't2'],
        standsOn: { faceId: 'soffit', layerIds: ['b1', 'b2'], otherMm: 0 },
        ownMinusMm: 8,
      },
    ];
    for (const rule of rules) expect(shown(rule).join('; '), rule.rule).not.toMatch(/ mm|^\d{3,}/);
    // The control: the same plan in millimetres says so.
    expect(
      issue(rules[4] as MeasurementRule)
        .trail.map((step) => step.value)
        .join('; '),
    ).toMatch(/ mm/);
  });
});

describe('supports, ties and tendons', () => {
  const height: RuleOf<'support-height'> = {
    rule: 'support-height',
    faceId: 'top',
    carriedLayerIds: ['t1', 't2'],
    standsOn: { faceId: 'soffit', layerIds: ['b1', 'b2'], otherMm: 0 },
    ownMinusMm: 8,
  };

  it('the height is the section’s arithmetic, with the cover above and the depth below as its limits', () => {
    // 300 − 50 − 16 − 12 − 50 − 16 − 12 = 144; the cover may lose 10, the depth 8.
    expect(issue(height)).toMatchObject({ least: 136, most: 154 });
    expect(issue(height).trail[0]?.value).toBe('300 − 50 − 16 − 12 − 50 − 16 − 12 = 144 mm');
    const onForm = { ...height, standsOn: { faceId: null, layerIds: [], otherMm: 25 } };
    expect(issue(onForm)).toMatchObject({ least: 189, most: 207 });
  });

  it('says which field is missing, and when there is no room', () => {
    expect(refusal({ ...height, ownMinusMm: null }).field).toBe('measurements.item.ownMinus');
    expect(refusal({ ...height, faceId: 'side' }).field).toBe('measurements.item.faceId');
    expect(refusal({ ...height, carriedLayerIds: ['gone'] }).field).toBe('measurements.item.carriedLayerIds');
    const full = { ...height, standsOn: { ...height.standsOn, otherMm: 144 } };
    expect(refusal(full).reason).toContain('no room');
  });

  it('supports are as close as their layer’s bars ask for', () => {
    const rule = { rule: 'support-spacing', by: 'common-practice', planMm: null } as const;
    // 12 mm takes the row of #4 (3 ft), 16 mm that of #6 (5 ft).
    expect(issue({ ...rule, layerId: 't2' }).most).toBeCloseTo(3 * 304.8, 9);
    expect(issue({ ...rule, layerId: 't1' }).most).toBeCloseTo(5 * 304.8, 9);
    expect(issue({ ...rule, by: 'bs-7973-2-bars', layerId: 't1' }).most).toBe(800);
    expect(refusal({ ...rule, by: 'plan', layerId: 't1' }).field).toBe('measurements.item.planMm');
  });

  it('ties follow their pattern and the spacing of the two layers', () => {
    const rule = {
      rule: 'tie-share',
      layerId: 't1',
      otherLayerId: 't2',
      pattern: 'by-spacing',
      sharePercent: null,
    } as const;
    expect(issue(rule).least).toBe(50);
    expect(issue(rule, withLayer('t2', { spacingMm: 310 })).least).toBe(100);
    expect(issue(rule).trail[0]?.value).toContain('= 44.44 per m²');
    expect(issue({ ...rule, pattern: 'share', sharePercent: 70 }).least).toBeCloseTo(70, 9);
    expect(refusal({ ...rule, pattern: 'share' }).field).toBe('measurements.item.sharePercent');
    expect(refusal({ ...rule, otherLayerId: 't1' }).field).toBe('measurements.item.otherLayerId');
    expect(refusal(rule, withLayer('t2', { spacingMm: null, count: 9 })).field).toBe(
      'measurements.item.otherLayerId',
    );
  });

  it('a tendon keeps to its band, by the depth of the member or by the contract', () => {
    const rule = { rule: 'tendon-height', heightMm: 220, from: 'soffit', to: 'centre', ownMm: null } as const;
    // 300 mm is over 8 in: 3/8 in.
    expect(issue({ ...rule, band: 'aci-117-10' })).toMatchObject({ least: 220 - 9.525, most: 229.525 });
    const own = { ...rule, band: 'own', ownMm: { minus: 3, plus: 6 } } as const;
    expect(issue(own)).toMatchObject({ least: 217, most: 226 });
    expect(refusal({ ...rule, band: 'own' }).field).toBe('measurements.item.ownPlus');
    expect(refusal({ ...rule, band: 'as-3600', heightMm: 300 }).field).toBe('measurements.item.heightMm');
  });
});

describe('laps', () => {
  const lap = (length: RuleOf<'lap-length'>['length'], over: Partial<RuleOf<'lap-length'>> = {}) =>
    ({ rule: 'lap-length', layerId: 'b1', tolerance: 'none', ownMinusMm: null, length, ...over }) as const;
  const typed = { by: 'typed', lengthMm: 860 } as const;
  const exposed = (basis: PlanInput['basis'], exposure: string): Partial<PlanInput> => {
    const { elements } = slabInput();
    return {
      basis,
      elements: elements.map((element) => ({
        ...element,
        faces: element.faces.map((face) => ({ ...face, exposure })),
      })),
    };
  };

  it('a typed one takes the tolerance of its basis: none, 1 in, 0.06 l, or the contract’s own', () => {
    expect(issue(lap(typed, { tolerance: 'basis' })).least).toBe(860);
    const aci = issue(lap(typed, { tolerance: 'basis' }), exposed('aci-318-19', 'not-exposed'));
    expect(aci.least).toBeCloseTo(860 - IN, 9);
    const en = issue(lap(typed, { tolerance: 'basis' }), {
      ...exposed('en-1992', 'XC3'),
      concrete: { structuralClass: 'S4' },
    });
    expect(en.least).toBeCloseTo(860 * 0.94, 9);
    expect(issue(lap(typed, { tolerance: 'own', ownMinusMm: 15 })).least).toBe(845);
    expect(refusal(lap(typed, { tolerance: 'own' })).field).toBe('measurements.item.ownMinus');
    expect(refusal(lap(typed, { tolerance: 'own', ownMinusMm: 860 })).field).toBe(
      'measurements.item.ownMinus',
    );
  });

  const aciTension = {
    by: 'aci-tension',
    fyMpa: 420,
    fcMpa: 28,
    lightweight: false,
    topBar: false,
    equation: 'simple',
    tiesAlongLap: false,
    providedOverRequired: 1,
    sharePercent: 100,
  } as const;

  it('by ACI from the layer’s own cover and spacing, class B of a bar that is well spaced', () => {
    // 16 mm takes the row of #6: X = 25. fy = 60916 psi, √f’c = 63.73 psi, db = 0.630 in; cover 50 mm, clear 134 mm.
    const ld = (60_916 / (25 * Math.sqrt(28 / 0.006894757293168))) * (16 / IN);
    expect(issue(lap(aciTension)).least).toBeCloseTo(1.3 * ld * IN, 0);
    const classA = { ...aciTension, providedOverRequired: 2, sharePercent: 50 } as const;
    expect(issue(lap(classA)).least).toBeCloseTo(ld * IN, 0);
    expect(issue(lap({ ...aciTension, topBar: true })).least).toBeCloseTo(1.3 * 1.3 * ld * IN, 0);
    // Epoxy: cover 50 + 16 + 12 = 78 is more than 3 db, clear spacing 134 more than 6 db: 1.2.
    const epoxy = issue(lap(aciTension, { layerId: 'epoxy' }));
    expect(epoxy.least).toBeCloseTo(1.2 * 1.3 * ld * IN, 0);
    expect(epoxy.trail[0]?.value).toBe('50 + 16 + 12 = 78 mm');
    const general = issue(lap({ ...aciTension, equation: 'general' }));
    // (cb + Ktr)/db = min(58, 75)/16 = 3.6, at most 2.5; ψs = 0.8.
    const ldGeneral = ((3 / 40) * (60_916 / Math.sqrt(28 / 0.006894757293168)) * 0.8 * (16 / IN)) / 2.5;
    expect(general.least).toBeCloseTo(1.3 * ldGeneral * IN, 0);
  });

  it('in compression by ACI, and in tension by EN', () => {
    const compression = { by: 'aci-compression', fyMpa: 420, fcMpa: 28, tensionLapMm: null } as const;
    // 0.0005 × 60916 × 0.630 in = 19.2 in.
    expect(issue(lap(compression)).least).toBeCloseTo(0.0005 * 60_916 * 16, 0);
    expect(refusal(lap({ ...compression, fyMpa: 600 })).field).toBe('measurements.item.tensionLapMm');
    const en = {
      by: 'en',
      strengthClass: 'C30/37',
      stressMpa: 435,
      sharePercent: 50,
      goodBond: true,
    } as const;
    // fbd = 2.25 × 2.0/1.5 = 3.0; lb = 4 × 435/3 = 580; α6 = 1.4: 812.
    expect(issue(lap(en)).least).toBeCloseTo(812, 6);
    expect(issue(lap({ ...en, sharePercent: 100 })).least).toBeCloseTo(870, 6);
    expect(refusal(lap({ ...en, strengthClass: 'C33' })).field).toBe('measurements.item.strengthClass');
  });

  it('refuses what it cannot compute, at its field', () => {
    expect(refusal(lap(aciTension, { layerId: 'frp' })).field).toBe('measurements.item.lengthBy');
    expect(refusal(lap({ ...aciTension, fyMpa: 900 })).field).toBe('measurements.item.fyMpa');
    expect(refusal(lap(aciTension), withLayer('b1', { spacingMm: null, count: 9 })).field).toBe(
      'measurements.item.layerId',
    );
  });

  it('stagger and share have their own limits', () => {
    expect(refusal({ rule: 'lap-stagger', lapMm: 860, leastMm: null }).field).toBe(
      'measurements.item.leastMm',
    );
    const en = { ...exposed('en-1992', 'XC3'), concrete: { structuralClass: 'S4' as const } };
    expect(issue({ rule: 'lap-stagger', lapMm: 860, leastMm: null }, en).least).toBeCloseTo(258, 9);
    const share = issue({ rule: 'share-lapped', lapMm: 860, code: 'en-1992-1-1', mostPercent: 50 });
    expect(share.trail[0]?.value).toBe('within 1118 mm');
  });
});

describe('bends and materials', () => {
  it('bends and hooks by bar and use', () => {
    const bend = { rule: 'bend-diameter', layerId: 'b1', code: 'aci-318-19', use: 'main' } as const;
    expect(issue(bend).least).toBe(96);
    expect(issue({ ...bend, code: 'bs-8666' }).least).toBe(64);
    const hook = { rule: 'hook-extension', layerId: 'b1', use: 'tie', angle: 135 } as const;
    // 6 × 16 = 96 is more than 3 in.
    expect(issue(hook).least).toBeCloseTo(96, 9);
    expect(refusal({ ...hook, use: 'main' }).field).toBe('measurements.item.angle');
  });

  it('coating, polymer and stainless rules are for bars that are so', () => {
    const coating = {
      rule: 'coating-damage',
      layerId: 'epoxy',
      damagedMostPercent: null,
      patchedMostPercent: null,
    } as const;
    expect(issue(coating).against).toMatchObject({
      diameterMm: 16,
      damagedMostPercent: 2,
      patchedMostPercent: 5,
    });
    expect(issue({ ...coating, damagedMostPercent: 1 }).against).toMatchObject({ damagedMostPercent: 1 });
    expect(needsEditionCheck(issue(coating).trail)).toBe(true);
    expect(refusal({ ...coating, layerId: 'b1' }).field).toBe('measurements.item.layerId');
    expect(refusal({ ...coating, damagedMostPercent: 0 }).field).toBe('measurements.item.damagedMostPercent');
    expect(refusal({ rule: 'frp-damage', layerId: 'epoxy', mostPercent: null }).field).toBe(
      'measurements.item.layerId',
    );
    expect(refusal({ rule: 'stainless-contact', layerId: 'b1' }).field).toBe('measurements.item.layerId');
  });

  it('a ticket’s dosage may fall short by what the contract permits', () => {
    const rule = { rule: 'fibre-dosage', fibreType: 'steel', kgPerM3: 30, minusPercent: 10 } as const;
    expect(issue(rule).least).toBeCloseTo(27, 9);
    expect(refusal({ ...rule, minusPercent: 100 }).field).toBe('measurements.item.minusPercent');
  });
});

describe('limits as typed', () => {
  const typed = { rule: 'typed', kind: 'bar-spacing', quantity: 'length', expected: null } as const;

  it('need a limit, and one that does not contradict the other', () => {
    expect(refusal({ ...typed, least: null, most: null }).field).toBe('measurements.item.least');
    expect(refusal({ ...typed, least: 10, most: 5 }).field).toBe('measurements.item.most');
    expect(refusal({ ...typed, quantity: 'designation', least: null, most: null }).field).toBe(
      'measurements.item.expected',
    );
  });

  it('are said in the unit of the plan', () => {
    const item = issue({ ...typed, least: 508, most: 533.4 });
    expect(limitWords(item, 'in')).toBe('20 in to 21 in');
    expect(limitWords(item, 'mm')).toBe('508 mm to 533.4 mm');
  });

  it('what is measured belongs to an element of the plan', () => {
    const rule = { ...typed, least: 1, most: null };
    const measurement = { id: 'item', title: 'Spacing', elementId: 'gone', required: 1, loaded: false, rule };
    expect(() => issuePlan(slabInput({ measurements: [measurement] }), issueContext)).toThrow(
      expect.objectContaining({ field: 'measurements.item.elementId' }),
    );
  });
});
