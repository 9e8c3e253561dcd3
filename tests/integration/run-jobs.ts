import { runOnce } from 'graphile-worker';
import pg from 'pg';
import { vi } from 'vitest';
import type { World } from './world';

/**
 * Carries out the jobs that are due now, with the worker's own tasks, until none is left. A job that fails stays and is
 * due again later.
 */
export async function runJobs(world: World): Promise<void> {
  const { tasks } = await import('@/lib/server/jobs/run-worker');
  const { queueLog } = await import('@/lib/server/jobs/queue-log');
  const pgPool = new pg.Pool({ connectionString: world.database.ownerUrl, max: 4 });
  pgPool.on('error', () => undefined);
  pgPool.on('connect', (client) => client.on('error', () => undefined));
  try {
    await runOnce({ pgPool, taskList: tasks, logger: queueLog, noHandleSignals: true });
    // The queue notes how a job ended without waiting for it.
    await vi.waitFor(async () => {
      const { rowCount } = await pgPool.query(
        'select from graphile_worker._private_jobs where locked_at is not null',
      );
      if (rowCount) throw new Error(`${rowCount} jobs are not noted as ended`);
    }, 10_000);
  } finally {
    await pgPool.end();
  }
}

export interface WaitingJob {
  id: string;
  name: string;
  attempts: number;
  lastError: string | null;
  /** It has failed, and is due some time after that. */
  triedLater: boolean;
}

/** The jobs that are not done yet, oldest first. */
export async function waitingJobs(world: World): Promise<WaitingJob[]> {
  const { rows } = await world.owner.raw<{ rows: WaitingJob[] }>(
    `select j.id::text, t.identifier as name, j.attempts::int, j.last_error as "lastError",
       j.attempts > 0 and j.run_at > j.updated_at as "triedLater"
     from graphile_worker._private_jobs j join graphile_worker._private_tasks t on t.id = j.task_id order by j.id`,
  );
  return rows;
}

/** Lets the time pass after which failed jobs are tried again. */
export async function passRetryDelay(world: World): Promise<void> {
  await world.owner.raw(`update graphile_worker._private_jobs set run_at = now() where locked_at is null`);
}
