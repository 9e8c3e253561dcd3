import { hash, verify } from '@node-rs/argon2';

/** argon2id with the parameters that OWASP's password storage cheat sheet names first: 19 MiB, two passes, one lane. */
const options = { memoryCost: 19_456, timeCost: 2, parallelism: 1 };

/** @param password as typed; 10 to 200 characters is checked where it is chosen */
export const hashPassword = (password: string): Promise<string> => hash(password.normalize('NFKC'), options);

let decoy: Promise<string> | undefined;

/**
 * @param kept the person's hash; null where nobody has this address: as much time is spent then, so that an answer
 *   does not tell who exists
 */
export async function verifyPassword(kept: string | null, password: string): Promise<boolean> {
  const against = kept ?? (await (decoy ??= hashPassword('nobody has this password')));
  const right = await verify(against, password.normalize('NFKC'));
  return right && kept !== null;
}
