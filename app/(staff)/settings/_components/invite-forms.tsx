'use client';

import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { FormError } from '@/components/ui/form-error';
import { SelectField, TextField } from '@/components/ui/inputs';
import { Sheet } from '@/components/ui/sheet';
import { useActionForm } from '@/components/ui/use-action-form';
import type { WithoutAccess } from '@/db/access';
import { inviteSchema, newStaffSchema } from '@/lib/people/schema';
import { invite, inviteNew } from '../actions';

const ROLES = [{ value: 'teacher', label: 'Teacher' }, { value: 'guardian', label: 'Guardian' }, { value: 'student', label: 'Student' }, { value: 'desk', label: 'Front desk' }, { value: 'owner', label: 'Owner' }];

export function InviteForms({ without }: { without: readonly WithoutAccess[] }) {
  return (
    <div className="flex flex-col gap-4">
      {without.length > 0 ? <InviteKnown without={without} /> : null}
      <InviteStaff />
    </div>
  );
}

function InviteKnown({ without }: { without: readonly WithoutAccess[] }) {
  const form = useActionForm({ schema: inviteSchema, defaultValues: { personId: '', email: '', role: 'guardian', isLead: false }, send: invite, onDone: () => { toast.success('The invitation is on its way.'); form.reset(); } });
  const { errors, isSubmitting } = form.formState;
  const choose = (personId: string) => {
    const person = without.find((candidate) => candidate.personId === personId);
    form.setValue('email', person?.email ?? '');
    if (person) form.setValue('role', person.suggested);
  };
  return (
    <Sheet title="Invite somebody of the school">
      <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
        <SelectField label="Person" placeholder="Choose a person" options={without.map(({ personId, name }) => ({ value: personId, label: name }))} error={errors.personId?.message} {...form.register('personId', { onChange: (event: { target: { value: string } }) => choose(event.target.value) })} />
        <TextField label="E-mail to sign in with" type="email" error={errors.email?.message} {...form.register('email')} />
        <SelectField label="Role" options={ROLES} error={errors.role?.message} {...form.register('role')} />
        <FormError message={form.rootError} />
        <Button type="submit" kind="primary" pending={isSubmitting}>Invite</Button>
      </form>
    </Sheet>
  );
}

function InviteStaff() {
  const form = useActionForm({ schema: newStaffSchema, defaultValues: { name: '', email: '', role: 'desk' }, send: inviteNew, onDone: () => { toast.success('The invitation is on its way.'); form.reset(); } });
  const { errors, isSubmitting } = form.formState;
  return (
    <Sheet title="Invite somebody new">
      <form onSubmit={form.submit} noValidate className="flex flex-col gap-4">
        <TextField label="Name" error={errors.name?.message} {...form.register('name')} />
        <TextField label="E-mail" type="email" error={errors.email?.message} {...form.register('email')} />
        <SelectField label="Role" options={ROLES.filter(({ value }) => value === 'desk' || value === 'owner')} error={errors.role?.message} {...form.register('role')} />
        <FormError message={form.rootError} />
        <Button type="submit" pending={isSubmitting}>Invite</Button>
      </form>
    </Sheet>
  );
}
