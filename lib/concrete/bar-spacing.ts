import { listOf, notNegative, positive, unknownChoice, whole } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { againstLimits, worstFinding, type LimitFinding } from '@/lib/concrete/limit-verdict';
import { formatLength, MM_PER_INCH, withUnit, type LengthUnit } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import type { TrailStep } from '@/lib/concrete/trail';
import { arithmetic, fromContract, trailSource } from '@/lib/concrete/trail-source';

/** Where two bars lie side by side, which decides the row of the table. */
export type ClearDistancePlace = 'layer' | 'between-layers' | 'column';
export type SpacingBasis = 'aci-318-19' | 'en-1992-1-1';

const aciClear = trailSource('ACI 318-19, 25.2.1 to 25.2.3', '2019', 'partly-seen');
const enClear = trailSource('EN 1992-1-1, 8.2(2)', '2004', 'seen');

/** One term of a greatest-of rule, as the trail shows it. */
interface Term {
  name: string;
  mm: number;
}

function greatest(terms: readonly Term[]): Term {
  return terms.reduce((most, term) => (term.mm > most.mm ? term : most));
}

/**
 * Least clear distance between parallel bars, mm. It has no minus tolerance: concrete has to pass.
 * - ACI 318-19 25.2.1: bars of a layer max(1 in, db, 4/3 aggregate); 25.2.2: between layers 1 in; 25.2.3: columns
 *   max(1.5 in, 1.5 db, 4/3 aggregate).
 * - EN 1992-1-1 8.2(2): max(k1 φ, dg + k2, 20 mm), with k1 = 1 and k2 = 5 mm unless the national annex says otherwise.
 * @param query.showIn unit of the trail's lengths
 * @throws ConcreteError where bar or aggregate is no positive number
 */
export function leastClearDistance(query: {
  basis: SpacingBasis;
  place: ClearDistancePlace;
  diameterMm: number;
  aggregateMm: number;
  k1?: number;
  k2Mm?: number;
  showIn?: LengthUnit;
}): { leastMm: number; governs: string; trail: TrailStep[] } {
  const bar = positive('bar diameter', query.diameterMm);
  const aggregate = positive('largest aggregate', query.aggregateMm);
  const showIn = query.showIn ?? 'mm';
  switch (query.basis) {
    case 'aci-318-19': {
      if (query.place === 'between-layers') {
        const trail = [
          aciClear('Clear distance between layers, bars of one above the other', '1 in = 25.4 mm'),
        ];
        return { leastMm: MM_PER_INCH, governs: '1 in', trail };
      }
      const column = query.place === 'column';
      const factor = column ? 1.5 : 1;
      const inches = column ? '1 1/2 in' : '1 in';
      const terms = [
        { name: inches, mm: factor * MM_PER_INCH },
        { name: column ? '1.5 db' : 'db', mm: factor * bar },
        { name: '4/3 aggregate', mm: (4 / 3) * aggregate },
      ];
      return answer(
        terms,
        aciClear,
        column ? 'Columns: greatest of' : 'Bars of a layer: greatest of',
        showIn,
      );
    }
    case 'en-1992-1-1': {
      const k1 = positive('k1', query.k1 ?? 1);
      const k2 = notNegative('k2', query.k2Mm ?? 5);
      const terms = [
        { name: `${numberText(k1)} φ`, mm: k1 * bar },
        { name: `dg + ${numberText(k2)} mm`, mm: aggregate + k2 },
        { name: '20 mm', mm: 20 },
      ];
      return answer(terms, enClear, 'Clear distance: greatest of', showIn);
    }
    default:
      throw unknownChoice('basis', query.basis);
  }
}

function answer(
  terms: readonly Term[],
  source: ReturnType<typeof trailSource>,
  rule: string,
  showIn: LengthUnit,
) {
  const governing = greatest(terms);
  const shown = terms.map(({ name, mm }) => termText(name, withUnit(mm, showIn))).join('; ');
  const trail = [
    source(`${rule} ${terms.map((term) => term.name).join(', ')}`, `${shown}; ${governing.name} governs`),
  ];
  return { leastMm: governing.mm, governs: governing.name, trail };
}

/** A term with its value, unless its name is the value already. */
const termText = (name: string, value: string): string => (name === value ? name : `${name} = ${value}`);

/** Clear distances, each gap by itself: one narrow gap is not mended by a wide one beside it. */
export function judgeClearDistances(
  gapsMm: readonly number[],
  leastMm: number,
): LimitFinding & { narrowestMm: number } {
  listOf('clear distances', gapsMm, 1);
  positive('least clear distance', leastMm);
  const narrowestMm = Math.min(...gapsMm.map((gap) => notNegative('clear distance', gap)));
  return { ...againstLimits('Clear distance', narrowestMm, { least: leastMm }), narrowestMm };
}

/**
 * Bars that a bay needs at a spacing: one more than the whole gaps it takes to cross the bay between the first and the
 * last bar. Lengths in mm.
 */
export function barsAcrossBay(bay: {
  widthMm: number;
  firstBarFromEdgeMm: number;
  spacingMm: number;
  showIn?: LengthUnit;
}): {
  count: number;
  trail: TrailStep[];
} {
  const width = positive('bay width', bay.widthMm);
  const edge = notNegative('first bar from the edge', bay.firstBarFromEdgeMm);
  const spacing = positive('spacing', bay.spacingMm);
  const run = width - 2 * edge;
  if (run < 0)
    throw new ConcreteError('first bar from the edge', 'Twice this is more than the width of the bay.');
  const count = Math.ceil(run / spacing - 1e-9) + 1;
  const shown = (mm: number) => formatLength(mm, bay.showIn ?? 'mm');
  const value = `(${shown(width)} − 2 × ${shown(edge)}) / ${shown(spacing)}, up, + 1 = ${count}`;
  return { count, trail: [arithmetic('Bars across the bay = gaps needed, rounded up, + 1', value)] };
}

/** Bars counted across a bay: never fewer than specified, even where every gap is within its tolerance. */
export function judgeBarCount(counted: number, specified: number): LimitFinding {
  return againstLimits(
    'Bars across the bay',
    whole('bars counted', counted, 0),
    { least: whole('bars specified', specified, 1) },
    'count',
  );
}

/** The mean spacing over several gaps, from one tape length between the same edges of the first and the last bar. */
export function spacingOverGaps(run: { overallMm: number; gaps: number; showIn?: LengthUnit }): {
  spacingMm: number;
  trail: TrailStep[];
} {
  const overall = positive('length over the gaps', run.overallMm);
  const gaps = whole('number of gaps', run.gaps, 1);
  const spacingMm = overall / gaps;
  const showIn = run.showIn ?? 'mm';
  return {
    spacingMm,
    trail: [
      arithmetic(
        'Spacing = length between the same edges of first and last bar / gaps',
        `${formatLength(overall, showIn)} / ${gaps} = ${withUnit(spacingMm, showIn)}`,
      ),
    ],
  };
}

/**
 * A spacing against what is specified with its tolerance (mm, as amounts) and against the code's greatest spacing, which
 * no tolerance stretches.
 */
export function judgeSpacing(query: {
  spacingMm: number;
  specifiedMm: number;
  minusMm: number | null;
  plusMm: number;
  codeMostMm: number | null;
}): LimitFinding {
  const spacing = positive('spacing', query.spacingMm);
  const specified = positive('specified spacing', query.specifiedMm);
  const least = query.minusMm === null ? null : specified - notNegative('minus tolerance', query.minusMm);
  const most = specified + notNegative('plus tolerance', query.plusMm);
  const findings = [againstLimits('Spacing', spacing, { least, most })];
  if (query.codeMostMm !== null) {
    const codeMost = positive('greatest spacing by the code', query.codeMostMm);
    findings.push(againstLimits('Spacing against the code', spacing, { most: codeMost }));
  }
  return worstFinding(findings);
}

/** What the bars do, which decides the row of the greatest-spacing table. */
export type SpacingUse =
  | 'one-way-slab'
  | 'two-way-critical'
  | 'two-way-other'
  | 'shrinkage-temperature'
  | 'wall'
  | 'slab-principal'
  | 'slab-secondary'
  | 'slab-principal-high-moment'
  | 'slab-secondary-high-moment';

const aciMost = trailSource('ACI 318-19, 7.7.2.3, 8.7.2.2, 11.7.2.1, 24.4.3.3', '2019', 'memory');
const enMost = trailSource('EN 1992-1-1, 9.3.1.1(3)', '2004', 'memory');

/** Rows: times the thickness, and a cap in mm. */
const MOST_SPACING: Record<
  SpacingBasis,
  Partial<Record<SpacingUse, { times: number; capMm: number; cap: string }>>
> = {
  'aci-318-19': {
    'one-way-slab': { times: 3, capMm: 18 * MM_PER_INCH, cap: '18 in' },
    'two-way-critical': { times: 2, capMm: 18 * MM_PER_INCH, cap: '18 in' },
    'two-way-other': { times: 3, capMm: 18 * MM_PER_INCH, cap: '18 in' },
    'shrinkage-temperature': { times: 5, capMm: 18 * MM_PER_INCH, cap: '18 in' },
    wall: { times: 3, capMm: 18 * MM_PER_INCH, cap: '18 in' },
  },
  'en-1992-1-1': {
    'slab-principal': { times: 3, capMm: 400, cap: '400 mm' },
    'slab-secondary': { times: 3.5, capMm: 450, cap: '450 mm' },
    'slab-principal-high-moment': { times: 2, capMm: 250, cap: '250 mm' },
    'slab-secondary-high-moment': { times: 3, capMm: 400, cap: '400 mm' },
  },
};

/**
 * Greatest spacing by code, mm: a multiple of the thickness with a cap. All rows are from memory, check against the
 * edition in force (ACI 318-19 7.7.2.3, 8.7.2.2, 11.7.2.1, 24.4.3.3; EN 1992-1-1 9.3.1.1(3)).
 * Shrinkage and temperature steel takes 5 h, not the 3 h that is often quoted with it.
 * @throws ConcreteError where the basis has no row for that use
 */
export function greatestSpacing(query: {
  basis: SpacingBasis;
  use: SpacingUse;
  thicknessMm: number;
  showIn?: LengthUnit;
}): {
  mostMm: number;
  trail: TrailStep[];
} {
  const thickness = positive('thickness', query.thicknessMm);
  const row = MOST_SPACING[query.basis]?.[query.use];
  if (!row) throw new ConcreteError('use', `${query.basis} has no greatest spacing for "${query.use}" here.`);
  const mostMm = Math.min(row.times * thickness, row.capMm);
  const source = query.basis === 'aci-318-19' ? aciMost : enMost;
  const rule = `Spacing at most the lesser of ${row.times} h and ${row.cap}`;
  const showIn = query.showIn ?? 'mm';
  return {
    mostMm,
    trail: [source(rule, `h = ${withUnit(thickness, showIn)}: ${withUnit(mostMm, showIn)}`)],
  };
}

/** The spacing typed from the drawing, kept as the plan's own step. */
export function specifiedSpacingStep(spacingMm: number, showIn: LengthUnit = 'mm'): TrailStep {
  return fromContract('Specified spacing', withUnit(positive('specified spacing', spacingMm), showIn));
}
