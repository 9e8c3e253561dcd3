import { equivalentDiameter } from '@/lib/concrete/bundle';
import { ConcreteError, requirePositive } from '@/lib/concrete/concrete-error';
import {
  shownUnit,
  type CodeCover,
  type CoverElement,
  type CoverRequirementInput,
} from '@/lib/concrete/cover-input';
import { withUnit } from '@/lib/concrete/length';
import type { Provenance, TrailStep } from '@/lib/concrete/trail';
import { commonPractice, trailSource } from '@/lib/concrete/trail-source';

export const csaExposures = [
  'N',
  'F-1',
  'F-2',
  'S-1',
  'S-2',
  'S-3',
  'C-XL',
  'C-1',
  'C-3',
  'A-1',
  'A-2',
  'A-3',
] as const;
type CsaExposure = (typeof csaExposures)[number];

interface CsaColumn {
  earth: number | null;
  beams: number;
  slabs: number;
  /** Least ratio of cover to bar diameter and to aggregate. */
  ratio: number;
}

/**
 * CSA A23.1 Table 17, mm. Seen: 75 mm against earth, 30 mm for beams, columns and piles in class N, 60 mm for C-1;
 * the other cells are from memory, check against the edition in force.
 */
const NOT_EXPOSED: CsaColumn = { earth: null, beams: 30, slabs: 20, ratio: 1 };
const FROST_OR_SULPHATE: CsaColumn = { earth: 75, beams: 40, slabs: 40, ratio: 1.5 };
const CHLORIDE_OR_AGRICULTURAL: CsaColumn = { earth: 75, beams: 60, slabs: 60, ratio: 2 };

function columnOf(exposure: CsaExposure): CsaColumn {
  if (exposure === 'N') return NOT_EXPOSED;
  return exposure.startsWith('F') || exposure.startsWith('S') ? FROST_OR_SULPHATE : CHLORIDE_OR_AGRICULTURAL;
}

const SLABS_WALLS: readonly CoverElement[] = ['slab', 'wall', 'mat', 'stair', 'deck'];

/**
 * Cover by CSA A23.1 Table 17: by exposure class and member, 75 mm against earth, and at least 1, 1.5 or 2 times the
 * bar diameter and the aggregate. Refuses class N against earth, for which the table has no value.
 */
export function coverByCsaA23(input: CoverRequirementInput): CodeCover {
  const unit = shownUnit(input);
  const say = (mm: number) => withUnit(mm, unit);
  const word = input.exposure.trim().toUpperCase();
  if (word === '') throw new ConcreteError('exposure', 'Choose the exposure class of this face.', 'absent');
  const exposure = csaExposures.find((candidate) => candidate === word);
  if (!exposure) {
    throw new ConcreteError(
      'exposure',
      `"${input.exposure}" has no column in CSA A23.1 Table 17: use ${csaExposures.join(', ')}.`,
    );
  }
  const column = columnOf(exposure);
  const source = (provenance: Provenance) => trailSource('CSA A23.1 Table 17', '2009 to 2019', provenance);
  const warnings: string[] = [];
  const trail: TrailStep[] = [];
  let minimumMm: number;
  if (input.meeting === 'cast-against-ground') {
    if (column.earth === null) {
      throw new ConcreteError('exposure', 'Class N has no value for concrete cast against earth.');
    }
    minimumMm = column.earth;
    trail.push(source('partly-seen')('Cast against and permanently exposed to earth', say(minimumMm)));
  } else if (SLABS_WALLS.includes(input.element)) {
    minimumMm = column.slabs;
    trail.push(source('memory')(`Slabs, walls, joists, class ${exposure}`, say(minimumMm)));
  } else {
    minimumMm = column.beams;
    trail.push(
      source(column.ratio === 1.5 ? 'memory' : 'partly-seen')(
        `Beams, columns, piles, class ${exposure}`,
        say(minimumMm),
      ),
    );
  }
  if (input.meeting === 'prepared-ground') {
    trail.push(commonPractice('Concrete on prepared ground takes the cover of its class', say(minimumMm)));
    warnings.push('Cover on prepared ground rests on common practice. The engineer confirms it.');
  }
  const diameter = equivalentDiameter(input.barDiameterMm, input.bundleOf);
  const aggregate = requirePositive('aggregateMm', input.aggregateMm);
  const byRatio = column.ratio * Math.max(diameter, aggregate);
  trail.push(source('memory')(`At least ${column.ratio} times bar diameter and aggregate`, say(byRatio)));
  return { minimumMm: Math.max(minimumMm, byRatio), warnings, trail };
}
