import { ConcreteError, requirePositive } from '@/lib/concrete/concrete-error';
import type { CoverRequirementInput } from '@/lib/concrete/cover-input';
import { shownUnit } from '@/lib/concrete/cover-input';
import { atMost, MM_PER_INCH, withUnit, type LengthUnit } from '@/lib/concrete/length';
import type { Provenance, TrailStep } from '@/lib/concrete/trail';
import { trailSource } from '@/lib/concrete/trail-source';

/** Deviations that execution permits from the specified cover, both as amounts; `plusMm` null is no upper limit. */
export interface CoverDeviation {
  minusMm: number;
  plusMm: number | null;
  trail: TrailStep[];
}

/** A row that holds up to and including `upToMm`; the last row of a list has no end. */
interface DepthRow {
  upToMm: number;
  mm: number;
}

function rowFor(rows: readonly DepthRow[], mm: number): DepthRow {
  const row = rows.find((candidate) => atMost(mm, candidate.upToMm)) ?? rows.at(-1);
  if (!row) throw new ConcreteError('depth', 'There is no row for this depth.');
  return row;
}

/**
 * ACI 318-19 Table 26.6.2.1(a) with its footnote for formed soffits, seen in an adoption of it: tolerance on effective
 * depth and cover by planned effective depth, the boundary in the shallower row. Metric companion beside it; the
 * adoption seen rounds to 15 and 5 mm (the code adopted by the project governs).
 */
export const ACI_318_19_TOLERANCE = {
  in: {
    byDepth: [
      { upToMm: 8 * MM_PER_INCH, mm: (3 / 8) * MM_PER_INCH },
      { upToMm: Infinity, mm: (1 / 2) * MM_PER_INCH },
    ],
    soffitMm: (1 / 4) * MM_PER_INCH,
    edition: '2019',
  },
  mm: {
    byDepth: [
      { upToMm: 200, mm: 10 },
      { upToMm: Infinity, mm: 13 },
    ],
    soffitMm: 6,
    edition: '2019, metric companion',
  },
  /** The cover may never be reduced by more than this share of the specified cover. */
  mostShare: 1 / 3,
  clause: 'ACI 318-19 Table 26.6.2.1(a)',
} as const;

/**
 * EN 13670:2009 10.6 and Figure 4 b, mm: permitted reduction 10 in both classes; permitted increase by height of the
 * section and tolerance class, linear between the heights (150 and 2500 are from memory), 15 more in foundations.
 */
export const EN_13670_TOLERANCE = {
  minusMm: 10,
  plus: [
    { heightMm: 150, class1: 10, class2: 5 },
    { heightMm: 400, class1: 15, class2: 10 },
    { heightMm: 2500, class1: 25, class2: 20 },
  ],
  foundationMm: 15,
  clause: 'EN 13670 10.6, Figure 4 b',
  edition: '2009',
} as const;

/** IS 456:2000 12.3.1 (effective depth) and 12.3.2 with Table 16 note 2 (cover +10/−0), mm. */
export const IS_456_TOLERANCE = {
  minusMm: 0,
  plusMm: 10,
  byDepth: [
    { upToMm: 200, mm: 10 },
    { upToMm: Infinity, mm: 15 },
  ],
} as const;

/** AS 3600 17.5.3(a), position controlled by cover, mm: from memory, check against the edition in force. */
export const AS_3600_TOLERANCE = {
  members: { minusMm: 5, plusMm: 10 },
  slabOnGround: { minusMm: 10, plusMm: 20 },
  footingInGround: { minusMm: 10, plusMm: 40 },
} as const;

/** CSA A23.1 6.6.8, mm: cover ±12 and not reduced by more than one third; depth of the steel by effective depth.
 * From memory, check against the edition in force. */
export const CSA_A23_TOLERANCE = {
  coverMm: 12,
  mostShare: 1 / 3,
  byDepth: [
    { upToMm: 200, mm: 8 },
    { upToMm: 600, mm: 12 },
    { upToMm: Infinity, mm: 20 },
  ],
} as const;

/** EN 13670 permitted increase of cover in mm at a section height, interpolated. */
export function en13670Plus(heightMm: number, toleranceClass: 1 | 2, foundation: boolean): number {
  requirePositive('thicknessMm', heightMm);
  if (toleranceClass !== 1 && toleranceClass !== 2)
    throw new ConcreteError('toleranceClass', 'EN 13670 has the classes 1 and 2.');
  const value = (row: (typeof EN_13670_TOLERANCE.plus)[number]) =>
    toleranceClass === 1 ? row.class1 : row.class2;
  const [low, middle, high] = EN_13670_TOLERANCE.plus;
  const extra = foundation ? EN_13670_TOLERANCE.foundationMm : 0;
  if (heightMm <= low.heightMm) return value(low) + extra;
  if (heightMm >= high.heightMm) return value(high) + extra;
  const [from, to] = heightMm <= middle.heightMm ? [low, middle] : [middle, high];
  const share = (heightMm - from.heightMm) / (to.heightMm - from.heightMm);
  return value(from) + share * (value(to) - value(from)) + extra;
}

function aciDeviation(input: CoverRequirementInput, specifiedMm: number, unit: LengthUnit): CoverDeviation {
  const { byDepth, soffitMm, edition } = ACI_318_19_TOLERANCE[input.aciUnits ?? 'in'];
  const step = trailSource(ACI_318_19_TOLERANCE.clause, edition, 'partly-seen');
  const minus = (mm: number) => `−${withUnit(mm, unit)}`;
  const trail: TrailStep[] = [];
  let minusMm: number;
  if (input.effectiveDepthMm === undefined) {
    minusMm = Math.min(...byDepth.map((row) => row.mm));
    trail.push(step('Cover, effective depth not entered: the smaller', minus(minusMm)));
  } else {
    const depth = requirePositive('effectiveDepthMm', input.effectiveDepthMm);
    minusMm = rowFor(byDepth, depth).mm;
    trail.push(step(`Cover at planned effective depth ${withUnit(depth, unit)}`, minus(minusMm)));
  }
  if (input.soffit && input.meeting === 'formed') {
    minusMm = Math.min(minusMm, soffitMm);
    trail.push(step('Cover to a formed soffit', minus(soffitMm)));
  }
  const third = requirePositive('specifiedMm', specifiedMm) * ACI_318_19_TOLERANCE.mostShare;
  const limited = Math.min(minusMm, third);
  trail.push(
    step('Never more than one third of the specified cover', `${minus(third)}, so ${minus(limited)}`),
  );
  return { minusMm: limited, plusMm: null, trail };
}

function enDeviation(input: CoverRequirementInput, unit: LengthUnit, plusNeeded: boolean): CoverDeviation {
  const { clause, edition, minusMm, foundationMm } = EN_13670_TOLERANCE;
  const step = (provenance: Provenance) => trailSource(clause, edition, provenance);
  const trail = [step('partly-seen')('Permitted reduction of cover', `−${withUnit(minusMm, unit)}`)];
  if (!plusNeeded) return { minusMm, plusMm: null, trail };
  const toleranceClass = input.toleranceClass ?? 1;
  const foundation = input.element === 'footing' || input.element === 'mat';
  const height = requirePositive('thicknessMm', input.thicknessMm);
  const plusMm = en13670Plus(height, toleranceClass, foundation);
  trail.push(
    step('seen')(
      `Permitted increase, class ${toleranceClass}, section of ${withUnit(height, unit)}`,
      `+${withUnit(plusMm, unit)}`,
      [
        'Linear between the heights given; the heights 150 and 2500 mm are from memory.',
        input.toleranceClass === undefined ? 'Tolerance class not entered: class 1, the normal one.' : '',
        foundation ? `${foundationMm} mm of it because it is a foundation.` : '',
      ]
        .filter(Boolean)
        .join(' '),
    ),
  );
  return { minusMm, plusMm, trail };
}

function asDeviation(input: CoverRequirementInput, unit: LengthUnit): CoverDeviation {
  const onGround =
    input.onGround ?? (input.meeting === 'cast-against-ground' || input.meeting === 'prepared-ground');
  const { members, slabOnGround, footingInGround } = AS_3600_TOLERANCE;
  const [row, name] =
    onGround && input.element === 'footing'
      ? [footingInGround, 'footing cast in the ground']
      : onGround && input.element === 'slab'
        ? [slabOnGround, 'slab on ground']
        : [members, 'beams, slabs, columns, walls'];
  const value = `−${withUnit(row.minusMm, unit)}, +${withUnit(row.plusMm, unit)}`;
  return {
    ...row,
    trail: [trailSource('AS 3600 17.5.3(a)', '2009/2018', 'memory')(`Position, ${name}`, value)],
  };
}

function csaDeviation(specifiedMm: number, unit: LengthUnit): CoverDeviation {
  const third = requirePositive('specifiedMm', specifiedMm) * CSA_A23_TOLERANCE.mostShare;
  const minusMm = Math.min(CSA_A23_TOLERANCE.coverMm, third);
  const step = trailSource('CSA A23.1 6.6.8', '2009 to 2019', 'memory');
  return {
    minusMm,
    plusMm: CSA_A23_TOLERANCE.coverMm,
    trail: [
      step('Tolerance on cover', `±${withUnit(CSA_A23_TOLERANCE.coverMm, unit)}`),
      step('Not reduced by more than one third', `−${withUnit(minusMm, unit)}`),
    ],
  };
}

/**
 * What execution permits on the specified cover, by the basis and its edition. A basis that lacks what it needs (EN
 * 13670: the section's thickness, where no plus deviation was typed) refuses with the field. ACI sets no plus limit on
 * cover: there the effective depth is judged on its own. The contract basis has no deviations of its own.
 */
export function basisDeviation(input: CoverRequirementInput, specifiedMm: number): CoverDeviation {
  const unit = shownUnit(input);
  switch (input.basis) {
    case 'aci-318-19':
      return aciDeviation(input, specifiedMm, unit);
    case 'en-1992':
      return enDeviation(input, unit, input.contractPlusMm === undefined);
    case 'is-456':
      return {
        minusMm: IS_456_TOLERANCE.minusMm,
        plusMm: IS_456_TOLERANCE.plusMm,
        trail: [
          trailSource(
            'IS 456 12.3.2, Table 16 note 2',
            '2000',
            'partly-seen',
          )('Deviation from nominal cover', `−0, +${withUnit(IS_456_TOLERANCE.plusMm, unit)}`),
        ],
      };
    case 'as-3600':
      return asDeviation(input, unit);
    case 'csa-a23.1':
      return csaDeviation(specifiedMm, unit);
    case 'contract':
      throw new ConcreteError(
        'contractMinusMm',
        'Enter the permitted minus deviation, or choose "never less".',
        'absent',
      );
  }
}

/** What effective depth may fall short of, and exceed, its plan by, mm. */
export interface DepthTolerance {
  minusMm: number;
  plusMm: number;
  trail: TrailStep[];
}

/**
 * Tolerance on effective depth by basis: ACI 318-19 ±3/8 in to 8 in and ±1/2 in above; IS 456 ±10 mm to 200 mm and ±15
 * above; CSA by depth (from memory); EN 13670 and AS 3600 have none of their own, so the steel may lie lower by the
 * permitted increase of cover and higher by its reduction. `plannedMm` is the planned depth; EN takes the section's
 * thickness too. Refuses the contract basis, whose tolerance is typed.
 */
export function depthTolerance(
  input: Pick<
    CoverRequirementInput,
    'basis' | 'aciUnits' | 'element' | 'meeting' | 'onGround' | 'thicknessMm' | 'toleranceClass' | 'showIn'
  >,
  plannedMm: number,
): DepthTolerance {
  const planned = requirePositive('plannedMm', plannedMm);
  const full: CoverRequirementInput = { ...input, exposure: '', barDiameterMm: 1 };
  const unit = shownUnit(full);
  const both = (mm: number, clause: string, edition: string, provenance: Provenance): DepthTolerance => ({
    minusMm: mm,
    plusMm: mm,
    trail: [
      trailSource(
        clause,
        edition,
        provenance,
      )(`Effective depth, planned ${withUnit(planned, unit)}`, `±${withUnit(mm, unit)}`),
    ],
  });
  switch (input.basis) {
    case 'aci-318-19': {
      const { byDepth, edition } = ACI_318_19_TOLERANCE[input.aciUnits ?? 'in'];
      return both(rowFor(byDepth, planned).mm, ACI_318_19_TOLERANCE.clause, edition, 'partly-seen');
    }
    case 'is-456':
      return both(rowFor(IS_456_TOLERANCE.byDepth, planned).mm, 'IS 456 12.3.1', '2000', 'seen');
    case 'csa-a23.1':
      return both(rowFor(CSA_A23_TOLERANCE.byDepth, planned).mm, 'CSA A23.1 6.6.8', '2009 to 2019', 'memory');
    case 'en-1992':
    case 'as-3600': {
      const cover = basisDeviation(full, Infinity);
      return { minusMm: cover.plusMm ?? 0, plusMm: cover.minusMm, trail: cover.trail };
    }
    case 'contract':
      throw new ConcreteError('toleranceMm', 'Enter the tolerance on effective depth.', 'absent');
  }
}
