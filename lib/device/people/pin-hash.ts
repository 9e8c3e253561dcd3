/** What is kept of a PIN: never the PIN itself. */
export interface PinHash {
  /** Base64. */
  salt: string;
  /** Base64 of PBKDF2 with HMAC-SHA-256. */
  hash: string;
  iterations: number;
}

/**
 * Slow on purpose: about a quarter of a second on a phone. Kept with each hash, so that it can be raised for new ones.
 * It does not make four digits a secret: the work is hidden behind the PIN, not encrypted with it.
 */
export const PIN_ITERATIONS = 300_000;
const SALT_BYTES = 16;
const HASH_BITS = 256;

type PinCrypto = Pick<Crypto, 'getRandomValues' | 'subtle'>;

/** The hash of a PIN with a fresh salt. */
export async function hashPin(crypto: PinCrypto, pin: string): Promise<PinHash> {
  const salt = crypto.getRandomValues(new Uint8Array(SALT_BYTES));
  const hash = await derive(crypto, pin, salt, PIN_ITERATIONS);
  return { salt: base64(salt), hash: base64(hash), iterations: PIN_ITERATIONS };
}

/** Is this the PIN of the hash? */
export async function pinMatches(crypto: PinCrypto, pin: string, kept: PinHash): Promise<boolean> {
  const salt = Uint8Array.from(atob(kept.salt), (char) => char.charCodeAt(0));
  return base64(await derive(crypto, pin, salt, kept.iterations)) === kept.hash;
}

async function derive(
  { subtle }: PinCrypto,
  pin: string,
  salt: Uint8Array<ArrayBuffer>,
  iterations: number,
): Promise<Uint8Array> {
  const key = await subtle.importKey('raw', new TextEncoder().encode(pin), 'PBKDF2', false, ['deriveBits']);
  const bits = await subtle.deriveBits({ name: 'PBKDF2', hash: 'SHA-256', salt, iterations }, key, HASH_BITS);
  return new Uint8Array(bits);
}

const base64 = (bytes: Uint8Array): string => btoa(String.fromCharCode(...bytes));
