import { v7 as uuid } from 'uuid';
import { AppError, type ErrorCode } from '@/lib/inspection/app-error';
import { ENTRY_VERSION } from '@/lib/inspection/entry';
import type { Role } from '@/lib/inspection/roles';
import type { PushOutcome } from '@/lib/inspection/wire';
import type { Pour } from '@/db/stores/pour-store';
import type { Person } from '@/db/stores/session-store';
import type { Tx } from '@/db/connection';
import { takeIn } from './append-entries';
import { OpenRecord } from './open-record';

export interface OnlineEntry {
  type: string;
  body: Record<string, unknown>;
  /** Head of the pour that the person had on the screen; the head as of now unless told. */
  seenSeq?: number;
}

/**
 * Records one entry that a person makes online, in the office: it is taken in like a device's, its session standing
 * for the device.
 * @returns the entry's id
 * @throws AppError with the field when it is refused
 */
export async function recordOnline(
  tx: Tx,
  by: { person: Person; role: Role },
  pour: Pick<Pour, 'id' | 'projectId'>,
  made: OnlineEntry,
  now: string,
): Promise<string> {
  const record = await OpenRecord.open(tx, pour.projectId, { id: by.person.id, role: by.role }, now);
  await record.load([pour.id]);
  const sheet = record.sheet(pour.id);
  const id = uuid();
  const envelope = {
    id,
    projectId: pour.projectId,
    pourId: pour.id,
    type: made.type,
    v: ENTRY_VERSION,
    body: made.body,
    planRevision: sheet.plan.revision,
    authorId: by.person.id,
    deviceId: by.person.sessionId,
    deviceSeq: record.nextSeq,
    recordedAt: now,
    clockOffsetMs: 0,
    seenSeq: Math.min(made.seenSeq ?? sheet.headSeq, sheet.headSeq),
  };
  const sender = {
    projectId: pour.projectId,
    authorId: by.person.id,
    role: by.role,
    from: 'office',
  } as const;
  const [outcome] = await takeIn(record, sender, [envelope]);
  if (outcome?.outcome !== 'kept') throw refusalAsError(outcome);
  await record.close();
  return id;
}

const codes: Partial<Record<string, ErrorCode>> = { 'not-found': 'not-found', 'not-allowed': 'not-allowed' };

function refusalAsError(outcome: PushOutcome | undefined): AppError {
  if (outcome?.outcome !== 'refused') return new AppError('internal');
  const fields = outcome.field ? [{ path: `body.${outcome.field}`, message: outcome.sentence }] : [];
  return new AppError(codes[outcome.code] ?? 'invalid', outcome.sentence, { fields });
}
