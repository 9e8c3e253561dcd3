import fc from 'fast-check';
import { describe, expect, it, test } from 'vitest';
import { exampleOf, isExample } from '@/components/calculations/field-spec';
import { readDraft } from '@/components/calculations/read-draft';
import { switchUnits } from '@/components/calculations/switch-units';
import { allCalculations, calculationNamed } from './all-calculations';
import { PATIENT_MS, typedDrafts } from './typed-drafts';

describe.each(allCalculations)('the units of $slug', ({ fields }) => {
  test(
    'change how an input is written and never what it is',
    () => {
      fc.assert(
        fc.property(
          typedDrafts(fields, false),
          fc.constantFrom('mm' as const, 'in' as const),
          (typed, units) => {
            const draft = { ...typed, units };
            const before = readDraft(fields, draft);
            fc.pre(before.ok && !isExample(fields, draft));
            const after = readDraft(fields, switchUnits(fields, draft, units === 'mm' ? 'in' : 'mm'));
            if (!before.ok || !after.ok) throw new Error(JSON.stringify([draft, after]));
            for (const [name, value] of Object.entries(before.values)) {
              if (name === 'units') continue;
              const now: unknown = after.values[name];
              if (typeof value === 'number') expect(now, name).toBeCloseTo(value, 8);
              else expect(now, name).toEqual(value);
            }
          },
        ),
        { numRuns: 200 },
      );
    },
    PATIENT_MS,
  );

  test('give way to the other example as long as nothing was typed', () => {
    expect(switchUnits(fields, exampleOf(fields, 'mm'), 'in')).toEqual(exampleOf(fields, 'in'));
  });
});

describe('a length under other units', () => {
  const { fields } = calculationNamed('support-height');
  const draft = { ...exampleOf(fields, 'mm'), thickness: '254', topCover: '45', bottomCover: '1 1/2 in' };

  it('is written in the other unit where that is exact, and keeps its own unit where it is not', () => {
    expect(switchUnits(fields, draft, 'in')).toMatchObject({
      thickness: '10',
      topCover: '45 mm',
      bottomCover: '1 1/2',
    });
  });

  it('comes back as it was', () => {
    expect(switchUnits(fields, switchUnits(fields, draft, 'in'), 'mm')).toMatchObject({
      thickness: '254',
      topCover: '45',
      bottomCover: '38.1',
    });
  });
});
