import { readFileSync } from 'node:fs';
import path from 'node:path';
import { NextResponse, type NextRequest } from 'next/server';

/** The header in which a page is handed its own path (lib/server/with-access). */
const PATH_HEADER = 'x-cagewright-path';

let staticHashes: Record<string, string[]> | undefined;

/** Hashes of the inline scripts of static pages, by path; collected after the build. */
function hashesByPath(): Record<string, string[]> {
  if (staticHashes) return staticHashes;
  const file = path.join(process.cwd(), process.env.NEXT_DIST_DIR ?? '.next', 'csp-hashes.json');
  try {
    staticHashes = JSON.parse(readFileSync(file, 'utf8')) as Record<string, string[]>;
  } catch {
    // In development nothing is static.
    staticHashes = {};
  }
  return staticHashes;
}

function policy(scripts: string): string {
  const objects = process.env.S3_ENDPOINT ? new URL(process.env.S3_ENDPOINT).origin : '';
  return [
    "default-src 'self'",
    `script-src ${scripts}`,
    // Styles of React's style attributes; scripts are never inline without a nonce or a hash.
    "style-src 'self' 'unsafe-inline'",
    `img-src 'self' data: blob: ${objects}`.trim(),
    "font-src 'self'",
    `connect-src 'self' ${objects}`.trim(),
    "worker-src 'self' blob:",
    "manifest-src 'self'",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join('; ');
}

/**
 * Gives every page its Content-Security-Policy: static pages by the hashes of their inline scripts, all others by a
 * nonce of this one answer. Scripts of the application's own origin may be loaded; nothing inline runs unnamed.
 */
export function proxy(request: NextRequest): NextResponse {
  const { pathname, search } = request.nextUrl;
  const headers = new Headers(request.headers);
  headers.set(PATH_HEADER, `${pathname}${search}`);

  // All of /field is one static shell.
  const page = pathname.startsWith('/field/') ? '/field' : pathname;
  const hashes = hashesByPath()[page];
  if (hashes) {
    const response = NextResponse.next({ request: { headers } });
    response.headers.set('Content-Security-Policy', policy(["'self'", ...hashes].join(' ')));
    return response;
  }

  const nonce = Buffer.from(crypto.randomUUID()).toString('base64');
  const development = process.env.NODE_ENV === 'development' ? " 'unsafe-eval'" : '';
  const value = policy(`'self' 'nonce-${nonce}' 'strict-dynamic'${development}`);
  // Next.js takes the nonce for its own scripts from this request header.
  headers.set('Content-Security-Policy', value);
  const response = readable(pathname)
    ? NextResponse.next({ request: { headers } })
    : NextResponse.rewrite(new URL('/missing', request.url), { request: { headers } });
  response.headers.set('Content-Security-Policy', value);
  return response;
}

/** An address whose percent signs spell nothing would be an error of the server instead of a page that is not there. */
function readable(pathname: string): boolean {
  try {
    decodeURIComponent(pathname);
    return true;
  } catch {
    return false;
  }
}

/** Pages only: the API answers JSON and sets its own headers, and files need no policy. */
export const config = {
  matcher: [
    '/((?!api/|_next/static|_next/image|vendor/|fonts/|icons/|sw\\.js|.*\\.(?:png|svg|ico|webmanifest|woff2|js)$).*)',
  ],
};
