import type { Tone } from '@/components/ui/tone';
import { blockCheckPasses, standingAt } from '@/lib/inspection/instruments';
import type { InstrumentState } from '@/lib/inspection/sheet-types';
import { clockTime } from './field-time';

export const instrumentKindWords = {
  tape: 'tape',
  'depth-gauge': 'depth gauge',
  'cover-meter': 'cover meter',
  calliper: 'calliper',
  block: 'go/no-go block',
} as const;

export interface InstrumentStanding {
  words: string;
  /** Where a cell of a small phone has to do. */
  short: string;
  tone: Tone;
  /** Would readings with it count? */
  good: boolean;
}

const doubtful = (words: string, short = words): InstrumentStanding => ({
  words,
  short,
  tone: 'hold',
  good: false,
});

/** How an instrument stands now, in two or three words, and whether readings with it would count. */
export function instrumentStanding(
  state: InstrumentState,
  at: { now: string; timeZone: string; clockOffsetMs: number | null },
): InstrumentStanding {
  const standing = standingAt(state, at.now, at.clockOffsetMs);
  if (standing === 'suspect') return doubtful('suspect');
  if (standing === 'out-of-calibration') {
    return state.status?.body.inService === false
      ? doubtful('out of service')
      : doubtful('out of calibration', 'calibration over');
  }
  if (standing === 'unknown') return doubtful('nothing known');
  if (state.status?.body.kind === 'block')
    return { words: 'in service', short: 'in service', tone: 'met', good: true };
  const last = state.blockChecks.findLast((check) => blockCheckPasses(check.body));
  const today = last && Date.parse(at.now) - Date.parse(last.body.at) < 14 * 3_600_000;
  if (!today)
    return { words: 'no block check this shift', short: 'not checked yet', tone: 'watch', good: true };
  const checked = `checked ${clockTime(last.body.at, at.timeZone)}`;
  return { words: checked, short: checked, tone: 'met', good: true };
}
