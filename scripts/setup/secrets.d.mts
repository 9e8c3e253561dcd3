import type { Cluster } from './cluster.mjs';
export function environmentFor(of: {
  secrets: {
    NEXTAUTH_SECRET: string;
    OWNER_PASSWORD: string;
    APP_PASSWORD: string;
    S3_ACCESS_KEY: string;
    S3_SECRET_KEY: string;
  };
  cluster: Cluster;
  database: string;
  ports: { app: number; objects: number; smtp: number; mail: number };
}): NodeJS.ProcessEnv;
