import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { copyEdition, draftEdition, insertRung, leaveOut, replaceNeeds, rungByCode, setMapping, updateRungText } from '@/db/ladder-drafts';
import { liveEdition, type Rung } from '@/db/ladders';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { rungProblems } from '../edition-check';
import type { Need } from '../needs';
import type { RungText } from '../play-spec';
import type { addRungSchema, changeRungSchema, leaveOutRungSchema, rungDraftSchema, startEditionSchema } from '../schema';
import { readTurns } from '../spec-text';
import { readDraft, type Draft } from './edition-draft';

/** Begins the next edition as a copy of the live one. One is prepared at a time. */
export async function startEdition({ label }: z.output<typeof startEditionSchema>, context: Context): Promise<{ editionId: string }> {
  const { db, ability, actor, today } = context;
  assertCan(ability, 'update', 'Ladder', {});
  return transaction(db, async (trx) => {
    if (await draftEdition(trx)) throw new AppError('conflict', 'An edition is being prepared already.');
    const from = await liveEdition(trx);
    if (!from) throw new AppError('conflict', 'Install the first edition before the next one is prepared.');
    if (from.label === label) throw new AppError('invalid', 'The live edition has this name.', { label: ['Choose another name.'] });
    const editionId = newId();
    await copyEdition(trx, { from, id: editionId, label, startsOn: today, createdBy: actor.personId, newId });
    await recordAudit(trx, context, { action: 'create', tableName: 'ladder_edition', rowId: editionId, sentence: `Began to prepare the ${label.toLowerCase()} of the ladder.` });
    return { editionId };
  });
}

type Edit<T> = (trx: Trx, draft: Draft) => Promise<{ result: T; sentence: string; rowId: string }>;

/** Every edit is of the draft, by those who look after the ladder, and stands in the audit. */
async function editing<T>(context: Context, edit: Edit<T>): Promise<T> {
  assertCan(context.ability, 'update', 'Ladder', {});
  return transaction(context.db, async (trx) => {
    const { result, sentence, rowId } = await edit(trx, await readDraft(trx));
    await recordAudit(trx, context, { action: 'edit', tableName: 'rung_text', rowId, sentence });
    return result;
  });
}

const rungOf = (draft: Draft, rungId: string): Rung => {
  const rung = draft.rungs.find(({ id }) => id === rungId);
  if (!rung) throw notFound('rung');
  return rung;
};

/** Writes what a rung of the draft asks. It must fit the keyboard in every key it is asked in, and speak to guardians. */
export const changeRung = ({ rungId, rule, must, should, ...sent }: z.output<typeof changeRungSchema>, context: Context): Promise<void> =>
  editing(context, async (trx, draft) => {
    const rung = rungOf(draft, rungId);
    const text = textFrom(rung.code, sent);
    const problem = rungProblems(text)[0];
    if (problem) throw new AppError('invalid', `${rung.code}: ${problem}`, { turns: [problem] });
    await updateRungText(trx, draft.edition.id, rungId, text);
    await replaceNeeds(trx, draft.edition.id, rungId, needsFrom(draft, rungId, { must, should }));
    if (draft.oldRungs.some(({ id }) => id === rungId)) await setMapping(trx, { id: newId(), fromEditionId: draft.live.id, fromRungId: rungId, toEditionId: draft.edition.id, toRungId: rungId, rule });
    return { result: undefined, rowId: rungId, sentence: `Changed ${rung.code} ${text.title} in the ${draft.edition.label.toLowerCase()}.` };
  });

function textFrom(code: string, sent: Omit<z.output<typeof rungDraftSchema>, 'must' | 'should'>): RungText {
  const { how, turns, seconds, beatsPerMinute, beatsPerChord, slipsPerTurn, isShuffled, listenFor, ...rest } = sent;
  const reading = readTurns(turns);
  if (reading.kind === 'refused') throw new AppError('invalid', reading.message, { turns: [reading.message] });
  const tempo = beatsPerMinute !== null ? { tempo: { beatsPerMinute, beatsPerChord: beatsPerChord ?? 4 } } : {};
  return { ...rest, code, spec: { how, turns: reading.turns }, criteria: { ...(seconds !== null ? { seconds } : {}), ...tempo, slipsPerTurn, isShuffled, listenFor } };
}

function needsFrom({ rungs }: Draft, rung: string, { must, should }: { must: readonly string[]; should: readonly string[] }): Need[] {
  const known = new Set(rungs.map(({ id }) => id));
  const needs = [...must.map((needed): Need => ({ rung, needs: needed, kind: 'must' })), ...should.filter((needed) => !must.includes(needed)).map((needed): Need => ({ rung, needs: needed, kind: 'should' }))];
  if (needs.some(({ needs: needed }) => needed === rung || !known.has(needed))) throw new AppError('invalid', 'A rung needs other rungs of this edition.', { must: ['Choose other rungs of this edition.'] });
  return needs;
}

/** Adds a rung behind another: split from it, so that those who have the old one are credited, or wholly new. It begins with the words of its neighbour. */
export const addRung = ({ code, afterRungId, fromRungId }: z.output<typeof addRungSchema>, context: Context): Promise<{ rungId: string }> =>
  editing(context, async (trx, draft) => {
    const after = rungOf(draft, afterRungId);
    if (await rungByCode(trx, draft.edition.ladderId, code)) throw new AppError('invalid', `The ladder has, or had, a rung ${code}. A code is given once.`, { code: ['Choose another code.'] });
    const origin = fromRungId === '' ? undefined : draft.oldRungs.find(({ id }) => id === fromRungId);
    if (fromRungId !== '' && !origin) throw notFound('rung');
    const rungId = newId();
    const text: RungText = { ...after, code, title: `${after.title} (${code})` };
    await insertRung(trx, { id: rungId, textId: newId(), ladderId: draft.edition.ladderId, editionId: draft.edition.id, levelId: after.levelId, afterRungId, text });
    await replaceNeeds(trx, draft.edition.id, rungId, draft.needs.filter(({ rung }) => rung === afterRungId).map((need) => ({ ...need, rung: rungId })));
    if (origin) await setMapping(trx, { id: newId(), fromEditionId: draft.live.id, fromRungId: origin.id, toEditionId: draft.edition.id, toRungId: rungId, rule: 'credited' });
    return { result: { rungId }, rowId: rungId, sentence: `Added ${code} to the ${draft.edition.label.toLowerCase()}.` };
  });

/** Leaves a rung out; whoever has it is credited the one it goes into, so that nothing passed is lost. */
export const leaveOutRung = ({ rungId, intoRungId }: z.output<typeof leaveOutRungSchema>, context: Context): Promise<void> =>
  editing(context, async (trx, draft) => {
    const [rung, into] = [rungOf(draft, rungId), rungOf(draft, intoRungId)];
    if (rung.id === into.id) throw new AppError('invalid', 'Choose another rung for it to go into.', { intoRungId: ['Choose another rung.'] });
    await leaveOut(trx, draft.edition.id, rungId);
    if (draft.oldRungs.some(({ id }) => id === rungId)) await setMapping(trx, { id: newId(), fromEditionId: draft.live.id, fromRungId: rungId, toEditionId: draft.edition.id, toRungId: intoRungId, rule: 'credited' });
    return { result: undefined, rowId: rungId, sentence: `Left ${rung.code} out of the ${draft.edition.label.toLowerCase()}; it goes into ${into.code}.` };
  });
