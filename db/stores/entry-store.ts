import type { RecordedEntry } from '@/lib/inspection/sheet';
import type { EntryEnvelope, Receipt } from '@/lib/inspection/entry';
import type { Tx } from '@/db/connection';

/** An entry with its place in the record. */
export type SealedEntry = EntryEnvelope & Receipt;

export interface EntryRow {
  project_id: string;
  seq: number;
  id: string;
  pour_id: string | null;
  type: string;
  v: number;
  body: EntryEnvelope['body'];
  plan_revision: number;
  author_id: string;
  author_role: Receipt['authorRole'];
  device_id: string;
  device_seq: number;
  recorded_at: string;
  clock_offset_ms: number | null;
  seen_seq: number;
  received_at: string;
  prev_hash: string | null;
  hash: string;
}

/** A row as the entry it keeps; field for field what was received, and its receipt. */
export const sealedEntry = (row: EntryRow): SealedEntry => ({
  id: row.id,
  projectId: row.project_id,
  pourId: row.pour_id,
  type: row.type,
  v: row.v,
  body: row.body,
  planRevision: row.plan_revision,
  authorId: row.author_id,
  deviceId: row.device_id,
  deviceSeq: row.device_seq,
  recordedAt: row.recorded_at,
  clockOffsetMs: row.clock_offset_ms,
  seenSeq: row.seen_seq,
  seq: row.seq,
  receivedAt: row.received_at,
  authorRole: row.author_role,
  prevHash: row.prev_hash,
  hash: row.hash,
});

/**
 * Locks the project's counter row until the transaction ends: from here on nobody else writes to its record.
 * @returns the highest seq and release number given so far; null when the project is not among the person's
 */
export async function lockRecord(
  tx: Tx,
  projectId: string,
): Promise<{ lastSeq: number; lastReleaseNumber: number } | null> {
  const row = await tx('project_counters')
    .where({ project_id: projectId })
    .forUpdate()
    .first<{ last_seq: number; last_release_number: number } | undefined>('last_seq', 'last_release_number');
  return row ? { lastSeq: row.last_seq, lastReleaseNumber: row.last_release_number } : null;
}

export async function advanceCounters(
  tx: Tx,
  projectId: string,
  to: { lastSeq: number; lastReleaseNumber: number },
): Promise<void> {
  await tx('project_counters')
    .where({ project_id: projectId })
    .update({ last_seq: to.lastSeq, last_release_number: to.lastReleaseNumber });
}

/** Those of the given ids that the project's record already holds. */
export async function entriesByIds(tx: Tx, projectId: string, ids: string[]): Promise<SealedEntry[]> {
  if (ids.length === 0) return [];
  const rows = await tx<EntryRow>('entries')
    .where({ project_id: projectId })
    .whereRaw('id = any(?::uuid[])', [ids])
    .select('*');
  return rows.map((row) => sealedEntry(row as EntryRow));
}

/** The entry with this id, if it is in one of the projects opened to this transaction. */
export async function findEntry(tx: Tx, entryId: string): Promise<SealedEntry | null> {
  const row = await tx<EntryRow>('entries')
    .whereRaw('project_id = any ((select app_projects())::uuid[])')
    .where({ id: entryId })
    .first('*');
  return row ? sealedEntry(row as EntryRow) : null;
}

/** Adds entries with one statement; all values travel as one JSON parameter, which a batch of 500 needs to be quick. */
export async function insertEntries(tx: Tx, entries: readonly SealedEntry[]): Promise<void> {
  if (entries.length === 0) return;
  await tx.raw(
    `insert into entries (project_id, seq, id, pour_id, type, v, body, plan_revision, author_id, author_role,
       device_id, device_seq, recorded_at, clock_offset_ms, seen_seq, received_at, prev_hash, hash)
     select "projectId", seq, id, "pourId", type, v, body, "planRevision", "authorId", "authorRole",
       "deviceId", "deviceSeq", "recordedAt", "clockOffsetMs", "seenSeq", "receivedAt", "prevHash", hash
     from jsonb_to_recordset(?::jsonb) as r("projectId" uuid, seq bigint, id uuid, "pourId" uuid, type text, v integer,
       body jsonb, "planRevision" integer, "authorId" uuid, "authorRole" text, "deviceId" uuid, "deviceSeq" bigint,
       "recordedAt" timestamptz, "clockOffsetMs" bigint, "seenSeq" bigint, "receivedAt" timestamptz,
       "prevHash" text, hash text)`,
    [JSON.stringify(entries)],
  );
}

/** Seq and hash of the last entry of a stream; seq 0 for an empty one. */
export interface StreamHead {
  seq: number;
  hash: string | null;
}
export const EMPTY_STREAM: StreamHead = { seq: 0, hash: null };

export async function streamHead(tx: Tx, projectId: string, pourId: string | null): Promise<StreamHead> {
  const row = await tx<EntryRow>('entries')
    .where({ project_id: projectId, pour_id: pourId })
    .orderBy('seq', 'desc')
    .first('seq', 'hash');
  return row ? { seq: row.seq, hash: row.hash } : EMPTY_STREAM;
}

/** Which stream to read and from where: the entry at `from` itself comes along, so that its hash can be compared. */
export interface StreamWanted {
  pourId: string | null;
  from: number;
}

/**
 * Entries of several streams in one snapshot, in the order of the record.
 * @returns entries of the project's own stream have pourId null
 */
export async function readStreams(
  tx: Tx,
  projectId: string,
  wanted: readonly StreamWanted[],
): Promise<RecordedEntry[]> {
  const pours = wanted.filter((stream) => stream.pourId !== null);
  const own = wanted.find((stream) => stream.pourId === null);
  const { rows } = await tx.raw<{ rows: EntryRow[] }>(
    `select * from (
       select e.* from unnest(cast(:pours as uuid[]), cast(:froms as bigint[])) as w(pour_id, from_seq)
         join entries e on e.project_id = :projectId and e.pour_id = w.pour_id and e.seq >= w.from_seq
       union all
       select e.* from entries e
         where e.project_id = :projectId and e.pour_id is null and e.seq >= cast(:own as bigint)
     ) as streams order by seq`,
    {
      pours: pours.map((stream) => stream.pourId),
      froms: pours.map((stream) => stream.from),
      projectId,
      own: own?.from ?? Number.MAX_SAFE_INTEGER,
    },
  );
  return rows.map(sealedEntry);
}

/**
 * Pages of several streams after their cursors, in the order of the record, by pour (null: the project's own).
 * @param most entries of a page; one more is read, which tells that there is a next page
 */
export async function readPages(
  tx: Tx,
  projectId: string,
  wanted: readonly { pourId: string | null; after: number }[],
  most: number,
): Promise<Map<string | null, SealedEntry[]>> {
  const pours = wanted.filter((stream) => stream.pourId !== null);
  const own = wanted.find((stream) => stream.pourId === null);
  const { rows } = await tx.raw<{ rows: EntryRow[] }>(
    `select page.* from unnest(cast(:pours as uuid[]), cast(:afters as bigint[])) as w(pour_id, after)
       cross join lateral (select e.* from entries e where e.project_id = :projectId and e.pour_id = w.pour_id
         and e.seq > w.after order by e.seq limit :more) as page
     union all
     select page.* from (select e.* from entries e where e.project_id = :projectId and e.pour_id is null
       and e.seq > cast(:own as bigint) order by e.seq limit :more) as page`,
    {
      projectId,
      pours: pours.map((stream) => stream.pourId),
      afters: pours.map((stream) => stream.after),
      own: own?.after ?? Number.MAX_SAFE_INTEGER,
      more: most + 1,
    },
  );
  const pages = new Map<string | null, SealedEntry[]>();
  for (const row of rows) {
    const page = pages.get(row.pour_id);
    if (page) page.push(sealedEntry(row));
    else pages.set(row.pour_id, [sealedEntry(row)]);
  }
  for (const page of pages.values()) page.sort((a, b) => a.seq - b.seq);
  return pages;
}

/** Hashes of the entries at the given seqs, for comparing what devices hold with what the record holds. */
export async function hashesAt(tx: Tx, projectId: string, seqs: number[]): Promise<Map<number, string>> {
  if (seqs.length === 0) return new Map();
  const rows = await tx<EntryRow>('entries')
    .where({ project_id: projectId })
    .whereRaw('seq = any(?::bigint[])', [seqs])
    .select('seq', 'hash');
  return new Map(rows.map((row) => [row.seq, row.hash]));
}

/** The highest seq that the project's counter has given. */
export async function counterOf(tx: Tx, projectId: string): Promise<number> {
  const row = await tx('project_counters')
    .where({ project_id: projectId })
    .first<{ last_seq: number } | undefined>('last_seq');
  return row?.last_seq ?? 0;
}

export async function countEntries(tx: Tx, projectId: string): Promise<number> {
  const row = await tx('entries')
    .where({ project_id: projectId })
    .count<{ count: number }[]>({ count: '*' })
    .first<{ count: number } | undefined>();
  return row?.count ?? 0;
}
