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

/** How an instrument stands now, in two or three words, and whether readings with it would count. */
export function instrumentStanding(
  state: InstrumentState,
  at: { now: string; timeZone: string; clockOffsetMs: number | null },
): { words: string; tone: Tone; good: boolean } {
  const standing = standingAt(state, at.now, at.clockOffsetMs);
  if (standing === 'suspect') return { words: 'suspect', tone: 'hold', good: false };
  if (standing === 'out-of-calibration') {
    return {
      words: state.status?.body.inService === false ? 'out of service' : 'out of calibration',
      tone: 'hold',
      good: false,
    };
  }
  if (standing === 'unknown') return { words: 'nothing known', tone: 'hold', good: false };
  if (state.status?.body.kind === 'block') return { words: 'in service', tone: 'met', good: true };
  const last = state.blockChecks.findLast((check) => blockCheckPasses(check.body));
  const today = last && Date.parse(at.now) - Date.parse(last.body.at) < 14 * 3_600_000;
  return today
    ? { words: `checked ${clockTime(last.body.at, at.timeZone)}`, tone: 'met', good: true }
    : { words: 'no block check this shift', tone: 'watch', good: true };
}
