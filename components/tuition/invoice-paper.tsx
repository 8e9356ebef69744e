import type { ReactNode } from 'react';
import { Working } from '../ui/working';
import { say, type MoneyWords } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import type { LocalDate } from '@/lib/time';

export type PaperLine = { text: string; amountMinor: number; steps: readonly string[] };
type InvoicePaperProps = {
  schoolName: string; seller: { name: string; addressLines: string; taxNumber: string | null };
  head: { documentNo: string; label: string; issuedOn: LocalDate };
  to: { name: string; address: string };
  lines: readonly PaperLine[]; words: MoneyWords; children: ReactNode;
};

/** An invoice as a sheet of paper: on the screen each amount opens to its working, printed the workings stand below it. */
export function InvoicePaper({ schoolName, seller, head, to, lines, words, children }: InvoicePaperProps) {
  return (
    <article className="sheet p-5 md:p-8 print:p-0" aria-label={`Invoice ${head.documentNo}`}>
      <header className="flex flex-wrap justify-between gap-x-8 gap-y-4 border-b-2 border-ink pb-4">
        <div>
          <p className="font-display text-h2 font-semibold">{schoolName}</p>
          <p className="whitespace-pre-line text-small text-ink-2">{[seller.name === schoolName ? '' : seller.name, seller.addressLines, seller.taxNumber ? `Tax number ${seller.taxNumber}` : ''].filter(Boolean).join('\n')}</p>
        </div>
        <dl className="grid grid-cols-[auto_auto] gap-x-4 text-small">
          <dt className="text-ink-3">Invoice</dt><dd className="num font-semibold">{head.documentNo}</dd>
          <dt className="text-ink-3">Issued</dt><dd>{formatDate(head.issuedOn, words.locale, 'full')}</dd>
          <dt className="text-ink-3">For</dt><dd>{head.label}</dd>
        </dl>
      </header>
      <p className="whitespace-pre-line py-4">{[to.name, to.address].filter(Boolean).join('\n')}</p>
      <table className="w-full border-collapse">
        <caption className="sr-only">Lines of the invoice; each amount opens to show how it was worked out.</caption>
        <thead><tr className="border-b border-rule-strong text-small text-ink-3"><th scope="col" className="py-2 text-left font-semibold">What</th><th scope="col" className="py-2 text-right font-semibold">Amount</th></tr></thead>
        <tbody>
          {lines.map((line, index) => (
            <tr key={index} className="border-b border-rule align-top">
              <td className="py-3 pr-4">
                {line.text}
                <ol className="hidden text-small text-ink-2 print:block">{line.steps.map((step, at) => <li key={at}>{step}</li>)}</ol>
              </td>
              <td className="num py-3 text-right font-semibold"><Working figure={say(line.amountMinor, words)} steps={line.steps} align="right" /></td>
            </tr>
          ))}
        </tbody>
      </table>
      {children}
    </article>
  );
}
