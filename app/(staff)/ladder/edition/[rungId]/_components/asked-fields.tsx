import { SelectField, TextArea } from '@/components/ui/inputs';
import { printedNote } from '@/lib/harmony/note';
import type { RungFormState } from './use-rung-form';

const HOW = [
  { value: 'voicing', label: 'Played: this voicing exactly' }, { value: 'free', label: 'Played: any voicing without a fault' },
  { value: 'spell', label: 'Told: the notes by name' }, { value: 'name_tensions', label: 'Told: what may be added' },
];
const KEYS = ['C', 'F', 'Bb', 'Eb', 'Ab', 'Db', 'Gb', 'B', 'E', 'A', 'D', 'G'];

export function AskedFields({ form }: { form: RungFormState }) {
  const { errors } = form.formState;
  return (
    <div className="grid gap-3">
      <SelectField label="How" options={HOW} {...form.register('how')} />
      <TextArea label="Chords" rows={5} className="font-mono text-[14px]" error={errors.turns?.message} {...form.register('turns')}
        help="A line is asked at once. “2 m11: 1-11-b7-b3-5 [root 47-58] | 5 13: 1-b7-3-13-9”: the step above the key, the kind of chord, its stack; “or” between stacks that both count; in brackets where it lies, 60 is middle C." />
      <fieldset aria-describedby="key-pool-help">
        <legend className="mb-1 text-[14px] font-semibold">Keys</legend>
        <div className="flex flex-wrap gap-2">
          {KEYS.map((key) => (
            <label key={key} className="flex items-center gap-2 rounded border border-rule px-2 py-1 has-checked:border-ink has-checked:bg-wash tap">
              <input type="checkbox" value={key} {...form.register('keyPool')} className="size-[16px] accent-ink" />{printedNote(key)}
            </label>
          ))}
        </div>
        {errors.keyPool ? <p role="alert" className="text-small font-semibold text-brick">{errors.keyPool.message}</p> : null}
      </fieldset>
    </div>
  );
}
