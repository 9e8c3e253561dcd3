import { formatLength, parseLength, type LengthUnit } from '@/lib/concrete/length';

/** Millimetres with no more digits than they have: 38.1, 50, 12.75. */
export const mmText = (mm: number): string => formatLength(mm, 'mm');

/** A length as text that a field reads back as the very same millimetres: rounding here would change a requirement. */
export function exactText(mm: number, units: LengthUnit): string {
  const text = formatLength(mm, units);
  const back = parseLength(text, units);
  return back.ok && back.length.mm !== null && Math.abs(back.length.mm - mm) < 1e-6
    ? text
    : `${Math.round(mm * 1e9) / 1e9} mm`;
}
