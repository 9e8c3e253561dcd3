import type { Tx } from '@/db/connection';

export type JobName = 'mail' | 'verify-photo' | 'expire-releases' | 'certificate';

/** What a mail is about; the job reads the rest from the record when it runs. */
export interface MailPayload extends Record<string, unknown> {
  kind: 'hold' | 'disposition-asked' | 'decided' | 'released' | 'void';
  projectId: string;
  pourId: string;
  entryId: string;
  /** The one person whom this job tells; without, the job finds everybody who is to be told and adds one for each. */
  personId?: string | undefined;
}

/**
 * Adds a job to the queue in this very transaction: undone with it, run only once it is committed.
 * @param key a job of the same key that waits already is replaced by this one
 */
export async function enqueueJob(
  tx: Tx,
  name: JobName,
  payload: Record<string, unknown>,
  key: string | null = null,
): Promise<void> {
  await tx.raw('select app_add_job(?, ?, null, ?)', [name, JSON.stringify(payload), key]);
}
