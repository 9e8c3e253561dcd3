import type { AnchorHTMLAttributes } from 'react';

/**
 * A link out of the offline side, to a page that the server gives: a whole load of the page, so that the offline side
 * begins anew with whoever is signed in by then.
 */
export function LeaveLink({ href, ...rest }: AnchorHTMLAttributes<HTMLAnchorElement> & { href: string }) {
  return <a {...rest} href={href} />;
}
