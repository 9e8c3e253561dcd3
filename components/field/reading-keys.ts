import { formatLength, MM_PER_INCH, parseLength, type LengthUnit } from '@/lib/concrete/length';
import type { LengthAsEntered } from '@/lib/inspection/primitives';

/** The fraction keys of the keypad: they add up, so that 1 3/8 is 1, then 1/4, then 1/8. */
export const fractionKeys = ['1/2', '1/4', '1/8', '1/16'] as const;
export type FractionKey = (typeof fractionKeys)[number];

const sixteenths: Record<FractionKey, number> = { '1/2': 8, '1/4': 4, '1/8': 2, '1/16': 1 };

/** One key pressed for a reading; the last one is what "delete" takes back. */
export type Press = { kind: 'char'; char: string } | { kind: 'fraction'; key: FractionKey };

const MOST_CHARACTERS = 12;

/** Characters that a keyboard, or a gauge that types, may send: digits, a point, a fraction, a unit. */
const TYPED = /^[0-9./ "'minMIN-]$/;

/** The value shown for a list of presses, in the words of the unit: "46", "1 3/8", or as it was typed. */
export function shownPresses(presses: readonly Press[], unit: LengthUnit): string {
  const typed = presses.map((press) => (press.kind === 'char' ? press.char : '')).join('');
  const parts = presses.reduce(
    (sum, press) => sum + (press.kind === 'fraction' ? sixteenths[press.key] : 0),
    0,
  );
  if (parts === 0) return typed;
  const whole = typed === '' ? 0 : Number(typed);
  if (unit !== 'in' || !Number.isInteger(whole)) return typed;
  return formatLength((whole + parts / 16) * MM_PER_INCH, 'in');
}

/** Presses after one more; the same list where the key makes no sense there. */
export function pressed(presses: readonly Press[], press: Press): readonly Press[] {
  const typed = presses.filter((one) => one.kind === 'char');
  const fractions = presses.length - typed.length;
  const plain = typed.every((one) => one.kind === 'char' && /\d/.test(one.char));
  if (press.kind === 'fraction') return plain && fractions < 8 ? [...presses, press] : presses;
  if (!TYPED.test(press.char) || typed.length >= MOST_CHARACTERS) return presses;
  // Fractions and a typed point do not go together: the value on the screen would be anybody's guess.
  if (fractions > 0 && !/\d/.test(press.char)) return presses;
  if (press.char === '.' && typed.some((one) => one.kind === 'char' && one.char === '.')) return presses;
  return [...presses, press];
}

/** The presses that say a length again as it was entered, with its unit where the keypad is set to another. */
export function pressesOf(value: LengthAsEntered, unit: LengthUnit): readonly Press[] {
  const bare = value.unit === null || value.unit === unit || /[a-z"']/i.test(value.text);
  const text = bare ? value.text : `${value.text} ${value.unit}`;
  return [...text].map((char) => ({ kind: 'char', char }));
}

export type ReadPresses = { ok: true; value: LengthAsEntered } | { ok: false; problem: string };

/** The length that the presses say, as entered and exactly converted; or why they say none. */
export function readPresses(presses: readonly Press[], unit: LengthUnit): ReadPresses {
  const text = shownPresses(presses, unit).trim();
  if (text === '') return { ok: false, problem: 'Type the reading first.' };
  const parsed = parseLength(text, unit);
  return parsed.ok ? { ok: true, value: parsed.length } : parsed;
}
