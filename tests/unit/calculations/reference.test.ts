import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { changed, figure } from './all-calculations';
import { MM_PER_INCH } from '@/lib/concrete/length';

interface Published {
  inputs: Record<string, number | string>;
  expected: Record<string, number>;
}

/** The published values that a page has to show, from the data that lib/concrete is checked against. */
function published(topic: string, id: string): Published & Record<string, unknown> {
  const file = new URL(`../../reference/data/${topic}.json`, import.meta.url);
  const { records } = JSON.parse(readFileSync(file, 'utf8')) as {
    records: { id: string; values: Published & Record<string, unknown> }[];
  };
  const found = records.find((record) => record.id === id);
  if (!found) throw new Error(`No record ${id}.`);
  return found.values;
}

describe('pages show published values', () => {
  test('cover: EN 1992-1-1 worked example, main bar behind links', () => {
    const { inputs, expected } = published('02-cover', 'cover.check.ec2.1');
    const found = changed('cover', 'mm', {
      element: 'beam',
      enExposure: String(inputs.exposure),
      enClass: String(inputs.sclass),
      bar: `${inputs.bar_mm} mm`,
      deltaCdev: String(inputs.dev_mm),
    });
    expect(figure(found, 'specified')).toBe(expected.main_cnom);
    const behind = changed('cover', 'mm', {
      element: 'beam',
      enExposure: String(inputs.exposure),
      enClass: String(inputs.sclass),
      bar: `${inputs.bar_mm} mm`,
      deltaCdev: String(inputs.dev_mm),
      ties: `${inputs.link_mm} mm`,
    });
    expect(figure(behind, 'specified')).toBe(expected.main_cover_from_links);
  });

  test('cover: ACI 318-19, weather, #6', () => {
    const row = published('02-cover', 'cover.aci318.weather_large');
    const found = changed('cover', 'in', { bar: '#6' });
    expect(figure(found, 'specified')).toBeCloseTo(Number(row.cover_in) * MM_PER_INCH, 9);
  });

  test('lap: ACI 318-19 class B, #8', () => {
    const { inputs, expected } = published('05-laps-development', 'lap.check.aci.1');
    const found = changed('lap', 'in', {
      bar: String(inputs.bar),
      fc: String(inputs.fc_psi),
      fy: String(inputs.fy_psi),
      clearCover: '2',
      clearSpacing: '4',
    });
    expect(figure(found, 'ld') / MM_PER_INCH).toBeCloseTo(expected.ld_in ?? NaN, 2);
    expect(figure(found, 'lap') / MM_PER_INCH).toBeCloseTo(expected.class_B_in ?? NaN, 2);
  });

  test('lap: EN 1992-1-1, 16 mm in C25/30, all lapped in one section', () => {
    const { inputs, expected } = published('05-laps-development', 'lap.check.ec2lap.1');
    const found = changed('lap', 'mm', {
      bar: `${inputs.phi} mm`,
      strengthClass: String(inputs.concrete),
      sigma: String(inputs.fyd),
      lapped: '100',
    });
    expect(figure(found, 'alpha6')).toBe(inputs.alpha6);
    expect(figure(found, 'basic')).toBeCloseTo(expected.lb_rqd ?? NaN, 1);
    expect(figure(found, 'lap')).toBeCloseTo(expected.l0 ?? NaN, 1);
  });

  test('support height: the arithmetic of the section, and the spacing of practice', () => {
    const practice = published('04-supports-ties-spacing', 'sup.spacing.crsi');
    const found = changed('support-height', 'in', { lower: '#4' });
    expect(figure(found, 'spacing')).toBeCloseTo(Number(practice.No4_ft) * 304.8, 9);
    const inches = 12 - 1.75 - 0.625 - 0.5 - 1.5 - 0.625 - 0.625;
    expect(figure(found, 'height')).toBeCloseTo(inches * MM_PER_INCH, 9);
  });

  test('clear distance: EN 1992-1-1, 25 mm bars', () => {
    const { inputs, expected } = published('04-supports-ties-spacing', 'spc.check.ec2.1');
    const found = changed('clear-distance', 'mm', { bar: `${inputs.phi} mm`, aggregate: String(inputs.dg) });
    expect(figure(found, 'least')).toBe(expected.s_min);
  });

  test('readings: success run and tolerance factor', () => {
    const run = published('09-statistics', 'srun.95_95');
    expect(figure(changed('readings', 'mm', { mostBelow: '5', confidence: '95' }), 'run')).toBe(
      run.expected.n,
    );
    const k = published('09-statistics', 'k1.n10.p95.g95');
    const found = changed('readings', 'mm', {
      taken: String(k.inputs.n),
      mostBelow: '5',
      confidence: '95',
    });
    expect(figure(found, 'factor')).toBeCloseTo(k.expected.k1 ?? NaN, 3);
  });

  test('low cover: chloride at the bar with constant D', () => {
    const { inputs, expected } = published('10-durability', 'fick.check.1');
    const found = changed('low-cover', 'mm', {
      ageing: 'none',
      specified: '60',
      measured: `${Number(inputs.cover_m) * 1000}`,
      surface: String(inputs.Cs),
      initial: '0',
      critical: '0.1',
      diffusion: `${Number(inputs.D_m2_s) * 1e12}`,
      age: String(inputs.t_years),
    });
    expect(figure(found, 'content')).toBeCloseTo(expected.C ?? NaN, 5);
  });

  test('low cover: years to carbonation from a depth seen', () => {
    const { inputs, expected } = published('10-durability', 'carb.check.avg');
    const found = changed('low-cover', 'mm', {
      carbonation: 'seen',
      specified: '35',
      measured: String(inputs.cover_mm),
      carbonDepth: Number(inputs.carbonation_mm).toFixed(6),
      carbonAge: String(inputs.age_years),
    });
    // The source rounds k to two decimals before it goes on.
    expect(Math.abs(figure(found, 'carbonation-years') - (expected.t_years ?? NaN))).toBeLessThan(2);
  });

  test('evaporation: Uno in SI and in US units', () => {
    const si = published('11-evaporation', 'uno.check.si.1');
    const metric = changed('evaporation', 'mm', {
      concrete: String(si.inputs.Tc),
      air: String(si.inputs.Ta),
      humidity: `${Number(si.inputs.r) * 100}`,
      wind: String(si.inputs.V),
    });
    expect(figure(metric, 'rate')).toBeCloseTo(si.expected.E ?? NaN, 4);
    const us = published('11-evaporation', 'uno.check.305');
    const imperial = changed('evaporation', 'in', {
      concrete: String(us.inputs.Tc_F),
      air: String(us.inputs.Ta_F),
      humidity: `${Number(us.inputs.RH) * 100}`,
      wind: String(us.inputs.V_mph),
    });
    expect(figure(imperial, 'rate')).toBeCloseTo(us.expected.formula ?? NaN, 4);
  });
});
