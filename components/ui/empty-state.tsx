import type { ReactNode } from 'react';

/** Nothing here yet: says so, says why, and offers the way on. An empty place on a sheet is crossed out. */
export function EmptyState({
  title,
  children,
  action,
}: {
  title: string;
  children?: ReactNode;
  action?: ReactNode;
}) {
  return (
    <div className="relative grid justify-items-center gap-2 border border-dashed border-pencil px-6 py-8 text-center">
      <svg className="absolute inset-0 size-full" aria-hidden="true" stroke="var(--rule)" opacity="0.55">
        <line x1="0" y1="0" x2="100%" y2="100%" />
        <line x1="100%" y1="0" x2="0" y2="100%" />
      </svg>
      <div className="relative grid max-w-prose justify-items-center gap-2 bg-sheet px-4 py-2">
        <p className="font-label text-lead font-semibold">{title}</p>
        {children && <div className="text-body text-pencil">{children}</div>}
        {action && <div className="mt-1 flex flex-wrap justify-center gap-2">{action}</div>}
      </div>
    </div>
  );
}
