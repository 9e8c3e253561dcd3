/** Numbers from 0 to 1 that the same seed always gives in the same order (mulberry32, public domain). */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
}

/** One of the choices, each as likely as its weight. */
export function pick<T>(random: () => number, choices: readonly (readonly [weight: number, choice: T])[]): T {
  let left = random() * choices.reduce((sum, [weight]) => sum + weight, 0);
  for (const [weight, choice] of choices) {
    left -= weight;
    if (left < 0) return choice;
  }
  const last = choices.at(-1);
  if (!last) throw new Error('nothing to choose from');
  return last[1];
}

/** Any one of them. */
export function chance<T>(random: () => number, of: readonly T[]): T {
  const one = of[Math.floor(random() * of.length)];
  if (one === undefined) throw new Error('nothing to choose from');
  return one;
}

/** Everything that there is to try, and not only what fits between two commits. */
export const everything = process.env.FAULTS === 'all';

/**
 * The seeds of this run: a few fixed ones, ten times as many with `FAULTS=all`, `FAULT_SEEDS=200` for as many as that,
 * or `FAULT_SEED=17` for that one.
 */
export function seeds(usual: number): number[] {
  const one = Number(process.env.FAULT_SEED);
  if (Number.isInteger(one) && one > 0) return [one];
  const count = Number(process.env.FAULT_SEEDS) || (everything ? usual * 10 : usual);
  return Array.from({ length: count }, (_, index) => index + 1);
}
