import { Chip } from '@/components/ui/chip';
import type { RateLine } from '@/db/pay-rates';
import { formatDate, formatMoney, plural } from '@/lib/format';
import { rateWords } from '@/lib/payroll/rate-words';
import type { RateBook, TeacherRates } from '@/lib/payroll/server/pay-rates';
import type { LocalDate } from '@/lib/time';
import { RateForm } from './rate-form';

type RatesPartProps = { book: RateBook; locale: string; today: LocalDate };

/** What each teacher is paid, with the days on which it holds. A lesson without a rate stops the pay run, so it is said here. */
export function RatesPart({ book, locale, today }: RatesPartProps) {
  if (book.teachers.length === 0) return null;
  return (
    <section aria-labelledby="rates" className="mt-8">
      <h2 id="rates" className="mb-3 text-h2">Pay rates</h2>
      <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_320px]">
        <div className="flex min-w-0 flex-col gap-2">
          {book.teachers.map((teacher) => <RatesOfTeacher key={teacher.engagementId} teacher={teacher} locale={locale} today={today} />)}
        </div>
        <RateForm book={book} locale={locale} today={today} />
      </div>
    </section>
  );
}

function RatesOfTeacher({ teacher: { name, kind, currency, rates }, locale, today }: { teacher: TeacherRates; locale: string; today: LocalDate }) {
  const current = rates.filter((rate) => stateOf(rate, today) !== 'ended');
  const ended = rates.filter((rate) => stateOf(rate, today) === 'ended');
  const lineOf = (rate: RateLine) => <Rate key={rate.id} rate={rate} money={formatMoney({ amountMinor: rate.amountMinor, currency }, locale)} locale={locale} today={today} />;
  return (
    <details className="sheet px-4 py-3">
      <summary className="cursor-pointer tap">
        <b>{name}</b> <span className="text-small text-ink-3">{kind}, {current.length === 0 ? null : plural(current.length, 'rate')}</span>
        {current.length === 0 ? <Chip tone="bad">no rate yet</Chip> : null}
      </summary>
      {current.length === 0 ? <p className="mt-2 rounded bg-brass-wash px-3 py-2 text-brass">Until there is a rate, this teacher’s lessons cannot be paid.</p> : <ul aria-label={`Rates of ${name}`} className="mt-2">{current.map(lineOf)}</ul>}
      {ended.length === 0 ? null : (
        <>
          <p className="eyebrow mt-3">Earlier rates</p>
          <ul aria-label={`Earlier rates of ${name}`}>{ended.map(lineOf)}</ul>
        </>
      )}
    </details>
  );
}

function Rate({ rate, money, locale, today }: { rate: RateLine; money: string; locale: string; today: LocalDate }) {
  const state = stateOf(rate, today);
  const day = (date: LocalDate) => formatDate(date, locale, 'full');
  return (
    <li className="flex flex-wrap items-baseline justify-between gap-x-4 gap-y-1 border-b border-rule py-2 last:border-b-0">
      <span className="min-w-0">
        {rateWords(rate)}
        <span className="block text-small text-ink-3">from {day(rate.validFrom)}{rate.validTo ? `, before ${day(rate.validTo)}` : ''}</span>
      </span>
      <span className="flex items-center gap-3">
        {state === 'in force' ? null : <Chip tone={state === 'to come' ? 'wait' : 'neutral'}>{state}</Chip>}
        <b className="num">{money}</b>
      </span>
    </li>
  );
}

const stateOf = ({ validFrom, validTo }: RateLine, today: LocalDate) => (validFrom > today ? 'to come' : validTo !== null && validTo <= today ? 'ended' : 'in force');
