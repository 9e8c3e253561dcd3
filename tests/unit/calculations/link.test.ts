import fc from 'fast-check';
import { describe, expect, it, test } from 'vitest';
import { exampleOf, isShown, type Draft, type FieldSet } from '@/components/calculations/field-spec';
import { openLink, queryOf } from '@/components/calculations/link';
import { readDraft } from '@/components/calculations/read-draft';
import { allCalculations, calculationNamed } from './all-calculations';
import { PATIENT_MS, typedDrafts, typedNames } from './typed-drafts';

const opened = (fields: FieldSet, query: string) =>
  openLink(fields, Object.fromEntries(new URLSearchParams(query)));

const shownOf = (fields: FieldSet, draft: Draft) =>
  Object.fromEntries(
    Object.entries(fields).flatMap(([name, field]) =>
      isShown(field, draft) ? [[name, (draft[name] ?? '').trim()]] : [],
    ),
  );

describe.each(allCalculations)('a link to $slug', ({ fields, evaluate }) => {
  test(
    'opens with the very inputs and the very result that it was copied from',
    () => {
      fc.assert(
        fc.property(typedDrafts(fields, false), (draft) => {
          fc.pre(readDraft(fields, draft).ok);
          const again = opened(fields, queryOf(fields, draft));
          expect(again.leftOut).toEqual([]);
          expect(again.assumed).toEqual([]);
          expect(shownOf(fields, again.draft)).toEqual(shownOf(fields, draft));
          expect(evaluate(again.draft)).toEqual(evaluate(draft));
        }),
        { numRuns: 60 },
      );
    },
    PATIENT_MS,
  );

  test(
    'leaves out what cannot be read, names it, and puts nothing in its place',
    () => {
      fc.assert(
        fc.property(typedDrafts(fields), (draft) => {
          const read = readDraft(fields, draft);
          fc.pre(!read.ok);
          if (read.ok) return;
          const again = opened(fields, queryOf(fields, draft));
          for (const name of Object.keys(read.problems)) {
            expect(again.draft[name]).toBe('');
            const text = (draft[name] ?? '').trim();
            if (text !== '')
              expect(again.leftOut).toContainEqual(
                expect.objectContaining({ label: fields[name]?.label, text: text.slice(0, 40) }),
              );
          }
        }),
        { numRuns: 100 },
      );
    },
    PATIENT_MS,
  );

  test('without inputs opens the example', () => {
    expect(opened(fields, '').draft).toEqual(exampleOf(fields, 'mm'));
    expect(opened(fields, '').leftOut).toEqual([]);
  });

  test('with some inputs takes no other typed one from the example', () => {
    const { draft } = opened(fields, 'units=in');
    for (const name of typedNames(fields)) {
      const field = fields[name];
      if (field && isShown(field, draft)) expect(draft[name]).toBe('');
    }
  });
});

describe('a link that somebody wrote by hand', () => {
  const { fields } = calculationNamed('cover');

  it('tells each input that it could not take, with the reason', () => {
    const { draft, leftOut, assumed } = opened(
      fields,
      'units=in&basis=aci-318-19&bar=%239&thickness=abc&bundle=7&foo=1',
    );
    expect(leftOut.map(({ label, text }) => [label, text])).toEqual([
      ['Bundle', '7'],
      ['Section', 'abc'],
      ['foo', '1'],
    ]);
    expect(leftOut[1]?.problem).toContain('This is not a length');
    expect(draft).toMatchObject({ bar: '#9', thickness: '', bundle: '1' });
    expect(assumed).toContain('Bundle');
    expect(assumed).toContain('Element');
  });

  it('shortens what is far too long and takes the first of what is there twice', () => {
    const long = openLink(fields, { thickness: 'x'.repeat(5000), bar: ['#5', '#6'] });
    expect(long.leftOut[0]?.text.length).toBeLessThan(50);
    expect(long.draft.bar).toBe('#5');
  });
});
