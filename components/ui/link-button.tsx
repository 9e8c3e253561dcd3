import Link from 'next/link';
import type { ComponentProps } from 'react';
import { buttonClasses, type ButtonVariant } from './button-classes';

export interface LinkButtonProps extends ComponentProps<typeof Link> {
  variant?: ButtonVariant;
  wide?: boolean;
}

/** A link that looks like a button; for the office, where the server answers. Nothing is fetched before it is asked for. */
export function LinkButton({ variant, wide, className, prefetch = false, ...rest }: LinkButtonProps) {
  return <Link {...rest} prefetch={prefetch} className={buttonClasses(variant, wide, className)} />;
}
