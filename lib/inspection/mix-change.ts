import type { EntryOf } from './entry';
import { listOf, type Facts } from './facts';
import type { Plan } from './plan';

const same = (a: string, b: string): boolean => a.trim().toLowerCase() === b.trim().toLowerCase();

/**
 * Does this change of mix concern the pour, and name another mix than its plan? A change that says which mix it replaces
 * concerns only plans that name that one; a plan that names none is concerned by every change.
 */
export function namesAnotherMix({ body }: EntryOf<'mix-changed'>, plan: Plan): boolean {
  if (body.pourId !== null && body.pourId !== plan.pourId) return false;
  if (plan.mix === null) return true;
  if (same(body.name, plan.mix.name)) return false;
  return body.replaces === '' || same(body.replaces, plan.mix.name);
}

/**
 * The change of mix that stands and that nobody has answered with a revision of the plan: what was judged with the
 * planned mix and its aggregate may not hold with the new one. Changes are followed from mix to mix, so that only one
 * back to the planned mix answers by itself. A plan that names no mix has nothing judged by one.
 */
export function unansweredMixChange(facts: Facts, plan: Plan): EntryOf<'mix-changed'> | null {
  if (plan.mix === null) return null;
  const issued = listOf(facts, 'plan-issued').findLast(({ body }) => body.revision === plan.revision);
  let current = plan.mix.name;
  let standing: EntryOf<'mix-changed'> | null = null;
  for (const entry of listOf(facts, 'mix-changed')) {
    const { pourId, name, replaces } = entry.body;
    if (pourId !== null && pourId !== plan.pourId) continue;
    if ((entry.seq ?? Infinity) <= (issued?.seq ?? 0)) continue;
    if (replaces !== '' && !same(replaces, current)) continue;
    current = name;
    standing = same(name, plan.mix.name) ? null : entry;
  }
  return standing;
}
