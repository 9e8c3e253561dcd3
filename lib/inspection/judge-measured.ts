import { isSameBar } from '@/lib/concrete/bars';
import { judgeEpoxyCoating, judgeFrpDamage } from '@/lib/concrete/coatings';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { judgeFibreTicket } from '@/lib/concrete/fibres';
import { judgeLimits } from '@/lib/concrete/judge-measurement';
import type { Verdict } from '@/lib/concrete/judge-reading';
import { judgeCoupler, judgeEmbedment, judgeShareLapped } from '@/lib/concrete/lap-layout';
import { MM_PER_FOOT } from '@/lib/concrete/stress-units';
import { judgeTendonHeight } from '@/lib/concrete/tendons';
import { requiredTies } from '@/lib/concrete/ties';
import type { MeasuredValue } from './measured-value';
import type { JudgedAgainst, MeasurementItem } from './measurement-item';
import type { Plan } from './plan';

export interface JudgedMeasure {
  verdict: Verdict;
  reason: string;
  /** Distance to the nearer limit, negative beyond it; null where nothing was compared as a number. */
  margin: number | null;
  /** More than rework to the drawings can mend: the engineer decides. */
  engineer: boolean;
}
type Judged = Pick<JudgedMeasure, 'verdict' | 'reason'> & Partial<JudgedMeasure>;
type Of<Q extends MeasuredValue['quantity']> = Extract<MeasuredValue, { quantity: Q }>;

const notVerified = (reason: string): JudgedMeasure => ({
  verdict: 'not-verified',
  reason,
  margin: null,
  engineer: false,
});
const noUnit = () => notVerified('The unit is missing. State it to have this judged.');
const otherKind = () => notVerified('The value is not of the kind that the plan asks for.');

/** Judges one measured value by what the plan froze for its item. Impossible values are not verified, and say why. */
export function judgeMeasured(
  item: MeasurementItem,
  value: MeasuredValue,
  plan: Pick<Plan, 'units' | 'basis'>,
): JudgedMeasure {
  if (value.quantity !== item.quantity) return otherKind();
  try {
    const { verdict, reason, margin = null, engineer = false } = judgeOf(item, value, plan);
    return { verdict, reason, margin, engineer };
  } catch (error) {
    if (error instanceof ConcreteError) return notVerified(`${capital(error.field)}: ${error.reason}`);
    throw error;
  }
}

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1);

function judgeOf(
  item: MeasurementItem,
  value: MeasuredValue,
  { units, basis }: Pick<Plan, 'units' | 'basis'>,
): Judged {
  switch (value.quantity) {
    case 'length':
      return value.length.mm === null ? noUnit() : judgeLimits(value.length.mm, item, units);
    case 'count':
      return judgeCount(item, value.count);
    case 'share':
      return judgeTied(item, value);
    case 'designation':
      return judgeBar(item, value.designation, basis);
    case 'part':
      return judgeShareLapped(value.count / value.of, (item.most ?? 0) / 100);
    case 'starter':
      return value.length.mm === null
        ? noUnit()
        : judgeEmbedment(
            { measuredMm: value.length.mm, leastMm: item.least ?? 0, pulled: value.pulled },
            units,
          );
    case 'coupler':
      return judgeBy(item, 'coupler', (planned) =>
        judgeCoupler({
          plannedType: planned.type,
          foundType: value.type,
          witnessMarks: value.marks,
          exposedThreads: value.threads,
          mostExposedThreads: planned.mostThreads,
        }),
      );
    case 'damage':
      return judgeDamage(item, value);
    case 'height':
      return judgeHeight(item, value, units);
    case 'ticket':
      return judgeBy(item, 'fibre', (planned) =>
        judgeFibreTicket(
          { fibreType: value.fibreType, fibreKgPerM3: value.kgPerM3 },
          // The least was computed, with its tolerance, when the plan was issued.
          { fibreType: planned.type, fibreKgPerM3: item.least ?? 0, minusPercent: 0 },
        ),
      );
  }
}

function judgeBy<B extends JudgedAgainst['by']>(
  item: MeasurementItem,
  by: B,
  judge: (planned: Extract<JudgedAgainst, { by: B }>) => Judged,
): Judged {
  const planned = item.against;
  return planned?.by === by ? judge(planned as Extract<JudgedAgainst, { by: B }>) : otherKind();
}

function judgeCount({ least, most }: MeasurementItem, count: number): Judged {
  if (least === null && most === null) return notVerified('The plan sets no limit for this.');
  const margin = Math.min(least === null ? Infinity : count - least, most === null ? Infinity : most - count);
  if (least !== null && count < least)
    return { verdict: 'not-met', reason: `${count} found, at least ${least} asked for.`, margin };
  if (most !== null && count > most)
    return { verdict: 'not-met', reason: `${count} found, at most ${most} allowed.`, margin };
  return { verdict: 'met', reason: `${count} found, as asked for.`, margin };
}

/** Compared as whole ties, so that no rounding of a percentage decides. */
function judgeTied(item: MeasurementItem, { of, tied, onPerimeter, atEdge }: Of<'share'>): Judged {
  const apart = item.against?.by === 'tie-pattern' && item.against.perimeterApart;
  if (!apart && item.least === null) return notVerified('The plan sets no limit for this.');
  if (apart && (atEdge === undefined || (atEdge && onPerimeter === undefined)))
    return notVerified('Say how many of its crossings lie on the mat’s outermost rows.');
  const needed = apart
    ? requiredTies({
        pattern: { kind: 'perimeter-every' },
        intersections: of,
        onPerimeter: onPerimeter ?? 0,
      }).required
    : Math.ceil(((item.least ?? 0) / 100) * of - 1e-9);
  const edge = apart ? `, ${onPerimeter ?? 0} of them on the perimeter` : '';
  const reason = `${tied} of ${of} tied${edge}, at least ${needed} asked for.`;
  return { verdict: tied >= needed ? 'met' : 'not-met', reason, margin: (tied - needed) / of };
}

function judgeBar(item: MeasurementItem, found: string, basis: Plan['basis']): Judged {
  if (item.expected === null) return notVerified('The plan names no bar for this.');
  return isSameBar(item.expected, found, basis)
    ? { verdict: 'met', reason: `Found ${found}, as planned.` }
    : {
        verdict: 'not-met',
        reason: `Found ${found}, planned ${item.expected}. A larger bar is a departure too.`,
        engineer: true,
      };
}

function judgeDamage(item: MeasurementItem, value: Of<'damage'>): Judged {
  const planned = item.against;
  if (planned?.by !== 'epoxy' && planned?.by !== 'frp') return otherKind();
  const end = Math.max(0, ...value.spots.map((spot) => spot.fromMm + spot.lengthMm));
  const stretchMm = planned.by === 'epoxy' ? MM_PER_FOOT : 1000;
  const bar = {
    diameterMm: planned.diameterMm,
    lengthMm: value.barLengthMm ?? Math.max(end, stretchMm),
  };
  if (planned.by === 'frp') return judgeFrpDamage(bar, value.spots, planned.mostPercent);
  const found = judgeEpoxyCoating(bar, value, planned);
  switch (found.outcome) {
    case 'sound':
      return { verdict: 'met', reason: 'No damage left open; patches are within their limit.' };
    case 'repair':
      return {
        verdict: 'not-met',
        reason: `${found.reasons.join(' ')} It is repaired and looked at again before the pour.`,
      };
    case 'more-than-repair':
      return {
        verdict: 'not-met',
        reason: `${found.reasons.join(' ')} This is more than a repair of the coating.`,
        engineer: true,
      };
  }
}

function judgeHeight(item: MeasurementItem, value: Of<'height'>, units: Plan['units']): Judged {
  const { mm } = value.length;
  if (mm === null) return noUnit();
  const { least, most } = item;
  if (least === null || most === null) return notVerified('The plan sets no band for this.');
  return judgeBy(item, 'datum', ({ from, to }) => {
    const planned = (least + most) / 2;
    const band = (most - least) / 2;
    return judgeTendonHeight(
      { from: value.from, to: value.to, heightMm: mm },
      { from, to, heightMm: planned, minusMm: band, plusMm: band },
      units,
    );
  });
}
