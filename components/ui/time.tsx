import { classNames } from './class-names';
import { formatInstant, type InstantStyle } from './format-instant';

/** An instant in the time of a place: people see the project's time, whatever their device is set to. */
export function Time({
  instant,
  timeZone,
  format = 'short',
  className,
}: {
  /** ISO 8601 with its offset. */
  instant: string;
  /** IANA name. */
  timeZone: string;
  format?: InstantStyle;
  className?: string;
}) {
  return (
    <time
      dateTime={instant}
      title={`${formatInstant(instant, timeZone, 'full')}, time of ${timeZone.replaceAll('_', ' ')}`}
      className={classNames('whitespace-nowrap', className)}
    >
      {formatInstant(instant, timeZone, format)}
    </time>
  );
}
