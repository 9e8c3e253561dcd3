import type {
  BarField,
  CheckField,
  ChoiceField,
  LengthField,
  NumberField,
  QuantityField,
  TypedField,
} from './field-spec';
import type { QuantityName } from './quantities';

/** One text for both units, or one for each. */
type Start = string | readonly [mm: string, inches: string];
type More<F extends TypedField> = Partial<Omit<F, 'kind' | 'label' | 'start'>>;

const both = (start: Start) =>
  typeof start === 'string' ? { mm: start, in: start } : { mm: start[0], in: start[1] };

/** One of several, from their words by value; `start` is what stands there first (under mm and under in). */
export function choice<const Choices extends Readonly<Record<string, string>>>(
  label: string,
  choices: Choices,
  start: (keyof Choices & string) | readonly [keyof Choices & string, keyof Choices & string],
  more: Pick<ChoiceField, 'hint' | 'when' | 'wide' | 'refusedAs'> = {},
): ChoiceField<keyof Choices & string> {
  const [mm, inches] = typeof start === 'string' ? [start, start] : start;
  return { kind: 'choice', label, choices, start: { mm, in: inches }, ...more };
}

/** Words of choices that a table of lib/concrete lists. */
export function choicesOf<Value extends string>(
  values: readonly Value[],
  word: (value: Value) => string = (value) => value,
): Record<Value, string> {
  // Made from these very values, which TypeScript cannot follow through the entries.
  return Object.fromEntries(values.map((value) => [value, word(value)])) as Record<Value, string>;
}

/** Yes or no. */
export function check(
  label: string,
  start: 'yes' | 'no',
  more: Pick<CheckField, 'hint' | 'when' | 'wide' | 'refusedAs'> = {},
): CheckField {
  return { kind: 'check', label, start: { mm: start, in: start }, ...more };
}

/** A length, at most 100 m unless it says otherwise. */
export function length(label: string, start: Start, more: More<LengthField> = {}): LengthField {
  return { kind: 'length', label, start: both(start), mostMm: 100_000, ...more };
}

/** A plain number from `least` to `most`. */
export function number(
  label: string,
  start: Start,
  bounds: readonly [least: number, most: number],
  more: More<NumberField> = {},
): NumberField {
  return { kind: 'number', label, start: both(start), least: bounds[0], most: bounds[1], ...more };
}

/** A stress, a temperature or a speed in the units chosen. */
export function quantity(
  label: string,
  of: QuantityName,
  start: Start,
  more: More<QuantityField> = {},
): QuantityField {
  return { kind: 'quantity', quantity: of, label, start: both(start), ...more };
}

/** A bar by its designation. */
export function bar(label: string, start: Start, more: More<BarField> = {}): BarField {
  return { kind: 'bar', label, start: both(start), ...more };
}

/** The switch between millimetres and inches, which every calculation has. */
export const unitsField = choice('Units', { mm: 'mm', in: 'in' }, ['mm', 'in']);
