import { barsOf, findBarFor, type BarSystem } from '@/lib/concrete/bars';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import type { CoverRequirement, CoverRequirementInput } from '@/lib/concrete/cover-input';
import { coverRequirement } from '@/lib/concrete/cover-requirement';
import { depthTolerance } from '@/lib/concrete/tolerances';
import type { Requirement } from './plan';
import type { PlanInput } from './plan-input';

type ElementInput = PlanInput['elements'][number];
type FaceInput = ElementInput['faces'][number];

/** Diameter of a bar by its designation, mm. @throws ConcreteError where the tables do not know it */
export function barDiameter(designation: string, basis: PlanInput['basis']): number {
  const bar = findBarFor(designation, basis);
  if (!bar)
    throw new ConcreteError(
      'barDesignation',
      `There is no bar "${designation}" in the bar tables. Write it as #5, 16 mm, 15M, N16 or IS 16.`,
    );
  return bar.diameterMm;
}

/**
 * The cover required of one steel on one face with its trail, the sizes that would ask for more, and the effective depth
 * where it is judged.
 * @throws ConcreteError with the field and the reason
 */
export function issueRequirement(
  input: PlanInput,
  element: ElementInput,
  face: FaceInput,
  wanted: FaceInput['requirements'][number],
): Requirement {
  const barDiameterMm = barDiameter(wanted.barDesignation, input.basis);
  const coverFor = (diameterMm: number) =>
    coverRequirement(coverInputOf(input, element, face, wanted, diameterMm));
  const computed = coverFor(barDiameterMm);
  const depth = depthOf(input, element, face, wanted);
  return {
    id: wanted.id,
    steel: wanted.steel,
    barDesignation: wanted.barDesignation,
    barDiameterMm,
    ...(wanted.bundleOf === undefined ? {} : { bundleOf: wanted.bundleOf }),
    ...(wanted.mainBar === undefined ? {} : { mainBar: wanted.mainBar }),
    ...computed,
    warnings: [...computed.warnings],
    trail: [...computed.trail],
    asFound: stricterBars(input, wanted.barDesignation, computed.leastAcceptedMm, coverFor),
    ...(depth ? { depth } : {}),
  };
}

function coverInputOf(
  input: PlanInput,
  element: ElementInput,
  face: FaceInput,
  wanted: FaceInput['requirements'][number],
  barDiameterMm: number,
): CoverRequirementInput {
  return {
    basis: input.basis,
    element: element.type,
    meeting: face.meeting,
    soffit: face.soffit,
    exposure: face.exposure,
    barDiameterMm,
    thicknessMm: element.thicknessMm,
    ...(element.effectiveDepthMm === null ? {} : { effectiveDepthMm: element.effectiveDepthMm }),
    ...(wanted.contractSpecifiedMm === null ? {} : { contractSpecifiedMm: wanted.contractSpecifiedMm }),
    ...(wanted.contractMinusMm === null ? {} : { contractMinusMm: wanted.contractMinusMm }),
    ...(wanted.contractPlusMm === null ? {} : { contractPlusMm: wanted.contractPlusMm }),
    ...(wanted.neverLess ? { neverLess: true } : {}),
    ...(input.mix ? { aggregateMm: input.mix.aggregateMm } : {}),
    ...(wanted.bundleOf === undefined ? {} : { bundleOf: wanted.bundleOf }),
    ...input.concrete,
    showIn: input.units,
  };
}

const barSystems: Record<PlanInput['basis'], BarSystem | null> = {
  'aci-318-19': 'astm',
  'en-1992': 'en',
  'csa-a23.1': 'csa',
  'as-3600': 'as-nzs',
  'is-456': 'is',
  contract: null,
};

/** The bar sizes of the basis that would ask for more cover than the planned one: kept, so that a device needs no tables. */
function stricterBars(
  input: PlanInput,
  planned: string,
  leastAcceptedMm: number,
  coverFor: (diameterMm: number) => CoverRequirement,
): NonNullable<Requirement['asFound']> {
  const system = barSystems[input.basis];
  if (!system) return [];
  return barsOf(system).flatMap((bar) => {
    if (bar.designation === findBarFor(planned, input.basis)?.designation) return [];
    try {
      const found = coverFor(bar.diameterMm);
      return found.leastAcceptedMm > leastAcceptedMm
        ? [
            {
              barDesignation: bar.designation,
              leastAcceptedMm: found.leastAcceptedMm,
              mostAcceptedMm: found.mostAcceptedMm,
            },
          ]
        : [];
    } catch (error) {
      // A size that does not fit this section at all is no size to be judged by here.
      if (error instanceof ConcreteError) return [];
      throw error;
    }
  });
}

/** Effective depth is judged where the steel is the main bar, the element has one planned, and the basis has a tolerance. */
function depthOf(
  input: PlanInput,
  element: ElementInput,
  face: FaceInput,
  wanted: FaceInput['requirements'][number],
): Requirement['depth'] {
  if (!wanted.mainBar || element.effectiveDepthMm === null) return undefined;
  if (input.basis === 'contract') {
    // The contract's own deviations of cover move the steel by as much: down by the plus, up by the minus.
    const { contractMinusMm, contractPlusMm } = wanted;
    if (contractPlusMm === null) return undefined;
    return {
      plannedMm: element.effectiveDepthMm,
      minusMm: contractPlusMm,
      plusMm: contractMinusMm ?? 0,
      trail: [],
    };
  }
  const tolerance = depthTolerance(
    {
      basis: input.basis,
      element: element.type,
      meeting: face.meeting,
      thicknessMm: element.thicknessMm,
      showIn: input.units,
      ...(input.concrete?.toleranceClass === undefined
        ? {}
        : { toleranceClass: input.concrete.toleranceClass }),
    },
    element.effectiveDepthMm,
  );
  return { plannedMm: element.effectiveDepthMm, ...tolerance };
}
