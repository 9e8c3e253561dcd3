'use client';

import { withUnit, type LengthUnit } from '@/lib/concrete/length';
import type { Requirement } from '@/lib/inspection/plan';
import { shownPresses, type Press } from './reading-keys';
import type { ReadingTarget } from './reading-target';

/** Which point is lit, what it is accepted from, and the value as it is typed. */
export function ReadingReadout({
  target,
  presses,
  unit,
  limits,
  problem,
  block,
  allRead,
  onShowReadings,
}: {
  target: ReadingTarget | null;
  presses: readonly Press[];
  unit: LengthUnit;
  limits: Requirement | null;
  problem: string | null;
  /** Size of the go/no-go block in use; null where lengths are typed. */
  block: string | null;
  allRead: boolean;
  onShowReadings: () => void;
}) {
  const value = shownPresses(presses, unit);
  const count = target?.point?.readings.length ?? 0;
  return (
    <div className="border-t border-ink px-3 pt-1.5 pb-1">
      <div className="flex items-baseline justify-between gap-3">
        <p className="min-w-0 font-label font-medium text-pencil">
          <b className="text-ink">
            {allRead
              ? 'Every point is read'
              : target?.point
                ? `${target.point.point ? 'Point ' : ''}${target.label}`
                : 'Spot reading'}
          </b>
          {target?.point?.recheck === 'failed' && ' · read again after the correction'}
          {target?.point?.recheck === 'neighbour' && ' · next to a corrected point'}
          {target?.point?.point?.reason && ` · ${target.point.point.reason}`}
          {limits && ` · accepted from ${withUnit(limits.leastAcceptedMm, unit)}`}
          {limits?.mostAcceptedMm != null && ` to ${withUnit(limits.mostAcceptedMm, unit)}`}
        </p>
        {count > 0 && (
          <button
            type="button"
            onClick={onShowReadings}
            className="-my-2 min-h-target min-w-target shrink-0 px-2 text-right font-label text-label font-semibold text-chalk underline underline-offset-4"
          >
            {count === 1 ? '1 reading' : `${count} readings`}
          </button>
        )}
      </div>
      {block === null ? (
        <output
          className="flex items-baseline gap-2 font-figure text-5xl leading-none font-medium"
          aria-label="Reading"
        >
          <span className={value === '' ? 'text-rule' : undefined}>{value === '' ? '0' : value}</span>
          <span className="text-xl text-pencil">{/[a-z"']/i.test(value) ? '' : unit}</span>
        </output>
      ) : (
        <p className="font-figure text-2xl font-medium">block {block}</p>
      )}
      {problem && (
        <p role="alert" className="pt-1 font-label text-label font-semibold text-hold">
          {problem}
        </p>
      )}
      {allRead && !problem && (
        <p className="pt-1 text-label text-pencil">
          Tap a point to read it again, or the map for a spot reading.
        </p>
      )}
    </div>
  );
}
