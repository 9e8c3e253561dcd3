import { fileURLToPath } from 'node:url';
import type { Knex } from 'knex';

/**
 * For Knex's own command line: `NODE_OPTIONS='--import tsx' knex migrate:latest --knexfile db/knexfile.ts`.
 * Migrations run as the owner of the tables; the application never does.
 */
const here = (folder: string) => fileURLToPath(new URL(folder, import.meta.url));

const config: Knex.Config = {
  client: 'pg',
  connection: process.env.OWNER_DATABASE_URL,
  pool: { min: 0, max: 2 },
  migrations: { directory: here('./migrations'), loadExtensions: ['.ts'], extension: 'ts' },
  seeds: { directory: here('./seeds'), loadExtensions: ['.ts'] },
};

export default config;
