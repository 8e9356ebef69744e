import 'server-only';
import nodemailer, { type Transporter } from 'nodemailer';
import type { MailAttachment, OutboxRow } from '@/db/outbox';
import { env } from '@/lib/server/env';
import { strictAddress } from '../address';

let shared: Transporter | undefined;

function transporter(): Transporter {
  const { SMTP_HOST: host, SMTP_PORT: port, SMTP_SECURE: secure, SMTP_USER: user, SMTP_PASSWORD: pass } = env();
  shared ??= nodemailer.createTransport({
    host, port, secure, auth: user ? { user, pass } : undefined, connectionTimeout: 10_000, socketTimeout: 20_000,
    disableFileAccess: true, disableUrlAccess: true,
  });
  return shared;
}

type Mail = Pick<OutboxRow, 'id' | 'toName' | 'toAddress' | 'subject' | 'bodyText' | 'bodyHtml' | 'attachmentsJson'>;

/** Hands one mail to the mail server. The same row always carries the same Message-ID, so a repeat is known as one. */
export async function sendMail(mail: Mail, fromName: string): Promise<void> {
  const address = strictAddress(mail.toAddress);
  if (!address) throw new Error('the address is not usable');
  const from = env().MAIL_FROM;
  const attachments = (JSON.parse(mail.attachmentsJson) as MailAttachment[]).map(({ filename, contentType, content }) => ({ filename, contentType, content }));
  await transporter().sendMail({
    from: { name: fromName, address: from }, to: { name: mail.toName, address }, subject: mail.subject, text: mail.bodyText,
    html: mail.bodyHtml === '' ? undefined : mail.bodyHtml, attachments, messageId: `<${mail.id}@${from.split('@')[1] ?? 'rungwell'}>`,
  });
}
