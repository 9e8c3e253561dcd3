import { notNegative, positive, whole } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { atLeast, MM_PER_INCH } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import { mpaToPsi } from '@/lib/concrete/stress-units';
import type { TrailStep } from '@/lib/concrete/trail';
import { trailSource } from '@/lib/concrete/trail-source';
import { usBarNumber } from '@/lib/concrete/us-bar-number';

const factors = trailSource('ACI 318-19, Table 25.4.2.5', '2019', 'partly-seen');
const factorsFromMemory = trailSource('ACI 318-19, Table 25.4.2.5', '2019', 'memory');
const simple = trailSource('ACI 318-19, Table 25.4.2.3', '2019', 'seen');
const general = trailSource('ACI 318-19, 25.4.2.4', '2019', 'partly-seen');
const least = trailSource('ACI 318-19, 25.4.2.1', '2019', 'partly-seen');
const compression = trailSource('ACI 318-19, 25.4.9.2', '2019', 'memory');

/** Coating as the development of a bar sees it. */
export type DevelopmentCoating = 'uncoated' | 'galvanised' | 'epoxy';

/** What every ACI development length is computed from. Lengths in mm, stresses in MPa. */
export interface AciBar {
  diameterMm: number;
  fyMPa: number;
  fcMPa: number;
  lightweight: boolean;
  coating: DevelopmentCoating;
  /** More than 12 in of fresh concrete is placed below the (horizontal) bar. */
  topBar: boolean;
  /** Clear cover and clear spacing of the bars, mm: they decide the factor of an epoxy coating and the simple case. */
  clearCoverMm: number;
  clearSpacingMm: number;
}

/**
 * The factors of ACI 318-19 Table 25.4.2.5, with √f'c in psi, capped at 100 (25.4.1.4). ψt, ψs, ψg and the cap of ψt ψe
 * are from memory, check against the edition in force.
 */
interface AciFactors {
  psiT: number;
  psiE: number;
  /** ψt ψe, capped at 1.7. */
  psiTE: number;
  psiS: number;
  psiG: number;
  lambda: number;
  rootFcPsi: number;
  fyPsi: number;
  dbIn: number;
  steps: TrailStep[];
}

/** Slack for grade limits, psi: 420 MPa is sold as Grade 60 and is 60 916 psi. */
const GRADE_SLACK_PSI = 1_000;

function gradeFactor(fyPsi: number): number {
  if (fyPsi <= 60_000 + GRADE_SLACK_PSI) return 1;
  if (fyPsi <= 80_000 + GRADE_SLACK_PSI) return 1.15;
  if (fyPsi <= 100_000 + GRADE_SLACK_PSI) return 1.3;
  throw new ConcreteError('fy', 'It is above Grade 100, the highest grade of the ACI table.');
}

function aciFactors(bar: AciBar): AciFactors {
  const diameter = positive('bar diameter', bar.diameterMm);
  const fyPsi = mpaToPsi(positive('fy', bar.fyMPa));
  const rootFcPsi = Math.min(Math.sqrt(mpaToPsi(positive('f’c', bar.fcMPa))), 100);
  const cover = notNegative('clear cover', bar.clearCoverMm);
  const spacing = notNegative('clear spacing', bar.clearSpacingMm);
  const psiT = bar.topBar ? 1.3 : 1;
  const tight = !atLeast(cover, 3 * diameter) || !atLeast(spacing, 6 * diameter);
  const psiE = bar.coating === 'epoxy' ? (tight ? 1.5 : 1.2) : 1;
  const psiTE = Math.min(psiT * psiE, 1.7);
  const psiS = usBarNumber(diameter) <= 6 ? 0.8 : 1;
  const psiG = gradeFactor(fyPsi);
  const lambda = bar.lightweight ? 0.75 : 1;
  const steps = [
    factorsFromMemory('Casting position ψt (more than 12 in of concrete below)', numberText(psiT)),
    factors('Coating ψe (cover below 3 db or clear spacing below 6 db)', numberText(psiE)),
    factorsFromMemory('ψt ψe, at most 1.7', numberText(psiTE)),
    factorsFromMemory('Grade ψg', numberText(psiG)),
    factors('Concrete λ and √f’c, at most 100 psi', `${numberText(lambda)}; ${numberText(rootFcPsi, 3)} psi`),
  ];
  return { psiT, psiE, psiTE, psiS, psiG, lambda, rootFcPsi, fyPsi, dbIn: diameter / MM_PER_INCH, steps };
}

/** A development length, with the value before the least of 12 in that a lap is computed from. */
export interface DevelopmentLength {
  lengthMm: number;
  beforeLeastMm: number;
  trail: TrailStep[];
}

function withLeast(inches: number, trail: TrailStep[]): DevelopmentLength {
  const length = Math.max(inches, 12);
  const value = `${numberText(length)} in = ${numberText(length * MM_PER_INCH, 1)} mm`;
  return {
    lengthMm: length * MM_PER_INCH,
    beforeLeastMm: inches * MM_PER_INCH,
    trail: [...trail, least('Development length ld, not less than 12 in', value)],
  };
}

/** How the simple table sees the bars: its first two cases, or all other cases. */
export type SimpleCase = 'confined' | 'other';

/**
 * Which case of ACI 318-19 Table 25.4.2.3 applies. Confined: clear cover at least db, and clear spacing at least db with
 * stirrups or ties of the code's minimum along ld, or clear spacing at least 2 db without them.
 */
export function simpleCase(bar: AciBar, codeTiesAlongLength: boolean): SimpleCase {
  const { diameterMm, clearCoverMm, clearSpacingMm } = bar;
  const wide = atLeast(clearSpacingMm, (codeTiesAlongLength ? 1 : 2) * diameterMm);
  return atLeast(clearCoverMm, diameterMm) && wide ? 'confined' : 'other';
}

/**
 * Tension development length by the simple table, ACI 318-19 25.4.2.3:
 * ld = fy ψt ψe ψg / (X λ √f'c) db, X = 25 or 20 (#6 and smaller, #7 and larger) when confined, else 50/3 or 40/3; in
 * inches and psi, not less than 12 in. Excess reinforcement (25.4.10) is not taken into account.
 * @throws ConcreteError where a value is no number, or bar or grade lie outside the table
 */
export function aciDevelopmentSimple(bar: AciBar, confinement: SimpleCase): DevelopmentLength {
  const f = aciFactors(bar);
  const small = usBarNumber(bar.diameterMm) <= 6;
  const divisor = confinement === 'confined' ? (small ? 25 : 20) : small ? 50 / 3 : 40 / 3;
  const inches = ((f.fyPsi * f.psiTE * f.psiG) / (divisor * f.lambda * f.rootFcPsi)) * f.dbIn;
  const value =
    `${numberText(f.fyPsi, 0)} × ${numberText(f.psiTE)} × ${numberText(f.psiG)} / (${numberText(divisor, 3)} × ` +
    `${numberText(f.lambda)} × ${numberText(f.rootFcPsi, 3)}) × ${numberText(f.dbIn, 3)} in = ${numberText(inches)} in`;
  const rule = `ld = fy ψt ψe ψg / (${numberText(divisor, 2)} λ √f’c) db, ${confinement} case`;
  return withLeast(inches, [...f.steps, simple(rule, value), ...highGradeStep(f.fyPsi)]);
}

/**
 * Tension development length by the general equation, ACI 318-19 25.4.2.4 (a):
 * ld = 3/40 · fy/(λ √f'c) · ψt ψe ψs ψg / ((cb + Ktr)/db) · db, in inches and psi; (cb + Ktr)/db at most 2.5,
 * Ktr = 40 Atr/(s n) or zero; not less than 12 in.
 * @param confinement cb: the lesser of centre of bar to nearest surface and half the centre spacing (mm); Atr: area of
 *   transverse steel within s that crosses the plane of splitting (mm²); s (mm); n: bars developed along that plane
 */
export function aciDevelopmentGeneral(
  bar: AciBar,
  confinement: { cbMm: number; transverse: { areaMm2: number; spacingMm: number; bars: number } | null },
): DevelopmentLength {
  const f = aciFactors(bar);
  const cb = positive('cb', confinement.cbMm) / MM_PER_INCH;
  if (cb < f.dbIn / 2)
    throw new ConcreteError('cb', 'It is less than half of the bar, so the bar is not covered.');
  let ktr = 0;
  if (confinement.transverse) {
    const { areaMm2, spacingMm, bars } = confinement.transverse;
    const area = positive('Atr', areaMm2) / MM_PER_INCH ** 2;
    ktr = (40 * area) / ((positive('s', spacingMm) / MM_PER_INCH) * whole('n', bars, 1));
  }
  const ratio = Math.min((cb + ktr) / f.dbIn, 2.5);
  const inches =
    (3 / 40) * (f.fyPsi / (f.lambda * f.rootFcPsi)) * ((f.psiTE * f.psiS * f.psiG) / ratio) * f.dbIn;
  return withLeast(inches, [
    ...f.steps,
    factorsFromMemory('Size ψs (#6 and smaller 0.8)', numberText(f.psiS)),
    general(
      '(cb + Ktr)/db, Ktr = 40 Atr/(s n), at most 2.5',
      `(${numberText(cb, 3)} + ${numberText(ktr, 3)}) / ${numberText(f.dbIn, 3)}: ${numberText(ratio, 3)}`,
    ),
    general('ld = 3/40 · fy/(λ √f’c) · ψt ψe ψs ψg / ((cb + Ktr)/db) · db', `${numberText(inches)} in`),
    ...highGradeStep(f.fyPsi),
  ]);
}

/** Grade 80 and above, closer than 6 in centre to centre, needs transverse steel: a reminder, not a computation. */
function highGradeStep(fyPsi: number): TrailStep[] {
  if (fyPsi < 80_000 - GRADE_SLACK_PSI) return [];
  const reminder = trailSource('ACI 318-19, 25.4.2.2', '2019', 'memory');
  return [
    reminder('Grade 80 and above, spaced closer than 6 in: Ktr at least 0.5 db', 'the engineer checks this'),
  ];
}

/**
 * Compression development length, ACI 318-19 25.4.9.2: the greatest of fy ψr/(50 λ √f'c) db, 0.0003 fy ψr db and 8 in,
 * with ψr = 0.75 where confined by the code's spirals or ties. From memory, check against the edition in force.
 */
export function aciDevelopmentCompression(
  bar: Pick<AciBar, 'diameterMm' | 'fyMPa' | 'fcMPa' | 'lightweight'> & { confined: boolean },
): DevelopmentLength {
  const f = aciFactors({ ...bar, coating: 'uncoated', topBar: false, clearCoverMm: 0, clearSpacingMm: 0 });
  const psiR = bar.confined ? 0.75 : 1;
  const first = ((f.fyPsi * psiR) / (50 * f.lambda * f.rootFcPsi)) * f.dbIn;
  const second = 0.0003 * f.fyPsi * psiR * f.dbIn;
  const inches = Math.max(first, second, 8);
  const value = `${numberText(first)}; ${numberText(second)}; 8 in: ${numberText(inches)} in`;
  return {
    lengthMm: inches * MM_PER_INCH,
    beforeLeastMm: Math.max(first, second) * MM_PER_INCH,
    trail: [compression('ldc = greatest of fy ψr/(50 λ √f’c) db, 0.0003 fy ψr db, 8 in', value)],
  };
}
