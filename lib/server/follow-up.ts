import type { Entry } from '@/lib/inspection/entry';
import { readOnce } from '@/lib/inspection/facts';
import type { Hold } from '@/lib/inspection/sheet-types';
import type { SealedEntry } from '@/db/stores/entry-store';
import { insertPhotos } from '@/db/stores/photo-store';
import { registerDrawing, registerInstrument, registerMix } from '@/db/stores/register-store';
import { markVoids } from '@/db/stores/release-store';
import type { Tx } from '@/db/connection';
import { enqueueJob, type MailPayload } from './jobs/enqueue-job';

/** Kinds of hold that somebody has to be told of; what is merely not done yet is no news. */
const news: ReadonlySet<Hold['kind']> = new Set([
  'cover-not-met',
  'measurement-out',
  'bar-departs',
  'check-not-met',
  'conflict',
  'nonconformance-open',
  'manual',
]);

/**
 * What newly written entries mean outside of the record: rows beside them, and mail.
 * @param newHolds by pour, the holds that were not there before
 */
export async function followUp(
  tx: Tx,
  projectId: string,
  sealed: readonly SealedEntry[],
  newHolds: ReadonlyMap<string, readonly Hold[]>,
): Promise<void> {
  const entries = sealed.flatMap((one) => {
    const read = readOnce(one);
    return read.kind === 'known' ? [read.entry] : [];
  });
  await insertPhotos(tx, projectId, entries.flatMap(photoOf));
  await markVoids(
    tx,
    projectId,
    entries.flatMap((entry) =>
      entry.type === 'release-void'
        ? [
            {
              releaseId: entry.body.releaseId,
              voidEntryId: entry.id,
              at: entry.body.at,
              reason: entry.body.reason,
            },
          ]
        : [],
    ),
  );
  for (const entry of entries) await register(tx, projectId, entry);
  for (const mail of mailsFor(projectId, entries, newHolds)) await enqueueJob(tx, 'mail', mail);
}

function photoOf(entry: Entry) {
  if (entry.type !== 'photo' || entry.pourId === null) return [];
  const { photoId, sha256, bytes, contentType } = entry.body;
  return [
    {
      id: photoId,
      pourId: entry.pourId,
      entryId: entry.id,
      authorId: entry.authorId,
      sha256,
      bytes,
      contentType,
    },
  ];
}

async function register(tx: Tx, projectId: string, entry: Entry): Promise<void> {
  if (entry.type === 'instrument-status') await registerInstrument(tx, projectId, entry.body);
  if (entry.type === 'drawing-received') await registerDrawing(tx, projectId, entry.body);
  if (entry.type === 'mix-changed') await registerMix(tx, projectId, entry.body, entry.recordedAt);
}

/** The mails that these entries ask for: one for each decision, and one for all new holds of a pour together. */
export function mailsFor(
  projectId: string,
  entries: readonly Entry[],
  newHolds: ReadonlyMap<string, readonly Hold[]>,
): MailPayload[] {
  const mails: MailPayload[] = [];
  for (const entry of entries) {
    const kind = mailKind(entry);
    if (kind && entry.pourId !== null)
      mails.push({ kind, projectId, pourId: entry.pourId, entryId: entry.id });
  }
  for (const [pourId, holds] of newHolds) {
    if (!holds.some((hold) => news.has(hold.kind))) continue;
    const cause = causeOfHold(entries.filter((entry) => entry.pourId === pourId));
    if (cause) mails.push({ kind: 'hold', projectId, pourId, entryId: cause.id });
  }
  return mails;
}

function mailKind(entry: Entry): MailPayload['kind'] | null {
  switch (entry.type) {
    case 'nonconformance':
      return entry.body.proposal === '' ? null : 'disposition-asked';
    case 'disposition':
      return 'decided';
    case 'release':
      return 'released';
    case 'release-void':
      return 'void';
    case 'placing-without-release':
      return 'hold';
    default:
      return null;
  }
}

/** What brings a hold about that is news, what was raised on purpose first. */
const causes: readonly Entry['type'][] = ['nonconformance', 'hold', 'reading', 'measurement', 'answer'];

/** The entry that a mail about new holds names. */
function causeOfHold(entries: readonly Entry[]): Entry | undefined {
  for (const type of causes) {
    const cause = entries.find((entry) => entry.type === type);
    if (cause) return cause;
  }
  return undefined;
}
