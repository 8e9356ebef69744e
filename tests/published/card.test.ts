import { createHmac } from 'node:crypto';
import { createServer, type IncomingMessage } from 'node:http';
import type { AddressInfo } from 'node:net';
import Stripe from 'stripe';
import { afterEach, describe, expect, it } from 'vitest';
import { startCardProcessor, type ProcessorServer } from '@/jobs/local/card-processor-server';
import { createCardProcessor } from '@/lib/tuition/server/card-processor';

/**
 * Source: observed with the stripe package 23.1.0 against a local HTTP server, and docs.stripe.com (idempotent requests, events);
 * rows S01 to S13 of the check list.
 */
const SECRET = 'whsec_test_secret';
const AT = 1_767_225_600;
const PAYLOAD = '{"id":"evt_1","object":"event","type":"checkout.session.completed","created":1767225600,"data":{"object":{"id":"cs_test_1"}}}';
const SIGNATURE = '741be37fe59ad36ced0665b03a70b6ba762349bdacdeae8867becf629a7defc4';
const stripe = new Stripe('sk_test_fake');
const ours = (webhookSecret = SECRET) => createCardProcessor({ secretKey: 'sk_test_fake', webhookSecret });
const header = (at = AT, signature = SIGNATURE) => `t=${at},v1=${signature}`;
const sign = (at: number, body = PAYLOAD, secret = SECRET) => createHmac('sha256', secret).update(`${at}.${body}`).digest('hex');

describe('signed events', () => {
  it('S06 vector A', () => {
    expect(Buffer.byteLength(PAYLOAD)).toBe(125);
    expect(sign(AT)).toBe(SIGNATURE);
    expect(stripe.webhooks.generateTestHeaderString({ payload: PAYLOAD, secret: SECRET, timestamp: AT })).toBe(header());
    expect(ours().verifyEvent(PAYLOAD, header(), AT)).toEqual({ id: 'evt_1', type: 'checkout.session.completed', sessionId: 'cs_test_1', intentId: null });
  });
  it('S07 vector B', () => {
    expect(sign(1_614_556_800, '{"id":"evt_test_webhook","object":"event"}', 'whsec_test')).toBe('8cc0c2a4c1587de351b3809dc0c80a51a30f855bedfe01e7761ac9a689708457');
  });
  it.each([[299, true], [300, true], [301, false]])('S08 %i seconds old: %s', (age, isTaken) => {
    const verify = () => ours().verifyEvent(PAYLOAD, header(), AT + age);
    if (isTaken) expect(verify()).toMatchObject({ id: 'evt_1' });
    else expect(verify).toThrow('signature');
  });
  it('S08 the library lets the future through; we do not', () => {
    const ahead = header(AT + 1000, sign(AT + 1000));
    expect(stripe.webhooks.constructEvent(PAYLOAD, ahead, SECRET, 300, undefined, AT * 1000)).toMatchObject({ id: 'evt_1' });
    expect(() => ours().verifyEvent(PAYLOAD, ahead, AT)).toThrow('not from now');
    expect(ours().verifyEvent(PAYLOAD, header(AT + 300, sign(AT + 300)), AT)).toMatchObject({ id: 'evt_1' });
  });
  it.each([
    ['a wrong secret', PAYLOAD, header(AT, sign(AT, PAYLOAD, 'whsec_other'))], ['one byte changed', PAYLOAD.replace('evt_1', 'evt_2'), header()],
    ['written again', JSON.stringify(JSON.parse(PAYLOAD), null, 1), header()], ['only v0', PAYLOAD, `t=${AT},v0=${SIGNATURE}`],
    ['no time', PAYLOAD, `v1=${SIGNATURE}`], ['an empty header', PAYLOAD, ''],
  ])('S09 refuses %s', (_name, body, signature) => {
    expect(() => ours().verifyEvent(body, signature, AT)).toThrow('signature');
  });
  it('S10 takes two signatures of which one fits', () => {
    expect(ours().verifyEvent(PAYLOAD, `t=${AT},v1=${'0'.repeat(64)},v1=${SIGNATURE}`, AT)).toMatchObject({ id: 'evt_1' });
  });
});

it('S01 plain http is for this machine only', () => {
  expect(() => createCardProcessor({ secretKey: 'k', webhookSecret: 'w', host: 'cards.example.com', protocol: 'http' })).toThrow('https');
  expect(() => createCardProcessor({ secretKey: 'k', webhookSecret: 'w', host: '127.0.0.1', port: 1, protocol: 'http' })).not.toThrow();
});

const closing: (() => Promise<unknown>)[] = [];
afterEach(async () => { await Promise.all(closing.splice(0).map((close) => close())); });

type Seen = { method: string; headers: IncomingMessage['headers']; body: string };

/** A server that answers in turn what it is told, and remembers what it was asked. */
async function answering(replies: { status: number; body: object }[]): Promise<{ seen: Seen[]; port: number }> {
  const seen: Seen[] = [];
  const server = createServer((request, response) => {
    let body = '';
    request.on('data', (chunk: Buffer) => { body += chunk.toString(); });
    request.on('end', () => {
      const reply = replies[Math.min(seen.length, replies.length - 1)]!;
      seen.push({ method: request.method ?? '', headers: request.headers, body });
      response.writeHead(reply.status, { 'Content-Type': 'application/json' }).end(JSON.stringify(reply.body));
    });
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  closing.push(() => new Promise((resolve) => { server.closeAllConnections(); server.close(resolve); }));
  return { seen, port: (server.address() as AddressInfo).port };
}

const SESSION = { id: 'cs_1', url: 'http://127.0.0.1/pay/cs_1', expires_at: AT };
const wish = { attemptId: 'attempt', amountMinor: 5000, currency: 'EUR', label: 'Invoice 17', email: 'noor@example.com', successUrl: 'http://localhost/paid', cancelUrl: 'http://localhost/bill', idempotencyKey: 'invoice:17:attempt:1' };
const clientAt = (port: number) => createCardProcessor({ secretKey: 'sk_test_fake', webhookSecret: SECRET, host: '127.0.0.1', port, protocol: 'http' });

describe('requests', () => {
  it('S02, S03 form-encoded, with the key that was stored before', async () => {
    const { seen, port } = await answering([{ status: 200, body: SESSION }]);
    await expect(clientAt(port).openSession(wish)).resolves.toEqual({ sessionId: 'cs_1', url: SESSION.url, expiresAt: AT });
    expect(seen[0]?.headers).toMatchObject({ 'content-type': 'application/x-www-form-urlencoded', authorization: 'Bearer sk_test_fake', 'stripe-version': '2026-10-28.endive', 'idempotency-key': 'invoice:17:attempt:1' });
    expect(decodeURIComponent(seen[0]?.body ?? '')).toContain('line_items[0][price_data][unit_amount]=5000');
  });
  it('S04 a fault of the processor is tried again with the same key', async () => {
    const { seen, port } = await answering([{ status: 500, body: { error: { message: 'sorry' } } }, { status: 200, body: SESSION }]);
    await clientAt(port).openSession(wish);
    expect(seen.map(({ headers }) => headers['idempotency-key'])).toEqual(['invoice:17:attempt:1', 'invoice:17:attempt:1']);
  });
  it.each([[402, { type: 'card_error', code: 'card_declined' }, 'StripeCardError'], [400, { type: 'idempotency_error' }, 'StripeIdempotencyError'], [429, { type: 'rate_limit' }, 'StripeRateLimitError']])('S05 %i is %j, once', async (status, error, type) => {
    const { seen, port } = await answering([{ status, body: { error } }]);
    await expect(clientAt(port).openSession(wish)).rejects.toMatchObject({ type });
    expect(seen).toHaveLength(1);
  });
});

describe('the local card processor keeps the same promises', () => {
  async function local(): Promise<ProcessorServer> {
    const server = await startCardProcessor({ port: 0, secretKey: 'sk_test_fake', webhookSecret: SECRET, eventsUrl: 'http://127.0.0.1:9/none', clock: () => AT });
    server.store.state.isHolding = true;
    closing.push(server.close);
    return server;
  }
  it('S11 the same key answers the same; other parameters are refused', async () => {
    const { port, store } = await local();
    const client = clientAt(port);
    const first = await client.openSession(wish);
    expect(await client.openSession(wish)).toEqual(first);
    expect(store.state.sessions).toHaveLength(1);
    await expect(client.openSession({ ...wish, amountMinor: 6000 })).rejects.toMatchObject({ type: 'StripeIdempotencyError' });
    await expect(client.openSession({ ...wish, idempotencyKey: 'invoice:17:attempt:2' })).resolves.not.toEqual(first);
  });
  it('refuses a wrong key, an unknown session and a session that cannot expire', async () => {
    const { port } = await local();
    await expect(createCardProcessor({ secretKey: 'sk_other', webhookSecret: SECRET, host: '127.0.0.1', port, protocol: 'http' }).openSession(wish)).rejects.toMatchObject({ type: 'StripeAuthenticationError' });
    await expect(clientAt(port).readSession('cs_none')).resolves.toBeNull();
    const { sessionId } = await clientAt(port).openSession(wish);
    await clientAt(port).expireSession(sessionId);
    await expect(clientAt(port).expireSession(sessionId)).rejects.toMatchObject({ type: 'StripeInvalidRequestError' });
  });
  it('signs events so that the library takes them', async () => {
    const { store } = await local();
    const event = store.emit('checkout.session.completed', { id: 'cs_1', object: 'checkout.session' });
    expect(ours().verifyEvent(event.body, header(AT, sign(AT, event.body)), AT)).toMatchObject({ sessionId: 'cs_1' });
  });
  it.each([
    { number: '4242 4242 4242 4242', expiry: '04/30', code: '123', status: 303, state: 'complete' }, { number: '4000 0000 0000 0002', expiry: '04/30', code: '123', status: 402, state: 'open' },
    { number: '4242 4242 4242 4241', expiry: '04/30', code: '123', status: 422, state: 'open' }, { number: '4242424242424242', expiry: '12/25', code: '123', status: 422, state: 'open' },
    { number: '4242424242424242', expiry: '04/30', code: '1', status: 422, state: 'open' }, { number: '4000 0027 6000 3184', expiry: '04/30', code: '123', status: 200, state: 'open' },
  ])('S13 its own page takes the card: $number $expiry $code', async ({ number, expiry, code, status, state }) => {
    const { port, store } = await local();
    const { sessionId, url } = await clientAt(port).openSession(wish);
    const answer = await fetch(url, { method: 'POST', redirect: 'manual', body: new URLSearchParams({ number, expiry, code }) });
    expect([answer.status, store.session(sessionId)?.state]).toEqual([status, state]);
    expect(JSON.stringify(store.state)).not.toContain(number.replaceAll(' ', '').slice(0, 12));
  });
  it('asks the bank first, and shows card and brand afterwards', async () => {
    const { port } = await local();
    const { sessionId, url } = await clientAt(port).openSession(wish);
    await fetch(url, { method: 'POST', body: new URLSearchParams({ number: '4000002760003184', expiry: '04/30', code: '123' }) });
    await fetch(`${url}/bank`, { method: 'POST', redirect: 'manual', body: new URLSearchParams({ brand: 'visa', last4: '3184', answer: 'yes' }) });
    await expect(clientAt(port).readSession(sessionId)).resolves.toMatchObject({ isPaid: true, state: 'complete', amountMinor: 5000, currency: 'EUR', cardBrand: 'visa', cardLast4: '3184', attemptId: 'attempt' });
  });
});
