'use client';

import { TextInput } from '@/components/ui/text-input';
import type { LengthUnit } from '@/lib/concrete/length';
import type { MeasurementItem } from '@/lib/inspection/plan';
import { Keypad } from './keypad';
import type { Measure } from './measure-draft';
import { pressed, shownPresses, type Press } from './reading-keys';
import { TieGrid } from './tie-grid';
import { useTypedKeys } from './use-typed-keys';

/** The way to enter a value that fits its kind: a keypad, a count, ties tapped on a grid, a bar mark. */
export function MeasureInput({
  item,
  measure,
  unit,
  onChange,
}: {
  item: MeasurementItem;
  measure: Measure;
  unit: LengthUnit;
  onChange: (measure: Measure) => void;
}) {
  switch (measure.quantity) {
    case 'length':
      return (
        <LengthInput
          presses={measure.presses}
          unit={unit}
          onChange={(presses) => onChange({ quantity: 'length', presses })}
        />
      );
    case 'count':
      return (
        <TextInput
          label="How many"
          figure
          inputMode="numeric"
          value={measure.text}
          onChange={(event) => onChange({ quantity: 'count', text: event.target.value })}
        />
      );
    case 'share':
      return <TieGrid measure={measure} onChange={onChange} />;
    case 'designation':
      return (
        <TextInput
          label="Bar found"
          hint={item.expected ? `Planned: ${item.expected}. A larger bar is a departure too.` : undefined}
          figure
          maxLength={20}
          value={measure.text}
          onChange={(event) => onChange({ quantity: 'designation', text: event.target.value })}
        />
      );
  }
}

function LengthInput({
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
