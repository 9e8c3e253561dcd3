import { parseLength } from '@/lib/concrete/length';
import type { LengthAsEntered } from './primitives';

/** A length as it was entered, for people; the unit is added only where the text has none. */
export function asEntered(length: LengthAsEntered): string {
  const bare = parseLength(length.text);
  if (!bare.ok || bare.length.unit !== null) return length.text;
  return length.unit === null ? `${length.text} (unit not given)` : `${length.text} ${length.unit}`;
}
