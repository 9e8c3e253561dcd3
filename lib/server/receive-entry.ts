import type { z } from 'zod';
import {
  ENTRY_VERSION,
  entryEnvelope,
  isEntryType,
  officeEntryTypes,
  projectEntryTypes,
  readEntry,
  serverEntryTypes,
  type Entry,
  type EntryEnvelope,
} from '@/lib/inspection/entry';
import { mayRecord } from '@/lib/inspection/entry-access';
import type { Role } from '@/lib/inspection/roles';
import type { refusalCodes } from '@/lib/inspection/wire';
import { unstorable } from './storable';

export type Refused = {
  id: string;
  code: (typeof refusalCodes)[number];
  sentence: string;
  field?: string;
};
/** What was refused may be in the record already (kept before its author's role changed): the envelope tells. */
export type Received =
  | { kind: 'received'; envelope: EntryEnvelope; entry: Entry }
  | { kind: 'refused'; envelope: EntryEnvelope | null; refused: Refused };

/** Whose entries are taken in, and by what way they came. */
export interface Sender {
  projectId: string;
  authorId: string;
  role: Role;
  /** A device queues what people on site record; the office records online and may decide. */
  from: 'device' | 'office';
}

/** Signed drawings are the largest bodies there are: 60 strokes. */
const MOST_BYTES = 600_000;
const EARLIEST = '1970-01-01T00:00:00.000Z';
const MOST_REVISION = 1_000_000;

/**
 * Looks at one entry by itself: can it be read, is it its sender's, may it be kept. What it refers to is judged
 * later, against the sheet.
 */
export function receiveEntry(raw: unknown, sender: Sender): Received {
  const id = idOf(raw);
  let envelope: EntryEnvelope | null = null;
  const refuse = (code: Refused['code'], sentence: string, field?: string): Received => ({
    kind: 'refused',
    envelope,
    refused: { id, code, sentence, ...(field === undefined ? {} : { field }) },
  });

  const bad = unstorable(raw);
  if (bad) return refuse('invalid', bad);
  const parsed = entryEnvelope.safeParse(raw);
  if (!parsed.success) return refuse('invalid', ...firstIssue(parsed.error));
  envelope = parsed.data;
  if (JSON.stringify(envelope.body).length > MOST_BYTES)
    return refuse('invalid', 'This entry is too large.', 'body');
  if (envelope.recordedAt < EARLIEST)
    return refuse('invalid', 'The device clock is set before 1970.', 'recordedAt');
  if (envelope.planRevision > MOST_REVISION)
    return refuse('invalid', 'There is no such revision.', 'planRevision');

  if (envelope.projectId !== sender.projectId)
    return refuse('not-found', 'This project is not the one it was sent to.');
  if (envelope.authorId !== sender.authorId)
    return refuse('wrong-author', 'It was recorded by somebody else, and is only taken from its author.');
  if (!isEntryType(envelope.type) || envelope.v > ENTRY_VERSION)
    return refuse('too-new', 'The server does not know this kind of entry yet. It stays on the device.');
  if (includes(serverEntryTypes, envelope.type))
    return refuse('server-only', 'Entries of this kind are written by the server alone.');
  if (sender.from === 'device' && includes(officeEntryTypes, envelope.type))
    return refuse('not-allowed', 'This is decided online, in the office.');
  if (includes(projectEntryTypes, envelope.type) !== (envelope.pourId === null))
    return refuse('invalid', 'It belongs to another stream of the record.', 'pourId');
  if (!mayRecord(envelope.type, sender.role))
    return refuse('not-allowed', 'Your role in this project does not record this.');

  const read = readEntry({ ...envelope, authorRole: sender.role });
  if (read.kind === 'invalid') {
    const issue = read.issues[0];
    return refuse('invalid', issue?.message ?? 'It cannot be read.', issue?.path);
  }
  if (read.kind === 'unknown') return refuse('too-new', 'The server does not know this kind of entry yet.');
  return { kind: 'received', envelope, entry: read.entry };
}

/** The id under which an answer can be given at all; an entry without one is answered under an empty id. */
function idOf(raw: unknown): string {
  const id = raw !== null && typeof raw === 'object' && 'id' in raw ? raw.id : null;
  return typeof id === 'string' && id.length <= 80 ? id : '';
}

function firstIssue(error: z.ZodError): [sentence: string, field: string] {
  const issue = error.issues[0];
  return [issue?.message ?? 'It cannot be read.', issue?.path.join('.') ?? ''];
}

const includes = (types: readonly string[], type: string) => types.includes(type);
