'use client';

import { useRouter } from 'next/navigation';
import { useState, useTransition } from 'react';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { Sheet } from '@/components/ui/sheet';
import type { FieldMessages } from '@/lib/errors';
import type { SheetMapping } from '@/lib/imports/mapping';
import type { ImportChoices } from '@/lib/imports/schema';
import type { ImportDetail } from '@/lib/imports/server/import-screen';
import { checkWorkbookAgain } from '../../actions';
import { BringInButton } from './bring-in-button';
import { ChoiceFields } from './choice-fields';
import { SheetReadings } from './sheet-readings';

/** What the workbook does not say. Each change is checked against every row again before anything can come in. */
export function ChoicesForm({ detail }: { detail: ImportDetail }) {
  const router = useRouter();
  const [choices, setChoices] = useState<ImportChoices | null>(detail.choices);
  const [mapping, setMapping] = useState<SheetMapping[]>(detail.readings.map((reading) => reading.mapping));
  const [isChanged, setIsChanged] = useState(false);
  const [message, setMessage] = useState<string>();
  const [fields, setFields] = useState<FieldMessages>({});
  const [pending, startTransition] = useTransition();
  if (!choices) return null;
  const change = (part: Partial<ImportChoices>) => { setChoices({ ...choices, ...part }); setIsChanged(true); };
  const missing = missingAnswers(detail, choices);
  const check = () => startTransition(async () => {
    if (Object.keys(missing).length > 0) return setFields(missing);
    const result = await checkWorkbookAgain({ batchId: detail.batchId, choices, mapping }).catch(() => null);
    setMessage(result?.ok ? undefined : (result?.message ?? 'This did not reach the school. Press again.'));
    setFields(result?.ok === false ? result.fields : {});
    if (!result?.ok) return;
    setIsChanged(false);
    router.refresh();
  });
  return (
    <Sheet eyebrow="What the workbook does not say">
      <form onSubmit={(event) => { event.preventDefault(); check(); }} className="flex flex-col gap-4" noValidate>
        <ChoiceFields detail={detail} choices={choices} error={(name) => fields[name]?.[0] ?? fields[`choices.${name}`]?.[0]} onChange={change} />
        <SheetReadings readings={detail.readings} mapping={mapping} onChange={(next) => { setMapping(next); setIsChanged(true); }} />
        <FormError message={message} />
        {isChanged || Object.keys(missing).length > 0 ? <Button type="submit" kind="primary" pending={pending}>Check again</Button> : <BringInButton detail={detail} />}
      </form>
    </Sheet>
  );
}

/** Answers without which nothing can come in. */
function missingAnswers({ newTeachers }: ImportDetail, { engagementKind, termId, newTerm }: ImportChoices): FieldMessages {
  return {
    ...(newTeachers > 0 && engagementKind === null ? { engagementKind: ['Choose employees or contractors; the school does not guess it.'] } : {}),
    ...(termId === null && newTerm === null ? { newTerm: ['Enter the name, the first and the last day of the term.'] } : {}),
  };
}
