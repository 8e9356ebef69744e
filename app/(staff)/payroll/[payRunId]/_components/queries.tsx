'use client';

import { useState } from 'react';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { MoneyField, SelectField, TextArea } from '@/components/ui/inputs';
import { Sheet } from '@/components/ui/sheet';
import { useActionForm } from '@/components/ui/use-action-form';
import { currencySign } from '@/lib/explained';
import { formatDate } from '@/lib/format';
import { answerSchema } from '@/lib/payroll/schema';
import type { PayRunScreen, RunQuery } from '@/lib/payroll/server/pay-run-screen';
import { answer } from '../../actions';

/** Questions of teachers that wait for an answer. */
export function Queries({ run, locale }: { run: PayRunScreen; locale: string }) {
  if (run.queries.length === 0) return null;
  return (
    <Sheet title="Questions to answer" flush>
      <ul>{run.queries.map((query) => <li key={query.queryId} className="border-t border-rule px-4 py-3"><Query query={query} currency={run.currency} locale={locale} /></li>)}</ul>
    </Sheet>
  );
}

function Query({ query, currency, locale }: { query: RunQuery; currency: string; locale: string }) {
  const [isOpen, setIsOpen] = useState(false);
  return (
    <>
      <p><b>{query.name}</b> about {formatDate(query.aboutOn, locale, 'short')}: <span className="text-ink-2">{query.aboutText}</span></p>
      <p className="mt-1 border-l-2 border-brass-fill pl-3">“{query.text}”</p>
      {isOpen ? <AnswerForm query={query} currency={currency} onClose={() => setIsOpen(false)} /> : <Button className="mt-2" onClick={() => setIsOpen(true)}>Answer</Button>}
    </>
  );
}

function AnswerForm({ query, currency, onClose }: { query: RunQuery; currency: string; onClose: () => void }) {
  const [isAccepted, setIsAccepted] = useState(true);
  const form = useActionForm({ schema: answerSchema, send: answer, onDone: onClose, defaultValues: { queryId: query.queryId, isAccepted: true, answer: '', amountChange: '' } });
  const { errors, isSubmitting } = form.formState;
  const pick = (value: boolean) => { setIsAccepted(value); form.setValue('isAccepted', value); };
  return (
    <form onSubmit={form.submit} noValidate className="mt-3 flex max-w-xl flex-col gap-3">
      <SelectField label="Your answer" value={isAccepted ? 'yes' : 'no'} onChange={(event) => pick(event.target.value === 'yes')} options={[{ value: 'yes', label: 'Accept: the difference becomes a line of its own' }, { value: 'no', label: 'Decline: the line stays as it is' }]} />
      {isAccepted ? <MoneyField label="Difference" optional currencySign={currencySign(currency)} help="Less with a minus. Leave empty when the register puts it right." error={errors.amountChange?.message} {...form.register('amountChange')} /> : null}
      <TextArea label="In words" rows={2} help="The teacher reads this." error={errors.answer?.message} {...form.register('answer')} />
      <FormError message={form.rootError} />
      <div className="flex gap-3"><Button type="submit" kind="primary" pending={isSubmitting}>{isAccepted ? 'Accept' : 'Decline'}</Button><Button onClick={onClose}>Leave it</Button></div>
    </form>
  );
}
