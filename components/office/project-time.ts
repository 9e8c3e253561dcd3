import { formatInstant } from '@/components/ui/format-instant';

/** People see the project's time, wherever their own screen is. */

const partsOf = (at: Date, timeZone: string) => {
  const parts = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    second: '2-digit',
    hourCycle: 'h23',
  }).formatToParts(at);
  const pick = (type: string) => parts.find((part) => part.type === type)?.value ?? '';
  return {
    year: pick('year'),
    month: pick('month'),
    day: pick('day'),
    hour: pick('hour'),
    minute: pick('minute'),
    second: pick('second'),
  };
};

/** "Wed 2 Dec 06:30" in the project's time zone. */
export const dayAndTime = (iso: string, timeZone: string): string => formatInstant(iso, timeZone, 'short');

/** "Wed 2 Dec 2026, 06:30", for records that are read years later. */
export const fullTime = (iso: string, timeZone: string): string => formatInstant(iso, timeZone, 'full');

/** The value of a `datetime-local` field that shows an instant in the project's time zone. */
export function localFieldText(iso: string, timeZone: string): string {
  const at = partsOf(new Date(iso), timeZone);
  return `${at.year}-${at.month}-${at.day}T${at.hour}:${at.minute}`;
}

const offsetMs = (at: number, timeZone: string): number => {
  const shown = partsOf(new Date(at), timeZone);
  const asUtc = Date.UTC(
    Number(shown.year),
    Number(shown.month) - 1,
    Number(shown.day),
    Number(shown.hour),
    Number(shown.minute),
    Number(shown.second),
  );
  return asUtc - Math.floor(at / 1000) * 1000;
};

/**
 * Reads the value of a `datetime-local` field as a time of the project's zone.
 * @returns the instant (ISO 8601, UTC, milliseconds), the earlier one where clocks are set back; null where the text is
 *   no time, or that time is skipped by summer time
 */
export function instantFromField(text: string, timeZone: string): string | null {
  const wall = /^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}$/.test(text) ? Date.parse(`${text}:00.000Z`) : Number.NaN;
  if (Number.isNaN(wall)) return null;
  const hour = 3_600_000;
  const candidates = [offsetMs(wall - 12 * hour, timeZone), offsetMs(wall + 12 * hour, timeZone)]
    .map((offset) => wall - offset)
    .filter((at) => localFieldText(new Date(at).toISOString(), timeZone) === text)
    .sort((a, b) => a - b);
  const first = candidates[0];
  return first === undefined ? null : new Date(first).toISOString();
}

/** "in 14 h", "in 3 days", "2 h ago": how far an instant is from now. */
export function timeAway(iso: string, now: string): string {
  const minutes = Math.round((Date.parse(iso) - Date.parse(now)) / 60_000);
  const size = Math.abs(minutes);
  const words =
    size < 60
      ? `${size} min`
      : size < 48 * 60
        ? `${Math.round(size / 60)} h`
        : `${Math.round(size / 1440)} days`;
  return minutes >= 0 ? `in ${words}` : `${words} ago`;
}

/** Six in the evening of the day before, in the project's time: by then a pour's holds have to be clear. */
export function eveningBefore(iso: string, timeZone: string): string {
  const day = new Date(`${localFieldText(iso, timeZone).slice(0, 10)}T00:00:00.000Z`);
  const before = new Date(day.getTime() - 86_400_000).toISOString().slice(0, 10);
  return (
    instantFromField(`${before}T18:00`, timeZone) ?? new Date(Date.parse(iso) - 43_200_000).toISOString()
  );
}

/** The start of the day that an instant falls on, in the project's time. */
export function startOfDay(iso: string, timeZone: string): string {
  const day = localFieldText(iso, timeZone).slice(0, 10);
  return instantFromField(`${day}T00:00`, timeZone) ?? `${day}T00:00:00.000Z`;
}
