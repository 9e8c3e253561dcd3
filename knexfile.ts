import { fileURLToPath } from 'node:url';
import type { Knex } from 'knex';

/**
 * For Knex's own command line: `NODE_OPTIONS='--import tsx' npx knex migrate:status`. Migrations run as the owner of
 * the tables; the application's own role never does. Their names are recorded with the extension: none is renamed.
 */
const config: Knex.Config = {
  client: 'pg',
  connection: process.env.DATABASE_OWNER_URL ?? '',
  pool: { min: 0, max: 2 },
  migrations: {
    directory: fileURLToPath(new URL('./db/migrations', import.meta.url)),
    loadExtensions: ['.ts'],
    extension: 'ts',
  },
};

export default config;
