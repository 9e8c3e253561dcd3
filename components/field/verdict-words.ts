import { markOfReading } from '@/lib/inspection/judge-point';
import { formatLength, type LengthUnit } from '@/lib/concrete/length';
import { markWords } from '@/components/drawings/mark-words';
import type { JudgedReading } from '@/lib/concrete/judge-reading';

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
