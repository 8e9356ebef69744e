import { parseForm, textAt, type Form } from './card-processor-form';
import { hashOf, newId, type Session, type Store } from './card-processor-store';

export type Call = { method: string; path: string; query: URLSearchParams; body: string; idempotencyKey: string | null; baseUrl: string };
export type Answer = { status: number; body: unknown };

const refused = (status: number, type: string, message: string, code?: string): Answer => ({ status, body: { error: { type, message, ...(code ? { code } : {}) } } });
const missing = (what: string): Answer => refused(404, 'invalid_request_error', `No such ${what}.`, 'resource_missing');

/** A key used again answers what it answered before; with other parameters it is refused. */
export function answerCall(store: Store, call: Call): Answer {
  const { idempotencyKey: key } = call;
  if (call.method !== 'POST' || key === null) return route(store, call);
  const hash = hashOf(`${call.path}\n${call.body}`);
  const saved = store.state.saved[key];
  if (saved && saved.hash !== hash) return refused(400, 'idempotency_error', 'Keys for idempotent requests can only be used with the same parameters they were first used with.');
  if (saved) return { status: saved.status, body: JSON.parse(saved.body) as unknown };
  const answer = route(store, call);
  if (answer.status !== 400) {
    store.state.saved[key] = { hash, status: answer.status, body: JSON.stringify(answer.body) };
    store.keep();
  }
  return answer;
}

type Handler = (store: Store, call: Call, id: string) => Answer;
const ROUTES: [string, RegExp, Handler][] = [
  ['POST', /^\/v1\/checkout\/sessions$/, createSession],
  ['GET', /^\/v1\/checkout\/sessions$/, listSessions],
  ['GET', /^\/v1\/checkout\/sessions\/([\w]+)$/, (store, call, id) => sessionAnswer(store, call, id)],
  ['POST', /^\/v1\/checkout\/sessions\/([\w]+)\/expire$/, expireSession],
  ['GET', /^\/v1\/payment_intents\/([\w]+)$/, readIntent],
  ['POST', /^\/v1\/refunds$/, createRefund],
  ['POST', /^\/v1\/customers$/, createCustomer],
  ['GET', /^\/v1\/events$/, (store) => ({ status: 200, body: { object: 'list', url: '/v1/events', has_more: false, data: store.state.events.map((event) => JSON.parse(event.body) as unknown) } })],
  ['GET', /^\/v1\/events\/([\w]+)$/, readEvent],
];

function route(store: Store, call: Call): Answer {
  for (const [method, pattern, handle] of ROUTES) {
    const match = method === call.method ? pattern.exec(call.path) : null;
    if (match) return handle(store, call, match[1] ?? '');
  }
  return refused(404, 'invalid_request_error', `Unrecognized request URL (${call.method}: ${call.path}).`);
}

function createSession(store: Store, call: Call): Answer {
  const form = parseForm(call.body);
  const price = (name: string) => textAt(form, 'line_items', 0, 'price_data', name);
  const amount = Number(price('unit_amount')) * Number(textAt(form, 'line_items', 0, 'quantity') ?? 1);
  const [successUrl, cancelUrl] = [textAt(form, 'success_url'), textAt(form, 'cancel_url')];
  if (!Number.isSafeInteger(amount) || amount <= 0) return refused(400, 'invalid_request_error', 'Invalid amount.', 'parameter_invalid_integer');
  if (!successUrl || !cancelUrl) return refused(400, 'invalid_request_error', 'Missing required param: success_url.', 'parameter_missing');
  const session = store.open({
    amountMinor: amount, currency: price('currency') ?? 'eur', label: textAt(form, 'line_items', 0, 'price_data', 'product_data', 'name') ?? '', email: textAt(form, 'customer_email') ?? null,
    reference: textAt(form, 'client_reference_id') ?? null, metadata: metadataOf(form), successUrl, cancelUrl,
  });
  return { status: 200, body: sessionBody(session, call.baseUrl, false) };
}

function metadataOf(form: Form): Record<string, string> {
  const data = form.payment_intent_data;
  const metadata = typeof data === 'object' && !Array.isArray(data) ? data.metadata : undefined;
  return typeof metadata === 'object' && !Array.isArray(metadata) ? Object.fromEntries(Object.entries(metadata).flatMap(([name, value]) => (typeof value === 'string' ? [[name, value]] : []))) : {};
}

function listSessions(store: Store, call: Call): Answer {
  const intent = call.query.get('payment_intent');
  const data = store.state.sessions.filter((session) => intent === null || session.intentId === intent).map((session) => sessionBody(session, call.baseUrl, false));
  return { status: 200, body: { object: 'list', url: '/v1/checkout/sessions', has_more: false, data } };
}

function sessionAnswer(store: Store, call: Call, id: string): Answer {
  const session = store.session(id);
  const isExpanded = [...call.query].some(([name, value]) => name.startsWith('expand') && value.startsWith('payment_intent'));
  return session ? { status: 200, body: sessionBody(session, call.baseUrl, isExpanded) } : missing(`checkout session: '${id}'`);
}

function expireSession(store: Store, call: Call, id: string): Answer {
  const session = store.session(id);
  if (!session) return missing(`checkout session: '${id}'`);
  if (session.state !== 'open') return refused(400, 'invalid_request_error', `Only Checkout Sessions with a status in ["open"] can be expired.`);
  store.expire(session);
  return sessionAnswer(store, call, id);
}

function readIntent(store: Store, _call: Call, id: string): Answer {
  const session = store.state.sessions.find(({ intentId }) => intentId === id);
  return session ? { status: 200, body: intentBody(session) } : missing(`payment_intent: '${id}'`);
}

function createRefund(store: Store, call: Call): Answer {
  const form = parseForm(call.body);
  const session = store.state.sessions.find(({ intentId }) => intentId === textAt(form, 'payment_intent'));
  if (session?.state !== 'complete') return missing('payment_intent to refund');
  const amount = Number(textAt(form, 'amount') ?? session.amountMinor - session.refundedMinor);
  if (!(amount > 0) || amount > session.amountMinor - session.refundedMinor) return refused(400, 'invalid_request_error', 'Refund amount is greater than unrefunded amount on charge.', 'charge_already_refunded');
  session.refundedMinor += amount;
  const refund = { id: newId('re'), object: 'refund', amount, currency: session.currency, payment_intent: session.intentId, charge: chargeIdOf(session), status: 'succeeded', created: store.clock(), metadata: {} };
  store.emit('charge.refunded', { id: chargeIdOf(session), object: 'charge' });
  return { status: 200, body: refund };
}

function createCustomer(store: Store, call: Call): Answer {
  const form = parseForm(call.body);
  return { status: 200, body: { id: newId('cus'), object: 'customer', email: textAt(form, 'email') ?? null, name: textAt(form, 'name') ?? null, created: store.clock(), livemode: false, metadata: {} } };
}

function readEvent(store: Store, _call: Call, id: string): Answer {
  const event = store.state.events.find((candidate) => candidate.id === id);
  return event ? { status: 200, body: JSON.parse(event.body) as unknown } : missing(`event: '${id}'`);
}

const chargeIdOf = (session: Session) => session.intentId.replace('pi_', 'ch_');

function intentBody(session: Session): Record<string, unknown> {
  const isPaid = session.state === 'complete';
  const charge = session.card && {
    id: chargeIdOf(session), object: 'charge', amount: session.amountMinor, amount_refunded: session.refundedMinor, currency: session.currency, paid: isPaid, status: 'succeeded',
    payment_method_details: { type: 'card', card: session.card },
  };
  return {
    id: session.intentId, object: 'payment_intent', amount: session.amountMinor, amount_received: isPaid ? session.amountMinor : 0, currency: session.currency, created: session.createdAt,
    status: isPaid ? 'succeeded' : 'requires_payment_method', metadata: session.metadata, livemode: false, latest_charge: isPaid ? charge : null,
    last_payment_error: session.refusal === '' ? null : { type: 'card_error', code: 'card_declined', message: session.refusal },
  };
}

function sessionBody(session: Session, baseUrl: string, isExpanded: boolean): Record<string, unknown> {
  return {
    id: session.id, object: 'checkout.session', amount_subtotal: session.amountMinor, amount_total: session.amountMinor, currency: session.currency, mode: 'payment', livemode: false,
    client_reference_id: session.reference, customer_email: session.email, created: session.createdAt, expires_at: session.expiresAt, metadata: {},
    payment_intent: isExpanded ? intentBody(session) : session.intentId, payment_status: session.state === 'complete' ? 'paid' : 'unpaid', status: session.state,
    success_url: session.successUrl, cancel_url: session.cancelUrl, url: session.state === 'open' ? `${baseUrl}/pay/${session.id}` : null,
  };
}
