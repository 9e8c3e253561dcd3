import type { z } from 'zod';

/** Keyset paging: the sort key of the last row shown, as one opaque string that fits a query parameter. */
export function writeCursor(parts: readonly (string | number)[]): string {
  return Buffer.from(JSON.stringify(parts)).toString('base64url');
}

/**
 * @param key the shape of the list's own sort key
 * @returns the key; null for a cursor that this list did not make: the list then begins at its beginning
 */
export function readCursor<T>(cursor: string, key: z.ZodType<T>): T | null {
  let read: unknown;
  try {
    read = JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'));
  } catch {
    return null;
  }
  const parsed = key.safeParse(read);
  return parsed.success ? parsed.data : null;
}
