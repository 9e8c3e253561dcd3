import { parseCronItems, run, type Task, type TaskList } from 'graphile-worker';
import { z } from 'zod';
import { recordId } from '@/lib/inspection/primitives';
import { releasesDue } from '@/db/stores/release-store';
import { enterProject } from '@/db/stores/session-store';
import { closeDatabase, database } from '@/db/connection';
import { logger } from '../logger';
import { sendEventMail } from '../mail/send-event-mail';
import { writeCertificate } from '../pdf/write-certificate';
import { verifyPhoto } from '../photos/verify-photo';
import { expireReleases } from '../void-releases';
import { queueLog } from './queue-log';

const mailPayload = z.object({
  kind: z.enum(['hold', 'disposition-asked', 'decided', 'released', 'void']),
  projectId: recordId,
  pourId: recordId,
  entryId: recordId,
  personId: recordId.optional(),
});
const photoPayload = z.object({ projectId: recordId, photoId: recordId });
const certificatePayload = z.object({ projectId: recordId, pourId: recordId, entryId: recordId });

const now = () => new Date().toISOString();

/** A task that says what became of it, a line each; a thrown error is logged and the job is tried again later. */
function told(name: string, work: (payload: unknown) => Promise<unknown>): Task {
  return async (payload, helpers) => {
    const started = performance.now();
    try {
      const result = await work(payload);
      logger.info({
        event: 'job done',
        job: name,
        id: helpers.job.id,
        result,
        ms: Math.round(performance.now() - started),
      });
    } catch (error) {
      logger.error({
        event: 'job failed',
        job: name,
        id: helpers.job.id,
        attempt: helpers.job.attempts,
        error: String(error),
      });
      throw error;
    }
  };
}

/**
 * Writes the voids of all releases whose validity is over. A pour that cannot be read keeps none of the others back.
 * @returns how many entries were written
 * @throws Error naming the pours that could not, once all were tried
 */
async function expireDueReleases(at: string): Promise<number> {
  const due = await database().transaction((tx) => releasesDue(tx, at));
  const errors: string[] = [];
  let written = 0;
  for (const { projectId, pourId } of due) {
    try {
      written += await database().transaction(async (tx) => {
        await enterProject(tx, projectId);
        return expireReleases(tx, { id: pourId, projectId }, at);
      });
    } catch (error) {
      errors.push(`${pourId}: ${String(error)}`);
    }
  }
  if (errors.length > 0) throw new Error(`Some releases could not be expired: ${errors.join('; ')}`);
  return written;
}

export const tasks: TaskList = {
  mail: told('mail', (payload) => sendEventMail(mailPayload.parse(payload), now())),
  'verify-photo': told('verify-photo', (payload) => {
    const { projectId, photoId } = photoPayload.parse(payload);
    return verifyPhoto(projectId, photoId, now);
  }),
  'expire-releases': told('expire-releases', () => expireDueReleases(now())),
  certificate: told('certificate', (payload) => writeCertificate(certificatePayload.parse(payload))),
};

/**
 * Carries out jobs until it is told to end. The queue belongs to the owner of the tables, so the worker reads it as
 * the owner; what a job does to people's data it does in the application's role, one project at a time.
 */
export async function runWorker(): Promise<void> {
  const connectionString = process.env.DATABASE_OWNER_URL;
  if (!connectionString) throw new Error('DATABASE_OWNER_URL is not set; "npm start" sets it.');
  const runner = await run({
    connectionString,
    concurrency: 2,
    pollInterval: 2000,
    taskList: tasks,
    logger: queueLog,
    parsedCronItems: parseCronItems([{ task: 'expire-releases', match: '*/2 * * * *' }]),
  });
  logger.info({ event: 'worker started' });
  await runner.promise;
  await closeDatabase();
}
