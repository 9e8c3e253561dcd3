import type { LengthUnit } from '@/lib/concrete/length';
import type { TrailStep } from '@/lib/concrete/trail';

export type CoverBasis = 'aci-318-19' | 'en-1992' | 'is-456' | 'as-3600' | 'csa-a23.1' | 'contract';

export type CoverElement =
  'slab' | 'wall' | 'column' | 'beam' | 'footing' | 'mat' | 'pier' | 'stair' | 'deck';

/** How the concrete of the face meets what is on the other side; prepared ground is blinding or a work mat. */
export type FaceMeeting = 'formed' | 'cast-against-ground' | 'finished-top' | 'prepared-ground';

/**
 * What a required cover is worked out from. Lengths in mm. A basis asks for the fields it needs and refuses with the
 * name of the one that is missing; fields of other bases are not read.
 */
export interface CoverRequirementInput {
  basis: CoverBasis;
  /** Cover asked for by the contract documents, typed by the engineer: it governs. */
  contractSpecifiedMm?: number;
  /** Permitted deviations from the contract documents; they replace those of the basis. */
  contractMinusMm?: number;
  contractPlusMm?: number;
  /** The contract permits no reduction at all. */
  neverLess?: boolean;
  /** Why the deviations of the basis were replaced. */
  toleranceNote?: string;

  element: CoverElement;
  meeting: FaceMeeting;
  soffit?: boolean;
  /** Exposure in the words of the basis (see `exposureClasses`). */
  exposure: string;
  /** Diameter of the bar that this requirement is for. */
  barDiameterMm: number;
  /** Number of bars in the bundle, 1 where there is none. */
  bundleOf?: number;
  /** Diameter of ties or links that lie between the face and this bar. */
  behindTiesMm?: number;
  /** Thickness of the section across the face. */
  thicknessMm?: number;
  /** Effective depth as planned. */
  effectiveDepthMm?: number;
  /** Largest nominal size of the aggregate. */
  aggregateMm?: number;
  /** Unit that trail and warnings are written in; inches for ACI and millimetres elsewhere unless given. */
  showIn?: LengthUnit;

  /** ACI: the inch-pound code (default) or the metric companion, whose numbers are rounded on their own. */
  aciUnits?: LengthUnit;

  /** EN: structural class, or the working life it is found from with strength class, geometry and control. */
  structuralClass?: StructuralClass;
  workingLifeYears?: 50 | 100;
  /** EN: strength class as in "C30/37". */
  strengthClass?: string;
  /** EN Table 4.3N: the position of the steel is not affected by construction (slab geometry). */
  slabGeometry?: boolean;
  /** EN Table 4.3N: special quality control of the concrete production. */
  specialQualityControl?: boolean;
  /** EN: what design adds to the minimum cover; 10 mm, the recommended value, unless given. */
  deltaCdevMm?: number;
  /** EN 13670: tolerance class. */
  toleranceClass?: 1 | 2;

  /** IS 456 and AS 3600: characteristic strength of the concrete, MPa. */
  strengthMpa?: number;
  /** IS 456: least dimension of a column. */
  leastDimensionMm?: number;
  /** IS 456: whether the bar is a main bar (default, the stricter) or a link. */
  barRole?: 'main' | 'link';

  /** AS 3600: slab or footing cast on the ground (its tolerances are wider); known from `meeting` where that is ground. */
  onGround?: boolean;
  /** AS 3600: a damp-proof membrane lies between concrete and ground. */
  membrane?: boolean;
}

export type StructuralClass = 'S1' | 'S2' | 'S3' | 'S4' | 'S5' | 'S6';

export interface CoverRequirement {
  /** What the drawings ask for, or what the code asks for where they say nothing. */
  specifiedMm: number;
  /** Specified less the permitted minus deviation. */
  leastAcceptedMm: number;
  /** Specified and the permitted plus deviation; null where no upper limit is set. */
  mostAcceptedMm: number | null;
  /**
   * Least cover that the code lets a drawing specify, to be compared with `specifiedMm` (EN: the nominal cover, whose
   * parts are in the trail); null where the basis has no table or too little is known.
   */
  codeMinimumMm: number | null;
  warnings: string[];
  trail: TrailStep[];
}

/** What a code asks for, before contract and deviations. */
export interface CodeCover {
  /** Least cover that may be specified, mm. */
  minimumMm: number;
  warnings: string[];
  trail: TrailStep[];
}

/** The unit in which a requirement is explained. */
export function shownUnit(input: CoverRequirementInput): LengthUnit {
  return input.showIn ?? (input.basis === 'aci-318-19' ? (input.aciUnits ?? 'in') : 'mm');
}
