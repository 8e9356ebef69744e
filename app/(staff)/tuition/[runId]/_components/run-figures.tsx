import { say } from '@/lib/explained';
import type { RunDetail } from '@/lib/tuition/server/tuition-run-screen';

/** What stands, what is held back, and how it compares with the last time. */
export function RunFigures({ run, locale }: { run: RunDetail; locale: string }) {
  const words = { currency: run.currency, locale };
  const count = (kind: string) => run.bills.filter(({ changeKind, state }) => changeKind === kind && state !== 'problem').length;
  const difference = run.totalMinor - run.lastTotalMinor;
  const figures = [
    { label: run.state === 'released' ? 'Released' : 'Control total', value: say(run.totalMinor, words), note: run.lastTotalMinor > 0 ? `${difference >= 0 ? '+' : '−'} ${say(Math.abs(difference), words)} beside tuition of the last run` : 'no run before this one' },
    { label: 'New', value: String(count('new')), note: 'first bill of a family' },
    { label: 'Changed', value: String(count('changed')), note: 'other than last time' },
    { label: 'Gone', value: String(count('gone')), note: 'nothing to charge now' },
    { label: 'Held back', value: String(run.held), note: 'by a person, or with a problem' },
  ];
  return (
    <dl className="mb-4 grid grid-cols-2 gap-x-6 gap-y-4 border-y border-rule-strong py-4 md:grid-cols-5">
      {figures.map(({ label, value, note }) => (
        <div key={label} className="max-md:first:col-span-2">
          <dt className="eyebrow">{label}</dt>
          <dd className="num font-display text-[24px] font-semibold leading-tight">{value}</dd>
          <dd className="text-small text-ink-3">{note}</dd>
        </div>
      ))}
    </dl>
  );
}
