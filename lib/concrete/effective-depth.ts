import { notNegative } from '@/lib/concrete/check-input';
import { ConcreteError, requirePositive } from '@/lib/concrete/concrete-error';
import type { JudgedReading } from '@/lib/concrete/judge-reading';
import { atLeast, atMost, LENGTH_SLACK_MM, withUnit, type LengthUnit } from '@/lib/concrete/length';

/** Arrangement of the steel whose depth is judged; mm. */
export interface DepthSection {
  /** Thickness of the section, from the face read to the compression face. */
  sectionMm: number;
  /** Diameter of the main bars. */
  barDiameterMm: number;
  /** From the first layer of main bars to the centroid of all of them; 0 for one layer. */
  toCentroidMm?: number;
}

/**
 * Effective depth in mm from the cover of the main bar at the tension face: section − cover − half a bar − distance to
 * the centroid of the layers. Refuses a section into which cover and bar do not fit.
 */
export function effectiveDepth(section: DepthSection, coverToMainBarMm: number): number {
  const total = requirePositive('sectionMm', section.sectionMm);
  const diameter = requirePositive('barDiameterMm', section.barDiameterMm);
  const cover = notNegative('coverToMainBarMm', coverToMainBarMm);
  const depth = total - cover - diameter / 2 - notNegative('toCentroidMm', section.toCentroidMm ?? 0);
  if (depth <= 0) throw new ConcreteError('sectionMm', 'Cover and bar do not fit into this section.');
  return depth;
}

export interface DepthReading {
  section: DepthSection;
  plannedMm: number;
  /** Cover as read, to the steel touched; null while its unit is missing. */
  readingMm: number | null;
  /** The main bar itself, or steel outside it that carries or holds it. */
  touched: 'main' | 'outermost';
  /** Size of the steel that lies between the steel touched and the main bar; needed where the main bar was not touched. */
  betweenMm?: number;
  tolerance: { minusMm: number; plusMm: number };
}

export interface JudgedDepth extends JudgedReading {
  depthMm: number | null;
}

/**
 * Judges effective depth, apart from cover: met where it falls short of its plan by no more than the tolerance (see
 * `depthTolerance`). More depth than the tolerance does not fail here, it shows as low cover there; the reason says it.
 * From a reading to the outermost steel the depth is indicative only: not verified, whatever it is.
 */
export function judgeEffectiveDepth(reading: DepthReading, unit: LengthUnit): JudgedDepth {
  const planned = requirePositive('plannedMm', reading.plannedMm);
  const minus = notNegative('tolerance.minusMm', reading.tolerance.minusMm);
  const plus = notNegative('tolerance.plusMm', reading.tolerance.plusMm);
  const open = (reason: string, depthMm: number | null, flags: JudgedDepth['flags']): JudgedDepth => ({
    verdict: 'not-verified',
    side: null,
    flags,
    reason,
    marginMm: null,
    depthMm,
  });
  if (reading.readingMm === null)
    return open('The unit of this reading is missing. Its measurer has to state it.', null, []);
  const { readingMm } = reading;
  if (!Number.isFinite(readingMm) || readingMm < 0 || !atMost(readingMm, reading.section.sectionMm)) {
    return open('This reading is not plausible for the section. Read again.', null, []);
  }
  if (reading.touched === 'outermost') {
    if (reading.betweenMm === undefined) {
      throw new ConcreteError(
        'betweenMm',
        'Say what lies between the steel touched and the main bar.',
        'absent',
      );
    }
    const depthMm = effectiveDepth(reading.section, readingMm + notNegative('betweenMm', reading.betweenMm));
    return open(
      `About ${withUnit(depthMm, unit)} by a reading to the outermost steel. Read to the main bar to verify it.`,
      depthMm,
      ['indicative'],
    );
  }
  const depthMm = effectiveDepth(reading.section, readingMm);
  const least = planned - minus;
  const most = planned + plus;
  const atLimit = Math.abs(depthMm - least) <= LENGTH_SLACK_MM;
  const judged = (verdict: 'met' | 'not-met', reason: string): JudgedDepth => ({
    verdict,
    side: verdict === 'met' ? null : 'low',
    flags: atLimit ? ['at-limit'] : [],
    reason,
    marginMm: depthMm - least,
    depthMm,
  });
  if (!atLeast(depthMm, least)) {
    return judged(
      'not-met',
      `Effective depth ${withUnit(depthMm, unit, least)} is ${withUnit(least - depthMm, unit, 0)} less than the least accepted ${withUnit(least, unit, depthMm)}.`,
    );
  }
  if (!atMost(depthMm, most)) {
    return judged(
      'met',
      `Effective depth ${withUnit(depthMm, unit, most)} is more than planned ${withUnit(planned, unit)} and its tolerance: look at the cover.`,
    );
  }
  return judged(
    'met',
    `Effective depth ${withUnit(depthMm, unit, least)} is within tolerance of the planned ${withUnit(planned, unit)}.`,
  );
}
