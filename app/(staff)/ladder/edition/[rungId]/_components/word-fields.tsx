import { TextArea, TextField } from '@/components/ui/inputs';
import type { RungFormState } from './use-rung-form';

export function WordFields({ form }: { form: RungFormState }) {
  const { errors } = form.formState;
  return (
    <div className="grid gap-3">
      <TextField label="Title for teachers" error={errors.title?.message} {...form.register('title')} />
      <TextField label="Plain title" help="Guardians and students read this." error={errors.plainTitle?.message} {...form.register('plainTitle')} />
      <TextArea label="With it one can …" rows={2} help="It goes on: “Ada can now …”" error={errors.canDo?.message} {...form.register('canDo')} />
      <TextArea label="What it sounds like" rows={2} error={errors.soundsLike?.message} {...form.register('soundsLike')} />
    </div>
  );
}
