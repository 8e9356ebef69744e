'use client';

import { useState } from 'react';
import { Controller, useWatch } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { Checkbox, SelectField, TextArea, TextField } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { WishGrid } from '@/components/ui/wish-grid';
import { enquirySchema, type EnquiryInput } from '@/lib/calendar/schema';
import { sendEnquiry } from '../actions';

const DEFAULTS = {
  contactName: '', contactEmail: '', contactPhone: '', studentName: '', isAdult: false, studentAge: null, experience: '', wishes: [], siteId: null, lengthMinutes: 30, message: '', website: '',
} satisfies Omit<EnquiryInput, 'mayWrite'>;

export function EnquiryForm({ sites }: { sites: readonly { id: string; name: string }[] }) {
  const [isSent, setSent] = useState(false);
  const form = useActionForm({ schema: enquirySchema, defaultValues: DEFAULTS, send: sendEnquiry, onDone: () => setSent(true) });
  const { errors, isSubmitting } = form.formState;
  const isAdult = useWatch({ control: form.control, name: 'isAdult' }) === true;
  if (isSent) return <Thanks />;
  return (
    <form onSubmit={form.submit} noValidate className="flex flex-col gap-4" aria-label="Trial lesson">
      <Checkbox label="The lesson is for me, and I am an adult" {...form.register('isAdult', { onChange: () => form.setValue('contactName', form.getValues('studentName')) })} />
      <TextField label={isAdult ? 'Your name' : 'The student’s name'} error={errors.studentName?.message}
        {...form.register('studentName', { onChange: () => { if (isAdult) form.setValue('contactName', form.getValues('studentName')); } })} />
      {isAdult ? null : (
        <TextField label="Age" inputMode="numeric" fieldClass="max-w-40" optional error={errors.studentAge?.message}
          {...form.register('studentAge', { setValueAs: (text: string | null) => (text === null || text === '' ? null : Number(text)) })} />
      )}
      {isAdult ? null : <TextField label="Your name (parent or guardian)" autoComplete="name" error={errors.contactName?.message} {...form.register('contactName')} />}
      <div className="grid gap-4 sm:grid-cols-2">
        <TextField label="E-mail" type="email" autoComplete="email" error={errors.contactEmail?.message} {...form.register('contactEmail')} />
        <TextField label="Telephone" type="tel" autoComplete="tel" optional error={errors.contactPhone?.message} {...form.register('contactPhone')} />
      </div>
      <Controller control={form.control} name="wishes" render={({ field }) => <WishGrid value={field.value} onChange={field.onChange} error={errors.wishes?.message ?? errors.wishes?.root?.message} />} />
      {sites.length > 1 ? <SelectField label="Where" optional placeholder="Either is fine" options={sites.map(({ id, name }) => ({ value: id, label: name }))} {...form.register('siteId', { setValueAs: (text: string | null) => text || null })} /> : null}
      <TextArea label="Anything we should know" optional help="What the student plays already, or would love to play." error={errors.message?.message} {...form.register('message')} />
      <div aria-hidden className="absolute -left-[9999px]"><label>Website<input tabIndex={-1} autoComplete="off" {...form.register('website')} /></label></div>
      <Checkbox label="You may write to me about this enquiry. We keep what you send only as long as it is open." error={errors.mayWrite?.message} {...form.register('mayWrite')} />
      <FormError message={form.rootError} />
      <Button type="submit" kind="primary" pending={isSubmitting}>Send the enquiry</Button>
    </form>
  );
}

function Thanks() {
  return (
    <div role="status" className="sheet p-5">
      <h2 className="text-h2">Thank you, it has arrived</h2>
      <p className="mt-2">You will hear from us within one working day. A mail with what happens next is on its way to you.</p>
    </div>
  );
}
