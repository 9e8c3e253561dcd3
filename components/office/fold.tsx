import type { ReactNode } from 'react';

/**
 * A part of a sheet that is folded away until it is asked for. A link to something inside opens it, finding in the
 * page opens it, and paper shows all of it.
 */
export function Fold({
  summary,
  aside,
  open = false,
  children,
}: {
  summary: ReactNode;
  /** What it amounts to, at the right end of the line. */
  aside?: ReactNode;
  open?: boolean;
  children: ReactNode;
}) {
  return (
    <details open={open} className="group min-w-0 print:[&::details-content]:[content-visibility:visible]">
      <summary className="flex min-h-target list-none flex-wrap items-center justify-between gap-x-4 border-b border-rule font-label font-semibold [&::-webkit-details-marker]:hidden">
        <span className="inline-flex items-center gap-2 text-chalk underline underline-offset-4 print:text-ink print:no-underline">
          <svg
            viewBox="0 0 10 10"
            width="10"
            height="10"
            aria-hidden="true"
            className="shrink-0 group-open:rotate-90 print:hidden"
            fill="currentColor"
          >
            <path d="M2 0l7 5-7 5z" />
          </svg>
          {summary}
        </span>
        {aside && <span className="text-label font-medium text-pencil">{aside}</span>}
      </summary>
      <div className="pt-2">{children}</div>
    </details>
  );
}
