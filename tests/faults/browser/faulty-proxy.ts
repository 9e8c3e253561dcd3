import {
  createServer,
  request as ask,
  type IncomingMessage,
  type Server,
  type ServerResponse,
} from 'node:http';
import type { AddressInfo } from 'node:net';
import { setTimeout as wait } from 'node:timers/promises';
import type { Fault } from '../world/faulty-line';

interface Asked {
  method: string;
  url: URL;
  headers: IncomingMessage['headers'];
  body: Buffer;
}
interface Answered {
  status: number;
  headers: IncomingMessage['headers'];
  body: Buffer;
}

const portal = '<!doctype html><title>Welcome to the harbour network</title>';

/**
 * The line between a real browser and the server: an HTTP proxy that does to requests of the phone's work what it is
 * told to. Pages and scripts always go through.
 */
export class FaultyProxy {
  /** What happens to the next request about people's work. */
  decide: (method: string, path: string) => Fault = () => 'delivered';
  /** Bytes per second in each direction, and a delay of each request, ms. */
  speed: { bytesPerSecond: number; delayMs: number } | null = null;
  /** Changes what a page or a script of the application says, as a new deploy does. */
  rewrite: (path: string, text: string) => string = (_path, text) => text;
  readonly log: string[] = [];
  /** Most pushes that were under way at once. */
  mostPushes = 0;
  readonly #server: Server;
  #pushes = 0;
  #late: (() => Promise<unknown>)[] = [];
  #freeAt = 0;

  private constructor() {
    this.#server = createServer((request, response) => {
      void this.#handle(request, response).catch(() => response.destroy());
    });
    this.#server.on('clientError', (_error, socket) => socket.destroy());
  }

  static async start(): Promise<FaultyProxy> {
    const proxy = new FaultyProxy();
    await new Promise<void>((listening) => proxy.#server.listen(0, '127.0.0.1', listening));
    return proxy;
  }

  get port(): number {
    return (this.#server.address() as AddressInfo).port;
  }

  /** What was under way for longer than anybody waited arrives now. */
  async deliverLate(): Promise<void> {
    for (const deliver of this.#late.splice(0)) await deliver().catch(() => undefined);
  }

  async stop(): Promise<void> {
    this.#server.closeAllConnections();
    await new Promise((closed) => this.#server.close(closed));
  }

  async #handle(request: IncomingMessage, response: ServerResponse): Promise<void> {
    const url = new URL(request.url ?? '');
    const method = request.method ?? 'GET';
    const chunks: Buffer[] = [];
    for await (const chunk of request) chunks.push(chunk as Buffer);
    const asked: Asked = { method, url, headers: request.headers, body: Buffer.concat(chunks) };
    const work = /^\/api\/(sync|photos)\//.test(url.pathname) || method === 'PUT';
    if (!work) return reply(response, await this.#file(asked));

    const push = url.pathname === '/api/sync/push';
    if (push) this.mostPushes = Math.max(this.mostPushes, (this.#pushes += 1));
    try {
      const fault = this.decide(method, url.pathname);
      this.log.push(`${method} ${url.pathname}: ${fault}`);
      await this.#crawl(asked.body.length);
      await this.#meet(fault, asked, response);
    } finally {
      if (push) this.#pushes -= 1;
    }
  }

  /** A page or a script, which may be given out changed. */
  async #file(asked: Asked): Promise<Answered> {
    // Whole, unpacked and whatever the browser has of it already: otherwise there would be nothing to change.
    const {
      'accept-encoding': _packed,
      'if-none-match': _tag,
      'if-modified-since': _since,
      ...headers
    } = asked.headers;
    const answer = await forward({ ...asked, headers });
    if (!/javascript|html/.test(answer.headers['content-type'] ?? '')) return answer;
    const before = answer.body.toString('utf8');
    const after = this.rewrite(asked.url.pathname, before);
    if (after === before) return answer;
    const { etag: _etag, 'last-modified': _modified, 'content-length': _length, ...rest } = answer.headers;
    return { ...answer, headers: rest, body: Buffer.from(after) };
  }

  /** One line for all: what comes later waits until what came before has passed. */
  async #crawl(bytes: number): Promise<void> {
    if (!this.speed) return;
    const now = Date.now();
    this.#freeAt = Math.max(this.#freeAt, now) + ((bytes + 600) / this.speed.bytesPerSecond) * 1000;
    await wait(this.#freeAt - now + this.speed.delayMs);
  }

  async #meet(fault: Fault, asked: Asked, response: ServerResponse): Promise<void> {
    switch (fault) {
      case 'delivered': {
        const answer = await forward(asked);
        await this.#crawl(answer.body.length);
        return reply(response, answer);
      }
      case 'request lost':
        return void response.destroy();
      case 'reply lost':
        await forward(asked);
        return void response.destroy();
      case 'delivered twice at once': {
        const [, second] = await Promise.all([forward(asked), forward(asked)]);
        return reply(response, second);
      }
      case 'delivered late, after the client gave up':
        this.#late.push(() => forward(asked));
        return void response.destroy();
      case 'slower than the time-out':
        await wait(1500);
        return void response.destroy();
      case 'reply cut': {
        const { status, headers, body } = await forward(asked);
        response.writeHead(status, { ...headers, 'content-length': body.length });
        response.write(body.subarray(0, Math.floor(body.length / 2)));
        await wait(20);
        return void response.destroy();
      }
      case 'portal page':
        return reply(response, page(200));
      case 'portal redirect':
        return reply(response, {
          ...page(302),
          headers: { location: 'http://portal.example.test/', 'content-type': 'text/html' },
        });
      case '500':
        return reply(response, json(500));
      case '502':
        return reply(response, page(502));
      case '503':
        return reply(response, json(503, { 'retry-after': '1' }));
      case '429':
        return reply(response, json(429, { 'retry-after': '1' }));
      case '401':
        return reply(response, json(401));
    }
  }
}

const page = (status: number): Answered => ({
  status,
  headers: { 'content-type': 'text/html' },
  body: Buffer.from(portal),
});
const json = (status: number, more: IncomingMessage['headers'] = {}): Answered => ({
  status,
  headers: { 'content-type': 'application/json', ...more },
  body: Buffer.from('{"code":"internal","sentence":"x"}'),
});

function reply(response: ServerResponse, { status, headers, body }: Answered): void {
  response.writeHead(status, { ...headers, 'content-length': body.length });
  response.end(body);
}

/** Asks the server itself, and gives back the whole of its answer. */
function forward({ method, url, headers, body }: Asked): Promise<Answered> {
  return new Promise((answered, failed) => {
    const { 'proxy-connection': _dropped, ...own } = headers;
    const outgoing = ask(url, { method, headers: { ...own, connection: 'close' } }, (incoming) => {
      const chunks: Buffer[] = [];
      incoming.on('data', (chunk: Buffer) => chunks.push(chunk));
      incoming.on('error', failed);
      incoming.on('end', () => {
        const { 'transfer-encoding': _chunked, connection: _closed, ...rest } = incoming.headers;
        answered({ status: incoming.statusCode ?? 502, headers: rest, body: Buffer.concat(chunks) });
      });
    });
    outgoing.on('error', failed);
    outgoing.end(body);
  });
}
