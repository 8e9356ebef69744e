'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { Sheet } from '@/components/ui/sheet';
import type { ConsequenceVersion } from '@/db/settings';
import { ATTENDANCE_WORDS, isTaught, MARKS, type MarkedAttendance } from '@/lib/calendar/attendance';
import { CREDIT_WORDS, differencesOf, shareWords } from '@/lib/calendar/consequence-words';
import { CONSEQUENCES, consequencesOn, type Consequence } from '@/lib/calendar/consequences';
import { formatDate } from '@/lib/format';
import type { LocalDate } from '@/lib/time';
import { ChangeConsequence } from './change-consequence';

type AbsencesTabProps = { versions: readonly ConsequenceVersion[]; locale: string; today: LocalDate };
type Line = Consequence & { mark: MarkedAttendance };

/** What each mark means today, one row a mark, and what it meant or will mean on other days. */
export function AbsencesTab({ versions, locale, today }: AbsencesTabProps) {
  const [changing, setChanging] = useState<MarkedAttendance | null>(null);
  const table = consequencesOn(versions, today);
  const columns: Column<Line>[] = [
    { id: 'mark', header: 'Mark', isTitle: true, value: ({ mark }) => ATTENDANCE_WORDS[mark] },
    { id: 'held', header: 'Lesson', value: ({ mark }) => (isTaught(mark) ? 'taught' : 'not taught') },
    { id: 'charged', header: 'Family', value: ({ charged }) => (charged ? 'charged' : 'not charged') },
    { id: 'credit', header: 'Make-up credit', value: ({ credit }) => CREDIT_WORDS[credit].replace('make-up credit ', '').replace('no make-up credit', 'none') },
    { id: 'employee', header: 'Pay, employee', align: 'right', value: ({ payBp }) => payBp.employee, cell: ({ payBp }) => shareWords(payBp.employee) },
    { id: 'contractor', header: 'Pay, contractor', align: 'right', value: ({ payBp }) => payBp.contractor, cell: ({ payBp }) => shareWords(payBp.contractor) },
    { id: 'package', header: 'Package', value: ({ drawsPackage }) => (drawsPackage ? 'draws one lesson' : 'not drawn on') },
    { id: 'change', header: '', value: () => '', cell: ({ mark }) => <Button kind="quiet" aria-label={`Change what “${ATTENDANCE_WORDS[mark]}” means`} onClick={() => setChanging(mark)}>Change</Button> },
  ];
  return (
    <div className="flex flex-col gap-4">
      <Sheet flush><DataTable label="marks" rows={MARKS.map((mark) => ({ mark, ...table[mark] }))} columns={columns} rowKey={({ mark }) => mark} empty={null} /></Sheet>
      <p className="text-small text-ink-3">“Family” counts where tuition is charged lesson by lesson; a fee for a term or a month is owed whatever was marked. A lesson that is not marked yet blocks its pay and is never read as “here”.</p>
      <Sheet eyebrow="The table over time"><Versions versions={versions} locale={locale} /></Sheet>
      {changing ? <ChangeConsequence mark={changing} versions={versions} today={today} onClose={() => setChanging(null)} /> : null}
    </div>
  );
}

function Versions({ versions, locale }: Pick<AbsencesTabProps, 'versions' | 'locale'>) {
  if (versions.length === 0) return <p>As the product begins with; common practice. Nothing has been changed.</p>;
  return (
    <ol className="flex flex-col gap-3">
      {versions.map(({ validFrom, table, approvedByName }, index) => (
        <li key={validFrom}>
          <p className="font-semibold">From {formatDate(validFrom, locale, 'full')}{approvedByName ? `, set by ${approvedByName}` : ''}</p>
          <ul className="list-disc pl-5">
            {differencesOf(versions[index - 1]?.table ?? CONSEQUENCES, table).map((sentence) => <li key={sentence}>{sentence}</li>)}
          </ul>
        </li>
      ))}
    </ol>
  );
}
