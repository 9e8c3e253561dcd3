import { formatLength, type LengthUnit } from '@/lib/concrete/length';
import type { MeasuredValue } from '@/lib/inspection/measured-value';
import type { MeasurementItem } from '@/lib/inspection/plan';
import { emptyMeasure, type Measure } from './measure-draft';
import { pressesOf } from './reading-keys';

/** Bars of a sample square each way: 2 m at 100 mm. */
export const MOST_BARS = 21;

/** A value that was recorded, as the form that entered it would show it. */
export function measureOfValue(value: MeasuredValue, unit: LengthUnit): Measure {
  switch (value.quantity) {
    case 'length':
      return { quantity: 'length', presses: pressesOf(value.length, unit) };
    case 'count':
      return { quantity: 'count', text: String(value.count) };
    case 'share': {
      const columns = columnsOf(value.of);
      return {
        quantity: 'share',
        columns,
        rows: value.of / columns,
        tied: Array.from({ length: value.tied }, (_, index) => index),
        atEdge: value.atEdge ?? false,
        onPerimeter: value.onPerimeter === undefined ? '' : String(value.onPerimeter),
      };
    }
    case 'designation':
      return { quantity: 'designation', text: value.designation };
    case 'part':
      return { quantity: 'part', count: String(value.count), of: String(value.of) };
    case 'starter':
      return { quantity: 'starter', presses: pressesOf(value.length, unit), pulled: value.pulled };
    case 'coupler': {
      const threads = value.threads === null ? '' : String(value.threads);
      return { quantity: 'coupler', type: value.type, marks: value.marks, threads };
    }
    case 'damage':
      return {
        quantity: 'damage',
        spots: value.spots.map((spot) => ({
          kind: spot.kind,
          from: formatLength(spot.fromMm, unit),
          length: formatLength(spot.lengthMm, unit),
          width: spot.lengthMm === 0 ? '' : formatLength(spot.areaMm2 / spot.lengthMm, unit),
        })),
        barLength: value.barLengthMm === null ? '' : formatLength(value.barLengthMm, unit),
        bareCutEnds: String(value.bareCutEnds),
        flameCutEnds: String(value.flameCutEnds),
      };
    case 'height':
      return {
        quantity: 'height',
        presses: pressesOf(value.length, unit),
        from: value.from,
        to: value.to,
      };
    case 'ticket': {
      const dosage = value.kgPerM3 === null ? '' : String(value.kgPerM3);
      return { quantity: 'ticket', ticket: value.ticket, fibreType: value.fibreType ?? '', dosage };
    }
  }
}

/**
 * The empty form for the next place: what places have in common is kept from the last one, so that a square of the same
 * size is counted without setting it up again.
 */
export function nextMeasure(item: MeasurementItem, last: MeasuredValue | null, unit: LengthUnit): Measure {
  const empty = emptyMeasure(item);
  if (last === null || last.quantity !== empty.quantity) return empty;
  const before = measureOfValue(last, unit);
  if (empty.quantity === 'share' && before.quantity === 'share' && before.rows <= MOST_BARS)
    return { ...empty, rows: before.rows, columns: before.columns };
  if (empty.quantity === 'coupler' && before.quantity === 'coupler') return { ...empty, type: before.type };
  return empty;
}

/** The side of a square of so many crossings, or of the rectangle that is nearest to one. */
function columnsOf(crossings: number): number {
  let columns = Math.round(Math.sqrt(crossings));
  while (crossings % columns !== 0) columns -= 1;
  return columns;
}
