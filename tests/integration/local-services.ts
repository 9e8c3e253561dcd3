import { mkdtemp, rm } from 'node:fs/promises';
import os from 'node:os';
import path from 'node:path';
import { startMailSink, type KeptMail } from '../../scripts/mail-sink';
import { startObjectStore } from '../../scripts/object-store';
import { testSecrets } from '../../scripts/setup/test-cluster.mjs';
import { APP_ORIGIN } from './world';

/** The object store and the mail sink of this machine, running for one file of tests, with a folder of their own. */
export interface LocalServices {
  /** Where the store keeps its files. */
  objectsFolder: string;
  objectsUrl: string;
  smtpPort: number;
  /** What the application has to be told to find them. */
  env: Record<string, string>;
  /** Everything that was mailed, oldest first. */
  mails(): Promise<KeptMail[]>;
  /** Ends the mail sink; what it gives back starts it again on the same ports. */
  mailDown(): Promise<() => Promise<void>>;
  stop(): Promise<void>;
}

export async function startLocalServices(): Promise<LocalServices> {
  const folder = await mkdtemp(path.join(os.tmpdir(), 'cagewright-tests-'));
  const objectsFolder = path.join(folder, 'objects');
  const store = await startObjectStore({
    port: 0,
    folder: objectsFolder,
    accessKey: testSecrets.S3_ACCESS_KEY,
    secretKey: testSecrets.S3_SECRET_KEY,
    origin: APP_ORIGIN,
  });
  const mailFolder = path.join(folder, 'mail');
  let sink = await startMailSink({ smtpPort: 0, webPort: 0, folder: mailFolder });
  const { smtpPort, webPort } = sink;
  const objectsUrl = `http://127.0.0.1:${store.port}`;
  return {
    objectsFolder,
    objectsUrl,
    smtpPort,
    env: {
      S3_ENDPOINT: objectsUrl,
      SMTP_URL: `smtp://127.0.0.1:${smtpPort}`,
      AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
    },
    mails: async () => {
      const answer = await fetch(`http://127.0.0.1:${webPort}/messages.json`);
      return ((await answer.json()) as KeptMail[]).reverse();
    },
    mailDown: async () => {
      await sink.stop();
      return async () => {
        sink = await startMailSink({ smtpPort, webPort, folder: mailFolder });
      };
    },
    stop: async () => {
      await Promise.all([store.stop(), sink.stop()]);
      await rm(folder, { recursive: true, force: true });
    },
  };
}
