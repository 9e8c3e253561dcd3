import { strengthClasses } from '@/lib/concrete/anchorage-en';
import { exposureClasses } from '@/lib/concrete/exposure-classes';
import type { CoverBasis } from '@/lib/concrete/cover-input';
import { bar, check, choice, choicesOf, length, quantity, unitsField } from '../fields';

const only = (...basis: CoverBasis[]) => ({ basis });

/** The exposures of a basis as the words of a choice. */
const exposures = (basis: CoverBasis): Record<string, string> =>
  Object.fromEntries(exposureClasses(basis).map(({ value, label }) => [value, label]));

const exposure = { refusedAs: ['exposure'] };

/** What a required cover is worked out from; each basis asks for its own. */
export const coverFields = {
  units: unitsField,
  basis: choice(
    'Basis',
    {
      'aci-318-19': 'ACI 318-19',
      'en-1992': 'EN 1992-1-1 with EN 13670',
      'is-456': 'IS 456',
      'as-3600': 'AS 3600',
      'csa-a23.1': 'CSA A23.1',
      contract: 'Contract only',
    },
    ['en-1992', 'aci-318-19'],
  ),
  aciUnits: choice('Edition', { in: 'Inch-pound code', mm: 'Metric companion' }, 'in', {
    when: only('aci-318-19'),
  }),
  element: choice(
    'Element',
    {
      slab: 'Slab',
      wall: 'Wall',
      column: 'Column',
      beam: 'Beam',
      footing: 'Footing',
      mat: 'Mat',
      pier: 'Pier or shaft',
      stair: 'Stair',
      deck: 'Bridge or quay deck',
    },
    'deck',
    { wide: false },
  ),
  meeting: choice(
    'Face',
    {
      formed: 'Formed',
      'finished-top': 'Finished top',
      'cast-against-ground': 'Cast against ground',
      'prepared-ground': 'On prepared ground',
    },
    'formed',
    { wide: false },
  ),
  soffit: check('It is a soffit', 'yes', { when: { basis: ['aci-318-19'], meeting: ['formed'] } }),
  thickness: length('Section', ['300', '12'], {
    hint: 'Thickness across the face',
    optional: true,
    neededWhen: { basis: ['en-1992'], deviation: ['basis'] },
    refusedAs: ['thicknessMm'],
  }),
  depth: length('Effective depth', ['', '10'], {
    hint: 'As planned',
    optional: true,
    when: only('aci-318-19'),
    refusedAs: ['effectiveDepthMm'],
  }),
  aciExposure: choice('Exposure', exposures('aci-318-19'), 'weather-or-ground', {
    when: only('aci-318-19'),
    ...exposure,
  }),
  enExposure: choice('Exposure', exposures('en-1992'), 'XS3', { when: only('en-1992'), ...exposure }),
  enExposure2: choice('And', { none: 'no other class', ...exposures('en-1992') }, 'none', {
    when: only('en-1992'),
  }),
  isExposure: choice('Exposure', exposures('is-456'), 'severe', { when: only('is-456'), ...exposure }),
  asExposure: choice('Exposure', exposures('as-3600'), 'B2', { when: only('as-3600'), ...exposure }),
  csaExposure: choice('Exposure', exposures('csa-a23.1'), 'C-1', { when: only('csa-a23.1'), ...exposure }),
  strength: quantity('Strength of the concrete', 'stress', ['40', '40 MPa'], {
    optional: true,
    neededWhen: only('as-3600'),
    when: only('is-456', 'as-3600'),
    refusedAs: ['strengthMpa'],
  }),
  leastDimension: length('Least side of the column', '', {
    optional: true,
    when: { basis: ['is-456'], element: ['column', 'pier'] },
    refusedAs: ['leastDimensionMm'],
  }),
  membrane: check('On a damp-proof membrane', 'no', {
    when: { basis: ['as-3600'], meeting: ['cast-against-ground', 'prepared-ground'] },
  }),
  enClass: choice(
    'Structural class',
    {
      life50: 'from 50 years of working life',
      life100: 'from 100 years of working life',
      S1: 'S1, as entered',
      S2: 'S2, as entered',
      S3: 'S3, as entered',
      S4: 'S4, as entered',
      S5: 'S5, as entered',
      S6: 'S6, as entered',
    },
    'life50',
    { when: only('en-1992'), refusedAs: ['structuralClass'] },
  ),
  strengthClass: choice('Strength class', { none: 'not entered', ...choicesOf(strengthClasses) }, 'C35/45', {
    when: { basis: ['en-1992'], enClass: ['life50', 'life100'] },
    refusedAs: ['strengthClass'],
    wide: false,
  }),
  slabGeometry: check('Slab geometry: steel is not moved by construction', 'no', {
    when: { basis: ['en-1992'], enClass: ['life50', 'life100'] },
  }),
  qualityControl: check('Special quality control of the concrete', 'no', {
    when: { basis: ['en-1992'], enClass: ['life50', 'life100'] },
  }),
  bar: bar('Bar', ['16 mm', '#5'], { hint: '#5, 16 mm, 15M, N16', refusedAs: ['barDiameterMm'] }),
  bundle: choice('Bundle', { '1': 'single bar', '2': '2 bars', '3': '3 bars', '4': '4 bars' }, '1', {
    hint: 'Bars that touch',
    wide: false,
    refusedAs: ['bundleOf'],
  }),
  barRole: choice('The bar is', { main: 'a main bar', link: 'a link' }, 'main', {
    when: only('is-456'),
    wide: false,
  }),
  ties: bar('Behind ties of', '', {
    hint: 'Ties between face and bar',
    optional: true,
    refusedAs: ['behindTiesMm'],
  }),
  aggregate: length('Largest aggregate', ['20', '3/4'], {
    optional: true,
    neededWhen: only('as-3600', 'csa-a23.1'),
    when: only('en-1992', 'as-3600', 'csa-a23.1'),
    mostMm: 500,
    refusedAs: ['aggregateMm'],
  }),
  contractCover: length('Specified cover', '', {
    hint: 'Empty: the code’s least',
    optional: true,
    neededWhen: only('contract'),
    mostMm: 2000,
    refusedAs: ['contractSpecifiedMm'],
  }),
  deltaCdev: length('Δc_dev', ['10', '10 mm'], {
    hint: 'What design adds',
    optional: true,
    when: only('en-1992'),
    mostMm: 500,
    refusedAs: ['deltaCdevMm'],
  }),
  deviation: choice(
    'What may be less',
    {
      basis: 'as the basis permits',
      contract: 'by contract: minus and plus',
      'never-less': 'nothing: never less',
    },
    'basis',
    { refusedAs: ['contractMinusMm'] },
  ),
  toleranceClass: choice('Tolerance class', { '1': 'class 1', '2': 'class 2' }, '1', {
    when: only('en-1992'),
    wide: false,
    refusedAs: ['toleranceClass'],
  }),
  minus: length('Minus', '', {
    optional: true,
    neededWhen: only('contract'),
    when: { deviation: ['contract'] },
    mostMm: 500,
    refusedAs: ['contractMinusMm'],
  }),
  plus: length('Plus', '', {
    optional: true,
    when: { deviation: ['contract', 'never-less'] },
    mostMm: 500,
    refusedAs: ['contractPlusMm'],
  }),
} as const;
