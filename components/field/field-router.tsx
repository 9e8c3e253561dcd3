'use client';

import { usePathname } from 'next/navigation';
import { useEffect, type AnchorHTMLAttributes, type MouseEvent } from 'react';
import { readRoute, type FieldRoute } from './field-routes';

/** The screen that the address bar names. All of `/field` is one page, so that moving about fetches nothing. */
export function useFieldRoute(): FieldRoute {
  return readRoute(usePathname() ?? '/field');
}

/** Goes to another screen of the offline side without a request. */
export function goTo(path: string): void {
  const { pathname, search } = window.location;
  if (path !== `${pathname}${search}`) window.history.pushState(null, '', path);
}

/** Goes back where there is something to go back to within the application, else to the path given. */
export function goBackTo(path: string): void {
  window.history.replaceState(null, '', path);
}

const plainClick = (event: MouseEvent) =>
  event.button === 0 && !event.metaKey && !event.ctrlKey && !event.shiftKey && !event.altKey;

/** A link between screens of the offline side: a plain click stays in the page, any other does what links do. */
export function FieldLink({
  href,
  onClick,
  ...rest
}: AnchorHTMLAttributes<HTMLAnchorElement> & { href: string }) {
  return (
    <a
      {...rest}
      href={href}
      onClick={(event) => {
        onClick?.(event);
        if (event.defaultPrevented || !plainClick(event)) return;
        event.preventDefault();
        goTo(href);
      }}
    />
  );
}

/** The path shown last, and whether the last move was back or forward: each screen is a component of its own. */
let lastPath: string | null = null;
let movedByBrowser = false;
if (typeof window !== 'undefined') {
  window.addEventListener('popstate', () => {
    movedByBrowser = true;
  });
}

/**
 * Moves the focus to the new screen's heading, and to its top, each time the path changes: not on the first screen, and
 * going back keeps the place where the browser puts it.
 */
export function useScreenFocus(): void {
  const path = usePathname();
  useEffect(() => {
    const first = lastPath === null;
    const moved = lastPath !== path;
    lastPath = path;
    if (first) return;
    if (moved && !movedByBrowser) window.scrollTo(0, 0);
    movedByBrowser = false;
    // A screen that arrived after its stand-in finds the focus nowhere.
    if (moved || document.activeElement === document.body)
      document.querySelector<HTMLElement>('h1')?.focus({ preventScroll: true });
  }, [path]);
}
