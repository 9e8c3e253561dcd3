import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { Cluster } from './cluster.mjs';
import { dataFolder } from './folders.mjs';
import { ensurePostgres } from './installed.mjs';
import { freePort } from './ports.mjs';

/** Passwords of the throwaway cluster: it holds nothing but what tests make up. */
export const testSecrets = {
  NEXTAUTH_SECRET: 'a-secret-for-tests-only',
  OWNER_PASSWORD: 'owner-for-tests-only',
  APP_PASSWORD: 'app-for-tests-only',
  S3_ACCESS_KEY: 'tests-only',
  S3_SECRET_KEY: 'tests-only-secret',
};

/** The cluster of the tests, running: fast and forgetful, apart from the one that keeps people's work. */
export async function startTestCluster() {
  const folder = path.join(dataFolder, 'test-postgres');
  const portFile = path.join(dataFolder, 'test-postgres.port');
  mkdirSync(dataFolder, { recursive: true });
  const options = { binaries: ensurePostgres(), folder, password: 'postgres-for-tests-only', durable: false };
  if (existsSync(portFile)) {
    const cluster = new Cluster({ ...options, port: Number(readFileSync(portFile, 'utf8')) });
    if (cluster.isRunning()) return cluster;
  }
  const cluster = new Cluster({ ...options, port: await freePort() });
  cluster.start();
  writeFileSync(portFile, String(cluster.options.port));
  return cluster;
}
