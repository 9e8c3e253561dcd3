import { admitEntry } from '@/lib/inspection/admit-entry';
import type { Entry, EntryEnvelope, Receipt } from '@/lib/inspection/entry';
import type { Sheet } from '@/lib/inspection/sheet-types';
import type { PushOutcome } from '@/lib/inspection/wire';
import { entriesByIds, type SealedEntry } from '@/db/stores/entry-store';
import { assignedPourIds, openPourIds } from '@/db/stores/pour-store';
import type { Tx } from '@/db/connection';
import { canonical, envelopeOf } from './entry-hash';
import { OpenRecord } from './open-record';
import { receiveEntry, type Received, type Refused, type Sender } from './receive-entry';
import { introducedIds, referredIds } from './referred-ids';

/**
 * Takes entries into the record: the only way in. Each is answered `kept`, `known` (it was kept before) or `refused`
 * with a reason; one that cannot be kept never takes another down with it, except those that depend on it.
 * @param raw entries as they came, not looked at yet
 * @param now the server's clock, ISO 8601
 */
export async function appendEntries(
  tx: Tx,
  sender: Sender,
  raw: readonly unknown[],
  now: string,
): Promise<PushOutcome[]> {
  const record = await OpenRecord.open(tx, sender.projectId, { id: sender.authorId, role: sender.role }, now);
  const outcomes = await takeIn(record, sender, raw);
  await record.close();
  return outcomes;
}

/** Takes entries into a record that is open already; the caller closes it. */
export async function takeIn(
  record: OpenRecord,
  sender: Sender,
  raw: readonly unknown[],
): Promise<PushOutcome[]> {
  const received = raw.map((one) => receiveEntry(one, sender));
  const known = new Map(
    (await entriesByIds(record.tx, record.projectId, idsOf(received))).map((entry) => [entry.id, entry]),
  );
  await loadTouched(record, sender, received, known);
  const intake: Intake = { record, sender, known, refusedIds: new Set(), unfolded: new Map() };
  return received.map((one) => answer(intake, one));
}

interface Intake {
  record: OpenRecord;
  sender: Sender;
  /** Entries in the record by id, those of this batch included as they are sealed. */
  known: Map<string, SealedEntry>;
  /** Ids that refused entries would have introduced. */
  refusedIds: Set<string>;
  /** By pour, ids sealed since it was last folded: an entry that names one has to be judged in sight of it. */
  unfolded: Map<string, Set<string>>;
}

const idsOf = (received: readonly Received[]) =>
  received.flatMap(({ envelope }) => (envelope ? [envelope.id] : []));

async function loadTouched(
  record: OpenRecord,
  sender: Sender,
  received: readonly Received[],
  known: ReadonlyMap<string, SealedEntry>,
): Promise<void> {
  const fresh = received.flatMap((one) =>
    one.kind === 'received' && !known.has(one.envelope.id) ? [one.envelope] : [],
  );
  const pourIds = new Set(fresh.flatMap(({ pourId }) => (pourId === null ? [] : [pourId])));
  if (fresh.some(({ pourId }) => pourId === null)) {
    await record.loadProjectStream();
    for (const pourId of await openPourIds(record.tx, record.projectId)) pourIds.add(pourId);
  }
  if (sender.role === 'crew' && pourIds.size > 0) {
    const assigned = await assignedPourIds(record.tx, record.projectId, sender.authorId);
    for (const pourId of pourIds) if (!assigned.has(pourId)) pourIds.delete(pourId);
  }
  if (pourIds.size > 0) await record.load([...pourIds]);
}

function answer(intake: Intake, received: Received): PushOutcome {
  const earlier = received.envelope && intake.known.get(received.envelope.id);
  if (earlier) return answerKnown(earlier, received.envelope);
  if (received.kind === 'refused') return refuse(intake, received.refused, [received.refused.id]);

  const { envelope, entry } = received;
  const refusal = refusalOf(intake, received);
  if (refusal) return refuse(intake, { id: envelope.id, ...refusal }, introducedIds(entry));
  const sealed = intake.record.seal(envelope, intake.sender.role);
  intake.known.set(envelope.id, sealed);
  noteUnfolded(intake, entry);
  return { id: envelope.id, outcome: 'kept', receipt: receiptOf(sealed) };
}

/** The same content again is the same entry, delivered twice; other content under its id is refused. */
function answerKnown(earlier: SealedEntry, again: EntryEnvelope | null): PushOutcome {
  if (again && canonical(envelopeOf(earlier)) === canonical(envelopeOf(again)))
    return { id: earlier.id, outcome: 'known', receipt: receiptOf(earlier) };
  const sentence = 'Another entry with this id is in the record already.';
  return { id: earlier.id, outcome: 'refused', code: 'id-reused', sentence };
}

function refusalOf(
  intake: Intake,
  { envelope, entry }: Extract<Received, { kind: 'received' }>,
): Omit<Refused, 'id'> | null {
  const named = referredIds(envelope.body);
  if ([...named].some((one) => intake.refusedIds.has(one) && !intake.known.has(one))) {
    return { code: 'depends-on-refused', sentence: 'It rests on another entry that was refused.' };
  }
  const { pourId } = envelope;
  if (pourId === null) return null;
  if (!intake.record.has(pourId)) return { code: 'not-found', sentence: 'This pour is not among yours.' };
  return admitEntry(entry, sheetFor(intake, pourId, named));
}

function noteUnfolded({ unfolded }: Intake, entry: Entry): void {
  if (entry.pourId === null) return;
  const ids = unfolded.get(entry.pourId) ?? new Set();
  for (const id of introducedIds(entry)) ids.add(id);
  unfolded.set(entry.pourId, ids);
}

/**
 * The sheet to judge an entry by. Folding after each entry of a batch would cost as much as the batch is long, so the
 * sheet is only brought up to date for an entry that names one sealed since.
 */
function sheetFor({ record, unfolded }: Intake, pourId: string, named: ReadonlySet<string>): Sheet {
  const waiting = unfolded.get(pourId);
  if (!waiting || ![...named].some((id) => waiting.has(id))) return record.sheetAsFolded(pourId);
  unfolded.delete(pourId);
  return record.sheet(pourId);
}

function refuse(intake: Intake, refused: Refused, introduced: readonly string[]): PushOutcome {
  for (const id of introduced) if (id) intake.refusedIds.add(id);
  return { outcome: 'refused', ...refused };
}

const receiptOf = ({ seq, receivedAt, authorRole, prevHash, hash }: SealedEntry): Receipt => ({
  seq,
  receivedAt,
  authorRole,
  prevHash,
  hash,
});
