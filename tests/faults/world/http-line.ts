import type { Line } from './phone';

/** A straight line to a running server, in the session that the cookie stands for. */
export const httpLine =
  (app: string, cookie: string): Line =>
  (address, init) =>
    fetch(new URL(address, app), {
      ...init,
      headers: { ...Object.fromEntries(new Headers(init.headers)), cookie, origin: app },
    });
