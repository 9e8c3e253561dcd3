import { useId, type ComponentProps } from 'react';
import { classNames } from './class-names';
import { fieldAria, FieldError, type FieldText } from './field';

export interface CheckboxProps
  extends Pick<FieldText, 'label' | 'hint' | 'error'>, Omit<ComponentProps<'input'>, 'type' | 'children'> {
  /** `radio` for one of several with the same name. */
  type?: 'checkbox' | 'radio';
}

/** A box to tick, or one choice of several, with its label beside it. Native props and `ref` go to the input. */
export function Checkbox({ label, hint, error, id, className, type = 'checkbox', ...rest }: CheckboxProps) {
  const own = useId();
  const fieldId = id ?? own;
  return (
    <div className={classNames('grid gap-1', className)}>
      <label htmlFor={fieldId} className="flex min-h-target items-center gap-2.5 py-1 text-body">
        <input
          {...rest}
          {...fieldAria(fieldId, { hint, error })}
          type={type}
          className="size-5 shrink-0 accent-chalk in-data-[density=field]:size-7"
        />
        <span>{label}</span>
      </label>
      {hint && (
        <p
          id={`${fieldId}-hint`}
          className="-mt-1.5 pl-7.5 text-label text-pencil in-data-[density=field]:pl-9.5"
        >
          {hint}
        </p>
      )}
      <FieldError id={fieldId} error={error} />
    </div>
  );
}
