import type { DBSchema, IDBPDatabase } from 'idb';
import type { EntryEnvelope } from '@/lib/inspection/entry';
import type { SubjectRef } from '@/lib/inspection/entry-bodies';
import type { Plan } from '@/lib/inspection/plan';
import type { RecordedEntry } from '@/lib/inspection/sheet';
import type { CrewList } from '@/lib/inspection/fix-list-item';
import type { DeviceIndex } from '@/lib/inspection/wire';
import type { PhotoProgress, RefusedEntry } from '../device-types';
import { openLastingDatabase } from './lasting-database';

/** The stream of a pour is named by its id; the project's own stream by its project. */
export const streamOf = (entry: { pourId: string | null; projectId: string }): string =>
  entry.pourId ?? `project:${entry.projectId}`;
export const projectStream = (projectId: string): string => `project:${projectId}`;

/** An entry as it is kept: wrapped, so that nothing of the device's own book-keeping gets into the record. */
export interface KeptEntry {
  id: string;
  stream: string;
  entry: RecordedEntry;
}

/** What waits to be sent, with the whole payload: it needs no other record to be sent. */
export interface OutboxRecord {
  id: string;
  deviceSeq: number;
  stream: string;
  envelope: EntryEnvelope;
  /** It was taken in before by a server that does not know it any more. */
  offeredAgain: boolean;
  /** Why it could not be sent last time, when that was about this entry alone. */
  problem: string | null;
}

export interface RefusedRecord extends Omit<RefusedEntry, 'entry'> {
  id: string;
  deviceSeq: number;
  envelope: EntryEnvelope;
}

/** Taken in by the server, but not seen in a pull yet. */
export interface AckedRecord {
  id: string;
  stream: string;
  seq: number;
}

export interface PhotoRecord {
  photoId: string;
  entryId: string;
  projectId: string;
  pourId: string;
  about: SubjectRef;
  caption: string;
  shot: 'wide' | 'close' | 'before' | 'after';
  bytes: number;
  contentType: string;
  sha256: string;
  takenAt: string;
  progress: PhotoProgress;
  problem: string | null;
  sentAt: string | null;
  /** Ids of the server's `photo-refused` entries that were acted upon. */
  refusals: string[];
}

export interface CursorRecord {
  stream: string;
  after: number;
  headHash: string | null;
  planRevision: number;
}

/** What crew have of a pour. */
export interface CrewListRecord {
  pourId: string;
  list: CrewList;
}

export interface MetaValues {
  /** Made with the store; another one in the cookie means that this store was emptied behind our back. */
  storeId: string;
  deviceSeq: number;
  index: DeviceIndex;
  /** What the person chose to keep or not to keep, by pour. */
  keep: Record<string, boolean>;
  lastSuccessAt: string;
  clockOffsetMs: number;
  /** deviceSeq of entries that were lost with an emptied store and that no pull has brought back. */
  lost: number[];
  /** How many more were lost than could be told one by one. */
  lostUncounted: number;
  /** Photos that were lost with an emptied store before their bytes were sent, though their entries were. */
  lostPhotos: number;
  /** Room that is given up when the device is full, so that a reading can still be saved. */
  ballast: Uint8Array;
}

export interface PersonSchema extends DBSchema {
  plans: { key: string; value: Plan };
  entries: { key: string; value: KeptEntry; indexes: { stream: string } };
  outbox: { key: string; value: OutboxRecord; indexes: { deviceSeq: number } };
  refused: { key: string; value: RefusedRecord };
  acked: { key: string; value: AckedRecord; indexes: { stream: string } };
  /** Others' entries that a restored server does not know: kept for an export, out of the sheet. */
  strays: { key: string; value: KeptEntry };
  photos: { key: string; value: PhotoRecord };
  photoBytes: { key: string; value: { photoId: string; bytes: ArrayBuffer } };
  cursors: { key: string; value: CursorRecord };
  /** Of crew only, in place of plans and others' entries. */
  crewLists: { key: string; value: CrewListRecord };
  meta: { key: string; value: unknown };
}

export type PersonDatabase = IDBPDatabase<PersonSchema>;

/**
 * Opens the database of one person on this device, one key per record.
 * @param name from `DeviceEnvironment.databaseName`
 */
export function openPersonDatabase(name: string): Promise<PersonDatabase> {
  return openLastingDatabase<PersonSchema>(name, 2, (db, before) => {
    if (before < 2) db.createObjectStore('crewLists', { keyPath: 'pourId' });
    if (before >= 1) return;
    db.createObjectStore('plans', { keyPath: 'pourId' });
    db.createObjectStore('entries', { keyPath: 'id' }).createIndex('stream', 'stream');
    db.createObjectStore('outbox', { keyPath: 'id' }).createIndex('deviceSeq', 'deviceSeq');
    db.createObjectStore('refused', { keyPath: 'id' });
    db.createObjectStore('acked', { keyPath: 'id' }).createIndex('stream', 'stream');
    db.createObjectStore('strays', { keyPath: 'id' });
    db.createObjectStore('photos', { keyPath: 'photoId' });
    db.createObjectStore('photoBytes', { keyPath: 'photoId' });
    db.createObjectStore('cursors', { keyPath: 'stream' });
    db.createObjectStore('meta');
  });
}

export async function readMeta<K extends keyof MetaValues>(
  db: PersonDatabase,
  key: K,
): Promise<MetaValues[K] | undefined> {
  return (await db.get('meta', key)) as MetaValues[K] | undefined;
}

export async function writeMeta<K extends keyof MetaValues>(
  db: PersonDatabase,
  key: K,
  value: MetaValues[K],
): Promise<void> {
  await db.put('meta', value, key);
}

/** For a write that may be missing: passes on every error except that the device is full. */
export function unlessFull(error: unknown): void {
  if (!isDeviceFull(error)) throw error;
}

/** True when the store refused because the device is full. */
export function isDeviceFull(error: unknown): boolean {
  return (
    error !== null &&
    typeof error === 'object' &&
    'name' in error &&
    (error.name === 'QuotaExceededError' || error.name === 'NS_ERROR_DOM_QUOTA_REACHED')
  );
}
