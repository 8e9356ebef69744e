'use client';

import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Chip } from '@/components/ui/chip';
import { DataTable } from '@/components/ui/data-table';
import type { Column } from '@/components/ui/data-table-core';
import { FormError } from '@/components/ui/form-error';
import { DateField, MoneyField, SelectField, TextField } from '@/components/ui/inputs';
import { Sheet } from '@/components/ui/sheet';
import { EmptyState } from '@/components/ui/states';
import { useActionForm } from '@/components/ui/use-action-form';
import type { PriceLine } from '@/db/price-changes';
import { formatDate, formatMoney } from '@/lib/format';
import type { LocalDate } from '@/lib/time';
import { changePriceSchema } from '@/lib/tuition/price-schema';
import type { PriceList } from '@/lib/tuition/server/price-list';
import { savePrice } from '../actions';
import { signOf } from './currency-sign';

type PricesTabProps = { list: PriceList; school: { locale: string; currency: string }; today: LocalDate };

export function PricesTab({ list, school, today }: PricesTabProps) {
  const form = useActionForm({
    schema: changePriceSchema, defaultValues: { productId: list.products.find(({ code }) => code === 'lesson')?.id ?? '', lengthMinutes: 30, amount: '', validFrom: today }, send: savePrice,
    onDone: () => { toast.success('The price is set.'); form.reset({ ...form.getValues(), amount: '' }); },
  });
  const { errors, isSubmitting } = form.formState;
  const columns: Column<PriceLine>[] = [
    { id: 'what', header: 'What', isTitle: true, value: ({ productLabel, lengthMinutes }) => `${productLabel}${lengthMinutes ? `, ${lengthMinutes} min` : ''}` },
    { id: 'price', header: 'Price', align: 'right', value: ({ amountMinor }) => amountMinor, cell: ({ amountMinor }) => formatMoney({ amountMinor, currency: school.currency }, school.locale) },
    { id: 'from', header: 'From', value: ({ validFrom }) => validFrom, cell: ({ validFrom }) => formatDate(validFrom, school.locale, 'full') },
    { id: 'state', header: 'State', value: ({ validFrom, validTo }) => stateOf(validFrom, validTo, today), cell: ({ validFrom, validTo }) => { const state = stateOf(validFrom, validTo, today); return <Chip tone={state === 'in force' ? 'ok' : state === 'to come' ? 'wait' : 'neutral'}>{state}</Chip>; } },
  ];
  return (
    <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_320px]">
      <Sheet flush><DataTable label="prices" rows={list.prices} columns={columns} rowKey={({ id }) => id} empty={<EmptyState title="No prices yet">Set the price of a lesson by its length. Nothing is billed at a price that is not there.</EmptyState>} /></Sheet>
      <Sheet title="Set a price">
        <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
          <SelectField label="What" options={list.products.map(({ id, label }) => ({ value: id, label }))} error={errors.productId?.message} {...form.register('productId')} />
          <TextField label="Minutes" optional inputMode="numeric" help="Empty: one price whatever the length." error={errors.lengthMinutes?.message} {...form.register('lengthMinutes', { setValueAs: (text: string | number | null) => (text === null || text === '' ? null : Number(text)) })} />
          <MoneyField label="Price" currencySign={signOf(school)} error={errors.amount?.message} {...form.register('amount')} />
          <DateField label="From" error={errors.validFrom?.message} {...form.register('validFrom')} />
          <FormError message={form.rootError} />
          <Button type="submit" kind="primary" pending={isSubmitting}>Set the price</Button>
        </form>
      </Sheet>
    </div>
  );
}

const stateOf = (from: LocalDate, to: LocalDate | null, today: LocalDate) => (from > today ? 'to come' : to !== null && to <= today ? 'ended' : 'in force');
