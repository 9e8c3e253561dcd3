'use client';

import { useFormContext, useWatch } from 'react-hook-form';
import { classNames } from '@/components/ui/class-names';
import { Checkbox } from '@/components/ui/checkbox';
import { Select } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import { mayBeEmpty, unitsOf, type CheckField, type Draft, type Field, type TypedField } from './field-spec';
import { quantities } from './quantities';

function unitOf(field: TypedField, draft: Draft): string | undefined {
  const units = unitsOf(draft);
  if (field.kind === 'length') return units;
  if (field.kind === 'quantity') return quantities[field.quantity].units[units].sign;
  return field.kind === 'number' ? field.unit : undefined;
}

/** Room at the end of the box for units longer than a few letters. */
function roomFor(unit: string | undefined): string {
  const size = unit?.length ?? 0;
  return size > 8 ? 'pr-28' : size > 3 ? 'pr-16' : '';
}

interface FieldProps<F extends Field> {
  name: string;
  field: F;
  draft: Draft;
  problem: string | undefined;
}

/** One input of a calculation, in the control that suits its kind. */
export function CalculationField({ name, field, draft, problem }: FieldProps<Field>) {
  const { register } = useFormContext<Draft>();
  // What is focused is not hidden behind the result line at the foot of a small screen.
  const clear = 'scroll-mb-24';
  if (field.kind === 'check') return <CheckInput {...{ name, field, draft, problem }} />;
  if (field.kind === 'choice') {
    return (
      <Select
        label={field.label}
        hint={field.hint}
        error={problem}
        options={Object.entries(field.choices).map(([value, label]) => ({ value, label }))}
        fieldClassName={field.wide === false ? 'col-span-2 sm:col-span-1' : 'col-span-2'}
        className={clear}
        {...register(name)}
      />
    );
  }
  const unit = unitOf(field, draft);
  const optional = mayBeEmpty(field, draft);
  return (
    <TextInput
      label={field.label}
      hint={field.hint}
      error={problem}
      optional={optional}
      unit={unit}
      figure
      autoComplete="off"
      spellCheck={false}
      fieldClassName={field.wide ? 'col-span-2' : optional ? 'col-span-2 sm:col-span-1' : undefined}
      className={classNames(clear, roomFor(unit))}
      {...register(name)}
    />
  );
}

function CheckInput({ name, field, problem }: FieldProps<CheckField>) {
  const { control, setValue } = useFormContext<Draft>();
  const value = useWatch({ control, name });
  return (
    <Checkbox
      label={field.label}
      hint={field.hint}
      error={problem}
      className="col-span-2"
      checked={value === 'yes'}
      onChange={(event) => setValue(name, event.target.checked ? 'yes' : 'no', { shouldDirty: true })}
    />
  );
}
