import type { Cluster } from './cluster.mjs';
export const testSecrets: {
  NEXTAUTH_SECRET: string;
  OWNER_PASSWORD: string;
  APP_PASSWORD: string;
  S3_ACCESS_KEY: string;
  S3_SECRET_KEY: string;
};
export function startTestCluster(): Promise<Cluster>;
