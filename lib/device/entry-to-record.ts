import { ENTRY_VERSION, type BodyOf } from '@/lib/inspection/entry';
import { bodies } from '@/lib/inspection/entry-bodies';
import type { RecordedEntry } from '@/lib/inspection/sheet';
import type { Role } from '@/lib/inspection/roles';
import { DeviceError, type DeviceEntryType } from './device-types';

/** Where an entry goes: a pour's stream, or the project's own. */
export interface EntryPlace {
  projectId: string;
  pourId: string | null;
}

/** What the device knows at the moment of recording. */
export interface RecordingMoment {
  id: string;
  authorId: string;
  authorRole: Role;
  deviceId: string;
  now: number;
  clockOffsetMs: number | null;
  planRevision: number;
  seenSeq: number;
}

/**
 * The body by the schema of its type, trimmed as the server would keep it.
 * @throws DeviceError `invalid` with the fields
 */
export function checkedBody<T extends DeviceEntryType>(type: T, body: BodyOf<T>): RecordedEntry['body'] {
  const result = bodies[type].safeParse(body);
  if (!result.success) {
    throw new DeviceError(
      'invalid',
      'This cannot be saved as it is. See the fields named.',
      result.error.issues.map((issue) => ({ path: issue.path.join('.'), message: issue.message })),
    );
  }
  // A round trip through JSON: what is kept here is, to the letter, what is sent (no `undefined`).
  return JSON.parse(JSON.stringify(result.data)) as RecordedEntry['body'];
}

/** The entry as it is recorded here; it has no receipt until the server has taken it in. */
export function entryToRecord(
  place: EntryPlace,
  type: DeviceEntryType,
  body: RecordedEntry['body'],
  moment: RecordingMoment,
  deviceSeq: number,
): RecordedEntry {
  return {
    id: moment.id,
    projectId: place.projectId,
    pourId: place.pourId,
    type,
    v: ENTRY_VERSION,
    body,
    planRevision: moment.planRevision,
    authorId: moment.authorId,
    deviceId: moment.deviceId,
    deviceSeq,
    recordedAt: new Date(moment.now).toISOString(),
    clockOffsetMs: moment.clockOffsetMs,
    seenSeq: moment.seenSeq,
    authorRole: moment.authorRole,
  };
}
