import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { root } from './folders.mjs';

const file = path.join(root, '.env.local');
const secret = () => randomBytes(24).toString('base64url');

/** The secrets of this installation, made once and kept in a file that git ignores. What is there is never changed. */
export function localSecrets() {
  const text = existsSync(file) ? readFileSync(file, 'utf8') : '';
  const known = Object.fromEntries(
    text
      .split('\n')
      .map((line) => /^([A-Z0-9_]+)=(.*)$/.exec(line.trim()))
      .filter(Boolean)
      .map(([, key, value]) => [key, value]),
  );
  const wanted = [
    'NEXTAUTH_SECRET',
    'POSTGRES_PASSWORD',
    'OWNER_PASSWORD',
    'APP_PASSWORD',
    'S3_ACCESS_KEY',
    'S3_SECRET_KEY',
  ];
  const missing = wanted.filter((key) => !known[key]);
  for (const key of missing) known[key] = secret();
  if (missing.length > 0) {
    const added = missing.map((key) => `${key}=${known[key]}`).join('\n');
    writeFileSync(file, `${text}${text && !text.endsWith('\n') ? '\n' : ''}${added}\n`, { mode: 0o600 });
  }
  return known;
}

/** What somebody may set to use hosted services, or addresses that a phone can reach, in place of this machine's own. */
const hosted = [
  'S3_ENDPOINT',
  'S3_REGION',
  'S3_BUCKET',
  'S3_ACCESS_KEY',
  'S3_SECRET_KEY',
  'SMTP_URL',
  'MAIL_FROM',
];

/**
 * The environment of the application and its companions, from the secrets and the ports in use. `given` may name
 * hosted services; without it, everything is this machine's own.
 */
export function environmentFor({ secrets, cluster, database, ports, host = '127.0.0.1', given = {} }) {
  const appUrl = process.env.APP_URL ?? `http://localhost:${ports.app}`;
  const chosen = Object.fromEntries(hosted.filter((key) => given[key]).map((key) => [key, given[key]]));
  return {
    ...process.env,
    OBJECTS_PORT: String(ports.objects),
    SMTP_PORT: String(ports.smtp),
    NEXT_TELEMETRY_DISABLED: '1',
    // Node 20 serves it until 2027; the notice is for us, not for whoever starts the product.
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
    APP_URL: appUrl,
    NEXTAUTH_URL: appUrl,
    NEXTAUTH_SECRET: secrets.NEXTAUTH_SECRET,
    DATABASE_URL: cluster.url(database, 'cagewright_app', secrets.APP_PASSWORD),
    DATABASE_OWNER_URL: cluster.url(database, 'cagewright_owner', secrets.OWNER_PASSWORD),
    S3_ENDPOINT: `http://localhost:${ports.objects}`,
    S3_REGION: 'local',
    S3_BUCKET: 'cagewright',
    S3_ACCESS_KEY: secrets.S3_ACCESS_KEY,
    S3_SECRET_KEY: secrets.S3_SECRET_KEY,
    SMTP_URL: `smtp://${host}:${ports.smtp}`,
    MAIL_FROM: 'Cagewright <cagewright@example.test>',
    ...chosen,
  };
}
