import type { EntryOf } from './entry';
import { listOf, type Facts } from './facts';
import type { InstrumentState } from './sheet-types';

/** A device's clock is doubtful once it is off by more than this: its measuring times then only hold within that offset. */
export const DOUBTFUL_CLOCK_MS = 5 * 60_000;

export const blockCheckPasses = (body: EntryOf<'block-check'>['body']): boolean =>
  Math.abs(body.readMm - body.blockMm) <= body.toleranceMm + 1e-6;

/**
 * The instruments of a project with the windows in which their readings are suspect: from the last good block check
 * before a failed one until the next good one after it, by measuring time. A later good check ends the window and
 * restores nothing within it.
 */
export function instrumentStates(facts: Facts): Map<string, InstrumentState> {
  const states = new Map<string, InstrumentState>();
  const of = (instrumentId: string): InstrumentState => {
    const known = states.get(instrumentId);
    if (known) return known;
    const made: InstrumentState = {
      instrumentId,
      name: 'unknown instrument',
      status: null,
      blockChecks: [],
      suspect: [],
    };
    states.set(instrumentId, made);
    return made;
  };
  for (const entry of listOf(facts, 'instrument-status')) {
    const state = of(entry.body.instrumentId);
    state.status = entry;
    state.name = entry.body.name;
  }
  for (const entry of listOf(facts, 'block-check')) of(entry.body.instrumentId).blockChecks.push(entry);
  for (const state of states.values()) {
    state.blockChecks.sort((a, b) => (a.body.at < b.body.at ? -1 : a.body.at > b.body.at ? 1 : 0));
    state.blockChecks.forEach((check, index) => {
      if (blockCheckPasses(check.body)) return;
      const before = state.blockChecks.slice(0, index).findLast((other) => blockCheckPasses(other.body));
      const after = state.blockChecks.slice(index + 1).find((other) => blockCheckPasses(other.body));
      state.suspect.push({ from: before?.body.at ?? null, to: after?.body.at ?? null, failed: check });
    });
  }
  return states;
}

export type InstrumentStanding = 'good' | 'suspect' | 'out-of-calibration' | 'unknown';

/** How an instrument stood when a reading was taken with it, by measuring time. */
export function standingAt(
  state: InstrumentState | undefined,
  measuredAt: string,
  clockOffsetMs: number | null,
): InstrumentStanding {
  if (!state || !state.status) return 'unknown';
  const doubt =
    clockOffsetMs !== null && Math.abs(clockOffsetMs) > DOUBTFUL_CLOCK_MS ? Math.abs(clockOffsetMs) : 0;
  // Instants are written in one form only (ISO 8601, UTC, milliseconds): they compare as text.
  const shifted = (ms: number) => new Date(Date.parse(measuredAt) + ms).toISOString();
  const earliest = doubt === 0 ? measuredAt : shifted(-doubt);
  const latest = doubt === 0 ? measuredAt : shifted(doubt);
  const inWindow = state.suspect.some(
    (window) =>
      (window.from === null || latest > window.from) && (window.to === null || earliest < window.to),
  );
  if (inWindow) return 'suspect';
  const { calibrationDue, inService } = state.status.body;
  if (!inService || (calibrationDue !== null && latest > calibrationDue)) return 'out-of-calibration';
  return 'good';
}
