import { ButtonLink } from '@/components/ui/button';
import { Chip } from '@/components/ui/chip';
import { Sheet } from '@/components/ui/sheet';
import type { Enquiry } from '@/db/enquiries';
import type { EnquiryScreen } from '@/lib/calendar/server/read-enquiries';
import { formatDate, formatMoney, formatTimeRange } from '@/lib/format';
import type { LocalDate } from '@/lib/time';

type TrialSheetProps = { trial: NonNullable<EnquiryScreen['trial']>; enquiry: Enquiry; school: { locale: string; currency: string }; today: LocalDate };

/** The booked trial and what comes after it: enrolling at a weekly opening. */
export function TrialSheet({ trial, enquiry, school, today }: TrialSheetProps) {
  const { lesson } = trial;
  const isOver = trial.localDate < today || lesson?.state === 'taught' || lesson?.state === 'not_taught';
  return (
    <Sheet eyebrow="Trial lesson" action={<Chip tone={isOver ? 'ok' : 'info'}>{lesson?.state === 'not_taught' ? 'did not come' : isOver ? 'taken' : 'booked'}</Chip>}>
      {lesson ? <p className="font-display text-h2 font-semibold">{formatDate(lesson.localDate, school.locale, 'day')}, {formatTimeRange(lesson.startMin, lesson.lengthMinutes)}</p> : null}
      <p className="mt-1 text-ink-2">{lesson?.roomName}, {lesson?.siteName}, with {lesson?.teacherName}</p>
      <p className="mt-1 text-small text-ink-3">
        Fee {formatMoney({ amountMinor: trial.feeMinor, currency: school.currency }, school.locale)}, credited on the first bill when they enrol by {formatDate(trial.creditUntilOn, school.locale, 'plain')}.
      </p>
      {enquiry.state === 'enrolled' ? <p className="mt-3 font-semibold text-felt">Enrolled.</p> : <ButtonLink kind="primary" className="mt-4" href={`/enrol?enquiry=${enquiry.id}`}>Enrol</ButtonLink>}
    </Sheet>
  );
}
