import { useId, type ComponentProps } from 'react';
import { classNames } from './class-names';
import { controlClasses, Field, fieldAria, type FieldText } from './field';

export interface TextareaProps extends FieldText, Omit<ComponentProps<'textarea'>, 'children'> {
  fieldClassName?: string;
}

/** Several lines of text, with label, hint and error. Native props and `ref` go to the textarea. */
export function Textarea({
  label,
  hint,
  error,
  labelHidden,
  optional,
  id,
  className,
  fieldClassName,
  rows = 3,
  ...rest
}: TextareaProps) {
  const own = useId();
  const fieldId = id ?? own;
  return (
    <Field {...{ id: fieldId, label, hint, error, labelHidden, optional }} className={fieldClassName}>
      <textarea
        {...rest}
        rows={rows}
        {...fieldAria(fieldId, { hint, error })}
        className={classNames(controlClasses, 'py-2 read-only:bg-paper/50', className)}
      />
    </Field>
  );
}
