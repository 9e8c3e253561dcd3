'use client';

import { Button } from '@/components/ui/button';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import type { LengthUnit } from '@/lib/concrete/length';
import type { MeasurementItem } from '@/lib/inspection/plan';
import { emptySpot, type DamageDraft, type SpotDraft } from './damage-draft';

/** Spots on one bar: each with its place along the bar and its size, so that the worst stretch can be found. */
export function DamageInput({
  item,
  measure,
  unit,
  onChange,
}: {
  item: MeasurementItem;
  measure: DamageDraft;
  unit: LengthUnit;
  onChange: (measure: DamageDraft) => void;
}) {
  const epoxy = item.against?.by === 'epoxy';
  const change = (at: number, part: Partial<SpotDraft>) =>
    onChange({
      ...measure,
      spots: measure.spots.map((spot, index) => (index === at ? { ...spot, ...part } : spot)),
    });
  return (
    <div className="grid gap-3">
      {measure.spots.length === 0 && <p className="font-label">No damage found on this bar.</p>}
      {measure.spots.map((spot, index) => (
        <fieldset key={index} className="grid gap-2 border border-rule p-2">
          <legend className="px-1 font-label font-semibold">Spot {index + 1}</legend>
          <div className="grid grid-cols-2 gap-2">
            {epoxy && (
              <Select
                label="What it is"
                value={spot.kind}
                options={[
                  { value: 'damaged', label: 'damaged, not repaired' },
                  { value: 'patched', label: 'patched' },
                ]}
                onChange={(event) =>
                  change(index, { kind: event.target.value === 'patched' ? 'patched' : 'damaged' })
                }
              />
            )}
            <SpotLength
              label="From the bar’s end"
              value={spot.from}
              unit={unit}
              onChange={(from) => change(index, { from })}
            />
            <SpotLength
              label="Length"
              value={spot.length}
              unit={unit}
              onChange={(length) => change(index, { length })}
            />
            <SpotLength
              label="Width"
              value={spot.width}
              unit={unit}
              onChange={(width) => change(index, { width })}
            />
          </div>
          <Button
            variant="quiet"
            onClick={() =>
              onChange({ ...measure, spots: measure.spots.filter((_, other) => other !== index) })
            }
          >
            Take spot {index + 1} away
          </Button>
        </fieldset>
      ))}
      <Button onClick={() => onChange({ ...measure, spots: [...measure.spots, emptySpot()] })}>
        Add a spot
      </Button>
      {epoxy && (
        <div className="grid grid-cols-2 gap-2">
          <TextInput
            label="Bare cut ends"
            figure
            inputMode="numeric"
            value={measure.bareCutEnds}
            onChange={(event) => onChange({ ...measure, bareCutEnds: event.target.value })}
          />
          <TextInput
            label="Flame-cut ends"
            figure
            inputMode="numeric"
            value={measure.flameCutEnds}
            onChange={(event) => onChange({ ...measure, flameCutEnds: event.target.value })}
          />
        </div>
      )}
      <TextInput
        label="Length of the bar"
        hint={epoxy ? 'Only where it is shorter than a foot.' : 'Only where it is shorter than a metre.'}
        optional
        figure
        unit={unit}
        value={measure.barLength}
        onChange={(event) => onChange({ ...measure, barLength: event.target.value })}
      />
    </div>
  );
}

function SpotLength({
  label,
  value,
  unit,
  onChange,
}: {
  label: string;
  value: string;
  unit: LengthUnit;
  onChange: (value: string) => void;
}) {
  return (
    <TextInput
      label={label}
      figure
      unit={unit}
      inputMode="decimal"
      value={value}
      onChange={(event) => onChange(event.target.value)}
    />
  );
}
