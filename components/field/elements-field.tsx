'use client';

import { Checkbox } from '@/components/ui/checkbox';
import type { Plan } from '@/lib/inspection/plan';

/** Which elements something concerns; none ticked stands for the whole pour. */
export function ElementsField({
  plan,
  legend,
  value,
  onChange,
}: {
  plan: Plan;
  legend: string;
  /** Null: the whole pour. */
  value: string[] | null;
  onChange: (value: string[] | null) => void;
}) {
  if (plan.elements.length < 2) return null;
  return (
    <fieldset>
      <legend className="font-label text-label font-semibold">{legend}</legend>
      <p className="text-label text-pencil">None ticked: the whole pour.</p>
      {plan.elements.map((element) => (
        <Checkbox
          key={element.id}
          label={`${element.mark}, ${element.location}`}
          checked={value?.includes(element.id) ?? false}
          onChange={(event) => {
            const rest = (value ?? []).filter((id) => id !== element.id);
            const next = event.target.checked ? [...rest, element.id] : rest;
            onChange(next.length === 0 ? null : next);
          }}
        />
      ))}
    </fieldset>
  );
}
