import { AppError } from '@/lib/inspection/app-error';
import { environment } from './environment';

/**
 * A write has to come from our own pages. Browsers send `Origin` with every POST, and it cannot be forged there; it
 * has to be the application's address, or the very host that was asked (a phone reaching the same server by another
 * name).
 * @throws AppError not-allowed
 */
export function requireSameOrigin(request: Request): void {
  const origin = request.headers.get('origin');
  if (origin && URL.canParse(origin)) {
    const { host, origin: spelt } = new URL(origin);
    if (spelt === new URL(environment().APP_URL).origin || host === request.headers.get('host')) return;
  }
  throw new AppError('not-allowed', 'This was sent from somewhere else than this application.');
}
