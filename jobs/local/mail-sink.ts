import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { simpleParser, type ParsedMail } from 'mailparser';
import { SMTPServer } from 'smtp-server';
import { mailPage, mailsPage, type StoredMail } from './mail-sink-pages';

/**
 * A mail server of this machine's own: it speaks SMTP, keeps what it gets as .eml files and shows it on a page.
 * Nothing leaves the machine. Used by the demo school and the browser tests.
 */
const SMTP_PORT = Number(process.env.SMTP_PORT ?? 2525);
const PAGE_PORT = Number(process.env.MAIL_SINK_PORT ?? 8025);
const FOLDER = process.env.MAIL_SINK_FOLDER ?? 'var/mail';

mkdirSync(FOLDER, { recursive: true });
let sequence = readdirSync(FOLDER).length;

const smtp = new SMTPServer({
  disabledCommands: ['AUTH', 'STARTTLS'],
  size: 10 * 1024 * 1024,
  onData(stream, _session, callback) {
    const chunks: Buffer[] = [];
    stream.on('data', (chunk: Buffer) => chunks.push(chunk));
    stream.on('end', () => {
      sequence += 1;
      writeFileSync(path.join(FOLDER, `${String(sequence).padStart(6, '0')}.eml`), Buffer.concat(chunks));
      callback();
    });
  },
});

async function storedMails(): Promise<StoredMail[]> {
  const names = readdirSync(FOLDER).filter((name) => name.endsWith('.eml')).sort().reverse().slice(0, 200);
  return Promise.all(names.map(async (name) => ({ id: name.replace('.eml', ''), mail: await simpleParser(readFileSync(path.join(FOLDER, name))) })));
}

async function answer(request: IncomingMessage, response: ServerResponse): Promise<void> {
  const { pathname, searchParams } = new URL(request.url ?? '/', 'http://127.0.0.1');
  const mails = await storedMails();
  const html = (body: string) => response.writeHead(200, { 'Content-Type': 'text/html; charset=utf-8', 'Content-Security-Policy': "default-src 'none'; style-src 'unsafe-inline'" }).end(body);
  if (pathname === '/health') return void response.writeHead(200).end('ok');
  if (pathname === '/api/mails') {
    const to = searchParams.get('to')?.toLowerCase();
    const list = mails.map(({ id, mail }) => ({ id, to: addressOf(mail), subject: mail.subject ?? '', text: mail.text ?? '', messageId: mail.messageId ?? '',
      attachments: mail.attachments.map(({ filename, contentType, content }) => ({ filename, contentType, content: content.toString('utf8') })) }));
    return void response.writeHead(200, { 'Content-Type': 'application/json' }).end(JSON.stringify(list.filter((mail) => !to || mail.to === to)));
  }
  const found = mails.find(({ id }) => pathname === `/mail/${id}`);
  html(found ? mailPage(found) : mailsPage(mails));
}

function addressOf(mail: ParsedMail): string {
  const first = Array.isArray(mail.to) ? mail.to[0] : mail.to;
  return first?.value[0]?.address?.toLowerCase() ?? '';
}

smtp.listen(SMTP_PORT, '127.0.0.1');
const pages = createServer((request, response) => void answer(request, response).catch(() => response.writeHead(500).end()));
pages.listen(PAGE_PORT, '127.0.0.1');

for (const signal of ['SIGINT', 'SIGTERM'] as const) {
  process.on(signal, () => {
    smtp.close();
    pages.close();
    process.exit(0);
  });
}
