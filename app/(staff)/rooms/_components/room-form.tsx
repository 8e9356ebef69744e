'use client';

import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { Checkbox, SelectField, TextField } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import type { Feature, Site } from '@/db/rooms';
import { roomSchema } from '@/lib/calendar/schema';
import { saveRoom } from '../actions';

export function RoomForm({ sites, features, onDone }: { sites: readonly Site[]; features: readonly Feature[]; onDone: () => void }) {
  const form = useActionForm({
    schema: roomSchema, defaultValues: { siteId: sites[0]?.id ?? '', name: '', description: '', personLimit: 4, turnoverMin: 0, features: [] }, send: saveRoom,
    onDone: () => { toast.success('The room is added.'); onDone(); },
  });
  const { errors, isSubmitting } = form.formState;
  return (
    <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
      <SelectField label="Site" options={sites.map(({ id, name }) => ({ value: id, label: name }))} error={errors.siteId?.message} {...form.register('siteId')} />
      <TextField label="Name" error={errors.name?.message} {...form.register('name')} />
      <TextField label="In a few words" optional help="Stands under the name on the board, such as “upright”." error={errors.description?.message} {...form.register('description')} />
      <div className="grid grid-cols-2 gap-3">
        <TextField label="People at most" inputMode="numeric" help="The posted limit and the fire code decide." error={errors.personLimit?.message} {...form.register('personLimit', { valueAsNumber: true })} />
        <TextField label="Turnover, minutes" inputMode="numeric" error={errors.turnoverMin?.message} {...form.register('turnoverMin', { valueAsNumber: true })} />
      </div>
      <fieldset className="flex flex-col gap-1">
        <legend className="mb-1 text-[14px] font-semibold">What it has</legend>
        {features.map(({ code, label }) => <Checkbox key={code} label={label} value={code} {...form.register('features')} />)}
      </fieldset>
      <FormError message={form.rootError} />
      <Button type="submit" kind="primary" pending={isSubmitting}>Add the room</Button>
    </form>
  );
}
