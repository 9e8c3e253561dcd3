import { notNegative } from '@/lib/concrete/check-input';
import { ConcreteError, requirePositive } from '@/lib/concrete/concrete-error';
import { shownUnit, type CodeCover, type CoverRequirementInput } from '@/lib/concrete/cover-input';
import { atLeast, LENGTH_SLACK_MM, withUnit } from '@/lib/concrete/length';
import { fromContract } from '@/lib/concrete/trail-source';
import { basisDeviation, type CoverDeviation } from '@/lib/concrete/tolerances';

/** The specified cover: what the contract documents say governs; the code's least stands in where they say nothing. */
export function specifiedCover(
  input: CoverRequirementInput,
  code: CodeCover | null,
): Omit<CodeCover, 'minimumMm'> & { specifiedMm: number } {
  if (input.contractSpecifiedMm === undefined) {
    if (!code)
      throw new ConcreteError(
        'contractSpecifiedMm',
        'Enter the cover from the contract documents.',
        'absent',
      );
    return { specifiedMm: code.minimumMm, warnings: [], trail: [] };
  }
  const unit = shownUnit(input);
  const specifiedMm = requirePositive('contractSpecifiedMm', input.contractSpecifiedMm);
  const warnings: string[] = [];
  if (code && !atLeast(specifiedMm, code.minimumMm)) {
    warnings.push(
      `The contract asks for ${withUnit(specifiedMm, unit, code.minimumMm)}, less than the ${withUnit(code.minimumMm, unit, specifiedMm)} of the code. The contract value governs here: ask the engineer.`,
    );
  }
  return {
    specifiedMm,
    warnings,
    trail: [fromContract('Specified cover, typed by the engineer', withUnit(specifiedMm, unit))],
  };
}

/**
 * Deviations that hold: those typed from the contract, each in place of the basis's own. "Never less" is a minus
 * deviation of zero. Warns where the contract permits more reduction than the basis does. Refuses contradictions and
 * a deviation that would leave no cover at all.
 */
export function governingDeviation(
  input: CoverRequirementInput,
  specifiedMm: number,
): CoverDeviation & { warnings: string[] } {
  const unit = shownUnit(input);
  const typedMinus = input.contractMinusMm;
  if (typedMinus !== undefined) notNegative('contractMinusMm', typedMinus);
  if (input.contractPlusMm !== undefined) notNegative('contractPlusMm', input.contractPlusMm);
  if (input.neverLess && typedMinus !== undefined && typedMinus > LENGTH_SLACK_MM) {
    throw new ConcreteError(
      'contractMinusMm',
      '"Never less" and a minus deviation contradict each other: keep one.',
    );
  }
  const minus = input.neverLess ? 0 : typedMinus;
  const basis =
    input.basis === 'contract' && minus !== undefined
      ? { minusMm: minus, plusMm: null, trail: [] }
      : basisDeviation(input, specifiedMm);
  const trail = [...basis.trail];
  const warnings: string[] = [];
  const note = input.toleranceNote?.trim();
  if (minus !== undefined) {
    trail.push(
      fromContract(
        input.neverLess ? 'Never less than specified' : 'Permitted reduction',
        `−${withUnit(minus, unit)}`,
        note,
      ),
    );
    if (minus > basis.minusMm + LENGTH_SLACK_MM) {
      warnings.push(
        `The contract permits ${withUnit(minus, unit, basis.minusMm)} less cover, more than the ${withUnit(basis.minusMm, unit, minus)} of the basis.`,
      );
    }
  }
  if (input.contractPlusMm !== undefined) {
    trail.push(fromContract('Permitted increase', `+${withUnit(input.contractPlusMm, unit)}`, note));
  }
  const minusMm = minus ?? basis.minusMm;
  if (minusMm >= specifiedMm - LENGTH_SLACK_MM) {
    throw new ConcreteError('contractMinusMm', 'The permitted reduction would leave no cover at all.');
  }
  return { minusMm, plusMm: input.contractPlusMm ?? basis.plusMm, trail, warnings };
}
