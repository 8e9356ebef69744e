import type { Knex } from 'knex';
import { describe, expect, it } from 'vitest';
import { firstBrokenAuditRow } from '@/db/audit';
import { countAttempts, findHearing, hearingsOf, keyRecords, lastNotYetOn, proofsOf } from '@/db/hearings';
import { rebuildStudentRungs } from '@/db/ladder-standing';
import { leaseDueMails } from '@/db/outbox';
import { transaction } from '@/db/transaction';
import { credited, ladderHouse } from '@/tests/factories/ladder-house';
import { playKey } from '@/tests/factories/played-key';
import { contextOf, NOW } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { undoLeftWords, undoSecondsLeft } from '../undo';
import { decideHearing, stopHearing } from './decide-hearing';
import { hearingScreen } from './hearing-screen';
import { progressOfStudent } from './progress-of-student';
import { startHearing } from './start-hearing';
import { undoHearing } from './undo-hearing';

const BELOW_FOUR = ['1.1', '1.2', '1.3', '1.4', '1.5', '2.1', '2.2', '2.3'];
const [LAST_SECOND, TEN_MINUTES] = [599, 600];
const greta = (db: Knex, after = 0) => contextOf(db, 'teacher', { personId: 'greta', taughtStudentIds: ['ines'], now: NOW + after });
const lead = (db: Knex, after = 0) => contextOf(db, 'teacher', { personId: 'leif', isLead: true, now: NOW + after });
const words = { passReason: 'Heard in the lesson.', notePublic: 'Lovely touch.', notePrivate: '', marks: [] };

async function decided(outcome: 'passed' | 'not_yet' = 'passed') {
  const db = freshDb();
  const { rungId } = await ladderHouse(db);
  await credited(db, 'ines', BELOW_FOUR.map(rungId));
  const rung = rungId('4.2');
  const { hearingId } = await startHearing({ studentId: 'ines', rungId: rung, leadReason: '' }, greta(db));
  await playKey(greta(db), hearingId, 0, () => [60]);
  await playKey(greta(db), hearingId, 0);
  await playKey(greta(db), hearingId, 1);
  await decideHearing({ hearingId, outcome, ...words }, greta(db));
  return { db, rung, hearingId };
}
const stateOf = async (db: Knex, rungId: string): Promise<unknown> => (await db<{ state: string; rungId: string }>('student_rung').where({ rungId }).first('state'))?.state;
const mailStates = async (db: Knex): Promise<string[]> => (await db<{ state: string; topic: string }>('outbox').where({ topic: 'rung_passed' }).select('state')).map(({ state }) => state);

describe('how long a decision may be taken back', () => {
  it.each([[0, 600, '10 min left'], [1, 599, '9 min left'], [540, 60, '1 min left'], [541, 59, 'less than a minute left'], [599, 1, 'less than a minute left'], [600, 0, 'less than a minute left'], [601, 0, 'less than a minute left']])(
    'after %i seconds %i are left', (after, left, said) => {
      expect(undoSecondsLeft(NOW, NOW + after)).toBe(left);
      expect(undoLeftWords(left)).toBe(said);
    });
});

describe('taking a decision back', () => {
  it('at 9:59 the pass counts no more, its mail never goes out, and the hearing goes on with the same keys', async () => {
    const { db, rung, hearingId } = await decided();
    expect(await stateOf(db, rung)).toBe('passed');
    const undone = await undoHearing({ hearingId }, greta(db, LAST_SECOND));
    expect(undone).toMatchObject({ studentId: 'ines', rungId: rung, mailsWithdrawn: 1 });
    expect(await stateOf(db, rung)).toBe('working');
    expect(await mailStates(db)).toEqual(['withdrawn']);
    expect(await leaseDueMails(db, 'worker', NOW + 3600, 10)).toEqual([]);
    const [before, after] = [await findHearing(db, hearingId), await findHearing(db, undone.hearingId)];
    expect(before).toMatchObject({ state: 'decided', outcome: 'passed', notePublic: 'Lovely touch.' });
    expect(after).toMatchObject({ state: 'played', outcome: null, drawn: before?.drawn, seed: before?.seed, assessorId: 'greta', startedOn: before?.startedOn });
    const bare = async (id: string) => (await proofsOf(db, id)).map(({ drawnNo, tryNo, isHeard, heard, source, at }) => ({ drawnNo, tryNo, isHeard, heard, source, at }));
    expect(await bare(undone.hearingId)).toHaveLength(3);
    expect(await bare(undone.hearingId)).toEqual(await bare(hearingId));
    expect(await firstBrokenAuditRow(db)).toBeNull();
    expect(await db('audit').where({ action: 'take_back' })).toMatchObject([{ rowId: hearingId, sentence: 'Took back “passed” for Inés Okafor, 4.2 Minor fourth stack; the hearing goes on.' }]);
  });
  it.each([TEN_MINUTES, 601])('after %i seconds it stays, in words and in the table itself', async (after) => {
    const { db, rung, hearingId } = await decided();
    await expect(undoHearing({ hearingId }, greta(db, after))).rejects.toMatchObject({ code: 'conflict', message: expect.stringContaining('ten minutes are over') as string });
    expect(await stateOf(db, rung)).toBe('passed');
    expect(await mailStates(db)).toEqual(['queued']);
    const decidedRow = await findHearing(db, hearingId);
    const following = { id: 'late', studentId: 'ines', rungId: rung, editionId: decidedRow?.editionId, assessorId: 'greta', state: 'keys_drawn', seed: decidedRow?.seed, keysDrawnJson: JSON.stringify(decidedRow?.drawn), startedOn: '2026-11-17', replacesId: hearingId };
    await expect(db('hearing').insert({ ...following, createdAt: NOW + after })).rejects.toThrow('hearing_not_taken_back');
    await expect(db('hearing').insert({ ...following, assessorId: 'leif', createdAt: NOW + 5 })).rejects.toThrow('hearing_not_taken_back');
    await expect(db('hearing').insert({ ...following, seed: 1, createdAt: NOW + 5 })).rejects.toThrow('hearing_not_taken_back');
    await expect(db('hearing').insert({ ...following, createdAt: NOW + LAST_SECOND })).resolves.toBeDefined();
    await expect(db('hearing').where({ id: 'late' }).update({ replacesId: null })).rejects.toThrow('hearing_question_fixed');
  });
  it('the mail waits until the decision stays', async () => {
    const { db } = await decided();
    expect(await leaseDueMails(db, 'worker', NOW + LAST_SECOND, 10)).toEqual([]);
    expect(await leaseDueMails(db, 'worker', NOW + TEN_MINUTES, 10)).toMatchObject([{ toAddress: 'ada@example.org', topic: 'rung_passed' }]);
  });
  it('is for the one who decided: not the lead, not a stranger, not the family', async () => {
    const { db, hearingId } = await decided();
    await expect(undoHearing({ hearingId }, lead(db, 60))).rejects.toMatchObject({ code: 'forbidden' });
    await expect(undoHearing({ hearingId }, contextOf(db, 'teacher', { personId: 'otto', now: NOW + 60 }))).rejects.toMatchObject({ code: 'not_found' });
    await expect(undoHearing({ hearingId }, contextOf(db, 'guardian', { personId: 'ada', studentIds: ['ines'], now: NOW + 60 }))).rejects.toMatchObject({ code: 'forbidden' });
    await expect(undoHearing({ hearingId: 'none' }, greta(db, 60))).rejects.toMatchObject({ code: 'not_found' });
  });
  it('happens once; what follows is decided anew and can be taken back in its own ten minutes', async () => {
    const { db, rung, hearingId } = await decided();
    const next = await undoHearing({ hearingId }, greta(db, 60));
    await expect(undoHearing({ hearingId }, greta(db, 61))).rejects.toMatchObject({ code: 'conflict', message: 'This decision was followed already: the rung is being heard again.' });
    await expect(undoHearing({ hearingId: next.hearingId }, greta(db, 61))).rejects.toMatchObject({ code: 'conflict', message: expect.stringContaining('not decided') as string });
    await decideHearing({ hearingId: next.hearingId, outcome: 'not_yet', ...words }, greta(db, 120));
    expect(await stateOf(db, rung)).toBe('working');
    expect(await mailStates(db)).toEqual(['withdrawn']);
    await expect(undoHearing({ hearingId }, greta(db, 130))).rejects.toMatchObject({ message: 'This decision was taken back or followed already.' });
    const third = await undoHearing({ hearingId: next.hearingId }, greta(db, 119 + TEN_MINUTES));
    await decideHearing({ hearingId: third.hearingId, outcome: 'passed', ...words }, greta(db, 800));
    expect(await stateOf(db, rung)).toBe('passed');
    expect((await mailStates(db)).sort()).toEqual(['queued', 'withdrawn']);
  });
  it('“not yet” taken back counts as no attempt, sets no waiting days, and its keys count once', async () => {
    const { db, rung, hearingId } = await decided('not_yet');
    const term = { startsOn: '2026-09-07', endsOn: '2026-12-19' };
    expect([await countAttempts(db, 'ines', rung, term), await lastNotYetOn(db, 'ines', rung)]).toEqual([1, '2026-11-17']);
    const records = await keyRecords(db, 'ines', rung);
    const next = await undoHearing({ hearingId }, greta(db, 60));
    expect([await countAttempts(db, 'ines', rung, term), await lastNotYetOn(db, 'ines', rung)]).toEqual([0, null]);
    expect(await keyRecords(db, 'ines', rung)).toEqual(records);
    await stopHearing({ hearingId: next.hearingId, reason: 'The wrong student' }, greta(db, 90));
    expect(await stateOf(db, rung)).toBe('open');
    expect(await hearingsOf(db, 'ines')).toEqual([]);
    await expect(startHearing({ studentId: 'ines', rungId: rung, leadReason: '' }, greta(db, 120))).resolves.toBeDefined();
  });
  it('rebuilding gives the same standing, and the family reads nothing of what was taken back', async () => {
    const { db, hearingId } = await decided();
    await undoHearing({ hearingId }, greta(db, 60));
    const before: unknown[] = await db('student_rung').orderBy('rungId');
    const [edition]: { id: string }[] = await db('ladder_edition');
    await transaction(db, (trx) => rebuildStudentRungs(trx, 'ines', edition?.id ?? ''));
    expect(await db('student_rung').orderBy('rungId')).toEqual(before);
    const progress = await progressOfStudent('ines', contextOf(db, 'guardian', { personId: 'ada', studentIds: ['ines'] }));
    expect(progress?.hearings).toEqual([]);
    expect(progress?.words.count).toBe('8 of 37 rungs passed.');
  });
});

describe('the hearing screen', () => {
  it('offers it to the one who decided, with what is left', async () => {
    const { db, hearingId } = await decided();
    expect((await hearingScreen({ studentId: 'ines' }, greta(db, 1)))?.justDecided).toEqual([{ id: hearingId, title: 'Minor fourth stack', outcome: 'passed', secondsLeft: 599 }]);
    expect((await hearingScreen({ studentId: 'ines' }, lead(db, 1)))?.justDecided).toEqual([]);
    expect((await hearingScreen({ studentId: 'ines' }, greta(db, TEN_MINUTES)))?.justDecided).toEqual([]);
    await undoHearing({ hearingId }, greta(db, 60));
    expect((await hearingScreen({ studentId: 'ines' }, greta(db, 61)))?.justDecided).toEqual([]);
  });
});
