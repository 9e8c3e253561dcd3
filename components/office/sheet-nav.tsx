/** The parts of a long sheet, each one press away; the bar stays in sight while one reads. */
export function SheetNav({ items }: { items: { href: string; label: string; count?: number }[] }) {
  return (
    <nav
      aria-label="On this sheet"
      className="sticky top-0 z-10 -mx-4 overflow-x-auto border-b border-ink bg-paper px-4 print:hidden"
    >
      <ul className="flex gap-x-5">
        {items.map((item) => (
          <li key={item.href}>
            <a
              href={item.href}
              className="inline-flex min-h-target items-center gap-1.5 font-label font-semibold whitespace-nowrap text-chalk underline underline-offset-4 -outline-offset-3"
            >
              {item.label}
              {item.count !== undefined && (
                <span className="font-figure text-label font-medium">{item.count}</span>
              )}
            </a>
          </li>
        ))}
      </ul>
    </nav>
  );
}
