import type { StoredEntry } from '@/lib/inspection/wire';
import { contentOf } from './model-server';

/** What people did, as they saw it: an entry is in here once "saved" was shown. */
export interface History {
  recorded: Map<string, { content: string; phone: string; poison: boolean }>;
}

/** What a phone shows as not sent, to be asked of its own export. */
export interface OnPhone {
  name: string;
  waiting: string[];
  refused: { id: string; sentence: string }[];
}

/**
 * What may never happen, whatever the line did: an empty list, or what was found broken. The rules are those of the
 * record, not of the program: nothing acknowledged is lost or changed, nothing is doubled, nothing is invented, what
 * is not on the server is on its phone with a reason, and another device sees exactly the server's set.
 */
export function violations(given: {
  history: History;
  server: readonly StoredEntry[];
  phones: readonly OnPhone[];
  /** Ids that a device which was never there before has fetched. */
  secondDevice: readonly string[];
  /** Types that the server itself writes here. */
  writtenByServer?: readonly string[];
}): string[] {
  const { history, server, phones, secondDevice } = given;
  const found: string[] = [];
  const times = new Map<string, number>();
  for (const entry of server) times.set(entry.id, (times.get(entry.id) ?? 0) + 1);
  for (const [id, count] of times)
    if (count > 1) found.push(`doubled: ${id} is on the server ${count} times`);

  const byId = new Map(server.map((entry) => [entry.id, entry]));
  const waiting = new Set(phones.flatMap((phone) => phone.waiting));
  const refused = new Map(phones.flatMap((phone) => phone.refused.map((one) => [one.id, one.sentence])));
  for (const [id, { content, phone, poison }] of history.recorded) {
    const kept = byId.get(id);
    if (kept && contentOf(kept) !== content) found.push(`changed: ${id}`);
    if (kept && refused.has(id)) found.push(`kept, yet shown as refused: ${id}`);
    if (!kept && !waiting.has(id) && !refused.has(id)) found.push(`lost: ${id}, recorded on ${phone}`);
    if (!kept && waiting.has(id)) found.push(`never sent, though the line was good: ${id}`);
    if (refused.get(id) === '') found.push(`refused without a reason: ${id}`);
    if (poison && kept) found.push(`kept, though it cannot be used: ${id}`);
    if (!poison && refused.has(id)) found.push(`refused, though nothing is wrong with it: ${id}`);
  }
  for (const entry of server) {
    const own = entry.id.startsWith('99999999-') || given.writtenByServer?.includes(entry.type);
    if (!history.recorded.has(entry.id) && !own) found.push(`invented: ${entry.id}`);
  }
  const held = [...byId.keys()].sort().join();
  if ([...new Set(secondDevice)].sort().join() !== held)
    found.push('another device sees another set than the server holds');
  return [...found, ...brokenLinks(server)];
}

/** Each stream's chain: every entry names the hash of the one before it. */
function brokenLinks(server: readonly StoredEntry[]): string[] {
  const heads = new Map<string | null, string>();
  return server.flatMap((entry) => {
    const broken = entry.prevHash !== (heads.get(entry.pourId) ?? null);
    heads.set(entry.pourId, entry.hash);
    return broken ? [`chain broken at ${entry.id}`] : [];
  });
}
