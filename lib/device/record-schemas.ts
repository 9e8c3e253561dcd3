import { z } from 'zod';
import { readEntry } from '@/lib/inspection/entry';
import { deviceIndex, pullResponse, pushResponse } from '@/lib/inspection/wire';
import { checkedBody, entryToRecord } from './entry-to-record';

/** What a good answer of the server looks like, by what was asked. */
const answers = {
  deviceIndex,
  pushResponse,
  pullResponse,
  uploadAddress: z.object({
    url: z.string().min(1),
    headers: z.record(z.string(), z.string()),
    expiresAt: z.string(),
  }),
  photoAddress: z.object({ url: z.string() }),
  done: z.object({}).loose(),
} as const;

export type AnswerName = keyof typeof answers;
export type AnswerOf<N extends AnswerName> = z.infer<(typeof answers)[N]>;

/** An answer of the server; null where it is of another shape. */
function readAnswer<N extends AnswerName>(name: N, json: unknown): AnswerOf<N> | null {
  const result = answers[name].safeParse(json);
  return result.success ? (result.data as AnswerOf<N>) : null;
}

/**
 * Everything that reads entries and answers by their schemas. It weighs as much as the rest of the phone's side, and the
 * list of pours on this device is shown without it: see `loadSchemas`.
 */
export const recordSchemas = { readAnswer, checkedBody, entryToRecord, readEntry } as const;

export type RecordSchemas = typeof recordSchemas;
