import type { MarkKind } from '@/components/drawings/mark-words';
import type { TrailStep } from '@/lib/concrete/trail';
import type { FieldSet, ValuesOf } from './field-spec';

/** One number of a result, in words. */
export interface Figure {
  id: string;
  label: string;
  text: string;
  /** The same in the other unit, or what it is made of. */
  also?: string;
  /** Not rounded, in mm or in the unit of the text; null where it is no number. */
  value: number | null;
  formula?: string;
  source?: string;
  /** What it was compared with and how it came out. */
  mark?: MarkKind;
  /** What the page was opened for. */
  main?: boolean;
  /** The text is words rather than a number. */
  words?: boolean;
}

/** What a calculation gives: numbers, how they were found, what to keep in mind, and what its drawing shows. */
export interface Answer<Scene> {
  figures: Figure[];
  warnings: string[];
  trail: TrailStep[];
  cautions: string[];
  scene: Scene;
}

export interface FieldGroup<Fields extends FieldSet> {
  legend: string;
  names: readonly (keyof Fields & string)[];
}

/** A calculation as its page shows it: what is typed, and what lib/concrete makes of it. */
export interface Calculation<Fields extends FieldSet, Scene> {
  fields: Fields;
  groups: readonly FieldGroup<Fields>[];
  /** @throws ConcreteError naming the field, where the inputs are impossible or one is missing */
  compute: (values: ValuesOf<Fields>) => Answer<Scene>;
}

/** Holds a calculation to its own fields. */
export function defineCalculation<const Fields extends FieldSet, Scene>(
  calculation: Calculation<Fields, Scene>,
): Calculation<Fields, Scene> {
  return calculation;
}
