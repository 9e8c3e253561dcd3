import { ConcreteError } from '@/lib/concrete/concrete-error';
import type { Answer, Calculation } from './calculation';
import { isShown, isTyped, type Draft, type FieldSet } from './field-spec';
import { readDraft } from './read-draft';

export interface Evaluation<Scene> {
  /** What is wrong, by field. */
  problems: Record<string, string>;
  /** What is wrong and belongs to no field in sight. */
  general: string[];
  /** Null as long as something is wrong. */
  answer: Answer<Scene> | null;
}

const OUT_OF_RANGE =
  'These inputs lead to a number that nobody can use. Look at their size and at their units.';

/** The field in sight that a refusal of lib/concrete is about. */
function fieldOf(fields: FieldSet, draft: Draft, refused: string): string | null {
  const meant = Object.entries(fields).filter(
    ([name, field]) => isShown(field, draft) && (name === refused || field.refusedAs?.includes(refused)),
  );
  // A number that was typed is put right sooner than the choice that asked for it.
  const found = meant.find(([, field]) => isTyped(field)) ?? meant[0];
  return found ? found[0] : null;
}

function unusable(answer: Answer<unknown>): boolean {
  const texts = [
    ...answer.figures.flatMap((figure) => [figure.text, figure.also ?? '']),
    ...answer.trail.map((step) => step.value),
  ];
  return texts.some((text) => /NaN|Infinity|undefined|\de\+\d/.test(text));
}

/** The result of what stands in the fields, or what is wrong with it, each beside its field. */
export function evaluate<Fields extends FieldSet, Scene>(
  calculation: Calculation<Fields, Scene>,
  draft: Draft,
): Evaluation<Scene> {
  const read = readDraft(calculation.fields, draft);
  if (!read.ok) return { problems: read.problems, general: [], answer: null };
  try {
    const answer = calculation.compute(read.values);
    if (unusable(answer)) return { problems: {}, general: [OUT_OF_RANGE], answer: null };
    return { problems: {}, general: [], answer };
  } catch (error) {
    if (!(error instanceof ConcreteError)) throw error;
    const field = fieldOf(calculation.fields, draft, error.field);
    return field === null
      ? { problems: {}, general: [`${error.field}: ${error.reason}`], answer: null }
      : { problems: { [field]: error.reason }, general: [], answer: null };
  }
}
