import { coverHolds } from './holds-cover';
import { measurementHolds } from './holds-measurements';
import { checkHolds } from './holds-work';
import { decisionHolds, signatureHolds } from './holds-people';
import { inScope } from './scope';
import type { ReleaseScope } from './entry-bodies';
import type { Hold, Sheet } from './sheet-types';

/** Order in which holds are worked off on site: what is wrong, what is undone, what is waited for, what is signed. */
const order: Hold['kind'][] = [
  'update-needed',
  'plan-incomplete',
  'superseded-drawing',
  'mix-changed',
  'cover-not-met',
  'effective-depth',
  'bar-departs',
  'measurement-out',
  'check-not-met',
  'conflict',
  'nonconformance-open',
  'disposition-awaited',
  'condition-not-verified',
  'recheck-awaited',
  'not-verified',
  'manual',
  'query-open',
  'verbal-instruction',
  'attendance',
  'readings-missing',
  'measurement-missing',
  'check-open',
  'photo-missing',
  'last-walk-missing',
  'plan-revised',
  'signature-missing',
];

/**
 * What stands between this sheet and the concrete. Empty: nothing does, at the points read and for the items checked.
 * @param now ISO instant; only due times depend on it
 */
export function holds(sheet: Sheet, now: string): Hold[] {
  const found = [
    ...coverHolds(sheet),
    ...measurementHolds(sheet),
    ...checkHolds(sheet),
    ...decisionHolds(sheet, now),
    ...signatureHolds(sheet),
  ];
  return found.sort((a, b) => order.indexOf(a.kind) - order.indexOf(b.kind));
}

/** The holds that stand against a release of this scope: those in it, and those without a place. */
export function holdsInScope(all: readonly Hold[], scope: Pick<ReleaseScope, 'elementIds'>): Hold[] {
  return all.filter((hold) => inScope(hold.elementId === null ? null : [hold.elementId], scope));
}
