import fc from 'fast-check';
import { isTyped, type Draft, type Field, type FieldSet } from '@/components/calculations/field-spec';

/** For tests of many drafts: a busy machine makes them slow and not wrong. */
export const PATIENT_MS = 60_000;

const texts: Record<'length' | 'number' | 'quantity' | 'bar', readonly string[]> = {
  length: ['38', '300', '40.5', '1 3/8 in', '2\' 6"', '0', '12 cm', '7', '250 mm', '1/2"', '0.001'],
  number: ['0', '1', '0.7', '1.5', '50', '95', '33', '2', '14', '0.3', '100'],
  quantity: ['30', '420', '60000 psi', '60 ksi', '35 MPa', '86 °F', '-5 °C', '12 mph', '3 m/s', '0'],
  bar: ['#5', '16 mm', '#11', '#18', '32 mm', '20M', 'N16', 'IS 12', '50 mm', '8 mm'],
};
const rubbish = [
  '',
  ' ',
  'abc',
  '3,8',
  '-4',
  '1e9',
  '9'.repeat(39),
  '#7½',
  '12 furlongs',
  '1/0',
  '<b>',
  'NaN',
];

function textFor(field: Field, withRubbish: boolean): fc.Arbitrary<string> {
  if (field.kind === 'check') return fc.constantFrom('yes', 'no');
  if (field.kind === 'choice') return fc.constantFrom(...Object.keys(field.choices));
  const good = fc.constantFrom(
    ...texts[field.kind],
    field.start.mm,
    field.start.in,
    ...(field.optional ? [''] : []),
  );
  return withRubbish
    ? fc.oneof({ weight: 3, arbitrary: good }, { weight: 1, arbitrary: fc.constantFrom(...rubbish) })
    : good;
}

/** Drafts as people leave them behind: every choice, good and bad texts, any of them changed from the example. */
export function typedDrafts(fields: FieldSet, withRubbish = true): fc.Arbitrary<Draft> {
  const arbitraries = Object.entries(fields).map(([name, field]) => [
    name,
    fc.oneof(
      { weight: 2, arbitrary: fc.constantFrom(field.start.mm, field.start.in) },
      { weight: 3, arbitrary: textFor(field, withRubbish) },
    ),
  ]);
  return fc.record(Object.fromEntries(arbitraries) as Record<string, fc.Arbitrary<string>>);
}

export const typedNames = (fields: FieldSet): string[] =>
  Object.entries(fields).flatMap(([name, field]) => (isTyped(field) ? [name] : []));
