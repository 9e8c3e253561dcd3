import { z } from 'zod';
import { recordId } from '@/lib/inspection/primitives';
import { MOST_ENTRIES_IN_A_BATCH } from '@/lib/inspection/protocol';

/** An entry as the file holds it: its whole content travels untouched, and the server parses it. */
const waiting = z.looseObject({
  id: recordId,
  projectId: recordId,
  authorId: recordId,
  deviceSeq: z.number().int().nonnegative(),
  type: z.string(),
});
export type WaitingEntry = z.infer<typeof waiting>;

/** The file that a device saves of what the server has not taken in; see `exportUnsent`. */
export const unsentFile = z.object({
  format: z.literal('cagewright-unsent'),
  version: z.literal(1),
  person: z.object({ id: recordId, name: z.string() }),
  deviceId: recordId,
  savedAt: z.iso.datetime(),
  entries: z.array(waiting),
  refused: z.array(z.object({ envelope: z.looseObject({ id: z.string() }), sentence: z.string() })),
  notOnServer: z.array(z.unknown()),
  photos: z.array(
    z.object({
      photoId: recordId,
      entryId: recordId,
      sha256: z.string(),
      contentType: z.string(),
      base64: z.base64(),
    }),
  ),
});
export type UnsentFile = z.infer<typeof unsentFile>;

/** Reads a saved file, or says in a sentence why it is none. */
export function readUnsentFile(
  text: string,
): { ok: true; file: UnsentFile } | { ok: false; problem: string } {
  let data: unknown;
  try {
    data = JSON.parse(text);
  } catch {
    return {
      ok: false,
      problem: 'This file is not one that a device saved, or it was cut short on the way. Copy it again.',
    };
  }
  const parsed = unsentFile.safeParse(data);
  if (parsed.success) return { ok: true, file: parsed.data };
  const version = z.object({ format: z.literal('cagewright-unsent'), version: z.number() }).safeParse(data);
  if (version.success && version.data.version !== 1) {
    return {
      ok: false,
      problem:
        'A newer version of the application saved this file. Load this page again, then choose it once more.',
    };
  }
  const at = parsed.error.issues[0]?.path.join('.') ?? '';
  return {
    ok: false,
    problem: `This file is not one that a device saved${at ? ` (${at} is not as it should be)` : ''}. Nothing was brought in.`,
  };
}

/** Batches as the outbox sends them: of one project each, in the order in which they were recorded. */
export function batchesOf(
  entries: readonly WaitingEntry[],
): { projectId: string; entries: WaitingEntry[] }[] {
  const byProject = new Map<string, WaitingEntry[]>();
  for (const entry of entries)
    byProject.set(entry.projectId, [...(byProject.get(entry.projectId) ?? []), entry]);
  return [...byProject].flatMap(([projectId, own]) => {
    const sorted = own.toSorted((a, b) => a.deviceSeq - b.deviceSeq);
    return Array.from({ length: Math.ceil(sorted.length / MOST_ENTRIES_IN_A_BATCH) }, (_, batch) => ({
      projectId,
      entries: sorted.slice(batch * MOST_ENTRIES_IN_A_BATCH, (batch + 1) * MOST_ENTRIES_IN_A_BATCH),
    }));
  });
}
