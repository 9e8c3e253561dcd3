import { createHash } from 'node:crypto';
import { AppError } from '@/lib/inspection/app-error';
import { failuresSince, forgetAttempts, insertAttempt } from '@/db/stores/attempt-store';
import { credentialsByEmail, credentialsById, type Credentials } from '@/db/stores/person-store';
import { database } from '@/db/connection';
import { logger } from './logger';
import { verifyPassword } from './password';

/** After so many wrong passwords within the window, no password is tried at all. */
export const MOST_FAILURES_OF_PERSON = 5;
export const MOST_FAILURES_FROM_ADDRESS = 30;
const WINDOW_MS = 15 * 60_000;

/** Who is asking: by e-mail address when signing in, by id when confirming something while signed in. */
export type Who = { email: string } | { personId: string };

/**
 * Tells whether the password is the person's own, at most so often. Every try is kept for a while, whatever the
 * surrounding work comes to: it runs outside of any transaction.
 * @returns the person, or null for a wrong password, an unknown address, or a disabled person
 * @throws AppError too-many, before the password is looked at
 */
export async function checkPassword(
  who: Who,
  password: string,
  address: string,
  now: Date = new Date(),
): Promise<Credentials | null> {
  const db = database();
  const found =
    'email' in who ? await credentialsByEmail(db, who.email) : await credentialsById(db, who.personId);
  const personKey = keyOf('email' in who ? who.email : (found?.email ?? who.personId));
  const since = new Date(now.getTime() - WINDOW_MS).toISOString();
  const failures = await failuresSince(db, personKey, address, since);
  if (failures.ofPerson >= MOST_FAILURES_OF_PERSON || failures.fromAddress >= MOST_FAILURES_FROM_ADDRESS) {
    logger.warn({ event: 'password-throttled', address });
    throw new AppError('too-many', 'Too many wrong passwords. Wait a quarter of an hour and try again.');
  }
  const right = await verifyPassword(found?.passwordHash ?? null, password);
  const succeeded = right && found !== null && !found.disabled;
  await insertAttempt(db, { personKey, address, at: now.toISOString(), succeeded });
  if (!succeeded) {
    logger.info({ event: 'password-wrong', address });
    return null;
  }
  await forgetAttempts(db, new Date(now.getTime() - 24 * 3_600_000).toISOString());
  return found;
}

/** Tries are counted under a digest, so that the table is no list of addresses that somebody typed. */
const keyOf = (email: string) => createHash('sha256').update(email.trim().toLowerCase()).digest('hex');
