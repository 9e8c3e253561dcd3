import pino from 'pino';

/** One line of JSON per event. What might carry a secret is left out even when it is passed by mistake. */
export const logger = pino({
  level: process.env.LOG_LEVEL ?? 'info',
  base: undefined,
  timestamp: pino.stdTimeFunctions.isoTime,
  redact: {
    paths: [
      'password',
      '*.password',
      'token',
      '*.token',
      'cookie',
      '*.cookie',
      'authorization',
      '*.authorization',
    ],
    remove: true,
  },
});
