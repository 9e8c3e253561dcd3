import { z } from 'zod';
import { bodies, officeBodies, projectBodies, serverBodies, siteBodies } from './entry-bodies';
import { digest, instant, recordId } from './primitives';
import { role } from './roles';

export type EntryType = keyof typeof bodies;
export type BodyOf<T extends EntryType> = z.infer<(typeof bodies)[T]>;

/** The schema version that this program writes for each type. A body of another version is brought up, or held. */
export const ENTRY_VERSION = 1;

const names = <T extends object>(of: T) => Object.keys(of) as (keyof T & EntryType)[];
export const siteEntryTypes = names(siteBodies);
export const officeEntryTypes = names(officeBodies);
export const projectEntryTypes = names(projectBodies);
export const serverEntryTypes = names(serverBodies);
export const entryTypes = names(bodies);

/** What every recorded fact carries, before the server has taken it in. */
export const entryEnvelope = z.object({
  id: recordId,
  projectId: recordId,
  /** Null in the project's own stream. */
  pourId: recordId.nullable(),
  type: z.string().min(1).max(40),
  v: z.number().int().positive().max(1000),
  body: z.record(z.string(), z.json()),
  planRevision: z.number().int().nonnegative(),
  authorId: recordId,
  deviceId: recordId,
  /** Rises with each entry of this author on this device; gaps are allowed. */
  deviceSeq: z.number().int().nonnegative().max(Number.MAX_SAFE_INTEGER),
  recordedAt: instant,
  /** Server's clock minus device's clock in ms, as last known; null when never known. */
  clockOffsetMs: z.number().int().nullable(),
  /** Everything of this pour and of the project's own stream up to this `seq` had reached the author. */
  seenSeq: z.number().int().nonnegative(),
});
export type EntryEnvelope = z.infer<typeof entryEnvelope>;

/** What the server adds; null on a device's own entry that has not been sent. */
export const receipt = z.object({
  seq: z.number().int().positive(),
  receivedAt: instant,
  authorRole: role,
  prevHash: digest.nullable(),
  hash: digest,
});
export type Receipt = z.infer<typeof receipt>;

export interface EntryOf<T extends EntryType> extends Omit<EntryEnvelope, 'type' | 'body'> {
  type: T;
  body: BodyOf<T>;
  /** The role that the author held when it was taken in (on the device: holds now). */
  authorRole: z.infer<typeof role>;
  /** Null while it waits on a device. */
  seq: number | null;
  receivedAt: string | null;
  hash: string | null;
  prevHash: string | null;
}

/** One signed, dated fact in the record, of any type this program knows. */
export type Entry = { [T in EntryType]: EntryOf<T> }[EntryType];

/** An entry of a type or version that this program does not know: never silently dropped. */
export interface UnknownEntry extends EntryEnvelope {
  unknown: true;
  authorRole: z.infer<typeof role>;
  seq: number | null;
  receivedAt: string | null;
}

export const isEntryType = (type: string): type is EntryType => type in bodies;
export const isOfType = <T extends EntryType>(entry: Entry, type: T): entry is Extract<Entry, { type: T }> =>
  entry.type === type;

/** The body's problems by field, in words, or the entry with its body typed. */
export type ReadEntry =
  | { kind: 'known'; entry: Entry }
  | { kind: 'unknown' }
  | { kind: 'invalid'; issues: { path: string; message: string }[] };

/**
 * Types the body of an entry by its own schema.
 * @returns `unknown` for a type or version newer than this program, `invalid` with the field and the reason otherwise
 */
export function readEntry(
  stored: EntryEnvelope & Partial<Receipt> & { authorRole: z.infer<typeof role> },
): ReadEntry {
  if (!isEntryType(stored.type) || stored.v > ENTRY_VERSION) return { kind: 'unknown' };
  const parsed = bodies[stored.type].safeParse(stored.body);
  if (!parsed.success) {
    return {
      kind: 'invalid',
      issues: parsed.error.issues.map((issue) => ({ path: issue.path.join('.'), message: issue.message })),
    };
  }
  // Written out, not spread: a fold types ten thousand of these, and the engine copies a known shape far faster.
  const entry = {
    id: stored.id,
    projectId: stored.projectId,
    pourId: stored.pourId,
    type: stored.type,
    v: stored.v,
    body: parsed.data,
    planRevision: stored.planRevision,
    authorId: stored.authorId,
    authorRole: stored.authorRole,
    deviceId: stored.deviceId,
    deviceSeq: stored.deviceSeq,
    recordedAt: stored.recordedAt,
    clockOffsetMs: stored.clockOffsetMs,
    seenSeq: stored.seenSeq,
    seq: stored.seq ?? null,
    receivedAt: stored.receivedAt ?? null,
    hash: stored.hash ?? null,
    prevHash: stored.prevHash ?? null,
  };
  // The body was parsed by the schema of this very type, which is what ties the two together.
  return { kind: 'known', entry: entry as unknown as Entry };
}
