/** The parts of a long sheet, each one press away. */
export function SheetNav({ items }: { items: { href: string; label: string; count?: number }[] }) {
  return (
    <nav aria-label="On this sheet" className="overflow-x-auto print:hidden">
      <ul className="flex gap-x-4 gap-y-1">
        {items.map((item) => (
          <li key={item.href}>
            <a
              href={item.href}
              className="inline-flex min-h-target items-center gap-1.5 font-label font-semibold whitespace-nowrap text-chalk underline underline-offset-4"
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
