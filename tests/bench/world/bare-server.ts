import { createServer, type IncomingMessage } from 'node:http';
import pg from 'pg';
import type { EntryEnvelope } from '@/lib/inspection/entry';

/**
 * H, what everything that is sent is held against: takes a batch and inserts it with one multi-row statement, without
 * session, validation, access, chain or summaries. Its page is empty; a browser drives it from there.
 * Environment: BARE_PORT, DATABASE_OWNER_URL.
 */
const pool = new pg.Pool({ connectionString: process.env.DATABASE_OWNER_URL, max: 4 });
await pool.query(`create table if not exists bare_entries (
  id uuid primary key, project_id uuid not null, pour_id uuid, type text not null, v integer not null,
  body jsonb not null, plan_revision integer not null, author_id uuid not null, device_id uuid not null,
  device_seq bigint not null, recorded_at timestamptz not null, clock_offset_ms bigint, seen_seq bigint not null)`);

const COLUMNS = 13;
const values = (entry: EntryEnvelope): unknown[] => [
  entry.id,
  entry.projectId,
  entry.pourId,
  entry.type,
  entry.v,
  JSON.stringify(entry.body),
  entry.planRevision,
  entry.authorId,
  entry.deviceId,
  entry.deviceSeq,
  entry.recordedAt,
  entry.clockOffsetMs,
  entry.seenSeq,
];

async function insert(entries: readonly EntryEnvelope[]): Promise<void> {
  const rows = entries.map(
    (_, row) =>
      `(${Array.from({ length: COLUMNS }, (_, column) => `$${row * COLUMNS + column + 1}`).join(',')})`,
  );
  await pool.query(`insert into bare_entries values ${rows.join(',')}`, entries.flatMap(values));
}

async function bodyOf(request: IncomingMessage): Promise<string> {
  const parts: Buffer[] = [];
  for await (const part of request) parts.push(part as Buffer);
  return Buffer.concat(parts).toString('utf8');
}

createServer((request, response) => {
  const answer = async () => {
    if (request.method !== 'POST') {
      response.setHeader('content-type', 'text/html');
      return '<!doctype html><title>Bare</title>';
    }
    const { entries } = JSON.parse(await bodyOf(request)) as { entries: EntryEnvelope[] };
    await insert(entries);
    response.setHeader('content-type', 'application/json');
    return JSON.stringify({ inserted: entries.length });
  };
  answer().then(
    (text) => response.end(text),
    (error: unknown) => {
      response.statusCode = 500;
      response.end(String(error));
    },
  );
}).listen(Number(process.env.BARE_PORT), '127.0.0.1');
