'use client';

import { useEffect, useRef } from 'react';

const inField = (target: EventTarget | null) =>
  target instanceof HTMLElement &&
  (target.isContentEditable || /^(INPUT|TEXTAREA|SELECT)$/.test(target.tagName));

/**
 * Listens to a keyboard, or to a gauge that types like one: characters, Backspace, Enter. Silent while something else
 * takes the keys: a field, an open dialog. After typed characters Enter keeps, whatever has the focus; else it does
 * what the focused control does.
 */
export function useTypedKeys(handlers: {
  enabled: boolean;
  /** Something has been entered: Enter may mean "keep". */
  filled: boolean;
  onChar: (char: string) => void;
  onDelete: () => void;
  onEnter: () => void;
}): void {
  const latest = useRef(handlers);
  useEffect(() => {
    latest.current = handlers;
  });
  useEffect(() => {
    let typed = false;
    const listen = (event: KeyboardEvent) => {
      const { enabled, filled, onChar, onDelete, onEnter } = latest.current;
      if (!enabled || event.ctrlKey || event.metaKey || event.altKey || inField(event.target)) return;
      if (document.querySelector('dialog[open]')) return;
      if (event.key === 'Enter') {
        const onControl = event.target instanceof HTMLElement && event.target.closest('button, a, summary');
        if (onControl && !(typed && filled)) return;
        event.preventDefault();
        onEnter();
      } else if (event.key === 'Backspace') {
        event.preventDefault();
        onDelete();
      } else if (/^[0-9./"'mMiInN]$/.test(event.key)) {
        typed = true;
        onChar(event.key);
      } else if (event.key === ' ' && typed) {
        // The space of "1 3/8"; without digits before it, it is the space that presses a button.
        event.preventDefault();
        onChar(' ');
      } else if (event.key === 'Tab') typed = false;
    };
    window.addEventListener('keydown', listen);
    return () => window.removeEventListener('keydown', listen);
  }, []);
}
