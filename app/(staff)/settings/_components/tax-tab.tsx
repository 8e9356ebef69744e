'use client';

import { useWatch } from 'react-hook-form';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { DateField, RadioGroup, TextArea, TextField } from '@/components/ui/inputs';
import { Sheet } from '@/components/ui/sheet';
import { useActionForm } from '@/components/ui/use-action-form';
import { formatDate } from '@/lib/format';
import type { LocalDate } from '@/lib/time';
import { changeTaxSchema } from '@/lib/tuition/price-schema';
import type { PriceList } from '@/lib/tuition/server/price-list';
import { saveTax } from '../actions';

const TREATMENTS = [
  { value: 'exempt', label: 'Exempt', help: 'No tax, with the reason printed on the invoice.' },
  { value: 'zero', label: 'Zero rate', help: 'Taxed at nothing.' },
  { value: 'taxed', label: 'Taxed', help: 'A rate in per cent is added.' },
];
const WORDS = { exempt: 'exempt', zero: 'zero rate', taxed: 'taxed' } as const;

/** Nothing is guessed: without a treatment nothing is billed. */
export function TaxTab({ list, locale, today }: { list: PriceList; locale: string; today: LocalDate }) {
  const form = useActionForm({
    schema: changeTaxSchema, defaultValues: { taxClass: list.taxClasses[0] ?? 'tuition', ratePercent: 0, reason: '', validFrom: today }, send: saveTax, onDone: () => void toast.success('The treatment is set.'),
  });
  const { errors, isSubmitting } = form.formState;
  const treatment = useWatch({ control: form.control, name: 'treatment' });
  return (
    <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_360px]">
      <Sheet eyebrow="How charges are taxed">
        {list.taxes.length === 0 ? <p className="rounded bg-brass-wash px-3 py-2 text-brass">Not set yet. Until it is, no bill can be made.</p> : (
          <ul className="flex flex-col gap-3">
            {list.taxes.map(({ id, taxClass, treatment: how, rateBp, exemptionReason, validFrom, validTo, entityName }) => (
              <li key={id} className={validTo ? 'text-ink-3' : ''}>
                <p className="font-semibold">{taxClass}: {WORDS[how]}{rateBp > 0 ? ` at ${rateBp / 100} %` : ''}</p>
                <p className="text-small text-ink-3">{entityName}, from {formatDate(validFrom, locale, 'full')}{validTo ? ` to ${formatDate(validTo, locale, 'full')}` : ''}</p>
                {exemptionReason ? <p className="text-small">{exemptionReason}</p> : null}
              </li>
            ))}
          </ul>
        )}
        <p className="mt-4 text-small text-ink-3">Whether lessons are taxed depends on the country, the learner and the form of the school. Check your local rules or ask an adviser; this page only records the decision.</p>
      </Sheet>
      <Sheet title="Set the treatment">
        <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
          <RadioGroup legend="Charges are" options={TREATMENTS} error={errors.treatment?.message} {...form.register('treatment')} />
          {treatment === 'taxed' ? <TextField label="Rate, per cent" inputMode="decimal" error={errors.ratePercent?.message} {...form.register('ratePercent', { setValueAs: (text: string | number) => Number(String(text).replace(',', '.')) })} /> : null}
          {treatment === 'exempt' ? <TextArea label="Reason" rows={2} error={errors.reason?.message} {...form.register('reason')} /> : null}
          <DateField label="From" error={errors.validFrom?.message} {...form.register('validFrom')} />
          <FormError message={form.rootError} />
          <Button type="submit" kind="primary" pending={isSubmitting}>Set the treatment</Button>
        </form>
      </Sheet>
    </div>
  );
}
