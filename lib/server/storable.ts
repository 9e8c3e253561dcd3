const MOST_DEPTH = 24;
const LONE_SURROGATE = /\p{Surrogate}/u;

/**
 * Can PostgreSQL's jsonb keep this value as it is? One string with U+0000 or half of a surrogate pair, a number
 * beyond double precision, or nesting without end would take a whole batch of entries down with it.
 * @returns what is wrong, in words, or null
 */
export function unstorable(value: unknown, depth = 0): string | null {
  if (depth > MOST_DEPTH) return 'This is nested too deeply to be kept.';
  if (typeof value === 'string')
    return badText(value) ? 'This text holds a character that cannot be kept.' : null;
  if (typeof value === 'number')
    return Number.isFinite(value) ? null : 'This number is too large to be kept.';
  if (typeof value !== 'object' || value === null) return null;
  if (Array.isArray(value)) {
    for (const one of value) {
      const problem = unstorable(one, depth + 1);
      if (problem) return problem;
    }
    return null;
  }
  // Every value of every entry comes by here: no lists are made to be thrown away.
  for (const key of Object.keys(value)) {
    const problem =
      unstorable(key, depth + 1) ?? unstorable((value as Record<string, unknown>)[key], depth + 1);
    if (problem) return problem;
  }
  return null;
}

const badText = (text: string) => text.includes('\u0000') || LONE_SURROGATE.test(text);
