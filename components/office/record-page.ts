import { z } from 'zod';
import type { EntryType } from '@/lib/inspection/entry';
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
});
export type RecordQuery = z.infer<typeof recordQuery>;

const PAGE = 50;

/**
 * One page of a record, newest first.
 * @param lines every line, oldest first
 * @returns the lines, and the number that an earlier page starts below, or null on the last
 */
export function recordPage(
  lines: readonly RecordLine[],
  query: RecordQuery,
  size = PAGE,
): { lines: RecordLine[]; earlier: number | null; total: number } {
  const types: readonly string[] | null = query.part ? recordParts[query.part].types : null;
  const wanted = lines.filter((line) => types === null || types.includes(line.type));
  const { before } = query;
  const from =
    before === undefined ? wanted : wanted.filter((line) => line.seq !== null && line.seq < before);
  const page = from.slice(-size).reverse();
  const last = page.at(-1)?.seq ?? null;
  return { lines: page, earlier: from.length > page.length ? last : null, total: wanted.length };
}

/** The address of a page of a record. */
export function recordHref(pourId: string, query: RecordQuery): string {
  const params = new URLSearchParams();
  if (query.part) params.set('part', query.part);
  if (query.before !== undefined) params.set('before', String(query.before));
  const text = params.toString();
  return `/pours/${pourId}/record${text ? `?${text}` : ''}`;
}
