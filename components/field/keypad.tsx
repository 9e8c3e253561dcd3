'use client';

import { classNames } from '@/components/ui/class-names';
import type { LengthUnit } from '@/lib/concrete/length';
import { fractionKeys, type FractionKey, type Press } from './reading-keys';

const fractionFace: Record<FractionKey, { shown: string; said: string }> = {
  '1/2': { shown: '½', said: 'and a half' },
  '1/4': { shown: '¼', said: 'and a quarter' },
  '1/8': { shown: '⅛', said: 'and an eighth' },
  '1/16': { shown: '1/16', said: 'and a sixteenth' },
};

const rows = [
  ['7', '8', '9'],
  ['4', '5', '6'],
  ['1', '2', '3'],
] as const;

const key =
  'grid h-14 place-items-center border-r border-b border-rule font-figure text-2xl font-medium touch-manipulation ' +
  'select-none active:bg-chalk active:text-sheet last:border-r-0';

/** Digits, a point, delete; and in inches the fractions that add up. Keys take no focus from a finger. */
export function Keypad({
  unit,
  onPress,
  onDelete,
}: {
  unit: LengthUnit;
  onPress: (press: Press) => void;
  onDelete: () => void;
}) {
  const inches = unit === 'in';
  const digit = (char: string) => (
    <button key={char} type="button" className={key} onClick={() => onPress({ kind: 'char', char })}>
      {char}
    </button>
  );
  const fraction = (which: FractionKey) => (
    <button
      key={which}
      type="button"
      aria-label={fractionFace[which].said}
      className={classNames(key, 'bg-paper')}
      onClick={() => onPress({ kind: 'fraction', key: which })}
    >
      {fractionFace[which].shown}
    </button>
  );
  return (
    <div
      role="group"
      aria-label="Keypad"
      className={classNames('grid border-t border-ink', inches ? 'grid-cols-4' : 'grid-cols-3')}
      // A finger on a key must not take the focus: a gauge that types sends Enter to whatever has it.
      onPointerDown={(event) => event.preventDefault()}
    >
      {rows.map((row, index) => [
        ...row.map(digit),
        ...(inches && fractionKeys[index] ? [fraction(fractionKeys[index])] : []),
      ])}
      <button
        type="button"
        aria-label="Delete the last key"
        className={classNames(key, 'text-pencil')}
        onClick={onDelete}
      >
        <svg viewBox="0 0 24 16" width="30" height="20" aria-hidden="true" fill="none" stroke="currentColor">
          <path d="M8 1.5h14.5v13H8L1.5 8zM12 5l6 6m0-6-6 6" strokeWidth="1.6" />
        </svg>
      </button>
      {digit('0')}
      <button
        type="button"
        aria-label="Point"
        className={classNames(key, 'text-pencil')}
        onClick={() => onPress({ kind: 'char', char: '.' })}
      >
        ·
      </button>
      {inches && fraction('1/16')}
    </div>
  );
}

/** The two keys of a go/no-go block: it passes under the steel, or it does not. Each keeps at once. */
export function BlockKeys({
  block,
  busy,
  onKeep,
}: {
  block: string;
  busy: boolean;
  onKeep: (passes: boolean) => void;
}) {
  const face =
    'grid h-28 place-items-center border-t border-ink px-3 text-center font-label text-lead font-semibold touch-manipulation';
  return (
    <div
      role="group"
      aria-label="Block"
      className="grid grid-cols-2"
      onPointerDown={(event) => event.preventDefault()}
    >
      <button
        type="button"
        disabled={busy}
        className={classNames(face, 'border-r')}
        onClick={() => onKeep(false)}
      >
        <span>
          Does not pass
          <span className="block text-label font-medium text-pencil">less than {block}</span>
        </span>
      </button>
      <button type="button" disabled={busy} className={face} onClick={() => onKeep(true)}>
        <span>
          Passes
          <span className="block text-label font-medium text-pencil">at least {block}</span>
        </span>
      </button>
    </div>
  );
}
