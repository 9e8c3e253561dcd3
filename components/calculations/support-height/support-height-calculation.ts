import { given } from '@/lib/concrete/check-input';
import type { LengthUnit } from '@/lib/concrete/length';
import {
  supportHeight,
  supportHeightLimits,
  supportSpacingLimit,
  type SectionPart,
} from '@/lib/concrete/supports';
import { defineCalculation, type Figure } from '../calculation';
import type { ValuesOf } from '../field-spec';
import { bar, choice, length, unitsField } from '../fields';
import { lengthTexts } from '../length-text';

/** Names of the slices, as the drawing letters them and as lib/concrete refuses them. */
const UPPER = 'Top mat, upper bars';
const LOWER = 'Top mat, lower bars';
const BOTTOM_COVER = 'Bottom cover';
const BOTTOM_LOWER = 'Bottom mat, lower bars';
const BOTTOM_UPPER = 'Bottom mat, upper bars';
const OTHER = 'What it stands on';

const fields = {
  units: unitsField,
  thickness: length('Thickness', ['300', '12'], { hint: 'Of the section' }),
  topCover: length('Top cover', ['45', '1 3/4'], { hint: 'To the upper bars', refusedAs: ['top cover'] }),
  upper: bar('Upper bars', ['16 mm', '#5'], { hint: '#5, 16 mm, 15M', refusedAs: [UPPER, 'layers carried'] }),
  lower: bar('Lower bars', ['12 mm', '#4'], {
    hint: 'On the support',
    optional: true,
    refusedAs: [LOWER],
  }),
  standsOn: choice(
    'The support stands on',
    { form: 'the form or the blinding', mat: 'the bottom mat', other: 'something else in the section' },
    'mat',
  ),
  bottomCover: length('Bottom cover', ['40', '1 1/2'], {
    when: { standsOn: ['mat'] },
    refusedAs: [BOTTOM_COVER],
  }),
  bottomLower: bar('Its lower bars', ['16 mm', '#5'], {
    when: { standsOn: ['mat'] },
    refusedAs: [BOTTOM_LOWER],
  }),
  bottomUpper: bar('Its upper bars', ['16 mm', '#5'], {
    optional: true,
    when: { standsOn: ['mat'] },
    refusedAs: [BOTTOM_UPPER],
  }),
  other: length('Its height', ['50', '2'], {
    hint: 'Above the underside',
    when: { standsOn: ['other'] },
    refusedAs: [OTHER],
  }),
  limits: choice(
    'Limits of a measured height',
    { none: 'not asked', typed: 'from what cover and depth may lose' },
    'typed',
  ),
  coverMinus: length('Cover may lose', ['10', '3/8'], {
    when: { limits: ['typed'] },
    refusedAs: ['cover tolerance'],
  }),
  depthMinus: length('Effective depth may lose', ['10', '1/2'], {
    when: { limits: ['typed'] },
    refusedAs: ['effective depth tolerance', 'support height'],
  }),
  spacingRule: choice(
    'Greatest spacing of supports',
    {
      none: 'not asked',
      'common-practice': 'placing practice, by bar size',
      'bs-7973-2-bars': 'BS 7973-2, on bars',
      'bs-7973-2-fabric': 'BS 7973-2, on welded fabric',
      plan: 'from the plan',
    },
    'common-practice',
    { refusedAs: ['bar diameter'] },
  ),
  planSpacing: length('Spacing in the plan', ['900', '36'], {
    when: { spacingRule: ['plan'] },
    refusedAs: ['support spacing in the plan'],
  }),
} as const;

type Values = ValuesOf<typeof fields>;

export interface SupportScene {
  units: LengthUnit;
  thicknessMm: number;
  parts: SectionPart[];
}

function sectionOf(values: Values) {
  const layer = (name: string, found: Values['upper']) =>
    found ? [{ name, diameterMm: found.diameterMm }] : [];
  const below = {
    form: [],
    mat: [
      { name: BOTTOM_COVER, sizeMm: values.bottomCover ?? 0 },
      ...layer(BOTTOM_LOWER, values.bottomLower).map(asSize),
      ...layer(BOTTOM_UPPER, values.bottomUpper).map(asSize),
    ],
    other: [{ name: OTHER, sizeMm: values.other ?? 0 }],
  };
  return {
    thicknessMm: given('thickness', values.thickness),
    topCoverMm: given('top cover', values.topCover),
    carried: [...layer(UPPER, values.upper), ...layer(LOWER, values.lower)],
    standsOn: below[values.standsOn],
  };
}

const asSize = (part: { name: string; diameterMm: number }) => ({ name: part.name, sizeMm: part.diameterMm });

/** Height of a support under a top mat, the limits of a measured one, and how far apart supports may stand. */
export const supportHeightCalculation = defineCalculation({
  fields,
  groups: [
    { legend: 'Section', names: ['thickness', 'topCover'] },
    { legend: 'Top mat, carried', names: ['upper', 'lower'] },
    { legend: 'Below', names: ['standsOn', 'bottomCover', 'bottomLower', 'bottomUpper', 'other'] },
    { legend: 'Limits', names: ['limits', 'coverMinus', 'depthMinus', 'spacingRule', 'planSpacing'] },
  ],
  compute: (values) => {
    const section = sectionOf(values);
    const { units } = values;
    const found = supportHeight({ ...section, showIn: units });
    const trail = [...found.trail];
    const figures: Figure[] = [
      {
        id: 'height',
        label: 'Support height',
        ...lengthTexts(found.heightMm, units),
        main: true,
        formula: 'thickness − top cover − bars carried − what it stands on',
      },
    ];
    if (values.limits === 'typed') {
      const limits = supportHeightLimits(
        found.heightMm,
        {
          coverMinusMm: given('cover tolerance', values.coverMinus),
          depthMinusMm: given('effective depth tolerance', values.depthMinus),
        },
        units,
      );
      trail.push(...limits.trail);
      figures.push(
        { id: 'least', label: 'Least accepted height', ...lengthTexts(limits.leastMm, units) },
        { id: 'most', label: 'Greatest accepted height', ...lengthTexts(limits.mostMm, units) },
      );
    }
    if (values.spacingRule !== 'none') {
      const spacing = supportSpacingLimit({
        rule: values.spacingRule,
        // The supports carry the lower bars; where there are none, the upper ones.
        diameterMm: given('bar diameter', values.lower ?? values.upper).diameterMm,
        planLimitMm: values.planSpacing,
        showIn: units,
      });
      trail.push(...spacing.trail);
      figures.push({
        id: 'spacing',
        label: 'Greatest spacing',
        ...lengthTexts(spacing.mostMm, units),
        source: spacing.trail[0]?.clause,
      });
    }
    return {
      figures,
      warnings: [],
      trail,
      cautions: [
        'A support that is too high takes its excess from the top cover; one that is too low takes it from the effective depth.',
      ],
      scene: { units, thicknessMm: section.thicknessMm, parts: found.parts } satisfies SupportScene,
    };
  },
});
