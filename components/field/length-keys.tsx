'use client';

import type { LengthUnit } from '@/lib/concrete/length';
import { Keypad } from './keypad';
import { pressed, shownPresses, type Press } from './reading-keys';
import { useTypedKeys } from './use-typed-keys';

/** A length on the keypad, or from a keyboard or a gauge that types. */
export function LengthKeys({
  presses,
  unit,
  onChange,
}: {
  presses: readonly Press[];
  unit: LengthUnit;
  onChange: (presses: readonly Press[]) => void;
}) {
  const shown = shownPresses(presses, unit);
  useTypedKeys({
    enabled: true,
    filled: presses.length > 0,
    onChar: (char) => onChange(pressed(presses, { kind: 'char', char })),
    onDelete: () => onChange(presses.slice(0, -1)),
    onEnter: () => document.querySelector<HTMLButtonElement>('main form button[type="submit"]')?.click(),
  });
  return (
    <div className="-mx-3">
      <output
        aria-label="Measured"
        className="flex items-baseline gap-2 px-3 pb-2 font-figure text-5xl leading-none font-medium"
      >
        <span className={shown === '' ? 'text-rule' : undefined}>{shown === '' ? '0' : shown}</span>
        <span className="text-xl text-pencil">{/[a-z"']/i.test(shown) ? '' : unit}</span>
      </output>
      <Keypad
        unit={unit}
        onPress={(press) => onChange(pressed(presses, press))}
        onDelete={() => onChange(presses.slice(0, -1))}
      />
    </div>
  );
}
