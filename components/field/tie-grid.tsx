'use client';

import { Button } from '@/components/ui/button';
import { classNames } from '@/components/ui/class-names';
import type { Measure } from './measure-draft';
import { MOST_BARS } from './measure-of-value';

type Share = Extract<Measure, { quantity: 'share' }>;

/** A sample square as a grid of intersections: tap those that are tied. */
export function TieGrid({ measure, onChange }: { measure: Share; onChange: (measure: Share) => void }) {
  const { rows, columns } = measure;
  const of = rows * columns;
  const tied = new Set(measure.tied.filter((index) => index < of));
  const toggle = (index: number) => {
    const next = new Set(tied);
    if (!next.delete(index)) next.add(index);
    onChange({ ...measure, tied: [...next] });
  };
  // A tie stays at its place when bars are added or taken away.
  const resize = (nextRows: number, nextColumns: number) =>
    onChange({
      ...measure,
      rows: nextRows,
      columns: nextColumns,
      tied: [...tied]
        .map((index) => ({ row: Math.floor(index / columns), column: index % columns }))
        .filter(({ row, column }) => row < nextRows && column < nextColumns)
        .map(({ row, column }) => row * nextColumns + column),
    });
  return (
    <div className="grid gap-3">
      <div className="grid grid-cols-2 gap-3">
        <Stepper label="Bars down" value={rows} onChange={(next) => resize(next, columns)} />
        <Stepper label="Bars across" value={columns} onChange={(next) => resize(rows, next)} />
      </div>
      <p className="font-label text-label text-pencil">Tap each crossing that is tied.</p>
      <div
        role="group"
        aria-label="Crossings of the sample square"
        className="-mx-3 grid overflow-x-auto border-y border-ink"
        style={{ gridTemplateColumns: `repeat(${columns}, minmax(3.5rem, 1fr))` }}
      >
        {Array.from({ length: of }, (_, index) => (
          <button
            key={index}
            type="button"
            aria-pressed={tied.has(index)}
            aria-label={`Row ${Math.floor(index / columns) + 1}, bar ${(index % columns) + 1}`}
            onClick={() => toggle(index)}
            className="relative min-h-14 touch-manipulation"
          >
            <span aria-hidden="true" className="absolute inset-x-0 top-1/2 h-0.5 bg-steel" />
            <span aria-hidden="true" className="absolute inset-y-0 left-1/2 w-0.5 bg-steel" />
            <span
              aria-hidden="true"
              className={classNames(
                'absolute top-1/2 left-1/2 size-5 -translate-1/2 rounded-full border-2',
                tied.has(index) ? 'border-ink bg-ink' : 'border-rule bg-sheet',
              )}
            />
          </button>
        ))}
      </div>
      <p aria-live="polite" className="font-figure text-2xl font-medium">
        {tied.size} of {of} tied
      </p>
    </div>
  );
}

function Stepper({
  label,
  value,
  onChange,
}: {
  label: string;
  value: number;
  onChange: (value: number) => void;
}) {
  return (
    <div role="group" aria-label={label}>
      <p className="font-label text-label font-semibold">{label}</p>
      <div className="mt-1 grid grid-cols-[1fr_auto_1fr] items-center border border-ink">
        <Button
          variant="quiet"
          className="text-2xl no-underline"
          aria-label={`${label}: one less`}
          disabled={value <= 2}
          onClick={() => onChange(value - 1)}
        >
          −
        </Button>
        <span className="px-2 font-figure text-lead font-medium">{value}</span>
        <Button
          variant="quiet"
          className="text-2xl no-underline"
          aria-label={`${label}: one more`}
          disabled={value >= MOST_BARS}
          onClick={() => onChange(value + 1)}
        >
          +
        </Button>
      </div>
    </div>
  );
}
