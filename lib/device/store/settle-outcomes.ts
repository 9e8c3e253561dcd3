import type { RecordedEntry } from '@/lib/inspection/sheet';
import type { PushOutcome } from '@/lib/inspection/wire';
import { allOrNothing } from './all-or-nothing';
import { deleteMany, getMany } from './many-keys';
import type { OutboxRecord, PersonDatabase, PhotoRecord, RefusedRecord } from './person-database';

/** What the server's answers changed here. */
export interface Settled {
  /** Entries still kept here that have their receipt now. */
  confirmed: RecordedEntry[];
  /** Ids taken out of the outbox because the server holds them. */
  confirmedIds: string[];
  refused: RefusedRecord[];
  /** Photos that lost their entry to a refusal. */
  photos: PhotoRecord[];
  /** The server says that somebody else is signed in: everything stays. */
  otherAuthor: boolean;
}

/**
 * Takes out of the outbox what an answer names, and nothing else: kept and known entries get their receipt, refused
 * ones go to the tray with their reason, all in one transaction. (SPEC 7, 8, 9, 11)
 */
export async function settleOutcomes(
  db: PersonDatabase,
  sent: readonly OutboxRecord[],
  outcomes: readonly PushOutcome[],
  at: string,
): Promise<Settled> {
  const settled: Settled = { confirmed: [], confirmedIds: [], refused: [], photos: [], otherAuthor: false };
  const bySent = new Map(sent.map((record) => [record.id, record]));
  const tx = db.transaction(['outbox', 'entries', 'acked', 'refused', 'photos'], 'readwrite', {
    durability: 'strict',
  });
  await allOrNothing(tx, async () => {
    const entries = tx.objectStore('entries');
    const photos = tx.objectStore('photos');
    const [kept, photosOf] = await Promise.all([
      getMany(
        entries,
        outcomes.map(({ id }) => id),
      ),
      Promise.all(
        outcomes.map(({ id }) => {
          const photoId = photoIdOf(bySent.get(id));
          return photoId === null ? undefined : photos.get(photoId);
        }),
      ),
    ]);
    const writes: Promise<unknown>[] = [];
    const settledIds: string[] = [];
    outcomes.forEach((outcome, index) => {
      const record = bySent.get(outcome.id);
      if (!record) return;
      if (outcome.outcome === 'refused' && outcome.code === 'wrong-author') {
        settled.otherAuthor = true;
        return;
      }
      bySent.delete(outcome.id);
      settledIds.push(record.id);
      if (outcome.outcome === 'refused') {
        const refused: RefusedRecord = {
          id: record.id,
          deviceSeq: record.deviceSeq,
          envelope: record.envelope,
          code: outcome.code,
          sentence: outcome.sentence,
          field: outcome.field ?? null,
          at,
        };
        settled.refused.push(refused);
        writes.push(tx.objectStore('refused').put(refused), entries.delete(record.id));
        const photo = photosOf[index];
        if (photo) {
          const without: PhotoRecord = { ...photo, progress: 'refused', problem: outcome.sentence };
          settled.photos.push(without);
          writes.push(photos.put(without));
        }
        return;
      }
      settled.confirmedIds.push(record.id);
      const here = kept.get(record.id);
      if (here) {
        const entry = { ...here.entry, ...outcome.receipt };
        settled.confirmed.push(entry);
        writes.push(entries.put({ ...here, entry }));
      }
      // Offered a second time and known after all: it is there, whatever a pull shows of it.
      if (record.offeredAgain && outcome.outcome === 'known') return;
      writes.push(
        tx.objectStore('acked').put({ id: record.id, stream: record.stream, seq: outcome.receipt.seq }),
      );
    });
    await Promise.all([deleteMany(tx.objectStore('outbox'), settledIds), ...writes]);
  });
  return settled;
}

function photoIdOf(record: OutboxRecord | undefined): string | null {
  const photoId = record?.envelope.type === 'photo' ? record.envelope.body.photoId : null;
  return typeof photoId === 'string' ? photoId : null;
}
