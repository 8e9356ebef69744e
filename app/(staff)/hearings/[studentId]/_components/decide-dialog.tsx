'use client';

import { toast } from 'sonner';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { FormError } from '@/components/ui/form-error';
import { TextArea } from '@/components/ui/inputs';
import { useActionForm } from '@/components/ui/use-action-form';
import { plural } from '@/lib/format';
import { decideHearingSchema } from '@/lib/ladder/schema';
import type { HearingScreen } from '@/lib/ladder/server/hearing-screen';
import { decide } from '../../actions';

type DecideDialogProps = { hearingId: string; outcome: 'passed' | 'not_yet'; rung: NonNullable<HearingScreen['rung']>; keysHeard: number; firstName: string; onClose: () => void };

/** Shown once before it is decided: what it does, who is told, and the words that go with it. */
export function DecideDialog(props: DecideDialogProps) {
  const { outcome, rung, onClose } = props;
  return (
    <Dialog open onOpenChange={(open) => { if (!open) onClose(); }} title={outcome === 'passed' ? `Pass “${rung.title}”` : `Not yet: “${rung.title}”`}>
      <DecideForm {...props} />
    </Dialog>
  );
}

const passedWords = (told: number): string => `Passed. ${told > 0 ? `${plural(told, 'mail goes', 'mails go')} out in ten minutes.` : 'Nobody is told by mail.'}`;

function DecideForm({ hearingId, outcome, rung, keysHeard, firstName, onClose }: DecideDialogProps) {
  const isPass = outcome === 'passed';
  const form = useActionForm({
    schema: decideHearingSchema, defaultValues: { hearingId, outcome, passReason: '', notePublic: '', notePrivate: '', marks: [] }, send: decide,
    onDone: ({ told }) => { toast.success(isPass ? passedWords(told) : 'Noted: not yet.'); onClose(); },
  });
  const { errors, isSubmitting } = form.formState;
  const needsReason = isPass && (keysHeard < rung.keysNeeded || errors.passReason !== undefined);
  return (
      <form onSubmit={form.submit} className="grid gap-4">
        <Consequences texts={isPass ? passConsequences(firstName, keysHeard, rung.keysDrawn) : notYetConsequences(firstName)} />
        {needsReason ? <TextArea label="Why it passes all the same" rows={2} help={`${keysHeard} of ${rung.keysNeeded} needed are heard with stored notes or by ear.`} error={errors.passReason?.message} {...form.register('passReason')} /> : null}
        <TextArea label={isPass ? 'A word for the family' : 'What to work on; the family reads it'} rows={3} optional={isPass} error={errors.notePublic?.message} {...form.register('notePublic')} />
        <TextArea label="For staff only" rows={2} optional error={errors.notePrivate?.message} {...form.register('notePrivate')} />
        <FormError message={form.rootError} />
        <Decision isPass={isPass} isSubmitting={isSubmitting} onClose={onClose} />
      </form>
  );
}

const Consequences = ({ texts }: { texts: readonly string[] }) => (
  <div>
    <p className="eyebrow mb-1">What will happen</p>
    <ul className="list-disc pl-5">{texts.map((text) => <li key={text}>{text}</li>)}</ul>
  </div>
);

const Decision = ({ isPass, isSubmitting, onClose }: { isPass: boolean; isSubmitting: boolean; onClose: () => void }) => (
  <div className="flex flex-wrap justify-end gap-3">
    <Button onClick={onClose}>Go on hearing</Button>
    <Button type="submit" kind={isPass ? 'brass' : 'primary'} pending={isSubmitting}>{isPass ? 'Pass the rung' : 'Not yet'}</Button>
  </div>
);

const TAKE_BACK = 'You can take it back within ten minutes; after that it stays.';
const passConsequences = (firstName: string, heard: number, drawn: number) => [
  `${firstName}’s ladder shows the rung as passed, with ${heard} of ${drawn} keys heard as its proof.`,
  `The guardians who see ${firstName}’s progress get a mail in plain words after ten minutes (a grown student gets it directly).`,
  TAKE_BACK,
];
const notYetConsequences = (firstName: string) => [
  `${firstName} keeps working on the rung; it may be heard again after the waiting days.`, 'No mail goes out; the family reads your words on the progress page.', TAKE_BACK,
];
