import path from 'node:path';
import { startMailSink } from './mail-sink';
import { startObjectStore } from './object-store';

/** Runs the object store and the mail sink of this machine until it is told to end. */
const wanted = (key: string): string => {
  const value = process.env[key];
  if (!value) throw new Error(`${key} is not set; "npm start" sets it.`);
  return value;
};
const folder = wanted('LOCAL_SERVICES_FOLDER');
const store = await startObjectStore({
  port: Number(wanted('OBJECTS_PORT')),
  folder: path.join(folder, 'objects'),
  accessKey: wanted('S3_ACCESS_KEY'),
  secretKey: wanted('S3_SECRET_KEY'),
  origin: new URL(wanted('APP_URL')).origin,
});
const mail = await startMailSink({
  smtpPort: Number(wanted('SMTP_PORT')),
  webPort: Number(wanted('MAIL_WEB_PORT')),
  folder: path.join(folder, 'mail'),
});
const end = () => void Promise.all([store.stop(), mail.stop()]).then(() => process.exit(0));
process.on('SIGTERM', end);
process.on('SIGINT', end);
