'use client';

import { ButtonLink } from '@/components/ui/button';
import { Chip, type ChipTone } from '@/components/ui/chip';
import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { Tabs } from '@/components/ui/tabs';
import type { Enquiry } from '@/db/enquiries';
import { ENQUIRY_WORDS, wishWords } from '@/lib/calendar/enquiry-words';
import { formatDate, plural } from '@/lib/format';
import { localDateOf, type LocalDate } from '@/lib/time';

type EnquiryListProps = { open: readonly Enquiry[]; ended: readonly Enquiry[]; locale: string; zone: string; now: number; today: LocalDate; mayExport: boolean };

const TONES: Record<Enquiry['state'], ChipTone> = { new: 'bad', answered: 'neutral', slot_offered: 'wait', trial_booked: 'info', trial_taken: 'info', deciding: 'wait', waiting_list: 'neutral', enrolled: 'ok', closed: 'neutral' };

export function EnquiryList({ open, ended, locale, zone, now, today, mayExport }: EnquiryListProps) {
  const exportOf = mayExport ? { list: 'enquiries' as const, rows: open.length + ended.length, note: 'open and ended lately' } : null;
  const columns: Column<Enquiry>[] = [
    { id: 'student', header: 'Student', isTitle: true, value: ({ studentName }) => studentName, cell: ({ studentName, studentAge }) => <>{studentName}{studentAge ? <span className="font-normal text-ink-3">, {studentAge}</span> : null}</> },
    { id: 'state', header: 'State', value: ({ state }) => ENQUIRY_WORDS[state], cell: ({ state }) => <Chip tone={TONES[state]}>{ENQUIRY_WORDS[state]}</Chip> },
    { id: 'age', header: 'Asked', value: ({ createdAt }) => createdAt, cell: ({ createdAt }) => ageWords(now - createdAt, formatDate(localDateOf(createdAt, zone), locale)) },
    { id: 'wishes', header: 'Could come', value: ({ wishes }) => wishWords(wishes) },
    { id: 'contact', header: 'Contact', value: ({ contactName }) => contactName, hidden: true },
    { id: 'next', header: 'Next step', value: ({ nextStepOn }) => nextStepOn, cell: ({ nextStepOn }) => (nextStepOn === null ? '' : <span className={nextStepOn < today ? 'font-semibold text-brick' : ''}>{nextStepOn === today ? 'today' : formatDate(nextStepOn, locale, 'short')}{nextStepOn < today ? ', overdue' : ''}</span>) },
    { id: 'do', header: '', value: () => '', cell: ({ id, state }) => (state === 'new' || state === 'answered' ? <ButtonLink href={`/openings?enquiry=${id}`}>Find an opening</ButtonLink> : null) },
  ];
  const table = (rows: readonly Enquiry[], label: string, empty: string) => (
    <Sheet flush><DataTable label={label} rows={rows} columns={columns} rowKey={({ id }) => id} rowHref={({ id }) => `/enquiries/${id}`} initialSort={{ id: 'age' }} exportOf={exportOf} empty={<EmptyState title={empty}>When a stranger asks for a trial lesson, or somebody rings, it stands here with its next step.</EmptyState>} /></Sheet>
  );
  return <Tabs label="Enquiries" tabs={[{ key: 'open', label: `Open (${open.length})`, content: table(open, 'open enquiries', 'No open enquiries') }, { key: 'ended', label: 'Ended lately', content: table(ended, 'ended enquiries', 'None has ended yet') }]} />;
}

function ageWords(seconds: number, date: string): string {
  const hours = Math.floor(seconds / 3600);
  if (hours < 1) return 'just now';
  return hours < 48 ? `${plural(hours, 'hour')} ago` : date;
}
