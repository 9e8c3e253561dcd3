import { formatInstant } from '@/components/ui/format-instant';

/** "Wed 2 Dec 06:30" in the project's time zone, wherever the device is. */
export const dayAndTime = (iso: string, timeZone: string): string => formatInstant(iso, timeZone, 'short');

/** "06:30" in the project's time zone. */
export const clockTime = (iso: string, timeZone: string): string => formatInstant(iso, timeZone, 'time');

const sizeWords = (minutes: number) =>
  minutes < 60
    ? `${minutes} min`
    : minutes < 48 * 60
      ? `${Math.floor(minutes / 60)} h ${minutes % 60 === 0 || minutes >= 600 ? '' : `${minutes % 60} min`}`.trim()
      : `${Math.floor(minutes / 1440)} days`;

/** "in 14 h", "3 h 20 min ago": how far an instant is from now (ms); empty while the time is not known. */
export function timeAway(iso: string, nowMs: number): string {
  if (nowMs === 0) return '';
  const minutes = Math.round((Date.parse(iso) - nowMs) / 60_000);
  if (minutes === 0) return 'now';
  return minutes > 0 ? `in ${sizeWords(minutes)}` : `${sizeWords(-minutes)} ago`;
}

const wallTime = (at: number, timeZone: string): string => {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    hourCycle: 'h23',
  }).formatToParts(at);
  const of = (type: Intl.DateTimeFormatPartTypes) => parts.find((part) => part.type === type)?.value ?? '';
  return `${of('year')}-${of('month')}-${of('day')}T${of('hour')}:${of('minute')}`;
};

/** An instant as a `datetime-local` field shows it, in the project's time zone. */
export const localFieldText = (iso: string, timeZone: string): string => wallTime(Date.parse(iso), timeZone);

/**
 * The instant that a `datetime-local` field says, by the project's clock; null where it says none, or a time that
 * summer time skips. Where clocks are set back and a time comes twice, the earlier.
 */
export function instantOfField(text: string, timeZone: string): string | null {
  const asUtc = Date.parse(`${text}:00.000Z`);
  if (Number.isNaN(asUtc)) return null;
  const day = 86_400_000;
  const found = [asUtc - day, asUtc + day]
    .map((at) => asUtc - (Date.parse(`${wallTime(at, timeZone)}:00.000Z`) - at))
    .sort((a, b) => a - b)
    .find((at) => wallTime(at, timeZone) === text);
  return found === undefined ? null : new Date(found).toISOString();
}
