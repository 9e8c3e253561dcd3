import { checkedAlphas, enBasicAnchorage, type EnAlphas, type EnBond } from '@/lib/concrete/anchorage-en';
import { between, finite, given, positive, unknownChoice } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import type { DevelopmentLength } from '@/lib/concrete/development';
import {
  atLeast,
  atMost,
  lengthArithmetic,
  MM_PER_INCH,
  withUnit,
  type LengthUnit,
} from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import { mpaToPsi } from '@/lib/concrete/stress-units';
import type { TrailStep } from '@/lib/concrete/trail';
import { arithmetic, fromContract, trailSource } from '@/lib/concrete/trail-source';
import { usBarNumber } from '@/lib/concrete/us-bar-number';

/** A lap length that is required, in mm. */
export interface RequiredLap {
  lengthMm: number;
  trail: TrailStep[];
}

/** The lap length typed from the drawing; it governs over every computed one. */
export function typedLap(lengthMm: number, showIn: LengthUnit = 'mm'): RequiredLap {
  const length = positive('lap length on the drawing', lengthMm);
  return {
    lengthMm: length,
    trail: [fromContract('Lap length on the drawing', withUnit(length, showIn))],
  };
}

const aciClass = trailSource('ACI 318-19, Table 25.5.2.1', '2019', 'seen');
const aciLapLimits = trailSource('ACI 318-19, 25.5.1 and 25.5.2', '2019', 'memory');
const aciCompression = trailSource('ACI 318-19, 25.5.5', '2019', 'memory');

export type LapClass = 'A' | 'B';

/**
 * Class of a tension lap, ACI 318-19 Table 25.5.2.1: A where the steel provided is at least twice what is required and at
 * most half of the bars are spliced within the lap length, else B.
 * @param providedOverRequired As provided / As required along the splice
 * @param shareSpliced share of the bars spliced within the required lap length, 0 to 1
 */
export function aciLapClass(
  providedOverRequired: number,
  shareSpliced: number,
): { lapClass: LapClass; factor: number; trail: TrailStep[] } {
  positive('As provided / As required', providedOverRequired);
  between('share spliced', shareSpliced, 0, 1);
  const isA = atLeast(providedOverRequired, 2) && atMost(shareSpliced, 0.5);
  const lapClass = isA ? 'A' : 'B';
  const factor = isA ? 1 : 1.3;
  const value = `${numberText(providedOverRequired)} times required, ${numberText(shareSpliced * 100)} % spliced: ${lapClass}`;
  return {
    lapClass,
    factor,
    trail: [aciClass('Class A from 2.0 times the steel required and at most 50 % spliced, else B', value)],
  };
}

/**
 * Tension lap, ACI 318-19 25.5.2.1: 1.0 ld (class A) or 1.3 ld (class B), not less than 12 in. ld is taken before its own
 * least of 12 in, because the lap has its own. Bars of two sizes: the greater of ld of the larger and the lap of the
 * smaller (25.5.2.2).
 * @param development of the bar that is lapped (of the smaller, where there are two sizes)
 * @param largerBar diameter and development of the larger bar, where the bars differ
 * @throws ConcreteError above #11, where tension laps are not permitted
 */
export function aciTensionLap(query: {
  diameterMm: number;
  development: DevelopmentLength;
  lapClass: LapClass;
  largerBar?: { diameterMm: number; development: DevelopmentLength };
}): RequiredLap {
  const diameter = positive('bar diameter', query.diameterMm);
  const larger = query.largerBar ? positive('larger bar', query.largerBar.diameterMm) : diameter;
  if (larger < diameter) throw new ConcreteError('larger bar', 'It is the smaller one.');
  if (usBarNumber(larger) > 11) {
    throw new ConcreteError('bar diameter', 'Bars larger than #11 are not lapped in tension: use couplers.');
  }
  const factor = query.lapClass === 'A' ? 1 : 1.3;
  const product = factor * positive('development length', query.development.beforeLeastMm);
  const lap = Math.max(product, 12 * MM_PER_INCH);
  const shown = `${numberText(factor)} × ${inchText(query.development.beforeLeastMm)} = ${inchText(lap)}`;
  const trail = [
    ...query.development.trail,
    aciClass(`Class ${query.lapClass} lap, not less than 12 in`, shown),
    aciLapLimits(
      'Bars apart in a non-contact lap: at most the lesser of lap/5 and 6 in',
      nonContactText(lap),
    ),
  ];
  if (!query.largerBar) return { lengthMm: lap, trail };
  const largerLd = positive('development length of the larger bar', query.largerBar.development.lengthMm);
  const lengthMm = Math.max(lap, largerLd);
  const value = `${inchText(largerLd)} against ${inchText(lap)}: ${inchText(lengthMm)}`;
  trail.push(aciLapLimits('Two sizes: the greater of ld of the larger and the lap of the smaller', value));
  return { lengthMm, trail };
}

/** Greatest distance between the bars of a non-contact lap, ACI 318-19 25.5.1.3: the lesser of lap/5 and 6 in. */
export function nonContactLapMost(lapMm: number): { mostMm: number; trail: TrailStep[] } {
  const mostMm = Math.min(positive('lap length', lapMm) / 5, 6 * MM_PER_INCH);
  return { mostMm, trail: [aciLapLimits('Bars of a non-contact lap apart: at most', nonContactText(lapMm))] };
}

function nonContactText(lapMm: number): string {
  return inchText(Math.min(lapMm / 5, 6 * MM_PER_INCH));
}

function inchText(mm: number): string {
  return `${numberText(mm / MM_PER_INCH)} in (${numberText(mm, 0)} mm)`;
}

/**
 * Compression lap, ACI 318-19 25.5.5, from memory, check against the edition in force:
 * to 60 000 psi 0.0005 fy db; above (0.0009 fy − 24) db, from 80 000 psi also the tension lap; not less than 12 in; one
 * third more below f'c 3000 psi. A bar larger than #11 may only be lapped with #11 or smaller, and then the lap is the
 * greater of ldc of the larger bar and the lap of the smaller.
 * @throws ConcreteError where the tension lap or the larger bar's development is needed and missing
 */
export function aciCompressionLap(query: {
  diameterMm: number;
  fyMPa: number;
  fcMPa: number;
  tensionLapMm?: number;
  largerBar?: { diameterMm: number; compressionDevelopmentMm: number };
}): RequiredLap {
  const db = positive('bar diameter', query.diameterMm) / MM_PER_INCH;
  if (usBarNumber(query.diameterMm) > 11) {
    throw new ConcreteError('bar diameter', 'The smaller bar of a compression lap is #11 or smaller.');
  }
  const fy = mpaToPsi(positive('fy', query.fyMPa));
  // 420 MPa is sold as Grade 60 and 550 MPa as Grade 80; both are a little off in psi.
  const grade60 = fy <= 61_000;
  const coefficient = grade60 ? 0.0005 * fy : 0.0009 * fy - 24;
  const rule = grade60 ? '0.0005 fy db' : '(0.0009 fy − 24) db';
  let inches = Math.max(coefficient * db, 12);
  const trail = [
    aciCompression(`Compression lap ${rule}, not less than 12 in`, inchText(inches * MM_PER_INCH)),
  ];
  if (mpaToPsi(positive('f’c', query.fcMPa)) < 3000 - 1e-6) {
    inches *= 4 / 3;
    trail.push(aciCompression('f’c below 3000 psi: one third more', inchText(inches * MM_PER_INCH)));
  }
  if (fy > 81_000) {
    const tension = positive('tension lap', given('tension lap', query.tensionLapMm)) / MM_PER_INCH;
    inches = Math.max(inches, tension);
    trail.push(
      aciCompression('fy above 80 000 psi: not less than the tension lap', inchText(inches * MM_PER_INCH)),
    );
  }
  if (query.largerBar) {
    if (positive('larger bar', query.largerBar.diameterMm) < query.diameterMm) {
      throw new ConcreteError('larger bar', 'It is the smaller one.');
    }
    const ldc = positive('compression development', query.largerBar.compressionDevelopmentMm) / MM_PER_INCH;
    inches = Math.max(inches, ldc);
    trail.push(
      aciCompression('Two sizes: not less than ldc of the larger bar', inchText(inches * MM_PER_INCH)),
    );
  }
  return { lengthMm: inches * MM_PER_INCH, trail };
}

const enLap = trailSource('EN 1992-1-1, 8.7.3', '2004', 'seen');
const enAlpha6 = trailSource('EN 1992-1-1, Table 8.3', '2004', 'seen');

/** Rows of EN 1992-1-1 Table 8.3: share lapped in one section (%), and α6. */
const ALPHA_6: readonly (readonly [number, number])[] = [
  [25, 1],
  [33, 1.15],
  [50, 1.4],
];

/**
 * α6 for the share of bars lapped in one section (those whose laps lie within 0.65 l0 of its middle), EN 1992-1-1
 * Table 8.3: below 25 % 1.0, 33 % 1.15, 50 % 1.4, above 50 % 1.5, interpolated between the rows.
 * @param sharePercent 0 to 100
 */
export function enAlpha6Factor(sharePercent: number): { alpha6: number; trail: TrailStep[] } {
  const share = between('share lapped', sharePercent, 0, 100);
  const alpha6 = alpha6Of(share);
  return {
    alpha6,
    trail: [enAlpha6(`α6 for ${numberText(share)} % lapped in one section`, numberText(alpha6, 3))],
  };
}

function alpha6Of(share: number): number {
  if (!atMost(share, 50)) return 1.5;
  for (let index = 1; index < ALPHA_6.length; index += 1) {
    const [from, low] = ALPHA_6[index - 1] ?? [0, 1];
    const [to, high] = ALPHA_6[index] ?? [50, 1.4];
    if (share <= from) return low;
    if (share <= to) return low + ((share - from) / (to - from)) * (high - low);
  }
  return 1.4;
}

/**
 * Lap length l0 = α1 α2 α3 α5 α6 lb,rqd ≥ l0,min in mm, EN 1992-1-1 8.7.3; l0,min is the greatest of 0.3 α6 lb,rqd, 15 φ
 * and 200 mm. α1 to α5 are the designer's; 1 is the safe value of each.
 * @throws ConcreteError where a value is no number, a factor is outside its table, or the strength class is unknown
 */
export function enLapLength(
  query: EnBond & Omit<EnAlphas, 'alpha4'> & { sigmaSdMPa: number; sharePercent: number },
): RequiredLap & { basicMm: number; alpha6: number } {
  const basic = enBasicAnchorage(query);
  const a = checkedAlphas(query);
  const { alpha6, trail: alphaTrail } = enAlpha6Factor(query.sharePercent);
  const product = a.alpha1 * a.alpha2 * a.alpha3 * a.alpha5 * alpha6;
  const leastMm = Math.max(0.3 * alpha6 * basic.lengthMm, 15 * query.diameterMm, 200);
  const lengthMm = Math.max(product * basic.lengthMm, leastMm);
  const trail = [
    ...basic.trail,
    ...alphaTrail,
    arithmetic('α1 α2 α3 α5 α6', numberText(product, 3)),
    enLap('l0,min = greatest of 0.3 α6 lb,rqd, 15 φ, 200 mm', `${numberText(leastMm, 1)} mm`),
    enLap('l0 = α1 α2 α3 α5 α6 lb,rqd', `${numberText(lengthMm, 1)} mm`),
  ];
  if (query.diameterMm > 32) {
    const large = trailSource('EN 1992-1-1, 8.8', '2004', 'memory');
    trail.push(large('Bars over 32 mm are generally not lapped', 'the engineer confirms the lap'));
  }
  return { lengthMm, basicMm: basic.lengthMm, alpha6, trail };
}

/** How much shorter than required a lap may be placed. */
export type LapToleranceRule = 'none' | 'aci-117-10' | 'en-13670' | { minusMm: number };

/**
 * What a placed lap (or an embedded length) may fall short by, mm, as an amount. ACI 117-10 2.2.8: 1 in to #11, 2 in for
 * #14 and #18; EN 13670 10.6: 0.06 l. Both from memory, check against the edition in force. A required minimum from
 * the contract usually carries no tolerance: "none".
 */
export function lapTolerance(
  rule: LapToleranceRule,
  bar: { diameterMm: number; requiredMm: number; showIn?: LengthUnit },
): { minusMm: number; leastMm: number; trail: TrailStep[] } {
  const required = positive('lap length', bar.requiredMm);
  const diameter = positive('bar diameter', bar.diameterMm);
  const showIn = bar.showIn ?? 'mm';
  const answer = (minusMm: number, step: TrailStep) => {
    if (finite('lap tolerance', minusMm) < 0)
      throw new ConcreteError('lap tolerance', 'It may not be below zero.');
    if (minusMm >= required) throw new ConcreteError('lap tolerance', 'It is as large as the lap.');
    const leastMm = required - minusMm;
    const least = arithmetic(
      'Least accepted lap',
      lengthArithmetic([required, minusMm], '−', leastMm, showIn),
    );
    return { minusMm, leastMm, trail: [step, least] };
  };
  if (typeof rule === 'object') {
    return answer(rule.minusMm, fromContract('Lap tolerance', `−${withUnit(rule.minusMm, showIn)}`));
  }
  switch (rule) {
    case 'none':
      return answer(0, fromContract('Lap tolerance', 'none'));
    case 'aci-117-10': {
      const large = usBarNumber(diameter) > 11;
      const source = trailSource('ACI 117-10, 2.2.8', '2010', 'memory');
      const size = large ? '#14 and #18' : 'to #11';
      return answer(
        (large ? 2 : 1) * MM_PER_INCH,
        source(`Lap tolerance, ${size}`, large ? '−2 in' : '−1 in'),
      );
    }
    case 'en-13670': {
      const source = trailSource('EN 13670, 10.6, figure 4 c', '2009', 'memory');
      return answer(
        0.06 * required,
        source('Lap tolerance −0.06 l', `−${numberText(0.06 * required, 1)} mm`),
      );
    }
    default:
      throw unknownChoice('lap tolerance', rule);
  }
}
