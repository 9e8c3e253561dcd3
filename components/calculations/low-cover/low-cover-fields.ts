import { ageingExponents } from '@/lib/concrete/low-cover-cost';
import { bar, choice, choicesOf, length, number, unitsField } from '../fields';

const estimate = { chloride: ['estimate'] };
const content = (label: string, start: string, refused: string) =>
  number(label, start, [0, 100], { unit: '%', when: estimate, refusedAs: [refused] });

function ageingWords(id: (typeof ageingExponents)[number]['id']): string {
  const found = ageingExponents.find((known) => known.id === id);
  return found ? `${found.name}, m = ${found.m}` : id;
}

/** What is entered to see what low cover costs; only cover and bar are always asked for. */
export const lowCoverFields = {
  units: unitsField,
  specified: length('Specified cover', ['50', '2'], { mostMm: 1000, refusedAs: ['specified cover'] }),
  measured: length('Measured cover', ['38', '1 1/2'], {
    mostMm: 1000,
    refusedAs: ['measured cover', 'cover'],
  }),
  bar: bar('Bar', ['16 mm', '#5'], { hint: '#5, 16 mm, 15M, N16', refusedAs: ['bar diameter'] }),
  ageing: choice(
    'Ageing exponent m',
    {
      none: 'none, m = 0',
      ...choicesOf(
        ageingExponents.map(({ id }) => id),
        ageingWords,
      ),
      entered: 'as entered',
    },
    'dura-tidal-splash',
    { refusedAs: ['ageing exponent m'] },
  ),
  m: number('m', '', [0, 0.9], { when: { ageing: ['entered'] }, refusedAs: ['ageing exponent m'] }),
  carbonation: choice(
    'Carbonation',
    { ratio: 'the ratio only', seen: 'with a depth seen on the structure' },
    'ratio',
  ),
  carbonDepth: length('Depth seen', ['8', '5/16'], {
    mostMm: 1000,
    when: { carbonation: ['seen'] },
    refusedAs: ['carbonation depth'],
  }),
  carbonAge: number('At the age of', '15', [0.1, 500], { unit: 'years', when: { carbonation: ['seen'] } }),
  chloride: choice(
    'Chloride',
    { ratio: 'the ratio only', estimate: 'estimate by the error function' },
    'estimate',
  ),
  surface: content('Surface content', '3', 'surface chloride'),
  initial: content('Initial content', '0.1', 'initial chloride'),
  critical: content('Critical content', '0.6', 'critical chloride'),
  diffusion: number('D at 28 days', '5', [0.0001, 100_000], {
    unit: '10⁻¹² m²/s',
    when: estimate,
    wide: true,
    refusedAs: ['D'],
  }),
  age: number('Age', '50', [0.1, 500], { unit: 'years', when: estimate, refusedAs: ['age'] }),
  depth: choice('Effective depth', { none: 'not asked', found: 'as found against planned' }, 'found'),
  planned: length('Planned d', ['242', '9 3/4'], {
    when: { depth: ['found'] },
    refusedAs: ['planned effective depth'],
  }),
  found: length('Found d', ['230', '9 1/4'], {
    when: { depth: ['found'] },
    refusedAs: ['effective depth found'],
  }),
  fire: choice('Fire', { none: 'not asked', cover: 'cover', 'axis-distance': 'axis distance' }, 'none'),
  fireRequired: length('Required for fire', ['35', '1 3/8'], {
    hint: 'As the engineer enters it',
    mostMm: 1000,
    when: { fire: ['cover', 'axis-distance'] },
    refusedAs: ['required for fire', 'axis distance'],
  }),
} as const;
