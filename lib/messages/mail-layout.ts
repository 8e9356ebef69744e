/** One mail, as text and as simple HTML in the house style. Every line is a paragraph; a link stands alone. */
export type MailText = { schoolName: string; greeting: string; lines: readonly string[]; link?: { label: string; url: string }; footer?: string };

const escapeHtml = (text: string): string =>
  text.replace(/[&<>"']/g, (sign) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' })[sign] ?? sign);

export function plainMail({ schoolName, greeting, lines, link, footer }: MailText): string {
  const paragraphs = [greeting, ...lines, ...(link ? [`${link.label}:\n${link.url}`] : []), schoolName, ...(footer ? [`-- \n${footer}`] : [])];
  return `${paragraphs.join('\n\n')}\n`;
}

export function htmlMail({ schoolName, greeting, lines, link, footer }: MailText): string {
  const paragraph = (text: string) => `<p style="margin:0 0 14px">${escapeHtml(text)}</p>`;
  const button = link
    ? `<p style="margin:22px 0"><a href="${escapeHtml(link.url)}" style="background:#1c2130;color:#ffffff;text-decoration:none;padding:12px 18px;border-radius:4px;font-weight:600">${escapeHtml(link.label)}</a></p>`
    : '';
  const small = footer ? `<p style="margin:22px 0 0;font-size:13px;color:#6d7183">${escapeHtml(footer)}</p>` : '';
  return `<!doctype html><html lang="en"><body style="margin:0;background:#fbf8f1;color:#1c2130;font:16px/1.5 'Hanken Grotesk',Helvetica,Arial,sans-serif">
<div style="max-width:560px;margin:0 auto;padding:28px 22px"><p style="font:700 20px Georgia,serif;border-bottom:1px solid #e0d8c6;padding-bottom:12px;margin:0 0 20px">${escapeHtml(schoolName)}</p>
${paragraph(greeting)}${lines.map(paragraph).join('')}${button}${small}</div></body></html>`;
}
