import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { CoverBasis, CoverRequirementInput } from '@/lib/concrete/cover-input';
import { coverRequirement, stricterOf } from '@/lib/concrete/cover-requirement';
import { exposureClasses } from '@/lib/concrete/exposure-classes';
import { needsEditionCheck } from '@/lib/concrete/trail';

const IN = 25.4;
const deck: CoverRequirementInput = {
  basis: 'aci-318-19',
  element: 'deck',
  meeting: 'finished-top',
  exposure: 'weather-or-ground',
  barDiameterMm: 0.75 * IN,
  thicknessMm: 12 * IN,
  effectiveDepthMm: 9 * IN,
};
const inches = (over: Partial<CoverRequirementInput>) => {
  const found = coverRequirement({ ...deck, ...over });
  return [found.specifiedMm / IN, found.leastAcceptedMm / IN].map((value) => Number(value.toFixed(6)));
};

describe('ACI 318-19', () => {
  test('specified and least accepted by depth, soffit and the one-third rule', () => {
    expect(inches({})).toEqual([2, 1.5]);
    expect(inches({ effectiveDepthMm: 8 * IN })).toEqual([2, 1.625]);
    expect(inches({ effectiveDepthMm: undefined })).toEqual([2, 1.625]);
    expect(inches({ meeting: 'formed', soffit: true })).toEqual([2, 1.75]);
    // 3/4 in: one third is 1/4 in, less than 3/8 and 1/2.
    expect(inches({ exposure: 'not-exposed' })).toEqual([0.75, 0.5]);
    expect(inches({ contractSpecifiedMm: 1 * IN })).toEqual([1, 0.666667]);
  });

  test('sets no upper limit unless the contract does', () => {
    expect(coverRequirement(deck).mostAcceptedMm).toBeNull();
    expect(coverRequirement({ ...deck, contractPlusMm: 12.7 }).mostAcceptedMm).toBeCloseTo(2.5 * IN, 9);
  });

  test('the trail names every step with clause, edition and provenance', () => {
    const { trail } = coverRequirement({
      ...deck,
      meeting: 'formed',
      soffit: true,
      contractSpecifiedMm: 2.5 * IN,
    });
    expect(trail.map((step) => step.clause)).toEqual([
      'ACI 318-19 Table 20.5.1.3.1',
      'contract documents',
      'ACI 318-19 Table 26.6.2.1(a)',
      'ACI 318-19 Table 26.6.2.1(a)',
      'ACI 318-19 Table 26.6.2.1(a)',
    ]);
    expect(trail.map((step) => step.value)).toEqual([
      '2 in',
      '2 1/2 in',
      '−1/2 in',
      '−1/4 in',
      '−5/6 in, so −1/4 in',
    ]);
    expect(needsEditionCheck(trail)).toBe(false);
  });

  test('a soffit that is not formed does not get the soffit tolerance, and the engineer is told', () => {
    const found = coverRequirement({ ...deck, meeting: 'cast-against-ground', soffit: true });
    expect(found.leastAcceptedMm / IN).toBeCloseTo(2.5, 9);
    expect(found.warnings.join()).toContain('not formed');
  });

  test('bars between two systems take the stricter row', () => {
    const code = (barDiameterMm: number, over = {}) =>
      coverRequirement({ ...deck, barDiameterMm, ...over }).codeMinimumMm;
    expect(code(15.9)).toBeCloseTo(1.5 * IN, 9);
    expect(code(16)).toBeCloseTo(2 * IN, 9);
    expect(code(16, { aciUnits: 'mm', effectiveDepthMm: undefined })).toBe(40);
  });

  test('main bars behind ties need their own cover, and that of the ties with the tie', () => {
    const beam: CoverRequirementInput = {
      ...deck,
      element: 'beam',
      meeting: 'formed',
      exposure: 'not-exposed',
      barDiameterMm: IN,
      behindTiesMm: 0.5 * IN,
    };
    expect(coverRequirement(beam).specifiedMm / IN).toBeCloseTo(2, 9);
  });

  test('prepared ground counts as contact with ground, and says that it is practice', () => {
    const found = coverRequirement({
      ...deck,
      element: 'mat',
      meeting: 'prepared-ground',
      exposure: 'not-exposed',
    });
    expect(found.codeMinimumMm).toBeCloseTo(2 * IN, 9);
    expect(found.trail.some((step) => step.provenance === 'common-practice')).toBe(true);
    expect(found.warnings).toHaveLength(1);
  });
});

describe('the contract', () => {
  test('governs, with a warning where it asks for less than the code', () => {
    const found = coverRequirement({ ...deck, contractSpecifiedMm: 1.5 * IN });
    expect(found).toMatchObject({ specifiedMm: 1.5 * IN, codeMinimumMm: 2 * IN });
    expect(found.warnings).toEqual([
      'The contract asks for 1 1/2 in, less than the 2 in of the code. The contract value governs here: ask the engineer.',
    ]);
    expect(coverRequirement({ ...deck, contractSpecifiedMm: 2 * IN }).warnings).toEqual([]);
    expect(coverRequirement({ ...deck, contractSpecifiedMm: 3 * IN }).specifiedMm).toBe(3 * IN);
  });

  test('own deviations replace those of the basis, and "never less" permits none', () => {
    expect(inches({ contractMinusMm: 0.25 * IN })).toEqual([2, 1.75]);
    expect(inches({ neverLess: true })).toEqual([2, 2]);
    const loose = coverRequirement({
      ...deck,
      contractMinusMm: 0.75 * IN,
      toleranceNote: 'Agreed in RFI 12',
    });
    expect(loose.leastAcceptedMm / IN).toBeCloseTo(1.25, 9);
    expect(loose.warnings.join()).toContain('more than the 1/2 in of the basis');
    expect(loose.trail.at(-1)).toMatchObject({ provenance: 'contract', note: 'Agreed in RFI 12' });
  });

  test('stands alone where there is no code, and says so about its own numbers only', () => {
    const alone: CoverRequirementInput = {
      ...deck,
      basis: 'contract',
      exposure: '',
      contractSpecifiedMm: 60,
    };
    expect(coverRequirement({ ...alone, contractMinusMm: 5, contractPlusMm: 15 })).toMatchObject({
      specifiedMm: 60,
      leastAcceptedMm: 55,
      mostAcceptedMm: 75,
      codeMinimumMm: null,
      warnings: [],
    });
    expect(coverRequirement({ ...alone, neverLess: true }).leastAcceptedMm).toBe(60);
    expect(() => coverRequirement(alone)).toThrow(expect.objectContaining({ field: 'contractMinusMm' }));
    expect(() => coverRequirement({ ...alone, contractSpecifiedMm: undefined, neverLess: true })).toThrow(
      expect.objectContaining({ field: 'contractSpecifiedMm' }),
    );
  });

  test('holds without an exposure: the code minimum stays open and is said to', () => {
    const found = coverRequirement({ ...deck, exposure: '', contractSpecifiedMm: 50 });
    expect(found.codeMinimumMm).toBeNull();
    expect(found.warnings.join()).toContain('exposure');
    expect(() => coverRequirement({ ...deck, exposure: '' })).toThrow(
      expect.objectContaining({ field: 'exposure', kind: 'absent' }),
    );
  });
});

describe('EN 1992-1-1 with EN 13670', () => {
  const wall: CoverRequirementInput = {
    basis: 'en-1992',
    element: 'wall',
    meeting: 'formed',
    exposure: 'XC4, XS1',
    structuralClass: 'S4',
    barDiameterMm: 16,
    thicknessMm: 400,
  };

  test('the worst of several classes, nominal with the allowance, least by the permitted reduction', () => {
    expect(coverRequirement(wall)).toMatchObject({
      specifiedMm: 45,
      leastAcceptedMm: 35,
      mostAcceptedMm: 60,
      codeMinimumMm: 45,
    });
    expect(coverRequirement({ ...wall, toleranceClass: 2 }).mostAcceptedMm).toBe(55);
    expect(coverRequirement({ ...wall, element: 'footing' }).mostAcceptedMm).toBe(75);
  });

  test('what execution permits is apart from what design adds', () => {
    const tighter = coverRequirement({ ...wall, contractMinusMm: 5 });
    expect([tighter.specifiedMm, tighter.leastAcceptedMm]).toEqual([45, 40]);
    const smallAllowance = coverRequirement({ ...wall, deltaCdevMm: 5 });
    expect([smallAllowance.specifiedMm, smallAllowance.leastAcceptedMm]).toEqual([40, 35]);
  });

  test('a thickness is needed for the upper limit, unless the contract sets it', () => {
    expect(() => coverRequirement({ ...wall, thicknessMm: undefined })).toThrow(
      expect.objectContaining({ field: 'thicknessMm', kind: 'absent' }),
    );
    expect(coverRequirement({ ...wall, thicknessMm: undefined, contractPlusMm: 10 }).mostAcceptedMm).toBe(55);
  });
});

describe('impossible or absent input names its field', () => {
  const thin = { ...deck, thicknessMm: 2.5 * IN };
  test.each<[string, CoverRequirementInput]>([
    ['barDiameterMm', { ...deck, barDiameterMm: -16 }],
    ['barDiameterMm', { ...deck, barDiameterMm: Number.NaN }],
    ['thicknessMm', thin],
    ['thicknessMm', { ...deck, thicknessMm: Number.POSITIVE_INFINITY }],
    ['contractSpecifiedMm', { ...deck, contractSpecifiedMm: 0 }],
    ['contractMinusMm', { ...deck, contractMinusMm: -1 }],
    ['contractMinusMm', { ...deck, contractMinusMm: 2 * IN }],
    ['contractMinusMm', { ...deck, contractMinusMm: 5, neverLess: true }],
    ['contractPlusMm', { ...deck, contractPlusMm: Number.NaN }],
    ['bundleOf', { ...deck, bundleOf: 5 }],
    ['exposure', { ...deck, exposure: 'damp' }],
    ['exposure', { ...deck, element: 'footing', exposure: 'not-exposed' }],
    ['effectiveDepthMm', { ...deck, effectiveDepthMm: -3 }],
    ['structuralClass', { ...deck, basis: 'en-1992', exposure: 'XC1' }],
    ['exposure', { ...deck, basis: 'en-1992', exposure: 'XF4', structuralClass: 'S4' }],
    [
      'strengthClass',
      { ...deck, basis: 'en-1992', exposure: 'XC1', workingLifeYears: 50, strengthClass: '30' },
    ],
    ['strengthMpa', { ...deck, basis: 'as-3600', exposure: 'B1', aggregateMm: 20 }],
    ['strengthMpa', { ...deck, basis: 'as-3600', exposure: 'C2', aggregateMm: 20, strengthMpa: 25 }],
    ['aggregateMm', { ...deck, basis: 'csa-a23.1', exposure: 'C-1' }],
    [
      'exposure',
      { ...deck, basis: 'csa-a23.1', exposure: 'N', meeting: 'cast-against-ground', aggregateMm: 20 },
    ],
    ['exposure', { ...deck, basis: 'is-456', exposure: 'XC1' }],
  ])('%s', (field, input) => {
    expect(() => coverRequirement(input)).toThrow(expect.objectContaining({ name: 'ConcreteError', field }));
  });
});

describe('an as-found bar', () => {
  test('is judged by the stricter of the planned and the found one', () => {
    const planned = coverRequirement({ ...deck, barDiameterMm: 0.625 * IN, contractPlusMm: 10 });
    const found = coverRequirement({ ...deck, contractPlusMm: 10 });
    const strict = stricterOf(planned, found);
    expect(strict.leastAcceptedMm).toBe(found.leastAcceptedMm);
    expect(strict.mostAcceptedMm).toBe(planned.mostAcceptedMm);
    expect(stricterOf(found, planned).leastAcceptedMm).toBe(found.leastAcceptedMm);
  });
});

describe('what holds for every basis', () => {
  const bases: CoverBasis[] = ['aci-318-19', 'en-1992', 'is-456', 'as-3600', 'csa-a23.1'];
  const asked = fc
    .constantFrom(...bases)
    .chain((basis) =>
      fc.record({
        basis: fc.constant(basis),
        exposure: fc.constantFrom(...exposureClasses(basis).map(({ value }) => value)),
        element: fc.constantFrom<CoverRequirementInput['element']>(
          'slab',
          'wall',
          'column',
          'beam',
          'pier',
          'mat',
          'stair',
          'deck',
        ),
        meeting: fc.constantFrom<CoverRequirementInput['meeting']>(
          'formed',
          'finished-top',
          'prepared-ground',
        ),
        soffit: fc.boolean(),
        barDiameterMm: fc.constantFrom(6, 9.525, 12, 16, 20, 25.4, 32, 43),
        bundleOf: fc.constantFrom(1, 2),
        thicknessMm: fc.constantFrom(250, 400, 900, 3000),
        structuralClass: fc.constantFrom<'S1' | 'S4' | 'S6'>('S1', 'S4', 'S6'),
        strengthMpa: fc.constant(50),
        aggregateMm: fc.constantFrom(10, 20, 40),
      }),
    )
    .filter((input) => input.basis !== 'en-1992' || input.barDiameterMm * Math.sqrt(input.bundleOf) <= 55);

  test('least ≤ specified ≤ most, all finite, each step of the trail complete', () => {
    fc.assert(
      fc.property(asked, (input) => {
        const found = coverRequirement(input);
        expect(found.leastAcceptedMm).toBeGreaterThan(0);
        expect(found.leastAcceptedMm).toBeLessThanOrEqual(found.specifiedMm);
        expect(found.mostAcceptedMm ?? Infinity).toBeGreaterThanOrEqual(found.specifiedMm);
        expect(found.codeMinimumMm).toBe(found.specifiedMm);
        for (const step of found.trail) {
          expect(step.rule && step.clause && step.value).toBeTruthy();
          expect(step.value).not.toMatch(/NaN|Infinity|undefined/);
          if (step.provenance === 'memory') expect(step.note).toMatch(/from memory/i);
        }
      }),
    );
  });

  test('tightening the reduction raises the least accepted cover and leaves the specified alone', () => {
    fc.assert(
      fc.property(asked, fc.double({ min: 0, max: 1, noNaN: true }), (input, share) => {
        const before = coverRequirement(input);
        const permitted = before.specifiedMm - before.leastAcceptedMm;
        const after = coverRequirement({ ...input, contractMinusMm: permitted * share });
        expect(after.specifiedMm).toBe(before.specifiedMm);
        expect(after.leastAcceptedMm).toBeGreaterThanOrEqual(before.leastAcceptedMm - 1e-9);
      }),
    );
  });

  test('a thicker bar never needs less cover', () => {
    fc.assert(
      fc.property(asked, fc.constantFrom(1.1, 1.5), (input, factor) => {
        const thicker = { ...input, barDiameterMm: Math.min(input.barDiameterMm * factor, 38) };
        fc.pre(thicker.barDiameterMm > input.barDiameterMm);
        expect(coverRequirement(thicker).specifiedMm).toBeGreaterThanOrEqual(
          coverRequirement(input).specifiedMm,
        );
      }),
    );
  });
});
