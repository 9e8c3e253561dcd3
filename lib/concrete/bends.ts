import { positive, unknownChoice } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { againstLimits, type LimitFinding } from '@/lib/concrete/limit-verdict';
import { atMost, formatLength, MM_PER_INCH, withUnit, type LengthUnit } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import type { TrailStep } from '@/lib/concrete/trail';
import { trailSource } from '@/lib/concrete/trail-source';
import { usBarNumber } from '@/lib/concrete/us-bar-number';

export type BendBasis = 'aci-318-19' | 'en-1992-1-1' | 'bs-8666';
/** A main bar with a standard hook, or a stirrup, tie or hoop. */
export type BendUse = 'main' | 'tie';

const aciMain = trailSource('ACI 318-19, Table 25.3.1', '2019', 'partly-seen');
const aciMainDiameter = trailSource('ACI 318-19, Table 25.3.1', '2019', 'memory');
const aciTieDiameter = trailSource('ACI 318-19, Table 25.3.2', '2019', 'memory');
const aciTie = trailSource('ACI 318-19, Table 25.3.2', '2019', 'partly-seen');
const en = trailSource('EN 1992-1-1, Table 8.1N', '2004', 'seen');
const bs = trailSource('BS 8666, Table 2', '2005/2020', 'memory');

function aciFactor(use: BendUse, number: number): number {
  if (use === 'main') return number <= 8 ? 6 : number <= 11 ? 8 : 10;
  if (number > 8) throw new ConcreteError('bar diameter', 'ACI tables no stirrup or tie above #8.');
  return number <= 5 ? 4 : 6;
}

/**
 * Least inside diameter of a bend, mm.
 * - ACI 318-19 Tables 25.3.1 and 25.3.2: main bars 6 db to #8, 8 db to #11, 10 db for #14 and #18; stirrups, ties and
 *   hoops 4 db to #5, 6 db to #8. Diameters from memory, check against the edition in force.
 * - EN 1992-1-1 Table 8.1N: 4 φ to 16 mm, 7 φ above; the concrete inside the bend (8.3) is the designer's check.
 * - BS 8666 Table 2, from memory: radius 2 d to 16 mm and 3.5 d above, cut to whole mm.
 */
export function leastBendDiameter(query: {
  basis: BendBasis;
  use: BendUse;
  diameterMm: number;
  /** Unit of the trail where the basis is ACI 318-19; the others are metric. */
  showIn?: LengthUnit;
}): {
  leastMm: number;
  factor: number;
  trail: TrailStep[];
} {
  const diameter = positive('bar diameter', query.diameterMm);
  switch (query.basis) {
    case 'aci-318-19': {
      const factor = aciFactor(query.use, usBarNumber(diameter));
      const leastMm = factor * diameter;
      const source = query.use === 'main' ? aciMainDiameter : aciTieDiameter;
      const showIn = query.showIn ?? 'mm';
      const value = `${factor} × ${formatLength(diameter, showIn)} = ${withUnit(leastMm, showIn)}`;
      return {
        leastMm,
        factor,
        trail: [source(`Least inside bend diameter ${factor} db`, value)],
      };
    }
    case 'en-1992-1-1': {
      const factor = atMost(diameter, 16) ? 4 : 7;
      const leastMm = factor * diameter;
      const value = `${factor} × ${numberText(diameter)} = ${numberText(leastMm)} mm`;
      const note =
        'Concrete inside the bend: the designer’s check, unless the bar ends within 5 φ or a bar lies in it.';
      return { leastMm, factor, trail: [en(`Least mandrel diameter ${factor} φ`, value, note)] };
    }
    case 'bs-8666': {
      const { radiusMm, factor, trail } = leastScheduledRadius(diameter);
      return { leastMm: 2 * radiusMm, factor: 2 * factor, trail };
    }
    default:
      throw unknownChoice('basis', query.basis);
  }
}

/** Least scheduling radius of BS 8666 Table 2 in mm, from memory, check against the edition in force. */
export function leastScheduledRadius(diameterMm: number): {
  radiusMm: number;
  factor: number;
  trail: TrailStep[];
} {
  const diameter = positive('bar diameter', diameterMm);
  const factor = atMost(diameter, 16) ? 2 : 3.5;
  const radiusMm = Math.floor(factor * diameter + 1e-9);
  return { radiusMm, factor, trail: [bs(`Least scheduling radius ${factor} d`, `${radiusMm} mm`)] };
}

/** Least overall dimension between two bends, BS 8666 figure 6: 10 d to 16 mm, 13 d above (mm). */
export function leastBetweenBends(diameterMm: number): { leastMm: number; trail: TrailStep[] } {
  const diameter = positive('bar diameter', diameterMm);
  const factor = atMost(diameter, 16) ? 10 : 13;
  const figure = trailSource('BS 8666, figure 6', '2005', 'seen');
  const leastMm = factor * diameter;
  return { leastMm, trail: [figure(`Between two bends at least ${factor} d`, `${numberText(leastMm)} mm`)] };
}

export type HookAngle = 90 | 135 | 180;

/**
 * Straight extension past the bend of a standard hook, mm, ACI 318-19 Tables 25.3.1 and 25.3.2: main bars 90° 12 db, 180°
 * max(4 db, 2.5 in); ties 90° max(6 db, 3 in) to #5 and 12 db from #6 to #8, 135° max(6 db, 3 in), 180° max(4 db, 2.5 in).
 * @throws ConcreteError for a main bar at 135°, which is no standard hook
 */
export function hookExtension(query: {
  use: BendUse;
  angle: HookAngle;
  diameterMm: number;
  showIn?: LengthUnit;
}): {
  leastMm: number;
  trail: TrailStep[];
} {
  const diameter = positive('bar diameter', query.diameterMm);
  const number = usBarNumber(diameter);
  if (query.use === 'tie' && number > 8) {
    throw new ConcreteError('bar diameter', 'ACI tables no stirrup or tie above #8.');
  }
  const source = query.use === 'main' ? aciMain : aciTie;
  const answer = (times: number, inches: number) => {
    const leastMm = Math.max(times * diameter, inches * MM_PER_INCH);
    const rule = inches > 0 ? `greater of ${times} db and ${numberText(inches)} in` : `${times} db`;
    return {
      leastMm,
      trail: [
        source(`Extension of a ${query.angle}° hook: ${rule}`, withUnit(leastMm, query.showIn ?? 'mm')),
      ],
    };
  };
  switch (query.angle) {
    case 180:
      return answer(4, 2.5);
    case 90:
      return query.use === 'tie' && number <= 5 ? answer(6, 3) : answer(12, 0);
    case 135:
      if (query.use === 'main')
        throw new ConcreteError('hook angle', '135° is a hook of ties, not of main bars.');
      return answer(6, 3);
    default:
      throw unknownChoice('hook angle', query.angle);
  }
}

/** A measured inside bend diameter (mm) against the least. */
export function judgeBend(insideDiameterMm: number, leastMm: number): LimitFinding {
  const inside = positive('inside diameter of the bend', insideDiameterMm);
  return againstLimits('Inside diameter of the bend', inside, { least: positive('least diameter', leastMm) });
}

/** Bending or straightening on the site: never for FRP, otherwise only as the engineer of record permits in writing. */
export function judgeFieldBend(bend: {
  material: 'steel' | 'stainless' | 'frp';
  permittedByEngineer: boolean;
}): LimitFinding & { trail: TrailStep[] } {
  const frp = trailSource('ACI 440.5, 3.2', '2008', 'seen');
  const steel = trailSource('ACI 318-19, 26.6.3', '2019', 'memory');
  if (bend.material === 'frp') {
    const reason = 'FRP bars are bent in the factory, before they cure, and never on the site.';
    return { verdict: 'not-met', side: null, reason, trail: [frp('Field bending of FRP', 'not permitted')] };
  }
  const trail = [
    steel('Bars partly in concrete are not field bent, except as the engineer permits', 'permission'),
  ];
  return bend.permittedByEngineer
    ? { verdict: 'met', side: null, reason: 'Bent on the site as the engineer permitted.', trail }
    : {
        verdict: 'not-met',
        side: null,
        reason: 'Bent on the site without the engineer’s permission.',
        trail,
      };
}
