import { Logger } from 'graphile-worker';
import { logger } from '../logger';

const levels = { error: 'error', warning: 'warn', info: 'debug', debug: 'debug' } as const;

/** The queue's own messages as lines of the application's log; its chatter only where `debug` is asked for. */
export const queueLog = new Logger((scope) => (level, message) => {
  logger[levels[level]]({ event: 'queue', job: scope.taskIdentifier, id: scope.jobId, message });
});
