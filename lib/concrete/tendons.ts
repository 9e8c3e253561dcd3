import { between, finite, notNegative, positive, unknownChoice } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { againstLimits, type LimitFinding } from '@/lib/concrete/limit-verdict';
import { formatLength, MM_PER_INCH, withUnit, type LengthUnit } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import type { TrailStep } from '@/lib/concrete/trail';
import { arithmetic, fromContract, trailSource } from '@/lib/concrete/trail-source';

/** Where a tendon's height is taken from, and to which part of it. Both belong to the number. */
export interface TendonDatum {
  from: 'soffit' | 'top';
  to: 'underside' | 'centre' | 'topside';
}

export type TendonBandRule = 'aci-117-10' | 'as-3600' | { minusMm: number; plusMm: number };

const aci117 = trailSource('ACI 117-10, section 2', '2010', 'memory');
const as3600 = trailSource('AS 3600, 17.5.3(b)', '2009/2018', 'memory');

/**
 * Band of a tendon's height, mm, as amounts. ACI 117-10 by member depth: 1/4 in to 8 in, 3/8 in to 24 in, 1/2 in above;
 * AS 3600: 5 mm. Both from memory, check against the edition in force; the plan may set its own minus and plus.
 */
export function tendonBand(
  rule: TendonBandRule,
  memberDepthMm: number,
  showIn: LengthUnit = 'mm',
): { minusMm: number; plusMm: number; trail: TrailStep[] } {
  const depth = positive('member depth', memberDepthMm);
  if (typeof rule === 'object') {
    const minusMm = notNegative('minus tolerance', rule.minusMm);
    const plusMm = notNegative('plus tolerance', rule.plusMm);
    const value = `−${formatLength(minusMm, showIn)} / +${withUnit(plusMm, showIn)}`;
    return { minusMm, plusMm, trail: [fromContract('Tendon height band', value)] };
  }
  switch (rule) {
    case 'aci-117-10': {
      const [inches, row] =
        depth <= 8 * MM_PER_INCH + 1e-6
          ? [0.25, 'depth to 8 in']
          : depth <= 24 * MM_PER_INCH + 1e-6
            ? [0.375, 'depth over 8 to 24 in']
            : [0.5, 'depth over 24 in'];
      const band = inches * MM_PER_INCH;
      return { minusMm: band, plusMm: band, trail: [aci117(`Tendon height, ${row}`, `± ${inches} in`)] };
    }
    case 'as-3600':
      return { minusMm: 5, plusMm: 5, trail: [as3600('Tendon profile', '± 5 mm')] };
    default:
      throw unknownChoice('tendon band', rule);
  }
}

/**
 * A tendon height at a high or a low point. Where it was taken from another surface, or to another part of the tendon,
 * than the plan says, it is not verified: the duct's diameter between the two is as large as the band.
 */
export function judgeTendonHeight(
  measured: TendonDatum & { heightMm: number },
  planned: TendonDatum & { heightMm: number; minusMm: number; plusMm: number },
  unit: LengthUnit = 'mm',
): LimitFinding & { trail: TrailStep[] } {
  const height = finite('measured height', measured.heightMm);
  const specified = positive('planned height', planned.heightMm);
  const least = specified - notNegative('minus tolerance', planned.minusMm);
  const most = specified + notNegative('plus tolerance', planned.plusMm);
  const trail = [
    fromContract(`Height from ${planned.from} to ${planned.to} of the tendon`, withUnit(specified, unit)),
    arithmetic('Band', `${formatLength(least, unit)} to ${withUnit(most, unit)}`),
  ];
  if (measured.from !== planned.from || measured.to !== planned.to) {
    const reason =
      `Measured from ${measured.from} to ${measured.to}, ` +
      `the plan has it from ${planned.from} to ${planned.to}: measure again.`;
    return { verdict: 'not-verified', side: null, reason, trail };
  }
  return { ...againstLimits('Tendon height', height, { least, most }, unit), trail };
}

/**
 * Height of a tendon between a low and a high point, on one parabola with its vertex at the vertex point:
 * y = y(vertex) + (y(other) − y(vertex)) (Δx / L)². For support bars between the two; lengths in mm.
 */
export function tendonHeightBetween(query: {
  vertexHeightMm: number;
  otherHeightMm: number;
  runMm: number;
  fromVertexMm: number;
}): { heightMm: number; trail: TrailStep[] } {
  const vertex = notNegative('height at the vertex', query.vertexHeightMm);
  const other = notNegative('height at the other point', query.otherHeightMm);
  const run = positive('distance of the two points', query.runMm);
  const x = between('distance from the vertex', query.fromVertexMm, 0, run);
  const heightMm = vertex + (other - vertex) * (x / run) ** 2;
  const value = `${numberText(vertex)} + (${numberText(other)} − ${numberText(vertex)}) × (${numberText(x)}/${numberText(run)})²`;
  return {
    heightMm,
    trail: [arithmetic('Parabola from the vertex', `${value} = ${numberText(heightMm, 2)} mm`)],
  };
}

/** The same height to another part of the tendon, so that plan and tape speak of the same steel. */
export function tendonHeightTo(
  height: TendonDatum & { heightMm: number },
  to: TendonDatum['to'],
  ductDiameterMm: number,
): { heightMm: number; trail: TrailStep[] } {
  const diameter = positive('duct diameter', ductDiameterMm);
  const rank = { underside: 0, centre: 0.5, topside: 1 };
  const step = (rank[to] - rank[height.to]) * diameter;
  const moved = positive('height', height.heightMm) + (height.from === 'soffit' ? step : -step);
  if (moved <= 0) throw new ConcreteError('height', 'The tendon would lie outside the member.');
  const value = `${numberText(height.heightMm, 2)} to ${numberText(moved, 2)} mm, duct ${numberText(diameter, 2)} mm`;
  return { heightMm: moved, trail: [arithmetic(`From ${height.to} to ${to} of the tendon`, value)] };
}
