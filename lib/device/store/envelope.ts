import type { EntryEnvelope } from '@/lib/inspection/entry';

/** What of an entry travels to the server: the envelope, and nothing that the server or the device has added. */
export function envelopeOf(entry: EntryEnvelope): EntryEnvelope {
  return {
    id: entry.id,
    projectId: entry.projectId,
    pourId: entry.pourId,
    type: entry.type,
    v: entry.v,
    body: entry.body,
    planRevision: entry.planRevision,
    authorId: entry.authorId,
    deviceId: entry.deviceId,
    deviceSeq: entry.deviceSeq,
    recordedAt: entry.recordedAt,
    clockOffsetMs: entry.clockOffsetMs,
    seenSeq: entry.seenSeq,
  };
}
