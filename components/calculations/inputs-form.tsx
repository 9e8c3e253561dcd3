'use client';

import { useFormContext } from 'react-hook-form';
import { Checkbox } from '@/components/ui/checkbox';
import type { FieldGroup } from './calculation';
import { CalculationField } from './calculation-field';
import { isShown, unitsOf, type Draft, type FieldSet } from './field-spec';
import { switchUnits } from './switch-units';
import { origin, useInBrowser } from './use-in-browser';

/** The inputs, by groups; a group that the choices made ask nothing of is not there. */
export function InputsForm<Fields extends FieldSet>({
  fields,
  groups,
  draft,
  problems,
}: {
  fields: Fields;
  groups: readonly FieldGroup<Fields>[];
  draft: Draft;
  problems: Record<string, string>;
}) {
  const ready = useInBrowser(origin);
  const shownGroups = groups.flatMap((group) => {
    const shown = group.names.flatMap((name) => {
      const field = fields[name];
      return field && isShown(field, draft) ? [{ name, field }] : [];
    });
    return shown.length > 0 ? [{ legend: group.legend, shown }] : [];
  });
  return (
    <form onSubmit={(event) => event.preventDefault()} noValidate className="print:hidden">
      {/* What is typed before the page answers would be lost: until then nothing can be typed. */}
      <fieldset disabled={ready === ''} className="grid min-w-0 gap-5">
        <UnitsSwitch fields={fields} draft={draft} />
        {shownGroups.map((group) => (
          <fieldset key={group.legend} className="min-w-0">
            <legend className="mb-1.5 w-full border-b border-rule pb-0.5 font-label text-body font-semibold">
              {group.legend}
            </legend>
            <div className="grid grid-cols-2 gap-x-3 gap-y-2.5">
              {group.shown.map(({ name, field }) => (
                <CalculationField key={name} {...{ name, field, draft }} problem={problems[name]} />
              ))}
            </div>
          </fieldset>
        ))}
      </fieldset>
    </form>
  );
}

function UnitsSwitch({ fields, draft }: { fields: FieldSet; draft: Draft }) {
  const { reset } = useFormContext<Draft>();
  const field = fields.units;
  if (field?.kind !== 'choice') return null;
  return (
    <fieldset className="flex items-center gap-5">
      <legend className="float-left mr-4 font-label text-label font-semibold">{field.label}</legend>
      {Object.entries(field.choices).map(([value, label]) => (
        <Checkbox
          key={value}
          type="radio"
          name="units"
          value={value}
          label={label}
          checked={unitsOf(draft) === value}
          onChange={() => reset(switchUnits(fields, draft, value === 'in' ? 'in' : 'mm'))}
        />
      ))}
    </fieldset>
  );
}
