'use client';

import { useRef, type ReactNode } from 'react';
import { Button } from '@/components/ui/button';

/** Links behind a button: opened by press or key, closed by Escape, by a press elsewhere, and by following one. */
export function PopoverLinks({ id, label, children }: { id: string; label: string; children: ReactNode }) {
  const list = useRef<HTMLUListElement>(null);
  return (
    <>
      <Button variant="quiet" popoverTarget={id} className="-mr-pad">
        {label}
        <svg viewBox="0 0 10 10" width="10" height="10" aria-hidden="true" fill="currentColor">
          <path d="M0 2l5 7 5-7z" />
        </svg>
      </Button>
      <ul
        ref={list}
        id={id}
        popover="auto"
        onClick={(event) => {
          if (event.target instanceof Element && event.target.closest('a')) list.current?.hidePopover();
        }}
        className="popover-links border border-ink bg-sheet px-4 py-1 text-ink"
      >
        {children}
      </ul>
    </>
  );
}
