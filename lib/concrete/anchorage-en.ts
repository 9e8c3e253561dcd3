import { between, finite, positive, unknownChoice } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { numberText } from '@/lib/concrete/number-text';
import type { TrailStep } from '@/lib/concrete/trail';
import { arithmetic, trailSource } from '@/lib/concrete/trail-source';

/** Strength classes of EN 206 with fctk,0.05 in MPa, EN 1992-1-1 Table 3.1. */
const FCTK_005 = {
  'C12/15': 1.1,
  'C16/20': 1.3,
  'C20/25': 1.5,
  'C25/30': 1.8,
  'C30/37': 2.0,
  'C35/45': 2.2,
  'C40/50': 2.5,
  'C45/55': 2.7,
  'C50/60': 2.9,
  'C55/67': 3.0,
  'C60/75': 3.1,
  'C70/85': 3.2,
  'C80/95': 3.4,
  'C90/105': 3.5,
} as const;
export type StrengthClass = keyof typeof FCTK_005;
export const strengthClasses = Object.keys(FCTK_005) as readonly StrengthClass[];

/** Classes whose tensile strength no source at hand showed. */
const FCTK_MEMORY: readonly StrengthClass[] = ['C16/20', 'C35/45', 'C55/67', 'C90/105'];

const enBond = trailSource('EN 1992-1-1, 8.4.2', '2004', 'seen');
const enAnchorage = trailSource('EN 1992-1-1, 8.4.3', '2004', 'seen');
const enDesign = trailSource('EN 1992-1-1, 8.4.4', '2004', 'memory');
const enTable31 = trailSource('EN 1992-1-1, Table 3.1', '2004', 'seen');
const enTable31Memory = trailSource('EN 1992-1-1, Table 3.1', '2004', 'memory');

/** Tensile strength that bond is computed from; the class is refused when no table row knows it. */
export interface EnBond {
  strengthClass: StrengthClass;
  diameterMm: number;
  condition: 'good' | 'other';
  gammaC?: number;
  alphaCt?: number;
  /** EN 1992-1-1 8.4.2(2) holds fctk,0.05 at C60/75 unless the bond of stronger concrete is verified. */
  bondVerifiedAboveC60?: boolean;
}

/**
 * Bond condition, EN 1992-1-1 figure 8.2: good for bars up to 250 mm above the underside as cast, for any bar of a
 * member up to 250 mm deep, for bars inclined 45° to 90°, and in members over 600 mm deep below the top 300 mm.
 * The 300 mm row is from memory, check against the edition in force.
 */
export function enBondCondition(place: {
  depthMm: number;
  aboveUndersideMm: number;
  inclinationDegrees: number;
}): { condition: 'good' | 'other'; trail: TrailStep[] } {
  const depth = positive('member depth', place.depthMm);
  const above = between('height of the bar', place.aboveUndersideMm, 0, depth);
  const inclined = between('inclination', place.inclinationDegrees, 0, 90) >= 45;
  const good =
    inclined || depth <= 250 || above <= 250 || (depth > 600 && depth - above >= 300)
      ? ('good' as const)
      : 'other';
  const figure = trailSource('EN 1992-1-1, figure 8.2', '2004', depth > 600 ? 'memory' : 'partly-seen');
  const value = `h = ${numberText(depth)} mm, bar ${numberText(above)} mm above the underside: ${good}`;
  return { condition: good, trail: [figure('Bond condition', value)] };
}

/** Design bond strength fbd = 2.25 η1 η2 fctd in MPa, EN 1992-1-1 8.4.2(2). */
export function enBondStrength(bond: EnBond): { fbdMPa: number; trail: TrailStep[] } {
  const tabled: number | undefined = FCTK_005[bond.strengthClass];
  if (tabled === undefined) throw unknownChoice('strength class', bond.strengthClass);
  const diameter = positive('bar diameter', bond.diameterMm);
  if (diameter >= 132) throw new ConcreteError('bar diameter', 'No bar is that large.');
  const gammaC = positive('γc', bond.gammaC ?? 1.5);
  const alphaCt = positive('αct', bond.alphaCt ?? 1);
  const fctk = bond.bondVerifiedAboveC60 ? tabled : Math.min(tabled, FCTK_005['C60/75']);
  const fctd = (alphaCt * fctk) / gammaC;
  const eta1 = bond.condition === 'good' ? 1 : 0.7;
  const eta2 = diameter <= 32 ? 1 : (132 - diameter) / 100;
  const fbdMPa = 2.25 * eta1 * eta2 * fctd;
  const table = FCTK_MEMORY.includes(bond.strengthClass) ? enTable31Memory : enTable31;
  const capped =
    fctk < tabled ? 'Held at C60/75: the bond of stronger concrete has to be verified.' : undefined;
  const product = `2.25 × ${eta1} × ${numberText(eta2, 3)} × ${numberText(fctd, 4)} = ${numberText(fbdMPa, 3)} MPa`;
  return {
    fbdMPa,
    trail: [
      table(`fctk,0.05 of ${bond.strengthClass}`, `${numberText(fctk)} MPa`, capped),
      enBond('fbd = 2.25 η1 η2 fctd, fctd = αct fctk,0.05/γc', product),
    ],
  };
}

/** Basic required anchorage length lb,rqd = φ/4 · σsd/fbd in mm, EN 1992-1-1 8.4.3(2). */
export function enBasicAnchorage(bond: EnBond & { sigmaSdMPa: number }): {
  lengthMm: number;
  fbdMPa: number;
  trail: TrailStep[];
} {
  const { fbdMPa, trail } = enBondStrength(bond);
  const sigma = positive('σsd', bond.sigmaSdMPa);
  const lengthMm = (bond.diameterMm / 4) * (sigma / fbdMPa);
  const value = `${numberText(bond.diameterMm)}/4 × ${numberText(sigma)}/${numberText(fbdMPa, 3)} = ${numberText(lengthMm, 1)} mm`;
  return { lengthMm, fbdMPa, trail: [...trail, enAnchorage('lb,rqd = φ/4 · σsd/fbd', value)] };
}

/** The factors α1 to α5 of EN 1992-1-1 Table 8.2, as the designer sets them; 1 is the safe value of each. */
export interface EnAlphas {
  alpha1?: number;
  alpha2?: number;
  alpha3?: number;
  alpha4?: number;
  alpha5?: number;
}

/** The alphas filled in and checked: each from 0.7 to 1, and α2 α3 α5 not below 0.7. */
export function checkedAlphas(alphas: EnAlphas): Required<EnAlphas> {
  const within = (name: string, value: number | undefined) => between(name, finite(name, value ?? 1), 0.7, 1);
  const checked = {
    alpha1: within('α1', alphas.alpha1),
    alpha2: within('α2', alphas.alpha2),
    alpha3: within('α3', alphas.alpha3),
    alpha4: within('α4', alphas.alpha4),
    alpha5: within('α5', alphas.alpha5),
  };
  if (checked.alpha2 * checked.alpha3 * checked.alpha5 < 0.7 - 1e-9) {
    throw new ConcreteError('α2 α3 α5', 'Their product may not be below 0.7.');
  }
  return checked;
}

/**
 * Design anchorage length lbd = α1 α2 α3 α4 α5 lb,rqd ≥ lb,min in mm, EN 1992-1-1 8.4.4; lb,min is the greatest of
 * 0.3 lb,rqd (0.6 in compression), 10 φ and 100 mm. From memory, check against the edition in force.
 */
export function enAnchorageLength(
  query: EnBond & EnAlphas & { sigmaSdMPa: number; inCompression: boolean },
): { lengthMm: number; basicMm: number; trail: TrailStep[] } {
  const basic = enBasicAnchorage(query);
  const a = checkedAlphas(query);
  const product = a.alpha1 * a.alpha2 * a.alpha3 * a.alpha4 * a.alpha5;
  const leastMm = Math.max((query.inCompression ? 0.6 : 0.3) * basic.lengthMm, 10 * query.diameterMm, 100);
  const lengthMm = Math.max(product * basic.lengthMm, leastMm);
  return {
    lengthMm,
    basicMm: basic.lengthMm,
    trail: [
      ...basic.trail,
      arithmetic('α1 α2 α3 α4 α5', numberText(product, 3)),
      enDesign(
        'lb,min = greatest of 0.3 lb,rqd (0.6 in compression), 10 φ, 100 mm',
        `${numberText(leastMm, 1)} mm`,
      ),
      enDesign('lbd = α1 α2 α3 α4 α5 lb,rqd', `${numberText(lengthMm, 1)} mm`),
    ],
  };
}
