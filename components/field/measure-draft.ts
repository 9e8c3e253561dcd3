import type { LengthUnit } from '@/lib/concrete/length';
import type { BodyOf } from '@/lib/inspection/entry';
import type { MeasurementItem } from '@/lib/inspection/plan';
import { readPresses, type Press } from './reading-keys';

/** A measured value while it is being entered. */
export type Measure =
  | { quantity: 'length'; presses: readonly Press[] }
  | { quantity: 'count'; text: string }
  | { quantity: 'share'; rows: number; columns: number; tied: readonly number[] }
  | { quantity: 'designation'; text: string };

/** A sample of 2 m at 300 mm gives about seven bars each way. */
const SAMPLE_BARS = 7;

export function emptyMeasure(item: MeasurementItem): Measure {
  switch (item.quantity) {
    case 'length':
      return { quantity: 'length', presses: [] };
    case 'count':
      return { quantity: 'count', text: '' };
    case 'share':
      return { quantity: 'share', rows: SAMPLE_BARS, columns: SAMPLE_BARS, tied: [] };
    case 'designation':
      return { quantity: 'designation', text: '' };
  }
}

type Read = { ok: true; value: BodyOf<'measurement'>['value'] } | { ok: false; problem: string };

/** The value as it is recorded, or what is missing. */
export function measuredValue(measure: Measure, unit: LengthUnit): Read {
  switch (measure.quantity) {
    case 'length': {
      const read = readPresses(measure.presses, unit);
      return read.ok ? { ok: true, value: { quantity: 'length', length: read.value } } : read;
    }
    case 'count':
      return /^\d+$/.test(measure.text.trim())
        ? { ok: true, value: { quantity: 'count', count: Number(measure.text) } }
        : { ok: false, problem: 'Write how many there are, as a whole number.' };
    case 'share': {
      const of = measure.rows * measure.columns;
      const tied = measure.tied.filter((index) => index < of).length;
      return { ok: true, value: { quantity: 'share', of, tied } };
    }
    case 'designation':
      return measure.text.trim()
        ? { ok: true, value: { quantity: 'designation', designation: measure.text.trim() } }
        : { ok: false, problem: 'Write the bar found.' };
  }
}
