'use client';

import { useEffect, useId, useRef, type ReactNode } from 'react';
import { classNames } from './class-names';

export interface DialogProps {
  open: boolean;
  title: ReactNode;
  /** Escape, the close button, or a press outside (where `closeOutside`). The parent sets `open` to false. */
  onClose: () => void;
  children: ReactNode;
  /** Buttons, ruled off at the foot. */
  footer?: ReactNode;
  closeOutside?: boolean;
  wide?: boolean;
  closeLabel?: string;
}

const firstControl =
  ':is([data-dialog-body], [data-dialog-foot]) :is(input, select, textarea, button, a[href])';

/**
 * A modal sheet over the page, on the native element: the browser keeps the focus inside, makes the rest inert, and
 * gives the focus back to what opened it. Focus starts at `data-autofocus`, else at the first control of the content.
 */
export function Dialog({
  open,
  title,
  onClose,
  children,
  footer,
  closeOutside = false,
  wide,
  closeLabel = 'Close',
}: DialogProps) {
  const ref = useRef<HTMLDialogElement>(null);
  const titleId = useId();

  useEffect(() => {
    const dialog = ref.current;
    if (!dialog) return;
    if (open && !dialog.open) {
      dialog.showModal();
      const first =
        dialog.querySelector<HTMLElement>('[data-autofocus]') ??
        dialog.querySelector<HTMLElement>(firstControl);
      first?.focus();
    }
    if (!open && dialog.open) dialog.close();
  }, [open]);

  return (
    <dialog
      ref={ref}
      aria-labelledby={titleId}
      onCancel={(event) => {
        // A file input inside sends a `cancel` of its own, which bubbles.
        if (event.target !== event.currentTarget) return;
        event.preventDefault();
        onClose();
      }}
      onClose={() => open && onClose()}
      onPointerDown={(event) => {
        if (closeOutside && event.target === event.currentTarget) onClose();
      }}
      className={classNames(
        'sheet-frame fixed inset-0 m-auto h-fit max-h-[calc(100dvh-2rem)] w-[calc(100vw-2rem)] overflow-visible p-0 text-ink',
        wide ? 'max-w-4xl' : 'max-w-lg',
      )}
    >
      {open && (
        <div className="flex max-h-[calc(100dvh-2.25rem)] flex-col">
          <div className="flex items-center justify-between gap-4 border-b border-ink pl-4">
            <h2 id={titleId} className="py-2 text-heading">
              {title}
            </h2>
            <button
              type="button"
              onClick={onClose}
              aria-label={closeLabel}
              className="grid size-target min-h-11 min-w-11 shrink-0 place-items-center self-stretch border-l border-ink text-pencil hover:text-ink"
            >
              <svg
                viewBox="0 0 16 16"
                width="16"
                height="16"
                stroke="currentColor"
                strokeWidth="1.8"
                aria-hidden="true"
              >
                <path d="M2 2l12 12M14 2 2 14" />
              </svg>
            </button>
          </div>
          <div data-dialog-body="" className="min-h-0 flex-1 overflow-y-auto px-4 py-4">
            {children}
          </div>
          {footer && (
            <div
              data-dialog-foot=""
              className="flex flex-wrap justify-end gap-2 border-t border-rule px-4 py-3"
            >
              {footer}
            </div>
          )}
        </div>
      )}
    </dialog>
  );
}
