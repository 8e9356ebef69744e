import { Checkbox, TextField } from '@/components/ui/inputs';
import type { RungFormState } from './use-rung-form';

const number = { setValueAs: (value: string | number | null) => (value === null || String(value).trim() === '' ? null : Number(value)) };
const needed = { setValueAs: (value: unknown) => Number(value) };

export function HeardFields({ form }: { form: RungFormState }) {
  const { errors } = form.formState;
  return (
    <div className="grid gap-3 sm:grid-cols-2">
      <TextField label="Keys drawn" inputMode="numeric" error={errors.keysDrawn?.message} {...form.register('keysDrawn', needed)} />
      <TextField label="Keys needed" inputMode="numeric" error={errors.keysNeeded?.message} {...form.register('keysNeeded', needed)} />
      <TextField label="Seconds for each" optional inputMode="decimal" error={errors.seconds?.message} {...form.register('seconds', number)} />
      <TextField label="Slips allowed in a line" inputMode="numeric" error={errors.slipsPerTurn?.message} {...form.register('slipsPerTurn', needed)} />
      <TextField label="Beats a minute" optional inputMode="numeric" error={errors.beatsPerMinute?.message} {...form.register('beatsPerMinute', number)} />
      <TextField label="Beats to a chord" optional inputMode="numeric" error={errors.beatsPerChord?.message} {...form.register('beatsPerChord', number)} />
      <TextField label="The teacher listens for" fieldClass="sm:col-span-2" error={errors.listenFor?.message} {...form.register('listenFor')} />
      <Checkbox label="Keys in shuffled order" className="sm:col-span-2" {...form.register('isShuffled')} />
    </div>
  );
}
