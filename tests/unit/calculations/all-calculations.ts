import type { Calculation } from '@/components/calculations/calculation';
import type { CalculationSlug } from '@/components/calculations/calculation-list';
import { clearDistanceCalculation } from '@/components/calculations/clear-distance/clear-distance-calculation';
import { coverCalculation } from '@/components/calculations/cover/cover-calculation';
import { evaluate, type Evaluation } from '@/components/calculations/evaluate';
import { evaporationCalculation } from '@/components/calculations/evaporation/evaporation-calculation';
import { exampleOf, type Draft, type FieldSet } from '@/components/calculations/field-spec';
import { lapCalculation } from '@/components/calculations/lap/lap-calculation';
import { lowCoverCalculation } from '@/components/calculations/low-cover/low-cover-calculation';
import { readingsCalculation } from '@/components/calculations/readings/readings-calculation';
import { supportHeightCalculation } from '@/components/calculations/support-height/support-height-calculation';

/** A calculation with the types of its own fields left behind, so that all seven can be walked through. */
export interface AnyCalculation {
  slug: CalculationSlug;
  fields: FieldSet;
  groups: readonly { legend: string; names: readonly string[] }[];
  evaluate: (draft: Draft) => Evaluation<unknown>;
}

function any<Fields extends FieldSet, Scene>(
  slug: CalculationSlug,
  calculation: Calculation<Fields, Scene>,
): AnyCalculation {
  const { fields, groups } = calculation;
  return { slug, fields, groups, evaluate: (draft) => evaluate(calculation, draft) };
}

export const allCalculations: readonly AnyCalculation[] = [
  any('cover', coverCalculation),
  any('lap', lapCalculation),
  any('support-height', supportHeightCalculation),
  any('clear-distance', clearDistanceCalculation),
  any('readings', readingsCalculation),
  any('low-cover', lowCoverCalculation),
  any('evaporation', evaporationCalculation),
];

export function calculationNamed(slug: CalculationSlug): AnyCalculation {
  const found = allCalculations.find((calculation) => calculation.slug === slug);
  if (!found) throw new Error(`No calculation ${slug}.`);
  return found;
}

/** What the page makes of its example with some inputs changed. */
export function changed(slug: CalculationSlug, units: 'mm' | 'in', change: Draft): Evaluation<unknown> {
  const { fields, evaluate: run } = calculationNamed(slug);
  for (const name of Object.keys(change)) if (!fields[name]) throw new Error(`${slug} has no input ${name}.`);
  return run({ ...exampleOf(fields, units), ...change });
}

/** A number of a result, unrounded. */
export function figure(found: Evaluation<unknown>, id: string): number {
  if (!found.answer) throw new Error(`No result: ${JSON.stringify([found.problems, found.general])}`);
  const value = found.answer.figures.find((candidate) => candidate.id === id)?.value;
  if (value === undefined || value === null) throw new Error(`The result has no number ${id}.`);
  return value;
}
