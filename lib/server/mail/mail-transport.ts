import { createTransport, type Transporter } from 'nodemailer';
import { environment } from '../environment';

let transport: Transporter | null = null;

export interface Mail {
  to: string;
  subject: string;
  text: string;
  /** Stable for one event and one recipient: a job that is tried again sends the same message, not another. */
  messageId: string;
}

/** Sends one message. @throws when the mail server does not take it; the job is then tried again */
export async function sendMail(mail: Mail): Promise<void> {
  transport ??= createTransport(environment().SMTP_URL);
  await transport.sendMail({ from: environment().MAIL_FROM, ...mail });
}
