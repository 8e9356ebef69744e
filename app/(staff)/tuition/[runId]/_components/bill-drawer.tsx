'use client';

import { ButtonLink } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { say, type MoneyWords } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import type { RunBill, RunDetail } from '@/lib/tuition/server/tuition-run-screen';
import { HoldBill } from './hold-bill';

/** One family's bill with every step of its working, and the shares of its payers. */
export function BillDrawer({ bill, run, words, onClose }: { bill: RunBill | null; run: RunDetail; words: MoneyWords; onClose: () => void }) {
  if (!bill) return null;
  return (
    <Dialog open onOpenChange={(open) => !open && onClose()} side="right" title={`${bill.familyName} family`} description={bill.changeText || undefined}>
      {bill.problem ? <p className="mb-4 rounded bg-brick-wash px-3 py-2 text-brick">{bill.problem}</p> : null}
      <ul className="flex flex-col gap-4">
        {bill.lines.map((line, index) => (
          <li key={index}>
            <p className="flex justify-between gap-4 font-semibold"><span>{line.text}</span><span className="num">{say(line.amountMinor, words)}</span></p>
            <ol className="mt-1 text-small text-ink-2">{line.steps.map((step, at) => <li key={at}>{step}</li>)}</ol>
          </li>
        ))}
      </ul>
      {bill.lines.length > 0 ? <p className="mt-4 flex justify-between border-t-2 border-ink pt-2 font-semibold"><span>Total</span><span className="num">{say(bill.totalMinor, words)}</span></p> : null}
      <Shares bill={bill} words={words} />
      {bill.invoiceId ? <ButtonLink href={`/tuition/invoices/${bill.invoiceId}`} className="mt-5">See the invoice</ButtonLink> : null}
      {run.mayRelease && run.state === 'preview' && (bill.state === 'planned' || bill.state === 'held') ? <HoldBill runId={run.runId} bill={bill} /> : null}
    </Dialog>
  );
}

function Shares({ bill, words }: { bill: RunBill; words: MoneyWords }) {
  if (bill.shares.length === 0) return null;
  return (
    <section className="mt-5">
      <p className="eyebrow mb-2">{bill.shares.length === 1 ? 'Payer' : 'Payers; each sees only their own'}</p>
      <ul className="flex flex-col gap-3">
        {bill.shares.map((share) => (
          <li key={share.payerName}>
            <p className="flex justify-between gap-4"><b>{share.payerName}</b><span className="num font-semibold">{say(share.amountMinor, words)}</span></p>
            <ul className="text-small text-ink-2">
              {share.sentences.map((sentence) => <li key={sentence}>{sentence}</li>)}
              {share.dues.map(({ dueOn, amountMinor }) => <li key={dueOn}>{say(amountMinor, words)} due {formatDate(dueOn, words.locale, 'short')}</li>)}
            </ul>
          </li>
        ))}
      </ul>
    </section>
  );
}
