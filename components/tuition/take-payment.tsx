'use client';

import { useState } from 'react';
import { toast } from 'sonner';
import type { FieldMessages } from '@/lib/errors';
import { currencySign } from '@/lib/explained';
import { deskPaymentSchema, DESK_METHODS, METHOD_WORDS } from '@/lib/tuition/schema';
import type { LocalDate } from '@/lib/time';
import { Button } from '../ui/button';
import { Dialog } from '../ui/dialog';
import { FormError } from '../ui/form-error';
import { DateField, MoneyField, SelectField, TextField } from '../ui/inputs';
import { useActionForm } from '../ui/use-action-form';
import { PaymentEffect, type PreviewPayment } from './payment-effect';

export type PayerOption = { payerId: string; name: string; familyName: string; currency: string };
type Taking = { payerId: string; amount: string; method: (typeof DESK_METHODS)[number]; receivedOn: string; note: string; requestKey: string };
type Result = { ok: true; data: { receiptNo: string; steps: string[] } } | { ok: false; message: string; fields: FieldMessages };
type TakePaymentProps = { payers: readonly PayerOption[]; today: LocalDate; take: (input: Taking) => Promise<Result>; preview: PreviewPayment; label?: string };

/** Money over the counter: who, how much, how; what it settles is shown before it is taken. */
export function TakePayment(props: TakePaymentProps) {
  const [openedAs, setOpenedAs] = useState<string | null>(null);
  return (
    <>
      <Button kind="brass" onClick={() => setOpenedAs(crypto.randomUUID())} disabled={props.payers.length === 0}>{props.label ?? 'Take a payment'}</Button>
      <Dialog open={openedAs !== null} onOpenChange={(open) => !open && setOpenedAs(null)} title="Take a payment">
        {openedAs ? <TakePaymentForm key={openedAs} {...props} requestKey={openedAs} onClose={() => setOpenedAs(null)} /> : null}
      </Dialog>
    </>
  );
}

function TakePaymentForm({ payers, today, take, preview, requestKey, onClose }: TakePaymentProps & { requestKey: string; onClose: () => void }) {
  const form = useActionForm({
    schema: deskPaymentSchema, send: take,
    onDone: ({ receiptNo }) => { toast.success(`Receipt ${receiptNo} is written and mailed.`); onClose(); },
    defaultValues: { payerId: onlyPayer(payers), amount: '', method: 'cash', receivedOn: today, note: '', requestKey },
  });
  const { errors, isSubmitting } = form.formState;
  const [payerId, amount] = form.watch(['payerId', 'amount']);
  return (
    <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
      <SelectField label="Who pays" placeholder="Choose a payer" options={payers.map((payer) => ({ value: payer.payerId, label: `${payer.name} (${payer.familyName})` }))} error={errors.payerId?.message} {...form.register('payerId')} />
      <div className="grid gap-4 sm:grid-cols-2">
        <MoneyField label="Amount" currencySign={currencySign(currencyOf(payers, payerId))} error={errors.amount?.message} {...form.register('amount')} />
        <SelectField label="Paid by" options={DESK_METHODS.map((method) => ({ value: method, label: METHOD_WORDS[method] }))} error={errors.method?.message} {...form.register('method')} />
      </div>
      <DateField label="Received on" max={today} error={errors.receivedOn?.message} {...form.register('receivedOn')} />
      <TextField label="Note" optional error={errors.note?.message} {...form.register('note')} />
      <PaymentEffect payerId={payerId} amount={amount} preview={preview} />
      <FormError message={form.rootError} />
      <div className="flex justify-end gap-3">
        <Button onClick={onClose}>Leave it</Button>
        <Button type="submit" kind="brass" pending={isSubmitting}>Take it</Button>
      </div>
    </form>
  );
}

const onlyPayer = (payers: readonly PayerOption[]): string => (payers.length === 1 ? (payers[0]?.payerId ?? '') : '');
const currencyOf = (payers: readonly PayerOption[], payerId: string): string => payers.find((payer) => payer.payerId === payerId)?.currency ?? payers[0]?.currency ?? 'EUR';
