'use client';

import { useState } from 'react';
import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { FormError } from '@/components/ui/form-error';
import { TextArea } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { askRecheckSchema } from '@/lib/ladder/schema';
import { askRecheck } from '../actions';

type AskRecheckProps = { studentId: string; rungId: string; title: string };

/** The lead or the owner asks for a passed rung to be heard once more; nothing is taken away. */
export function AskRecheck(props: AskRecheckProps) {
  const [isOpen, setIsOpen] = useState(false);
  return (
    <>
      <Button kind="quiet" aria-label={`Ask for a re-check of ${props.title}`} onClick={() => setIsOpen(true)}>Ask for a re-check</Button>
      <Dialog open={isOpen} onOpenChange={setIsOpen} title={`Re-check “${props.title}”`} description="The rung stays among the passed ones and is heard once more; the next hearing decides. The family reads only that it will be heard again.">
        <RecheckForm {...props} onClose={() => setIsOpen(false)} />
      </Dialog>
    </>
  );
}

function RecheckForm({ studentId, rungId, onClose }: AskRecheckProps & { onClose: () => void }) {
  const form = useActionForm({
    schema: askRecheckSchema, defaultValues: { studentId, rungId, reason: '' }, send: askRecheck,
    onDone: () => { toast.success('It will be heard once more.'); onClose(); },
  });
  return (
    <form onSubmit={form.submit} className="grid gap-4">
      <TextArea label="Why; for staff only" rows={3} error={form.formState.errors.reason?.message} {...form.register('reason')} />
      <FormError message={form.rootError} />
      <div className="flex flex-wrap justify-end gap-3">
        <Button onClick={onClose}>Leave it</Button>
        <Button type="submit" kind="primary" pending={form.formState.isSubmitting}>Ask for the re-check</Button>
      </div>
    </form>
  );
}
