import { createHash, createHmac, randomBytes } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';

/** What the card network answers, by test card. Only brand and last four digits are ever kept. */
export type CardAnswer = 'accepted' | 'declined' | 'needs_authentication';
export type Session = {
  id: string; intentId: string; amountMinor: number; currency: string; label: string; email: string | null; reference: string | null; metadata: Record<string, string>;
  successUrl: string; cancelUrl: string; state: 'open' | 'complete' | 'expired'; createdAt: number; expiresAt: number;
  card: { brand: string; last4: string } | null; refusal: string; refundedMinor: number;
};
export type Delivery = { at: number; status: string };
export type StoredEvent = { id: string; type: string; createdAt: number; body: string; deliveries: Delivery[] };
type Saved = { hash: string; status: number; body: string };
export type State = { sessions: Session[]; events: StoredEvent[]; saved: Record<string, Saved>; isHolding: boolean };

export type StoreSettings = { webhookSecret: string; eventsUrl: string; stateFile?: string; clock?: () => number };
const DAY_SECONDS = 86_400;
const RETRY_SECONDS = [2, 10, 60];
export const newId = (prefix: string): string => `${prefix}_local_${randomBytes(12).toString('hex')}`;
export const hashOf = (text: string): string => createHash('sha256').update(text).digest('hex');

/** Everything the local card processor knows. It changes only here, and each change is kept on disk when a file is named. */
export class Store {
  readonly state: State;
  readonly clock: () => number;
  private timers = new Set<NodeJS.Timeout>();

  constructor(readonly settings: StoreSettings) {
    this.clock = settings.clock ?? (() => Math.floor(Date.now() / 1000));
    const { stateFile } = settings;
    this.state = stateFile && existsSync(stateFile) ? (JSON.parse(readFileSync(stateFile, 'utf8')) as State) : { sessions: [], events: [], saved: {}, isHolding: false };
  }

  keep(): void {
    if (this.settings.stateFile) writeFileSync(this.settings.stateFile, JSON.stringify(this.state));
  }

  session(id: string): Session | undefined {
    const found = this.state.sessions.find((session) => session.id === id);
    if (found?.state === 'open' && found.expiresAt <= this.clock()) this.expire(found);
    return found;
  }

  open(wanted: Pick<Session, 'amountMinor' | 'currency' | 'label' | 'email' | 'reference' | 'metadata' | 'successUrl' | 'cancelUrl'>): Session {
    const now = this.clock();
    const session: Session = { ...wanted, id: newId('cs_test'), intentId: newId('pi'), state: 'open', createdAt: now, expiresAt: now + DAY_SECONDS, card: null, refusal: '', refundedMinor: 0 };
    this.state.sessions.unshift(session);
    this.keep();
    return session;
  }

  pay(session: Session, card: { brand: string; last4: string }): void {
    Object.assign(session, { state: 'complete', card, refusal: '' });
    this.emit('payment_intent.succeeded', { id: session.intentId, object: 'payment_intent' });
    this.emit('checkout.session.completed', { id: session.id, object: 'checkout.session' });
  }

  refuse(session: Session, refusal: string): void {
    session.refusal = refusal;
    this.emit('payment_intent.payment_failed', { id: session.intentId, object: 'payment_intent' });
  }

  expire(session: Session): void {
    session.state = 'expired';
    this.emit('checkout.session.expired', { id: session.id, object: 'checkout.session' });
  }

  emit(type: string, object: Record<string, unknown>): StoredEvent {
    const id = newId('evt');
    const createdAt = this.clock();
    const body = JSON.stringify({ id, object: 'event', api_version: '2026-10-28.endive', created: createdAt, data: { object }, livemode: false, pending_webhooks: 1, request: null, type });
    const event: StoredEvent = { id, type, createdAt, body, deliveries: [] };
    this.state.events.unshift(event);
    this.keep();
    if (!this.state.isHolding) void this.deliver(event);
    return event;
  }

  /** Signs and sends an event; a target that does not answer is tried again, as the real one does. */
  async deliver(event: StoredEvent, attempt = 0, signedAt = this.clock()): Promise<string> {
    const status = await this.post(event, signedAt);
    event.deliveries.unshift({ at: this.clock(), status });
    this.keep();
    const wait = RETRY_SECONDS[attempt];
    if (status !== '200' && wait !== undefined && !this.state.isHolding) {
      const timer = setTimeout(() => { this.timers.delete(timer); void this.deliver(event, attempt + 1); }, wait * 1000);
      this.timers.add(timer);
    }
    return status;
  }

  private async post(event: StoredEvent, signedAt: number): Promise<string> {
    const signature = createHmac('sha256', this.settings.webhookSecret).update(`${signedAt}.${event.body}`).digest('hex');
    try {
      const response = await fetch(this.settings.eventsUrl, {
        method: 'POST', headers: { 'Content-Type': 'application/json', 'Stripe-Signature': `t=${signedAt},v1=${signature}` }, body: event.body, signal: AbortSignal.timeout(10_000),
      });
      await response.text();
      return String(response.status);
    } catch {
      return 'no answer';
    }
  }

  close(): void {
    for (const timer of this.timers) clearTimeout(timer);
    this.timers.clear();
  }
}
