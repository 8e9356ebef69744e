'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { Checkbox, DateField, SelectField } from '@/components/ui/inputs';
import { Sheet } from '@/components/ui/sheet';
import { WishGrid } from '@/components/ui/wish-grid';
import type { FoundOpenings, NamedOpening } from '@/lib/calendar/server/find-openings-for';
import type { EnrolFacts } from '@/lib/calendar/server/enrol-facts';
import { formatDate, formatTimeRange, plural } from '@/lib/format';
import { enrol, searchOpenings } from '../../openings/actions';

type Place = Pick<NamedOpening, 'teacherId' | 'teacherName' | 'roomId' | 'roomName' | 'siteId' | 'startMin' | 'lengthMinutes' | 'localDate'>;
type EnrolScreenProps = { facts: EnrolFacts; locale: string; currency: string };

const LENGTHS = [30, 45, 60].map((minutes) => ({ value: String(minutes), label: `${minutes} minutes` }));

export function EnrolScreen({ facts, locale }: EnrolScreenProps) {
  const router = useRouter();
  const [windows, setWindows] = useState(facts.windows);
  const [lengthMinutes, setLength] = useState(facts.trialPlace?.lengthMinutes ?? 30);
  const [place, setPlace] = useState<Place | null>(facts.trialPlace);
  const [found, setFound] = useState<FoundOpenings | null>(null);
  const [fromDate, setFromDate] = useState(facts.search.fromDate);
  const [hasAccepted, setAccepted] = useState(false);
  const [message, setMessage] = useState<string>();
  const [searching, startSearch] = useTransition();
  const [saving, startSave] = useTransition();
  const search = () => startSearch(async () => {
    const result = await searchOpenings({ subjectId: facts.subjectId, level: facts.level, lengthMinutes, isWeekly: true, fromDate, untilDate: facts.search.termEndsOn, windows, siteId: facts.siteId, features: [] }).catch(() => null);
    setMessage(result?.ok ? undefined : (Object.values(result?.fields ?? {})[0]?.[0] ?? result?.message ?? 'This did not reach the school. Press again.'));
    setFound(result?.ok ? result.data : null);
  });
  const save = () => startSave(async () => {
    if (!place) return setMessage('Choose a weekly time first.');
    if (!hasAccepted) return setMessage('Tick that the terms have been accepted.');
    const { teacherId, roomId, siteId, localDate, startMin } = place;
    const result = await enrol({ teacherId, roomId, siteId, localDate, startMin, lengthMinutes: place.lengthMinutes, enquiryId: facts.enquiryId, studentId: facts.studentId, familyId: facts.familyId, subjectId: facts.subjectId, level: facts.level, hasAcceptedTerms: true }).catch(() => null);
    if (!result?.ok) return setMessage(result?.message ?? 'This did not reach the school. Press again.');
    toast.success(`${facts.studentName} is enrolled: ${plural(result.data.dates.length, 'lesson')} this term.`);
    router.push(`/students/${facts.studentId}`);
  });
  return (
    <div className="grid items-start gap-5 lg:grid-cols-[minmax(0,1fr)_360px]">
      <div className="flex flex-col gap-4">
        <Sheet eyebrow="The weekly lesson" className="flex flex-col gap-4">
          <WishGrid value={windows} onChange={setWindows} legend="When could it be?" />
          <div className="grid gap-3 sm:grid-cols-2">
            <SelectField label="Length" options={LENGTHS} value={lengthMinutes} onChange={(event) => { setLength(Number(event.target.value)); setPlace(null); }} />
            <DateField label="Not before" value={fromDate} onChange={(event) => setFromDate(event.target.value)} />
          </div>
          <Button onClick={search} pending={searching}>Find weekly openings</Button>
        </Sheet>
        {found ? <WeeklyChoices found={found} chosen={place} onChoose={setPlace} locale={locale} /> : null}
      </div>
      <Sheet eyebrow="What will happen" className="flex flex-col gap-3 lg:sticky lg:top-4">
        {place ? (
          <p><b>Every {formatDate(place.localDate, locale, 'weekday')}, {formatTimeRange(place.startMin, place.lengthMinutes)}</b><br />{place.roomName}, with {place.teacherName}<br />
            <span className="text-ink-3">first on {formatDate(place.localDate, locale, 'day')}, to the end of the term</span></p>
        ) : <p className="text-ink-3">Choose a weekly time.</p>}
        <p className="text-small text-ink-2">{facts.familyName ? `Billed to the ${facts.familyName} family.` : `A family account is opened; ${facts.guardianNames[0] ?? facts.studentName} pays.`} {facts.guardianNames.length > 0 ? `${facts.guardianNames.join(' and ')} get a mail with the dates.` : ''}</p>
        <Checkbox label="The terms have been accepted by a guardian or the adult student" checked={hasAccepted} onChange={(event) => setAccepted(event.target.checked)} />
        <FormError message={message} />
        <Button kind="primary" pending={saving} onClick={save}>Enrol</Button>
      </Sheet>
    </div>
  );
}

type ChoicesProps = { found: FoundOpenings; chosen: Place | null; onChoose: (place: Place) => void; locale: string };

function WeeklyChoices({ found, chosen, onChoose, locale }: ChoicesProps) {
  const whole = found.openings.filter(({ takenDates }) => takenDates.length === 0);
  const partly = found.openings.filter(({ takenDates }) => takenDates.length > 0);
  const isSame = (opening: NamedOpening) => chosen?.teacherId === opening.teacherId && chosen.startMin === opening.startMin && chosen.localDate === opening.localDate;
  return (
    <Sheet flush eyebrow="Free every week">
      {whole.length === 0 ? <p className="px-4 pb-4">No time is free on every date. {partly.length > 0 ? 'These are free on most:' : 'Try other days or another length.'}</p> : (
        <ul>
          {whole.map((opening) => (
            <li key={`${opening.weekday}-${opening.startMin}-${opening.teacherId}`} className="flex items-center justify-between gap-3 border-t border-rule px-4 py-3">
              <span><b className="num">{formatDate(opening.localDate, locale, 'weekday')} {formatTimeRange(opening.startMin, opening.lengthMinutes)}</b> · {opening.roomName} · {opening.teacherName}</span>
              <Button aria-pressed={isSame(opening)} kind={isSame(opening) ? 'primary' : 'plain'} onClick={() => onChoose(opening)}>{isSame(opening) ? 'Chosen' : 'Choose'}</Button>
            </li>
          ))}
        </ul>
      )}
      {partly.map((opening) => (
        <p key={`${opening.weekday}-${opening.startMin}-${opening.teacherId}`} className="border-t border-rule px-4 py-3 text-ink-2">
          <span className="num">{formatDate(opening.localDate, locale, 'weekday')} {formatTimeRange(opening.startMin, opening.lengthMinutes)}</span> · {opening.teacherName}: {opening.freeWords}; taken on {opening.takenDates.map((date) => formatDate(date, locale)).join(', ')}
        </p>
      ))}
    </Sheet>
  );
}
