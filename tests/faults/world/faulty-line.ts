import { pick } from './seeded';
import type { Clock, Line } from './phone';

const json = (status: number, body: unknown, headers: Record<string, string> = {}) =>
  new Response(JSON.stringify(body), {
    status,
    headers: { 'content-type': 'application/json', ...headers },
  });
const html = (status: number) =>
  new Response('<!doctype html><title>Welcome to the harbour network</title>', {
    status,
    headers: { 'content-type': 'text/html' },
  });

/** What may happen to a request, and how often where a seed decides. */
export const faults = [
  [30, 'delivered'],
  [8, 'request lost'],
  [10, 'reply lost'],
  [8, 'delivered twice at once'],
  [6, 'delivered late, after the client gave up'],
  [5, 'slower than the time-out'],
  [5, 'reply cut'],
  [3, 'portal page'],
  [3, 'portal redirect'],
  [3, '500'],
  [3, '502'],
  [3, '503'],
  [3, '429'],
  [2, '401'],
] as const;
export type Fault = (typeof faults)[number][1];

/** A line on which a seed decides what happens to each request. What arrives late arrives when `deliverLate` is called. */
export class FaultyLine {
  calm = false;
  readonly log: string[] = [];
  #late: (() => Promise<unknown>)[] = [];

  constructor(
    private readonly straight: Line,
    private readonly random: () => number,
    private readonly clock: Clock,
  ) {}

  readonly line: Line = async (address, init) => {
    const fault: Fault = this.calm ? 'delivered' : pick(this.random, faults);
    this.log.push(`${init.method} ${address}: ${fault}`);
    switch (fault) {
      case 'delivered':
        return this.straight(address, init);
      case 'request lost':
        throw new TypeError('request lost');
      case 'reply lost':
        await this.straight(address, init);
        throw new TypeError('reply lost');
      case 'delivered twice at once': {
        const [, second] = await Promise.all([this.straight(address, init), this.straight(address, init)]);
        return second;
      }
      case 'delivered late, after the client gave up':
        this.#late.push(() => this.straight(address, init));
        throw new TypeError('given up');
      case 'slower than the time-out':
        return new Promise((_answer, fail) => {
          const abort = () => fail(new Error('aborted'));
          // Another phone's wait may have moved the time past this one's before the request went out.
          if (init.signal?.aborted) abort();
          else init.signal?.addEventListener('abort', abort);
          // Photos get more time than that by their size; nothing gets more than this.
          setImmediate(() => this.clock.advance(200_000));
        });
      case 'reply cut': {
        const text = await (await this.straight(address, init)).text();
        return new Response(text.slice(0, Math.floor(text.length * this.random())), {
          headers: { 'content-type': 'application/json' },
        });
      }
      case 'portal page':
        return html(200);
      case 'portal redirect':
        return new Response(null, { status: 302, headers: { location: 'http://portal.example.test/' } });
      case '500':
        return json(500, { code: 'internal', sentence: 'Something went wrong on the server.' });
      case '502':
        return html(502);
      case '503':
        return json(503, {}, { 'retry-after': '5' });
      case '429':
        return json(429, {}, { 'retry-after': '3' });
      case '401':
        return json(401, { code: 'sign-in-needed', sentence: 'Sign in to go on.' });
    }
  };

  /** What was under way for longer than anybody waited arrives now. */
  async deliverLate(): Promise<void> {
    for (const deliver of this.#late.splice(0)) await deliver();
  }
}
