import { tapeNeighbours, withUnit, type LengthUnit } from '@/lib/concrete/length';
import { numberText } from '@/lib/concrete/number-text';

/** A length in the units chosen, and in the other ones beside it. */
export function lengthTexts(mm: number, units: LengthUnit): { text: string; also: string; value: number } {
  const other = units === 'mm' ? 'in' : 'mm';
  return { text: withUnit(mm, units), also: withUnit(mm, other), value: mm };
}

/** A least length as a person sets it out: up to the whole millimetre, or to the next sixteenth of an inch. */
export function setOutText(mm: number, units: LengthUnit): string {
  return units === 'mm' ? `${numberText(Math.ceil(mm - 1e-6), 0)} mm` : `${tapeNeighbours(mm).above.text} in`;
}

/** The marks of a tape on both sides of a limit that is on none of them. */
export function tapeText(mm: number, units: LengthUnit): string | undefined {
  if (units !== 'in' || mm < 0) return undefined;
  const { below, above } = tapeNeighbours(mm);
  return below.mm === above.mm ? undefined : `between ${below.text} and ${above.text} in on a tape`;
}
