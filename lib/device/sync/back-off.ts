const FIRST_MS = 2_000;
const LONGEST_MS = 5 * 60_000;

/**
 * How long to wait before the next try: twice as long each time, between half of it and all of it, so that phones
 * that lost the same server do not come back all at once. A wait that the server asked for is kept at least. (SPEC 17, 18)
 * @param failures how many tries in a row have failed, from 1
 * @param random 0 to 1
 * @returns milliseconds
 */
export function backOff(failures: number, random: number, retryAfterMs: number | null): number {
  const most = Math.min(LONGEST_MS, FIRST_MS * 2 ** Math.min(failures - 1, 20));
  const own = most * (0.5 + random / 2);
  return Math.round(Math.max(own, (retryAfterMs ?? 0) * (1 + random / 10)));
}
