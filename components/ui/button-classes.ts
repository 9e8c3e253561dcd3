import { classNames } from './class-names';

/** `primary` the one thing to do here; `secondary` the others; `quiet` inside a line; `hold` what cannot be taken back. */
export type ButtonVariant = 'primary' | 'secondary' | 'quiet' | 'hold';

const base =
  'inline-flex items-center justify-center gap-2 min-h-target min-w-target px-pad py-1 border font-label text-body font-semibold ' +
  'text-center select-none touch-manipulation disabled:cursor-not-allowed aria-disabled:cursor-not-allowed ' +
  'aria-busy:cursor-progress';

const variants: Record<ButtonVariant, string> = {
  primary:
    'border-chalk bg-chalk text-sheet hover:not-disabled:bg-ink hover:not-disabled:border-ink ' +
    'disabled:border-dashed disabled:border-pencil disabled:bg-transparent disabled:text-pencil',
  secondary:
    'border-ink bg-sheet text-ink hover:not-disabled:border-chalk hover:not-disabled:text-chalk ' +
    'disabled:border-dashed disabled:border-pencil disabled:text-pencil',
  quiet:
    'border-transparent bg-transparent text-chalk underline underline-offset-4 decoration-1 ' +
    'hover:not-disabled:decoration-2 disabled:text-pencil disabled:no-underline',
  hold:
    'border-hold bg-sheet text-hold hover:not-disabled:bg-hold hover:not-disabled:text-sheet ' +
    'disabled:border-dashed disabled:border-pencil disabled:text-pencil',
};

/** The classes of a button, for a link that has to look like one (the field side has links of its own). */
export function buttonClasses(
  variant: ButtonVariant = 'secondary',
  wide = false,
  className?: string,
): string {
  return classNames(base, variants[variant], wide && 'w-full', className);
}
