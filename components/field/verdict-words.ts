import { markOfReading } from '@/lib/inspection/judge-point';
import { formatLength, type LengthUnit } from '@/lib/concrete/length';
import { markWords } from '@/components/drawings/mark-words';
import type { BodyOf } from '@/lib/inspection/entry';
import { asEntered } from '@/lib/inspection/length-as-entered';
import type { JudgedReading } from '@/lib/concrete/judge-reading';
import type { ReadingState } from '@/lib/inspection/sheet-types';

/** A reading as its author entered it: "46 mm", "1 3/8 in", "block 38 mm passes". */
export function readingText(body: BodyOf<'reading'>): string {
  if (body.goNoGo) {
    return `block ${formatLength(body.goNoGo.blockMm, 'mm')} mm ${body.goNoGo.passes ? 'passes' : 'does not pass'}`;
  }
  if (!body.value) return 'nothing';
  return asEntered(body.value);
}

/** "met", "met, at limit or inside uncertainty", "not met, low": the verdict in words. */
export const verdictWords = (judged: JudgedReading): string => markWords[markOfReading(judged)];

/** "8 above", "7 below": how far from the nearer limit, in the unit shown; empty where nothing was compared. */
export function marginWords(judged: JudgedReading, unit: LengthUnit): string {
  if (judged.marginMm === null) return '';
  const size = formatLength(Math.abs(judged.marginMm), unit, 0);
  if (judged.side === 'high') return `${size} over`;
  if (judged.marginMm < 0) return `${size} below`;
  return judged.flags.includes('at-limit') ? 'at the limit' : `${size} inside`;
}

/** The body that counts now, or what was first recorded where it was withdrawn. */
export const bodyShown = (reading: ReadingState): BodyOf<'reading'> => reading.current ?? reading.entry.body;
