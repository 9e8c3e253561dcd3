import type { Clock, Line } from './phone';

const json = (status: number, body: unknown, headers: Record<string, string> = {}) =>
  new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json', ...headers } });
const page = (status: number) =>
  new Response('<!doctype html><title>Welcome to the harbour network</title>', {
    status,
    headers: { 'content-type': 'text/html' },
  });

interface Network {
  line: (clock: Clock) => Line;
  /** Something comes back at all. */
  answers: boolean;
  phase: string;
  says: RegExp;
}
const answering = (make: () => Response, phase: string, says: RegExp): Network => ({
  line: () => async () => make(),
  answers: true,
  phase,
  says,
});

/** What comes back in place of the server's answer, and what the person is told then. */
export const answersOfANetwork: Record<string, Network> = {
  'nothing at all': {
    line: () => () => Promise.reject(new TypeError('Failed to fetch')),
    answers: false,
    phase: 'offline',
    says: /no connection/,
  },
  'too late': {
    line: (clock) => {
      // Each wait lets other things fall due, which ask again: a few waits are enough.
      let waits = 3;
      return (_address, init) =>
        new Promise((_answer, fail) => {
          waits -= 1;
          if (waits < 0) return fail(new TypeError('Failed to fetch'));
          init.signal?.addEventListener('abort', () => fail(new Error('aborted')));
          setImmediate(() => clock.advance(100_000));
        });
    },
    answers: false,
    phase: 'server-trouble',
    says: /did not answer in time/,
  },
  'half an answer': answering(
    () => new Response('{"serverTime":"20', { headers: { 'content-type': 'application/json' } }),
    'strange-network',
    /answers in place/,
  ),
  'a page of its own': answering(() => page(200), 'strange-network', /sign-in page/),
  'a redirect': answering(
    () => new Response(null, { status: 302, headers: { location: 'http://portal.example.test/' } }),
    'strange-network',
    /sign-in page/,
  ),
  '511': answering(() => page(511), 'strange-network', /sign-in page/),
  '401 with a page': answering(() => page(401), 'strange-network', /sign-in page/),
  '401': answering(
    () => json(401, { code: 'sign-in-needed', sentence: 'Sign in to go on.' }),
    'sign-in-needed',
    /Sign in to send/,
  ),
  '500': answering(
    () => json(500, { code: 'internal', sentence: 'Something went wrong.' }),
    'server-trouble',
    /had a fault/,
  ),
  '502': answering(() => page(502), 'server-trouble', /had a fault/),
  '503': answering(() => page(503), 'server-trouble', /not ready/),
  '503 with Retry-After': answering(
    () => json(503, {}, { 'retry-after': '90' }),
    'server-trouble',
    /not ready/,
  ),
  '429 with Retry-After': answering(
    () => json(429, {}, { 'retry-after': '90' }),
    'server-trouble',
    /asks to wait/,
  ),
  'JSON of another shape': answering(
    () => json(200, { hello: 'world' }),
    'server-trouble',
    /does not understand/,
  ),
};
