import { createHash, createHmac, timingSafeEqual } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { mkdir, open, readFile, rename, rm, stat, writeFile } from 'node:fs/promises';
import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import path from 'node:path';
import { pipeline } from 'node:stream/promises';
import { Transform } from 'node:stream';

/**
 * A small object store for this machine, spoken to as S3 is: it stands in for the hosted one, so it checks what the
 * hosted one checks (signature, expiry, signed headers, length, origin) and fails where that would fail.
 */
export interface ObjectStoreOptions {
  port: number;
  folder: string;
  accessKey: string;
  secretKey: string;
  /** The only origin whose pages may put and get. */
  origin: string;
}

class StoreError extends Error {
  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
  ) {
    super(message);
  }
}

const sha256 = (data: string) => createHash('sha256').update(data).digest('hex');
const hmac = (key: string | Buffer, data: string) => createHmac('sha256', key).update(data).digest();
const encode = (text: string) =>
  encodeURIComponent(text).replace(/[!'()*]/g, (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`);

interface Claim {
  credential: string;
  signedHeaders: string[];
  signature: string;
  date: string;
  payload: string;
  presigned: boolean;
}

function claimOf(request: IncomingMessage, url: URL): Claim {
  const query = url.searchParams;
  if (query.has('X-Amz-Signature')) {
    const date = query.get('X-Amz-Date') ?? '';
    const start = Date.parse(date.replace(/^(\d{4})(\d\d)(\d\d)T(\d\d)(\d\d)(\d\d)Z$/, '$1-$2-$3T$4:$5:$6Z'));
    if (!(Date.now() <= start + Number(query.get('X-Amz-Expires')) * 1000))
      throw new StoreError(403, 'AccessDenied', 'Request has expired');
    return {
      credential: query.get('X-Amz-Credential') ?? '',
      signedHeaders: (query.get('X-Amz-SignedHeaders') ?? '').split(';'),
      signature: query.get('X-Amz-Signature') ?? '',
      date,
      payload: query.get('X-Amz-Content-Sha256') ?? 'UNSIGNED-PAYLOAD',
      presigned: true,
    };
  }
  const found =
    /^AWS4-HMAC-SHA256 Credential=([^,]+), ?SignedHeaders=([^,]+), ?Signature=([0-9a-f]{64})$/.exec(
      request.headers.authorization ?? '',
    );
  if (!found) throw new StoreError(403, 'AccessDenied', 'No signature');
  const date = String(request.headers['x-amz-date'] ?? '');
  return {
    credential: found[1] ?? '',
    signedHeaders: (found[2] ?? '').split(';'),
    signature: found[3] ?? '',
    date,
    payload: String(request.headers['x-amz-content-sha256'] ?? 'UNSIGNED-PAYLOAD'),
    presigned: false,
  };
}

/** AWS Signature Version 4, recomputed from the request as it arrived. */
function authenticate(request: IncomingMessage, url: URL, options: ObjectStoreOptions): Claim {
  const claim = claimOf(request, url);
  const [accessKey, day = '', region = '', service = ''] = claim.credential.split('/');
  if (accessKey !== options.accessKey) throw new StoreError(403, 'InvalidAccessKeyId', 'No such access key');
  if (!claim.signedHeaders.includes('host'))
    throw new StoreError(403, 'AccessDenied', 'The host is not signed');
  const unsigned = Object.keys(request.headers).find(
    (name) => name.startsWith('x-amz-') && !claim.signedHeaders.includes(name),
  );
  if (unsigned) throw new StoreError(403, 'AccessDenied', `The header ${unsigned} is not signed`);
  const query = [...url.searchParams]
    .filter(([key]) => key !== 'X-Amz-Signature')
    .map(([key, value]) => `${encode(key)}=${encode(value)}`)
    .sort()
    .join('&');
  const headers = claim.signedHeaders
    .map(
      (name) =>
        `${name}:${String(request.headers[name] ?? '')
          .trim()
          .replace(/\s+/g, ' ')}\n`,
    )
    .join('');
  const canonicalPath = url.pathname
    .split('/')
    .map((part) => encode(decodeURIComponent(part)))
    .join('/');
  const canonical = [
    request.method,
    canonicalPath,
    query,
    headers,
    claim.signedHeaders.join(';'),
    claim.payload,
  ].join('\n');
  const scope = `${day}/${region}/${service}/aws4_request`;
  const toSign = ['AWS4-HMAC-SHA256', claim.date, scope, sha256(canonical)].join('\n');
  const key = hmac(hmac(hmac(hmac(`AWS4${options.secretKey}`, day), region), service), 'aws4_request');
  const expected = hmac(key, toSign);
  const given = Buffer.from(claim.signature, 'hex');
  if (given.length !== expected.length || !timingSafeEqual(given, expected)) {
    throw new StoreError(403, 'SignatureDoesNotMatch', 'The signature does not match the request');
  }
  return claim;
}

function fileOf(url: URL, options: ObjectStoreOptions): string {
  const key = decodeURIComponent(url.pathname).slice(1);
  const file = path.resolve(options.folder, key);
  if (!key.includes('/') || key.includes('\0') || !file.startsWith(path.resolve(options.folder) + path.sep)) {
    throw new StoreError(400, 'InvalidURI', 'No such key can be');
  }
  return file;
}

interface Meta {
  contentType: string;
  etag: string;
}

async function metaOf(file: string): Promise<Meta & { size: number; changed: Date }> {
  try {
    const [found, text] = await Promise.all([stat(file), readFile(`${file}.meta`, 'utf8')]);
    return { ...(JSON.parse(text) as Meta), size: found.size, changed: found.mtime };
  } catch {
    throw new StoreError(404, 'NoSuchKey', 'The key does not exist');
  }
}

let written = 0;

async function put(request: IncomingMessage, file: string, claim: Claim): Promise<string> {
  const length = Number(request.headers['content-length']);
  if (!Number.isFinite(length))
    throw new StoreError(411, 'MissingContentLength', 'The length has to be said');
  if (claim.payload.startsWith('STREAMING'))
    throw new StoreError(501, 'NotImplemented', 'Chunked signing is not spoken here');
  await mkdir(path.dirname(file), { recursive: true });
  const temporary = `${file}.${process.pid}.${(written += 1)}.part`;
  const md5 = createHash('md5');
  const digest = createHash('sha256');
  let bytes = 0;
  const measure = new Transform({
    transform(chunk: Buffer, _encoding, done) {
      md5.update(chunk);
      digest.update(chunk);
      bytes += chunk.length;
      done(null, chunk);
    },
  });
  try {
    await pipeline(request, measure, createWriteStream(temporary));
    if (bytes !== length) throw new StoreError(400, 'IncompleteBody', 'Fewer bytes came than were announced');
    if (/^[0-9a-f]{64}$/.test(claim.payload) && digest.digest('hex') !== claim.payload) {
      throw new StoreError(400, 'XAmzContentSHA256Mismatch', 'The body is not the one that was signed');
    }
    const etag = `"${md5.digest('hex')}"`;
    await writeFile(
      `${file}.meta`,
      JSON.stringify({ contentType: request.headers['content-type'] ?? 'application/octet-stream', etag }),
    );
    await rename(temporary, file);
    return etag;
  } catch (error) {
    await rm(temporary, { force: true });
    throw error instanceof StoreError ? error : new StoreError(400, 'IncompleteBody', 'The body was cut');
  }
}

function allowOrigin(request: IncomingMessage, response: ServerResponse, options: ObjectStoreOptions): void {
  if (request.headers.origin !== options.origin) return;
  response.setHeader('Access-Control-Allow-Origin', options.origin);
  response.setHeader('Access-Control-Expose-Headers', 'ETag');
  response.setHeader('Vary', 'Origin');
}

async function serve(
  request: IncomingMessage,
  response: ServerResponse,
  options: ObjectStoreOptions,
): Promise<void> {
  const url = new URL(request.url ?? '/', `http://${request.headers.host ?? 'store'}`);
  allowOrigin(request, response, options);
  if (request.method === 'OPTIONS') {
    if (request.headers.origin !== options.origin)
      throw new StoreError(403, 'AccessForbidden', 'This origin is not allowed');
    response.setHeader('Access-Control-Allow-Methods', 'GET, HEAD, PUT');
    response.setHeader(
      'Access-Control-Allow-Headers',
      String(request.headers['access-control-request-headers'] ?? ''),
    );
    response.setHeader('Access-Control-Max-Age', '600');
    response.writeHead(204).end();
    return;
  }
  if (url.pathname === '/') {
    response.writeHead(200, { 'Content-Type': 'text/plain' }).end('object store\n');
    return;
  }
  const claim = authenticate(request, url, options);
  const file = fileOf(url, options);
  switch (request.method) {
    case 'PUT': {
      const etag = await put(request, file, claim);
      response.writeHead(200, { ETag: etag }).end();
      return;
    }
    case 'GET':
    case 'HEAD': {
      const meta = await metaOf(file);
      // Opened before anything is said: what is deleted meanwhile is read to its end, as the hosted store does.
      const bytes = await open(file).catch(() => {
        throw new StoreError(404, 'NoSuchKey', 'The key does not exist');
      });
      response.writeHead(200, {
        'Content-Type': url.searchParams.get('response-content-type') ?? meta.contentType,
        'Content-Length': meta.size,
        ETag: meta.etag,
        'Last-Modified': meta.changed.toUTCString(),
        'X-Content-Type-Options': 'nosniff',
        'Content-Security-Policy': "sandbox; default-src 'none'",
        'Cross-Origin-Resource-Policy': 'cross-origin',
      });
      if (request.method === 'GET') await pipeline(bytes.createReadStream(), response);
      else await bytes.close().then(() => response.end());
      return;
    }
    case 'DELETE':
      await Promise.all([rm(file, { force: true }), rm(`${file}.meta`, { force: true })]);
      response.writeHead(204).end();
      return;
    default:
      throw new StoreError(405, 'MethodNotAllowed', 'Not spoken here');
  }
}

/** Starts the store and resolves once it listens; port 0 takes a free one. */
export async function startObjectStore(
  options: ObjectStoreOptions,
): Promise<{ server: Server; port: number; stop(): Promise<void> }> {
  await mkdir(options.folder, { recursive: true });
  const server = createServer((request, response) => {
    serve(request, response, options).catch((error: unknown) => {
      // Whoever asked has gone away: there is nobody to answer, and nothing failed here.
      if (error instanceof Error && 'code' in error && error.code === 'ERR_STREAM_PREMATURE_CLOSE') return;
      const known =
        error instanceof StoreError ? error : new StoreError(500, 'InternalError', 'The store failed');
      if (!(error instanceof StoreError)) console.error(error);
      if (response.headersSent) response.destroy();
      else
        response
          .writeHead(known.status, { 'Content-Type': 'application/xml' })
          .end(
            `<?xml version="1.0"?><Error><Code>${known.code}</Code><Message>${known.message}</Message></Error>`,
          );
    });
  });
  await new Promise<void>((resolve, reject) =>
    server.once('error', reject).listen(options.port, '127.0.0.1', () => resolve()),
  );
  const address = server.address();
  return {
    server,
    port: typeof address === 'object' && address ? address.port : options.port,
    stop: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}
