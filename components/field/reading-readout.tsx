'use client';

import { withUnit, type LengthUnit } from '@/lib/concrete/length';
import type { Requirement } from '@/lib/inspection/plan';
import { shownPresses, type Press } from './reading-keys';
import type { ReadingTarget } from './reading-target';

function placeWords(target: ReadingTarget | null): string {
  if (!target) return 'Every point is read';
  if (!target.point) return 'Spot reading';
  return target.point.point ? `Point ${target.label}` : target.label;
}

function askedWords(target: ReadingTarget | null): string | null {
  if (!target) return 'tap one to read it again, or the map for a spot reading';
  if (target.point?.recheck === 'failed') return 'read again after the correction';
  if (target.point?.recheck === 'neighbour') return 'next to a corrected point';
  return target.point?.point?.reason ?? null;
}

/** Which point is lit, what it is accepted from, and the value as it is typed. */
export function ReadingReadout({
  target,
  presses,
  unit,
  limits,
  problem,
  block,
  onShowReadings,
}: {
  target: ReadingTarget | null;
  presses: readonly Press[];
  unit: LengthUnit;
  limits: Requirement | null;
  problem: string | null;
  /** Size of the go/no-go block in use; null where lengths are typed. */
  block: string | null;
  onShowReadings: () => void;
}) {
  const value = shownPresses(presses, unit);
  const count = target?.point?.readings.length ?? 0;
  const asked = askedWords(target);
  return (
    <div className="border-t border-ink pr-3">
      <div className="flex min-h-16 items-center gap-3">
        <button
          type="button"
          disabled={count === 0}
          onClick={onShowReadings}
          className="min-h-16 min-w-0 flex-1 py-1 pl-3 text-left font-label leading-tight"
        >
          <span className="block text-lead font-semibold">
            {placeWords(target)}{' '}
            {count > 0 && (
              <span className="ml-2 text-label text-chalk underline underline-offset-4">
                {count === 1 ? '1 reading' : `${count} readings`}
              </span>
            )}
          </span>
          <span className="block text-label font-medium text-pencil">
            {limits && `accepted from ${withUnit(limits.leastAcceptedMm, unit)}`}
            {limits?.mostAcceptedMm != null && ` to ${withUnit(limits.mostAcceptedMm, unit)}`}
            {!limits && 'no requirement for this steel here'}
            {asked && ` · ${asked}`}
          </span>
        </button>
        <output
          className="flex shrink-0 items-baseline gap-1.5 font-figure text-5xl leading-none font-medium"
          aria-label="Reading"
        >
          {block === null ? (
            <>
              <span className={value === '' ? 'text-rule' : undefined}>{value === '' ? '0' : value}</span>
              <span className="text-xl text-pencil">{/[a-z"']/i.test(value) ? '' : unit}</span>
            </>
          ) : (
            <span className="text-2xl">block {block}</span>
          )}
        </output>
      </div>
      {problem && (
        <p role="alert" className="pb-1 pl-3 font-label text-label font-semibold text-hold">
          {problem}
        </p>
      )}
    </div>
  );
}
