import type { AnchorHTMLAttributes } from 'react';

/**
 * A link that loads the whole page anew: out of the offline side, so that it begins again with whoever is signed in by
 * then, and on pages that are to bring no script of their own.
 */
export function LeaveLink({ href, ...rest }: AnchorHTMLAttributes<HTMLAnchorElement> & { href: string }) {
  return <a {...rest} href={href} />;
}
