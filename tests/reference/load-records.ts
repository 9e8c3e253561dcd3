import { readFileSync } from 'node:fs';
import { afterAll, expect, test } from 'vitest';
import { z } from 'zod';

/**
 * Published values that lib/concrete is checked against: data files beside this one, each record with its source and its
 * provenance (seen, partly-seen, memory, computed).
 */
const record = z.object({
  id: z.string(),
  title: z.string(),
  values: z.record(z.string(), z.unknown()),
  unit: z.string().optional(),
  standard: z.string().optional(),
  clause: z.string().optional(),
  edition: z.string().optional(),
  provenance: z.enum(['seen', 'partly-seen', 'memory', 'computed']),
  source: z.string(),
  note: z.string().optional(),
  tolerance: z.unknown().optional(),
});
export type ReferenceRecord = z.infer<typeof record>;

const file = z.object({ records: z.array(record).min(1) });

const anyObject = z.record(z.string(), z.unknown());

/** A loaded topic that notes which records a test took, and fails where one was left unchecked. */
export class Topic {
  readonly #records: Map<string, ReferenceRecord>;
  readonly #taken = new Set<string>();

  constructor(name: string) {
    const text = readFileSync(new URL(`./data/${name}.json`, import.meta.url), 'utf8');
    const loaded = file.parse(JSON.parse(text));
    this.#records = new Map(loaded.records.map((entry) => [entry.id, entry]));
    afterAll(() => {
      const left = [...this.#records.keys()].filter((id) => !this.#taken.has(id));
      expect(left, `${name}: records that no test checks`).toEqual([]);
    });
  }

  /** One record by its id. */
  take(id: string): ReferenceRecord {
    const found = this.#records.get(id);
    if (!found) throw new Error(`No record ${id}.`);
    this.#taken.add(id);
    return found;
  }

  /** All records whose id begins with `start`. */
  takeAll(start: string): ReferenceRecord[] {
    const found = [...this.#records.keys()].filter((id) => id.startsWith(start));
    if (found.length === 0) throw new Error(`No record begins with ${start}.`);
    return found.map((id) => this.take(id));
  }

  /** Registers a test for one record, named after it, its place in the standard and its provenance. */
  check(id: string, body: (values: Record<string, unknown>, of: ReferenceRecord) => void): void {
    const of = this.take(id);
    const place = [of.standard, of.clause, of.edition && `(${of.edition})`].filter(Boolean).join(' ');
    test(`${id}: ${of.title} [${place || of.source}; ${of.provenance}]`, () => body(of.values, of));
  }

  /** Registers a test for each record whose id begins with `start`. */
  checkAll(start: string, body: (values: Record<string, unknown>, of: ReferenceRecord) => void): void {
    for (const { id } of this.takeAll(start)) this.check(id, body);
  }
}

function at(from: unknown, path: string[]): unknown {
  return path.reduce((value, key) => anyObject.parse(value)[key], from);
}

/** A value of a record as a number. */
export function numberAt(from: unknown, ...path: string[]): number {
  return z.number().parse(at(from, path));
}

/** A value of a record as text. */
export function textAt(from: unknown, ...path: string[]): string {
  return z.string().parse(at(from, path));
}

/** A value of a record as a list of numbers. */
export function listAt(from: unknown, ...path: string[]): number[] {
  return z.array(z.number()).parse(at(from, path));
}

/** Digits that agree with a certified value: the log relative error of the NIST StRD, at most 15. */
export function agreeingDigits(value: number, certified: number): number {
  const error = Math.abs(value - certified);
  const relative = certified === 0 ? error : error / Math.abs(certified);
  return relative === 0 ? 15 : Math.min(15, -Math.log10(relative));
}
