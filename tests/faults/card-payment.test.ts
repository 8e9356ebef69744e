import { createHmac } from 'node:crypto';
import type { Knex } from 'knex';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { insertPercentSplit } from '@/db/families';
import { accountBalances } from '@/db/journal';
import { findTuitionRun } from '@/db/tuition-runs';
import { transaction } from '@/db/transaction';
import { startCardProcessor, type ProcessorServer } from '@/jobs/local/card-processor-server';
import type { StoredEvent } from '@/jobs/local/card-processor-store';
import type { Context } from '@/lib/server/context';
import { enrolled, lanternMoney } from '@/tests/factories/lantern-money';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { contextOf, SCHOOL } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { createCardProcessor, type CardProcessor } from '@/lib/tuition/server/card-processor';
import { previewTuitionRun } from '@/lib/tuition/server/preview-tuition-run';
import { askAboutCardPayment, receiveCardEvent } from '@/lib/tuition/server/receive-card-event';
import { releaseTuitionRun } from '@/lib/tuition/server/release-tuition-run';
import { readCardPayment, startCardPayment } from '@/lib/tuition/server/start-card-payment';
import { takeDeskPayment } from '@/lib/tuition/server/take-desk-payment';

const NOW = Date.UTC(2026, 8, 1, 12) / 1000;
const SECRET = 'whsec_test';
const school = { zone: 'America/New_York', currency: 'USD', locale: 'en-US' };

let db: Knex;
let server: ProcessorServer;
let cards: CardProcessor;
let noor: Context;
let sam: Context;
let invoiceId: string;

beforeEach(async () => {
  db = freshDb();
  server = await startCardProcessor({ port: 0, secretKey: 'sk', webhookSecret: SECRET, eventsUrl: 'http://127.0.0.1:9/none', clock: () => NOW });
  server.store.state.isHolding = true;
  cards = createCardProcessor({ secretKey: 'sk', webhookSecret: SECRET, host: '127.0.0.1', port: server.port, protocol: 'http' });
  await lanternStreet(db);
  await lanternMoney(db);
  await transaction(db, (trx) => insertPercentSplit(trx, { id: 'split', familyId: 'vale', chargeKind: 'tuition', parts: [{ payerId: 'payer-noor', bp: 6000 }, { payerId: 'payer-sam', bp: 4000 }] }));
  await enrolled(db, { studentId: 'ada', dates: ['2026-09-15', '2026-09-22', '2026-09-29'] });
  noor = contextOf(db, 'guardian', { personId: 'noor', payerIds: ['payer-noor'], studentIds: ['ada'], now: NOW, school });
  sam = contextOf(db, 'guardian', { personId: 'sam', payerIds: ['payer-sam'], studentIds: ['ada'], now: NOW, school });
  invoiceId = await released();
});
afterEach(() => server.close());

/** One invoice of 126.00: Noor 75.60, Sam 50.40. */
async function released(): Promise<string> {
  const owner = contextOf(db, 'owner', { personId: 'ruth', now: NOW, school });
  const { runId } = await previewTuitionRun({ kind: 'term', period: 'autumn', dueOn: '2026-09-15', instalments: 1, depositPercent: 0 }, owner);
  await releaseTuitionRun({ runId, controlTotalMinor: (await findTuitionRun(db, runId))?.controlTotalMinor ?? -1 }, owner);
  const [invoice]: { id: string }[] = await db('invoice').select('id');
  return invoice!.id;
}

const start = (context = noor) => startCardPayment({ invoiceId, what: 'due' }, context, cards);
const attempts = (): Promise<{ id: string; state: string; idempotencyKey: string; sessionId: string | null; reason: string }[]> => db('payment_attempt').orderBy('tryNo');
const payAt = (url: string, number = '4242424242424242') => fetch(url, { method: 'POST', redirect: 'manual', body: new URLSearchParams({ number, expiry: '04/30', code: '123' }) });
const deliver = (event: StoredEvent, at = NOW, moment = NOW) =>
  receiveCardEvent({ body: event.body, signature: `t=${at},v1=${createHmac('sha256', SECRET).update(`${at}.${event.body}`).digest('hex')}` }, { db, now: moment, school: { ...SCHOOL, ...school } }, cards);
const eventOf = (type: string) => server.store.state.events.find((event) => event.type === type)!;
const receipts = () => db('outbox').where({ topic: 'receipt' });

describe('opening the page', () => {
  it('asks for the payer’s own share, with a key that was stored first', async () => {
    const { url } = await start();
    expect(url).toContain('/pay/cs_test_local_');
    expect(server.store.state.sessions[0]).toMatchObject({ amountMinor: 7560, currency: 'usd', email: 'noor@example.com', label: 'Lantern Street School, invoice L-00001' });
    expect(await attempts()).toMatchObject([{ state: 'waiting', idempotencyKey: `invoice:${invoiceId}:attempt:1` }]);
  });

  it('pressed fifty times at once opens one page', async () => {
    const urls = await Promise.all(Array.from({ length: 50 }, () => start()));
    expect(new Set(urls.map(({ url }) => url)).size).toBe(1);
    expect(server.store.state.sessions).toHaveLength(1);
    expect(await attempts()).toHaveLength(1);
  });

  it('after a crash between the call and saving its answer, the same page comes back', async () => {
    const { url } = await start();
    await db('payment_attempt').update({ sessionId: null, hostedUrl: null, expiresAt: null, state: 'started' });
    expect(await start()).toEqual({ url });
    expect(server.store.state.sessions).toHaveLength(1);
  });

  it('opens a new page when the amount has changed', async () => {
    await start();
    await takeDeskPayment({ payerId: 'payer-noor', amount: '5,60', method: 'cash', receivedOn: '2026-09-01', note: '', requestKey: 'form-0001' }, contextOf(db, 'desk', { personId: 'pat', now: NOW, school }));
    await start();
    expect(server.store.state.sessions.map(({ amountMinor }) => amountMinor)).toEqual([7000, 7560]);
  });

  it('is not for the other payer, another family, or a member of staff', async () => {
    await start(sam);
    expect(server.store.state.sessions[0]).toMatchObject({ amountMinor: 5040, email: 'sam@example.com' });
    for (const context of [contextOf(db, 'guardian', { payerIds: ['payer-x'], now: NOW }), contextOf(db, 'teacher', { now: NOW }), contextOf(db, 'desk', { now: NOW })]) {
      await expect(start(context)).rejects.toMatchObject({ code: 'not_found' });
    }
  });
});

describe('the signed event', () => {
  beforeEach(async () => { await payAt((await start()).url); });

  it('marks it paid once, however often it comes', async () => {
    const event = eventOf('checkout.session.completed');
    const effects = await Promise.all(Array.from({ length: 50 }, () => deliver(event)));
    expect(effects.filter((effect) => effect === 'paid')).toHaveLength(1);
    expect(await db('payment')).toMatchObject([{ payerId: 'payer-noor', amountMinor: 7560, method: 'card', receiptDocumentNo: 'L-R00001', cardLast4: '4242' }]);
    expect(await db('allocation')).toMatchObject([{ amountMinor: 7560 }]);
    expect(await receipts()).toMatchObject([{ toAddress: 'noor@example.com' }]);
    expect(await attempts()).toMatchObject([{ state: 'paid' }]);
    expect((await accountBalances(db)).find(({ accountCode }) => accountCode === 'bank')).toEqual({ accountCode: 'bank', balanceMinor: 7560 });
    await expect(start()).rejects.toMatchObject({ message: 'This is paid already. Thank you.' });
  });

  it('two different events of one payment are one payment, in either order', async () => {
    expect(await deliver(eventOf('payment_intent.succeeded'))).toBe('paid');
    expect(await deliver(eventOf('checkout.session.completed'))).toBe('paid_before');
    expect(await db('payment')).toHaveLength(1);
  });

  it('an older event of failure does not lead back from paid', async () => {
    await deliver(eventOf('checkout.session.completed'));
    const late = server.store.emit('checkout.session.expired', { id: server.store.state.sessions[0]?.id, object: 'checkout.session' });
    expect(await deliver(late)).toBe('paid_before');
    expect(await attempts()).toMatchObject([{ state: 'paid' }]);
  });

  it('refuses what is not signed, too old or from the future, and changes nothing', async () => {
    const event = eventOf('checkout.session.completed');
    await expect(receiveCardEvent({ body: event.body, signature: 't=1,v1=00' }, { db, now: NOW, school: SCHOOL }, cards)).rejects.toMatchObject({ code: 'invalid' });
    await expect(deliver(event, NOW - 301)).rejects.toMatchObject({ code: 'invalid' });
    await expect(deliver(event, NOW + 301)).rejects.toMatchObject({ code: 'invalid' });
    expect(await db('payment')).toEqual([]);
    expect(await db('external_event')).toEqual([]);
  });

  it('finds the try even when its session was never saved', async () => {
    await db('payment_attempt').update({ sessionId: null, hostedUrl: null, state: 'started' });
    expect(await deliver(eventOf('checkout.session.completed'))).toBe('paid');
  });

  it('believes the processor and not the event', async () => {
    const [session] = server.store.state.sessions;
    session!.state = 'open';
    expect(await deliver(eventOf('checkout.session.completed'))).toBe('still_open');
    expect(await db('payment')).toEqual([]);
  });

  it('is not needed when the payer’s page asks first', async () => {
    const [attempt] = await attempts();
    expect(await askAboutCardPayment({ attemptId: attempt!.id }, noor, cards)).toBe('paid');
    expect(await deliver(eventOf('checkout.session.completed'))).toBe('paid_before');
    expect(await readCardPayment({ attemptId: attempt!.id }, noor)).toMatchObject({ state: 'paid', amountMinor: 7560, documentNo: 'L-00001' });
    await expect(readCardPayment({ attemptId: attempt!.id }, sam)).rejects.toMatchObject({ code: 'not_found' });
  });

  it('ignores what it does not know', async () => {
    expect(await deliver(server.store.emit('customer.created', { id: 'cus_1', object: 'customer' }))).toBe('ignored');
    expect(await deliver(server.store.emit('checkout.session.completed', { id: 'cs_test_local_none', object: 'checkout.session' }))).toBe('ignored');
  });
});

it('a declined card leaves the page open and says why; the next card pays', async () => {
  const { url } = await start();
  await payAt(url, '4000000000000002');
  expect(await deliver(eventOf('payment_intent.payment_failed'))).toBe('refused');
  expect(await attempts()).toMatchObject([{ state: 'waiting', reason: 'Your card was declined.' }]);
  await payAt(url);
  expect(await deliver(eventOf('checkout.session.completed'))).toBe('paid');
});

it('a page that was not used expires and a new try begins', async () => {
  await start();
  server.store.expire(server.store.state.sessions[0]!);
  expect(await deliver(eventOf('checkout.session.expired'))).toBe('expired');
  await start();
  expect((await attempts()).map(({ state }) => state)).toEqual(['expired', 'waiting']);
});
