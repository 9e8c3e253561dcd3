import type { Knex } from 'knex';

export interface FailureCounts {
  ofPerson: number;
  fromAddress: number;
}

/** Tries with a wrong password since an instant, by person and by address. */
export async function failuresSince(
  db: Knex,
  personKey: string,
  address: string,
  since: string,
): Promise<FailureCounts> {
  const { rows } = await db.raw<{ rows: { of_person: number; from_address: number }[] }>(
    `select
       (select count(*) from sign_in_attempts a where a.person_key = :personKey and a.at > :since and not a.succeeded
          and a.at > coalesce((select max(s.at) from sign_in_attempts s
                               where s.person_key = :personKey and s.succeeded), '-infinity')) as of_person,
       (select count(*) from sign_in_attempts a where a.address = :address and a.at > :since and not a.succeeded)
         as from_address`,
    { personKey, address, since },
  );
  return { ofPerson: rows[0]?.of_person ?? 0, fromAddress: rows[0]?.from_address ?? 0 };
}

export async function insertAttempt(
  db: Knex,
  attempt: { personKey: string; address: string; at: string; succeeded: boolean },
): Promise<void> {
  await db('sign_in_attempts').insert({
    person_key: attempt.personKey,
    address: attempt.address,
    at: attempt.at,
    succeeded: attempt.succeeded,
  });
}

/** Tries older than this instant tell nothing any more. */
export async function forgetAttempts(db: Knex, before: string): Promise<void> {
  await db('sign_in_attempts').where('at', '<', before).delete();
}
