import { findBar, type BarSystem } from '@/lib/concrete/bars';
import { listOf, positive, whole } from '@/lib/concrete/check-input';
import { ConcreteError } from '@/lib/concrete/concrete-error';
import { numberText } from '@/lib/concrete/number-text';
import type { TrailStep } from '@/lib/concrete/trail';
import { trailSource } from '@/lib/concrete/trail-source';

/** One row of a bar list; `lengthMm` is the cutting length. */
export interface BarListRow {
  mark: string;
  designation: string;
  lengthMm: number;
  count: number;
}

/** Bars, length and mass of one size. */
export interface SizeMass {
  designation: string;
  bars: number;
  lengthM: number;
  massKg: number;
}

const tabled = trailSource('tabled nominal mass per metre of the bar’s standard', '', 'seen');

/**
 * Masses of a bar list by size and in all, kg, from the nominal masses of the bar tables, and the difference to the
 * plan's total.
 * @param system read designations of this system first ("16" is another bar in another country)
 * @throws ConcreteError naming the mark where a size is unknown, or a length or count is impossible
 */
export function barListMasses(
  rows: readonly BarListRow[],
  options: { system?: BarSystem; planKg?: number } = {},
): {
  sizes: SizeMass[];
  totalKg: number;
  differenceKg: number | null;
  differencePercent: number | null;
  trail: TrailStep[];
} {
  const bySize = new Map<string, SizeMass & { kgPerM: number }>();
  for (const row of listOf('bar list', rows, 1)) {
    const name = `mark ${row.mark || '(none)'}`;
    const bar = findBar(row.designation, options.system);
    if (!bar) throw new ConcreteError(`${name}, size`, `"${row.designation}" is no known bar.`);
    const lengthM =
      (positive(`${name}, length`, row.lengthMm) * whole(`${name}, count`, row.count, 1)) / 1000;
    const key = `${bar.system} ${bar.designation}`;
    const size = bySize.get(key) ?? {
      designation: bar.designation,
      bars: 0,
      lengthM: 0,
      massKg: 0,
      kgPerM: bar.massKgPerM,
    };
    size.bars += row.count;
    size.lengthM += lengthM;
    size.massKg += lengthM * bar.massKgPerM;
    bySize.set(key, size);
  }
  const sizes = [...bySize.values()];
  const totalKg = sizes.reduce((sum, size) => sum + size.massKg, 0);
  const planKg = options.planKg === undefined ? null : positive('mass in the plan', options.planKg);
  return {
    sizes: sizes.map(({ designation, bars, lengthM, massKg }) => ({ designation, bars, lengthM, massKg })),
    totalKg,
    differenceKg: planKg === null ? null : totalKg - planKg,
    differencePercent: planKg === null ? null : (100 * (totalKg - planKg)) / planKg,
    trail: sizes.map((size) => {
      const product = `${numberText(size.lengthM, 2)} m × ${numberText(size.kgPerM, 3)} kg/m`;
      return tabled(`Mass of ${size.designation}`, `${product} = ${numberText(size.massKg, 1)} kg`);
    }),
  };
}
