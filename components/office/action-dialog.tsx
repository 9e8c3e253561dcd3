'use client';

import { useEffect, useId, useRef, useState, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import type { ButtonVariant } from '@/components/ui/button-classes';

/** A button that opens a dialog; what is in it is made anew each time, and told how to close it. */
export function ActionDialog({
  label,
  accessibleLabel,
  title,
  variant = 'secondary',
  wide = false,
  children,
}: {
  label: ReactNode;
  /** Where several buttons say the same: which one this is. */
  accessibleLabel?: string;
  title: string;
  variant?: ButtonVariant;
  wide?: boolean;
  children: (close: () => void) => ReactNode;
}) {
  const [open, setOpen] = useState(false);
  const dialog = useRef<HTMLDialogElement>(null);
  const heading = useId();
  const close = () => dialog.current?.close();

  useEffect(() => {
    if (open && !dialog.current?.open) dialog.current?.showModal();
  }, [open]);

  return (
    <>
      <Button
        variant={variant}
        aria-label={accessibleLabel}
        aria-haspopup="dialog"
        onClick={() => setOpen(true)}
      >
        {label}
      </Button>
      {open && (
        <dialog
          ref={dialog}
          aria-labelledby={heading}
          onClose={() => setOpen(false)}
          className="m-auto max-h-[92dvh] overflow-auto border-[1.5px] border-ink bg-sheet p-0 text-ink"
          style={{ width: `min(100vw - 1.5rem, ${wide ? '70rem' : '34rem'})` }}
        >
          <header className="flex items-center justify-between gap-4 border-b border-ink py-2 pr-2 pl-4">
            <h2 id={heading} className="text-heading">
              {title}
            </h2>
            <Button variant="quiet" onClick={close}>
              Close
            </Button>
          </header>
          <div className="p-4">{children(close)}</div>
        </dialog>
      )}
    </>
  );
}
