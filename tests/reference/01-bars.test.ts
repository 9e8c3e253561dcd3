import { expect, test } from 'vitest';
import { findBar, massOf } from '@/lib/concrete/bars';
import { checkName } from './check-name';
import { numberAt, Topic } from './load-records';

const topic = '01 bars';
const book = new Topic('01-bars');
const found = (designation: string) => {
  const bar = findBar(designation);
  if (!bar) throw new Error(`${designation} is not in the tables.`);
  return bar;
};

for (const value of book.takeAll('bar.us.')) {
  test(checkName(topic, value), () => {
    const bar = found(String(value.values.designation));
    expect(bar.diameterMm).toBeCloseTo(numberAt(value.values, 'diameter_in') * 25.4, 10);
    // The metric column rounds to a tenth; the computation keeps the inch size.
    expect(Math.abs(bar.diameterMm - numberAt(value.values, 'diameter_mm'))).toBeLessThanOrEqual(0.0501);
    expect(bar.areaMm2).toBe(numberAt(value.values, 'area_mm2'));
    expect(bar.areaMm2 / 645.16).toBeCloseTo(numberAt(value.values, 'area_in2'), 2);
    expect(bar.massKgPerM).toBe(numberAt(value.values, 'mass_kg_per_m'));
    expect(Math.abs(bar.massKgPerM / 1.488164 / numberAt(value.values, 'weight_lb_per_ft') - 1)).toBeLessThan(
      0.002,
    );
    expect((Math.PI * bar.diameterMm) / 25.4).toBeCloseTo(numberAt(value.values, 'perimeter_in'), 2);
  });
}

for (const value of book.takeAll('bar.en.')) {
  test(checkName(topic, value), () => {
    const bar = found(`Ø${numberAt(value.values, 'diameter_mm')}`);
    expect(bar.diameterMm).toBe(numberAt(value.values, 'diameter_mm'));
    expect(bar.areaMm2).toBe(numberAt(value.values, 'area_mm2'));
    expect(bar.massKgPerM).toBe(numberAt(value.values, 'mass_kg_per_m_tabled'));
    expect(Math.abs((Math.PI / 4) * bar.diameterMm ** 2 - bar.areaMm2)).toBeLessThanOrEqual(0.06);
  });
}

for (const value of book.takeAll('bar.csa.')) {
  test(checkName(topic, value), () => {
    expect(found(String(value.values.designation))).toMatchObject({
      system: 'csa',
      diameterMm: numberAt(value.values, 'diameter_mm'),
      areaMm2: numberAt(value.values, 'area_mm2'),
      massKgPerM: numberAt(value.values, 'mass_kg_per_m'),
    });
  });
}

for (const value of book.takeAll('bar.au.')) {
  test(checkName(topic, value), () => {
    expect(found(String(value.values.designation))).toMatchObject({
      system: 'as-nzs',
      diameterMm: numberAt(value.values, 'diameter_mm'),
      areaMm2: numberAt(value.values, 'area_mm2_nominal'),
      massKgPerM: numberAt(value.values, 'mass_kg_per_m'),
    });
  });
}

for (const value of book.takeAll('bar.is.')) {
  test(checkName(topic, value), () => {
    expect(found(`IS ${numberAt(value.values, 'diameter_mm')}`)).toMatchObject({
      system: 'is',
      diameterMm: numberAt(value.values, 'diameter_mm'),
      areaMm2: numberAt(value.values, 'area_mm2'),
      massKgPerM: numberAt(value.values, 'mass_kg_per_m'),
    });
  });
}

const metres = book.take('bar.check.1');
test(checkName(topic, metres), () => {
  expect(massOf(found('Ø16'), 250_000)).toBeCloseTo(395, 9);
});

const feet = book.take('bar.check.2');
test(checkName(topic, feet), () => {
  const pounds = massOf(found('#8'), 100 * 304.8) / 0.45359237;
  expect(Math.abs(pounds - 267)).toBeLessThan(0.1);
});
