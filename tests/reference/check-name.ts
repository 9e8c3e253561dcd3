import type { ReferenceRecord } from './load-records';

/** Name of a check: topic, where its value is published, provenance, and what is checked. */
export function checkName(topic: string, of: ReferenceRecord, what = of.title): string {
  const place = [of.standard, of.clause, of.edition && `(${of.edition})`].filter(Boolean).join(' ');
  return [topic, place || 'no standard', of.provenance, what].join(' | ');
}
