import Link from 'next/link';
import { classNames } from './class-names';
import { pageNumbers } from './page-numbers';

/** Links to the pages of a list. `hrefFor` writes the address of a page; nothing is shown for a single page. */
export function Pagination({
  page,
  pages,
  hrefFor,
  label = 'Pages',
}: {
  page: number;
  pages: number;
  hrefFor: (page: number) => string;
  label?: string;
}) {
  if (pages <= 1) return null;
  const cell = 'grid min-h-target min-w-target place-items-center px-2 font-figure font-medium';
  return (
    <nav aria-label={label} className="flex flex-wrap items-center gap-1 text-body">
      {page > 1 && (
        <Link
          href={hrefFor(page - 1)}
          prefetch={false}
          rel="prev"
          className={classNames(cell, 'font-label text-chalk underline')}
        >
          Earlier
        </Link>
      )}
      <ol className="flex border border-rule">
        {pageNumbers(page, pages).map((n, i) => (
          <li key={n ?? `gap-${i}`} className="border-r border-rule last:border-r-0">
            {n === null ? (
              <span className={cell}>…</span>
            ) : (
              <Link
                href={hrefFor(n)}
                prefetch={false}
                aria-label={`Page ${n}`}
                aria-current={n === page ? 'page' : undefined}
                className={classNames(
                  cell,
                  '-outline-offset-3',
                  n === page ? 'bg-ink text-sheet' : 'text-chalk hover:underline',
                )}
              >
                {n}
              </Link>
            )}
          </li>
        ))}
      </ol>
      {page < pages && (
        <Link
          href={hrefFor(page + 1)}
          prefetch={false}
          rel="next"
          className={classNames(cell, 'font-label text-chalk underline')}
        >
          Later
        </Link>
      )}
    </nav>
  );
}
