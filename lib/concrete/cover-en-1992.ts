import { equivalentDiameter } from '@/lib/concrete/bundle';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import type { CodeCover, CoverRequirementInput, StructuralClass } from '@/lib/concrete/cover-input';
import { shownUnit } from '@/lib/concrete/cover-input';
import { notNegative } from '@/lib/concrete/check-input';
import { atMost, withUnit } from '@/lib/concrete/length';
import type { TrailStep } from '@/lib/concrete/trail';
import { trailSource } from '@/lib/concrete/trail-source';

export const enExposures = [
  'X0',
  'XC1',
  'XC2',
  'XC3',
  'XC4',
  'XD1',
  'XD2',
  'XD3',
  'XS1',
  'XS2',
  'XS3',
] as const;
type EnExposure = (typeof enExposures)[number];

/**
 * EN 1992-1-1:2004 Table 4.4N, minimum cover for durability in mm by structural class S1 to S6; recommended values,
 * which national annexes change. Seen in published transcriptions.
 */
const TABLE_4_4N: Record<EnExposure, readonly [number, number, number, number, number, number]> = {
  X0: [10, 10, 10, 10, 15, 20],
  XC1: [10, 10, 10, 15, 20, 25],
  XC2: [10, 15, 20, 25, 30, 35],
  XC3: [10, 15, 20, 25, 30, 35],
  XC4: [15, 20, 25, 30, 35, 40],
  XD1: [20, 25, 30, 35, 40, 45],
  XS1: [20, 25, 30, 35, 40, 45],
  XD2: [25, 30, 35, 40, 45, 50],
  XS2: [25, 30, 35, 40, 45, 50],
  XD3: [30, 35, 40, 45, 50, 55],
  XS3: [30, 35, 40, 45, 50, 55],
};

/** EN 1992-1-1:2004 Table 4.3N: cylinder strength from which the class goes down by one. */
const STRENGTH_FOR_REDUCTION: Record<EnExposure, number> = {
  X0: 30,
  XC1: 30,
  XC2: 35,
  XC3: 35,
  XC4: 40,
  XD1: 40,
  XD2: 40,
  XS1: 40,
  XD3: 45,
  XS2: 45,
  XS3: 45,
};

/** EN 1992-1-1 4.4.1.3(4): least nominal cover on prepared ground and directly against soil, mm. */
const UNEVEN_MM = { prepared: 40, soil: 75 };
/** EN 1992-1-1 4.4.1.3(1): recommended allowance in design for deviation, mm. */
export const RECOMMENDED_DELTA_CDEV_MM = 10;
/** EN 1992-1-1 8.9.1(2): equivalent diameter of a bundle, from memory. */
const LARGEST_BUNDLE_MM = 55;

const EDITION = '2004, recommended values';

/** The classes of Table 4.4N in a text such as "XC4, XD1 + XF2"; classes without cover of their own are set apart. */
function exposuresOf(text: string): { cover: EnExposure[]; other: string[] } {
  const tokens = text.toUpperCase().match(/[A-Z0-9]+/g) ?? [];
  if (tokens.length === 0)
    throw new ConcreteError('exposure', 'Choose the exposure class of this face.', 'absent');
  const cover: EnExposure[] = [];
  const other: string[] = [];
  for (const token of tokens) {
    const known = enExposures.find((exposure) => exposure === token);
    if (known) cover.push(known);
    else if (/^X[FAM][1-4]$/.test(token)) other.push(token);
    else throw new ConcreteError('exposure', `"${token}" is no exposure class of EN 1992-1-1 Table 4.1.`);
  }
  if (cover.length === 0) {
    throw new ConcreteError(
      'exposure',
      `${other.join(', ')} sets no cover by itself: add the XC, XD or XS class.`,
    );
  }
  return { cover, other };
}

function cylinderStrength(strengthClass: string): number {
  const match = /^L?C(\d{1,3})\/\d{1,3}$/.exec(strengthClass.trim().toUpperCase());
  if (!match) throw new ConcreteError('strengthClass', 'A strength class is written as C30/37.');
  return Number(match[1]);
}

/** Structural class 1 to 6 for one exposure, by Table 4.3N, never below S1. */
function structuralClassFor(
  exposure: EnExposure,
  input: CoverRequirementInput,
): { number: number; how: string } {
  if (input.structuralClass) return { number: Number(input.structuralClass.slice(1)), how: 'as entered' };
  if (input.workingLifeYears === undefined) {
    throw new ConcreteError('structuralClass', 'Enter the structural class or the working life.', 'absent');
  }
  let number = 4;
  const how = ['S4 for 50 years'];
  const move = (by: number, why: string) => {
    number += by;
    how.push(`${by > 0 ? '+' : '−'}${Math.abs(by)} ${why}`);
  };
  if (input.workingLifeYears === 100) move(2, 'for 100 years');
  if (input.strengthClass && cylinderStrength(input.strengthClass) >= STRENGTH_FOR_REDUCTION[exposure]) {
    move(-1, `for ${input.strengthClass}`);
  }
  if (input.slabGeometry) move(-1, 'for slab geometry');
  if (input.specialQualityControl) move(-1, 'for special quality control');
  const held = Math.min(6, Math.max(1, number));
  if (held !== number) how.push(`held at S${held}`);
  return { number: held, how: how.join(', ') };
}

/** Structural class by Table 4.3N for one exposure class, as `S1` to `S6`. */
export function structuralClass(
  exposure: string,
  input: Pick<
    CoverRequirementInput,
    'workingLifeYears' | 'strengthClass' | 'slabGeometry' | 'specialQualityControl'
  >,
): StructuralClass {
  const known = enExposures.find((candidate) => candidate === exposure);
  if (!known)
    throw new ConcreteError('exposure', `"${exposure}" is no exposure class of EN 1992-1-1 Table 4.4N.`);
  const { number } = structuralClassFor(known, input as CoverRequirementInput);
  return `S${number}` as StructuralClass;
}

export interface EnCover extends CodeCover {
  /** c_min of Eq. (4.2), mm; `minimumMm` is the nominal cover. */
  cMinMm: number;
  deltaCdevMm: number;
}

/**
 * Nominal cover by EN 1992-1-1:2004 4.4.1 with recommended values: c_min = max(c_min,b; c_min,dur; 10 mm), where
 * c_min,b is the (equivalent) bar diameter, 5 mm more with aggregate over 32 mm, and c_min,dur is Table 4.4N at the
 * structural class of Table 4.3N, the worst of several exposure classes; c_nom = c_min + Δc_dev; at least 40 mm on
 * prepared ground and 75 mm against soil. The deviation that execution permits is another thing and not in here.
 */
export function coverByEn1992(input: CoverRequirementInput): EnCover {
  const unit = shownUnit(input);
  const say = (mm: number) => withUnit(mm, unit);
  const of = (clause: string) => trailSource(`EN 1992-1-1 ${clause}`, EDITION, 'seen');
  const trail: TrailStep[] = [];
  const warnings: string[] = ['Recommended values: the national annex governs where it differs.'];

  const diameter = equivalentDiameter(input.barDiameterMm, input.bundleOf);
  if ((input.bundleOf ?? 1) > 1 && !atMost(diameter, LARGEST_BUNDLE_MM)) {
    throw new ConcreteError(
      'bundleOf',
      `The equivalent diameter of a bundle is at most ${LARGEST_BUNDLE_MM} mm.`,
    );
  }
  const aggregate = input.aggregateMm === undefined ? null : notNegative('aggregateMm', input.aggregateMm);
  const bondMm = diameter + (aggregate !== null && aggregate > 32 ? 5 : 0);
  trail.push(
    of('Table 4.2, 4.4.1.2(3)')(
      'c_min,b for bond',
      say(bondMm),
      aggregate === null ? 'Aggregate not entered: taken as 32 mm or less.' : undefined,
    ),
  );

  const { cover, other } = exposuresOf(input.exposure);
  let durabilityMm = 0;
  for (const exposure of cover) {
    const { number, how } = structuralClassFor(exposure, input);
    const value = TABLE_4_4N[exposure][number - 1] ?? 0;
    trail.push(
      of('Table 4.3N')(`Structural class for ${exposure}`, `S${number}`, how),
      of('Table 4.4N')(`c_min,dur for ${exposure}`, say(value)),
    );
    durabilityMm = Math.max(durabilityMm, value);
  }
  if (other.length > 0)
    warnings.push(
      `${other.join(', ')} sets no cover by itself: it acts through the concrete and the class beside it.`,
    );

  const cMinMm = Math.max(bondMm, durabilityMm, 10);
  trail.push(of('Eq. (4.2)')('c_min, at least 10 mm', say(cMinMm)));
  const deltaCdevMm = notNegative('deltaCdevMm', input.deltaCdevMm ?? RECOMMENDED_DELTA_CDEV_MM);
  trail.push(
    input.deltaCdevMm === undefined
      ? of('4.4.1.3(1)')('Δc_dev, what design adds', say(deltaCdevMm), 'Recommended value.')
      : trailSource('EN 1992-1-1 4.4.1.3', EDITION, 'contract')('Δc_dev, what design adds', say(deltaCdevMm)),
  );
  let nominalMm = cMinMm + deltaCdevMm;
  trail.push(of('Eq. (4.1)')('c_nom = c_min + Δc_dev', say(nominalMm)));
  const uneven =
    input.meeting === 'cast-against-ground'
      ? UNEVEN_MM.soil
      : input.meeting === 'prepared-ground'
        ? UNEVEN_MM.prepared
        : 0;
  if (uneven > 0) {
    nominalMm = Math.max(nominalMm, uneven);
    trail.push(
      of('4.4.1.3(4)')(
        input.meeting === 'cast-against-ground'
          ? 'At least, cast directly against soil'
          : 'At least, on prepared ground',
        say(uneven),
      ),
    );
  }
  return { minimumMm: nominalMm, cMinMm, deltaCdevMm, warnings, trail };
}
