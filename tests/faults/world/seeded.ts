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

/** The seeds of this run: a few fixed ones, or `FAULT_SEEDS=200` for as many, or `FAULT_SEED=17` for that one. */
export function seeds(usual: number): number[] {
  const one = Number(process.env.FAULT_SEED);
  if (Number.isInteger(one) && one > 0) return [one];
  const count = Number(process.env.FAULT_SEEDS) || usual;
  return Array.from({ length: count }, (_, index) => index + 1);
}
