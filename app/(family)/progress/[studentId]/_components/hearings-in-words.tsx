import { Check, Clock } from 'lucide-react';
import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import { formatDate } from '@/lib/format';
import { OUTCOME_WORDS } from '@/lib/ladder/hearing';
import type { PlainHearing } from '@/lib/ladder/server/progress-of-student';

/** The last hearings with the teacher's words. */
export function HearingsInWords({ hearings, locale, isReader }: { hearings: readonly PlainHearing[]; locale: string; isReader: boolean }) {
  if (hearings.length === 0) return <Sheet title="Hearings"><p className="text-ink-3">{`No rung has been heard yet. A hearing is a short moment in the lesson in which the teacher listens to ${isReader ? 'you' : 'the student'} play one thing; what was heard is kept as proof.`}</p></Sheet>;
  return (
    <Sheet title="Hearings" flush>
      <ul className="border-t border-rule">
        {hearings.map(({ id, plainTitle, title, outcome, on, by, note }) => (
          <li key={id} className="grid gap-1 border-b border-rule px-4 py-3 last:border-b-0">
            <p className="flex flex-wrap items-center justify-between gap-2">
              <span className="font-bold">{plainTitle}</span>
              <Chip tone={outcome === 'passed' ? 'ok' : 'wait'} icon={outcome === 'passed' ? <Check size={13} aria-hidden /> : <Clock size={13} aria-hidden />}>{OUTCOME_WORDS[outcome]}</Chip>
            </p>
            <p className="text-small text-ink-3">{`${formatDate(on, locale, 'short')}, heard by ${by}`}<span className="block text-[12.5px]">{`Musicians say: ${title}`}</span></p>
            {note ? <p className="max-w-[58ch]">{`“${note}”`}</p> : null}
          </li>
        ))}
      </ul>
    </Sheet>
  );
}
