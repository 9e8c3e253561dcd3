'use client';

import { usePathname } from 'next/navigation';
import type { AnchorHTMLAttributes } from 'react';
import { LeaveLink } from '@/components/ui/leave-link';

/** To the sign-in, and back to this very screen. */
export function SignInLink(rest: AnchorHTMLAttributes<HTMLAnchorElement>) {
  const path = usePathname() ?? '/field';
  return <LeaveLink {...rest} href={`/sign-in?next=${encodeURIComponent(path)}`} />;
}
