import { randomBytes } from 'node:crypto';
import { AppError } from '@/lib/inspection/app-error';
import { logger } from './logger';

/** Seconds that a person who tried too often is asked to wait. */
const WAIT_SECONDS = 60;

/**
 * The one place where an error becomes an answer: `{ code, sentence, fields?, detail?, incident? }`. What is not an
 * AppError is logged in full and masked behind an incident id.
 */
export function errorResponse(error: unknown, event: Record<string, unknown>): Response {
  if (error instanceof AppError) {
    logger.info({ event: 'refused', ...event, code: error.code });
    return Response.json(
      {
        code: error.code,
        sentence: error.message,
        ...(error.fields.length > 0 ? { fields: error.fields } : {}),
        ...(error.detail === undefined ? {} : { detail: error.detail }),
      },
      {
        status: error.status,
        headers: error.code === 'too-many' ? { 'Retry-After': String(WAIT_SECONDS) } : {},
      },
    );
  }
  const incident = randomBytes(4).toString('hex');
  logger.error({ event: 'failed', ...event, incident, err: error });
  const masked = new AppError('internal');
  return Response.json({ code: masked.code, sentence: masked.message, incident }, { status: masked.status });
}
