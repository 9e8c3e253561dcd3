import { v7 as uuid } from 'uuid';
import { ENTRY_VERSION } from '@/lib/inspection/entry';
import { PROTOCOL } from '@/lib/inspection/protocol';
import { pushResponse } from '@/lib/inspection/wire';
import { postJson, type Posted } from './post-json';

const DEVICE_KEY = 'cagewright.office-device';

/** The id under which this browser records in the office; a new one where nothing can be kept. */
function officeDevice(): string {
  try {
    const kept = window.localStorage.getItem(DEVICE_KEY);
    if (kept) return kept;
    const made = uuid();
    window.localStorage.setItem(DEVICE_KEY, made);
    return made;
  } catch {
    return uuid();
  }
}

/**
 * Records one entry in the project's own stream, as a device would: every pour of the project hears of it.
 * @param seenSeq head of the project's stream as this person has it before them
 */
export async function recordInProject(
  at: { projectId: string; authorId: string; seenSeq: number },
  type: string,
  body: unknown,
): Promise<Posted> {
  const now = new Date();
  const deviceId = officeDevice();
  const answer = await postJson('/api/sync/push', {
    protocol: PROTOCOL,
    projectId: at.projectId,
    deviceId,
    sentAt: now.toISOString(),
    entries: [
      {
        id: uuid(),
        projectId: at.projectId,
        pourId: null,
        type,
        v: ENTRY_VERSION,
        body,
        planRevision: 0,
        authorId: at.authorId,
        deviceId,
        // Rises with time, which is all that is asked of it.
        deviceSeq: now.getTime(),
        recordedAt: now.toISOString(),
        clockOffsetMs: null,
        seenSeq: at.seenSeq,
      },
    ],
  });
  if (!answer.ok) return answer;
  const parsed = pushResponse.safeParse(answer.data);
  const outcome = parsed.success ? parsed.data.outcomes[0] : undefined;
  if (outcome?.outcome !== 'refused') return answer;
  return {
    ok: false,
    status: 200,
    code: 'invalid',
    sentence: outcome.sentence,
    fields: outcome.field ? [{ path: outcome.field, message: outcome.sentence }] : [],
    detail: null,
    incident: null,
  };
}
