import { psiToMPa } from '@/lib/concrete/stress-units';

export type QuantityName = 'stress' | 'temperature' | 'speed';

interface Unit {
  sign: string;
  words: readonly string[];
  /** Into the unit that goes with millimetres. */
  toFirst: (value: number) => number;
}

interface Quantity {
  units: { mm: Unit; in: Unit };
  /** Units that may be written but are not offered. */
  more: readonly Unit[];
  /** What makes sense, in the first unit. */
  least: number;
  most: number;
}

const same = (value: number) => value;

/** 1 mile = 1.609344 km exactly. */
export const KM_PER_MILE = 1.609344;

export const quantities: Readonly<Record<QuantityName, Quantity>> = {
  stress: {
    units: {
      mm: { sign: 'MPa', words: ['mpa', 'n/mm2', 'n/mm²'], toFirst: same },
      in: { sign: 'psi', words: ['psi'], toFirst: psiToMPa },
    },
    more: [{ sign: 'ksi', words: ['ksi'], toFirst: (value) => psiToMPa(1000 * value) }],
    least: 0,
    most: 3000,
  },
  temperature: {
    units: {
      mm: { sign: '°C', words: ['°c', 'c'], toFirst: same },
      in: { sign: '°F', words: ['°f', 'f'], toFirst: (value) => ((value - 32) * 5) / 9 },
    },
    more: [],
    least: -100,
    most: 200,
  },
  speed: {
    units: {
      mm: { sign: 'km/h', words: ['km/h', 'kmh', 'kph'], toFirst: same },
      in: { sign: 'mph', words: ['mph'], toFirst: (value) => value * KM_PER_MILE },
    },
    more: [{ sign: 'm/s', words: ['m/s'], toFirst: (value) => value * 3.6 }],
    least: 0,
    most: 400,
  },
};

export type ParsedNumber = { ok: true; value: number } | { ok: false; problem: string };

const NUMBER = /^([-−]?(?:\d+\.?\d*|\.\d+)) ?(.*)$/;

/** A number and what follows it, or the sentence that says why it is none. */
function split(text: string): { value: number; rest: string } | string {
  if (text.includes(',')) return 'Write decimals with a point, as in 3.8: a comma can mean two things.';
  const match = NUMBER.exec(text);
  if (!match) return 'This is not a number. Write it with digits, as in 0.45.';
  return { value: Number((match[1] ?? '').replace('−', '-')), rest: (match[2] ?? '').trim().toLowerCase() };
}

function within(value: number, least: number, most: number, unit: string): ParsedNumber {
  if (value < least || value > most)
    return { ok: false, problem: `It has to lie from ${least} to ${most}${unit && ` ${unit}`}.` };
  return { ok: true, value };
}

/** Reads a plain number between bounds; its own unit may stand after it. */
export function parseNumber(
  text: string,
  field: { least: number; most: number; whole?: boolean; unit?: string },
): ParsedNumber {
  const read = split(text);
  if (typeof read === 'string') return { ok: false, problem: read };
  const unit = field.unit ?? '';
  if (read.rest !== '' && read.rest !== unit.toLowerCase())
    return { ok: false, problem: unit ? `Write a number of ${unit}.` : 'Write a number without a unit.' };
  if (field.whole && !Number.isInteger(read.value))
    return { ok: false, problem: 'It has to be a whole number.' };
  return within(read.value, field.least, field.most, unit);
}

/** Reads a quantity; a bare number takes the unit that goes with `system`. The value is in the first unit. */
export function parseQuantity(text: string, name: QuantityName, system: 'mm' | 'in'): ParsedNumber {
  const read = split(text);
  if (typeof read === 'string') return { ok: false, problem: read };
  const { units, more, least, most } = quantities[name];
  const known = [units.mm, units.in, ...more];
  const unit = read.rest === '' ? units[system] : known.find(({ words }) => words.includes(read.rest));
  if (!unit) {
    const signs = known.map(({ sign }) => sign).join(', ');
    return { ok: false, problem: `"${read.rest}" is not a unit known here. Use ${signs}.` };
  }
  return within(unit.toFirst(read.value), least, most, units.mm.sign);
}
