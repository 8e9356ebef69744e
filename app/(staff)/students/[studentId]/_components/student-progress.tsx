import { StudentLadder } from '@/components/ladder/student-ladder';
import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import { formatDate } from '@/lib/format';
import { OUTCOME_WORDS } from '@/lib/ladder/hearing';
import type { StaffHearing, StudentStanding } from '@/lib/ladder/server/student-standing';

/** The student’s own ladder, and what was heard so far. A rung leads to its hearing. */
export function StudentProgress({ standing: { ladder, hearings, mayHear }, locale }: { standing: StudentStanding; locale: string }) {
  const base = `/hearings/${ladder.student.id}`;
  return (
    <>
      <Sheet eyebrow="On the ladder"><StudentLadder ladder={ladder} locale={locale} {...(mayHear ? { hrefOf: (rungId) => `${base}?rung=${rungId}` } : {})} /></Sheet>
      <Sheet eyebrow="Heard so far" flush>
        {hearings.length === 0 ? <p className="px-4 pb-4 text-ink-3">Nothing yet.</p> : <ul>{hearings.map((hearing) => <HearingRow key={hearing.id} hearing={hearing} locale={locale} />)}</ul>}
      </Sheet>
    </>
  );
}

function HearingRow({ hearing: { title, outcome, on, by, notePublic, notePrivate }, locale }: { hearing: StaffHearing; locale: string }) {
  return (
    <li className="border-t border-rule px-4 py-[10px]">
      <p className="flex flex-wrap items-center justify-between gap-2">
        <span><b>{title}</b> <span className="text-ink-3">{`${formatDate(on, locale, 'short')}, ${by}`}</span></span>
        <Chip tone={outcome === 'passed' ? 'ok' : outcome === null ? 'info' : 'wait'}>{outcome === null ? 'under way' : OUTCOME_WORDS[outcome]}</Chip>
      </p>
      {notePublic ? <p className="text-ink-2">{notePublic}</p> : null}
      {notePrivate ? <p className="text-small text-ink-3">{`Among teachers: ${notePrivate}`}</p> : null}
    </li>
  );
}
