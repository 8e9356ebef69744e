import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { askRecheck, climbersOn, creditByEdition, makeLive, moveClimber } from '@/db/ladder-drafts';
import { rebuildStudentRungs, standingOf } from '@/db/ladder-standing';
import { findPeople, fullName } from '@/db/people';
import { transaction } from '@/db/transaction';
import { AppError } from '@/lib/errors';
import { plural } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { rehearse, standingAfter, type Rehearsal } from '../edition-change';
import { hasRung } from '../rung-state';
import type { publishEditionSchema } from '../schema';
import { readDraft, type Draft } from './edition-draft';

export type RehearsedStudent = Omit<Rehearsal, 'heldUpBy'> & { name: string; heldUpBy: string[] };
export type EditionRehearsal = { climbers: number; unchanged: number; gaining: RehearsedStudent[]; heldUp: RehearsedStudent[]; rechecks: number };

/** What the new edition would do to each student, before it does: who gains rungs, who meets new ones below where they are, who is heard once more. */
export async function rehearseEdition({ db, ability }: Pick<Context, 'db' | 'ability'>): Promise<EditionRehearsal> {
  assertCan(ability, 'update', 'Ladder', {});
  const draft = await readDraft(db);
  const studentIds = await climbersOn(db, draft.live.id);
  const names = new Map((await findPeople(db, studentIds)).map((person) => [person.id, fullName(person)]));
  const codes = new Map(draft.rungs.map(({ id, code, title }) => [id, `${code} ${title}`]));
  const rows: RehearsedStudent[] = [];
  let rechecks = 0;
  for (const studentId of studentIds) {
    const standings = (await standingOf(db, studentId, draft.live.id)).map(({ rung, state }) => ({ rung, state }));
    const seen = rehearse(studentId, standings, draft.rungs.map(({ id }) => id), draft.mappings);
    rechecks += standingAfter(standings, draft.mappings).filter(({ rung, state }) => state === 'recheck_due' && standings.some((one) => one.rung === rung && one.state === 'passed')).length;
    rows.push({ ...seen, name: names.get(studentId) ?? '', heldUpBy: seen.heldUpBy.map((rung) => codes.get(rung) ?? '') });
  }
  const byName = rows.sort((a, b) => a.name.localeCompare(b.name));
  return {
    climbers: rows.length, rechecks, gaining: byName.filter(({ hadBefore, hasAfter }) => hasAfter > hadBefore), heldUp: byName.filter(({ heldUpBy }) => heldUpBy.length > 0),
    unchanged: rows.filter(({ hadBefore, hasAfter, heldUpBy }) => hasAfter === hadBefore && heldUpBy.length === 0).length,
  };
}

/**
 * The draft becomes the ladder from today: the old edition retires with its words, everybody moves over, credits and
 * re-checks follow the mapping, and nothing passed becomes unpassed. Refused while anything stands against it.
 */
export async function publishEdition({ climbers }: z.output<typeof publishEditionSchema>, context: Context): Promise<{ moved: number }> {
  const { db, ability, today } = context;
  assertCan(ability, 'update', 'Ladder', {});
  return transaction(db, async (trx) => {
    const draft = await readDraft(trx);
    if (draft.problems.length > 0) throw new AppError('conflict', `${plural(draft.problems.length, 'thing stands', 'things stand')} against it: ${draft.problems[0]?.text ?? ''}`);
    const studentIds = await climbersOn(trx, draft.live.id);
    if (studentIds.length !== climbers) throw new AppError('conflict', 'The students on the ladder are not those of the rehearsal any more. Rehearse once more.');
    const before = new Map<string, Awaited<ReturnType<typeof standingOf>>>();
    for (const studentId of studentIds) before.set(studentId, await standingOf(trx, studentId, draft.live.id));
    await makeLive(trx, { from: draft.live.id, to: draft.edition.id, startsOn: today });
    for (const studentId of studentIds) await moveStudent(trx, context, { draft, studentId, before: before.get(studentId) ?? [] });
    await recordAudit(trx, context, { action: 'publish', tableName: 'ladder_edition', rowId: draft.edition.id, sentence: `Published the ${draft.edition.label.toLowerCase()} of the ladder; ${plural(studentIds.length, 'student')} moved over.` });
    return { moved: studentIds.length };
  });
}

type Moving = { draft: Draft; studentId: string; before: Awaited<ReturnType<typeof standingOf>> };

async function moveStudent(trx: Trx, context: Context, { draft, studentId, before }: Moving): Promise<void> {
  const { actor, now, today } = context;
  const has = new Set(before.filter(({ state }) => hasRung(state)).map(({ rung }) => rung));
  for (const { from, to, rule } of draft.mappings) {
    if (from === null || !has.has(from)) continue;
    // A pass stays with its rung; only what has another name needs a credit.
    if (from !== to) await creditByEdition(trx, { id: newId(), studentId, rungId: to, reason: `From the ${draft.live.label.toLowerCase()}`, byId: actor.personId, creditedOn: today, at: now });
    if (rule === 're_check') await askRecheck(trx, { id: newId(), studentId, rungId: to, reasonPrivate: `Asked by the ${draft.edition.label.toLowerCase()}`, byId: actor.personId, askedOn: today, at: now });
  }
  await moveClimber(trx, studentId, draft.edition.id);
  await rebuildStudentRungs(trx, studentId, draft.edition.id);
}
