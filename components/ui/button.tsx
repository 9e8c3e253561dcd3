import type { ComponentProps } from 'react';
import { buttonClasses, type ButtonVariant } from './button-classes';
import { Spinner } from './spinner';

export interface ButtonProps extends ComponentProps<'button'> {
  variant?: ButtonVariant;
  /** As wide as what holds it. */
  wide?: boolean;
  /** Work is under way: the button says so and takes no second press. */
  busy?: boolean;
}

/** A button. It submits only where `type="submit"` says so. */
export function Button({
  variant,
  wide,
  busy = false,
  className,
  disabled,
  children,
  type = 'button',
  ...rest
}: ButtonProps) {
  return (
    <button
      {...rest}
      type={type}
      disabled={disabled || busy}
      aria-busy={busy || undefined}
      className={buttonClasses(variant, wide, className)}
    >
      {busy && <Spinner />}
      {children}
    </button>
  );
}
