import { HeartPulse } from 'lucide-react';
import { Sheet } from '@/components/ui/sheet';
import { formatDate, plural } from '@/lib/format';
import type { StaffPractice } from '@/lib/ladder/server/practice-for-staff';
import { addDays, type LocalDate } from '@/lib/time';
import { SetPractice } from './set-practice';

type PracticeProps = { practice: StaffPractice | null; lessons: readonly { localDate: LocalDate }[]; locale: string; today: LocalDate };
const DAYS_WITHOUT_LESSON = 7;

/** What is set, how much was played, what does not sit any more, and whether it hurt. Nothing for who may not see it. */
export function Practice({ practice, lessons, locale, today }: PracticeProps) {
  if (!practice) return null;
  const nextLessonOn = lessons.find(({ localDate }) => localDate > today)?.localDate ?? addDays(today, DAYS_WITHOUT_LESSON);
  const { set, minutes, weak, hurts, maySet } = practice;
  return (
    <Sheet eyebrow="Practice">
      <div className="grid gap-3">
        {hurts.map(({ on, note }, at) => <p key={at} className="flex gap-2 rounded bg-brick-wash px-3 py-2 text-brick"><HeartPulse size={18} aria-hidden className="mt-[2px] shrink-0" />{`${formatDate(on, locale, 'short')}. ${note} Talk about it before playing.`}</p>)}
        {set ? (
          <div>
            <p className="font-semibold">{`Set until ${formatDate(set.dueOn, locale, 'short')}`}</p>
            <ul className="text-ink-2">{set.items.map((item) => <li key={item}>{item}</li>)}</ul>
            <p className="text-small text-ink-3">{`by ${set.by}`}</p>
          </div>
        ) : <p className="text-ink-3">Nothing is set.</p>}
        <p className="num text-ink-2">{minutes === 0 ? 'No minutes noted in two weeks.' : `${plural(minutes, 'minute')} in two weeks.`}</p>
        {weak.length > 0 ? <p className="text-ink-2">{`Failed twice in review: ${weak.join(', ')}.`}</p> : null}
        {maySet ? <SetPractice practice={practice} dueOn={nextLessonOn} /> : null}
      </div>
    </Sheet>
  );
}
