import type { SyncPhase } from '../device-types';
import type { DeviceEnvironment } from '../device-environment';
import { loadSchemas } from '../load-schemas';
import type { AnswerName, AnswerOf } from '../record-schemas';
import { jsonBody } from './gzip';

/** A request that was not answered as the protocol says. Nothing is taken out of the outbox for it. */
export interface Trouble {
  kind: 'trouble';
  phase: Extract<SyncPhase, 'offline' | 'sign-in-needed' | 'server-trouble' | 'strange-network'>;
  /** The answer was about this request and not about the line: trying it again unchanged is of no use now. */
  aboutRequest: boolean;
  status: number | null;
  /** What is going on, in a sentence; what was kept is added where it is known. */
  sentence: string;
  retryAfterMs: number | null;
}

export interface Answered<T> {
  kind: 'answered';
  data: T;
  /** The server's clock minus the device's in ms, when the answer carries its time and came quickly. */
  clockOffsetMs: number | null;
}

export type Answer<T> = Answered<T> | Trouble;

const LONGEST_WAIT_MS = 10 * 60_000;
/** Slower answers say too little about the other clock. */
const QUICK_ANSWER_MS = 10_000;

/**
 * Asks the server, and sorts every way in which it may not answer. (SPEC 12 to 17)
 * @param name which answer is a good one; an answer of another shape is trouble
 */
export async function askServer<N extends AnswerName>(
  env: Pick<DeviceEnvironment, 'fetch' | 'now' | 'after'>,
  request: { method: 'GET' | 'POST'; path: string; json?: unknown; timeoutMs?: number },
  name: N,
): Promise<Answer<AnswerOf<N>>> {
  const stop = new AbortController();
  const stopTimer = env.after(request.timeoutMs ?? 30_000, () => stop.abort());
  const started = env.now();
  try {
    const { readAnswer } = await loadSchemas();
    const { body, headers } =
      request.json === undefined ? { body: null, headers: {} } : await jsonBody(request.json);
    const response = await env.fetch(request.path, {
      method: request.method,
      headers: { accept: 'application/json', ...headers },
      body,
      // A captive portal redirects; following it would take its page for our answer.
      redirect: 'manual',
      credentials: 'same-origin',
      cache: 'no-store',
      signal: stop.signal,
    });
    const text = await response.text();
    return read(response, text, (json) => readAnswer(name, json), { started, ended: env.now() });
  } catch {
    return stop.signal.aborted
      ? trouble('server-trouble', 'The server did not answer in time.')
      : trouble('offline', 'There is no connection to the server.');
  } finally {
    stopTimer();
  }
}

function read<T>(
  response: Response,
  text: string,
  readAnswer: (json: unknown) => T | null,
  times: { started: number; ended: number },
): Answer<T> {
  const { status } = response;
  const json = isJson(response) ? parsed(text) : undefined;
  if (response.type === 'opaqueredirect' || (status >= 300 && status < 400) || status === 511)
    return strange(status);
  if (status === 401)
    return json === undefined ? strange(status) : trouble('sign-in-needed', 'Sign in to send.', { status });
  if (status === 429 || status >= 500) {
    const retryAfterMs = retryAfter(response.headers.get('retry-after'), times.ended);
    const sentence =
      status === 429
        ? 'The server asks to wait a little.'
        : status === 503
          ? 'The server is not ready at the moment.'
          : 'The server had a fault.';
    return trouble('server-trouble', sentence, { status, retryAfterMs });
  }
  if (json === undefined) return strange(status);
  if (!response.ok) {
    return trouble('server-trouble', sentenceOf(json) ?? 'The server did not take this.', {
      status,
      aboutRequest: true,
    });
  }
  const data = readAnswer(json);
  if (data === null) {
    return trouble(
      'server-trouble',
      'The server answered in a way that this version does not understand. Look for an update.',
      { status },
    );
  }
  return { kind: 'answered', data, clockOffsetMs: clockOffset(json, times) };
}

function trouble(
  phase: Trouble['phase'],
  sentence: string,
  more: Partial<Pick<Trouble, 'status' | 'retryAfterMs' | 'aboutRequest'>> = {},
): Trouble {
  return {
    kind: 'trouble',
    phase,
    sentence,
    status: more.status ?? null,
    retryAfterMs: more.retryAfterMs ?? null,
    aboutRequest: more.aboutRequest ?? false,
  };
}

const strange = (status: number): Trouble =>
  trouble(
    'strange-network',
    'Something on this network answers in place of the server, a sign-in page perhaps. Open any web page to see it.',
    { status },
  );

const isJson = (response: Response): boolean =>
  /^application\/(problem\+)?json\b/i.test(response.headers.get('content-type') ?? '');

function parsed(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch {
    return undefined;
  }
}

function sentenceOf(json: unknown): string | null {
  return json !== null && typeof json === 'object' && 'sentence' in json && typeof json.sentence === 'string'
    ? json.sentence
    : null;
}

/** Seconds or a date (RFC 9110, 10.2.3), as milliseconds from now; null when there is none or it cannot be read. */
function retryAfter(header: string | null, now: number): number | null {
  if (header === null) return null;
  const milliseconds = /^\d+$/.test(header.trim()) ? Number(header) * 1000 : Date.parse(header) - now;
  return Number.isFinite(milliseconds) ? Math.min(Math.max(milliseconds, 0), LONGEST_WAIT_MS) : null;
}

function clockOffset(json: unknown, times: { started: number; ended: number }): number | null {
  const took = times.ended - times.started;
  if (took < 0 || took > QUICK_ANSWER_MS) return null;
  if (json === null || typeof json !== 'object' || !('serverTime' in json)) return null;
  const server = typeof json.serverTime === 'string' ? Date.parse(json.serverTime) : Number.NaN;
  return Number.isFinite(server) ? Math.round(server - (times.started + took / 2)) : null;
}
