'use client';

import { useRouter } from 'next/navigation';
import { toast } from 'sonner';
import { useActionForm } from '@/components/ui/use-action-form';
import { changeRungSchema } from '@/lib/ladder/schema';
import type { DraftRungRow } from '@/lib/ladder/server/edition-draft';
import { turnsText } from '@/lib/ladder/spec-text';
import { saveRung } from '../../../actions';

export type Other = { id: string; label: string };

const draftOf = ({ id, title, plainTitle, canDo, soundsLike, spec, criteria, keyPool, keysDrawn, keysNeeded, must, should, rule }: DraftRungRow) => ({
  rungId: id, rule: rule === 'kept' || rule === 're_check' ? rule : ('same' as const), title, plainTitle, canDo, soundsLike, how: spec.how, turns: turnsText(spec.turns), seconds: criteria.seconds ?? null,
  beatsPerMinute: criteria.tempo?.beatsPerMinute ?? null, beatsPerChord: criteria.tempo?.beatsPerChord ?? null, slipsPerTurn: criteria.slipsPerTurn, isShuffled: criteria.isShuffled,
  listenFor: criteria.listenFor, keyPool, keysDrawn, keysNeeded, must, should,
});

/** The form of one rung; saved, it goes back to the list of all. */
export function useRungForm(rung: DraftRungRow) {
  const router = useRouter();
  return useActionForm({ schema: changeRungSchema, defaultValues: draftOf(rung), send: saveRung, onDone: () => { toast.success(`${rung.code} is saved in the draft.`); router.push('/ladder/edition'); } });
}
export type RungFormState = ReturnType<typeof useRungForm>;
