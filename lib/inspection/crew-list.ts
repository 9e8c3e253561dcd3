import { fixList } from './fix-list';
import type { CrewList } from './fix-list-item';
import type { Hold, Sheet } from './sheet-types';

/**
 * What crew get of a pour: what they must put right, and what of it waits for the inspector. Nothing else of the
 * record is in it.
 */
export function crewListOf(sheet: Sheet, holds: readonly Hold[]): Omit<CrewList, 'digest'> {
  const { plan } = sheet;
  return {
    planRevision: plan.revision,
    units: plan.units,
    drawings: [...new Set(plan.elements.map(({ drawing }) => `${drawing.number} rev ${drawing.revision}`))],
    items: fixList(sheet, holds),
    awaited: holds.filter((hold) => hold.kind === 'recheck-awaited').map(({ id, where }) => ({ id, where })),
  };
}
