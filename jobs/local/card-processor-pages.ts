import { TEST_CARDS, type TypedCard } from './card-processor-cards';
import type { Session, State, StoredEvent } from './card-processor-store';

const escapeHtml = (text: string): string => text.replace(/[&<>"']/g, (sign) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' })[sign] ?? sign);
const money = ({ amountMinor, currency }: Pick<Session, 'amountMinor' | 'currency'>) =>
  new Intl.NumberFormat('en-IE', { style: 'currency', currency: currency.toUpperCase() }).format(amountMinor / 100);

const STYLE = `body{margin:0;background:#fbf8f1;color:#1c2130;font:16px/1.5 'Hanken Grotesk',Helvetica,Arial,sans-serif}
main{max-width:460px;margin:0 auto;padding:32px 18px}main.wide{max-width:860px}h1{font:600 26px/1.2 Besley,Georgia,serif;margin:0 0 2px}h2{font:600 19px Besley,Georgia,serif;margin:28px 0 8px}
.amount{font:600 38px/1.2 Besley,Georgia,serif;margin:10px 0 18px;font-variant-numeric:tabular-nums}.small{font-size:13.5px;color:#6d7183}
.sheet{background:#fff;border:1px solid #e0d8c6;border-radius:4px;padding:18px}label{display:block;font-weight:600;margin:12px 0 4px}
input[type=text]{width:100%;box-sizing:border-box;font:inherit;padding:10px 12px;border:1px solid #bfb49b;border-radius:4px;background:#fff;font-variant-numeric:tabular-nums}
.two{display:grid;grid-template-columns:1fr 1fr;gap:12px}button,.btn{font:600 15px/1 inherit;font-family:inherit;padding:12px 16px;border-radius:4px;border:1px solid #bfb49b;background:#fff;color:#1c2130;cursor:pointer;text-decoration:none;display:inline-block}
button.pay{width:100%;background:#8f4f0e;border-color:#8f4f0e;color:#fff;margin-top:18px;padding:14px}:focus-visible{outline:3px solid #1d5a73;outline-offset:2px}
.bad{background:#fae4df;color:#a22c22;padding:10px 12px;border-radius:4px;margin:0 0 12px}a{color:#1d5a73}table{border-collapse:collapse;width:100%;font-size:14.5px}td,th{text-align:left;padding:8px 8px;border-bottom:1px solid #e0d8c6;vertical-align:top}
form.inline{display:inline}@media(max-width:640px){table,tbody,tr,td{display:block}th{display:none}td{border:0;padding:3px 0}tr{border-bottom:1px solid #e0d8c6;padding:8px 0}}code{font-size:13px;overflow-wrap:anywhere}.row{display:flex;gap:8px;flex-wrap:wrap;margin:10px 0}`;

const page = (title: string, body: string, isWide = false) => `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1">
<title>${escapeHtml(title)}</title><style>${STYLE}</style></head><body><main${isWide ? ' class="wide"' : ''}>${body}</main></body></html>`;

const field = (name: keyof TypedCard, label: string, { value, hint, complete }: { value: string; hint: string; complete: string }) =>
  `<div><label for="${name}">${label}</label><input type="text" id="${name}" name="${name}" value="${escapeHtml(value)}" placeholder="${hint}" inputmode="numeric" autocomplete="${complete}" required></div>`;

/** The hosted payment page: the only place where a card number is typed. */
export function payPage(session: Session, { message = '', expiry = '' }: { message?: string; expiry?: string } = {}): string {
  return page('Pay by card', `<p class="small">Local card processor. No real card is charged.</p><h1>${escapeHtml(session.label)}</h1><div class="amount">${money(session)}</div>
<form method="post" class="sheet" novalidate>${message ? `<p class="bad" role="alert">${escapeHtml(message)}</p>` : ''}
${field('number', 'Card number', { value: '', hint: '4242 4242 4242 4242', complete: 'cc-number' })}
<div class="two">${field('expiry', 'Expiry', { value: expiry, hint: '04/30', complete: 'cc-exp' })}${field('code', 'Security code', { value: '', hint: '123', complete: 'cc-csc' })}</div>
<button class="pay">Pay ${money(session)}</button></form>
<p class="small">Cards to try: ${TEST_CARDS.map(({ number, says }) => `${number} ${says}`).join(' · ')}</p>
<p><a href="${escapeHtml(session.cancelUrl)}">Back without paying</a></p>`);
}

/** The bank's question behind a card that asks first. */
export const bankPage = (session: Session, card: { brand: string; last4: string }): string => page('Your bank asks', `<p class="small">Local card processor, as your bank.</p>
<h1>Is it you who pays?</h1><div class="amount">${money(session)}</div><p>Card ending ${escapeHtml(card.last4)}.</p>
<form method="post" action="/pay/${session.id}/bank" class="row"><input type="hidden" name="brand" value="${escapeHtml(card.brand)}"><input type="hidden" name="last4" value="${escapeHtml(card.last4)}">
<button class="pay" name="answer" value="yes">Yes, it is me</button><button name="answer" value="no">No, refuse it</button></form>`);

export const closedPage = (session: Session): string => page('Nothing to pay here', session.state === 'complete'
  ? `<h1>This is paid</h1><p>${money(session)} for ${escapeHtml(session.label)}.</p><p><a href="${escapeHtml(session.successUrl)}">Back to the school</a></p>`
  : `<h1>This page has expired</h1><p>Open the invoice again to pay it.</p><p><a href="${escapeHtml(session.cancelUrl)}">Back to the school</a></p>`);

export const notFoundPage = (): string => page('Not found', '<h1>There is no such page</h1><p><a href="/">All payments</a></p>');

const button = (action: string, words: string) => `<form class="inline" method="post" action="${action}"><button>${words}</button></form>`;
const WORDS: Record<Session['state'], string> = { open: 'waiting', complete: 'paid', expired: 'expired' };

function eventRow(event: StoredEvent): string {
  const sent = event.deliveries.map(({ status }) => (status === '200' ? 'taken' : status === 'no answer' ? 'no answer' : `answered ${status}`)).join(', ');
  return `<tr><td><b>${escapeHtml(event.type)}</b><br><code>${event.id}</code></td><td>${escapeHtml(sent) || 'not sent yet'}</td>
<td class="row">${button(`/events/${event.id}/send`, event.deliveries.length === 0 ? 'Send' : 'Send again')}${button(`/events/${event.id}/late`, 'Send six minutes late')}</td></tr>`;
}

/** What happened, with every way in which events go wrong at the press of a button. */
export function overviewPage({ sessions, events, isHolding }: State): string {
  const sessionRows = sessions.slice(0, 50).map((session) => `<tr><td>${escapeHtml(session.label)}<br><code>${session.id}</code></td><td>${money(session)}</td><td>${WORDS[session.state]}${session.card ? `, card ending ${escapeHtml(session.card.last4)}` : ''}${session.refusal ? `<br>${escapeHtml(session.refusal)}` : ''}</td>
<td>${session.state === 'open' ? `<a href="/pay/${session.id}">Open</a> ${button(`/sessions/${session.id}/expire`, 'Let it expire')}` : ''}</td></tr>`).join('');
  return page('Card payments on this machine', `<h1>Card payments on this machine</h1><p class="small">What the school asked the card processor for. No real card is charged.</p>
<h2>Payments</h2>${sessionRows ? `<table><tr><th>For</th><th>Amount</th><th>State</th><th></th></tr>${sessionRows}</table>` : '<p>Nothing was paid yet.</p>'}
<h2>Events</h2><p>Events are ${isHolding ? '<b>held back</b> until you send them.' : 'sent at once.'}</p>
<div class="row">${button('/holding', isHolding ? 'Send at once from now on' : 'Hold events back')}${button('/events/send-backwards', 'Send all, newest first')}</div>
${events.length ? `<table><tr><th>Event</th><th>Sent</th><th></th></tr>${events.slice(0, 60).map(eventRow).join('')}</table>` : '<p>No event yet.</p>'}`, true);
}
