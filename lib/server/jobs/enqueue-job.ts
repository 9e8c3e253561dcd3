import type { Tx } from '@/db/connection';

export type JobName = 'mail' | 'verify-photo' | 'expire-releases' | 'certificate';

/** What a mail is about; the job reads the rest from the record when it runs. */
export interface MailPayload extends Record<string, unknown> {
  kind: 'hold' | 'disposition-asked' | 'decided' | 'released' | 'void';
  projectId: string;
  pourId: string;
  entryId: string;
}

/** Adds a job to the queue in this very transaction: undone with it, run only once it is committed. */
export async function enqueueJob(tx: Tx, name: JobName, payload: Record<string, unknown>): Promise<void> {
  await tx.raw('select app_add_job(?, ?)', [name, JSON.stringify(payload)]);
}
