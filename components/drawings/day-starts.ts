/** Milliseconds that the clocks of a place are ahead of UTC at an instant. */
function clockAhead(at: number, timeZone: string): number {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
    minute: 'numeric',
    second: 'numeric',
    hourCycle: 'h23',
  }).formatToParts(at);
  const part = (type: Intl.DateTimeFormatPartTypes) => Number(parts.find((p) => p.type === type)?.value);
  const wall = Date.UTC(
    part('year'),
    part('month') - 1,
    part('day'),
    part('hour'),
    part('minute'),
    part('second'),
  );
  return wall - Math.floor(at / 1000) * 1000;
}

/**
 * The instants at which days begin in a time zone, within [from, to], through changes of the clocks.
 * @returns ISO 8601 in UTC
 */
export function dayStarts(from: string, to: string, timeZone: string): string[] {
  const [first, last] = [Date.parse(from), Date.parse(to)];
  const starts: string[] = [];
  const day = 86_400_000;
  const wallMidnight = Math.floor((first + clockAhead(first, timeZone)) / day) * day;
  for (let wall = wallMidnight; starts.length < 400; wall += day) {
    const guess = wall - clockAhead(wall, timeZone);
    const at = wall - clockAhead(guess, timeZone);
    if (at > last) break;
    if (at >= first) starts.push(new Date(at).toISOString());
  }
  return starts;
}
