'use client';

import { useLinkStatus } from 'next/link';
import { Spinner } from '@/components/ui/spinner';

/**
 * Inside a link: turns while the page behind it is being read. The office has no loading page of its own, since one
 * would have to answer "found" before it is known whether there is anything to find.
 */
export function LinkPending() {
  const { pending } = useLinkStatus();
  return pending ? <Spinner className="ml-1.5" /> : null;
}
