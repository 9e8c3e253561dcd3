/** The first stop of the keyboard on every page; leads to the element with the id `main`. */
export function SkipLink({
  href = '#main',
  children = 'Skip to the sheet',
}: {
  href?: string;
  children?: string;
}) {
  return (
    <a
      href={href}
      className="sr-only font-label text-body font-semibold focus:not-sr-only focus:fixed focus:top-2 focus:left-2 focus:z-50 focus:border focus:border-ink focus:bg-sheet focus:px-4 focus:py-2 focus:text-chalk"
    >
      {children}
    </a>
  );
}
