import { AppError } from '@/lib/inspection/app-error';
import { holds } from '@/lib/inspection/holds';
import { readPourHeader } from '@/db/read/pour-header';
import { streamHead } from '@/db/stores/entry-store';
import { enterProject } from '@/db/stores/session-store';
import { database } from '@/db/connection';
import { environment } from '../environment';
import type { MailPayload } from '../jobs/enqueue-job';
import { loadSheet } from '../load-sheet';
import { composeMail, toldTo } from './compose-mail';
import { sendMail, type Mail } from './mail-transport';

/** Reads what a mail is about, and writes one message for each person who is told of it. */
async function messagesFor(payload: MailPayload, now: string): Promise<Mail[]> {
  return database().transaction(async (tx) => {
    await enterProject(tx, payload.projectId);
    const header = await readPourHeader(tx, payload.pourId, now);
    const sheet = await loadSheet(tx, payload.pourId);
    const entry = sheet.entries.find((one) => one.id === payload.entryId);
    if (!header || !entry) throw new AppError('not-found');
    const people = new Map(header.people.map((person) => [person.id, person]));
    const releaseId = entry.type === 'release-void' ? entry.body.releaseId : entry.id;
    const { subject, text } = composeMail({
      kind: payload.kind,
      entry,
      pour: header.pour,
      project: header.project,
      sheet,
      holds: holds(sheet, now),
      nameOf: (id) => people.get(id)?.name ?? 'somebody',
      releaseToken: header.releases.find((release) => release.releaseId === releaseId)?.token ?? null,
      headHash: (await streamHead(tx, payload.projectId, payload.pourId)).hash,
      appUrl: environment().APP_URL,
    });
    const host = new URL(environment().APP_URL).hostname;
    return header.people
      .filter((person) => person.active && toldTo[payload.kind].includes(person.role))
      .map((person) => ({
        to: person.email,
        subject,
        text,
        messageId: `<${payload.entryId}.${payload.kind}.${person.id}@${host}>`,
      }));
  });
}

/**
 * Sends the mails of one event. Each recipient's message has an id of its own that does not change when the job is
 * tried again.
 * @param sent notes recipients as they are served, so that a retry within this process starts where it broke off
 */
export async function sendEventMail(payload: MailPayload, now: string, sent: Set<string>): Promise<number> {
  const messages = (await messagesFor(payload, now)).filter((mail) => !sent.has(mail.messageId));
  for (const mail of messages) {
    await sendMail(mail);
    sent.add(mail.messageId);
  }
  return messages.length;
}
