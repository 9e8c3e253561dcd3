import type { Entry, EntryOf } from './entry';
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
 * The last change of mix that nobody has answered with a revision of the plan: what was judged with the planned mix and
 * its aggregate may not hold with the new one. A plan that names no mix has nothing judged by one.
 */
export function unansweredMixChange(facts: Facts, plan: Plan): EntryOf<'mix-changed'> | null {
  if (plan.mix === null) return null;
  const issued = listOf(facts, 'plan-issued').findLast(({ body }) => body.revision === plan.revision);
  const after = (entry: Entry) => (entry.seq ?? Infinity) > (issued?.seq ?? 0);
  const last = listOf(facts, 'mix-changed').findLast(
    ({ body }) => body.pourId === null || body.pourId === plan.pourId,
  );
  // A later change back to the planned mix answers an earlier one.
  if (last && same(last.body.name, plan.mix.name)) return null;
  return (
    listOf(facts, 'mix-changed').findLast((entry) => after(entry) && namesAnotherMix(entry, plan)) ?? null
  );
}
