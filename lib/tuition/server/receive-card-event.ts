import 'server-only';
import type { Db, Trx } from '@/db/connection';
import { attemptBySession, changeAttempt, claimEvent, findAttempt, isEventKnown, type PaymentAttempt } from '@/db/payment-attempts';
import { findPayer } from '@/db/payers';
import type { School } from '@/db/school';
import { transaction } from '@/db/transaction';
import { notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { localDateOf, type EpochSeconds } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { cardProcessor, type CardEvent, type CardProcessor, type SessionNow } from './card-processor';
import { recordPayment } from './record-payment';

const SOURCE = 'card';
export type CardEffect = 'repeat' | 'ignored' | 'paid' | 'paid_before' | 'refused' | 'expired' | 'still_open';
type Moment = { db: Db; now: EpochSeconds; school: School };

/**
 * An event of the card processor. Its signature is checked on the raw body, its id and its effect are written together,
 * and what it is about is asked afresh: repeated, late or out of order, it never counts twice and never leads back.
 */
export async function receiveCardEvent({ body, signature }: { body: string; signature: string }, moment: Moment, processor: CardProcessor = cardProcessor()): Promise<CardEffect> {
  const event = processor.verifyEvent(body, signature, moment.now);
  if (await isEventKnown(moment.db, SOURCE, event.id)) return 'repeat';
  const session = await sessionOf(event, processor);
  return transaction(moment.db, async (trx) => {
    const claim = (effect: CardEffect) => claimEvent(trx, { source: SOURCE, eventId: event.id, type: event.type, body, effect, processedAt: moment.now });
    const attempt = session && (await attemptOf(trx, session));
    const effect = session && attempt ? effectOf(attempt, session) : 'ignored';
    if (!(await claim(effect))) return 'repeat';
    if (session && attempt) await apply(trx, moment, { attempt, session, effect });
    return effect;
  });
}

/** The session that the event speaks of, as it is now. */
async function sessionOf(event: CardEvent, processor: CardProcessor): Promise<SessionNow | null> {
  const sessionId = event.sessionId ?? (event.intentId ? await processor.sessionOfIntent(event.intentId) : null);
  return sessionId ? processor.readSession(sessionId) : null;
}

/** A crash between the call and saving its answer leaves the try without its session; the session knows its try. */
const attemptOf = async (trx: Trx, session: SessionNow): Promise<PaymentAttempt | undefined> =>
  (await attemptBySession(trx, session.sessionId)) ?? (session.attemptId ? findAttempt(trx, session.attemptId) : undefined);

/** Only forward: what is paid stays paid, whatever an older event says. */
function effectOf(attempt: PaymentAttempt, session: SessionNow): CardEffect {
  if (attempt.state === 'paid') return 'paid_before';
  if (session.isPaid) return 'paid';
  if (session.state === 'expired') return 'expired';
  return session.refusal === '' ? 'still_open' : 'refused';
}

type Applying = { attempt: PaymentAttempt; session: SessionNow; effect: CardEffect };

async function apply(trx: Trx, { now, school }: Moment, { attempt, session, effect }: Applying): Promise<void> {
  if (effect === 'expired' && attempt.state !== 'expired') await changeAttempt(trx, attempt.id, { state: 'expired', reason: 'The page was not used in time.', settledAt: now });
  if (effect === 'refused') await changeAttempt(trx, attempt.id, { reason: session.refusal });
  if (effect !== 'paid') return;
  const payer = await findPayer(trx, attempt.payerId);
  if (!payer) throw new Error('a card payment without its payer');
  const { paymentId } = await recordPayment(trx, { actor: null, now, school }, {
    payer, amountMinor: session.amountMinor, method: 'card', receivedOn: localDateOf(now, school.zone), externalKey: `card:${session.intentId ?? session.sessionId}`, note: '',
    shareId: attempt.shareId, cardBrand: session.cardBrand, cardLast4: session.cardLast4,
  });
  await changeAttempt(trx, attempt.id, { state: 'paid', paymentId, intentId: session.intentId, sessionId: session.sessionId, reason: '', settledAt: now });
}

/** Asks the processor how a try stands, should its event be late or lost. The effect is the same, and once. */
export async function askAboutCardPayment({ attemptId }: { attemptId: string }, context: Context, processor: CardProcessor = cardProcessor()): Promise<CardEffect> {
  const attempt = await findAttempt(context.db, attemptId);
  if (!attempt?.sessionId) throw notFound('payment');
  assertCan(context.ability, 'read', 'Payment', { payerId: attempt.payerId });
  const session = await processor.readSession(attempt.sessionId);
  if (!session) throw notFound('payment');
  return transaction(context.db, async (trx) => {
    const current = await findAttempt(trx, attemptId);
    const effect = current ? effectOf(current, session) : 'ignored';
    if (current) await apply(trx, context, { attempt: current, session, effect });
    return effect;
  });
}
