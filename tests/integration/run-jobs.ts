import { runOnce } from 'graphile-worker';
import type { World } from './world';

/**
 * Carries out the jobs that are due now, with the worker's own tasks, until none is left. A job that fails stays and is
 * due again later.
 */
export async function runJobs(world: World): Promise<void> {
  const { tasks } = await import('@/lib/server/jobs/run-worker');
  const { queueLog } = await import('@/lib/server/jobs/queue-log');
  await runOnce({ connectionString: world.database.ownerUrl, taskList: tasks, logger: queueLog });
}

export interface WaitingJob {
  id: string;
  name: string;
  attempts: number;
  lastError: string | null;
}

/** The jobs that are not done yet, oldest first. */
export async function waitingJobs(world: World): Promise<WaitingJob[]> {
  const { rows } = await world.owner.raw<{ rows: WaitingJob[] }>(
    `select j.id::text, t.identifier as name, j.attempts::int, j.last_error as "lastError"
     from graphile_worker._private_jobs j join graphile_worker._private_tasks t on t.id = j.task_id order by j.id`,
  );
  return rows;
}

/** Lets the time pass after which failed jobs are tried again. */
export async function passRetryDelay(world: World): Promise<void> {
  await world.owner.raw(`update graphile_worker._private_jobs set run_at = now() where locked_at is null`);
}
