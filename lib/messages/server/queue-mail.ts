import 'server-only';
import type { Trx } from '@/db/connection';
import { findRecipient } from '@/db/recipients';
import { insertMail, type MailAttachment } from '@/db/outbox';
import type { School } from '@/db/school';
import { newId } from '@/lib/server/ids';
import type { EpochSeconds } from '@/lib/time';
import { strictAddress, strictName } from '../address';
import { htmlMail, plainMail } from '../mail-layout';
import { TOPICS, type Topic } from '../topics';

export type Mail = {
  topic: Topic;
  /** topic + subject + recipient + version, so that nobody is told twice. */
  key: string;
  subjectRef: string;
  subject: string;
  lines: readonly string[];
  link?: { label: string; url: string };
  footer?: string;
  attachments?: MailAttachment[];
  /** It waits in the outbox until then; what may still be taken back is not told yet. */
  notBefore?: EpochSeconds;
};

/** A person of the school, or somebody who only gave a name and an address. */
export type MailTo = { personId: string } | { name: string; address: string };
type Moment = { now: EpochSeconds; school: Pick<School, 'name'> };

/**
 * Puts a mail into the outbox in the same transaction as its cause; the worker sends it. Answers false, and
 * sends nothing, when the person has no usable address, switched the topic off, or was told already.
 */
export async function queueMail(trx: Trx, { now, school }: Moment, to: MailTo, mail: Mail): Promise<boolean> {
  const recipient = 'personId' in to ? await findRecipient(trx, to.personId, mail.topic) : { ...to, personId: null, wantsTopic: true };
  const address = recipient ? strictAddress(recipient.address) : null;
  if (!recipient || !address) return false;
  if (!recipient.wantsTopic && !TOPICS[mail.topic].always) return false;
  const text = { schoolName: school.name, greeting: `Dear ${strictName(recipient.name)},`, lines: mail.lines, link: mail.link, footer: mail.footer };
  return insertMail(trx, {
    id: newId(), key: mail.key, topic: mail.topic, subjectRef: mail.subjectRef, recipientId: recipient.personId, toName: strictName(recipient.name),
    toAddress: address, subject: mail.subject, bodyText: plainMail(text), bodyHtml: htmlMail(text), attachments: mail.attachments, createdAt: now, nextTryAt: mail.notBefore ?? 0,
  });
}
