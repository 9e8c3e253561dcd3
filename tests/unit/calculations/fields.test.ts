import { describe, expect, test } from 'vitest';
import { exampleOf, isTyped } from '@/components/calculations/field-spec';
import { allCalculations } from './all-calculations';

describe.each(allCalculations)('the inputs of $slug', ({ fields, groups, evaluate }) => {
  test('are each in one group, but for the units', () => {
    const grouped = groups.flatMap(({ names }) => names).sort();
    const named = Object.keys(fields).filter((name) => name !== 'units');
    expect(grouped).toEqual(named.sort());
  });

  test('are asked for under choices that there are', () => {
    for (const field of Object.values(fields)) {
      const conditions = [field.when, isTyped(field) ? field.neededWhen : undefined];
      for (const [name, values] of conditions.flatMap((when) => Object.entries(when ?? {}))) {
        const on = fields[name];
        const known =
          on?.kind === 'check' ? ['yes', 'no'] : on?.kind === 'choice' ? Object.keys(on.choices) : [];
        for (const value of values) expect(known, `${name} of ${field.label}`).toContain(value);
      }
    }
  });

  test.each(['mm', 'in'] as const)('have an example in %s that is worked out', (units) => {
    const { answer, problems, general } = evaluate(exampleOf(fields, units));
    expect({ problems, general }).toEqual({ problems: {}, general: [] });
    expect(answer?.figures.length).toBeGreaterThan(2);
    expect(answer?.trail.length).toBeGreaterThan(0);
    expect(answer?.cautions.length).toBeGreaterThan(0);
  });
});
