import { equivalentDiameter } from '@/lib/concrete/bundle';
import { ConcreteError, requirePositive } from '@/lib/concrete/concrete-error';
import {
  shownUnit,
  type CodeCover,
  type CoverElement,
  type CoverRequirementInput,
} from '@/lib/concrete/cover-input';
import { atMost, MM_PER_INCH, withUnit } from '@/lib/concrete/length';
import type { TrailStep } from '@/lib/concrete/trail';
import { arithmetic, commonPractice, trailSource } from '@/lib/concrete/trail-source';

/** Exposures of the cover table; ground that the concrete is cast against is told by how the face meets it. */
export const aciExposures = ['weather-or-ground', 'not-exposed', 'corrosive'] as const;
type AciExposure = (typeof aciExposures)[number];

interface AciRow {
  exposure: string;
  members: string;
  bars: string;
  /** Inch-pound code, in. */
  inches: number;
  /** Metric companion, mm. */
  mm: number;
}

/**
 * ACI 318-19 Table 20.5.1.3.1, specified cover of cast-in-place nonprestressed members, all rows; seen in published
 * transcriptions. The metric column is the companion code's own.
 */
export const ACI_318_19_COVER = {
  ground: {
    exposure: 'cast against and permanently in contact with ground',
    members: 'all',
    bars: 'all',
    inches: 3,
    mm: 75,
  },
  weatherLarge: {
    exposure: 'exposed to weather or in contact with ground',
    members: 'all',
    bars: 'No. 6 through No. 18',
    inches: 2,
    mm: 50,
  },
  weatherSmall: {
    exposure: 'exposed to weather or in contact with ground',
    members: 'all',
    bars: 'No. 5, W31 or D31 wire, and smaller',
    inches: 1.5,
    mm: 40,
  },
  insideSlabLarge: {
    exposure: 'not exposed to weather or in contact with ground',
    members: 'slabs, joists, walls',
    bars: 'No. 14 and No. 18',
    inches: 1.5,
    mm: 40,
  },
  insideSlabSmall: {
    exposure: 'not exposed to weather or in contact with ground',
    members: 'slabs, joists, walls',
    bars: 'No. 11 and smaller',
    inches: 0.75,
    mm: 20,
  },
  insideBeam: {
    exposure: 'not exposed to weather or in contact with ground',
    members: 'beams, columns, pedestals, tension ties',
    bars: 'primary reinforcement, stirrups, ties, spirals, hoops',
    inches: 1.5,
    mm: 40,
  },
} as const satisfies Record<string, AciRow>;

/**
 * Largest diameter, mm, that belongs to the row of smaller bars. Inch sizes: W31 wire (0.628 in) and No. 11. Metric:
 * No. 16 and No. 36. A 16.0 mm bar under the inch code is larger than W31 wire and takes the row of larger bars.
 */
const SMALL_WEATHER_MM = { in: 15.96, mm: 16 };
const SMALL_INSIDE_MM = { in: 36, mm: 36 };

const SLABS_AND_WALLS: readonly CoverElement[] = ['slab', 'wall', 'mat', 'stair', 'deck'];

const EDITION = { in: '2019', mm: '2019, metric companion' };
const CLAUSE = 'ACI 318-19 Table 20.5.1.3.1';

/** Commentary, not code text: suggested cover in corrosive exposure, inches. */
const CORROSIVE_INCHES = { slabsAndWalls: 2, others: 2.5 };

function exposureOf(input: CoverRequirementInput): AciExposure {
  if (input.exposure.trim() === '')
    throw new ConcreteError('exposure', 'Choose the exposure of this face.', 'absent');
  const known = aciExposures.find((exposure) => exposure === input.exposure.trim());
  if (!known) {
    throw new ConcreteError(
      'exposure',
      `"${input.exposure}" is no exposure of ${CLAUSE}: use ${aciExposures.join(', ')}.`,
    );
  }
  return known;
}

function rowFor(input: CoverRequirementInput): AciRow {
  const units = input.aciUnits ?? 'in';
  if (input.meeting === 'cast-against-ground') return ACI_318_19_COVER.ground;
  const exposure = exposureOf(input);
  if (exposure !== 'not-exposed' || input.meeting === 'prepared-ground') {
    return atMost(input.barDiameterMm, SMALL_WEATHER_MM[units])
      ? ACI_318_19_COVER.weatherSmall
      : ACI_318_19_COVER.weatherLarge;
  }
  if (input.element === 'footing') {
    throw new ConcreteError(
      'exposure',
      'The table has no row for a footing that is not in contact with ground.',
    );
  }
  if (!SLABS_AND_WALLS.includes(input.element)) return ACI_318_19_COVER.insideBeam;
  return atMost(input.barDiameterMm, SMALL_INSIDE_MM[units])
    ? ACI_318_19_COVER.insideSlabSmall
    : ACI_318_19_COVER.insideSlabLarge;
}

/**
 * Least specified cover by ACI 318-19 for cast-in-place nonprestressed members (Table 20.5.1.3.1), bundled bars by
 * 20.5.1.3.5: at least the table, and at least the smaller of the equivalent diameter and 2 in. (3 in. against
 * ground, which the table gives already). Refuses an unknown exposure, and a footing that is not exposed.
 */
export function coverByAci318(input: CoverRequirementInput): CodeCover {
  requirePositive('barDiameterMm', input.barDiameterMm);
  const units = input.aciUnits ?? 'in';
  const unit = shownUnit(input);
  const row = rowFor(input);
  const tableMm = units === 'in' ? row.inches * MM_PER_INCH : row.mm;
  const table = trailSource(CLAUSE, EDITION[units], 'seen');
  const trail: TrailStep[] = [
    table('Specified cover', withUnit(tableMm, unit), `${row.exposure}; ${row.members}; ${row.bars}`),
  ];
  const warnings: string[] = [];
  if (input.meeting === 'prepared-ground') {
    trail.push(
      commonPractice(
        'Concrete on prepared ground counts as in contact with ground',
        withUnit(tableMm, unit),
        'The engineer decides whether a work mat is ground.',
      ),
    );
    warnings.push('Cover on prepared ground rests on common practice. The engineer confirms it.');
  }
  let minimumMm = tableMm;
  if ((input.bundleOf ?? 1) > 1) {
    const equivalent = equivalentDiameter(input.barDiameterMm, input.bundleOf);
    const bundleMm = Math.min(equivalent, units === 'in' ? 2 * MM_PER_INCH : 50);
    trail.push(
      arithmetic(
        `Equivalent diameter of a bundle of ${String(input.bundleOf)}`,
        withUnit(Math.round(equivalent * 10) / 10, 'mm'),
      ),
      trailSource(
        'ACI 318-19 20.5.1.3.5',
        EDITION[units],
        'seen',
      )(
        'Bundled bars: smaller of equivalent diameter and 2 in., at least the table',
        withUnit(Math.max(tableMm, bundleMm), unit),
      ),
    );
    minimumMm = Math.max(minimumMm, bundleMm);
  }
  if (input.meeting !== 'cast-against-ground' && exposureOf(input) === 'corrosive') {
    const inches = SLABS_AND_WALLS.includes(input.element)
      ? CORROSIVE_INCHES.slabsAndWalls
      : CORROSIVE_INCHES.others;
    const suggested = inches * MM_PER_INCH;
    trail.push(
      trailSource('ACI 318-19 R20.5.1.4.1', '2019', 'memory')(
        'Suggested in corrosive exposure',
        withUnit(suggested, unit),
        'Commentary, not code text.',
      ),
    );
    if (suggested > minimumMm) {
      warnings.push(
        `For corrosive exposure the commentary suggests ${withUnit(suggested, unit)} (from memory, check against the edition in force).`,
      );
    }
  }
  return { minimumMm, warnings, trail };
}
