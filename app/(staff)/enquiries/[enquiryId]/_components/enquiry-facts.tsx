import { Sheet } from '@/components/ui/sheet';
import { wishWords } from '@/lib/calendar/enquiry-words';
import type { EnquiryScreen } from '@/lib/calendar/server/read-enquiries';
import { formatInstant } from '@/lib/format';

export function EnquiryFacts({ screen: { enquiry, events }, school }: { screen: EnquiryScreen; school: { locale: string; zone: string } }) {
  const facts: [string, string | null][] = [
    ['Contact', [enquiry.contactName, enquiry.contactEmail, enquiry.contactPhone].filter((part) => part !== null && part !== '').join(', ')],
    ['Student', `${enquiry.studentName}${enquiry.studentAge ? `, ${enquiry.studentAge} years` : ''}${enquiry.isAdult ? ', adult' : ''}`],
    ['Could come', wishWords(enquiry.wishes)],
    ['Length', `${enquiry.lengthMinutes} minutes`],
    ['Message', enquiry.message === '' ? null : enquiry.message],
  ];
  return (
    <Sheet eyebrow="What they asked">
      <dl className="grid grid-cols-[minmax(90px,140px)_1fr] gap-x-4 gap-y-2">
        {facts.filter(([, value]) => value !== null).map(([label, value]) => (
          <div key={label} className="contents"><dt className="text-ink-3">{label}</dt><dd className="min-w-0 whitespace-pre-wrap">{value}</dd></div>
        ))}
      </dl>
      <h3 className="eyebrow mb-2 mt-5 !font-sans">What happened</h3>
      <ol className="flex flex-col gap-2">
        {events.map(({ id, at, text, byName }) => (
          <li key={id} className="text-small"><span className="num text-ink-3">{formatInstant(at, school)}</span> {text}{byName ? <span className="text-ink-3"> {byName}</span> : null}</li>
        ))}
      </ol>
    </Sheet>
  );
}
