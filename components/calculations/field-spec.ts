import type { Bar } from '@/lib/concrete/bars';
import type { QuantityName } from './quantities';

/** Choices under which a field is asked for: each one named has to stand at one of these values. */
export type When = Readonly<Record<string, readonly string[]>>;

interface Common {
  label: string;
  hint?: string;
  /** Names under which lib/concrete refuses this input, where they are not the field's own. */
  refusedAs?: readonly string[];
  when?: When;
  /** Takes the whole width of its group. */
  wide?: boolean;
}

interface Typed extends Common {
  /** What the example has in it, under millimetres and under inches. */
  start: { mm: string; in: string };
  optional?: boolean;
  /** An optional field that is needed all the same under these choices. */
  neededWhen?: When;
}

/** One of several; the value is the key. */
export interface ChoiceField<Value extends string = string> extends Common {
  kind: 'choice';
  choices: Readonly<Record<Value, string>>;
  start: { mm: Value; in: Value };
}
/** Yes or no, kept as those words. */
export interface CheckField extends Common {
  kind: 'check';
  start: { mm: 'yes' | 'no'; in: 'yes' | 'no' };
}
/** A length as people write it; a bare number takes the unit of the field. Its value is in mm. */
export interface LengthField extends Typed {
  kind: 'length';
  /** Greatest length that makes sense here, mm. */
  mostMm: number;
}
/** A plain number, within bounds that make sense. */
export interface NumberField extends Typed {
  kind: 'number';
  unit?: string;
  least: number;
  most: number;
  whole?: boolean;
}
/** A number in one of two units, by the units chosen; its value is in the first of them. */
export interface QuantityField extends Typed {
  kind: 'quantity';
  quantity: QuantityName;
}
/** A bar by its designation. */
export interface BarField extends Typed {
  kind: 'bar';
}

export type TypedField = LengthField | NumberField | QuantityField | BarField;
export type Field = ChoiceField | CheckField | TypedField;
export type FieldSet = Readonly<Record<string, Field>>;

type ValueOf<F> =
  F extends ChoiceField<infer Value>
    ? Value
    : F extends CheckField
      ? boolean
      : F extends BarField
        ? Bar | undefined
        : number | undefined;

/** What a calculation is given: typed fields are undefined where they are empty or not asked for. */
export type ValuesOf<Fields extends FieldSet> = { [Name in keyof Fields]: ValueOf<Fields[Name]> };

/** What stands in the fields, as text. */
export type Draft = Record<string, string>;

export function isTyped(field: Field): field is TypedField {
  return field.kind !== 'choice' && field.kind !== 'check';
}

function holds(when: When, draft: Draft): boolean {
  return Object.entries(when).every(([name, values]) => values.includes(draft[name] ?? ''));
}

/** Whether the choices made ask for this field at all. */
export function isShown(field: Field, draft: Draft): boolean {
  return field.when === undefined || holds(field.when, draft);
}

/** Whether a field may be left empty under the choices made. */
export function mayBeEmpty(field: TypedField, draft: Draft): boolean {
  return Boolean(field.optional) && !(field.neededWhen && holds(field.neededWhen, draft));
}

/** The units that a draft is written in. */
export function unitsOf(draft: Draft): 'mm' | 'in' {
  return draft.units === 'in' ? 'in' : 'mm';
}

/** The example that a page opens with. */
export function exampleOf(fields: FieldSet, units: 'mm' | 'in'): Draft {
  const start = Object.entries(fields).map(([name, field]) => [name, field.start[units]]);
  return { ...Object.fromEntries(start), units };
}

/** Whether nothing of the example was changed. */
export function isExample(fields: FieldSet, draft: Draft): boolean {
  const example = exampleOf(fields, unitsOf(draft));
  return Object.keys(fields).every((name) => draft[name] === example[name]);
}
