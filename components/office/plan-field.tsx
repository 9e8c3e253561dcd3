'use client';

import { get, useFormContext, useFormState, type FieldPath } from 'react-hook-form';
import { Select, type SelectOption } from '@/components/ui/select';
import { TextInput } from '@/components/ui/text-input';
import type { PlanDraft } from './plan-draft';

type Path = FieldPath<PlanDraft>;

/** The message beside a field of the plan. */
export function useProblem(path: string): string | undefined {
  const { control } = useFormContext<PlanDraft>();
  const { errors } = useFormState({ control });
  const found: unknown = get(errors, path);
  if (typeof found !== 'object' || found === null) return undefined;
  if ('message' in found && typeof found.message === 'string') return found.message;
  const root: unknown = 'root' in found ? found.root : undefined;
  return typeof root === 'object' && root !== null && 'message' in root && typeof root.message === 'string'
    ? root.message
    : undefined;
}

/** One line of text of the plan; with `unit` a length, which takes its unit from the field where it has none. */
export function PlanText({
  path,
  label,
  hint,
  optional,
  unit,
  figure,
  type = 'text',
  className,
  labelHidden,
}: {
  path: Path;
  label: string;
  hint?: string;
  optional?: boolean;
  unit?: string;
  figure?: boolean;
  type?: 'text' | 'datetime-local';
  className?: string;
  labelHidden?: boolean;
}) {
  const { register } = useFormContext<PlanDraft>();
  return (
    <TextInput
      label={label}
      hint={hint}
      optional={optional}
      labelHidden={labelHidden}
      unit={unit}
      figure={figure ?? Boolean(unit)}
      type={type}
      autoComplete="off"
      error={useProblem(path)}
      fieldClassName={className}
      {...register(path)}
    />
  );
}

/** A choice of the plan. */
export function PlanSelect({
  path,
  label,
  hint,
  options,
  placeholder,
  className,
}: {
  path: Path;
  label: string;
  hint?: string;
  options: SelectOption[];
  placeholder?: string;
  className?: string;
}) {
  const { register } = useFormContext<PlanDraft>();
  return (
    <Select
      label={label}
      hint={hint}
      options={options}
      placeholder={placeholder}
      error={useProblem(path)}
      fieldClassName={className}
      {...register(path)}
    />
  );
}
