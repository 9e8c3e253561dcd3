import { createHash } from 'node:crypto';
import type { World } from './world';

interface Row {
  id: string;
  state: string;
  sha256: string;
  bytes: number;
  object_key: string | null;
  problem: string | null;
  announced: { sha256: string; bytes: number };
  stored: { sha256: string; bytes: number; key: string }[];
  refused: number;
}

/**
 * What is wrong between the photographs' rows, the record, and the bytes in the object store. A photograph is stored,
 * refused or waiting in all of them alike, at most once each, and what is stored has the digest that was announced.
 */
export async function photoProblems(world: World): Promise<string[]> {
  const { readObject } = await import('@/lib/server/object-storage');
  const { rows } = await world.owner.raw<{ rows: Row[] }>(
    `select p.id, p.state, p.sha256, p.bytes, p.object_key, p.problem, e.body as announced,
       coalesce((select jsonb_agg(s.body) from entries s where s.project_id = p.project_id
         and s.type = 'photo-stored' and s.body ->> 'photoId' = p.id::text), '[]') as stored,
       (select count(*)::int from entries r where r.project_id = p.project_id
         and r.type = 'photo-refused' and r.body ->> 'photoId' = p.id::text) as refused
     from photos p join entries e on e.project_id = p.project_id and e.id = p.entry_id`,
  );
  const problems: string[] = [];
  for (const row of rows) {
    const say = (what: string) => problems.push(`${row.id}: ${what}`);
    if (row.stored.length !== (row.state === 'stored' ? 1 : 0))
      say(`${row.state}, with ${row.stored.length} entries that say it is stored`);
    if (row.state === 'refused' && (row.refused !== 1 || !row.problem))
      say(`refused, with ${row.refused} entries that say so and the reason ${row.problem ?? 'missing'}`);
    if (row.state === 'waiting' && row.refused > 0) say('waiting, and refused on record');
    if (row.state !== 'stored') continue;
    const bytes = row.object_key === null ? null : await readObject(row.object_key, 100_000_000);
    if (!bytes) {
      say('stored, and no bytes are there');
      continue;
    }
    const digest = createHash('sha256').update(bytes).digest('hex');
    if (digest !== row.announced.sha256) say('the bytes are not those that were announced');
    if (bytes.length !== row.announced.bytes) say(`${bytes.length} of ${row.announced.bytes} bytes`);
    for (const entry of row.stored)
      if (entry.sha256 !== digest || entry.key !== row.object_key) say('the record names other bytes');
  }
  return problems;
}
