import { ConcreteError } from '@/lib/concrete/concrete-error';

/** The two units that fields and sheets are shown in. */
export type LengthUnit = 'mm' | 'in';

/** Units that an entry may state. */
export type EnteredUnit = 'mm' | 'cm' | 'm' | 'in' | 'ft';

/** A length as it was entered, with its exact conversion; `unit` and `mm` are null while the unit is not known. */
export interface Length {
  text: string;
  unit: EnteredUnit | null;
  mm: number | null;
}

export type ParsedLength = { ok: true; length: Length } | { ok: false; problem: string };

/** Absolute slack of every comparison, in mm: it covers binary rounding and nothing that a tape could show. */
export const LENGTH_SLACK_MM = 1e-6;

/** 1 in = 25.4 mm exactly. */
export const MM_PER_INCH = 25.4;

const LONGEST_MM = 1_000_000;

/** True where `mm` is at least `limitMm`, inclusive, unrounded. */
export function atLeast(mm: number, limitMm: number): boolean {
  return mm >= limitMm - LENGTH_SLACK_MM;
}

/** True where `mm` is at most `limitMm`, inclusive, unrounded. */
export function atMost(mm: number, limitMm: number): boolean {
  return mm <= limitMm + LENGTH_SLACK_MM;
}

/** Tenths of a millimetre in one unit: whole numbers, so that a conversion rounds once only. */
const TENTHS: Record<EnteredUnit, number> = { mm: 10, cm: 100, m: 10_000, in: 254, ft: 3048 };

const UNIT_WORDS: Record<string, EnteredUnit> = {
  mm: 'mm',
  cm: 'cm',
  m: 'm',
  in: 'in',
  inch: 'in',
  inches: 'in',
  '"': 'in',
  ft: 'ft',
  foot: 'ft',
  feet: 'ft',
  "'": 'ft',
};

const VULGAR: Record<string, string> = {
  '¼': '1/4',
  '½': '1/2',
  '¾': '3/4',
  '⅓': '1/3',
  '⅔': '2/3',
  '⅕': '1/5',
  '⅖': '2/5',
  '⅗': '3/5',
  '⅘': '4/5',
  '⅙': '1/6',
  '⅚': '5/6',
  '⅛': '1/8',
  '⅜': '3/8',
  '⅝': '5/8',
  '⅞': '7/8',
};

function normalise(text: string): string {
  return text
    .replace(/[¼½¾⅓⅔⅕⅖⅗⅘⅙⅚⅛⅜⅝⅞]/g, (sign) => ` ${VULGAR[sign] ?? ''}`)
    .replace(/[\u2044\u2215]/g, '/')
    .replace(/[\u2032\u2018\u2019]/g, "'")
    .replace(/[\u2033\u201c\u201d]|''/g, '"')
    .replace(/[\u2010-\u2013]/g, '-')
    .replace(/\s+/g, ' ')
    .trim()
    .toLowerCase();
}

/** A number as a fraction of whole numbers, and whether it was written as one. */
interface Ratio {
  numerator: number;
  denominator: number;
  fraction: boolean;
}

const NUMBER = /^(?:(\d+)[ -]+)?(\d+) ?\/ ?(\d+)$|^(\d+\.?\d*|\.\d+)$/;

function readNumber(text: string): Ratio | string {
  const match = NUMBER.exec(text);
  if (!match) return 'This is not a length. Write it like 38 mm, 3.8 cm, 1 3/8 in or 2\' 6".';
  const [, whole, upper, lower, decimal] = match;
  if (decimal !== undefined) {
    const places = decimal.includes('.') ? decimal.length - decimal.indexOf('.') - 1 : 0;
    return { numerator: Number(decimal.replace('.', '')), denominator: 10 ** places, fraction: false };
  }
  const numerator = Number(upper);
  const denominator = Number(lower);
  if (denominator === 0) return 'A fraction cannot have zero below the line.';
  if (whole !== undefined && numerator >= denominator) {
    return 'A fraction beside a whole number is less than one, as in 1 3/8.';
  }
  return { numerator: Number(whole ?? 0) * denominator + numerator, denominator, fraction: true };
}

function toMm(number: Ratio, unit: EnteredUnit): number {
  return (number.numerator * TENTHS[unit]) / (number.denominator * 10);
}

function finish(text: string, unit: EnteredUnit | null, mm: number | null): ParsedLength {
  if (mm !== null && !(mm <= LONGEST_MM)) return { ok: false, problem: 'This is longer than one kilometre.' };
  return { ok: true, length: { text, unit, mm } };
}

/**
 * Reads a length as people write it: `38`, `38 mm`, `3.8 cm`, `1 3/8`, `1-3/8"`, `1.375 in`, `2' 6"`, with typographic
 * marks and fractions too. A bare number takes the unit that its field shows (`fieldUnit`); without one it is kept
 * with `unit` and `mm` null, because a unit is never guessed. Refuses, with one sentence: a decimal comma, a minus
 * sign, a fraction of millimetres, feet with unmarked inches, anything that is no length.
 */
export function parseLength(text: string, fieldUnit?: LengthUnit): ParsedLength {
  const kept = text.trim();
  const refuse = (problem: string): ParsedLength => ({ ok: false, problem });
  const clean = normalise(kept);
  if (clean === '') return refuse('Write a length.');
  if (kept.length > 40) return refuse('This is too long for a length: at most 40 characters.');
  if (clean.includes(','))
    return refuse('Write decimals with a point, as in 3.8: a comma can mean two things.');
  if (clean.startsWith('-')) return refuse('A length is not less than zero: leave the minus sign out.');

  const feet = /^([\d./ -]+?) ?(?:'|feet|foot|ft) ?-? ?(\d.*)$/.exec(clean);
  if (feet) return readFeetAndInches(kept, feet[1] ?? '', feet[2] ?? '');

  const parts = /^([\d./ -]*[\d.]) ?([a-z"']*)$/.exec(clean);
  if (!parts) return refuse('This is not a length. Write it like 38 mm, 3.8 cm, 1 3/8 in or 2\' 6".');
  const number = readNumber((parts[1] ?? '').trim());
  if (typeof number === 'string') return refuse(number);
  const word = parts[2] ?? '';
  const unit = word === '' ? (fieldUnit ?? null) : UNIT_WORDS[word];
  if (unit === undefined) return refuse(`"${word}" is not a unit known here. Use mm, cm, m, in or ft.`);
  if (unit === null) return finish(kept, null, null);
  if (number.fraction && unit !== 'in' && unit !== 'ft') {
    return refuse(
      word === ''
        ? 'This field is in millimetres. Write the unit with a fraction, as in 1 3/8 in.'
        : 'Fractions are for inches and feet. Write a decimal, as in 37.5 mm.',
    );
  }
  return finish(kept, unit, toMm(number, unit));
}

function readFeetAndInches(kept: string, feetText: string, inchText: string): ParsedLength {
  const marked = /^(.*?) ?(?:"|inches|inch|in)$/.exec(inchText);
  if (!marked) return { ok: false, problem: 'Mark the inches after the feet, as in 2\' 6".' };
  const feet = readNumber(feetText.trim());
  const inches = readNumber((marked[1] ?? '').trim());
  if (typeof feet === 'string') return { ok: false, problem: feet };
  if (typeof inches === 'string') return { ok: false, problem: inches };
  if (feet.denominator !== 1)
    return { ok: false, problem: 'Write whole feet when inches follow, as in 2\' 6".' };
  if (inches.numerator >= 12 * inches.denominator) {
    return { ok: false, problem: 'Inches after feet are less than 12.' };
  }
  const total: Ratio = {
    numerator: feet.numerator * 12 * inches.denominator + inches.numerator,
    denominator: inches.denominator,
    fraction: inches.fraction,
  };
  return finish(kept, 'ft', toMm(total, 'in'));
}

/** Denominators that are shown as fractions of an inch: the tape's, and the thirds that code rules make of them. */
const SHOWN_DENOMINATORS = [1, 2, 4, 8, 16, 3, 6, 12, 24];

function inchFraction(mm: number): string | null {
  for (const denominator of SHOWN_DENOMINATORS) {
    const parts = Math.round((mm * denominator) / MM_PER_INCH);
    if (Math.abs(parts * (MM_PER_INCH / denominator) - mm) > LENGTH_SLACK_MM) continue;
    const size = Math.abs(parts);
    const whole = Math.floor(size / denominator);
    const rest = size % denominator;
    const shown = rest === 0 ? `${whole}` : `${whole > 0 ? `${whole} ` : ''}${rest}/${denominator}`;
    return parts < 0 ? `-${shown}` : shown;
  }
  return null;
}

/** How decimals of a unit are written: places of an exact value at most, places of a rounded one at first. */
const DECIMALS: Record<LengthUnit, { per: number; exact: number; rounded: number }> = {
  mm: { per: 1, exact: 3, rounded: 2 },
  in: { per: MM_PER_INCH, exact: 5, rounded: 3 },
};

/**
 * The shortest decimal that is exact within the slack; otherwise rounded, with as many more places as keep it from
 * looking like a rounder number, or a fraction of an inch, that it is not.
 */
function decimal(mm: number, unit: LengthUnit): string {
  const { per, exact, rounded } = DECIMALS[unit];
  const value = mm / per;
  if (Number.isInteger(value) && Math.abs(value) <= LONGEST_MM) return String(value);
  for (let places = 0; places <= exact; places += 1) {
    const text = value.toFixed(places);
    if (Math.abs(Number(text) * per - mm) <= LENGTH_SLACK_MM) return unsigned(text);
  }
  const looksExact = (text: string) =>
    text.endsWith('0') || (unit === 'in' && inchFraction(Number(text) * per) !== null);
  let text = value.toFixed(rounded);
  for (let places = rounded + 1; places <= 9 && looksExact(text); places += 1) text = value.toFixed(places);
  return unsigned(text);
}

function unsigned(text: string): string {
  return /^-0(\.0*)?$/.test(text) ? text.slice(1) : text;
}

interface Shown {
  text: string;
  /** The value that a reader takes from the text. */
  value: number;
}

function plain(mm: number, unit: LengthUnit): Shown {
  const fraction = unit === 'in' ? inchFraction(mm) : null;
  if (fraction !== null) return { text: fraction, value: mm / MM_PER_INCH };
  const text = decimal(mm, unit);
  return { text, value: Number(text) };
}

/**
 * Digits of a length in `unit`, without the unit: decimals of a millimetre, or inches as a fraction where it is exactly
 * one (sixteenths of a tape, and thirds of those) and as a decimal where it is not. Given the length that it stands
 * `beside` (a limit, say), it adds digits until the two are told apart in their true order: rounding never makes a
 * failure look like the limit. Show the limit with the reading as its own `beside`, and both are told apart.
 */
export function formatLength(mm: number, unit: LengthUnit, beside?: number): string {
  if (!Number.isFinite(mm)) throw new ConcreteError('length', 'This is not a finite number.');
  const own = plain(mm, unit);
  if (beside === undefined || !Number.isFinite(beside)) return own.text;
  if (Math.abs(mm - beside) <= LENGTH_SLACK_MM) return plain(beside, unit).text;
  const other = plain(beside, unit);
  // Values that differ by binary rounding only are the same to a reader.
  const apart = Math.abs(own.value - other.value) > 1e-9;
  if (apart && own.value < other.value === mm < beside) return own.text;
  if (unit === 'in' && inchFraction(mm) !== null) return own.text;
  const { per } = DECIMALS[unit];
  for (let places = 3; places < 12; places += 1) {
    const text = (mm / per).toFixed(places);
    if (text !== (beside / per).toFixed(places)) return unsigned(text);
  }
  return String(mm / per);
}

/** As `formatLength`, with the unit: `38 mm`, `1 3/8 in`. */
export function withUnit(mm: number, unit: LengthUnit, beside?: number): string {
  return `${formatLength(mm, unit, beside)} ${unit}`;
}

/** Arithmetic on lengths as a trail shows it, in one unit: `12 − 1 3/4 − 5/8 = 9 5/8 in`. */
export function lengthArithmetic(
  terms: readonly number[],
  sign: '+' | '−',
  resultMm: number,
  unit: LengthUnit,
): string {
  return `${terms.map((term) => formatLength(term, unit)).join(` ${sign} `)} = ${withUnit(resultMm, unit)}`;
}

export interface TapeMark {
  mm: number;
  /** Inches as a tape shows them: `1 7/16`. */
  text: string;
}

/** The two marks of a tape in sixteenths of an inch between which `mm` lies; both are the same mark where it is on one. */
export function tapeNeighbours(mm: number): { below: TapeMark; above: TapeMark } {
  if (!Number.isFinite(mm) || mm < 0) throw new ConcreteError('length', 'A tape shows lengths from zero up.');
  const step = MM_PER_INCH / 16;
  const nearest = Math.round(mm / step);
  const on = Math.abs(nearest * step - mm) <= LENGTH_SLACK_MM;
  const below = on ? nearest : Math.floor(mm / step);
  const above = on ? nearest : below + 1;
  const mark = (count: number): TapeMark => ({
    mm: count * step,
    text: inchFraction(count * step) ?? String(count / 16),
  });
  return { below: mark(below), above: mark(above) };
}
