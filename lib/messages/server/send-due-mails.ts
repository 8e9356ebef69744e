import 'server-only';
import type { Db } from '@/db/connection';
import { leaseDueMails, markFailed, markSent } from '@/db/outbox';
import { findSchool } from '@/db/school';
import type { EpochSeconds } from '@/lib/time';
import { sendMail } from './mailer';

type Sender = { db: Db; owner: string; clock: () => EpochSeconds };
type Send = typeof sendMail;

const BATCH = 20;

/**
 * Sends what is due. Delivery is at least once: a stop between handing over and noting it repeats that one mail,
 * with the same Message-ID. Answers how many went out.
 */
export async function sendDueMails({ db, owner, clock }: Sender, send: Send = sendMail): Promise<number> {
  const mails = await leaseDueMails(db, owner, clock(), BATCH);
  const school = mails.length > 0 ? await findSchool(db) : undefined;
  let sent = 0;
  for (const mail of mails) {
    try {
      await send(mail, school?.name ?? 'Rungwell');
      await markSent(db, mail.id, clock());
      sent += 1;
    } catch (error) {
      await markFailed(db, mail, error instanceof Error ? error.message : 'unknown fault', clock());
    }
  }
  return sent;
}
