import pg from 'pg';
import type { TestProject } from 'vitest/node';
import { prepareDatabase } from '../../scripts/setup/database.mjs';
import { startTestCluster, testSecrets } from '../../scripts/setup/test-cluster.mjs';
import { TEMPLATE } from './template-name';

declare module 'vitest' {
  interface ProvidedContext {
    postgres: { port: number; adminUrl: string };
  }
}

/** One throwaway PostgreSQL for all files, with one migrated template that each file's own database is copied from. */
export default async function setup(project: TestProject): Promise<() => void> {
  const cluster = await startTestCluster();
  const client = new pg.Client({ connectionString: cluster.url('postgres') });
  await client.connect();
  await client.query(`drop database if exists ${TEMPLATE} with (force)`);
  await client.end();
  await prepareDatabase(cluster, TEMPLATE, testSecrets);
  project.provide('postgres', { port: cluster.options.port, adminUrl: cluster.url('postgres') });
  // Left running between runs by hand; "npm test" stops it at the end.
  return () => undefined;
}
