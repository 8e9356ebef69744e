import { Sheet } from '@/components/ui/sheet';
import { formatMoney } from '@/lib/format';
import type { Control } from '@/lib/imports/server/check-import';

/** The sums that must come out even: rows = come in + left out, and the prices of both are the whole column. */
export function ControlSheet({ control: { sheets, prices }, currency, locale }: { control: Control; currency: string; locale: string }) {
  const money = (amountMinor: number) => formatMoney({ amountMinor, currency }, locale);
  return (
    <Sheet eyebrow="Control totals" flush>
      <table className="w-full border-collapse text-small">
        <thead>
          <tr className="border-b border-rule-strong text-ink-3">
            <th scope="col" className="px-4 py-2 text-left font-semibold">Sheet</th>
            {['Rows', 'Good', 'Left out'].map((word) => <th key={word} scope="col" className="px-2 py-2 text-right font-semibold last:pr-4">{word}</th>)}
          </tr>
        </thead>
        <tbody>
          {sheets.map(({ sheet, rows, good, problems, blanks }) => (
            <tr key={sheet} className="border-b border-rule">
              <th scope="row" className="px-4 py-2 text-left font-semibold">{sheet}{blanks > 0 ? <span className="block font-normal text-ink-3">and {blanks} blank</span> : null}</th>
              <td className="px-2 py-2 text-right align-top">{rows}</td>
              <td className="px-2 py-2 text-right align-top">{good}</td>
              <td className={`py-2 pl-2 pr-4 text-right align-top ${problems > 0 ? 'font-semibold text-brick' : ''}`}>{problems}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {prices.allMinor > 0 ? (
        <dl className="grid grid-cols-[1fr_auto] gap-x-3 gap-y-1 px-4 py-3 text-small">
          <dt>Prices of the good rows</dt><dd className="num text-right">{money(prices.goodMinor)}</dd>
          <dt>Prices of the rows left out</dt><dd className="num text-right">{money(prices.problemMinor)}</dd>
          <dt className="font-semibold">The whole column</dt><dd className="num text-right font-semibold">{money(prices.allMinor)}</dd>
        </dl>
      ) : null}
    </Sheet>
  );
}
