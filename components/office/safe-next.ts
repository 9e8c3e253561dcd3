/**
 * Where to go after signing in: a path of this program, or the start. Anything that a browser could read as another
 * host (two slashes, a backslash, a scheme, control characters) is not followed.
 */
export function safeNext(next: string | null | undefined): string {
  if (!next || next.length > 500 || !next.startsWith('/')) return '/';
  // A tab or a line end inside a path is dropped by browsers, which could make "/\t/host" into "//host".
  if (/[\u0000-\u001f\u007f\\]/.test(next) || next.startsWith('//')) return '/';
  const resolved = new URL(next, 'https://here.invalid');
  if (resolved.host !== 'here.invalid' || resolved.pathname.startsWith('/sign-in')) return '/';
  return resolved.pathname + resolved.search + resolved.hash;
}
