import { z } from 'zod';
import type { EntryType } from '@/lib/inspection/entry';
import { recordId } from '@/lib/inspection/primitives';
import type { RecordLine } from './record-lines';

/** Parts of a record that can be looked at by themselves. */
export const recordParts = {
  readings: { label: 'Readings and measurements', types: ['reading', 'measurement', 'amendment'] },
  checks: { label: 'Checks', types: ['answer', 'last-walk', 'amendment'] },
  photos: { label: 'Photos', types: ['photo', 'photo-stored', 'photo-refused'] },
  decisions: {
    label: 'Nonconformances and decisions',
    types: ['nonconformance', 'correction', 'recheck', 'disposition', 'condition-verified'],
  },
  questions: {
    label: 'Holds, queries and notes',
    types: ['hold', 'hold-lifted', 'query', 'query-answered', 'note', 'verbal-instruction'],
  },
  releases: {
    label: 'Signatures, releases and placing',
    types: [
      'signature',
      'signature-confirmed',
      'release-asked',
      'release',
      'release-refused',
      'release-void',
      'placement',
      'placing-without-release',
      'site-event',
      'inspection-asked',
    ],
  },
  plan: {
    label: 'Plan and project',
    types: [
      'plan-issued',
      'block-check',
      'instrument-status',
      'drawing-received',
      'mix-changed',
      'rules-changed',
      'member-changed',
    ],
  },
} as const satisfies Record<string, { label: string; types: readonly EntryType[] }>;
export type RecordPart = keyof typeof recordParts;

const partNames = Object.keys(recordParts) as [RecordPart, ...RecordPart[]];

/** What the address of a record says; what it does not know is left out rather than refused. */
export const recordQuery = z.object({
  part: z.enum(partNames).optional().catch(undefined),
  before: z.coerce.number().int().positive().optional().catch(undefined),
  entry: recordId.optional().catch(undefined),
});
export type RecordQuery = z.infer<typeof recordQuery>;

const PAGE = 50;

/**
 * One page of a record, newest first; where an entry is asked for, the page of the whole record that it stands on.
 * @param lines every line, oldest first
 * @returns the lines, and the number that an earlier page starts below, or null on the last
 */
export function recordPage(
  lines: readonly RecordLine[],
  query: RecordQuery,
  size = PAGE,
): { lines: RecordLine[]; earlier: number | null; total: number } {
  const at = lines.findIndex((line) => line.id === query.entry);
  const types: readonly string[] | null = query.part && at < 0 ? recordParts[query.part].types : null;
  const wanted = lines.filter((line) => types === null || types.includes(line.type));
  const { before } = query;
  const newer = at < 0 ? 0 : Math.floor((lines.length - 1 - at) / size) * size;
  const from =
    at < 0 && before !== undefined
      ? wanted.filter((line) => line.seq !== null && line.seq < before)
      : wanted.slice(0, wanted.length - newer);
  const page = from.slice(-size).reverse();
  const last = page.at(-1)?.seq ?? null;
  return { lines: page, earlier: from.length > page.length ? last : null, total: wanted.length };
}

/** The address of one entry in the record of its pour. */
export const entryHref = (pourId: string, entryId: string): string =>
  `/pours/${pourId}/record?entry=${entryId}#entry-${entryId}`;

/** The address of a page of a record. */
export function recordHref(pourId: string, query: RecordQuery): string {
  const params = new URLSearchParams();
  if (query.part) params.set('part', query.part);
  if (query.before !== undefined) params.set('before', String(query.before));
  const text = params.toString();
  return `/pours/${pourId}/record${text ? `?${text}` : ''}`;
}
