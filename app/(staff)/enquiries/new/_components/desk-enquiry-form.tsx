'use client';

import { useRouter } from 'next/navigation';
import { Controller } from 'react-hook-form';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { Checkbox, SelectField, TextArea, TextField } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { WishGrid } from '@/components/ui/wish-grid';
import { deskEnquirySchema, type DeskEnquiryInput } from '@/lib/calendar/schema';
import { saveEnquiry } from '../../../book/actions';

const DEFAULTS: DeskEnquiryInput = { contactName: '', contactEmail: '', contactPhone: '', studentName: '', isAdult: false, studentAge: null, experience: '', wishes: [], siteId: null, lengthMinutes: 30, message: '', levelGuess: 1 };

export function DeskEnquiryForm({ sites }: { sites: readonly { id: string; name: string }[] }) {
  const router = useRouter();
  const form = useActionForm({ schema: deskEnquirySchema, defaultValues: DEFAULTS, send: saveEnquiry, onDone: ({ id }) => router.push(`/openings?enquiry=${id}`) });
  const { errors, isSubmitting } = form.formState;
  return (
    <form onSubmit={form.submit} noValidate className="sheet flex flex-col gap-4 p-4" aria-label="New enquiry">
      <TextField label="Caller" error={errors.contactName?.message} {...form.register('contactName')} />
      <div className="grid gap-4 sm:grid-cols-2">
        <TextField label="Telephone" type="tel" error={errors.contactPhone?.message} {...form.register('contactPhone')} />
        <TextField label="E-mail" type="email" optional error={errors.contactEmail?.message} {...form.register('contactEmail')} />
      </div>
      <div className="grid gap-4 sm:grid-cols-[1fr_110px]">
        <TextField label="Student" error={errors.studentName?.message} {...form.register('studentName')} />
        <TextField label="Age" inputMode="numeric" error={errors.studentAge?.message} {...form.register('studentAge', { setValueAs: (text: string | null) => (text === null || text === '' ? null : Number(text)) })} />
      </div>
      <Checkbox label="The student is an adult" {...form.register('isAdult')} />
      <Controller control={form.control} name="wishes" render={({ field }) => <WishGrid value={field.value} onChange={field.onChange} error={errors.wishes?.message ?? errors.wishes?.root?.message} />} />
      {sites.length > 1 ? <SelectField label="Site" placeholder="Either is fine" options={sites.map(({ id, name }) => ({ value: id, label: name }))} {...form.register('siteId', { setValueAs: (text: string | null) => text || null })} /> : null}
      <TextArea label="Notes" rows={2} error={errors.message?.message} {...form.register('message')} />
      <FormError message={form.rootError} />
      <Button type="submit" kind="primary" pending={isSubmitting}>Save and find openings</Button>
    </form>
  );
}
