import { expect } from '@playwright/test';

interface Mail {
  to: string;
  subject: string;
  text: string;
}

/** Mail that the sink was given about a pour, newest first. */
export async function mailAbout(pour: string): Promise<Mail[]> {
  const answer = await fetch(`${process.env.E2E_MAIL}/messages.json`);
  const all = (await answer.json()) as Mail[];
  return all.filter((mail) => mail.subject.startsWith(`${pour} `));
}

/** Waits until a mail about the pour has reached a person whose subject says so, and gives it back. */
export async function mailArrives(pour: string, subject: RegExp, to: string): Promise<Mail> {
  let found: Mail | undefined;
  await expect
    .poll(async () => {
      const mails = await mailAbout(pour);
      found = mails.find((mail) => subject.test(mail.subject) && mail.to.includes(to));
      return found ? 'arrived' : mails.map((mail) => `${mail.to}: ${mail.subject}`);
    })
    .toBe('arrived');
  return found!;
}
