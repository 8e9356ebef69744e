import type { Knex } from 'knex';
import { describe, expect, it } from 'vitest';
import { joinLadder, rebuildStudentRungs, standingOf } from '@/db/ladder-standing';
import { liveEdition, rungsOf } from '@/db/ladders';
import { transaction } from '@/db/transaction';
import { credited, ladderHouse } from '@/tests/factories/ladder-house';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { turnsText } from '../spec-text';
import { draftScreen, type DraftRungRow } from './edition-draft';
import { addRung, changeRung, leaveOutRung, startEdition } from './edit-edition';
import { publishEdition, rehearseEdition } from './publish-edition';

const owner = (db: Knex) => contextOf(db, 'owner', { personId: 'leif' });
const lead = (db: Knex) => contextOf(db, 'teacher', { personId: 'leif', isLead: true });

async function house() {
  const db = freshDb();
  const { rungId } = await ladderHouse(db);
  await credited(db, 'ines', ['1.1', '1.2', '1.3', '1.4', '1.5', '2.1'].map(rungId));
  const live = await liveEdition(db);
  await transaction(db, async (trx) => {
    for (const studentId of ['ines', 'theo']) {
      await joinLadder(trx, { id: `on-${studentId}`, studentId, ladderId: live?.ladderId ?? '', editionId: live?.id ?? '', sinceOn: '2026-09-07' });
      await rebuildStudentRungs(trx, studentId, live?.id ?? '');
    }
  });
  await startEdition({ label: 'Second edition' }, owner(db));
  return { db, rungId, liveId: live?.id ?? '' };
}

async function row(db: Knex, code: string): Promise<DraftRungRow> {
  const found = (await draftScreen(owner(db)))?.levels.flatMap(({ rungs }) => rungs).find((rung) => rung.code === code);
  if (!found) throw new Error(`no ${code}`);
  return found;
}

type Change = Parameters<typeof changeRung>[0];
const sent = ({ id, title, plainTitle, canDo, soundsLike, spec, criteria, keyPool, keysDrawn, keysNeeded, must, should }: DraftRungRow, over: Partial<Change> = {}): Change => ({
  rungId: id, rule: 'same', title, plainTitle, canDo, soundsLike, how: spec.how, turns: turnsText(spec.turns), seconds: criteria.seconds ?? null, beatsPerMinute: criteria.tempo?.beatsPerMinute ?? null,
  beatsPerChord: criteria.tempo?.beatsPerChord ?? null, slipsPerTurn: criteria.slipsPerTurn, isShuffled: criteria.isShuffled, listenFor: criteria.listenFor, keyPool, keysDrawn, keysNeeded, must, should, ...over,
});

describe('a draft', () => {
  it('begins as a copy, one at a time, with nothing against it and everything mapped', async () => {
    const { db } = await house();
    const screen = await draftScreen(owner(db));
    expect(screen).toMatchObject({ label: 'Second edition', liveLabel: 'First edition', problems: [], leftOut: [] });
    expect(screen?.levels.flatMap(({ rungs }) => rungs)).toHaveLength(37);
    expect(screen?.levels.flatMap(({ rungs }) => rungs).every(({ rule, isNew, isChanged }) => rule === 'same' && !isNew && !isChanged)).toBe(true);
    await expect(startEdition({ label: 'Third edition' }, owner(db))).rejects.toMatchObject({ code: 'conflict' });
  });
  it('is changed by the owner and the lead, by nobody else', async () => {
    const { db } = await house();
    const change = sent(await row(db, '4.2'), { title: 'Minor stack in fourths' });
    await changeRung(change, lead(db));
    expect(await row(db, '4.2')).toMatchObject({ title: 'Minor stack in fourths', isChanged: true });
    for (const other of [contextOf(db, 'desk'), contextOf(db, 'teacher', { personId: 'greta' }), contextOf(db, 'guardian')]) {
      await expect(changeRung(change, other)).rejects.toMatchObject({ code: 'forbidden' });
      await expect(draftScreen(other)).rejects.toMatchObject({ code: 'forbidden' });
    }
  });
  it('refuses what does not fit the keyboard, what is not understood, and a need of itself', async () => {
    const { db } = await house();
    const rung = await row(db, '5.1');
    await expect(changeRung(sent(rung, { turns: '1 m9: b3-5-b7-9 [60-70]' }), owner(db))).rejects.toThrow('does not fit its place on the keyboard');
    await expect(changeRung(sent(rung, { turns: '1 m9 b3-5' }), owner(db))).rejects.toMatchObject({ code: 'invalid' });
    await expect(changeRung(sent(rung, { keysNeeded: 13 }), owner(db))).rejects.toThrow('13 keys are needed');
    await expect(changeRung(sent(rung, { must: [rung.id] }), owner(db))).rejects.toThrow('other rungs');
    expect((await row(db, '5.1')).isChanged).toBe(false);
  });
  it('shows a circle as what stands against publishing', async () => {
    const { db, rungId } = await house();
    await changeRung(sent(await row(db, '1.1'), { must: [rungId('2.1')] }), owner(db));
    expect((await draftScreen(owner(db)))?.problems[0]?.text).toMatch(/^The needs lead in a circle: /);
    await expect(publishEdition({ climbers: 2 }, owner(db))).rejects.toThrow('stands against it');
  });
});

describe('publishing', () => {
  async function split(db: Knex, rungId: (code: string) => string) {
    const { rungId: half } = await addRung({ code: '1.2a', afterRungId: rungId('1.2'), fromRungId: rungId('1.2') }, owner(db));
    const { rungId: fresh } = await addRung({ code: '1.9', afterRungId: rungId('1.3'), fromRungId: '' }, owner(db));
    return { half, fresh };
  }
  it('rehearses who gains and who is held up, and changes nothing yet', async () => {
    const { db, rungId, liveId } = await house();
    await split(db, rungId);
    const seen = await rehearseEdition(owner(db));
    expect(seen).toMatchObject({ climbers: 2, unchanged: 1, rechecks: 0 });
    expect(seen.gaining).toMatchObject([{ name: 'Inés Okafor', hadBefore: 6, ofBefore: 37, hasAfter: 7, ofAfter: 39 }]);
    expect(seen.heldUp.map(({ name, heldUpBy }) => [name, heldUpBy.length])).toEqual([['Inés Okafor', 1]]);
    expect((await liveEdition(db))?.id).toBe(liveId);
  });
  it('credits the split rung, keeps every pass, retires the old words and keeps them', async () => {
    const { db, rungId, liveId } = await house();
    const { half, fresh } = await split(db, rungId);
    await changeRung(sent(await row(db, '1.4'), { title: 'Three stacks, slower', rule: 're_check' }), owner(db));
    expect(await publishEdition({ climbers: 2 }, owner(db))).toEqual({ moved: 2 });
    const live = await liveEdition(db);
    expect(live?.label).toBe('Second edition');
    const standing = new Map((await standingOf(db, 'ines', live?.id ?? '')).map(({ rung, state }) => [rung, state]));
    expect([standing.get(half), standing.get(fresh), standing.get(rungId('1.2')), standing.get(rungId('1.4'))]).toEqual(['credited', 'open', 'credited', 'recheck_due']);
    expect((await rungsOf(db, liveId)).find(({ code }) => code === '1.4')?.title).toBe('Three stacks in C');
    expect(await db('ladder_edition').orderBy('createdAt').select('state')).toEqual([{ state: 'retired' }, { state: 'live' }]);
    expect(await db('student_ladder').where({ editionId: live?.id })).toHaveLength(2);
    expect(await draftScreen(owner(db))).toBeNull();
  });
  it('a rung that is left out goes into another, so that its pass is not lost', async () => {
    const { db, rungId } = await house();
    await leaveOutRung({ rungId: rungId('1.3'), intoRungId: rungId('1.4') }, owner(db));
    const screen = await draftScreen(owner(db));
    expect(screen?.leftOut).toMatchObject([{ code: '1.3', into: ['1.4'] }]);
    expect(screen?.problems).toEqual([]);
    await expect(leaveOutRung({ rungId: rungId('1.4'), intoRungId: rungId('1.4') }, owner(db))).rejects.toMatchObject({ code: 'invalid' });
    await expect(addRung({ code: '1.3', afterRungId: rungId('1.4'), fromRungId: '' }, owner(db))).rejects.toThrow('given once');
  });
  it('is refused when the students are not those of the rehearsal', async () => {
    const { db } = await house();
    await expect(publishEdition({ climbers: 3 }, owner(db))).rejects.toMatchObject({ code: 'conflict' });
    await expect(publishEdition({ climbers: 2 }, contextOf(db, 'teacher', { personId: 'greta' }))).rejects.toMatchObject({ code: 'forbidden' });
  });
});
