import { equivalentDiameter } from '@/lib/concrete/bundle';
import { ConcreteError, requirePositive } from '@/lib/concrete/concrete-error';
import { shownUnit, type CodeCover, type CoverRequirementInput } from '@/lib/concrete/cover-input';
import { atLeast, atMost, withUnit } from '@/lib/concrete/length';
import type { TrailStep } from '@/lib/concrete/trail';
import { trailSource } from '@/lib/concrete/trail-source';

export const isExposures = ['mild', 'moderate', 'severe', 'very severe', 'extreme'] as const;
type IsExposure = (typeof isExposures)[number];

/** IS 456:2000 Table 16, nominal cover to all steel, mm: from memory, check against the edition in force. */
const TABLE_16: Record<IsExposure, number> = {
  mild: 20,
  moderate: 30,
  severe: 45,
  'very severe': 50,
  extreme: 75,
};

const table = trailSource('IS 456 Table 16, 26.4.2', '2000', 'memory');
const members = (clause: string) => trailSource(`IS 456 ${clause}`, '2000', 'seen');

function exposureOf(text: string): IsExposure {
  const word = text.trim().toLowerCase().replace(/[-_]/g, ' ');
  if (word === '') throw new ConcreteError('exposure', 'Choose the exposure of this face.', 'absent');
  const known = isExposures.find((exposure) => exposure === word);
  if (!known)
    throw new ConcreteError('exposure', `"${text}" is no exposure of IS 456: use ${isExposures.join(', ')}.`);
  return known;
}

/**
 * Nominal cover by IS 456:2000: Table 16 with its notes 1 and 3, then the least for columns (26.4.2.1) and footings
 * (26.4.2.2), and never less than the diameter of the bar (26.4.1). Where it is not said whether the bar is a main bar
 * or a link, it is taken as a main bar, which is the stricter.
 */
export function coverByIs456(input: CoverRequirementInput): CodeCover {
  const unit = shownUnit(input);
  const say = (mm: number) => withUnit(mm, unit);
  const exposure = exposureOf(input.exposure);
  const diameter = equivalentDiameter(input.barDiameterMm, input.bundleOf);
  const main = input.barRole !== 'link';
  let minimumMm = TABLE_16[exposure];
  const trail: TrailStep[] = [table(`Nominal cover, ${exposure} exposure`, say(minimumMm))];

  if (exposure === 'mild' && main && atMost(diameter, 12)) {
    minimumMm -= 5;
    trail.push(table('Note 1: main bar of 12 mm or less, 5 mm less', say(minimumMm)));
  }
  if (exposure === 'severe' || exposure === 'very severe') {
    if (input.strengthMpa === undefined) {
      trail.push(table('Note 3: strength not entered, no reduction', say(minimumMm)));
    } else if (requirePositive('strengthMpa', input.strengthMpa) >= 35) {
      minimumMm -= 5;
      trail.push(table('Note 3: M35 or better, 5 mm less', say(minimumMm)));
    }
  }
  const raise = (toMm: number, step: TrailStep) => {
    minimumMm = Math.max(minimumMm, toMm);
    trail.push(step);
  };
  if ((input.element === 'column' || input.element === 'pier') && main) {
    const slender =
      input.leastDimensionMm !== undefined &&
      atMost(requirePositive('leastDimensionMm', input.leastDimensionMm), 200) &&
      atMost(input.barDiameterMm, 12);
    const least = slender ? 25 : 40;
    raise(least, members('26.4.2.1')('At least, longitudinal bar of a column', say(least)));
  }
  if (input.element === 'footing' || input.element === 'mat') {
    raise(50, members('26.4.2.2')('At least, footing', say(50)));
  }
  if (!atLeast(minimumMm, diameter)) {
    raise(diameter, members('26.4.1')('Never less than the bar diameter', say(diameter)));
  }
  return { minimumMm, warnings: [], trail };
}
