import Link from 'next/link';
import { Sheet } from '@/components/ui/sheet';
import { weeklyWords } from '@/lib/calendar/weekday-words';
import { formatDate } from '@/lib/format';
import { reachWords } from '@/lib/harmony/hands';
import type { StudentScreen } from '@/lib/people/server/read-students';

export function StudentFacts({ student, locale }: { student: StudentScreen; locale: string }) {
  return (
    <div className="flex flex-col gap-4">
      <Sheet eyebrow="Enrolled">
        {student.enrolments.length === 0 ? <p className="text-ink-3">Not enrolled at present.</p> : (
          <ul className="flex flex-col gap-3">
            {student.enrolments.map((enrolment) => (
              <li key={enrolment.id}>
                <p className="font-semibold">{enrolment.subjectLabel}</p>
                <p className="text-ink-2">{weeklyWords(enrolment.weekday, enrolment.startMin, enrolment.lengthMinutes)}</p>
                <p className="text-small text-ink-3">{[enrolment.teacherName, enrolment.roomName, enrolment.siteName].filter(Boolean).join(', ')}</p>
              </li>
            ))}
          </ul>
        )}
      </Sheet>
      {student.family || student.guardianLine ? (
        <Sheet eyebrow="Family">
          {student.family ? <p><Link href={`/families/${student.family.id}`} className="font-semibold text-petrol">{student.family.name} family</Link></p> : null}
          {student.guardianLine ? <p className="text-ink-2">{student.guardianLine}</p> : null}
        </Sheet>
      ) : null}
      {student.credits.length > 0 ? (
        <Sheet eyebrow="Make-up credits">
          <ul>{student.credits.map(({ id, minutes, lastOn }) => <li key={id} className="num">{minutes} minutes, to be used by {formatDate(lastOn, locale, 'plain')}</li>)}</ul>
        </Sheet>
      ) : null}
      <Sheet eyebrow="Hands"><p className="text-ink-2">{`One hand reaches ${reachWords(student.reachSemitones)} in comfort. Wider voicings are split between the hands or rolled.`}</p></Sheet>
    </div>
  );
}
