import type { ReactNode } from 'react';
import { classNames } from '@/components/ui/class-names';

/** Something that opens under its line, by the browser itself. What is filled in inside stays when it is closed. */
export function Disclosure({
  summary,
  className,
  startOpen = false,
  children,
}: {
  summary: ReactNode;
  className?: string;
  /** Open when the screen is drawn first. */
  startOpen?: boolean;
  children: ReactNode;
}) {
  return (
    <details open={startOpen || undefined} className={classNames('group', className)}>
      <summary className="flex min-h-target list-none items-center justify-between gap-3 font-label font-semibold [&::-webkit-details-marker]:hidden">
        {summary}
        <svg
          viewBox="0 0 12 12"
          width="14"
          height="14"
          aria-hidden="true"
          fill="none"
          stroke="currentColor"
          strokeWidth="1.8"
          className="shrink-0 text-pencil group-open:rotate-180"
        >
          <path d="M1.5 4 6 8.5 10.5 4" />
        </svg>
      </summary>
      {children}
    </details>
  );
}
