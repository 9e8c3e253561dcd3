import { AppError } from '@/lib/inspection/app-error';

/** Keyset paging: the sort key of the last row shown, as one opaque string that fits a query parameter. */
export function writeCursor(parts: readonly (string | number)[]): string {
  return Buffer.from(JSON.stringify(parts)).toString('base64url');
}

/** @throws AppError invalid when the cursor was not made by `writeCursor` with as many parts */
export function readCursor(cursor: string, parts: number): (string | number)[] {
  try {
    const read: unknown = JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'));
    if (Array.isArray(read) && read.length === parts && read.every(isPart)) return read;
  } catch {
    // Falls through: what cannot be read was not made here.
  }
  throw new AppError('invalid', 'This page of the list cannot be found. Start again from its beginning.');
}

const isPart = (part: unknown): part is string | number =>
  typeof part === 'string' || typeof part === 'number';
