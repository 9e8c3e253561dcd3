import { given, listOf, openShare, positive, unknownChoice, whole } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { atLeast } from '@/lib/concrete/length';
import type { LimitFinding } from '@/lib/concrete/limit-verdict';
import { worstFinding } from '@/lib/concrete/limit-verdict';
import { numberText } from '@/lib/concrete/number-text';
import { MM_PER_FOOT } from '@/lib/concrete/stress-units';
import type { TrailStep } from '@/lib/concrete/trail';
import {
  arithmetic,
  commonPractice,
  FROM_MEMORY,
  fromContract,
  trailSource,
} from '@/lib/concrete/trail-source';

/**
 * Which intersections are tied. `by-spacing`: every one where the bars are 12 in or more apart in either direction, else
 * every other one.
 */
export type TiePattern =
  | { kind: 'every' }
  | { kind: 'alternate' }
  | { kind: 'perimeter-every' }
  | { kind: 'by-spacing' }
  | { kind: 'share'; share: number };

/** From this spacing on every intersection is tied under the rule by spacing: 12 in. */
const EVERY_FROM_MM = 12 * 25.4;

/** Tie rules of published specifications, by id: what they ask for and how well it is known. */
export const tieRules = {
  'common-practice': {
    name: 'Common practice',
    pattern: { kind: 'perimeter-every' },
    step: commonPractice(
      'Every intersection along the perimeter, alternate ones inside',
      'ties hold position only',
      `${FROM_MEMORY}. ACI 318 sets no tie frequency.`,
    ),
  },
  wsdot: {
    name: 'WSDOT 6-02.3(24)C',
    pattern: { kind: 'by-spacing' },
    step: trailSource(
      'WSDOT Standard Specifications 6-02.3(24)C',
      'contract amendment',
      'seen',
    )('All intersections from 12 in spacing, every other one below it', 'bundles tied every 6 ft at most'),
  },
  txdot: {
    name: 'TxDOT Item 440',
    pattern: { kind: 'by-spacing' },
    step: trailSource(
      'TxDOT Item 440.3',
      '2014',
      'memory',
    )('All intersections of a bridge slab', 'alternate where spacing is below 12 in in each direction'),
  },
  'fp-14': {
    name: 'FHWA FP-14 Section 554',
    pattern: { kind: 'by-spacing' },
    step: trailSource(
      'FHWA FP-14 554.08',
      '2014',
      'memory',
    )('All intersections', 'alternate where spacing is below 12 in in each direction'),
  },
  'bs-7973-2': {
    name: 'BS 7973-2',
    pattern: { kind: 'perimeter-every' },
    step: trailSource(
      'BS 7973-2, clause 5',
      '2001',
      'memory',
    )(
      'Slabs: every intersection of the outer rows, alternate ones inside, staggered',
      'beams, columns: every link',
    ),
  },
} as const satisfies Record<string, { name: string; pattern: TiePattern; step: TrailStep }>;
export type TieRule = keyof typeof tieRules;

/** Greatest distance between the ties of a bundle under the rule above, mm: 6 ft. */
export const BUNDLE_TIES_MOST_MM = 6 * MM_PER_FOOT;

/** Intersections per square metre of a mat of two crossing layers at these spacings (mm). */
export function intersectionsPerSquareMetre(
  spacingXMm: number,
  spacingYMm: number,
): { perSquareMetre: number; trail: TrailStep[] } {
  const x = positive('spacing in x', spacingXMm);
  const y = positive('spacing in y', spacingYMm);
  const perSquareMetre = 1e6 / (x * y);
  const value = `1 000 000 / (${numberText(x)} × ${numberText(y)}) = ${numberText(perSquareMetre)} per m²`;
  return { perSquareMetre, trail: [arithmetic('Intersections per m² = 1 / (spacing x × spacing y)', value)] };
}

/** The squares that are counted: 2 m (or 6 ft) a side, three in a pour, one of them at an edge. Common practice. */
export function tieSampleSquares(unit: 'mm' | 'in'): {
  sideMm: number;
  squares: number;
  atEdge: number;
  trail: TrailStep[];
} {
  const sideMm = unit === 'mm' ? 2000 : 6 * MM_PER_FOOT;
  const size = unit === 'mm' ? '2 m' : '6 ft';
  return {
    sideMm,
    squares: 3,
    atEdge: 1,
    trail: [commonPractice('Squares in which ties are counted', `three of ${size} a side, one at an edge`)],
  };
}

/**
 * How many of the intersections of a sample have to be tied: a whole number, rounded up. For the perimeter pattern
 * `onPerimeter` says how many of the intersections lie in the outermost rows of the mat.
 * @throws ConcreteError where counts are not whole, the perimeter exceeds the total, or a spacing is missing
 */
export function requiredTies(sample: {
  pattern: TiePattern;
  intersections: number;
  onPerimeter?: number;
  spacingXMm?: number;
  spacingYMm?: number;
}): { required: number; share: number; trail: TrailStep[] } {
  const total = whole('intersections', sample.intersections, 1);
  const answer = (required: number, rule: string, step = arithmetic) => ({
    required,
    share: required / total,
    trail: [step(rule, `${required} of ${total}`)],
  });
  switch (sample.pattern.kind) {
    case 'every':
      return answer(total, 'Every intersection is tied', fromContract);
    case 'alternate':
      return answer(Math.ceil(total / 2), 'Every other intersection is tied', fromContract);
    case 'perimeter-every': {
      const edge = whole('intersections on the perimeter', sample.onPerimeter ?? 0, 0);
      if (edge > total)
        throw new ConcreteError('intersections on the perimeter', 'There are more than in all.');
      return answer(
        edge + Math.ceil((total - edge) / 2),
        'Every one on the perimeter, every other one inside',
      );
    }
    case 'by-spacing': {
      const x = positive('spacing in x', given('spacing in x', sample.spacingXMm));
      const y = positive('spacing in y', given('spacing in y', sample.spacingYMm));
      const every = atLeast(x, EVERY_FROM_MM) || atLeast(y, EVERY_FROM_MM);
      return every
        ? answer(total, 'Bars 12 in or more apart: every intersection is tied')
        : answer(Math.ceil(total / 2), 'Bars less than 12 in apart both ways: every other one is tied');
    }
    case 'share': {
      const share = sample.pattern.share;
      if (share !== 1) openShare('share of ties', share);
      // The slack keeps 0.7 × 10 from asking for an eighth tie.
      return answer(
        Math.ceil(total * share - 1e-9),
        `${numberText(share * 100)} % of the intersections`,
        fromContract,
      );
    }
    default:
      throw unknownChoice('tie pattern', sample.pattern);
  }
}

/** One sample: tied of total against required. */
export function judgeTies(sample: { tied: number; intersections: number; required: number }): LimitFinding {
  const total = whole('intersections', sample.intersections, 1);
  const required = whole('ties required', sample.required, 0);
  const tied = whole('ties counted', sample.tied, 0);
  if (tied > total) throw new ConcreteError('ties counted', 'There are more than intersections.');
  if (required > total) throw new ConcreteError('ties required', 'There are more than intersections.');
  return tied >= required
    ? { verdict: 'met', side: null, reason: `${tied} of ${total} tied, ${required} required.` }
    : { verdict: 'not-met', side: 'low', reason: `${tied} of ${total} tied, ${required} required.` };
}

/**
 * The samples of a pour together: each by itself (a dense square never makes up for a loose one), and not verified until
 * three are counted and one of them is at an edge.
 */
export function judgeTieSamples(
  samples: readonly { tied: number; intersections: number; required: number; atEdge: boolean }[],
): LimitFinding {
  listOf('tie samples', samples, 1);
  const findings = samples.map((sample) => judgeTies(sample));
  if (samples.length < 3) {
    const reason = `${samples.length} of three squares counted.`;
    findings.push({ verdict: 'not-verified', side: null, reason });
  } else if (!samples.some((sample) => sample.atEdge)) {
    findings.push({ verdict: 'not-verified', side: null, reason: 'None of the squares is at an edge.' });
  }
  return worstFinding(findings);
}
