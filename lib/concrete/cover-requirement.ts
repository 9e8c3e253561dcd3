import { finite } from '@/lib/concrete/check-input';
import { ConcreteError, requirePositive } from '@/lib/concrete/concrete-error';
import { coverByAci318 } from '@/lib/concrete/cover-aci-318';
import { coverByAs3600 } from '@/lib/concrete/cover-as-3600';
import { governingDeviation, specifiedCover } from '@/lib/concrete/cover-contract';
import { coverByCsaA23 } from '@/lib/concrete/cover-csa-a23';
import { coverByEn1992 } from '@/lib/concrete/cover-en-1992';
import {
  shownUnit,
  type CodeCover,
  type CoverRequirement,
  type CoverRequirementInput,
} from '@/lib/concrete/cover-input';
import { coverByIs456 } from '@/lib/concrete/cover-is-456';
import { atMost, withUnit } from '@/lib/concrete/length';
import { arithmetic } from '@/lib/concrete/trail-source';
import { EN_13670_TOLERANCE } from '@/lib/concrete/tolerances';

export type { CoverRequirement, CoverRequirementInput } from '@/lib/concrete/cover-input';

function tableCover(input: CoverRequirementInput): CodeCover | null {
  switch (input.basis) {
    case 'aci-318-19':
      return coverByAci318(input);
    case 'en-1992':
      return coverByEn1992(input);
    case 'is-456':
      return coverByIs456(input);
    case 'as-3600':
      return coverByAs3600(input);
    case 'csa-a23.1':
      return coverByCsaA23(input);
    case 'contract':
      return null;
  }
}

/** The code's cover for this steel; a main bar behind ties needs its own cover and that of the ties with their size. */
function codeCover(input: CoverRequirementInput): CodeCover | null {
  const own = tableCover(input);
  if (!own || input.behindTiesMm === undefined) return own;
  const tieMm = requirePositive('behindTiesMm', input.behindTiesMm);
  const ties = tableCover({ ...input, barDiameterMm: tieMm, bundleOf: 1, barRole: 'link' });
  if (!ties) return own;
  const behind = ties.minimumMm + tieMm;
  const unit = shownUnit(input);
  return {
    minimumMm: Math.max(own.minimumMm, behind),
    warnings: [...new Set([...own.warnings, ...ties.warnings])],
    trail: [
      ...own.trail,
      arithmetic(
        `Behind ties: ${withUnit(ties.minimumMm, unit)} to the tie and ${withUnit(tieMm, unit)} for it`,
        withUnit(behind, unit),
      ),
    ],
  };
}

/** The code's cover, or why it stays unknown: too little was entered, and the contract value does without it. */
function codeCoverIfKnown(input: CoverRequirementInput): { code: CodeCover | null; warnings: string[] } {
  try {
    return { code: codeCover(input), warnings: [] };
  } catch (error) {
    const known = input.contractSpecifiedMm !== undefined;
    if (!(error instanceof ConcreteError) || error.kind !== 'absent' || !known) throw error;
    return {
      code: null,
      warnings: [`The code minimum was not worked out. ${error.reason} (${error.field})`],
    };
  }
}

/**
 * The required cover of one steel on one face, with its trail. The contract value typed by the engineer governs; the
 * code's least is worked out beside it, with a warning where the contract asks for less. The least accepted cover is
 * the specified less what execution permits, and the most accepted the specified and what execution permits more.
 * Lengths in mm. Sources: ACI 318-19, EN 1992-1-1 with EN 13670, IS 456, AS 3600, CSA A23.1, each in its own file.
 * Throws `ConcreteError` naming the field where input is impossible, or absent and needed.
 */
export function coverRequirement(input: CoverRequirementInput): CoverRequirement {
  requirePositive('barDiameterMm', input.barDiameterMm);
  if (input.thicknessMm !== undefined) requirePositive('thicknessMm', input.thicknessMm);
  const { code, warnings } = codeCoverIfKnown(input);
  const specified = specifiedCover(input, code);
  const deviation = permittedDeviation(input, specified.specifiedMm);
  checkSection(input, specified.specifiedMm);
  const all = [...warnings, ...(code?.warnings ?? []), ...specified.warnings, ...deviation.warnings];
  if (input.soffit && input.basis === 'aci-318-19' && input.meeting !== 'formed') {
    all.push('The soffit tolerance is for formed soffits and was not used: this face is not formed.');
  }
  return {
    specifiedMm: specified.specifiedMm,
    leastAcceptedMm: specified.specifiedMm - deviation.minusMm,
    mostAcceptedMm: deviation.plusMm === null ? null : specified.specifiedMm + deviation.plusMm,
    codeMinimumMm: code?.minimumMm ?? null,
    warnings: all,
    trail: [...(code?.trail ?? []), ...specified.trail, ...deviation.trail],
  };
}

/**
 * EN: where design allowed for less than execution permits, no more than the allowance is permitted, so that the least
 * accepted cover stays c_min (EN 13670 10.6: c_nom − Δ(minus) = c_min). A reduction typed from the contract stands.
 */
function permittedDeviation(input: CoverRequirementInput, specifiedMm: number) {
  const deviation = governingDeviation(input, specifiedMm);
  const allowance = input.deltaCdevMm;
  const typed = input.neverLess || input.contractMinusMm !== undefined;
  if (input.basis !== 'en-1992' || typed || allowance === undefined || allowance >= deviation.minusMm) {
    return deviation;
  }
  return {
    ...deviation,
    minusMm: allowance,
    trail: [
      ...deviation.trail,
      {
        rule: 'No more reduction than design allowed for: c_nom − Δ(minus) = c_min',
        clause: EN_13670_TOLERANCE.clause,
        edition: EN_13670_TOLERANCE.edition,
        value: `−${withUnit(allowance, shownUnit(input))}`,
        provenance: 'partly-seen' as const,
      },
    ],
  };
}

function checkSection(input: CoverRequirementInput, specifiedMm: number): void {
  if (input.thicknessMm === undefined) return;
  if (!atMost(specifiedMm + input.barDiameterMm, input.thicknessMm)) {
    const unit = shownUnit(input);
    throw new ConcreteError(
      'thicknessMm',
      `Cover ${withUnit(specifiedMm, unit)} and the bar do not fit into a section of ${withUnit(input.thicknessMm, unit)}.`,
    );
  }
}

/**
 * The stricter of two requirements, limit by limit: for a bar that is not the one planned, by the planned and the
 * as-found bar. Throws where the two leave nothing between them.
 */
export function stricterOf(planned: CoverRequirement, asFound: CoverRequirement): CoverRequirement {
  for (const one of [planned, asFound]) checkFinite(one);
  const most = [planned.mostAcceptedMm, asFound.mostAcceptedMm].filter((limit) => limit !== null);
  const codes = [planned.codeMinimumMm, asFound.codeMinimumMm].filter((limit) => limit !== null);
  const stricter = asFound.leastAcceptedMm > planned.leastAcceptedMm ? asFound : planned;
  const mostAcceptedMm = most.length > 0 ? Math.min(...most) : null;
  if (mostAcceptedMm !== null && !atMost(stricter.leastAcceptedMm, mostAcceptedMm)) {
    throw new ConcreteError('asFoundBar', 'No cover suits both the planned and the as-found bar.');
  }
  return {
    specifiedMm: Math.max(planned.specifiedMm, asFound.specifiedMm),
    leastAcceptedMm: stricter.leastAcceptedMm,
    mostAcceptedMm,
    codeMinimumMm: codes.length > 0 ? Math.max(...codes) : null,
    warnings: [...new Set([...planned.warnings, ...asFound.warnings])],
    trail: stricter.trail,
  };
}

function checkFinite(requirement: CoverRequirement): void {
  for (const field of ['specifiedMm', 'leastAcceptedMm', 'mostAcceptedMm', 'codeMinimumMm'] as const) {
    const value = requirement[field];
    if (value !== null) finite(field, value);
  }
}
