import type { ReactNode } from 'react';
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
      <div aria-hidden className="flex justify-between border-b border-rule-strong py-2 text-small font-semibold text-ink-3"><span>What</span><span>Amount</span></div>
      <ul aria-label="Lines; each opens to show how it was worked out">{lines.map((line, index) => <PaperRow key={index} line={line} words={words} />)}</ul>
      {children}
    </article>
  );
}

/** Opens on the screen; on paper its working always stands below it. */
function PaperRow({ line, words }: { line: PaperLine; words: MoneyWords }) {
  const working = line.steps.map((step, at) => <li key={at}>{step}</li>);
  return (
    <li className="border-b border-rule">
      <details className="group">
        <summary className="flex cursor-pointer list-none items-baseline justify-between gap-4 py-3 tap [&::-webkit-details-marker]:hidden">
          <span className="min-w-0">{line.text}</span>
          <span className="num font-semibold underline decoration-rule-strong decoration-dotted underline-offset-4 print:no-underline">{say(line.amountMinor, words)}</span>
        </summary>
        <ol className="appear mb-3 flex flex-col gap-[2px] rounded bg-wash px-3 py-2 text-small text-ink-2 print:hidden">{working}</ol>
      </details>
      <ol className="hidden pb-2 text-small text-ink-2 print:block" aria-hidden>{working}</ol>
    </li>
  );
}
