import { useId, type ReactNode } from 'react';

/** A small "?" beside a term that opens what it means. The browser opens and closes it: no script is needed. */
export function TermHelp({ term, children }: { term: string; children: ReactNode }) {
  const id = useId();
  return (
    <>
      <button
        type="button"
        popoverTarget={id}
        aria-label={`What "${term}" means`}
        className="relative mx-1 inline-grid size-6 place-items-center rounded-full border border-pencil align-middle font-label text-xs font-semibold text-pencil hover:border-chalk hover:text-chalk in-data-[density=field]:size-8"
      >
        ?
      </button>
      <span
        id={id}
        popover="auto"
        role="note"
        className="term-help border border-ink bg-sheet px-4 py-3 text-left font-sans text-body font-normal text-ink"
      >
        <b className="block font-label text-lead">{term}</b>
        {children}
      </span>
    </>
  );
}
