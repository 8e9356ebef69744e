'use client';

import type { UseFormReturn } from 'react-hook-form';
import type * as z from 'zod';
import { Button } from '@/components/ui/button';
import { SelectField, TextField } from '@/components/ui/inputs';
import { printedNote } from '@/lib/harmony/note';
import type { setPracticeSchema } from '@/lib/ladder/schema';
import type { RungChoice } from '@/lib/ladder/server/practice-for-staff';

type FieldsProps = { form: UseFormReturn<z.input<typeof setPracticeSchema>, unknown, z.output<typeof setPracticeSchema>>; at: number; choices: readonly RungChoice[]; onRemove: (() => void) | undefined };
const number = { setValueAs: (value: string | number | null) => (value === null || String(value).trim() === '' ? null : Number(value)) };

/** One thing to practise: a rung in some of its keys, or something in words. */
export function PracticeItemFields({ form, at, choices, onRemove }: FieldsProps) {
  const rung = choices.find(({ id }) => id === form.watch(`items.${at}.rungId`));
  const pickFirstKeys = (event: { target: { value: string } }) => form.setValue(`items.${at}.keys`, choices.find(({ id }) => id === event.target.value)?.keyPool.slice(0, 3) ?? []);
  return (
    <fieldset className="grid gap-3 border-b border-rule pb-4">
      <legend className="sr-only">{`Thing ${at + 1}`}</legend>
      <SelectField label="Rung" placeholder="No rung, only words" options={choices.map(({ id, label }) => ({ value: id, label }))} {...form.register(`items.${at}.rungId`, { onChange: pickFirstKeys })} />
      {rung ? <KeyBoxes form={form} at={at} keyPool={rung.keyPool} /> : null}
      <WordsAndNumbers form={form} at={at} needsWords={rung === undefined} />
      {onRemove ? <Button kind="quiet" className="justify-self-start" onClick={onRemove}>Take this away</Button> : null}
    </fieldset>
  );
}

function WordsAndNumbers({ form, at, needsWords }: Pick<FieldsProps, 'form' | 'at'> & { needsWords: boolean }) {
  const problemOf = (name: 'piece' | 'minutes' | 'beatsPerMinute' | 'howRight') => form.getFieldState(`items.${at}.${name}`, form.formState).error?.message;
  return (
    <>
      <TextField label="In words" optional={!needsWords} error={problemOf('piece')} {...form.register(`items.${at}.piece`)} />
      <div className="grid grid-cols-2 gap-3">
        <TextField label="Minutes a day" optional inputMode="numeric" error={problemOf('minutes')} {...form.register(`items.${at}.minutes`, number)} />
        <TextField label="Beats a minute" optional inputMode="numeric" error={problemOf('beatsPerMinute')} {...form.register(`items.${at}.beatsPerMinute`, number)} />
      </div>
      <TextField label="How you know it is right" optional error={problemOf('howRight')} {...form.register(`items.${at}.howRight`)} />
    </>
  );
}

function KeyBoxes({ form, at, keyPool }: Pick<FieldsProps, 'form' | 'at'> & { keyPool: readonly string[] }) {
  const problem = form.getFieldState(`items.${at}.keys`, form.formState).error?.message;
  return (
    <div role="group" aria-label="Keys">
      <p className="mb-1 text-[14px] font-semibold">Keys</p>
      <div className="flex flex-wrap gap-2">
        {keyPool.map((key) => (
          <label key={key} className="flex items-center gap-2 rounded border border-rule px-2 py-1 has-checked:border-ink has-checked:bg-wash tap">
            <input type="checkbox" value={key} {...form.register(`items.${at}.keys`)} className="size-[16px] accent-ink" />{printedNote(key)}
          </label>
        ))}
      </div>
      {problem ? <p role="alert" className="text-small font-semibold text-brick">{problem}</p> : null}
    </div>
  );
}
