import { equivalentDiameter } from '@/lib/concrete/bundle';
import { ConcreteError, requirePositive } from '@/lib/concrete/concrete-error';
import { shownUnit, type CodeCover, type CoverRequirementInput } from '@/lib/concrete/cover-input';
import { withUnit } from '@/lib/concrete/length';
import type { TrailStep } from '@/lib/concrete/trail';
import { trailSource } from '@/lib/concrete/trail-source';

export const asExposures = ['A1', 'A2', 'B1', 'B2', 'C1', 'C2'] as const;
type AsExposure = (typeof asExposures)[number];

/**
 * AS 3600 Table 4.10.3.2, required cover in mm with standard formwork and compaction, by strength in MPa: from memory,
 * check against the edition in force. `bracketed` values hold only where 4.3.2 (one exterior surface) applies.
 */
const TABLE: Record<AsExposure, { byStrength: Readonly<Record<number, number>>; bracketed: number[] }> = {
  A1: { byStrength: { 20: 20, 25: 20, 32: 20, 40: 20, 50: 20 }, bracketed: [] },
  A2: { byStrength: { 20: 50, 25: 30, 32: 25, 40: 20, 50: 20 }, bracketed: [50] },
  B1: { byStrength: { 25: 60, 32: 40, 40: 30, 50: 25 }, bracketed: [60] },
  B2: { byStrength: { 32: 65, 40: 45, 50: 35 }, bracketed: [65] },
  C1: { byStrength: { 40: 70, 50: 50 }, bracketed: [70] },
  C2: { byStrength: { 50: 65 }, bracketed: [] },
};

const EDITION = '2009/2018';
const memory = (clause: string) => trailSource(`AS 3600 ${clause}`, EDITION, 'memory');

/** Added where concrete is cast against ground, mm: with a damp-proof membrane, and without. From memory. */
const AGAINST_GROUND_MM = { membrane: 10, bare: 20 };

/**
 * Required cover by AS 3600: the larger of Table 4.10.3.2 (exposure and strength; a strength between two columns takes
 * the lower column) with its addition against ground, and the placement minimum of 4.10.2 (bar diameter, aggregate).
 * The whole table is from memory.
 */
export function coverByAs3600(input: CoverRequirementInput): CodeCover {
  const unit = shownUnit(input);
  const say = (mm: number) => withUnit(mm, unit);
  const word = input.exposure.trim().toUpperCase();
  if (word === '') throw new ConcreteError('exposure', 'Choose the exposure class of this face.', 'absent');
  const exposure = asExposures.find((candidate) => candidate === word);
  if (!exposure) {
    throw new ConcreteError(
      'exposure',
      `"${input.exposure}" is no class of AS 3600: use ${asExposures.join(', ')}.`,
    );
  }
  const strength = requirePositive('strengthMpa', input.strengthMpa);
  const { byStrength, bracketed } = TABLE[exposure];
  const column = Object.keys(byStrength)
    .map(Number)
    .filter((candidate) => candidate <= strength)
    .reduce((highest, candidate) => Math.max(highest, candidate), 0);
  const value = byStrength[column];
  if (value === undefined) {
    throw new ConcreteError(
      'strengthMpa',
      `AS 3600 gives no cover for ${exposure} with ${strength} MPa: the concrete is too weak for it.`,
    );
  }
  const warnings: string[] = [];
  const trail: TrailStep[] = [
    memory('Table 4.10.3.2')(`Required cover, ${exposure}, ${column} MPa`, say(value)),
  ];
  if (bracketed.includes(value)) {
    warnings.push(`${say(value)} holds only where one surface is exterior (AS 3600 4.3.2).`);
  }
  let minimumMm = value;
  if (input.meeting === 'cast-against-ground' || input.meeting === 'prepared-ground') {
    const added = input.membrane ? AGAINST_GROUND_MM.membrane : AGAINST_GROUND_MM.bare;
    minimumMm += added;
    trail.push(
      memory('4.10.3')(
        input.membrane
          ? 'Added against ground, with a membrane'
          : 'Added against ground, no membrane entered',
        say(added),
      ),
    );
  }
  const diameter = equivalentDiameter(input.barDiameterMm, input.bundleOf);
  const aggregate = requirePositive('aggregateMm', input.aggregateMm);
  const placing = Math.max(diameter, aggregate);
  trail.push(
    trailSource(
      'AS 3600 4.10.2',
      EDITION,
      'partly-seen',
    )('For placing: larger of bar diameter and aggregate', say(placing)),
  );
  return { minimumMm: Math.max(minimumMm, placing), warnings, trail };
}
