import type { ComponentProps } from 'react';

/** Text for a screen reader only. */
export function VisuallyHidden(props: ComponentProps<'span'>) {
  return <span {...props} className="sr-only" />;
}
