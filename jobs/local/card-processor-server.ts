import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { answerCall } from './card-processor-api';
import { checkCard } from './card-processor-cards';
import { bankPage, closedPage, notFoundPage, overviewPage, payPage } from './card-processor-pages';
import { Store, type Session, type StoreSettings } from './card-processor-store';

export type ProcessorServer = { store: Store; port: number; close: () => Promise<void> };
type Visit = { store: Store; request: IncomingMessage; response: ServerResponse; url: URL; body: string; baseUrl: string };
const BODY_LIMIT_BYTES = 256 * 1024;
const SIX_MINUTES_SECONDS = 360;

/** The card processor of this machine's own: the real one's requests and signed events, with a payment page of its own. Loopback only. */
export async function startCardProcessor(settings: StoreSettings & { port: number; secretKey: string }): Promise<ProcessorServer> {
  const store = new Store(settings);
  const server = createServer((request, response) => {
    void answer(store, settings.secretKey, request, response).catch(() => { if (!response.headersSent) response.writeHead(500); response.end(); });
  });
  await new Promise<void>((resolve) => server.listen(settings.port, '127.0.0.1', resolve));
  return { store, port: (server.address() as AddressInfo).port, close: () => closed(server, store) };
}

function closed(server: Server, store: Store): Promise<void> {
  store.close();
  server.closeAllConnections();
  return new Promise((resolve) => server.close(() => resolve()));
}

async function answer(store: Store, secretKey: string, request: IncomingMessage, response: ServerResponse): Promise<void> {
  const baseUrl = `http://${request.headers.host ?? '127.0.0.1'}`;
  const visit: Visit = { store, request, response, url: new URL(request.url ?? '/', baseUrl), body: await bodyOf(request), baseUrl };
  if (visit.url.pathname.startsWith('/v1/')) return answerApi(visit, secretKey);
  return answerPage(visit);
}

async function bodyOf(request: IncomingMessage): Promise<string> {
  const chunks: Buffer[] = [];
  let size = 0;
  for await (const chunk of request as AsyncIterable<Buffer>) {
    size += chunk.length;
    if (size > BODY_LIMIT_BYTES) throw new Error('too large');
    chunks.push(chunk);
  }
  return Buffer.concat(chunks).toString('utf8');
}

function answerApi({ store, request, response, url, body, baseUrl }: Visit, secretKey: string): void {
  const reply = (status: number, content: unknown) => void response.writeHead(status, { 'Content-Type': 'application/json', 'Request-Id': 'req_local' }).end(JSON.stringify(content));
  if (request.headers.authorization !== `Bearer ${secretKey}`) return reply(401, { error: { type: 'invalid_request_error', message: 'Invalid API Key provided.' } });
  const key = request.headers['idempotency-key'];
  const { status, body: content } = answerCall(store, { method: request.method ?? 'GET', path: url.pathname, query: url.searchParams, body, idempotencyKey: typeof key === 'string' ? key : null, baseUrl });
  return reply(status, content);
}

const html = ({ response }: Visit, text: string, status = 200): void =>
  void response.writeHead(status, { 'Content-Type': 'text/html; charset=utf-8', 'Cache-Control': 'no-store', 'Content-Security-Policy': "default-src 'none'; style-src 'unsafe-inline'" }).end(text);
const goTo = ({ response }: Visit, place: string): void => void response.writeHead(303, { Location: place }).end();

async function answerPage(visit: Visit): Promise<void> {
  const { store, url, request } = visit;
  const isPost = request.method === 'POST';
  const [area, id, verb] = url.pathname.split('/').filter((part) => part !== '');
  if (area === undefined) return html(visit, overviewPage(store.state));
  if (area === 'health') return void visit.response.writeHead(200).end('ok');
  if (area === 'pay' && id) return answerPay(visit, id, verb === 'bank');
  if (isPost && (await steer(visit, [area, id, verb]))) return goTo(visit, '/');
  return html(visit, notFoundPage(), 404);
}

/** The buttons of the overview page. Nothing is tried again by itself after one of them. */
async function steer({ store }: Visit, [area, id, verb]: (string | undefined)[]): Promise<boolean> {
  switch (area) {
    case 'holding':
      store.state.isHolding = !store.state.isHolding;
      store.keep();
      return true;
    case 'events': return sendEvents(store, id, verb === 'late' ? SIX_MINUTES_SECONDS : 0);
    case 'sessions': return expireByHand(store, id);
    case undefined:
    default: return false;
  }
}

async function sendEvents(store: Store, id: string | undefined, lateSeconds: number): Promise<boolean> {
  const chosen = id === 'send-backwards' ? [...store.state.events] : store.state.events.filter((event) => event.id === id);
  for (const event of chosen) await store.deliver(event, Number.POSITIVE_INFINITY, store.clock() - lateSeconds);
  return chosen.length > 0 || id === 'send-backwards';
}

function expireByHand(store: Store, id: string | undefined): boolean {
  const session = id ? store.session(id) : undefined;
  if (session?.state === 'open') store.expire(session);
  return session !== undefined;
}

function answerPay(visit: Visit, id: string, isBank: boolean): void {
  const session = visit.store.session(id);
  if (!session) return html(visit, notFoundPage(), 404);
  if (session.state !== 'open') return html(visit, closedPage(session));
  if (visit.request.method !== 'POST') return html(visit, payPage(session));
  return isBank ? answerBank(visit, session) : answerCard(visit, session);
}

function answerCard(visit: Visit, session: Session): void {
  const form = new URLSearchParams(visit.body);
  const typed = { number: form.get('number') ?? '', expiry: form.get('expiry') ?? '', code: form.get('code') ?? '' };
  const card = checkCard(typed, new Date(visit.store.clock() * 1000));
  if (!card.ok) return html(visit, payPage(session, { message: card.message, expiry: typed.expiry }), 422);
  switch (card.answer) {
    case 'needs_authentication': return html(visit, bankPage(session, card));
    case 'declined': return refuse(visit, session, typed.expiry);
    case 'accepted':
      visit.store.pay(session, { brand: card.brand, last4: card.last4 });
      return goTo(visit, session.successUrl);
  }
}

function refuse(visit: Visit, session: Session, expiry = ''): void {
  visit.store.refuse(session, 'Your card was declined.');
  return html(visit, payPage(session, { message: 'Your card was declined. Try another one.', expiry }), 402);
}

function answerBank(visit: Visit, session: Session): void {
  const form = new URLSearchParams(visit.body);
  if (form.get('answer') !== 'yes') return refuse(visit, session);
  visit.store.pay(session, { brand: (form.get('brand') ?? 'card').slice(0, 20), last4: (form.get('last4') ?? '').replace(/\D/g, '').slice(-4).padStart(4, '0') });
  return goTo(visit, session.successUrl);
}
