/** Words that say nothing of what went wrong. */
const common = new Set([
  'with',
  'than',
  'from',
  'over',
  'under',
  'less',
  'more',
  'points',
  'point',
  'that',
  'this',
]);

const wordsOf = (title: string): Set<string> =>
  new Set((title.toLowerCase().match(/\p{Letter}{4,}/gu) ?? []).filter((word) => !common.has(word)));

/** Earlier ones that share words with a title, the most alike first; at most `most`. */
export function similarNonconformances<T extends { id: string; title: string }>(
  of: { id: string; title: string },
  all: readonly T[],
  most = 5,
): T[] {
  const own = wordsOf(of.title);
  return all
    .filter((one) => one.id !== of.id)
    .map((one) => ({ one, shared: [...wordsOf(one.title)].filter((word) => own.has(word)).length }))
    .filter(({ shared }) => shared > 0)
    .sort((a, b) => b.shared - a.shared)
    .slice(0, most)
    .map(({ one }) => one);
}
