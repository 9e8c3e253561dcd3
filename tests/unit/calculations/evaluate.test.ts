import fc from 'fast-check';
import { describe, expect, it, test } from 'vitest';
import type { CalculationSlug } from '@/components/calculations/calculation-list';
import { isShown, type Draft } from '@/components/calculations/field-spec';
import { allCalculations, changed, figure } from './all-calculations';
import { PATIENT_MS, typedDrafts } from './typed-drafts';

const aci = { basis: 'aci-318-19' };

/** Inputs that cannot be right: where the message stands, and what it says. */
const wrong: [CalculationSlug, Draft, field: string, says: string][] = [
  ['cover', { thickness: '40' }, 'thickness', 'do not fit into a section of 40 mm'],
  ['cover', { thickness: '' }, 'thickness', 'Enter a length'],
  ['cover', { bar: '17 mm' }, 'bar', 'no bar size known here'],
  ['cover', { bundle: '4', bar: '40 mm' }, 'bundle', 'at most 55 mm'],
  [
    'cover',
    { ...aci, element: 'footing', aciExposure: 'not-exposed' },
    'aciExposure',
    'no row for a footing',
  ],
  ['cover', { basis: 'as-3600', asExposure: 'C2', strength: '25' }, 'strength', 'too weak'],
  ['cover', { basis: 'as-3600', aggregate: '' }, 'aggregate', 'Enter a length'],
  [
    'cover',
    { basis: 'csa-a23.1', meeting: 'cast-against-ground', csaExposure: 'N' },
    'csaExposure',
    'Class N',
  ],
  ['cover', { basis: 'contract', contractCover: '50' }, 'deviation', 'never less'],
  ['cover', { basis: 'contract', contractCover: '50', deviation: 'contract' }, 'minus', 'Enter a length'],
  ['cover', { basis: 'contract', deviation: 'never-less' }, 'contractCover', 'Enter a length'],
  ['cover', { deviation: 'contract', minus: '60', contractCover: '50' }, 'minus', 'no cover at all'],
  ['lap', { bar: '50 mm', ...aci }, 'bar', 'couplers'],
  ['lap', { ...aci, fy: '900 MPa' }, 'fy', 'above Grade 100'],
  ['lap', { ...aci, fc: '0' }, 'fc', 'more than zero'],
  ['lap', { ...aci, largerBar: '#4' }, 'largerBar', 'the smaller one'],
  ['lap', { ...aci, force: 'compression', fy: '90000 psi' }, 'tensionLap', 'missing'],
  ['lap', { ...aci, method: 'general', transverse: 'yes', tieSpacing: '0' }, 'tieSpacing', 'more than zero'],
  ['lap', { ...aci, spliced: '130' }, 'spliced', 'from 0 to 100'],
  ['lap', { alpha1: '0.5' }, 'alpha1', 'from 0.7 to 1'],
  ['lap', { alpha2: '0.8', alpha3: '0.8' }, 'alpha2', 'below 0.7'],
  ['lap', { sigma: '' }, 'sigma', 'Enter a number'],
  ['lap', { bond: 'place', aboveUnderside: '900' }, 'aboveUnderside', 'from 0 to 800'],
  ['lap', { tolerance: 'contract', toleranceMinus: '5 m' }, 'toleranceMinus', 'as large as the lap'],
  ['support-height', { thickness: '120' }, 'thickness', 'leave no room'],
  ['support-height', { topCover: '300' }, 'topCover', 'as large as the section'],
  ['support-height', { depthMinus: '200' }, 'depthMinus', 'as large as the support'],
  ['support-height', { upper: '5/8' }, 'upper', 'no bar size'],
  ['clear-distance', { aggregate: '0' }, 'aggregate', 'more than zero'],
  ['clear-distance', { found: 'wide' }, 'found', 'not a length'],
  ['clear-distance', { layout: 'width', width: '90' }, 'width', 'no room for one'],
  ['clear-distance', { layout: 'width', bars: '30' }, 'bars', 'wider than the room'],
  ['clear-distance', { layout: 'width', bars: '2.5' }, 'bars', 'whole number'],
  ['readings', { mostBelow: '0' }, 'mostBelow', 'It has to lie from'],
  ['readings', { confidence: '100' }, 'confidence', 'It has to lie from'],
  ['readings', { taken: '5', below: '6' }, 'below', 'more than readings'],
  ['readings', { taken: '4.5' }, 'taken', 'whole number'],
  ['readings', { width: '0' }, 'width', 'more than zero'],
  ['low-cover', { measured: '0' }, 'measured', 'more than zero'],
  ['low-cover', { specified: '-50' }, 'specified', 'minus sign'],
  ['low-cover', { initial: '4' }, 'initial', 'not below the surface'],
  ['low-cover', { critical: '0.05' }, 'critical', 'not above the initial'],
  ['low-cover', { ageing: 'entered', m: '1' }, 'm', 'from 0 to 0.9'],
  ['low-cover', { found: '0' }, 'found', 'more than zero'],
  ['evaporation', { concrete: '80' }, 'concrete', 'from -18 to 60'],
  ['evaporation', { wind: '' }, 'wind', 'Enter a number'],
  ['evaporation', { humidity: '120' }, 'humidity', 'from 0 to 100'],
  ['evaporation', { air: '30 K' }, 'air', 'not a unit known here'],
];

describe('an input that cannot be right', () => {
  test.each(wrong)('%s %j: told at %s', (slug, change, field, says) => {
    const found = changed(slug, 'mm', change);
    expect(found.answer).toBeNull();
    expect(Object.keys(found.problems)).toEqual([field]);
    expect(found.problems[field]).toContain(says);
  });

  it('is told for every calculation', () => {
    expect([...new Set(wrong.map(([slug]) => slug))].sort()).toEqual(
      allCalculations.map(({ slug }) => slug).sort(),
    );
  });
});

describe.each(allCalculations)('whatever is typed into $slug', ({ fields, evaluate }) => {
  test(
    'gives a result, or says what is wrong at a field in sight; never a number that is none',
    () => {
      fc.assert(
        fc.property(typedDrafts(fields), (draft) => {
          const { answer, problems, general } = evaluate(draft);
          const told = Object.keys(problems).length + general.length;
          expect(answer === null).toBe(told > 0);
          for (const name of Object.keys(problems)) {
            const field = fields[name];
            expect(field && isShown(field, draft), `${name} is in sight`).toBe(true);
          }
          expect(general.filter((problem) => !problem.startsWith('These inputs lead to'))).toEqual([]);
          expect(JSON.stringify(answer) ?? '').not.toMatch(/NaN|Infinity|undefined/);
          for (const { value } of answer?.figures ?? [])
            expect(value === null || Number.isFinite(value)).toBe(true);
        }),
        { numRuns: 400 },
      );
    },
    PATIENT_MS,
  );
});

describe('what a result says', () => {
  it('marks what is from memory', () => {
    const { answer } = changed('cover', 'mm', { basis: 'is-456' });
    expect(answer?.trail.some((step) => step.provenance === 'memory')).toBe(true);
  });

  it('never gives what low cover costs as one main figure', () => {
    const { answer } = changed('low-cover', 'mm', {});
    expect(answer?.figures.filter((one) => one.main)).toEqual([]);
    for (const { formula, source } of answer?.figures ?? [])
      expect([formula, source]).not.toContain(undefined);
    expect(answer?.cautions.join(' ')).toContain('Decision support');
  });

  it('lets the lap on the drawing govern and warns where it is shorter', () => {
    const found = changed('lap', 'mm', { drawn: '600' });
    expect(figure(found, 'lap')).toBe(600);
    expect(figure(found, 'computed')).toBeGreaterThan(600);
    expect(found.answer?.warnings[0]).toContain('less than the computed');
  });

  it('shows the steps of the larger bar that a lap rests on', () => {
    const { answer } = changed('lap', 'in', { bar: '#8', largerBar: '#11' });
    expect(answer?.trail.some(({ rule }) => rule.startsWith('Larger bar: '))).toBe(true);
  });

  it('counts the bars that fit between the ties of a width, in the unit chosen', () => {
    expect(figure(changed('clear-distance', 'mm', { bar: '20 mm', layout: 'width' }), 'most-bars')).toBe(5);
    const { answer } = changed('clear-distance', 'in', { layout: 'width' });
    expect(answer?.trail.map((step) => step.value).join('; ')).not.toContain(' mm');
  });

  it('takes a bare bar number only where the basis has sizes of its own', () => {
    expect(figure(changed('clear-distance', 'mm', { bar: '25' }), 'least')).toBe(25);
    expect(changed('low-cover', 'mm', { bar: '16' }).problems.bar).toContain('no bar size');
  });

  it('never says that a rate just under the limit is the limit', () => {
    const weather = { concrete: '30', air: '30', humidity: '50', wind: '21.056' };
    const { answer } = changed('evaporation', 'mm', weather);
    const rate = answer?.figures.find(({ id }) => id === 'rate');
    expect(rate?.value).toBeLessThan(1);
    expect(rate?.text).not.toBe(answer?.figures.find(({ id }) => id === 'threshold')?.text);
  });
});
