import { useId, type ComponentProps, type ReactNode } from 'react';
import { classNames } from './class-names';
import { controlClasses, Field, fieldAria, type FieldText } from './field';

export interface TextInputProps extends FieldText, Omit<ComponentProps<'input'>, 'children'> {
  /** Stands at the end of the box: a unit. It gives its unit to a bare number. */
  unit?: ReactNode;
  /** A measurement: figures of one width, set right. */
  figure?: boolean;
  fieldClassName?: string;
}

/** One line of text or a number, with its label, hint and error. Native props and `ref` go to the input. */
export function TextInput({
  label,
  hint,
  error,
  labelHidden,
  optional,
  unit,
  figure,
  id,
  className,
  fieldClassName,
  ...rest
}: TextInputProps) {
  const own = useId();
  const fieldId = id ?? own;
  return (
    <Field {...{ id: fieldId, label, hint, error, labelHidden, optional }} className={fieldClassName}>
      <span className="relative flex">
        <input
          {...rest}
          {...fieldAria(fieldId, { hint, error })}
          className={classNames(
            controlClasses,
            'read-only:bg-paper/50',
            figure && 'text-right font-figure font-medium',
            Boolean(unit) && 'pr-12',
            className,
          )}
        />
        {unit && (
          <span className="pointer-events-none absolute inset-y-0 right-0 grid min-w-11 place-items-center border-l border-rule px-2 font-figure text-label text-pencil">
            {unit}
          </span>
        )}
      </span>
    </Field>
  );
}
