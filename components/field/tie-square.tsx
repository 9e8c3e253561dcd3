'use client';

import { Checkbox } from '@/components/ui/checkbox';
import { TextInput } from '@/components/ui/text-input';
import type { MeasurementItem } from '@/lib/inspection/plan';
import type { Measure } from './measure-draft';
import { TieGrid } from './tie-grid';

type Share = Extract<Measure, { quantity: 'share' }>;

/** A sample square with its ties, and where it lies: one of a pour's squares has to be at an edge of the mat. */
export function TieSquare({
  item,
  measure,
  onChange,
}: {
  item: MeasurementItem;
  measure: Share;
  onChange: (measure: Share) => void;
}) {
  const against = item.against?.by === 'tie-pattern' ? item.against : null;
  return (
    <div className="grid gap-3">
      {against && (
        <Checkbox
          label="This square lies at an edge of the mat"
          checked={measure.atEdge}
          onChange={(event) =>
            onChange({
              ...measure,
              atEdge: event.target.checked,
              // Along one edge a square has one row of crossings on the mat's perimeter.
              onPerimeter: event.target.checked && against.perimeterApart ? String(measure.columns) : '',
            })
          }
        />
      )}
      {against?.perimeterApart && measure.atEdge && (
        <TextInput
          label="Crossings on the outermost rows of the mat"
          hint="Each of these is tied; inside every other one."
          figure
          inputMode="numeric"
          value={measure.onPerimeter}
          onChange={(event) => onChange({ ...measure, onPerimeter: event.target.value })}
        />
      )}
      <TieGrid measure={measure} onChange={onChange} />
    </div>
  );
}
