import { mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:http';
import path from 'node:path';
import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

/** A mail server for this machine that delivers nowhere: it keeps what it is given, and shows it on a page. */
export interface MailSinkOptions {
  smtpPort: number;
  webPort: number;
  folder: string;
}

export interface KeptMail {
  id: string;
  at: string;
  from: string;
  to: string;
  subject: string;
  text: string;
}

const escape = (text: string) => text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`);
const page = (title: string, body: string) =>
  `<!doctype html><html lang="en"><meta charset="utf-8"><meta name="viewport" content="width=device-width"><title>${escape(title)}</title>
<style>body{font:16px/1.5 system-ui,sans-serif;max-width:52rem;margin:2rem auto;padding:0 1rem;color:#16201f;background:#fbf9f3}table{border-collapse:collapse;width:100%}td,th{text-align:left;padding:.4rem .6rem;border-bottom:1px solid #cfc9ba;vertical-align:top}pre{white-space:pre-wrap;border:1px solid #16201f;padding:1rem}</style>
<h1>${escape(title)}</h1>${body}</html>`;

/** Starts the sink and resolves once both of its ports listen. */
export async function startMailSink(
  options: MailSinkOptions,
): Promise<{ smtpPort: number; webPort: number; stop(): Promise<void> }> {
  mkdirSync(options.folder, { recursive: true });
  const all = (): KeptMail[] =>
    readdirSync(options.folder)
      .filter((name) => name.endsWith('.json'))
      .sort()
      .reverse()
      .map((name) => JSON.parse(readFileSync(path.join(options.folder, name), 'utf8')) as KeptMail);

  let taken = 0;
  const smtp = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    onData(stream, session, done) {
      void simpleParser(stream).then(
        (mail) => {
          const at = new Date().toISOString();
          const id = `${at.replaceAll(/[:.]/g, '-')}-${String((taken += 1)).padStart(4, '0')}`;
          const to = session.envelope.rcptTo.map((one) => one.address).join(', ');
          const kept: KeptMail = {
            id,
            at,
            from: mail.from?.text ?? '',
            to,
            subject: mail.subject ?? '',
            text: mail.text ?? '',
          };
          writeFileSync(path.join(options.folder, `${id}.json`), JSON.stringify(kept, null, 1));
          done();
        },
        (error: Error) => done(error),
      );
    },
  });

  const web = createServer((request, response) => {
    const url = new URL(request.url ?? '/', 'http://mail');
    const html = (status: number, body: string) =>
      response.writeHead(status, { 'Content-Type': 'text/html; charset=utf-8' }).end(body);
    if (request.method === 'DELETE') {
      for (const mail of all()) rmSync(path.join(options.folder, `${mail.id}.json`), { force: true });
      response.writeHead(204).end();
    } else if (url.pathname === '/messages.json') {
      response.writeHead(200, { 'Content-Type': 'application/json' }).end(JSON.stringify(all()));
    } else if (url.pathname.startsWith('/messages/')) {
      const mail = all().find(
        (one) => one.id === decodeURIComponent(url.pathname.slice('/messages/'.length)),
      );
      if (!mail) html(404, page('No such message', '<p><a href="/">All messages</a></p>'));
      else
        html(
          200,
          page(
            mail.subject,
            `<p><a href="/">All messages</a></p><p>To ${escape(mail.to)}<br>From ${escape(mail.from)}<br>${escape(mail.at)}</p><pre>${escape(mail.text).replace(/(https?:\/\/[^\s&]+)/g, '<a href="$1">$1</a>')}</pre>`,
          ),
        );
    } else {
      const rows = all().map(
        (mail) =>
          `<tr><td>${escape(mail.at.slice(0, 19).replace('T', ' '))}</td><td>${escape(mail.to)}</td><td><a href="/messages/${encodeURIComponent(mail.id)}">${escape(mail.subject)}</a></td></tr>`,
      );
      const table = `<table><thead><tr><th>Sent (UTC)</th><th>To</th><th>Subject</th></tr></thead><tbody>${rows.join('')}</tbody></table>`;
      html(
        200,
        page(
          'Mail of this machine',
          rows.length > 0 ? table : '<p>No mail yet. Messages appear here and go nowhere else.</p>',
        ),
      );
    }
  });

  const listening = (
    server: {
      listen(port: number, host: string, done: () => void): unknown;
      once?(event: 'error', fail: (error: Error) => void): unknown;
    },
    port: number,
  ) =>
    new Promise<void>((resolve, reject) => {
      server.once?.('error', reject);
      server.listen(port, '127.0.0.1', resolve);
    });
  await listening(smtp.server, options.smtpPort);
  await listening(web, options.webPort);
  const portOf = (address: ReturnType<typeof web.address>, wanted: number) =>
    typeof address === 'object' && address ? address.port : wanted;
  return {
    smtpPort: portOf(smtp.server.address(), options.smtpPort),
    webPort: portOf(web.address(), options.webPort),
    stop: async () => {
      await new Promise<void>((resolve) => smtp.close(resolve));
      await new Promise<void>((resolve) => {
        web.close(() => resolve());
        web.closeAllConnections();
      });
    },
  };
}
