import type { Knex } from 'knex';

export interface Credentials {
  id: string;
  name: string;
  email: string;
  passwordHash: string;
  disabled: boolean;
}

interface CredentialsRow {
  id: string;
  name: string;
  email: string;
  password_hash: string;
  disabled_at: string | null;
}

const credentials = (row: CredentialsRow | undefined): Credentials | null =>
  row
    ? {
        id: row.id,
        name: row.name,
        email: row.email,
        passwordHash: row.password_hash,
        disabled: row.disabled_at !== null,
      }
    : null;

const columns = ['id', 'name', 'email', 'password_hash', 'disabled_at'];

export async function credentialsByEmail(db: Knex, email: string): Promise<Credentials | null> {
  const row = await db<CredentialsRow>('users')
    .whereRaw('lower(email) = ?', [email.trim().toLowerCase()])
    .first<CredentialsRow | undefined>(columns);
  return credentials(row);
}

export async function credentialsById(db: Knex, personId: string): Promise<Credentials | null> {
  const row = await db<CredentialsRow>('users')
    .where({ id: personId })
    .first<CredentialsRow | undefined>(columns);
  return credentials(row);
}
