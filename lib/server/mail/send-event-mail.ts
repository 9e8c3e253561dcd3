import { AppError } from '@/lib/inspection/app-error';
import { holds } from '@/lib/inspection/holds';
import { readPourHeader } from '@/db/read/pour-header';
import { readProjectPeople, type ProjectPerson } from '@/db/read/project-people';
import { streamHead } from '@/db/stores/entry-store';
import { enterProject } from '@/db/stores/session-store';
import { database, type Tx } from '@/db/connection';
import { environment } from '../environment';
import { enqueueJob, type MailPayload } from '../jobs/enqueue-job';
import { loadSheet } from '../load-sheet';
import { composeMail, toldTo } from './compose-mail';
import { sendMail, type Mail } from './mail-transport';

/** Who is told of such an event now: those of the project who may still sign in, by their role. */
const told = (people: readonly ProjectPerson[], kind: MailPayload['kind']): ProjectPerson[] =>
  people.filter((person) => person.active && toldTo[kind].includes(person.role));

/**
 * Job: tells of one event. Without a person it adds a job for everybody who is to be told, all of them or none; so that
 * a message that cannot be sent is tried again by itself, and nobody who has theirs gets it twice.
 * @returns what was done, in words for the log
 */
export async function sendEventMail(payload: MailPayload, now: string): Promise<string> {
  const { personId } = payload;
  if (personId === undefined) return `told ${await tellEach(payload)}`;
  // Read in a transaction that is over before the network is waited for.
  const mail = await inProject(payload, (tx) => messageFor(tx, { ...payload, personId }, now));
  if (!mail) return 'no longer to be told';
  await sendMail(mail);
  return 'sent';
}

const inProject = <T>({ projectId }: MailPayload, work: (tx: Tx) => Promise<T>): Promise<T> =>
  database().transaction(async (tx) => {
    await enterProject(tx, projectId);
    return work(tx);
  });

function tellEach(payload: MailPayload): Promise<number> {
  return inProject(payload, async (tx) => {
    const people = told(await readProjectPeople(tx, payload.projectId), payload.kind);
    for (const person of people) {
      const key = `${payload.entryId}.${payload.kind}.${person.id}`;
      await enqueueJob(tx, 'mail', { ...payload, personId: person.id }, key);
    }
    return people.length;
  });
}

/** Reads what the mail is about and writes it for this person; null when they are not to be told any more. */
async function messageFor(
  tx: Tx,
  { kind, projectId, pourId, entryId, personId }: MailPayload & { personId: string },
  now: string,
): Promise<Mail | null> {
  const header = await readPourHeader(tx, pourId, now);
  const sheet = await loadSheet(tx, pourId);
  const entry = sheet.entries.find((one) => one.id === entryId);
  if (!header || !entry) throw new AppError('not-found');
  const person = told(header.people, kind).find((one) => one.id === personId);
  if (!person) return null;
  const names = new Map(header.people.map((one) => [one.id, one.name]));
  const releaseId = entry.type === 'release-void' ? entry.body.releaseId : entry.id;
  const appUrl = environment().APP_URL;
  const { subject, text } = composeMail({
    kind,
    entry,
    pour: header.pour,
    project: header.project,
    sheet,
    holds: holds(sheet, now),
    nameOf: (id) => names.get(id) ?? 'somebody',
    releaseToken: header.releases.find((release) => release.releaseId === releaseId)?.token ?? null,
    headHash: (await streamHead(tx, projectId, pourId)).hash,
    appUrl,
  });
  const messageId = `<${entryId}.${kind}.${personId}@${new URL(appUrl).hostname}>`;
  return { to: person.email, subject, text, messageId };
}
