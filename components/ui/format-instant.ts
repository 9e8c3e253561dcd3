export type InstantStyle = 'full' | 'short' | 'date' | 'day' | 'time';

const weekdays = ['Sun', 'Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat'];
const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

/**
 * Writes an instant in the time of a place, the same on every machine: only the figures come from the machine's tables,
 * the words are ours, so that server and browser never disagree.
 * @param instant ISO 8601 with its offset
 * @param timeZone IANA name, "America/Halifax"
 * @param style full "Wed 2 Dec 2026, 06:30", short "Wed 2 Dec 06:30", date "2 Dec 2026", day "Wed 2", time "06:30"
 * @returns the text, or the instant as given where it cannot be read as one
 * @throws RangeError where the time zone is not known
 */
export function formatInstant(instant: string, timeZone: string, style: InstantStyle = 'short'): string {
  const date = new Date(instant);
  if (Number.isNaN(date.getTime())) return instant;
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: '2-digit',
    minute: '2-digit',
    hourCycle: 'h23',
  }).formatToParts(date);
  const part = (type: Intl.DateTimeFormatPartTypes) => Number(parts.find((p) => p.type === type)?.value);
  const [year, month, day] = [part('year'), part('month'), part('day')];
  const two = (n: number) => String(n).padStart(2, '0');
  const time = `${two(part('hour'))}:${two(part('minute'))}`;
  const weekday = weekdays[new Date(Date.UTC(year, month - 1, day)).getUTCDay()] ?? '';
  const monthName = months[month - 1] ?? '';
  switch (style) {
    case 'full':
      return `${weekday} ${day} ${monthName} ${year}, ${time}`;
    case 'short':
      return `${weekday} ${day} ${monthName} ${time}`;
    case 'date':
      return `${day} ${monthName} ${year}`;
    case 'day':
      return `${weekday} ${day}`;
    case 'time':
      return time;
  }
}
