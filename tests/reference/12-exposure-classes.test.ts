import { expect, test } from 'vitest';
import { governingConcrete } from '@/lib/concrete/aci-exposure';
import { coverByCsaA23, csaExposures } from '@/lib/concrete/cover-csa-a23';
import { coverByEn1992, enExposures } from '@/lib/concrete/cover-en-1992';
import type { CoverRequirementInput } from '@/lib/concrete/cover-input';
import { exposureClasses } from '@/lib/concrete/exposure-classes';
import { checkName } from './check-name';
import { Topic } from './load-records';

const topic = '12 exposure classes';
const book = new Topic('12-exposure-classes');
const of = (id: string) => book.take(id);
const face = (over: Partial<CoverRequirementInput>): CoverRequirementInput => ({
  basis: 'en-1992',
  element: 'wall',
  meeting: 'formed',
  exposure: 'XC1',
  structuralClass: 'S4',
  barDiameterMm: 10,
  aggregateMm: 14,
  ...over,
});

const en206 = of('exp.en206');
test(
  checkName(topic, en206, 'All 18 classes are known: eleven set cover, frost and chemical attack set none'),
  () => {
    const classes = Object.keys(en206.values).filter((name) => name !== 'count');
    expect(classes).toHaveLength(Number(en206.values.count));
    const setting = classes.filter((name) => /^X[0CDS]/.test(name));
    expect([...enExposures].sort()).toEqual([...setting].sort());
    expect(exposureClasses('en-1992').map(({ value }) => value)).toEqual([...enExposures]);
    for (const name of classes.filter((candidate) => !setting.includes(candidate))) {
      expect(() => coverByEn1992(face({ exposure: name })), name).toThrow(/sets no cover by itself/);
      expect(coverByEn1992(face({ exposure: `XC4 + ${name}` })).cMinMm, name).toBe(30);
    }
  },
);

for (const value of book.takeAll('exp.aci.')) {
  const name = String(value.values.cls).replace('_option', ' option ');
  test(checkName(topic, value, `${value.title} ${name}`), () => {
    expect(governingConcrete([name])).toEqual({
      leastStrengthPsi: value.values.min_fc_psi,
      mostWaterCement: value.values.max_wcm,
    });
  });
}

test(checkName(topic, of('exp.check.1')), () => {
  expect(governingConcrete(['F2', 'S1', 'W0', 'C2'])).toEqual({
    leastStrengthPsi: 5000,
    mostWaterCement: 0.4,
  });
});

test(
  checkName(
    topic,
    of('exp.csa'),
    'Classes with a column of cover are computed, the others are refused by name',
  ),
  () => {
    for (const exposure of csaExposures) {
      expect(coverByCsaA23(face({ basis: 'csa-a23.1', exposure })).minimumMm).toBeGreaterThan(0);
    }
    for (const exposure of ['C-2', 'C-4', 'A-4']) {
      expect(() => coverByCsaA23(face({ basis: 'csa-a23.1', exposure }))).toThrow(exposure);
    }
  },
);
