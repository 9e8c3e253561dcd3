/** The pages offered around `page` of `pages`: first, last, the neighbours, and null where some are left out. */
export function pageNumbers(page: number, pages: number): (number | null)[] {
  const near = [1, page - 1, page, page + 1, pages].filter((n) => n >= 1 && n <= pages);
  const shown = [...new Set(near)].sort((a, b) => a - b);
  return shown.flatMap((n, i) => {
    const before = shown[i - 1];
    if (before === undefined || n - before === 1) return [n];
    return n - before === 2 ? [n - 1, n] : [null, n];
  });
}
