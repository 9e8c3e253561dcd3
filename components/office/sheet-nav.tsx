import { PopoverLinks } from './popover-links';

export interface SheetPart {
  href: string;
  label: string;
  count?: number;
}

/** How many parts stand in the bar itself on a phone; the others are a press away. */
const IN_SIGHT = 2;

/** The parts of a long sheet, each one press away; the bar stays in sight while one reads. */
export function SheetNav({ items }: { items: SheetPart[] }) {
  return (
    <nav
      aria-label="On this sheet"
      data-stays=""
      className="sticky top-0 z-10 -mx-4 border-b border-ink bg-paper px-4 print:hidden"
    >
      <ul className="flex gap-x-5 md:flex-wrap">
        {items.map((item, index) => (
          <li key={item.href} className={index < IN_SIGHT ? undefined : 'max-md:hidden'}>
            <PartLink {...item} />
          </li>
        ))}
        <li className="ml-auto md:hidden">
          <PopoverLinks label="All parts" id="sheet-parts">
            {items.map((item) => (
              <li key={item.href}>
                <PartLink {...item} />
              </li>
            ))}
          </PopoverLinks>
        </li>
      </ul>
    </nav>
  );
}

function PartLink({ href, label, count }: SheetPart) {
  return (
    <a
      href={href}
      className="inline-flex min-h-target items-center gap-1.5 font-label font-semibold whitespace-nowrap text-chalk underline underline-offset-4 -outline-offset-3"
    >
      {label}
      {count !== undefined && <span className="font-figure text-label font-medium">{count}</span>}
    </a>
  );
}
