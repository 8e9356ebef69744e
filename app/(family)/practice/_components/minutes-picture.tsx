import { Sheet } from '@/components/ui/sheet';
import { formatDate, plural } from '@/lib/format';
import type { PracticeToday } from '@/lib/ladder/server/practice-today';

const HEIGHT_PX = 56;
/** An hour fills the picture; more does not grow it, because more is not always better. */
const FULL_MINUTES = 60;

/** The last fourteen days as they were. Days of rest are empty, and nothing counts them. */
export function MinutesPicture({ days, locale }: { days: PracticeToday['days']; locale: string }) {
  const sum = days.reduce((total, { minutes }) => total + minutes, 0);
  return (
    <Sheet eyebrow="The last two weeks">
      <ol className="flex items-end gap-[6px]" style={{ height: HEIGHT_PX }} aria-label={`${plural(sum, 'minute')} in two weeks`}>
        {days.map(({ date, minutes }) => (
          <li key={date} className="flex-1">
            <span className="sr-only">{`${formatDate(date, locale, 'short')}: ${plural(minutes, 'minute')}`}</span>
            <span aria-hidden className={`block rounded-[2px] ${minutes > 0 ? 'bg-felt' : 'bg-rule'}`} style={{ height: Math.max(3, Math.round((Math.min(minutes, FULL_MINUTES) / FULL_MINUTES) * HEIGHT_PX)) }} />
          </li>
        ))}
      </ol>
      <p className="num mt-2 text-small text-ink-3">{sum === 0 ? 'Nothing noted yet.' : `${plural(sum, 'minute')} in all. Days of rest belong to it.`}</p>
    </Sheet>
  );
}
