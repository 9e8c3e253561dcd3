import Link from 'next/link';
import { classNames } from './class-names';

export interface TabsNavItem {
  href: string;
  label: string;
  current?: boolean;
  /** How many wait there; said in the link. */
  count?: number;
  countWords?: string;
}

/** The parts of one thing, each with an address of its own, like the tabs of a set of sheets. */
export function TabsNav({ items, label }: { items: readonly TabsNavItem[]; label: string }) {
  return (
    <nav aria-label={label} className="overflow-x-auto border-b-2 border-ink pt-1">
      <ul className="flex min-w-max gap-px">
        {items.map((item) => (
          <li key={item.href}>
            <Link
              href={item.href}
              prefetch={false}
              aria-current={item.current ? 'page' : undefined}
              className={classNames(
                'flex min-h-target items-center gap-2 border border-b-0 px-pad font-label text-body font-semibold -outline-offset-3',
                item.current
                  ? 'border-ink bg-ink text-sheet'
                  : 'border-rule bg-sheet text-ink hover:border-ink hover:text-chalk',
              )}
            >
              {item.label}
              {item.count !== undefined && (
                <span className="font-figure text-label font-medium">
                  {item.count}
                  {item.countWords && <span className="sr-only"> {item.countWords}</span>}
                </span>
              )}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
