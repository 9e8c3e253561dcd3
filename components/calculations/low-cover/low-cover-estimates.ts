import { given } from '@/lib/concrete/check-input';
import {
  chlorideAtSteel,
  yearsToCriticalChloride,
  type ChlorideInputs,
} from '@/lib/concrete/chloride-estimate';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import {
  ageingExponents,
  carbonationTimeRatio,
  carbonationYears,
  chlorideTimeRatio,
  coverInDiameters,
  effectiveDepthChange,
  fireCover,
  type EstimateContext,
} from '@/lib/concrete/low-cover-cost';
import { withUnit } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';
import type { TrailStep } from '@/lib/concrete/trail';
import type { Figure } from '../calculation';
import type { ValuesOf } from '../field-spec';
import type { lowCoverFields } from './low-cover-fields';

export type LowCoverValues = ValuesOf<typeof lowCoverFields>;

/** Figures that belong together, with how they were found. */
export interface Estimate {
  figures: Figure[];
  trail: TrailStep[];
  cautions: string[];
}

/** The covers that all estimates compare. */
export interface Covers {
  measuredMm: number;
  specifiedMm: number;
}

/** Steps of two covers in one trail: those that differ say for which cover, the others are told once. */
function trailOfBoth(measured: readonly TrailStep[], specified: readonly TrailStep[]): TrailStep[] {
  return measured.flatMap((step, index) => {
    const other = specified[index];
    if (!other || other.value === step.value) return [step];
    return [
      { ...step, rule: `${step.rule}, measured cover` },
      { ...other, rule: `${other.rule}, specified cover` },
    ];
  });
}

/** Figures with the formula and source of their estimate; `atSpecified` is the same for the specified cover. */
function estimateOf(
  figures: Omit<Figure, 'formula' | 'source'>[],
  found: EstimateContext,
  atSpecified?: EstimateContext,
): Estimate {
  return {
    figures: figures.map((figure) => ({
      ...figure,
      formula: found.formula,
      source: found.trail.at(-1)?.clause,
    })),
    trail: atSpecified ? trailOfBoth(found.trail, atSpecified.trail) : found.trail,
    cautions: [found.caution],
  };
}

/** Three digits that mean something, whatever the size. */
const short = (value: number) => (value >= 100 ? numberText(value, 0) : String(Number(value.toPrecision(3))));

/** Time to carbonation, as a ratio and in years where a depth was seen. */
export function carbonationEstimates(values: LowCoverValues, covers: Covers): Estimate[] {
  const ratio = carbonationTimeRatio(covers.measuredMm, covers.specifiedMm, values.units);
  const first = estimateOf(
    [
      {
        id: 'carbonation',
        label: 'Time to carbonation at the bar, against that at the specified cover',
        text: `× ${short(ratio.ratio)}`,
        value: ratio.ratio,
      },
    ],
    ratio,
  );
  if (values.carbonation === 'ratio') return [first];
  const seen = {
    depthMm: given('carbonation depth', values.carbonDepth),
    ageYears: given('carbonAge', values.carbonAge),
  };
  const here = carbonationYears({ ...seen, coverMm: covers.measuredMm });
  const asked = carbonationYears({ ...seen, coverMm: covers.specifiedMm });
  const years = estimateOf(
    [
      {
        id: 'carbonation-years',
        label: 'Years from casting to carbonation at the bar, by the depth seen',
        text: short(here.years),
        also: `${short(asked.years)} at the specified cover`,
        value: here.years,
      },
    ],
    here,
    asked,
  );
  return [first, years];
}

/** The ageing exponent chosen, with the step that says where it comes from. */
export function ageingOf(values: LowCoverValues): { m: number; steps: TrailStep[] } {
  const known = ageingExponents.find(({ id }) => id === values.ageing);
  if (known) return { m: known.m, steps: [known.step] };
  return { m: values.ageing === 'entered' ? given('ageing exponent m', values.m) : 0, steps: [] };
}

/** Time to critical chloride, as a ratio and by the error function where the engineer entered what it takes. */
export function chlorideEstimates(values: LowCoverValues, covers: Covers): Estimate[] {
  const { m, steps } = ageingOf(values);
  const ratio = chlorideTimeRatio(covers.measuredMm, covers.specifiedMm, m, values.units);
  const first = estimateOf(
    [
      {
        id: 'chloride',
        label: 'Time to critical chloride at the bar, against that at the specified cover',
        text: `× ${short(ratio.ratio)}`,
        value: ratio.ratio,
      },
    ],
    ratio,
  );
  const ratios = { ...first, trail: [...steps, ...first.trail] };
  return values.chloride === 'ratio' ? [ratios] : [ratios, errorFunction(values, covers, m)];
}

function errorFunction(values: LowCoverValues, covers: Covers, ageingExponent: number): Estimate {
  const inputs = (coverMm: number): ChlorideInputs => ({
    surfaceContent: given('surface chloride', values.surface),
    initialContent: given('initial chloride', values.initial),
    diffusionM2PerS: given('D', values.diffusion) * 1e-12,
    ageingExponent,
    coverMm,
  });
  const age = given('age', values.age);
  const critical = given('critical chloride', values.critical);
  const content = chlorideAtSteel(inputs(covers.measuredMm), age);
  const contentAsked = chlorideAtSteel(inputs(covers.specifiedMm), age);
  const years = yearsToCriticalChloride(inputs(covers.measuredMm), critical);
  const yearsAsked = yearsToCriticalChloride(inputs(covers.specifiedMm), critical);
  const yearsText = (found: number | null) => (found === null ? 'never' : short(found));
  const atSteel = estimateOf(
    [
      {
        id: 'content',
        label: `Chloride at the bar after ${numberText(age)} years`,
        text: `${numberText(content.content, 3)} %`,
        also: `${numberText(contentAsked.content, 3)} % at the specified cover`,
        value: content.content,
      },
    ],
    content,
    contentAsked,
  );
  const toCritical = estimateOf(
    [
      {
        id: 'years',
        label: 'Years to the critical content at the bar',
        text: yearsText(years.years),
        also: `${yearsText(yearsAsked.years)} at the specified cover`,
        value: years.years,
      },
    ],
    years,
    yearsAsked,
  );
  return {
    figures: [...atSteel.figures, ...toCritical.figures],
    trail: [...atSteel.trail, ...toCritical.trail],
    cautions: [...atSteel.cautions, ...toCritical.cautions],
  };
}

/** Effective depth and bending, to first order. */
export function depthEstimates(values: LowCoverValues): Estimate[] {
  if (values.depth === 'none') return [];
  const change = effectiveDepthChange(
    given('planned effective depth', values.planned),
    given('effective depth found', values.found),
    values.units,
  );
  const signed = (percent: number) =>
    `${percent > 0 ? '+' : percent < 0 ? '−' : ''}${numberText(Math.abs(percent), 2)} %`;
  return [
    estimateOf(
      [
        {
          id: 'depth',
          label: 'Effective depth',
          text: signed(change.changePercent),
          value: change.changePercent,
        },
        {
          id: 'bending',
          label: 'Bending strength, about',
          text: signed(change.bendingChangePercent),
          value: change.bendingChangePercent,
        },
      ],
      change,
    ),
  ];
}

/** Bond, and fire where the engineer entered what it asks for. */
export function bondAndFire(values: LowCoverValues, covers: Covers): Estimate[] {
  const { diameterMm } = given('bar', values.bar);
  const bond = coverInDiameters(covers.measuredMm, diameterMm, values.units);
  const first = estimateOf(
    [
      {
        id: 'bond',
        label: 'Cover in bar diameters, at least one for bond',
        text: `${numberText(bond.diameters, 3)} φ`,
        also: bond.enough ? 'one diameter is there' : 'less than one diameter',
        value: bond.diameters,
      },
    ],
    bond,
  );
  if (values.fire === 'none') return [first];
  const foundMm = covers.measuredMm + (values.fire === 'cover' ? 0 : diameterMm / 2);
  const required = given('required for fire', values.fireRequired);
  const fire = fireCover(foundMm, required, values.fire, values.units);
  const found = estimateOf(
    [
      {
        id: 'fire',
        label: values.fire === 'cover' ? 'Cover for fire' : 'Axis distance for fire',
        text: withUnit(foundMm, values.units, required),
        also: fire.enough
          ? `${withUnit(required, values.units, foundMm)} required: enough as entered`
          : `${withUnit(fire.shortByMm, values.units, 0)} less than the ${withUnit(required, values.units, foundMm)} required`,
        value: foundMm,
      },
    ],
    fire,
  );
  return [first, found];
}

/** Covers that can be compared. */
export function coversOf(values: LowCoverValues): Covers {
  const covers = {
    measuredMm: given('measured cover', values.measured),
    specifiedMm: given('specified cover', values.specified),
  };
  if (covers.measuredMm === 0)
    throw new ConcreteError('measured cover', 'It has to be more than zero: a bar at the face has no cover.');
  return covers;
}
