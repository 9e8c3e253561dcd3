import { useId, type ComponentProps } from 'react';
import { classNames } from './class-names';
import { controlClasses, Field, fieldAria, type FieldText } from './field';

export interface SelectOption {
  value: string;
  label: string;
  disabled?: boolean;
}

export interface SelectProps extends FieldText, ComponentProps<'select'> {
  /** The choices; or give <option> elements as children. */
  options?: readonly SelectOption[];
  /** A first choice that stands for none, with the empty value. */
  placeholder?: string;
  fieldClassName?: string;
}

/** A choice from a list, with label, hint and error. Native props and `ref` go to the select. */
export function Select({
  label,
  hint,
  error,
  labelHidden,
  optional,
  options,
  placeholder,
  id,
  className,
  fieldClassName,
  children,
  ...rest
}: SelectProps) {
  const own = useId();
  const fieldId = id ?? own;
  return (
    <Field {...{ id: fieldId, label, hint, error, labelHidden, optional }} className={fieldClassName}>
      <span className="relative flex">
        <select
          {...rest}
          {...fieldAria(fieldId, { hint, error })}
          className={classNames(controlClasses, 'appearance-none pr-9', className)}
        >
          {placeholder !== undefined && <option value="">{placeholder}</option>}
          {options?.map((option) => (
            <option key={option.value} value={option.value} disabled={option.disabled}>
              {option.label}
            </option>
          ))}
          {children}
        </select>
        <svg
          viewBox="0 0 12 12"
          width="12"
          height="12"
          aria-hidden="true"
          className="pointer-events-none absolute top-1/2 right-3 -translate-y-1/2 text-pencil"
        >
          <path d="M1.5 4 6 8.5 10.5 4" fill="none" stroke="currentColor" strokeWidth="1.8" />
        </svg>
      </span>
    </Field>
  );
}
