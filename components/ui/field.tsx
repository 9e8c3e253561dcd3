import type { ReactNode } from 'react';
import { classNames } from './class-names';
import { ToneGlyph } from './tone-glyph';

export interface FieldText {
  label: ReactNode;
  /** What helps to fill it in, under the label. */
  hint?: ReactNode;
  /** What is wrong and what to do, beside the field. */
  error?: string | null;
  /** The label is for screen readers only: where a table's heading or the drawing says it already. */
  labelHidden?: boolean;
  /** Marks a field that may be left empty; the rest are required. */
  optional?: boolean;
}

/** What a control inside a Field with this id has to carry. */
export function fieldAria(id: string, { hint, error }: Pick<FieldText, 'hint' | 'error'>) {
  const ids = [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ');
  return { id, 'aria-describedby': ids || undefined, 'aria-invalid': error ? true : undefined } as const;
}

/** Label, hint, control and error of one field; the control takes `fieldAria(id, …)`. */
export function Field({
  id,
  label,
  hint,
  error,
  labelHidden,
  optional,
  className,
  children,
}: FieldText & { id: string; className?: string; children: ReactNode }) {
  return (
    <div className={classNames('grid content-start gap-1', className)}>
      <label
        htmlFor={id}
        className={labelHidden ? 'sr-only' : 'font-label text-label font-semibold text-ink'}
      >
        {label}
        {optional && <span className="font-medium text-pencil"> (may be left empty)</span>}
      </label>
      {hint && (
        <p id={`${id}-hint`} className="text-label text-pencil">
          {hint}
        </p>
      )}
      {children}
      <FieldError id={id} error={error} />
    </div>
  );
}

/** The error of a field, in words and with a shape. */
export function FieldError({ id, error }: { id: string; error?: string | null }) {
  if (!error) return null;
  return (
    <p id={`${id}-error`} className="flex items-start gap-1.5 font-label text-label font-semibold text-hold">
      <ToneGlyph tone="hold" className="mt-0.5 shrink-0" />
      {error}
    </p>
  );
}

/** What every text control looks like: a ruled box on the sheet, heavy and in oxide where it is wrong. */
export const controlClasses =
  'w-full min-h-target border border-pencil bg-sheet px-2.5 py-1 text-body text-ink ' +
  'hover:border-ink aria-invalid:border-2 aria-invalid:border-hold ' +
  'disabled:border-dashed disabled:text-pencil';
