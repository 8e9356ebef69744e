import { ChevronDown } from 'lucide-react';
import { Sheet } from '@/components/ui/sheet';
import { formatDate } from '@/lib/format';
import type { PassedRung } from '@/lib/ladder/server/student-standing';
import { AskRecheck } from './ask-recheck';

type PassedProps = { passed: readonly PassedRung[]; studentId: string; mayAskRecheck: boolean; locale: string };

const SHOWN_AT_ONCE = 5;

/** Passed rungs with day and teacher, the latest first; the older ones unfold. */
export function PassedRungs({ passed, ...row }: PassedProps) {
  const [latest, older] = [passed.slice(0, SHOWN_AT_ONCE), passed.slice(SHOWN_AT_ONCE)];
  return (
    <Sheet title="Passed rungs" flush>
      {passed.length === 0 ? <p className="px-4 pb-4 text-ink-3">None yet.</p> : <ul>{latest.map((rung) => <PassedRow key={rung.id} rung={rung} {...row} />)}</ul>}
      {older.length > 0 ? (
        <details className="group border-t border-rule">
          <summary className="flex list-none items-center gap-2 px-4 py-3 font-semibold text-petrol tap [&::-webkit-details-marker]:hidden">{`${older.length} more`}<ChevronDown size={16} aria-hidden className="group-open:rotate-180" /></summary>
          <ul>{older.map((rung) => <PassedRow key={rung.id} rung={rung} {...row} />)}</ul>
        </details>
      ) : null}
    </Sheet>
  );
}

function PassedRow({ rung: { id, code, title, on, how, isToRecheck }, studentId, mayAskRecheck, locale }: Omit<PassedProps, 'passed'> & { rung: PassedRung }) {
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-3 border-t border-rule px-4 py-[10px]">
      <div className="min-w-0">
        <p className="font-bold"><span className="num mr-2 text-ink-3">{code}</span>{title}</p>
        <p className="text-small text-ink-3">{[on ? formatDate(on, locale) : null, how, isToRecheck ? 'to be heard once more' : null].filter(Boolean).join(', ')}</p>
      </div>
      {mayAskRecheck && !isToRecheck ? <AskRecheck studentId={studentId} rungId={id} title={title} /> : null}
    </li>
  );
}
