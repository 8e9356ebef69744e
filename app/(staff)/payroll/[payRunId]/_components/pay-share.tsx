import { Sheet } from '@/components/ui/sheet';
import { say } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import type { MonthShare } from '@/lib/payroll/server/pay-run-screen';
import { PayShareChart } from './pay-share-chart';

/** Pay beside the tuition of the lessons held, month by month, with the figures in a table beside the picture. */
export function PayShare({ months, currency, locale }: { months: readonly MonthShare[]; currency: string; locale: string }) {
  const rows = months.map(({ month, tuitionMinor, payMinor }) => ({
    month: formatDate(`${month}-01`, locale, 'month'), short: formatDate(`${month}-01`, locale, 'month').slice(0, 3), tuitionMinor, payMinor,
    share: tuitionMinor > 0 ? `${Math.round((payMinor * 100) / tuitionMinor)} %` : '—',
  }));
  return (
    <div className="grid gap-[14px]">
      <Sheet eyebrow="Pay as a share of tuition">
        {rows.length === 0 ? <p className="text-small text-ink-3">It appears when the tuition of these months is billed.</p> : <PayShareChart rows={rows} />}
        {rows.length > 0 ? (
          <table className="mt-3 w-full text-small">
            <caption className="sr-only">Tuition of the lessons held, and pay</caption>
            <thead><tr className="text-ink-3"><th scope="col" className="text-left font-semibold">Month</th><th scope="col" className="text-right font-semibold">Tuition</th><th scope="col" className="text-right font-semibold">Pay</th></tr></thead>
            <tbody>{rows.map((row) => <tr key={row.month} className="border-t border-rule"><th scope="row" className="py-1 text-left font-normal">{row.short}</th><td className="num text-right">{say(row.tuitionMinor, { currency, locale })}</td><td className="num text-right">{say(row.payMinor, { currency, locale })}</td></tr>)}</tbody>
          </table>
        ) : null}
      </Sheet>
      <Sheet eyebrow="Before you pay">
        <p className="text-small">These are gross amounts. Tax, social insurance and whether a teacher is an employee follow your local law: check with your payroll adviser.</p>
      </Sheet>
    </div>
  );
}
