import { notNegative, positive } from '@/lib/concrete/check-input';

/** Systems of reinforcing bar sizes. */
export type BarSystem = 'astm' | 'en' | 'csa' | 'as-nzs' | 'is';

/** Nominal figures of a bar size. */
export interface Bar {
  system: BarSystem;
  designation: string;
  diameterMm: number;
  areaMm2: number;
  massKgPerM: number;
}

/**
 * ASTM A615/A615M and A706/A706M, Table 1: designation, nominal diameter in inches (kept exactly; the metric column
 * of the standard rounds it to 0.1 mm), area in mm², mass in kg/m.
 */
const ASTM: readonly (readonly [string, number, number, number])[] = [
  ['#3', 0.375, 71, 0.56],
  ['#4', 0.5, 129, 0.994],
  ['#5', 0.625, 199, 1.552],
  ['#6', 0.75, 284, 2.235],
  ['#7', 0.875, 387, 3.042],
  ['#8', 1.0, 510, 3.973],
  ['#9', 1.128, 645, 5.06],
  ['#10', 1.27, 819, 6.404],
  ['#11', 1.41, 1006, 7.907],
  ['#14', 1.693, 1452, 11.38],
  ['#18', 2.257, 2581, 20.24],
];

/** EN 10080:2005 Table 6, BS 4449:2005, ISO 6935-2: diameter mm, area mm², mass kg/m. 14 and 50 mm are from memory. */
const EN: readonly (readonly [number, number, number])[] = [
  [6, 28.3, 0.222],
  [8, 50.3, 0.395],
  [10, 78.5, 0.617],
  [12, 113.1, 0.888],
  [14, 153.9, 1.21],
  [16, 201.1, 1.58],
  [20, 314.2, 2.47],
  [25, 490.9, 3.85],
  [28, 615.8, 4.83],
  [32, 804.2, 6.31],
  [40, 1256.6, 9.86],
  [50, 1963.5, 15.4],
];

/** CSA G30.18, table of nominal dimensions. */
const CSA: readonly (readonly [string, number, number, number])[] = [
  ['10M', 11.3, 100, 0.785],
  ['15M', 16.0, 200, 1.57],
  ['20M', 19.5, 300, 2.355],
  ['25M', 25.2, 500, 3.925],
  ['30M', 29.9, 700, 5.495],
  ['35M', 35.7, 1000, 7.85],
  ['45M', 43.7, 1500, 11.775],
  ['55M', 56.4, 2500, 19.625],
];

/** AS/NZS 4671:2019: nominal (not rounded design) areas. */
const AS_NZS: readonly (readonly [number, number, number])[] = [
  [10, 78.5, 0.617],
  [12, 113.1, 0.888],
  [16, 201.1, 1.578],
  [20, 314.2, 2.466],
  [24, 452.4, 3.551],
  [28, 615.8, 4.834],
  [32, 804.2, 6.313],
  [36, 1017.9, 7.99],
  [40, 1256.6, 9.865],
];

/** IS 1786:2008 Table 1; areas as the standard rounds them. */
const IS: readonly (readonly [number, number, number])[] = [
  [4, 12.6, 0.099],
  [5, 19.6, 0.154],
  [6, 28.3, 0.222],
  [8, 50.3, 0.395],
  [10, 78.6, 0.617],
  [12, 113.1, 0.888],
  [16, 201.2, 1.58],
  [20, 314.3, 2.47],
  [25, 491.1, 3.85],
  [28, 615.8, 4.83],
  [32, 804.6, 6.31],
  [36, 1018.3, 7.99],
  [40, 1257.2, 9.86],
];

function bar(
  system: BarSystem,
  designation: string,
  diameterMm: number,
  areaMm2: number,
  massKgPerM: number,
): Bar {
  return { system, designation, diameterMm, areaMm2, massKgPerM };
}

const TABLE: readonly Bar[] = [
  ...ASTM.map(([name, inches, area, mass]) => bar('astm', name, (inches * 1000 * 254) / 10_000, area, mass)),
  ...EN.map(([size, area, mass]) => bar('en', `Ø${size}`, size, area, mass)),
  ...CSA.map(([name, size, area, mass]) => bar('csa', name, size, area, mass)),
  ...AS_NZS.map(([size, area, mass]) => bar('as-nzs', `N${size}`, size, area, mass)),
  ...IS.map(([size, area, mass]) => bar('is', `IS ${size}`, size, area, mass)),
];

/** The bar sizes of one system, smallest first. */
export function barsOf(system: BarSystem): readonly Bar[] {
  return TABLE.filter((candidate) => candidate.system === system);
}

/** How each system's sizes are written, with the bare number caught. */
const WRITTEN: readonly (readonly [BarSystem, RegExp])[] = [
  ['astm', /^(?:#|no\.? ?)(\d+)$/],
  ['en', /^(?:[ø⌀φhb] ?(\d+)(?: ?mm)?|(\d+) ?mm)$/],
  ['csa', /^(\d+)m$/],
  ['as-nzs', /^n ?(\d+)$/],
  ['is', /^is ?(\d+)(?: ?mm)?$/],
];

const sizeOf = (candidate: Bar) => Number(candidate.designation.replace(/\D/g, ''));

/**
 * The bar that a designation names: `#5` or `No. 5` (ASTM, inch sizes), `Ø16`, `16 mm`, `H16`, `B16` (EN and ISO),
 * `15M` (CSA), `N16` (AS/NZS), `IS 16` (IS). A bare number names a bar only together with its `system`. Null where
 * the designation is not known: a size is never guessed.
 */
export function findBar(designation: string, system?: BarSystem): Bar | null {
  const text = designation.trim().replace(/\s+/g, ' ').toLowerCase();
  const pick = (of: BarSystem, size: number) =>
    TABLE.find((candidate) => candidate.system === of && sizeOf(candidate) === size) ?? null;
  if (system && /^\d+(?: ?mm)?$/.test(text)) return pick(system, Number.parseInt(text, 10));
  for (const [of, pattern] of WRITTEN) {
    const match = pattern.exec(text);
    if (match) return system && system !== of ? null : pick(of, Number(match[1] ?? match[2]));
  }
  return null;
}

/** The bar system that goes with a code; the contract alone names none. */
const SYSTEM_OF_BASIS: Readonly<Record<string, BarSystem>> = {
  'aci-318-19': 'astm',
  'en-1992': 'en',
  'csa-a23.1': 'csa',
  'as-3600': 'as-nzs',
  'is-456': 'is',
};

/** As `findBar`; a bare number ("16") is a size of the system that goes with the `basis`, where it has one. */
export function findBarFor(designation: string, basis: string): Bar | null {
  const system = SYSTEM_OF_BASIS[basis];
  return findBar(designation) ?? (system ? findBar(designation, system) : null);
}

const written = (designation: string) =>
  designation
    .toLowerCase()
    .replace(/[^a-z0-9#ø]/g, '')
    .replace(/(\d)mm$/, '$1');

/**
 * Do two designations name the same bar? They may be written in different ways ("16 mm", "Ø16"); what the tables do not
 * know is compared as text. `basis` gives a bare number its system, where it has one.
 */
export function isSameBar(one: string, other: string, basis = 'contract'): boolean {
  const [a, b] = [findBarFor(one, basis), findBarFor(other, basis)];
  if (a && b) return a.system === b.system && a.designation === b.designation;
  return written(one) === written(other);
}

/** Mass in kg of `lengthMm` of a bar, by the mass of its table. */
export function massOf(of: Bar, lengthMm: number): number {
  return (positive('mass per metre', of.massKgPerM) * notNegative('length', lengthMm)) / 1000;
}
