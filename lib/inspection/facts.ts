import { inRecordOrder } from './causality';
import {
  readEntry,
  type Entry,
  type EntryEnvelope,
  type EntryOf,
  type EntryType,
  type Receipt,
  type UnknownEntry,
} from './entry';
import type { Role } from './roles';

/** An entry as a store gives it back: with a receipt once the server has taken it in. */
export type RecordedEntry = EntryEnvelope & Partial<Receipt> & { authorRole: Role };

type Listed = { [T in EntryType]: EntryOf<T>[] };

/** First pass of the fold: the facts of each subject, in the order of the record, nothing judged yet. */
export interface Facts {
  recorded: RecordedEntry[];
  entries: Entry[];
  unknown: UnknownEntry[];
  byId: Map<string, Entry>;
  listed: Partial<Listed>;
  amendmentsByRoot: Map<string, EntryOf<'amendment'>[]>;
  readingsByPoint: Map<string, EntryOf<'reading'>[]>;
  answersByCheck: Map<string, EntryOf<'answer'>[]>;
  measurementsByItem: Map<string, EntryOf<'measurement'>[]>;
  photosBySubject: Map<string, EntryOf<'photo'>[]>;
  /** Ids of the photographs taken, and how many amendments name one as what shows them right. */
  photoIds: Set<string>;
  amendmentsWithPhoto: number;
  /** Spot readings, each of which makes a place of its own. */
  spots: EntryOf<'reading'>[];
  /** Rises with each fact about a subject, so that only what changed is judged again; places of readings by their key. */
  versions: Map<string, number>;
  placeVersions: Map<string, number>;
}

export const noFacts = (): Facts => ({
  recorded: [],
  entries: [],
  unknown: [],
  byId: new Map(),
  listed: {},
  amendmentsByRoot: new Map(),
  readingsByPoint: new Map(),
  answersByCheck: new Map(),
  measurementsByItem: new Map(),
  photosBySubject: new Map(),
  photoIds: new Set(),
  amendmentsWithPhoto: 0,
  spots: [],
  versions: new Map(),
  placeVersions: new Map(),
});

/** The key of the place that a reading is about: a point of the plan, or the place of a spot reading. */
export function pointKeyOf(entry: EntryOf<'reading'>): string {
  return entry.body.pointId ?? `spot:${entry.id}`;
}

export const subjectKey = (subject: { kind: string; id: string }): string => `${subject.kind}:${subject.id}`;

/** All facts of one type, in the order of the record. */
export function listOf<T extends EntryType>(facts: Facts, type: T): EntryOf<T>[] {
  return (facts.listed[type] as EntryOf<T>[] | undefined) ?? [];
}

function push<K, V>(map: Map<K, V[]>, key: K, value: V) {
  const list = map.get(key);
  if (list) list.push(value);
  else map.set(key, [value]);
}

const typed = new WeakMap<RecordedEntry, ReturnType<typeof readEntry>>();

/**
 * `readEntry`, once for each object: typing an entry is the costly part of a fold, and depends on nothing but the entry.
 */
export function readOnce(recorded: RecordedEntry): ReturnType<typeof readEntry> {
  const known = typed.get(recorded);
  if (known) return known;
  const read = readEntry(recorded);
  typed.set(recorded, read);
  return read;
}

/** Adds one entry to the facts. The caller adds them in the order of the record. */
export function addFact(facts: Facts, recorded: RecordedEntry): void {
  facts.recorded.push(recorded);
  const read = readOnce(recorded);
  if (read.kind !== 'known') {
    // What cannot be read is never dropped in silence: it becomes an "update needed" hold.
    facts.unknown.push({
      ...recorded,
      unknown: true,
      seq: recorded.seq ?? null,
      receivedAt: recorded.receivedAt ?? null,
    });
    return;
  }
  const entry = read.entry;
  facts.entries.push(entry);
  facts.byId.set(entry.id, entry);
  ((facts.listed[entry.type] ??= []) as Entry[]).push(entry);
  countVersion(facts, entry);
  switch (entry.type) {
    case 'amendment':
      push(facts.amendmentsByRoot, entry.body.rootId, entry);
      if (entry.body.photoId !== null) facts.amendmentsWithPhoto += 1;
      break;
    case 'reading':
      push(facts.readingsByPoint, pointKeyOf(entry), entry);
      if (entry.body.spot !== null) facts.spots.push(entry);
      break;
    case 'answer':
      push(facts.answersByCheck, entry.body.checkId, entry);
      break;
    case 'measurement':
      push(facts.measurementsByItem, entry.body.itemId, entry);
      break;
    case 'photo':
      push(facts.photosBySubject, subjectKey(entry.body.about), entry);
      facts.photoIds.add(entry.body.photoId);
      break;
  }
}

/** Counts an entry for what it changes: the place of a reading, or its type; an amendment counts as what it amends. */
function countVersion(facts: Facts, entry: Entry): void {
  const root = entry.type === 'amendment' ? facts.byId.get(entry.body.rootId) : entry;
  const counted = root && root.type !== 'amendment' ? root : entry;
  if (counted.type === 'reading') countUp(facts.placeVersions, pointKeyOf(counted));
  else countUp(facts.versions, counted.type);
}

const countUp = (map: Map<string, number>, key: string) => map.set(key, (map.get(key) ?? 0) + 1);

const placed = (entry: RecordedEntry) => ({ ...entry, seq: entry.seq ?? null });

/** Does this entry come after that one by seq alone? What still waits on a device is put in order the long way. */
const follows = (entry: RecordedEntry, before: RecordedEntry | undefined): boolean =>
  entry.seq !== undefined && (before === undefined || (before.seq !== undefined && before.seq < entry.seq));

function isInOrder(recorded: readonly RecordedEntry[]): boolean {
  let before: RecordedEntry | undefined;
  for (const entry of recorded) {
    if (!follows(entry, before)) return false;
    before = entry;
  }
  return true;
}

/** The record's own order, with what waits on the device last; the same id is taken once. */
export function inOrder(recorded: readonly RecordedEntry[]): readonly RecordedEntry[] {
  if (isInOrder(recorded)) return recorded;
  const once = new Map<string, RecordedEntry>();
  for (const entry of recorded) {
    const known = once.get(entry.id);
    if (!known || (known.seq === undefined && entry.seq !== undefined)) once.set(entry.id, entry);
  }
  return [...once.values()].sort((a, b) => inRecordOrder(placed(a), placed(b)));
}
