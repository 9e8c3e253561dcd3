import {
  between,
  finite,
  listOf,
  notNegative,
  positive,
  unknownChoice,
  whole,
} from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { againstLimits, worstFinding, type LimitFinding } from '@/lib/concrete/limit-verdict';
import { atMost, withUnit, type LengthUnit } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import type { TrailStep } from '@/lib/concrete/trail';
import { trailSource } from '@/lib/concrete/trail-source';

/** What may be done about a lap that is too short; the contractor or the engineer chooses. */
export const shortLapWaysOut = [
  'A bar with a full lap on both sides beside it',
  'Couplers',
  'The engineer’s calculation',
] as const;

/** A measured lap against what is accepted; a short one comes with its ways out. */
export function judgeLap(
  measuredMm: number,
  leastMm: number,
): LimitFinding & { shortByMm: number; waysOut: readonly string[] } {
  const measured = notNegative('lap', measuredMm);
  const finding = againstLimits('Lap', measured, { least: positive('least lap', leastMm) });
  const short = finding.verdict === 'not-met';
  return { ...finding, shortByMm: short ? leastMm - measured : 0, waysOut: short ? shortLapWaysOut : [] };
}

/**
 * A starter or a hook: embedded length against what is accepted, and whether the bar held when it was pulled. A starter
 * that moves is not met whatever its length; one that nobody pulled is not verified.
 */
export function judgeEmbedment(
  starter: {
    measuredMm: number;
    leastMm: number;
    pulled: 'held' | 'moved' | 'not-pulled' | 'not-a-starter';
  },
  unit: LengthUnit = 'mm',
): LimitFinding {
  const measured = notNegative('embedment', starter.measuredMm);
  const least = positive('least embedment', starter.leastMm);
  const length = againstLimits('Embedment', measured, { least }, unit);
  const findings = [length];
  if (starter.pulled === 'moved') {
    findings.unshift({ verdict: 'not-met', side: null, reason: 'The bar moved when it was pulled.' });
  }
  if (starter.pulled === 'not-pulled') {
    findings.push({ verdict: 'not-verified', side: null, reason: 'Nobody pulled the bar.' });
  }
  return worstFinding(findings);
}

/** A coupler at work: its type, whether both bars went in to the witness mark, and threads left in sight. */
export function judgeCoupler(coupler: {
  plannedType: string;
  foundType: string;
  witnessMarks: 'both-in' | 'one-short' | 'not-marked';
  exposedThreads: number | null;
  mostExposedThreads: number | null;
}): LimitFinding {
  if (coupler.plannedType.trim() === '') throw new ConcreteError('planned coupler', 'It has no type.');
  const findings: LimitFinding[] = [];
  if (coupler.foundType.trim().toLowerCase() !== coupler.plannedType.trim().toLowerCase()) {
    const reason = `The coupler is "${coupler.foundType}", planned is "${coupler.plannedType}".`;
    findings.push({ verdict: 'not-met', side: null, reason });
  }
  if (coupler.witnessMarks === 'one-short') {
    findings.push({ verdict: 'not-met', side: null, reason: 'A bar does not reach its witness mark.' });
  }
  if (coupler.witnessMarks === 'not-marked') {
    findings.push({ verdict: 'not-verified', side: null, reason: 'The bars carry no witness mark.' });
  }
  if (coupler.mostExposedThreads !== null) {
    const most = whole('threads that may show', coupler.mostExposedThreads, 0);
    findings.push(
      coupler.exposedThreads === null
        ? { verdict: 'not-verified', side: null, reason: 'The threads in sight were not counted.' }
        : againstLimits(
            'Threads in sight',
            whole('threads in sight', coupler.exposedThreads, 0),
            { most },
            'count',
          ),
    );
  }
  findings.push({ verdict: 'met', side: null, reason: 'Coupler as planned, both bars to their marks.' });
  return worstFinding(findings);
}

export type LapSectionRule = 'aci-318-19' | 'en-1992-1-1';

/**
 * Greatest share of bars lapped in one section. Laps count together where the section's length holds their middles:
 * 1.3 l0 (EN 1992-1-1 8.7.2, figure 8.8), or the required lap length itself (ACI 318-19 25.5.2.1, taken here between
 * middles, so laps that overlap at all count together).
 * @param lapCentresMm where the middle of each lap lies along the bars, one entry per lapped bar
 */
export function shareLapped(query: {
  rule: LapSectionRule;
  lapCentresMm: readonly number[];
  bars: number;
  lapMm: number;
  showIn?: LengthUnit;
}): { share: number; lappedTogether: number; fromMm: number | null; trail: TrailStep[] } {
  const bars = whole('bars', query.bars, 1);
  const lap = positive('lap length', query.lapMm);
  if (query.lapCentresMm.length > bars)
    throw new ConcreteError('lap positions', 'There are more laps than bars.');
  const centres = query.lapCentresMm.map((centre) => finite('lap position', centre)).sort((a, b) => a - b);
  const windowMm = sectionLength(query.rule, lap);
  let lappedTogether = 0;
  let fromMm: number | null = null;
  for (const [index, start] of centres.entries()) {
    const inside = centres.slice(index).filter((centre) => atMost(centre - start, windowMm)).length;
    if (inside > lappedTogether) {
      lappedTogether = inside;
      fromMm = start;
    }
  }
  const value = `${lappedTogether} of ${bars} bars within ${withUnit(windowMm, query.showIn ?? 'mm')}`;
  return { share: lappedTogether / bars, lappedTogether, fromMm, trail: [sectionStep(query.rule, value)] };
}

/** The length within which laps count as one section, mm, for a tape held along the bars. */
export function lapSection(
  rule: LapSectionRule,
  lapMm: number,
  showIn: LengthUnit = 'mm',
): { lengthMm: number; trail: TrailStep[] } {
  const lengthMm = sectionLength(rule, positive('lap length', lapMm));
  return { lengthMm, trail: [sectionStep(rule, `within ${withUnit(lengthMm, showIn)}`)] };
}

/** Least distance between the ends of adjacent laps along the bars: 0.3 l0 (EN 1992-1-1 8.7.2(3), from memory). */
export function enLeastStagger(lapMm: number): { leastMm: number; trail: TrailStep[] } {
  const leastMm = 0.3 * positive('lap length', lapMm);
  const step = enArrangement(
    'Ends of adjacent laps apart at least 0.3 l0',
    `0.3 × ${numberText(lapMm, 1)} = ${numberText(leastMm, 1)} mm`,
  );
  return { leastMm, trail: [step] };
}

function sectionLength(rule: LapSectionRule, lapMm: number): number {
  switch (rule) {
    case 'en-1992-1-1':
      return 1.3 * lapMm;
    case 'aci-318-19':
      return lapMm;
    default:
      throw unknownChoice('rule', rule);
  }
}

function sectionStep(rule: LapSectionRule, value: string): TrailStep {
  return rule === 'en-1992-1-1'
    ? trailSource(
        'EN 1992-1-1, 8.7.2, figure 8.8',
        '2004',
        'memory',
      )('Laps with middles within 1.3 l0', value)
    : trailSource(
        'ACI 318-19, Table 25.5.2.1',
        '2019',
        'partly-seen',
      )('Spliced within the lap length', value);
}

/** The share found against the share the plan permits (both 0 to 1). */
export function judgeShareLapped(share: number, permitted: number): LimitFinding {
  const found = 100 * between('share lapped', share, 0, 1);
  return againstLimits(
    'Share lapped in one section',
    found,
    { most: 100 * between('permitted share', permitted, 0, 1) },
    '%',
  );
}

const enArrangement = trailSource('EN 1992-1-1, 8.7.2(3), figure 8.7', '2004', 'memory');

/**
 * Arrangement of laps, EN 1992-1-1 8.7.2(3), from memory, check against the edition in force: the bars of a lap at most
 * 4 φ or 50 mm apart (else the lap grows by the distance in excess), ends of adjacent laps at least 0.3 l0 apart along
 * the bars, adjacent laps at least 2 φ and 20 mm apart across. Lengths in mm.
 */
export function enLapArrangement(query: { diameterMm: number; lapMm: number }): {
  mostApartMm: number;
  leastStaggerMm: number;
  leastBetweenLapsMm: number;
  trail: TrailStep[];
} {
  const diameter = positive('bar diameter', query.diameterMm);
  const lap = positive('lap length', query.lapMm);
  // "4 φ or 50 mm": the greater of the two would be the looser reading, so the lesser is taken.
  const mostApartMm = Math.min(4 * diameter, 50);
  const leastStaggerMm = 0.3 * lap;
  const leastBetweenLapsMm = Math.max(2 * diameter, 20);
  return {
    mostApartMm,
    leastStaggerMm,
    leastBetweenLapsMm,
    trail: [
      enArrangement('Bars of a lap apart at most 4 φ or 50 mm', `${numberText(mostApartMm)} mm`),
      enArrangement('Ends of adjacent laps apart at least 0.3 l0', `${numberText(leastStaggerMm, 1)} mm`),
      enArrangement('Adjacent laps apart at least 2 φ and 20 mm', `${numberText(leastBetweenLapsMm)} mm`),
    ],
  };
}

/** Distances between the ends of neighbouring laps along the bars, each against the least stagger (mm). */
export function judgeStagger(distancesMm: readonly number[], leastMm: number): LimitFinding {
  listOf('staggers', distancesMm, 1);
  const closest = Math.min(...distancesMm.map((distance) => notNegative('stagger', distance)));
  return againstLimits('Stagger of neighbouring laps', closest, {
    least: positive('least stagger', leastMm),
  });
}
