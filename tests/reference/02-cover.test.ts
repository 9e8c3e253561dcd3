import { expect, test } from 'vitest';
import { findBar } from '@/lib/concrete/bars';
import { coverByAci318 } from '@/lib/concrete/cover-aci-318';
import { coverByAs3600 } from '@/lib/concrete/cover-as-3600';
import { coverByCsaA23 } from '@/lib/concrete/cover-csa-a23';
import { coverByEn1992, enExposures, structuralClass } from '@/lib/concrete/cover-en-1992';
import type { CoverElement, CoverRequirementInput, StructuralClass } from '@/lib/concrete/cover-input';
import { coverByIs456 } from '@/lib/concrete/cover-is-456';
import { coverRequirement } from '@/lib/concrete/cover-requirement';
import { checkName } from './check-name';
import { numberAt, Topic } from './load-records';

const topic = '02 cover';
const book = new Topic('02-cover');
const of = (id: string) => book.take(id);
const diameter = (designation: string) => findBar(designation)?.diameterMm ?? Number.NaN;
const input = (over: Partial<CoverRequirementInput>): CoverRequirementInput => ({
  basis: 'aci-318-19',
  element: 'slab',
  meeting: 'formed',
  exposure: 'not-exposed',
  barDiameterMm: 16,
  ...over,
});

/** Every row of the ACI table, by each of its members and each of its bar sizes. */
const slabs: CoverElement[] = ['slab', 'wall', 'mat', 'stair', 'deck'];
const beams: CoverElement[] = ['beam', 'column', 'pier'];
const all: CoverElement[] = [...slabs, ...beams, 'footing'];
const sizes = ['#3', '#4', '#5', '#6', '#7', '#8', '#9', '#10', '#11', '#14', '#18'];
const aciRows: [string, Partial<CoverRequirementInput>, CoverElement[], string[]][] = [
  ['cover.aci318.ground', { meeting: 'cast-against-ground', exposure: '' }, all, sizes],
  ['cover.aci318.weather_large', { exposure: 'weather-or-ground' }, all, sizes.slice(3)],
  ['cover.aci318.weather_small', { exposure: 'weather-or-ground' }, all, sizes.slice(0, 3)],
  ['cover.aci318.int_slab_large', { exposure: 'not-exposed' }, slabs, ['#14', '#18']],
  ['cover.aci318.int_slab_small', { exposure: 'not-exposed' }, slabs, sizes.slice(0, 9)],
  ['cover.aci318.int_beam', { exposure: 'not-exposed' }, beams, sizes],
];
for (const [id, over, elements, bars] of aciRows) {
  const value = of(id);
  test(
    checkName(topic, value, `${value.title}, ${String(value.values.member)}, ${String(value.values.bars)}`),
    () => {
      for (const element of elements) {
        for (const bar of bars) {
          const asked = input({ ...over, element, barDiameterMm: diameter(bar) });
          expect(coverByAci318(asked).minimumMm, `${element} ${bar}`).toBe(
            numberAt(value.values, 'cover_in') * 25.4,
          );
          expect(coverByAci318({ ...asked, aciUnits: 'mm' }).minimumMm, `${element} ${bar}, metric`).toBe(
            numberAt(value.values, 'cover_mm'),
          );
        }
      }
    },
  );
}

test(
  checkName(
    topic,
    of('cover.aci318.bundle'),
    'Bundled bars: equivalent diameter up to 2 in, at least the table',
  ),
  () => {
    const bundle = (over: Partial<CoverRequirementInput>) => coverByAci318(input(over)).minimumMm / 25.4;
    // Four #9: 2 × 1.128 in = 2.256 in, held at 2 in.
    expect(bundle({ barDiameterMm: diameter('#9'), bundleOf: 4 })).toBeCloseTo(2, 9);
    // Two #8: 1.414 in governs over 0.75 in.
    expect(bundle({ barDiameterMm: diameter('#8'), bundleOf: 2 })).toBeCloseTo(Math.SQRT2, 9);
    // Two #8 exposed to weather: the table's 2 in governs.
    expect(bundle({ exposure: 'weather-or-ground', barDiameterMm: diameter('#8'), bundleOf: 2 })).toBeCloseTo(
      2,
      9,
    );
    expect(
      bundle({ meeting: 'cast-against-ground', barDiameterMm: diameter('#9'), bundleOf: 4 }),
    ).toBeCloseTo(3, 9);
  },
);

test(
  checkName(
    topic,
    of('cover.aci318.corrosive'),
    'Corrosive exposure: commentary, shown as a warning, not as the minimum',
  ),
  () => {
    const wall = coverByAci318(
      input({ element: 'wall', exposure: 'corrosive', barDiameterMm: diameter('#5') }),
    );
    expect(wall.minimumMm).toBeCloseTo(38.1, 9);
    expect(wall.warnings.join(' ')).toContain('2 in');
    const beam = coverByAci318(
      input({ element: 'beam', exposure: 'corrosive', barDiameterMm: diameter('#8') }),
    );
    expect(beam.warnings.join(' ')).toContain('2 1/2 in');
  },
);

const lookUp = of('cover.check.aci');
test(checkName(topic, lookUp), () => {
  const cases = lookUp.values.inputs as { exposure: string; bar?: string; member?: string }[];
  const answers = cases.map(
    ({ exposure, bar, member }) =>
      coverByAci318(
        input({
          element: (member ?? 'slab') as CoverElement,
          meeting: exposure === 'ground' ? 'cast-against-ground' : 'formed',
          exposure: exposure === 'interior' ? 'not-exposed' : 'weather-or-ground',
          barDiameterMm: diameter(bar ?? '#5'),
        }),
      ).minimumMm / 25.4,
  );
  expect(answers.map((inches) => Number(inches.toFixed(9)))).toEqual(lookUp.values.expected_in);
});

const en = (over: Partial<CoverRequirementInput>) =>
  coverByEn1992(
    input({ basis: 'en-1992', exposure: 'XC1', structuralClass: 'S4', barDiameterMm: 6, ...over }),
  );

for (const value of book.takeAll('cover.ec2.4_4N.')) {
  test(checkName(topic, value), () => {
    for (const [classes, cover] of Object.entries(value.values)) {
      for (const exposure of classes.split('/')) {
        const sclass = value.id.slice(-2) as StructuralClass;
        expect(en({ exposure, structuralClass: sclass }).cMinMm, `${exposure} ${sclass}`).toBe(cover);
      }
    }
  });
}

const moves = of('cover.ec2.4_3N');
test(checkName(topic, moves), () => {
  const thresholds = moves.values.strength_class_threshold as Record<string, string>;
  for (const exposure of enExposures) {
    const [, strengthClass] =
      Object.entries(thresholds).find(([names]) => names.split('/').includes(exposure)) ?? [];
    const below = `C${Number(strengthClass?.slice(1, 3)) - 5}/37`;
    expect(structuralClass(exposure, { workingLifeYears: 50 })).toBe('S4');
    expect(structuralClass(exposure, { workingLifeYears: 100 })).toBe('S6');
    expect(
      structuralClass(exposure, { workingLifeYears: 50, strengthClass }),
      `${exposure} at ${strengthClass}`,
    ).toBe('S3');
    expect(
      structuralClass(exposure, { workingLifeYears: 50, strengthClass: below }),
      `${exposure} at ${below}`,
    ).toBe('S4');
    expect(
      structuralClass(exposure, {
        workingLifeYears: 50,
        strengthClass: 'C50/60',
        slabGeometry: true,
        specialQualityControl: true,
      }),
    ).toBe('S1');
  }
});

const worked = of('cover.check.ec2.1');
test(checkName(topic, worked), () => {
  const link = en({ element: 'beam', barDiameterMm: 8, deltaCdevMm: 10 });
  const main = en({ element: 'beam', barDiameterMm: 20, deltaCdevMm: 10 });
  expect({ link: [link.cMinMm, link.minimumMm], main: [main.cMinMm, main.minimumMm] }).toEqual({
    link: [15, 25],
    main: [20, 30],
  });
  const behind = coverRequirement(
    input({
      basis: 'en-1992',
      element: 'beam',
      exposure: 'XC1',
      structuralClass: 'S4',
      barDiameterMm: 20,
      behindTiesMm: 8,
      deltaCdevMm: 10,
      thicknessMm: 500,
    }),
  );
  expect(behind.codeMinimumMm).toBe(33);
});

test(checkName(topic, of('cover.check.ec2.4')), () => {
  const cover = en({
    exposure: 'XD1',
    structuralClass: undefined,
    workingLifeYears: 100,
    slabGeometry: true,
    strengthClass: 'C30/37',
    deltaCdevMm: 0,
  });
  expect(cover.cMinMm).toBe(40);
  expect(cover.trail.find((step) => step.rule.startsWith('Structural class'))?.value).toBe('S5');
});

test(
  checkName(topic, of('cover.ec2.cminb'), 'Bond: bar or equivalent diameter, 5 mm more over 32 mm aggregate'),
  () => {
    expect(en({ barDiameterMm: 32 }).cMinMm).toBe(32);
    expect(en({ barDiameterMm: 32, aggregateMm: 32 }).cMinMm).toBe(32);
    expect(en({ barDiameterMm: 32, aggregateMm: 40 }).cMinMm).toBe(37);
    expect(en({ barDiameterMm: 20, bundleOf: 2 }).cMinMm).toBeCloseTo(20 * Math.SQRT2, 9);
  },
);

test(checkName(topic, of('cover.ec2.cmin'), 'Never less than 10 mm'), () => {
  expect(en({ exposure: 'X0', structuralClass: 'S1', barDiameterMm: 6 }).cMinMm).toBe(10);
});

test(checkName(topic, of('cover.ec2.dcdev'), 'Recommended allowance, and the allowance typed'), () => {
  expect(en({}).deltaCdevMm).toBe(10);
  expect(en({ deltaCdevMm: 5 }).minimumMm).toBe(20);
});

const uneven = of('cover.ec2.uneven');
test(checkName(topic, uneven), () => {
  expect(en({ meeting: 'prepared-ground' }).minimumMm).toBe(numberAt(uneven.values, 'k1_prepared_ground_mm'));
  expect(en({ meeting: 'cast-against-ground' }).minimumMm).toBe(
    numberAt(uneven.values, 'k2_directly_against_soil_mm'),
  );
});

for (const value of book.takeAll('cover.as3600.')) {
  test(checkName(topic, value, `${value.title}, ${String(value.values.exposure)}`), () => {
    const bracketed = value.values.bracketed_values as number[];
    for (const [strength, cover] of Object.entries(value.values.fc_to_cover as Record<string, number>)) {
      const answer = coverByAs3600(
        input({
          basis: 'as-3600',
          exposure: String(value.values.exposure),
          strengthMpa: Number(strength),
          barDiameterMm: 12,
          aggregateMm: 10,
        }),
      );
      expect(answer.minimumMm, `${strength} MPa`).toBe(cover);
      expect(answer.warnings.length > 0, `${strength} MPa`).toBe(bracketed.includes(cover));
    }
  });
}

const is = (over: Partial<CoverRequirementInput>) =>
  coverByIs456(input({ basis: 'is-456', exposure: 'mild', barDiameterMm: 16, ...over })).minimumMm;

for (const value of ['mild', 'moderate', 'severe', 'very_severe', 'extreme'].map((name) =>
  of(`cover.is456.${name}`),
)) {
  test(checkName(topic, value), () => {
    expect(is({ exposure: String(value.values.exposure) })).toBe(numberAt(value.values, 'nominal_cover_mm'));
  });
}

test(checkName(topic, of('cover.is456.notes')), () => {
  expect(is({ exposure: 'mild', barDiameterMm: 12 })).toBe(15);
  expect(is({ exposure: 'moderate', barDiameterMm: 12 })).toBe(30);
  expect(is({ exposure: 'severe', strengthMpa: 35 })).toBe(40);
  expect(is({ exposure: 'very severe', strengthMpa: 40 })).toBe(45);
  expect(is({ exposure: 'severe', strengthMpa: 30 })).toBe(45);
  expect(is({ exposure: 'extreme', strengthMpa: 40 })).toBe(75);
});

const members = of('cover.is456.members');
test(checkName(topic, members), () => {
  expect(is({ element: 'column' })).toBe(numberAt(members.values, 'column_longitudinal_mm'));
  expect(is({ element: 'column', barDiameterMm: 12, leastDimensionMm: 200 })).toBe(
    numberAt(members.values, 'column_min_dim_le_200_and_bar_le_12_mm'),
  );
  expect(is({ element: 'column', barDiameterMm: 12, leastDimensionMm: 201 })).toBe(40);
  expect(is({ element: 'footing' })).toBe(numberAt(members.values, 'footing_mm'));
  expect(is({ barDiameterMm: 32 })).toBe(32);
});

const csa = (over: Partial<CoverRequirementInput>) =>
  coverByCsaA23(input({ basis: 'csa-a23.1', barDiameterMm: 11.3, aggregateMm: 14, ...over })).minimumMm;

for (const value of book.takeAll('cover.csa.')) {
  test(checkName(topic, value), () => {
    for (const exposure of value.title.replace(/\(.*\)/, '').split(',')) {
      expect(csa({ exposure, element: 'beam' }), exposure).toBe(
        numberAt(value.values, 'beams_columns_piles'),
      );
      expect(csa({ exposure, element: 'wall' }), exposure).toBe(numberAt(value.values, 'slabs_walls_joists'));
      if (value.values.earth !== null) {
        expect(csa({ exposure, meeting: 'cast-against-ground' }), exposure).toBe(
          numberAt(value.values, 'earth'),
        );
      }
      expect(csa({ exposure, barDiameterMm: 56.4 }), exposure).toBeCloseTo(
        Math.max(
          numberAt(value.values, 'slabs_walls_joists'),
          56.4 * numberAt(value.values, 'ratio_cover_db'),
        ),
        9,
      );
      expect(csa({ exposure, aggregateMm: 40 }), exposure).toBe(
        Math.max(
          numberAt(value.values, 'slabs_walls_joists'),
          40 * numberAt(value.values, 'ratio_cover_agg'),
        ),
      );
    }
  });
}
