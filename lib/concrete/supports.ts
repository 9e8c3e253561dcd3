import { finite, given, listOf, notNegative, positive, unknownChoice } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { againstLimits, worstFinding, type LimitFinding } from '@/lib/concrete/limit-verdict';
import { formatLength, lengthArithmetic, withUnit, type LengthUnit } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import { MM_PER_FOOT } from '@/lib/concrete/stress-units';
import type { TrailStep } from '@/lib/concrete/trail';
import { arithmetic, fromContract, trailSource } from '@/lib/concrete/trail-source';
import { usBarNumber } from '@/lib/concrete/us-bar-number';

/** One slice of the section, from the top surface downwards, for the drawing beside the arithmetic. */
export interface SectionPart {
  name: string;
  kind: 'cover' | 'layer' | 'support' | 'below';
  /** Depth of the slice's upper face below the top surface, mm. */
  fromTopMm: number;
  sizeMm: number;
}

/**
 * Height of a support that carries a top mat: thickness − top cover − layers carried above the support − what the
 * support stands on (a bottom mat with its cover, a mud mat, or nothing where it stands on the form). Lengths in mm.
 * @throws ConcreteError where a length is no number or below zero, or nothing is left for the support
 */
export function supportHeight(section: {
  thicknessMm: number;
  topCoverMm: number;
  /** Bars between the top cover and the support, from the top: usually the two layers of the top mat. */
  carried: readonly { name: string; diameterMm: number }[];
  /** What lies between the underside of the section and the foot of the support, from the bottom up. */
  standsOn: readonly { name: string; sizeMm: number }[];
  /** Unit of the trail's lengths. */
  showIn?: LengthUnit;
}): { heightMm: number; parts: SectionPart[]; trail: TrailStep[] } {
  const thickness = positive('thickness', section.thicknessMm);
  const cover = notNegative('top cover', section.topCoverMm);
  if (cover >= thickness) throw new ConcreteError('top cover', 'It is as large as the section.');
  listOf('layers carried', section.carried, 1);
  const parts: SectionPart[] = [{ name: 'Top cover', kind: 'cover', fromTopMm: 0, sizeMm: cover }];
  let depth = cover;
  for (const bar of section.carried) {
    parts.push({
      name: bar.name,
      kind: 'layer',
      fromTopMm: depth,
      sizeMm: positive(bar.name, bar.diameterMm),
    });
    depth += bar.diameterMm;
  }
  const belowMm = section.standsOn.reduce((sum, part) => sum + notNegative(part.name, part.sizeMm), 0);
  const heightMm = thickness - depth - belowMm;
  if (heightMm <= 0) {
    throw new ConcreteError('thickness', 'Cover, bars and what the support stands on leave no room for it.');
  }
  parts.push({ name: 'Support', kind: 'support', fromTopMm: depth, sizeMm: heightMm });
  let fromTopMm = depth + heightMm;
  for (const part of [...section.standsOn].reverse()) {
    parts.push({ name: part.name, kind: 'below', fromTopMm, sizeMm: part.sizeMm });
    fromTopMm += part.sizeMm;
  }
  const terms = [
    thickness,
    cover,
    ...section.carried.map((bar) => bar.diameterMm),
    ...section.standsOn.map((part) => part.sizeMm),
  ];
  return {
    heightMm,
    parts,
    trail: [
      arithmetic(
        'Support height = thickness − top cover − layers carried − what it stands on',
        lengthArithmetic(terms, '−', heightMm, section.showIn ?? 'mm'),
      ),
    ],
  };
}

/**
 * Limits of a measured support height. A support that is too high takes the top cover by as much as it is too high; one
 * that is too low lowers the effective depth. So the permitted minus of the *cover* is how much too high it may be.
 * @param tolerance mm, both as amounts (not signed)
 */
export function supportHeightLimits(
  heightMm: number,
  tolerance: { coverMinusMm: number; depthMinusMm: number },
  showIn: LengthUnit = 'mm',
): { leastMm: number; mostMm: number; trail: TrailStep[] } {
  positive('support height', heightMm);
  const mostMm = heightMm + notNegative('cover tolerance', tolerance.coverMinusMm);
  const leastMm = heightMm - notNegative('effective depth tolerance', tolerance.depthMinusMm);
  if (leastMm <= 0) throw new ConcreteError('effective depth tolerance', 'It is as large as the support.');
  return {
    leastMm,
    mostMm,
    trail: [
      arithmetic(
        'Least = height − what the effective depth may lose; most = height + what the cover may lose',
        `${formatLength(leastMm, showIn)} to ${withUnit(mostMm, showIn)}`,
      ),
    ],
  };
}

export type SupportSpacingRule = 'common-practice' | 'bs-7973-2-bars' | 'bs-7973-2-fabric' | 'plan';

const usPractice = trailSource('placing practice for bar supports, by bar size', '', 'memory');
const bs7973Bars = trailSource('BS 7973-2, figure 1(a)', '2001', 'seen');
const bs7973Cap = trailSource('BS 7973-2, clause 8', '2001', 'memory');
const bs7973Fabric = trailSource('BS 7973-2, figure 1(b)', '2001', 'seen');

/**
 * Greatest spacing of supports under one layer, mm. Spacing over it fails even where the cover is met, because the mat
 * sags between supports as soon as somebody stands on it.
 *
 * Common practice by bar size (3 ft to #4, 4 ft for #5, 5 ft from #6) is from memory, check against the edition in
 * force. BS 7973-2:2001 figure 1: 50 d on bars, 500 mm in both directions on fabric; its cap of 1000 mm is from memory.
 * @throws ConcreteError for the rule "plan" without a limit, or a diameter that is no positive number
 */
export function supportSpacingLimit(query: {
  rule: SupportSpacingRule;
  diameterMm: number;
  planLimitMm?: number;
  showIn?: LengthUnit;
}): { mostMm: number; trail: TrailStep[] } {
  const diameter = positive('bar diameter', query.diameterMm);
  switch (query.rule) {
    case 'plan': {
      const mostMm = positive(
        'support spacing in the plan',
        given('support spacing in the plan', query.planLimitMm),
      );
      return {
        mostMm,
        trail: [fromContract('Greatest support spacing', withUnit(mostMm, query.showIn ?? 'mm'))],
      };
    }
    case 'common-practice': {
      const number = usBarNumber(diameter);
      const feet = number <= 4 ? 3 : number === 5 ? 4 : 5;
      const mostMm = feet * MM_PER_FOOT;
      const note = 'Practice, not the limit of a standard.';
      return {
        mostMm,
        trail: [
          usPractice(`Support spacing under #${number} bars`, `${feet} ft = ${numberText(mostMm)} mm`, note),
        ],
      };
    }
    case 'bs-7973-2-bars': {
      const mostMm = Math.min(50 * diameter, 1000);
      const trail = [
        bs7973Bars('Spacer spacing at most 50 d, in staggered rows', `50 × ${numberText(diameter)} mm`),
        bs7973Cap('but at most', '1000 mm'),
      ];
      return { mostMm, trail };
    }
    case 'bs-7973-2-fabric':
      return {
        mostMm: 500,
        trail: [
          bs7973Fabric('Spacers on welded fabric, in two directions at right angles, at most', '500 mm'),
        ],
      };
    default:
      throw unknownChoice('support spacing rule', query.rule);
  }
}

/** Spacings measured between supports, each against the layer's own limit. */
export function judgeSupportSpacing(
  spacingsMm: readonly number[],
  mostMm: number,
): LimitFinding & { worstMm: number } {
  listOf('support spacings', spacingsMm, 1);
  positive('greatest support spacing', mostMm);
  const worstMm = Math.max(...spacingsMm.map((spacing) => positive('support spacing', spacing)));
  return { ...againstLimits('Support spacing', worstMm, { most: mostMm }), worstMm };
}

/** When a bay is read: before anybody stands on it, with a person's weight on it, and after they have stepped off. */
export type BayStage = 'before' | 'under' | 'after';

const STAGES: readonly BayStage[] = ['before', 'under', 'after'];

/**
 * A bay read before, under and after load: all three have to meet, a missing one leaves the bay not verified. The mat
 * that springs back reads well before and after and still loses its cover under the placing crew.
 * `stayedDownMm` is what the mat did not come back by: before − after.
 */
export function judgeLoadedBay(
  readings: Partial<Record<BayStage, number>>,
  limits: { least?: number | null; most?: number | null },
): LimitFinding & { missing: BayStage[]; stayedDownMm: number | null } {
  const missing = STAGES.filter((stage) => readings[stage] === undefined);
  const findings: LimitFinding[] = STAGES.flatMap((stage) => {
    const value = readings[stage];
    return value === undefined
      ? []
      : [againstLimits(`The value ${stage} load`, finite(stage, value), limits)];
  });
  if (missing.length > 0) {
    const reason = `Not read ${missing.map((stage) => `${stage} load`).join(', ')}.`;
    findings.push({ verdict: 'not-verified', side: null, reason });
  }
  const { before, after } = readings;
  const stayedDownMm = before === undefined || after === undefined ? null : before - after;
  return { ...worstFinding(findings), missing, stayedDownMm };
}

const crsiClasses = trailSource('CRSI RB4.1, bar supports', '', 'seen');

/** Protection classes of wire bar supports, for the plan's choice and the certificate. */
export const supportClasses = [
  { id: 'class-1', name: 'Class 1', what: 'Plastic-protected wire, maximum protection' },
  {
    id: 'class-1a',
    name: 'Class 1A',
    what: 'Epoxy-, vinyl- or plastic-coated wire for coated bars, no grinding',
  },
  { id: 'class-2', name: 'Class 2', what: 'Stainless-protected wire, moderate exposure, light grinding' },
  { id: 'class-3', name: 'Class 3', what: 'Bright wire, no protection' },
] as const;
export type SupportClass = (typeof supportClasses)[number]['id'];

/** Whether a support of this class may carry bars with this coating: coated bars need coated or non-metallic supports. */
export function supportSuitsCoating(
  support: SupportClass | 'non-metallic',
  coating: 'none' | 'epoxy' | 'galvanised' | 'stainless' | 'frp',
): { suits: boolean; trail: TrailStep[] } {
  const coatedOnly = trailSource('CRSI suggested provisions; Maryland SHA 421', '', 'seen');
  const notMetallic = trailSource('ACI 440.5, 2.1.3 and 3.2', '2008', 'partly-seen');
  const stainless = trailSource('state agencies’ practice', '', 'memory');
  switch (coating) {
    case 'epoxy':
      return {
        suits: support === 'class-1a' || support === 'non-metallic',
        trail: [coatedOnly('Supports of epoxy-coated bars', 'coated or non-metallic')],
      };
    case 'frp':
      return {
        suits: support === 'class-1a' || support === 'non-metallic',
        trail: [notMetallic('Supports of FRP bars', 'non-metallic or coated, tied down against flotation')],
      };
    case 'stainless':
      return {
        suits: support === 'non-metallic',
        trail: [stainless('Supports of stainless bars', 'stainless or non-metallic')],
      };
    case 'none':
    case 'galvanised': {
      const found = supportClasses.find((entry) => entry.id === support);
      return { suits: true, trail: [crsiClasses('Support class', found ? found.what : 'Non-metallic')] };
    }
    default:
      throw unknownChoice('coating', coating);
  }
}
