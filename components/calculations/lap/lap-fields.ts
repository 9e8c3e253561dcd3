import { strengthClasses } from '@/lib/concrete/anchorage-en';
import { bar, check, choice, choicesOf, length, number, quantity, unitsField } from '../fields';

const aci = { basis: ['aci-318-19'] };
const tension = { ...aci, force: ['tension'] };
const compression = { ...aci, force: ['compression'] };
const general = { ...tension, method: ['general'] };
const ties = { ...general, transverse: ['yes'] };
const en = { basis: ['en-1992'] };

/** A factor of EN 1992-1-1 Table 8.2; the product of some of them has a limit of its own. */
const alpha = (sign: string, hint: string, ...refusedAs: string[]) =>
  number(sign, '1', [0, 10], { hint, when: en, refusedAs: [sign, ...refusedAs] });

/** What a lap is computed from; ACI and EN ask for their own. */
export const lapFields = {
  units: unitsField,
  basis: choice('Basis', { 'aci-318-19': 'ACI 318-19', 'en-1992': 'EN 1992-1-1' }, ['en-1992', 'aci-318-19']),
  force: choice('Lap in', { tension: 'tension', compression: 'compression' }, 'tension', { when: aci }),
  bar: bar('Bar', ['16 mm', '#5'], {
    hint: '#5, 16 mm, 15M, N16',
    refusedAs: ['bar diameter', 'barDiameterMm'],
  }),
  largerBar: bar('Lapped with a larger bar', '', {
    hint: 'Where the sizes differ',
    optional: true,
    when: aci,
    refusedAs: ['larger bar', 'development length of the larger bar', 'compression development'],
  }),
  fy: quantity('Yield strength fy', 'stress', ['420', '60000'], { when: aci, refusedAs: ['fy'] }),
  fc: quantity('Concrete f’c', 'stress', ['30', '4000'], { when: aci, refusedAs: ['f’c'] }),
  lightweight: check('Lightweight concrete', 'no', { when: aci }),
  coating: choice('Coating', { uncoated: 'none', galvanised: 'galvanised', epoxy: 'epoxy' }, 'uncoated', {
    when: tension,
    wide: false,
  }),
  topBar: check('More than 12 in (300 mm) of fresh concrete below the bar', 'no', { when: tension }),
  clearCover: length('Clear cover', ['50', '2'], { when: tension, refusedAs: ['clear cover', 'cb'] }),
  clearSpacing: length('Clear spacing', ['130', '5 3/8'], {
    hint: 'Between lapped bars',
    when: tension,
    refusedAs: ['clear spacing'],
  }),
  method: choice(
    'Development length by',
    { simple: 'the simple table, 25.4.2.3', general: 'the general equation, 25.4.2.4' },
    'simple',
    { when: tension },
  ),
  codeTies: check('Stirrups or ties of the code’s least along the lap', 'no', {
    when: { ...tension, method: ['simple'] },
  }),
  transverse: check('Count transverse steel (Ktr)', 'no', { when: general }),
  tieBar: bar('Ties of', ['10 mm', '#3'], { when: ties, refusedAs: ['Atr'] }),
  tieLegs: number('Legs that cross the plane', '2', [1, 50], { whole: true, when: ties }),
  tieSpacing: length('Spacing of the ties', ['150', '6'], { when: ties, refusedAs: ['s'] }),
  tieBars: number('Bars lapped along the plane', '4', [1, 500], {
    whole: true,
    when: ties,
    refusedAs: ['n'],
  }),
  excess: number('Steel provided / required', '1', [0, 100], {
    when: tension,
    refusedAs: ['As provided / As required'],
  }),
  confined: check('Larger bar confined by the code’s spirals or ties', 'no', { when: compression }),
  tensionLap: length('Its lap in tension', '', {
    hint: 'For fy above 80 000 psi',
    optional: true,
    when: compression,
    refusedAs: ['tension lap'],
  }),
  strengthClass: choice('Concrete', choicesOf(strengthClasses), 'C35/45', { when: en, wide: false }),
  sigma: quantity('Stress in the bar σsd', 'stress', ['434.78', '434.78 MPa'], {
    hint: 'Of the design, at the lap',
    when: en,
    refusedAs: ['σsd'],
  }),
  bond: choice(
    'Bond condition',
    { good: 'good', other: 'all other', place: 'from where the bar lies' },
    'good',
    { when: en, wide: false },
  ),
  memberDepth: length('Depth of the member', ['800', '32'], {
    when: { ...en, bond: ['place'] },
    refusedAs: ['member depth'],
  }),
  aboveUnderside: length('Bar above the underside', ['400', '16'], {
    when: { ...en, bond: ['place'] },
    refusedAs: ['height of the bar'],
  }),
  inclination: number('Inclination of the bar', '0', [0, 90], {
    unit: '°',
    when: { ...en, bond: ['place'] },
  }),
  alpha1: alpha('α1', 'Shape of the bar'),
  alpha2: alpha('α2', 'Cover', 'α2 α3 α5'),
  alpha3: alpha('α3', 'Transverse steel'),
  alpha5: alpha('α5', 'Pressure across'),
  gammaC: number('γc', '1.5', [0.1, 10], { when: en }),
  alphaCt: number('αct', '1', [0.1, 10], { when: en }),
  bondVerified: check('Bond of concrete above C60/75 is verified', 'no', {
    when: { ...en, strengthClass: ['C70/85', 'C80/95', 'C90/105'] },
  }),
  spliced: number('Lapped within one lap length', '100', [0, 100], {
    unit: '%',
    when: tension,
    refusedAs: ['share spliced'],
  }),
  lapped: number('Lapped in one section', '50', [0, 100], {
    unit: '%',
    when: en,
    refusedAs: ['share lapped'],
  }),
  drawn: length('Lap on the drawing', '', {
    hint: 'It governs where entered',
    optional: true,
    refusedAs: ['lap length on the drawing', 'lap length'],
  }),
  tolerance: choice(
    'A placed lap may be shorter',
    {
      none: 'not at all',
      'aci-117-10': 'by ACI 117-10',
      'en-13670': 'by EN 13670',
      contract: 'by contract',
    },
    'none',
    { refusedAs: ['lap tolerance'] },
  ),
  toleranceMinus: length('Shorter by', '', {
    when: { tolerance: ['contract'] },
    refusedAs: ['lap tolerance'],
  }),
} as const;
