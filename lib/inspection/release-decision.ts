import type { BodyOf } from './entry';
import type { ReleaseScope } from './entry-bodies';
import { holds, holdsInScope } from './holds';
import { standingReleases } from './pour-state';
import { inScope } from './scope';
import type { Hold, Sheet } from './sheet-types';

/** What a release rests on, before the server gives it its number, digest and head. */
export type ReleaseRests = Omit<BodyOf<'release'>, 'number' | 'headSeq' | 'headHash' | 'sheetDigest'>;

export type ReleaseDecision =
  | { kind: 'refused'; holds: Hold[] }
  /** Not a matter of holds: placing has begun, a release of this scope stands already, the scope names what is not there. */
  | { kind: 'impossible'; sentence: string }
  | { kind: 'granted'; rests: ReleaseRests };

/**
 * May this scope be released now? Only when no hold stands in it or without a place. The answer is computed on the
 * server from the locked record; a device may ask the same question to show what is to come.
 */
export function decideRelease(sheet: Sheet, scope: ReleaseScope, now: string): ReleaseDecision {
  if (sheet.placing.started)
    return { kind: 'impossible', sentence: 'Placing has begun. A release cannot be given afterwards.' };
  const known = new Set(sheet.plan.elements.map((element) => element.id));
  if (scope.elementIds?.some((id) => !known.has(id))) {
    return { kind: 'impossible', sentence: 'The scope names an element that is not in this plan.' };
  }
  const partial = scope.elementIds !== null && scope.elementIds.length < known.size;
  if (partial && !scope.limits) {
    return {
      kind: 'impossible',
      sentence: 'A release of a part has to say where it ends: name the limits or bulkheads.',
    };
  }
  if (standingReleases(sheet, now).some(({ entry }) => inScope(entry.body.scope.elementIds, scope))) {
    return { kind: 'impossible', sentence: 'A release of this scope stands already.' };
  }
  const standing = holdsInScope(holds(sheet, now), scope);
  if (standing.length > 0) return { kind: 'refused', holds: standing };
  return { kind: 'granted', rests: restsOf(sheet, scope, now) };
}

function restsOf(sheet: Sheet, scope: ReleaseScope, now: string): ReleaseRests {
  const elements = sheet.plan.elements.filter((element) => inScope([element.id], scope));
  const signatures = sheet.signatures.filter(
    (state) => state.stands && inScope(state.entry.body.elementIds, scope),
  );
  return {
    scope,
    planRevision: sheet.plan.revision,
    drawings: [...new Set(elements.map(({ drawing }) => `${drawing.number} rev ${drawing.revision}`))],
    mix: sheet.plan.mix?.name ?? null,
    signatureIds: signatures.map((state) => state.entry.id),
    dispositionIds: sheet.nonconformances.flatMap((state) =>
      state.status === 'accepted' && state.disposition ? [state.disposition.id] : [],
    ),
    readings: sheet.faces
      .filter((face) => inScope([face.elementId], scope))
      .reduce(
        (count, face) =>
          count + [...face.points, ...face.spots].reduce((sum, point) => sum + point.readings.length, 0),
        0,
      ),
    conditions: sheet.conditions
      .filter(({ condition }) => condition.stage === 'during-placing')
      .map(({ condition }) => `${condition.text} (met when: ${condition.criterion})`),
    validUntil: new Date(Date.parse(now) + sheet.plan.validityHours * 3_600_000).toISOString(),
  };
}
