import 'server-only';
import Stripe from 'stripe';
import { AppError } from '@/lib/errors';
import { env } from '@/lib/server/env';
import type { EpochSeconds } from '@/lib/time';

export type ProcessorSettings = { secretKey: string; webhookSecret: string; host?: string; port?: number; protocol?: 'http' | 'https' };
export type NewSession = {
  attemptId: string; amountMinor: number; currency: string; label: string; email: string | null; successUrl: string; cancelUrl: string; idempotencyKey: string;
};
export type OpenedSession = { sessionId: string; url: string; expiresAt: EpochSeconds };
export type SessionNow = {
  sessionId: string; attemptId: string | null; state: 'open' | 'complete' | 'expired'; isPaid: boolean; amountMinor: number; currency: string;
  intentId: string | null; cardBrand: string | null; cardLast4: string | null; refusal: string;
};
export type CardEvent = { id: string; type: string; sessionId: string | null; intentId: string | null };

export type CardProcessor = {
  openSession(session: NewSession): Promise<OpenedSession>;
  /** Null for a session that this account does not know. */
  readSession(sessionId: string): Promise<SessionNow | null>;
  sessionOfIntent(intentId: string): Promise<string | null>;
  expireSession(sessionId: string): Promise<void>;
  verifyEvent(body: string, signature: string, now: EpochSeconds): CardEvent;
};

const LOOPBACK = ['127.0.0.1', 'localhost', '::1'];
const TOLERANCE_SECONDS = 300;

/** The one client of the card processor. Plain http is for the local card processor on this machine only. */
export function createCardProcessor({ secretKey, webhookSecret, host, port, protocol }: ProcessorSettings): CardProcessor {
  if (protocol === 'http' && !LOOPBACK.includes(host ?? '')) throw new Error('the card processor is only spoken to over https');
  const stripe = new Stripe(secretKey, { ...(host ? { host } : {}), ...(port ? { port } : {}), ...(protocol ? { protocol } : {}), telemetry: false, maxNetworkRetries: 2, timeout: 10_000 });
  return {
    openSession: (session) => openSession(stripe, session),
    readSession: (sessionId) => readSession(stripe, sessionId),
    sessionOfIntent: async (intentId) => (await stripe.checkout.sessions.list({ payment_intent: intentId, limit: 1 })).data[0]?.id ?? null,
    expireSession: async (sessionId) => void (await stripe.checkout.sessions.expire(sessionId)),
    verifyEvent: (body, signature, now) => cardEvent(verified(stripe, { body, signature, webhookSecret, now })),
  };
}

/** The hosted page of the processor takes the card; nothing of it is ever seen here. */
async function openSession(stripe: Stripe, session: NewSession): Promise<OpenedSession> {
  const opened = await stripe.checkout.sessions.create({
    mode: 'payment', client_reference_id: session.attemptId, success_url: session.successUrl, cancel_url: session.cancelUrl,
    ...(session.email ? { customer_email: session.email } : {}),
    line_items: [{ quantity: 1, price_data: { currency: session.currency.toLowerCase(), unit_amount: session.amountMinor, product_data: { name: session.label } } }],
    payment_intent_data: { metadata: { attemptId: session.attemptId } },
  }, { idempotencyKey: session.idempotencyKey });
  if (!opened.url) throw new Error('the card processor gave no page to pay on');
  return { sessionId: opened.id, url: opened.url, expiresAt: opened.expires_at };
}

async function readSession(stripe: Stripe, sessionId: string): Promise<SessionNow | null> {
  try {
    return sessionNow(await stripe.checkout.sessions.retrieve(sessionId, { expand: ['payment_intent.latest_charge'] }));
  } catch (error) {
    if (error instanceof Stripe.errors.StripeInvalidRequestError && error.code === 'resource_missing') return null;
    throw error;
  }
}

function sessionNow(session: Stripe.Checkout.Session): SessionNow {
  const intent = typeof session.payment_intent === 'object' ? session.payment_intent : null;
  return {
    sessionId: session.id, attemptId: session.client_reference_id, state: stateOf(session.status), isPaid: session.payment_status === 'paid',
    amountMinor: session.amount_total ?? 0, currency: (session.currency ?? '').toUpperCase(), intentId: intent?.id ?? null, ...cardOf(intent),
    refusal: intent?.last_payment_error?.message ?? '',
  };
}

const stateOf = (status: string | null): SessionNow['state'] => (status === 'complete' || status === 'expired' ? status : 'open');

/** What a receipt may show of a card, and no more. */
function cardOf(intent: Stripe.PaymentIntent | null): Pick<SessionNow, 'cardBrand' | 'cardLast4'> {
  const charge = typeof intent?.latest_charge === 'object' ? intent.latest_charge : null;
  const card = charge?.payment_method_details?.card;
  return { cardBrand: card?.brand ?? null, cardLast4: card?.last4 ?? null };
}

type Signed = { body: string; signature: string; webhookSecret: string; now: EpochSeconds };

/** Not ours, changed on the way, or older or newer than five minutes: refused. The library itself lets the future through. */
function verified(stripe: Stripe, { body, signature, webhookSecret, now }: Signed): Stripe.Event {
  const stampedAt = Number(/(?:^|,)t=(\d+)/.exec(signature)?.[1] ?? Number.NaN);
  if (!(stampedAt <= now + TOLERANCE_SECONDS)) throw new AppError('invalid', 'The signature of this event is not from now.');
  try {
    return stripe.webhooks.constructEvent(body, signature, webhookSecret, TOLERANCE_SECONDS, undefined, now * 1000);
  } catch (error) {
    if (error instanceof Stripe.errors.StripeSignatureVerificationError || error instanceof SyntaxError) throw new AppError('invalid', 'The signature of this event does not fit.');
    throw error;
  }
}

function cardEvent(event: Stripe.Event): CardEvent {
  const object = event.data.object as { id?: string; object?: string };
  return {
    id: event.id, type: event.type,
    sessionId: object.object === 'checkout.session' || event.type.startsWith('checkout.session.') ? (object.id ?? null) : null,
    intentId: object.object === 'payment_intent' ? (object.id ?? null) : null,
  };
}

const holder = globalThis as typeof globalThis & { rungwellCardProcessor?: CardProcessor };

/** The processor that the environment names: the real one, or the local one of the demo. */
export function cardProcessor(): CardProcessor {
  const { STRIPE_SECRET_KEY, STRIPE_WEBHOOK_SECRET, STRIPE_API_HOST, STRIPE_API_PORT, STRIPE_API_PROTOCOL } = env();
  holder.rungwellCardProcessor ??= createCardProcessor({
    secretKey: STRIPE_SECRET_KEY, webhookSecret: STRIPE_WEBHOOK_SECRET, host: STRIPE_API_HOST, port: STRIPE_API_PORT, protocol: STRIPE_API_HOST ? STRIPE_API_PROTOCOL : undefined,
  });
  return holder.rungwellCardProcessor;
}
