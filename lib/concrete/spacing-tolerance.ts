import { positive, unknownChoice } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import type { CoverBasis } from '@/lib/concrete/cover-input';
import { MM_PER_INCH } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import { MM_PER_FOOT } from '@/lib/concrete/stress-units';
import type { TrailStep } from '@/lib/concrete/trail';
import { trailSource } from '@/lib/concrete/trail-source';

/** What the bars are, which decides the row of ACI 117. */
export type SpacedSteel = 'slab-or-wall' | 'stirrups' | 'column-ties';

const aci318 = trailSource('ACI 318-19 26.6.2', '2019', 'seen');
const aci117 = trailSource('ACI 117-10, 2.2.6', '2010', 'memory');
const as3600 = trailSource('AS 3600, 17.5.3(b)', '2009/2018', 'memory');

/**
 * What execution permits on the spacing of bars, mm, as amounts. The number of bars is never fewer than specified
 * whatever the spacing. From memory, check against the edition in force:
 * - ACI 117-10 2.2.6 (ACI 318 sets none): slabs and walls 3 in; stirrups and column ties the lesser of 3 in and 1 in per
 *   foot of the beam's depth or the column's least width;
 * - AS 3600 17.5.3(b): the greater of 10 % of the spacing and 15 mm.
 * @throws ConcreteError where the basis gives none, so that the contract's own has to be typed
 */
export function spacingTolerance(query: {
  basis: CoverBasis;
  steel: SpacedSteel;
  specifiedMm: number;
  /** Depth of the beam, or least width of the column. */
  memberMm: number;
}): { minusMm: number; plusMm: number; trail: TrailStep[] } {
  const specified = positive('specified spacing', query.specifiedMm);
  const member = positive('member depth', query.memberMm);
  const both = (mm: number, step: TrailStep, ...before: TrailStep[]) => ({
    minusMm: mm,
    plusMm: mm,
    trail: [...before, step],
  });
  switch (query.basis) {
    case 'aci-318-19': {
      const none = aci318('Tolerance on bar spacing', 'none: ACI 117 sets one');
      if (query.steel === 'slab-or-wall') {
        return both(3 * MM_PER_INCH, aci117('Spacing of bars in slabs and walls', '± 3 in'), none);
      }
      const mm = Math.min(3 * MM_PER_INCH, (member / MM_PER_FOOT) * MM_PER_INCH);
      const rule =
        query.steel === 'stirrups'
          ? 'Stirrups: lesser of 3 in and 1 in per foot of beam depth'
          : 'Ties: lesser of 3 in and 1 in per foot of the column’s least width';
      return both(mm, aci117(rule, `± ${numberText(mm / MM_PER_INCH, 3)} in`), none);
    }
    case 'as-3600': {
      const mm = Math.max(0.1 * specified, 15);
      return both(mm, as3600('Spacing: greater of 10 % and 15 mm', `± ${numberText(mm, 1)} mm`));
    }
    case 'en-1992':
    case 'is-456':
    case 'csa-a23.1':
    case 'contract':
      throw new ConcreteError(
        'spacing deviation',
        'This basis gives none here: enter the deviation that the contract permits.',
        'absent',
      );
    default:
      throw unknownChoice('basis', query.basis);
  }
}
