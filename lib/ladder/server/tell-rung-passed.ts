import 'server-only';
import type { Trx } from '@/db/connection';
import type { Hearing } from '@/db/hearings';
import type { Rung } from '@/db/ladders';
import { progressReaders } from '@/db/ladder-standing';
import type { Person } from '@/db/people';
import { queueMail } from '@/lib/messages/server/queue-mail';
import type { Context } from '@/lib/server/context';
import { env } from '@/lib/server/env';
import { ageOn } from '@/lib/time';
import { staysFrom } from '../undo';

const ADULT_YEARS = 18;

/** What the mails of one hearing are filed under. */
export const mailsOf = (hearingId: string): string => `hearing:${hearingId}`;

/**
 * Tells the guardians of a minor, or a grown student, in plain words, once the decision can no longer be taken back:
 * nobody is congratulated and then told otherwise. Answers how many mails were queued.
 */
export async function tellRungPassed(trx: Trx, context: Context, { hearing, rung, student, notePublic }: { hearing: Hearing; rung: Rung; student: Person; notePublic: string }): Promise<number> {
  const name = student.calledName ?? student.givenName;
  let told = 0;
  const readers = await readersOf(trx, student, context);
  for (const personId of readers) {
    const isSelf = personId === student.id;
    const isNew = await queueMail(trx, context, { personId }, {
      topic: 'rung_passed', key: `rung_passed:${hearing.id}:${personId}:1`, subjectRef: mailsOf(hearing.id), notBefore: staysFrom(context.now),
      subject: isSelf ? `You passed a rung: ${rung.plainTitle}` : `${name} passed a rung: ${rung.plainTitle}`,
      lines: [
        `${isSelf ? 'You' : name} can now ${rung.canDo}.`,
        `What it sounds like: ${rung.soundsLike}`,
        ...(notePublic ? [`${hearing.assessorName} writes: “${notePublic}”`] : [`Heard by ${hearing.assessorName}.`]),
      ],
      link: { label: 'See the whole ladder', url: new URL(`/progress/${student.id}`, env().NEXTAUTH_URL).href },
    });
    if (isNew) told += 1;
  }
  return told;
}

/** A grown student reads for themselves; for a minor the adults who may see progress do. */
async function readersOf(trx: Trx, { id, bornOn }: Person, { today }: Context): Promise<string[]> {
  if (bornOn !== null && ageOn(bornOn, today) >= ADULT_YEARS) return [id];
  const adults = await progressReaders(trx, id);
  return adults.length > 0 || bornOn !== null ? adults : [id];
}
