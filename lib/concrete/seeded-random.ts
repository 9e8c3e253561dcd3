/** 32-bit FNV-1a hash with the finishing mix of MurmurHash3, started from `basis`. */
function hash(text: string, basis: number): number {
  let h = basis >>> 0;
  for (let index = 0; index < text.length; index += 1) {
    h = Math.imul(h ^ text.charCodeAt(index), 0x01000193);
  }
  h ^= h >>> 16;
  h = Math.imul(h, 0x85ebca6b);
  h ^= h >>> 13;
  h = Math.imul(h, 0xc2b2ae35);
  return (h ^ (h >>> 16)) >>> 0;
}

/**
 * A stream of numbers in [0, 1) that depends on `seed` only: the same on every device and in every year. The
 * generator is sfc32 (C. Doty-Humphrey, PractRand, public domain), seeded by four hashes of the text. It must never
 * change: reading points of issued plans are drawn with it.
 */
export function seededRandom(seed: string): () => number {
  let a = hash(seed, 0x811c9dc5);
  let b = hash(seed, 0x9e3779b9);
  let c = hash(seed, 0x243f6a88);
  let counter = 1;
  const next = () => {
    const sum = (((a + b) | 0) + counter) | 0;
    counter = (counter + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = ((c << 21) | (c >>> 11)) + sum;
    c |= 0;
    return (sum >>> 0) / 4294967296;
  };
  for (let warm = 0; warm < 12; warm += 1) next();
  return next;
}
