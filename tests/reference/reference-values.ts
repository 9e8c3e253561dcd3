import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';

/** A published value, as kept in `data/`: numbers and where they were read, never the words of a standard. */
export interface ReferenceRecord {
  id: string;
  kind: 'fact' | 'check';
  title: string;
  values: Record<string, unknown>;
  unit: string;
  standard: string;
  clause: string;
  edition: string;
  provenance: 'seen' | 'partly-seen' | 'memory' | 'computed';
  source: string;
  note?: string;
  tolerance?: unknown;
}

const files = new Map<string, readonly ReferenceRecord[]>();

/** All records of one topic file: `records('02-cover')` reads `data/02-cover.json`. */
export function records(topic: string): readonly ReferenceRecord[] {
  const held = files.get(topic);
  if (held) return held;
  const path = fileURLToPath(new URL(`./data/${topic}.json`, import.meta.url));
  const parsed = JSON.parse(readFileSync(path, 'utf8')) as { records: ReferenceRecord[] };
  files.set(topic, parsed.records);
  return parsed.records;
}

/** One record by its id; a test that names a value which is not there fails. */
export function record(topic: string, id: string): ReferenceRecord {
  const found = records(topic).find((candidate) => candidate.id === id);
  if (!found) throw new Error(`There is no reference value ${id} in ${topic}.`);
  return found;
}

/** A number of a record, or a failure that says which one is missing. */
export function numberOf(of: ReferenceRecord, key: string): number {
  const value = of.values[key];
  if (typeof value !== 'number') throw new Error(`${of.id} has no number "${key}".`);
  return value;
}

/** Between the parts of a check's name; the summary reads them back. */
export const SEPARATOR = ' | ';

/** Name of a check: topic, where its value is published, provenance, and what is checked. */
export function checkName(topic: string, of: ReferenceRecord, what = of.title): string {
  const place = [of.standard, of.clause, of.edition && `(${of.edition})`].filter(Boolean).join(' ');
  return [topic, place || 'no standard', of.provenance, what].join(SEPARATOR);
}
