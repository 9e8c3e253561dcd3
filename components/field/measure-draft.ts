import type { LengthUnit } from '@/lib/concrete/length';
import type { MeasuredValue } from '@/lib/inspection/measured-value';
import type { MeasurementItem } from '@/lib/inspection/plan';
import { emptyDamage, readDamage, type DamageDraft } from './damage-draft';
import { readPresses, type Press } from './reading-keys';

type Value<Q extends MeasuredValue['quantity']> = Extract<MeasuredValue, { quantity: Q }>;

/** A measured value while it is being entered. */
export type Measure =
  | { quantity: 'length'; presses: readonly Press[] }
  | { quantity: 'count'; text: string }
  | {
      quantity: 'share';
      rows: number;
      columns: number;
      tied: readonly number[];
      atEdge: boolean;
      /** Intersections on the mat's outermost rows, as typed. */
      onPerimeter: string;
    }
  | { quantity: 'designation'; text: string }
  | { quantity: 'part'; count: string; of: string }
  | { quantity: 'starter'; presses: readonly Press[]; pulled: Value<'starter'>['pulled'] | '' }
  | { quantity: 'coupler'; type: string; marks: Value<'coupler'>['marks'] | ''; threads: string }
  | DamageDraft
  | {
      quantity: 'height';
      presses: readonly Press[];
      from: Value<'height'>['from'] | '';
      to: Value<'height'>['to'] | '';
    }
  | { quantity: 'ticket'; ticket: string; fibreType: string; dosage: string };

/** A sample of 2 m at 300 mm gives about seven bars each way. */
const SAMPLE_BARS = 7;

export function emptyMeasure(item: MeasurementItem): Measure {
  switch (item.quantity) {
    case 'length':
      return { quantity: 'length', presses: [] };
    case 'count':
      return { quantity: 'count', text: '' };
    case 'share': {
      const square = { rows: SAMPLE_BARS, columns: SAMPLE_BARS };
      return { quantity: 'share', ...square, tied: [], atEdge: false, onPerimeter: '' };
    }
    case 'designation':
      return { quantity: 'designation', text: '' };
    case 'part':
      return { quantity: 'part', count: '', of: '' };
    case 'starter':
      return { quantity: 'starter', presses: [], pulled: '' };
    case 'coupler':
      // Nothing is filled in that somebody has to look at.
      return { quantity: 'coupler', type: '', marks: '', threads: '' };
    case 'damage':
      return emptyDamage();
    case 'height':
      return { quantity: 'height', presses: [], from: '', to: '' };
    case 'ticket':
      return { quantity: 'ticket', ticket: '', fibreType: '', dosage: '' };
  }
}

export type ReadMeasure = { ok: true; value: MeasuredValue } | { ok: false; problem: string };

const refuse = (problem: string): ReadMeasure => ({ ok: false, problem });
const isWhole = (text: string): boolean => /^\d+$/.test(text.trim());

/** The value as it is recorded, or what is missing. */
export function measuredValue(measure: Measure, unit: LengthUnit): ReadMeasure {
  switch (measure.quantity) {
    case 'length': {
      const read = readPresses(measure.presses, unit);
      return read.ok ? { ok: true, value: { quantity: 'length', length: read.value } } : read;
    }
    case 'count':
      return isWhole(measure.text)
        ? { ok: true, value: { quantity: 'count', count: Number(measure.text) } }
        : refuse('Write how many there are, as a whole number.');
    case 'share':
      return readShare(measure);
    case 'designation':
      return measure.text.trim()
        ? { ok: true, value: { quantity: 'designation', designation: measure.text.trim() } }
        : refuse('Write the bar found.');
    case 'part': {
      if (!isWhole(measure.count) || !isWhole(measure.of))
        return refuse('Write both counts as whole numbers.');
      const [count, of] = [Number(measure.count), Number(measure.of)];
      if (of === 0) return refuse('Count all bars of the section: more than zero.');
      return count <= of
        ? { ok: true, value: { quantity: 'part', count, of } }
        : refuse('There are more lapped bars than bars: count again.');
    }
    case 'starter': {
      const read = readPresses(measure.presses, unit);
      if (!read.ok) return read;
      const { pulled } = measure;
      return pulled === ''
        ? refuse('Say what the bar did when it was pulled.')
        : { ok: true, value: { quantity: 'starter', length: read.value, pulled } };
    }
    case 'coupler':
      return readCoupler(measure);
    case 'damage':
      return readDamage(measure, unit);
    case 'height': {
      const { from, to } = measure;
      if (from === '' || to === '')
        return refuse('Say where it was taken from, and to which part of the tendon.');
      const read = readPresses(measure.presses, unit);
      return read.ok ? { ok: true, value: { quantity: 'height', length: read.value, from, to } } : read;
    }
    case 'ticket':
      return readTicket(measure);
  }
}

function readShare(measure: Extract<Measure, { quantity: 'share' }>): ReadMeasure {
  const of = measure.rows * measure.columns;
  const tied = measure.tied.filter((index) => index < of).length;
  if (!measure.atEdge) return { ok: true, value: { quantity: 'share', of, tied } };
  if (measure.onPerimeter.trim() === '')
    return { ok: true, value: { quantity: 'share', of, tied, atEdge: true } };
  if (!isWhole(measure.onPerimeter) || Number(measure.onPerimeter) > of)
    return refuse(`Write how many crossings lie on the outermost rows: a whole number, at most ${of}.`);
  return {
    ok: true,
    value: { quantity: 'share', of, tied, atEdge: true, onPerimeter: Number(measure.onPerimeter) },
  };
}

function readCoupler({ type, marks, threads }: Extract<Measure, { quantity: 'coupler' }>): ReadMeasure {
  if (!type.trim()) return refuse('Write the type that the coupler shows.');
  if (marks === '') return refuse('Say whether both bars reach their witness marks.');
  if (threads.trim() !== '' && !isWhole(threads))
    return refuse('Write the threads in sight as a whole number.');
  const counted = threads.trim() === '' ? null : Number(threads);
  return { ok: true, value: { quantity: 'coupler', type: type.trim(), marks, threads: counted } };
}

function readTicket({ ticket, fibreType, dosage }: Extract<Measure, { quantity: 'ticket' }>): ReadMeasure {
  const kgPerM3 = dosage.trim() === '' ? null : Number(dosage.trim().replace(',', '.'));
  if (kgPerM3 !== null && !(kgPerM3 >= 0)) return refuse('Write the dosage as a number, in kg/m³.');
  const named = fibreType.trim() || null;
  return { ok: true, value: { quantity: 'ticket', ticket: ticket.trim(), fibreType: named, kgPerM3 } };
}
