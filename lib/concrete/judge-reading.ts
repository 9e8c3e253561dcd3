import { ConcreteError } from '@/lib/concrete/concrete-error';
import { metReason, type Verdict } from '@/lib/concrete/judge-measurement';
import { atLeast, atMost, LENGTH_SLACK_MM, withUnit, type LengthUnit } from '@/lib/concrete/length';

export type { Verdict } from '@/lib/concrete/judge-measurement';
export type VerdictFlag = 'at-limit' | 'inside-uncertainty' | 'indicative';

export interface JudgedReading {
  verdict: Verdict;
  /** Which limit it fails; null where it fails none. */
  side: 'low' | 'high' | null;
  flags: VerdictFlag[];
  /** One plain sentence, numbers in the unit asked for. */
  reason: string;
  /** Distance to the nearer limit, negative where the reading lies beyond it; null where nothing was compared. */
  marginMm: number | null;
}

/** A reading of cover: a length, or a block of known size that passes under the bar or does not. */
export interface ReadingToJudge {
  /** Null while the unit is missing, or where the reading is a go/no-go. */
  mm: number | null;
  goNoGo?: { blockMm: number; passes: boolean };
  /** Size of the section across the face: more cover than this is not plausible. */
  sectionMm?: number;
  /** False while a typed or imported reading waits for the person named as its measurer. */
  confirmed?: boolean;
}

export interface CoverLimits {
  leastAcceptedMm: number;
  mostAcceptedMm: number | null;
}

export interface InstrumentAtReading {
  /** Expanded uncertainty U (k = 2), mm. */
  uncertaintyMm: number | null;
  status: 'good' | 'suspect' | 'out-of-calibration' | 'unknown';
}

/** Simple acceptance; or guarded acceptance with guard band g = U unless the project sets it (JCGM 106:2012). */
export type ReadingRule = { kind: 'simple' } | { kind: 'guarded'; guardMm?: number };

function notVerified(reason: string, flags: VerdictFlag[] = []): JudgedReading {
  return { verdict: 'not-verified', side: null, flags, reason, marginMm: null };
}

const instrumentReasons: Record<Exclude<InstrumentAtReading['status'], 'good'>, string> = {
  suspect: 'The instrument is suspect since its last good block check. Read again with a good one.',
  'out-of-calibration':
    'The instrument was out of calibration when this was read. Read again with a good one.',
  unknown: 'Nothing is known here about the instrument. Name it, or read again with one of the project.',
};

/** Why a reading counts neither way whatever its value; null where it may be judged. */
function whyNotVerified(
  reading: ReadingToJudge,
  requirement: CoverLimits | null,
  instrument: InstrumentAtReading,
  unit: LengthUnit,
): JudgedReading | null {
  const { mm, goNoGo } = reading;
  if (requirement === null) {
    const indicative: VerdictFlag[] = mm === null && !goNoGo ? [] : ['indicative'];
    return notVerified(
      'The steel touched has no requirement on this face. Read again to the steel that governs.',
      indicative,
    );
  }
  if (mm === null && !goNoGo)
    return notVerified('The unit of this reading is missing. Its measurer has to state it.');
  if (mm !== null && !Number.isFinite(mm)) return notVerified('This reading is not a finite number.');
  if (mm !== null && mm < -LENGTH_SLACK_MM)
    return notVerified('A cover below zero is not plausible. Read again.');
  if (mm !== null && reading.sectionMm !== undefined && !atMost(mm, reading.sectionMm)) {
    return notVerified(
      `${withUnit(mm, unit, reading.sectionMm)} is more than the section's ${withUnit(reading.sectionMm, unit, mm)}, which is not plausible. Read again.`,
    );
  }
  if (instrument.status !== 'good') return notVerified(instrumentReasons[instrument.status]);
  if (reading.confirmed === false) {
    return notVerified('The person named as the measurer has not confirmed this reading yet.');
  }
  return null;
}

/**
 * Judges one reading by the requirement of the steel it touched. Comparisons are unrounded and inclusive with a slack
 * of 1e-6 mm; nothing snaps to tape fractions. Not verified, and so counted neither way: no unit, no requirement for
 * that steel, a doubtful instrument, not confirmed by its measurer, not plausible. Under the guarded rule a reading
 * is met only if it stays inside the limits by the guard band; inside the band is not met. A go/no-go proves "at
 * least" or "less than" its block and nothing more. `unit` is what the reason is written in; it never changes a verdict.
 * Source: JCGM 106:2012 for the two decision rules.
 */
export function judgeReading(
  reading: ReadingToJudge,
  requirement: CoverLimits | null,
  instrument: InstrumentAtReading,
  rule: ReadingRule,
  unit: LengthUnit,
): JudgedReading {
  const open = whyNotVerified(reading, requirement, instrument, unit);
  if (open || requirement === null) return open ?? notVerified('There is no requirement to judge by.');
  checkLimits(requirement);
  const guard = guardBand(rule, instrument);
  if (reading.goNoGo) return judgeBlock(reading.goNoGo, requirement, guard, unit);
  return judgeLength(reading.mm ?? Number.NaN, requirement, instrument.uncertaintyMm, guard, unit);
}

function checkLimits({ leastAcceptedMm, mostAcceptedMm }: CoverLimits): void {
  if (!Number.isFinite(leastAcceptedMm))
    throw new ConcreteError('leastAcceptedMm', 'This is not a finite number.');
  if (mostAcceptedMm === null) return;
  if (!Number.isFinite(mostAcceptedMm))
    throw new ConcreteError('mostAcceptedMm', 'This is not a finite number.');
  if (!atLeast(mostAcceptedMm, leastAcceptedMm)) {
    throw new ConcreteError('mostAcceptedMm', 'The most accepted cover is less than the least accepted.');
  }
}

/** Guard band in mm: 0 under simple acceptance, null where the guarded rule has neither g nor U to work with. */
function guardBand(rule: ReadingRule, instrument: InstrumentAtReading): number | null {
  if (rule.kind === 'simple') return 0;
  const guard = rule.guardMm ?? instrument.uncertaintyMm;
  if (guard !== null && (!Number.isFinite(guard) || guard < 0)) {
    throw new ConcreteError('guardMm', 'A guard band is a finite number, not less than zero.');
  }
  return guard;
}

const noGuard =
  'The project asks for guarded acceptance, and the uncertainty of this instrument is not known.';

function judgeLength(
  mm: number,
  { leastAcceptedMm: least, mostAcceptedMm: most }: CoverLimits,
  uncertaintyMm: number | null,
  guard: number | null,
  unit: LengthUnit,
): JudgedReading {
  const marginMm = Math.min(mm - least, most === null ? Infinity : most - mm);
  const limits = most === null ? [least] : [least, most];
  const flags: VerdictFlag[] = [];
  if (limits.some((limit) => Math.abs(mm - limit) <= LENGTH_SLACK_MM)) flags.push('at-limit');
  if (
    uncertaintyMm !== null &&
    limits.some((limit) => Math.abs(mm - limit) < uncertaintyMm - LENGTH_SLACK_MM)
  ) {
    flags.push('inside-uncertainty');
  }
  const say = (verdict: Verdict, side: JudgedReading['side'], reason: string): JudgedReading => ({
    verdict,
    side,
    flags,
    reason,
    marginMm,
  });
  if (!atLeast(mm, least)) {
    return say(
      'not-met',
      'low',
      `${withUnit(mm, unit, least)} is ${withUnit(least - mm, unit, 0)} less than the least accepted ${withUnit(least, unit, mm)}.`,
    );
  }
  if (most !== null && !atMost(mm, most)) {
    return say(
      'not-met',
      'high',
      `${withUnit(mm, unit, most)} is ${withUnit(mm - most, unit, 0)} more than the most accepted ${withUnit(most, unit, mm)}.`,
    );
  }
  if (guard === null) return notVerified(noGuard);
  if (!atLeast(mm - guard, least)) {
    return say('not-met', 'low', insideGuard(mm, least, 'least', guard, unit));
  }
  if (most !== null && !atMost(mm + guard, most)) {
    return say('not-met', 'high', insideGuard(mm, most, 'most', guard, unit));
  }
  return say('met', null, metReason(mm, least, most, unit));
}

function insideGuard(
  mm: number,
  limit: number,
  name: 'least' | 'most',
  guard: number,
  unit: LengthUnit,
): string {
  return `${withUnit(mm, unit, limit)} is inside the guard band of ${withUnit(guard, unit, 0)} at the ${name} accepted ${withUnit(limit, unit, mm)}, so it is not met.`;
}

function judgeBlock(
  { blockMm, passes }: { blockMm: number; passes: boolean },
  { leastAcceptedMm: least, mostAcceptedMm: most }: CoverLimits,
  guard: number | null,
  unit: LengthUnit,
): JudgedReading {
  if (!Number.isFinite(blockMm) || blockMm <= 0) {
    throw new ConcreteError('goNoGo.blockMm', 'The size of the block is a number above zero.');
  }
  const block = withUnit(blockMm, unit, least);
  const limit = withUnit(least, unit, blockMm);
  const result = (verdict: Verdict, side: JudgedReading['side'], reason: string): JudgedReading => ({
    verdict,
    side,
    flags: [],
    reason,
    marginMm: null,
  });
  const band = guard ?? 0;
  if (!passes) {
    if (atMost(blockMm, least + band)) {
      return result(
        'not-met',
        'low',
        `A block of ${block} does not pass, so the cover is less than the ${limit} accepted${band > 0 ? ` with its guard band of ${withUnit(band, unit, 0)}` : ''}.`,
      );
    }
    return notVerified(
      `A block of ${block} does not pass: that shows less than the block, and not whether ${limit} is there. Measure it.`,
    );
  }
  if (most !== null && !atMost(blockMm, most - band)) {
    return result(
      'not-met',
      'high',
      `A block of ${withUnit(blockMm, unit, most)} passes, so the cover is more than the ${withUnit(most, unit, blockMm)} accepted${band > 0 ? ` less its guard band of ${withUnit(band, unit, 0)}` : ''}.`,
    );
  }
  if (!atLeast(blockMm, least + band)) {
    return notVerified(
      `A block of ${block} passes: that shows at least the block, and not whether ${limit} is there. Measure it.`,
    );
  }
  if (guard === null) return notVerified(noGuard);
  if (most !== null) {
    return notVerified(
      `A block of ${block} passes, which shows the least accepted ${limit} and not the most accepted ${withUnit(most, unit)}. Measure it.`,
    );
  }
  return result('met', null, `A block of ${block} passes, so the least accepted ${limit} is there.`);
}
