import { expect, test } from 'vitest';
import type { CoverRequirementInput } from '@/lib/concrete/cover-input';
import { coverRequirement } from '@/lib/concrete/cover-requirement';
import { lapTolerance } from '@/lib/concrete/laps';
import { spacingTolerance } from '@/lib/concrete/spacing-tolerance';
import { tendonBand } from '@/lib/concrete/tendons';
import { basisDeviation, depthTolerance, en13670Plus } from '@/lib/concrete/tolerances';
import { checkName } from './check-name';
import { numberAt, textAt, Topic } from './load-records';

const topic = '03 tolerances';
const book = new Topic('03-tolerances');
const of = (id: string) => book.take(id);
const IN = 25.4;
const aci = (over: Partial<CoverRequirementInput>, specifiedMm: number) =>
  basisDeviation(
    { basis: 'aci-318-19', element: 'slab', meeting: 'formed', exposure: '', barDiameterMm: 16, ...over },
    specifiedMm,
  ).minusMm;

const shallow = of('tol.aci318.a.d_le_8');
test(checkName(topic, shallow, 'Cover and d, up to and with 8 in, and where d is not known'), () => {
  for (const effectiveDepthMm of [4 * IN, 8 * IN, undefined]) {
    expect(aci({ effectiveDepthMm }, 2 * IN)).toBeCloseTo(numberAt(shallow.values, 'tol_d_in') * IN, 9);
  }
  expect(aci({ effectiveDepthMm: 200, aciUnits: 'mm' }, 50)).toBe(10);
  expect(
    depthTolerance({ basis: 'aci-318-19', element: 'slab', meeting: 'formed' }, 8 * IN).minusMm,
  ).toBeCloseTo(numberAt(shallow.values, 'tol_d_in') * IN, 9);
});

const deep = of('tol.aci318.a.d_gt_8');
test(checkName(topic, deep, 'Cover and d, more than 8 in'), () => {
  expect(aci({ effectiveDepthMm: 8.01 * IN }, 2 * IN)).toBeCloseTo(numberAt(deep.values, 'tol_d_in') * IN, 9);
  expect(aci({ effectiveDepthMm: 201, aciUnits: 'mm' }, 50)).toBe(13);
  expect(depthTolerance({ basis: 'aci-318-19', element: 'slab', meeting: 'formed' }, 10 * IN)).toMatchObject({
    minusMm: 12.7,
    plusMm: 12.7,
  });
});

const soffit = of('tol.aci318.a.soffit');
test(checkName(topic, soffit), () => {
  expect(aci({ effectiveDepthMm: 12 * IN, soffit: true }, 2 * IN)).toBeCloseTo(
    -numberAt(soffit.values, 'tol_in') * IN,
    9,
  );
  expect(aci({ effectiveDepthMm: 300, soffit: true, aciUnits: 'mm' }, 50)).toBe(
    -numberAt(soffit.values, 'tol_mm'),
  );
});

const third = of('tol.check.third.1');
test(checkName(topic, third), () => {
  const { cover_in: cover, d_in: d } = third.values.inputs as { cover_in: number; d_in: number };
  expect(aci({ effectiveDepthMm: d * IN }, cover * IN)).toBeCloseTo(0.25 * IN, 9);
});

const minus = of('tol.en13670.minus');
test(checkName(topic, minus), () => {
  for (const toleranceClass of [1, 2] as const) {
    const deviation = basisDeviation(
      {
        basis: 'en-1992',
        element: 'slab',
        meeting: 'formed',
        exposure: '',
        barDiameterMm: 16,
        thicknessMm: 300,
        toleranceClass,
      },
      40,
    );
    expect(deviation.minusMm).toBe(numberAt(minus.values, `class${toleranceClass}_mm`));
  }
});

test(checkName(topic, minus, 'c_nom − Δ(minus) = c_min with the recommended allowance'), () => {
  const wall = coverRequirement({
    basis: 'en-1992',
    element: 'wall',
    meeting: 'formed',
    exposure: 'XS3',
    structuralClass: 'S4',
    barDiameterMm: 16,
    thicknessMm: 400,
  });
  expect([wall.specifiedMm, wall.leastAcceptedMm, wall.mostAcceptedMm]).toEqual([55, 45, 70]);
});

for (const value of book.takeAll('tol.en13670.plus.')) {
  test(
    checkName(
      topic,
      value,
      `Permitted increase of cover at a section of ${numberAt(value.values, 'h_mm')} mm`,
    ),
    () => {
      const height = numberAt(value.values, 'h_mm');
      expect(en13670Plus(height, 1, false)).toBe(numberAt(value.values, 'class1_mm'));
      expect(en13670Plus(height, 2, false)).toBe(numberAt(value.values, 'class2_mm'));
    },
  );
}

test(checkName(topic, of('tol.en13670.plus.400'), 'Linear between the heights, level beyond them'), () => {
  expect(en13670Plus(275, 1, false)).toBeCloseTo(12.5, 9);
  expect(en13670Plus(1450, 1, false)).toBeCloseTo(20, 9);
  expect(en13670Plus(1450, 2, false)).toBeCloseTo(15, 9);
  expect(en13670Plus(100, 1, false)).toBe(10);
  expect(en13670Plus(4000, 2, false)).toBe(20);
});

const foundation = of('tol.en13670.foundation');
test(checkName(topic, foundation), () => {
  expect(en13670Plus(400, 1, true) - en13670Plus(400, 1, false)).toBe(numberAt(foundation.values, 'plus_mm'));
});

const isDepth = of('tol.is456.d');
test(checkName(topic, isDepth), () => {
  const at = (mm: number) =>
    depthTolerance({ basis: 'is-456', element: 'slab', meeting: 'formed' }, mm).minusMm;
  expect([at(200), at(200.1)]).toEqual([
    numberAt(isDepth.values, 'd_le_200_mm'),
    numberAt(isDepth.values, 'd_gt_200_mm'),
  ]);
});

test(checkName(topic, of('tol.is456.cover')), () => {
  const slab = coverRequirement({
    basis: 'is-456',
    element: 'slab',
    meeting: 'formed',
    exposure: 'moderate',
    barDiameterMm: 16,
  });
  expect([slab.leastAcceptedMm, slab.specifiedMm, slab.mostAcceptedMm]).toEqual([30, 30, 40]);
});

const as = of('tol.as3600.cover');
test(checkName(topic, as), () => {
  const band = (over: Partial<CoverRequirementInput>) => {
    const { minusMm, plusMm } = basisDeviation(
      { basis: 'as-3600', element: 'slab', meeting: 'formed', exposure: '', barDiameterMm: 16, ...over },
      40,
    );
    return [-minusMm, plusMm];
  };
  for (const element of ['beam', 'slab', 'column', 'wall'] as const) {
    expect(band({ element })).toEqual(as.values.beams_slabs_columns_walls_mm);
  }
  expect(band({ element: 'slab', onGround: true })).toEqual(as.values.slab_on_ground_mm);
  expect(band({ element: 'footing', meeting: 'cast-against-ground' })).toEqual(
    as.values.footings_in_ground_mm,
  );
});

const noSpacing = of('tol.aci318.spacing');
const spacing117 = of('tol.aci117.spacing');
test(checkName(topic, spacing117, 'Spacing of bars, of which ACI 318 itself sets none'), () => {
  expect(noSpacing.values.value).toBeNull();
  const found = (steel: 'slab-or-wall' | 'stirrups' | 'column-ties', memberIn: number) =>
    spacingTolerance({ basis: 'aci-318-19', steel, specifiedMm: 6 * IN, memberMm: memberIn * IN });
  const slab = found('slab-or-wall', 8);
  expect(slab.plusMm).toBeCloseTo(numberAt(spacing117.values, 'slabs_walls_in') * IN, 9);
  expect(slab.trail.map((step) => step.provenance)).toEqual([noSpacing.provenance, spacing117.provenance]);
  for (const [steel, words] of [
    ['stirrups', 'lesser of 3 in and 1 in per ft of beam depth'],
    ['column-ties', 'lesser of 3 in and 1 in per ft of least column width'],
  ] as const) {
    expect(textAt(spacing117.values, steel === 'stirrups' ? 'stirrups' : 'ties')).toBe(words);
    expect(found(steel, 24).minusMm).toBeCloseTo(2 * IN, 9);
    expect(found(steel, 48).minusMm).toBeCloseTo(3 * IN, 9);
  }
});

const lap117 = of('tol.aci117.lap');
test(checkName(topic, lap117), () => {
  const short = (inches: number) => {
    const { minusMm, trail } = lapTolerance('aci-117-10', { diameterMm: inches * IN, requiredMm: 40 * IN });
    expect(trail[0]?.provenance).toBe(lap117.provenance);
    return -minusMm / IN;
  };
  for (const inches of [0.375, 1, 1.41]) {
    expect(short(inches)).toBeCloseTo(numberAt(lap117.values, 'no3_to_no11_in'), 9);
  }
  for (const inches of [1.693, 2.257]) {
    expect(short(inches)).toBeCloseTo(numberAt(lap117.values, 'no14_no18_in'), 9);
  }
});

const lap13670 = of('tol.en13670.lap');
test(checkName(topic, lap13670), () => {
  const share = Number.parseFloat(textAt(lap13670.values, 'tol'));
  const { minusMm, trail } = lapTolerance('en-13670', { diameterMm: 20, requiredMm: 1000 });
  expect(-minusMm / 1000).toBeCloseTo(share, 12);
  expect(trail[0]?.provenance).toBe(lap13670.provenance);
});

const other3600 = of('tol.as3600.other');
test(checkName(topic, other3600, 'Spacing and tendon profile'), () => {
  expect(textAt(other3600.values, 'spacing')).toBe('greater of 10 % of specified spacing and 15 mm');
  const spacing = (specifiedMm: number) =>
    spacingTolerance({ basis: 'as-3600', steel: 'slab-or-wall', specifiedMm, memberMm: 200 });
  expect(spacing(120).minusMm).toBe(15);
  expect(spacing(200).plusMm).toBeCloseTo(20, 12);
  expect(spacing(200).trail[0]?.provenance).toBe(other3600.provenance);
  expect(tendonBand('as-3600', 300).plusMm).toBe(numberAt(other3600.values, 'tendon_profile_mm'));
});
