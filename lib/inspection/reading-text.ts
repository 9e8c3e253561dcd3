import { formatLength } from '@/lib/concrete/length';
import type { BodyOf } from './entry';
import { asEntered } from './length-as-entered';
import type { ReadingState } from './sheet-types';

/** A reading as its author entered it: "46 mm", "1 3/8 in", "block 38 mm passes". */
export function readingText(body: BodyOf<'reading'>): string {
  if (body.goNoGo) {
    return `block ${formatLength(body.goNoGo.blockMm, 'mm')} mm ${body.goNoGo.passes ? 'passes' : 'does not pass'}`;
  }
  if (!body.value) return 'nothing';
  return asEntered(body.value);
}

/** The body that counts now, or what was first recorded where it was withdrawn. */
export const bodyShown = (reading: ReadingState): BodyOf<'reading'> => reading.current ?? reading.entry.body;
