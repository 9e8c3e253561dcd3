import { notNegative, positive, whole } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { atMost } from '@/lib/concrete/length';
import type { LimitFinding } from '@/lib/concrete/limit-verdict';
import { apartText, numberText } from '@/lib/concrete/number-text';
import { MM_PER_FOOT } from '@/lib/concrete/stress-units';
import type { TrailStep } from '@/lib/concrete/trail';
import { arithmetic, fromContract, trailSource } from '@/lib/concrete/trail-source';

/** A damaged or patched spot: where it begins along the bar, how long it is (0 for a nick), and its area. */
export interface CoatingSpot {
  kind: 'damaged' | 'patched';
  fromMm: number;
  lengthMm: number;
  areaMm2: number;
}

/** A stretch of bar and the share of its surface that is damaged or patched. */
export interface WorstStretch {
  percent: number;
  areaMm2: number;
  /** Where the worst stretch begins along the bar, mm; null where there is no such spot. */
  fromMm: number | null;
}

function overlapArea(spot: CoatingSpot, from: number, to: number): number {
  const end = spot.fromMm + spot.lengthMm;
  if (spot.lengthMm === 0) return spot.fromMm >= from - 1e-9 && spot.fromMm <= to + 1e-9 ? spot.areaMm2 : 0;
  const length = Math.max(0, Math.min(end, to) - Math.max(spot.fromMm, from));
  return (spot.areaMm2 * length) / spot.lengthMm;
}

/**
 * The worst stretch of the given length. The area in a sliding window is piecewise linear in the window's place, so its
 * greatest value lies where an end of the window meets an end of a spot: only those places are tried.
 */
function worstStretch(
  bar: { diameterMm: number; lengthMm: number },
  spots: readonly CoatingSpot[],
  stretchMm: number,
): WorstStretch {
  // A bar shorter than the stretch is judged on its own length, never on surface that it does not have.
  const windowMm = Math.min(stretchMm, bar.lengthMm);
  const surface = Math.PI * bar.diameterMm * windowMm;
  const edges = spots.flatMap((spot) => [spot.fromMm, spot.fromMm + spot.lengthMm]);
  const starts = edges
    .flatMap((edge) => [edge, edge - windowMm])
    .map((start) => Math.min(Math.max(start, 0), bar.lengthMm - windowMm));
  let worst: WorstStretch = { percent: 0, areaMm2: 0, fromMm: null };
  for (const start of starts) {
    const areaMm2 = spots.reduce((sum, spot) => sum + overlapArea(spot, start, start + windowMm), 0);
    if (areaMm2 > worst.areaMm2) worst = { percent: (100 * areaMm2) / surface, areaMm2, fromMm: start };
  }
  return worst;
}

function checkedSpots(bar: { diameterMm: number; lengthMm: number }, spots: readonly CoatingSpot[]): void {
  positive('bar diameter', bar.diameterMm);
  positive('bar length', bar.lengthMm);
  for (const [index, spot] of spots.entries()) {
    const name = `spot ${index + 1}`;
    notNegative(`${name}, place`, spot.fromMm);
    notNegative(`${name}, length`, spot.lengthMm);
    positive(`${name}, area`, spot.areaMm2);
    if (!atMost(spot.fromMm + spot.lengthMm, bar.lengthMm)) {
      throw new ConcreteError(`${name}, place`, 'It lies beyond the end of the bar.');
    }
    if (spot.lengthMm > 0 && !atMost(spot.areaMm2, Math.PI * bar.diameterMm * spot.lengthMm)) {
      throw new ConcreteError(`${name}, area`, 'It is more than the surface of the bar over that length.');
    }
  }
}

/** What has to happen to a coated bar before it may be placed over. */
export type CoatingOutcome = 'sound' | 'repair' | 'more-than-repair';

/** What was found on a coated bar, with the reasons. */
export interface CoatingFinding {
  outcome: CoatingOutcome;
  damaged: WorstStretch;
  patched: WorstStretch;
  reasons: string[];
  trail: TrailStep[];
}

/** Limits of an epoxy coating, in % of the surface of any one foot. */
export interface EpoxyLimits {
  damagedMostPercent: number;
  patchedMostPercent: number;
}

/** ASTM D3963 limits, from memory, check against the edition in force: 2 % damaged before repair, 5 % patched. */
export const D3963_LIMITS: EpoxyLimits = { damagedMostPercent: 2, patchedMostPercent: 5 };

const d3963 = trailSource('ASTM D3963/D3963M, damage and repair', '01/-15/-21', 'memory');
/** Coated bars are sawn or sheared, never cut with a flame. */
export const noFlameCutting = trailSource('Maryland SHA 421.03.03', '', 'seen');

/**
 * Epoxy-coated bar: damage and patches on the worst foot (304.8 mm), never averaged over more; cut ends apart. Any damage
 * or bare cut end holds until it is repaired and read again; over a limit it is more than simple rework. A flame-cut end
 * is always more than rework. Limits by default ASTM D3963, from memory, check against the edition in force; where the
 * contract sets its own, they are passed in.
 * @throws ConcreteError where a spot lies off the bar or is larger than the bar's surface
 */
export function judgeEpoxyCoating(
  bar: { diameterMm: number; lengthMm: number },
  found: { spots: readonly CoatingSpot[]; bareCutEnds: number; flameCutEnds: number },
  limits: EpoxyLimits = D3963_LIMITS,
): CoatingFinding {
  checkedSpots(bar, found.spots);
  const most = {
    damaged: positive('damage limit', limits.damagedMostPercent),
    patched: positive('patch limit', limits.patchedMostPercent),
  };
  const bare = whole('bare cut ends', found.bareCutEnds, 0);
  const flame = whole('flame-cut ends', found.flameCutEnds, 0);
  const damaged = worstStretch(bar, spotsOf(found.spots, 'damaged'), MM_PER_FOOT);
  const patched = worstStretch(bar, spotsOf(found.spots, 'patched'), MM_PER_FOOT);
  const over: string[] = [];
  const toRepair: string[] = [];
  if (!atMost(damaged.percent, most.damaged)) over.push(overText('damaged', damaged.percent, most.damaged));
  else if (damaged.areaMm2 > 0)
    toRepair.push(`${numberText(damaged.percent)} % of the worst foot is damaged.`);
  if (!atMost(patched.percent, most.patched)) over.push(overText('patched', patched.percent, most.patched));
  if (bare > 0) toRepair.push(`Bare cut ends: ${bare}.`);
  if (flame > 0) over.push(`Flame-cut ends: ${flame}. Coated bars are sawn or sheared.`);
  return {
    outcome: over.length > 0 ? 'more-than-repair' : toRepair.length > 0 ? 'repair' : 'sound',
    damaged,
    patched,
    reasons: [...over, ...toRepair],
    trail: [
      arithmetic(
        'Surface of one foot = π d × 304.8 mm',
        `${numberText(Math.PI * bar.diameterMm * MM_PER_FOOT, 0)} mm²`,
      ),
      d3963(
        'Damaged in any foot, before repair, at most',
        `${numberText(damaged.percent)} of ${most.damaged} %`,
      ),
      d3963('Patched in any foot, at most', `${numberText(patched.percent)} of ${most.patched} %`),
      noFlameCutting('Cut ends: sawn or sheared, then patched', `bare ${bare}, flame-cut ${flame}`),
    ],
  };
}

/** The limits of an epoxy coating with their trail: those of ASTM D3963 where the contract sets none of its own. */
export function epoxyLimits(own: { damagedMostPercent: number | null; patchedMostPercent: number | null }): {
  limits: EpoxyLimits;
  trail: TrailStep[];
} {
  const limit = (field: string, typed: number | null, standard: number, rule: string) => {
    const percent = typed === null ? standard : positive(field, typed);
    return { percent, step: (typed === null ? d3963 : fromContract)(rule, `${numberText(percent, 3)} %`) };
  };
  const damaged = limit(
    'damage limit',
    own.damagedMostPercent,
    D3963_LIMITS.damagedMostPercent,
    'Damaged in any foot, before repair, at most',
  );
  const patched = limit(
    'patch limit',
    own.patchedMostPercent,
    D3963_LIMITS.patchedMostPercent,
    'Patched in any foot, at most',
  );
  return {
    limits: { damagedMostPercent: damaged.percent, patchedMostPercent: patched.percent },
    trail: [damaged.step, patched.step, noFlameCutting('Cut ends', 'sawn or sheared, then patched')],
  };
}

/** The damage limit of FRP bars with its trail: that of ACI 440.5M where the contract sets none of its own. */
export function frpLimit(ownPercent: number | null): { mostPercent: number; trail: TrailStep[] } {
  const mostPercent = ownPercent === null ? FRP_DAMAGE_MOST_PERCENT : positive('damage limit', ownPercent);
  const step = (ownPercent === null ? frpDamage : fromContract)(
    'Visible damage in any metre, at most',
    `${numberText(mostPercent, 3)} %`,
    'A depth limit also applies: see the contract.',
  );
  return { mostPercent, trail: [step] };
}

function spotsOf(spots: readonly CoatingSpot[], kind: CoatingSpot['kind']): CoatingSpot[] {
  return spots.filter((spot) => spot.kind === kind);
}

function overText(what: string, percent: number, most: number, stretch = 'foot'): string {
  const [is, limit] = apartText(percent, most, 2);
  return `${is} % of the worst ${stretch} is ${what}, more than ${limit} %.`;
}

/** FRP limit: unrepaired visible damage, % of the surface of any metre, ACI 440.5M-08 1.5.1. */
export const FRP_DAMAGE_MOST_PERCENT = 2;

const frpDamage = trailSource('ACI 440.5M, 1.5.1', '2008', 'seen');

/**
 * FRP bar: visible damage on its worst metre. Within the limit the bar stays; over it, it goes out, because FRP is not
 * repaired like a coating. A depth limit also applies, which this rule does not know.
 */
export function judgeFrpDamage(
  bar: { diameterMm: number; lengthMm: number },
  spots: readonly Omit<CoatingSpot, 'kind'>[],
  mostPercent: number = FRP_DAMAGE_MOST_PERCENT,
): LimitFinding & { worst: WorstStretch; trail: TrailStep[] } {
  const damage = spots.map((spot): CoatingSpot => ({ ...spot, kind: 'damaged' }));
  checkedSpots(bar, damage);
  positive('damage limit', mostPercent);
  const worst = worstStretch(bar, damage, 1000);
  const value = `${numberText(worst.percent)} of ${numberText(mostPercent)} %`;
  const trail = [
    frpDamage('Visible damage in any metre, at most', value, 'A depth limit also applies: see the contract.'),
  ];
  return atMost(worst.percent, mostPercent)
    ? { verdict: 'met', side: null, reason: 'Damage is within its limit.', worst, trail }
    : {
        verdict: 'not-met',
        side: 'high',
        reason: overText('damaged', worst.percent, mostPercent, 'metre'),
        worst,
        trail,
      };
}
