import { Sheet } from '@/components/ui/sheet';
import { weeklyWords } from '@/lib/calendar/weekday-words';
import { formatDate } from '@/lib/format';
import type { StudentScreen } from '@/lib/people/server/read-students';

export function Enrolled({ student: { enrolments } }: { student: StudentScreen }) {
  return (
    <Sheet eyebrow="Enrolled">
      {enrolments.length === 0 ? <p className="text-ink-3">Not enrolled at present.</p> : (
        <ul className="flex flex-col gap-3">
          {enrolments.map((enrolment) => (
            <li key={enrolment.id}>
              <p className="font-semibold">{enrolment.subjectLabel}</p>
              <p className="text-ink-2">{weeklyWords(enrolment.weekday, enrolment.startMin, enrolment.lengthMinutes)}</p>
              <p className="text-small text-ink-3">{[enrolment.teacherName, enrolment.roomName, enrolment.siteName].filter(Boolean).join(', ')}</p>
            </li>
          ))}
        </ul>
      )}
    </Sheet>
  );
}

export function Credits({ student: { credits }, locale }: { student: StudentScreen; locale: string }) {
  return (
    <Sheet eyebrow="Make-up credits">
      {credits.length === 0 ? <p className="text-ink-3">None open.</p> : (
        <ul className="grid gap-1">{credits.map(({ id, minutes, lastOn }) => <li key={id} className="num">{`${minutes} minutes, to be used by ${formatDate(lastOn, locale, 'plain')}`}</li>)}</ul>
      )}
    </Sheet>
  );
}
