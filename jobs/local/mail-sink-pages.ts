import type { ParsedMail } from 'mailparser';

export type StoredMail = { id: string; mail: ParsedMail };

const escapeHtml = (text: string): string =>
  text.replace(/[&<>"']/g, (sign) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' })[sign] ?? sign);

const recipientOf = (mail: ParsedMail) => (Array.isArray(mail.to) ? mail.to[0]?.text : mail.to?.text) ?? '';

const page = (title: string, body: string) => `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width">
<title>${escapeHtml(title)}</title><style>
body{margin:0;background:#fbf8f1;color:#1c2130;font:16px/1.5 'Hanken Grotesk',Helvetica,Arial,sans-serif}
main{max-width:760px;margin:0 auto;padding:28px 18px}h1{font:600 26px Georgia,serif;margin:0 0 4px}p.small{color:#6d7183;margin:0 0 22px}
ul{list-style:none;margin:0;padding:0;border-top:1px solid #e0d8c6}li{border-bottom:1px solid #e0d8c6;padding:12px 0}
a{color:#1d5a73}pre{white-space:pre-wrap;overflow-wrap:anywhere;font:inherit;background:#fff;border:1px solid #e0d8c6;border-radius:4px;padding:18px}
</style></head><body><main>${body}</main></body></html>`;

export function mailsPage(mails: StoredMail[]): string {
  const items = mails.map(({ id, mail }) =>
    `<li><a href="/mail/${id}"><b>${escapeHtml(mail.subject ?? '')}</b></a><br>to ${escapeHtml(recipientOf(mail))}</li>`).join('');
  return page('Mail on this machine', `<h1>Mail on this machine</h1><p class="small">What the school has sent. None of it left this machine.</p>
${items === '' ? '<p>Nothing has been sent yet.</p>' : `<ul>${items}</ul>`}`);
}

export function mailPage({ mail }: StoredMail): string {
  const files = mail.attachments.map(({ filename }) => escapeHtml(filename ?? 'file')).join(', ');
  const text = escapeHtml(mail.text ?? '').replace(/https?:\/\/[^\s<]+/g, (url) => `<a href="${url}">${url}</a>`);
  return page(mail.subject ?? 'Mail', `<p><a href="/">All mail</a></p><h1>${escapeHtml(mail.subject ?? '')}</h1>
<p class="small">to ${escapeHtml(recipientOf(mail))}${files === '' ? '' : ` · attached: ${files}`}</p><pre>${text}</pre>`);
}
