import type { MeasurementKind } from '@/lib/inspection/measurement-kind';
import type { MeasurementRule } from '@/lib/inspection/measurement-rule';

type Rule = MeasurementRule['rule'];
type Options<K extends string> = { value: K; label: string }[];
const options = <K extends string>(words: Record<K, string>): Options<K> =>
  (Object.keys(words) as K[]).map((value) => ({ value, label: words[value] }));

/** What can be asked to be measured: its name, where it stands in the list, and how many places as a rule. */
export const measurementRules: Record<Rule, { name: string; group: string; places: number }> = {
  'bar-size': { name: 'Bar size', group: 'Bars', places: 2 },
  'bar-count': { name: 'Bars across a bay', group: 'Bars', places: 1 },
  'bar-spacing': { name: 'Spacing over several gaps', group: 'Bars', places: 2 },
  'greatest-spacing': { name: 'Greatest spacing', group: 'Bars', places: 2 },
  'clear-distance': { name: 'Clear distance between bars', group: 'Bars', places: 3 },
  'bend-diameter': { name: 'Inside diameter of a bend', group: 'Bars', places: 2 },
  'hook-extension': { name: 'Extension of a hook', group: 'Bars', places: 2 },
  'support-height': { name: 'Height of supports', group: 'Supports and ties', places: 3 },
  'support-spacing': { name: 'Spacing of supports', group: 'Supports and ties', places: 3 },
  'tie-share': { name: 'Ties in sample squares', group: 'Supports and ties', places: 3 },
  'lap-length': { name: 'Laps', group: 'Laps and couplers', places: 2 },
  'lap-stagger': { name: 'Stagger of laps', group: 'Laps and couplers', places: 2 },
  'share-lapped': { name: 'Share lapped in one section', group: 'Laps and couplers', places: 1 },
  coupler: { name: 'Couplers', group: 'Laps and couplers', places: 2 },
  embedment: { name: 'Embedment of starters and hooks', group: 'Laps and couplers', places: 2 },
  'coating-damage': { name: 'Damage of an epoxy coating', group: 'Coatings and materials', places: 3 },
  'frp-damage': { name: 'Damage of FRP bars', group: 'Coatings and materials', places: 3 },
  'stainless-contact': {
    name: 'Contact of stainless and carbon steel',
    group: 'Coatings and materials',
    places: 1,
  },
  'fibre-dosage': { name: 'Fibres on the ticket', group: 'Coatings and materials', places: 1 },
  'tendon-height': { name: 'Height of a tendon', group: 'Tendons', places: 2 },
  typed: { name: 'Anything else, with its limits typed', group: 'Typed', places: 1 },
};

/** The choices in their groups, in the order of the list above. */
export const measurementGroups = [...new Set(Object.values(measurementRules).map(({ group }) => group))].map(
  (group) => ({
    group,
    rules: (Object.keys(measurementRules) as Rule[]).filter((rule) => measurementRules[rule].group === group),
  }),
);

const kindWords: Record<MeasurementKind, string> = {
  'support-height': 'height of supports',
  'support-spacing': 'spacing of supports',
  'tie-share': 'ties',
  'bar-spacing': 'spacing of bars',
  'greatest-spacing': 'greatest spacing',
  'bar-count': 'number of bars',
  'bar-size': 'bar size',
  'clear-distance': 'clear distance',
  'lap-length': 'lap',
  'lap-stagger': 'stagger of laps',
  'share-lapped': 'share lapped',
  coupler: 'coupler',
  embedment: 'embedment',
  'bend-diameter': 'bend',
  'hook-extension': 'hook',
  'coating-damage': 'coating',
  'frp-damage': 'FRP bars',
  'stainless-contact': 'stainless contact',
  'tendon-height': 'tendon',
  'fibre-dosage': 'fibres',
};
export const kindOptions = options(kindWords);

export const quantityOptions = options({
  length: 'a length',
  count: 'a count',
  share: 'ties of crossings, %',
  designation: 'a bar',
});

export const steelOptions = options({
  'slab-or-wall': 'bars of a slab or wall',
  stirrups: 'stirrups',
  'column-ties': 'column ties',
});

export const useOptions = options({
  'one-way-slab': 'ACI, one-way slab',
  'two-way-critical': 'ACI, two-way slab, critical section',
  'two-way-other': 'ACI, two-way slab, elsewhere',
  'shrinkage-temperature': 'ACI, shrinkage and temperature',
  wall: 'ACI, wall',
  'slab-principal': 'EN, principal bars of a slab',
  'slab-secondary': 'EN, secondary bars of a slab',
  'slab-principal-high-moment': 'EN, principal, at high moment or load',
  'slab-secondary-high-moment': 'EN, secondary, at high moment or load',
});

export const placeOptions = options({
  layer: 'bars of a layer',
  'between-layers': 'between two layers',
  column: 'bars of a column',
});

export const codeOptions = options({ 'aci-318-19': 'ACI 318-19', 'en-1992-1-1': 'EN 1992-1-1' });
export const bendCodeOptions = options({
  'aci-318-19': 'ACI 318-19',
  'en-1992-1-1': 'EN 1992-1-1',
  'bs-8666': 'BS 8666',
});
export const barUseOptions = options({ main: 'main bar', tie: 'stirrup, tie or hoop' });
export const angleOptions = options({ '90': '90°', '135': '135°', '180': '180°' });

export const supportOptions = options({
  'common-practice': 'by common practice',
  'bs-7973-2-bars': 'BS 7973-2, on bars',
  'bs-7973-2-fabric': 'BS 7973-2, on fabric',
  plan: 'as the drawing says',
});

export const patternOptions = options({
  every: 'every crossing',
  alternate: 'every other crossing',
  'perimeter-every': 'every one on the perimeter, every other inside',
  'by-spacing': 'every one from 12 in apart, else every other',
  share: 'a share',
});

export const lengthByOptions = options({
  typed: 'as the drawing says',
  'aci-tension': 'ACI 318-19, in tension',
  'aci-compression': 'ACI 318-19, in compression',
  en: 'EN 1992-1-1',
});
export const equationOptions = options({
  simple: 'simple table 25.4.2.3',
  general: 'general equation 25.4.2.4',
});

export const toleranceOptions = options({
  basis: 'of the basis',
  none: 'none',
  'aci-117-10': 'ACI 117-10',
  'en-13670': 'EN 13670',
  own: 'of the contract',
});

export const fromOptions = options({ soffit: 'from the soffit', top: 'from the top' });
export const toOptions = options({
  underside: 'to its underside',
  centre: 'to its centre',
  topside: 'to its top side',
});
export const bandOptions = options({
  'aci-117-10': 'ACI 117-10',
  'as-3600': 'AS 3600',
  own: 'of the contract',
});
