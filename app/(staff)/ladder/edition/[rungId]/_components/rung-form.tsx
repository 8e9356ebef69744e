'use client';

import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { Sheet } from '@/components/ui/sheet';
import type { ChordStyle } from '@/lib/harmony/chord-name';
import type { DraftRungRow } from '@/lib/ladder/server/edition-draft';
import { AskedFields } from './asked-fields';
import { HeardFields } from './heard-fields';
import { NeedFields } from './need-fields';
import { RungPreview } from './rung-preview';
import { useRungForm, type Other } from './use-rung-form';
import { WordFields } from './word-fields';

/** One rung of the draft: its words, what it asks, how it is heard; beside it the notes in every key, as they are typed. */
export function RungForm({ rung, others, chordStyle }: { rung: DraftRungRow; others: readonly Other[]; chordStyle: ChordStyle }) {
  const form = useRungForm(rung);
  return (
    <div className="grid items-start gap-4 xl:grid-cols-[minmax(0,1fr)_minmax(0,1fr)]">
      <form onSubmit={(event) => void form.submit(event)} className="grid gap-4" noValidate>
        <Sheet eyebrow="Words"><WordFields form={form} /></Sheet>
        <Sheet eyebrow="What is asked"><AskedFields form={form} /></Sheet>
        <Sheet eyebrow="How it is heard"><HeardFields form={form} /></Sheet>
        <Sheet eyebrow="What comes before"><NeedFields form={form} others={others} isNew={rung.isNew} /></Sheet>
        <FormError message={form.rootError} />
        <Button type="submit" kind="primary" pending={form.formState.isSubmitting} className="justify-self-start">Save in the draft</Button>
      </form>
      <RungPreview form={form} chordStyle={chordStyle} />
    </div>
  );
}
