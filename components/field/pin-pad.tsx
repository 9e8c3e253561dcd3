'use client';

import { useState } from 'react';
import { classNames } from '@/components/ui/class-names';
import { Spinner } from '@/components/ui/spinner';
import { FEWEST_DIGITS, MOST_DIGITS } from '@/lib/device/people/pin-guard';
import { useSecondsLeft } from './use-seconds-left';
import { useTypedKeys } from './use-typed-keys';

const digits = ['1', '2', '3', '4', '5', '6', '7', '8', '9'] as const;
const key =
  'grid h-16 place-items-center border-r border-b border-rule bg-sheet font-figure text-2xl font-medium touch-manipulation ' +
  'select-none active:not-disabled:bg-chalk active:not-disabled:text-sheet disabled:text-pencil';

/**
 * Keys for a PIN, for gloves and for a keyboard. What is typed is shown as discs only, and leaves this component with
 * the last key.
 */
export function PinPad({
  label,
  enter,
  problem,
  waitUntil = null,
  onEnter,
}: {
  /** Whose PIN, or which: the name of the group of keys. */
  label: string;
  /** What the last key does: "Open". */
  enter: string;
  problem: string | null;
  /** No try is taken before this time, ms. */
  waitUntil?: number | null;
  onEnter: (pin: string) => Promise<void>;
}) {
  const [pin, setPin] = useState('');
  const [busy, setBusy] = useState(false);
  const left = useSecondsLeft(waitUntil);
  const closed = busy || left > 0;
  const ready = pin.length >= FEWEST_DIGITS && !closed;

  const add = (char: string) => {
    if (!closed && /^\d$/.test(char)) setPin((before) => (before + char).slice(0, MOST_DIGITS));
  };
  const remove = () => setPin((before) => before.slice(0, -1));
  const done = async () => {
    if (!ready) return;
    setBusy(true);
    try {
      await onEnter(pin);
    } finally {
      setPin('');
      setBusy(false);
    }
  };
  useTypedKeys({
    enabled: !closed,
    filled: pin.length > 0,
    onChar: add,
    onDelete: remove,
    onEnter: () => void done(),
  });

  return (
    <div role="group" aria-label={label} className="grid gap-2">
      <div className="flex min-h-12 items-center justify-center gap-3" aria-hidden="true">
        {busy ? (
          <Spinner />
        ) : (
          Array.from({ length: Math.max(FEWEST_DIGITS, pin.length) }, (_, index) => (
            <span
              key={index}
              className={classNames(
                'size-4 rounded-full border-2 border-ink',
                index < pin.length && 'bg-ink',
              )}
            />
          ))
        )}
      </div>
      <p role="status" className="sr-only">
        {busy ? 'Looking' : `${pin.length} digits typed`}
      </p>
      <p role="alert" className="min-h-[4.35em] text-center font-label font-semibold text-hold">
        {problem}
        {left > 0 && <span className="block">The keys are free again in {waitWords(left)}.</span>}
      </p>
      <div
        className="grid grid-cols-3 border-t border-l border-ink"
        onPointerDown={(event) => event.preventDefault()}
      >
        {digits.map((digit) => (
          <button key={digit} type="button" className={key} disabled={closed} onClick={() => add(digit)}>
            {digit}
          </button>
        ))}
        <button
          type="button"
          aria-label="Delete the last digit"
          className={classNames(key, 'text-pencil')}
          disabled={closed}
          onClick={remove}
        >
          <svg
            viewBox="0 0 24 16"
            width="30"
            height="20"
            aria-hidden="true"
            fill="none"
            stroke="currentColor"
          >
            <path d="M8 1.5h14.5v13H8L1.5 8zM12 5l6 6m0-6-6 6" strokeWidth="1.6" />
          </svg>
        </button>
        <button type="button" className={key} disabled={closed} onClick={() => add('0')}>
          0
        </button>
        <button
          type="button"
          disabled={!ready}
          onClick={() => void done()}
          className="grid h-16 place-items-center border-r border-b border-ink bg-chalk px-1 font-label text-lead font-semibold text-sheet touch-manipulation select-none disabled:border-rule disabled:bg-transparent disabled:text-pencil"
        >
          {enter}
        </button>
      </div>
    </div>
  );
}

const waitWords = (seconds: number) => (seconds < 90 ? `${seconds} s` : `${Math.ceil(seconds / 60)} minutes`);
