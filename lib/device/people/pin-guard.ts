import type { PinHash } from './pin-hash';

/** A person's PIN on this device, with the wrong tries since it was last right. */
export interface PinRecord extends PinHash {
  failures: number;
  /** Device's clock at the last wrong try, ms. */
  failedAt: number;
}

export const FEWEST_DIGITS = 4;
export const MOST_DIGITS = 8;
/** After so many wrong tries only the password, with a network, opens the work. */
export const MOST_FAILURES = 10;

/** Gloves slip: two tries cost nothing. Seconds to wait after the third wrong try and those that follow. */
const WAITS_S = [15, 30, 60, 120, 300, 600, 1200];
const FREE_FAILURES = 2;

/** How long to wait after that many wrong tries, ms. */
export function waitAfter(failures: number): number {
  if (failures <= FREE_FAILURES) return 0;
  return 1000 * (WAITS_S[Math.min(failures - FREE_FAILURES, WAITS_S.length) - 1] ?? 0);
}

export interface PinStanding {
  state: 'none' | 'set' | 'closed';
  /** No try is taken before this time of the device's clock, ms; null when one is taken now. */
  waitUntil: number | null;
}

/** How a PIN stands at a time of the device's clock. */
export function pinStanding(record: PinRecord | undefined, now: number): PinStanding {
  if (!record) return { state: 'none', waitUntil: null };
  if (record.failures >= MOST_FAILURES) return { state: 'closed', waitUntil: null };
  const wait = waitAfter(record.failures);
  // A clock that was set back would make the wait longer than it is: it is counted from now then.
  const until = Math.min(record.failedAt, now) + wait;
  return { state: 'set', waitUntil: wait > 0 && until > now ? until : null };
}

/** What is wrong with a PIN that somebody wants to use; null when it can be used. */
export function pinProblem(pin: string): string | null {
  if (!/^\d*$/.test(pin)) return 'Use digits only.';
  if (pin.length < FEWEST_DIGITS || pin.length > MOST_DIGITS)
    return `Use ${FEWEST_DIGITS} to ${MOST_DIGITS} digits.`;
  const steps = new Set([...pin].slice(1).map((digit, index) => Number(digit) - Number(pin[index])));
  const [step] = steps;
  if (steps.size === 1 && step !== undefined && Math.abs(step) <= 1)
    return 'Anybody would try this one first. Choose another.';
  return null;
}
