import { formatLength, type LengthUnit } from '@/lib/concrete/length';
import type { MarkKind, PointState, ReadingState } from '@/lib/inspection/sheet-types';
import { asEntered } from '@/lib/inspection/length-as-entered';
import type { Requirement } from '@/lib/inspection/plan';
import { mmText } from './length-words';

/** The mark of one reading, by its own verdict. */
export function readingMark(reading: Pick<ReadingState, 'judged'>): MarkKind {
  const { verdict, side, flags } = reading.judged;
  if (verdict === 'not-verified') return 'not-verified';
  if (verdict === 'not-met') return side === 'high' ? 'not-met-high' : 'not-met-low';
  return flags.length > 0 ? 'met-flagged' : 'met';
}

/** The cover read, as entered, with the plan's unit beside it where the two differ. */
export function readingText(body: ReadingState['entry']['body'], units: LengthUnit): string {
  if (body.goNoGo)
    return `${body.goNoGo.passes ? 'at least' : 'less than'} ${mmText(body.goNoGo.blockMm)} mm`;
  if (!body.value) return 'none';
  const text = asEntered(body.value);
  const same = body.value.unit === units || body.value.mm === null;
  return same ? text : `${text} (${formatLength(body.value.mm ?? 0, units)} ${units})`;
}

/** "specified 50 mm, accepted from 38 mm to 60 mm". */
export function requirementWords(requirement: Requirement, units: LengthUnit): string {
  const show = (mm: number) => `${formatLength(mm, units, requirement.leastAcceptedMm)} ${units}`;
  const most = requirement.mostAcceptedMm === null ? '' : ` to ${show(requirement.mostAcceptedMm)}`;
  return `specified ${show(requirement.specifiedMm)}, accepted from ${show(requirement.leastAcceptedMm)}${most}`;
}

/** The reading of a point that governs for one requirement, or null while there is none. */
export const governingFor = (point: PointState, requirementId: string): ReadingState | null =>
  point.governing.find((reading) => reading.requirement?.id === requirementId) ?? null;
