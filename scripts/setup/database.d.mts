import type { Cluster } from './cluster.mjs';
export function prepareDatabase(
  cluster: Cluster,
  database: string,
  secrets: { OWNER_PASSWORD: string; APP_PASSWORD: string },
): Promise<void>;
export function migrate(ownerUrl: string): void;
