import Link from 'next/link';
import type { CSSProperties } from 'react';
import { dayStarts } from './day-starts';
import { Mark, MarkIcon } from './mark';
import { markColour, type MarkKind } from './mark-words';

export interface TimelinePour {
  id: string;
  number: string;
  title: string;
  href: string;
  /** Planned start of placing, ISO 8601. */
  plannedAt: string;
  /** The evening before: by then holds have to be clear, or the trucks are called off. */
  deadlineAt: string;
  mark: MarkKind;
  /** Where it stands and who is to move: "held · inspector 1, crew 2". */
  words: string;
}

export interface PourTimelineProps {
  pours: readonly TimelinePour[];
  from: string;
  to: string;
  now: string;
  timeZone: string;
  /** Writes an instant in the project's time: "Wed 2 Dec 06:30", or the day alone, "Wed 2". */
  format: (instant: string, style: 'short' | 'day') => string;
  label?: string;
}

/**
 * Pours against time: each a line from the evening before to its planned start, with the mark of where it stands, and
 * now as a line through all. Where there is no room for an axis it is the same list, one under the other. One list
 * for both, so that it is read out once.
 */
export function PourTimeline({
  pours,
  from,
  to,
  now,
  timeZone,
  format,
  label = 'Pours by time',
}: PourTimelineProps) {
  const [start, end] = [Date.parse(from), Date.parse(to)];
  const share = (instant: string) =>
    Math.min(100, Math.max(0, ((Date.parse(instant) - start) / (end - start)) * 100));
  const days = dayStarts(from, to, timeZone);
  const every = Math.ceil(days.length / 16);
  const ordered = [...pours].sort((a, b) => Date.parse(a.plannedAt) - Date.parse(b.plannedAt));
  const nowAt = share(now);
  const nextUp = ordered.find((pour) => Date.parse(pour.plannedAt) >= Date.parse(now))?.id;
  const deadlines = [...new Set(pours.map((pour) => share(pour.deadlineAt)))].filter((x) => x > 0 && x < 100);

  return (
    <div className="@container">
      <div className="relative @2xl:pt-7">
        <div aria-hidden="true" className="absolute inset-0 hidden @2xl:block">
          <svg width="100%" height="100%" className="absolute inset-0 overflow-visible">
            {days.map((day) => (
              <line
                key={day}
                x1={`${share(day)}%`}
                x2={`${share(day)}%`}
                y1="0"
                y2="100%"
                stroke="var(--rule)"
              />
            ))}
            {deadlines.map((x) => (
              <line
                key={x}
                x1={`${x}%`}
                x2={`${x}%`}
                y1="28"
                y2="100%"
                stroke="var(--pencil)"
                strokeDasharray="1.5 5"
              />
            ))}
            <line
              x1={`${nowAt}%`}
              x2={`${nowAt}%`}
              y1="0"
              y2="100%"
              stroke="var(--chalk)"
              strokeWidth="2.5"
            />
          </svg>
          {days.map((day, index) =>
            index % every === 0 && share(day) < 97 ? (
              <span
                key={day}
                className="absolute top-0 pl-1.5 font-label text-label font-medium whitespace-nowrap text-pencil"
                style={{ left: `${share(day)}%` }}
              >
                {format(day, 'day')}
              </span>
            ) : null,
          )}
        </div>
        <ol aria-label={label} className="relative">
          {ordered.map((pour) => (
            <TimelineRow
              key={pour.id}
              pour={pour}
              x={share(pour.plannedAt)}
              deadlineX={share(pour.deadlineAt)}
              format={format}
              nowBefore={pour.id === nextUp}
            />
          ))}
        </ol>
        <p
          aria-hidden="true"
          className="pointer-events-none absolute top-5 hidden bg-sheet px-1 font-label text-label font-semibold text-chalk @2xl:block"
          style={nowAt > 92 ? { right: `${100 - nowAt}%` } : { left: `calc(${nowAt}% + 3px)` }}
        >
          now
        </p>
      </div>
    </div>
  );
}

function TimelineRow({
  pour,
  x,
  deadlineX,
  format,
  nowBefore,
}: {
  pour: TimelinePour;
  x: number;
  deadlineX: number;
  format: PourTimelineProps['format'];
  nowBefore: boolean;
}) {
  const colour = markColour[pour.mark];
  const leftward = x > 58;
  const waiting = pour.mark === 'unread' || pour.mark === 'not-verified';
  return (
    <li
      className={`relative grid grid-cols-[1.75rem_1fr] gap-x-2 py-2.5 @2xl:block @2xl:h-12 @2xl:border-t-0 @2xl:py-0 ${
        nowBefore ? 'border-t-2 border-chalk' : 'border-t border-rule first:border-t-0'
      }`}
      style={{ '--x': `${x}%` } as CSSProperties}
    >
      {nowBefore && (
        <span
          aria-hidden="true"
          className="absolute -top-2.5 right-0 bg-sheet pl-2 font-label text-label leading-4 font-semibold text-chalk @2xl:hidden"
        >
          now
        </span>
      )}
      <svg
        width="100%"
        height="48"
        aria-hidden="true"
        className="absolute inset-0 hidden overflow-visible @2xl:block"
      >
        <line
          x1={`${deadlineX}%`}
          x2={`${x}%`}
          y1="24"
          y2="24"
          stroke={colour}
          strokeWidth="2"
          strokeDasharray={waiting ? '3 4' : undefined}
        />
        <svg x={`${deadlineX}%`} y="24" overflow="visible" width="1" height="1">
          <path d="M0-7V7" stroke={colour} strokeWidth="2" />
        </svg>
        <svg x={`${x}%`} y="24" overflow="visible" width="1" height="1">
          <Mark kind={pour.mark} r={7} />
        </svg>
      </svg>
      <span className="grid justify-center pt-0.5 @2xl:hidden">
        <MarkIcon kind={pour.mark} size={22} />
      </span>
      <div
        className={`min-w-0 @2xl:absolute @2xl:inset-y-0 @2xl:grid @2xl:content-center ${
          leftward
            ? '@2xl:right-[calc(100%_-_min(var(--x),var(--d))_+_12px)] @2xl:left-0 @2xl:text-right'
            : '@2xl:right-0 @2xl:left-[calc(var(--x)_+_16px)]'
        }`}
        style={{ '--d': `${deadlineX}%` } as CSSProperties}
      >
        <p className="font-label text-lead leading-tight font-semibold @2xl:truncate">
          <Link
            href={pour.href}
            prefetch={false}
            className="bg-sheet text-ink underline-offset-4 hover:text-chalk hover:underline"
          >
            {pour.number} {pour.title}
          </Link>
        </p>
        <p className="font-label text-label font-medium @2xl:truncate">
          <span className="bg-sheet">
            <span className="mr-2 font-figure text-xs text-pencil">{format(pour.plannedAt, 'short')}</span>
            <span style={{ color: colour }}>{pour.words}</span>
          </span>
        </p>
      </div>
    </li>
  );
}
