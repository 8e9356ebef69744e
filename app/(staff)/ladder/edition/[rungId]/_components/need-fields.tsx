import { SelectField } from '@/components/ui/inputs';
import { MAPPING_RULES } from '@/lib/ladder/edition-change';
import type { Other, RungFormState } from './use-rung-form';

const RULES = (['same', 'kept', 're_check'] as const).map((value) => ({ value, label: MAPPING_RULES[value] }));

/** Which rungs must be passed first, and what the new words mean for those who have the rung. */
export function NeedFields({ form, others, isNew }: { form: RungFormState; others: readonly Other[]; isNew: boolean }) {
  const { errors } = form.formState;
  return (
    <div className="grid gap-3">
      <details>
        <summary className="py-1 font-semibold text-petrol tap">{`Must be passed first: ${chosen(form.watch('must'), others)}`}</summary>
        <ul className="mt-1 grid max-h-64 gap-1 overflow-y-auto">
          {others.map(({ id, label }) => <li key={id}><label className="flex items-center gap-2 py-[2px]"><input type="checkbox" value={id} {...form.register('must')} className="size-[16px] accent-ink" />{label}</label></li>)}
        </ul>
      </details>
      {errors.must ? <p role="alert" className="text-small font-semibold text-brick">{errors.must.message}</p> : null}
      {isNew ? null : <SelectField label="For those who have it" options={RULES} {...form.register('rule')} />}
    </div>
  );
}

const chosen = (ids: readonly string[] | undefined, others: readonly Other[]): string => {
  const labels = others.filter(({ id }) => ids?.includes(id)).map(({ label }) => label);
  return labels.length > 0 ? labels.join(', ') : 'nothing';
};
