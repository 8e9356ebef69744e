'use client';

import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { FormError } from '@/components/ui/form-error';
import { TextField } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { stopHearingSchema } from '@/lib/ladder/schema';
import { stop } from '../../actions';

export function StopDialog({ hearingId, onClose }: { hearingId: string; onClose: () => void }) {
  const form = useActionForm({ schema: stopHearingSchema, defaultValues: { hearingId, reason: '' }, send: stop, onDone: onClose });
  return (
    <Dialog open onOpenChange={(open) => { if (!open) onClose(); }} title="Stop this hearing" description="Illness, distress, a broken instrument: it ends here and counts as no attempt.">
      <form onSubmit={form.submit} className="grid gap-4">
        <TextField label="Why it stops" error={form.formState.errors.reason?.message} {...form.register('reason')} />
        <FormError message={form.rootError} />
        <div className="flex flex-wrap justify-end gap-3">
          <Button onClick={onClose}>Go on hearing</Button>
          <Button type="submit" kind="primary" pending={form.formState.isSubmitting}>Stop the hearing</Button>
        </div>
      </form>
    </Dialog>
  );
}
