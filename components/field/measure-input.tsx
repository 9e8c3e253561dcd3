'use client';

import { TextInput } from '@/components/ui/text-input';
import type { LengthUnit } from '@/lib/concrete/length';
import type { MeasurementItem } from '@/lib/inspection/plan';
import { DamageInput } from './damage-input';
import { LengthKeys } from './length-keys';
import type { Measure } from './measure-draft';
import { CouplerInput, PartInput, StarterInput, TendonInput, TicketInput } from './detail-inputs';
import { TieSquare } from './tie-square';

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
        <LengthKeys
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
      return <TieSquare item={item} measure={measure} onChange={onChange} />;
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
    case 'part':
      return <PartInput measure={measure} onChange={onChange} />;
    case 'starter':
      return <StarterInput measure={measure} unit={unit} onChange={onChange} />;
    case 'coupler':
      return <CouplerInput item={item} measure={measure} onChange={onChange} />;
    case 'damage':
      return <DamageInput item={item} measure={measure} unit={unit} onChange={onChange} />;
    case 'height':
      return <TendonInput measure={measure} unit={unit} onChange={onChange} />;
    case 'ticket':
      return <TicketInput item={item} measure={measure} onChange={onChange} />;
  }
}
