'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { classNames } from '@/components/ui/class-names';
import { LinkPending } from './link-pending';

/** A link of the main navigation, underlined heavily where one is. */
export function NavLink({ href, label }: { href: string; label: string }) {
  const path = usePathname();
  const current = path === href || path.startsWith(`${href}/`);
  return (
    <Link
      href={href}
      prefetch={false}
      aria-current={current ? 'page' : undefined}
      className={classNames(
        'inline-flex min-h-target items-center border-b-[3px] px-1 font-label text-body font-semibold whitespace-nowrap -outline-offset-3 md:px-2',
        current ? 'border-ink text-ink' : 'border-transparent text-chalk hover:border-chalk',
      )}
    >
      {label}
      <LinkPending />
    </Link>
  );
}
