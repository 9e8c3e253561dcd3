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

/** An instant as a `datetime-local` field shows it, in the time zone of this device. */
export function localFieldText(iso: string): string {
  const at = new Date(iso);
  return new Date(at.getTime() - at.getTimezoneOffset() * 60_000).toISOString().slice(0, 16);
}

/** The instant that a `datetime-local` field says, by this device's time zone; null where it says none. */
export function instantOfField(text: string): string | null {
  const at = new Date(text);
  return text === '' || Number.isNaN(at.getTime()) ? null : at.toISOString();
}
