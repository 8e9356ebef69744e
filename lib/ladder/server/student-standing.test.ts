import type { Knex } from 'knex';
import { describe, expect, it } from 'vitest';
import { credited, ladderHouse } from '@/tests/factories/ladder-house';
import { playKey } from '@/tests/factories/played-key';
import { contextOf, NOW } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { askForRecheck } from './ask-recheck';
import { decideHearing } from './decide-hearing';
import { progressOfStudent } from './progress-of-student';
import { startHearing } from './start-hearing';
import { studentStanding } from './student-standing';

const BELOW_FOUR = ['1.1', '1.2', '1.3', '1.4', '1.5', '2.1', '2.2', '2.3'];
const DAY = 86_400;
const greta = (db: Knex, now = NOW) => contextOf(db, 'teacher', { personId: 'greta', taughtStudentIds: ['ines'], now });
const lead = (db: Knex, now = NOW) => contextOf(db, 'teacher', { personId: 'leif', isLead: true, now });
const owner = (db: Knex, now = NOW) => contextOf(db, 'owner', { personId: 'leif', now });
const family = (db: Knex) => contextOf(db, 'guardian', { personId: 'ada', studentIds: ['ines'] });
const words = { passReason: 'Heard in the lesson.', notePublic: 'Lovely touch.', notePrivate: 'Wrists were tense.', marks: [] };

async function passedFourTwo() {
  const db = freshDb();
  const { rungId } = await ladderHouse(db);
  await credited(db, 'ines', BELOW_FOUR.map(rungId));
  const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db));
  await playKey(greta(db), hearingId, 0);
  await playKey(greta(db), hearingId, 1);
  await playKey(greta(db), hearingId, 1, () => [60]);
  await decideHearing({ hearingId, outcome: 'passed', ...words }, greta(db));
  return { db, rungId };
}

describe('where a student stands, for staff', () => {
  it('names level, passed rungs with day and teacher, and each hearing with its keys; the last try counts', async () => {
    const { db } = await passedFourTwo();
    const standing = await studentStanding('ines', greta(db));
    expect(standing).toMatchObject({ level: { no: 3, passed: 0 }, may: { hear: true, askRecheck: false } });
    expect(standing?.words.now).toBe('Inés can now play a wide minor chord built of fourths in all twelve keys.');
    expect(standing?.passed[0]).toMatchObject({ code: '4.2', on: '2026-11-17', how: 'heard by Greta Dahl', isToRecheck: false });
    expect(standing?.passed[1]).toMatchObject({ code: '2.3', on: '2026-09-07', how: 'credited by Leif Dahl: Placed at the trial lesson' });
    expect(standing?.hearings).toMatchObject([{ code: '4.2', outcome: 'passed', by: 'Greta Dahl', notePublic: 'Lovely touch.', notePrivate: 'Wrists were tense.' }]);
    expect(standing?.hearings[0]?.keysHeard).toHaveLength(1);
    expect(standing?.hearings[0]?.keysMissed).toHaveLength(11);
    expect(standing?.next[0]?.code).toBe('3.1');
  });
  it('is nothing for the desk and for a teacher of others; the owner reads and does not hear', async () => {
    const { db } = await passedFourTwo();
    expect(await studentStanding('ines', contextOf(db, 'desk'))).toBeNull();
    expect(await studentStanding('ines', contextOf(db, 'teacher', { personId: 'otto', taughtStudentIds: ['theo'] }))).toBeNull();
    expect(await studentStanding('ines', owner(db))).toMatchObject({ may: { hear: false, askRecheck: true }, hearings: [{ notePrivate: 'Wrists were tense.' }] });
  });
  it('keeps the note for staff from whoever may only read progress', async () => {
    const { db } = await passedFourTwo();
    expect((await studentStanding('ines', family(db)))?.hearings).toMatchObject([{ notePublic: 'Lovely touch.', notePrivate: '' }]);
  });
});

describe('asking for a re-check', () => {
  const asked = (rungId: string) => ({ studentId: 'ines', rungId, reason: 'The bass note was missing on the clip.' });
  it.each([['lead', lead], ['owner', owner]] as const)('by the %s: the rung stays passed, is due once more, and the next hearing decides', async (_who, by) => {
    const { db, rungId } = await passedFourTwo();
    await askForRecheck(asked(rungId('4.2')), by(db, NOW + DAY));
    const standing = await studentStanding('ines', greta(db, NOW + DAY));
    expect(standing?.rechecks).toEqual([{ rungId: rungId('4.2'), code: '4.2', title: 'Minor fourth stack', reason: 'The bass note was missing on the clip.', by: 'Leif Dahl', on: '2026-11-18' }]);
    expect(standing?.ladder.passedCount).toBe(9);
    expect(standing?.words).toMatchObject({ count: '9 of 37 rungs passed.', now: expect.not.stringContaining('fourths') as string });
    expect(standing?.passed.find(({ code }) => code === '4.2')).toMatchObject({ isToRecheck: true, how: 'heard by Greta Dahl' });
    expect(await db('student_rung').where({ rungId: rungId('4.2') })).toMatchObject([{ state: 'recheck_due' }]);
    const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db, NOW + 2 * DAY));
    await decideHearing({ hearingId, outcome: 'passed', ...words }, greta(db, NOW + 2 * DAY));
    const after = await studentStanding('ines', greta(db, NOW + 2 * DAY));
    expect([after?.rechecks, after?.hearings.map(({ outcome }) => outcome)]).toEqual([[], ['passed', 'passed']]);
  });
  it('the family reads that it is heard again, never why', async () => {
    const { db, rungId } = await passedFourTwo();
    await askForRecheck(asked(rungId('4.2')), lead(db, NOW + DAY));
    const progress = await progressOfStudent('ines', family(db));
    expect(progress?.ladder.levels[3]?.rungs[1]).toMatchObject({ state: 'recheck_due' });
    expect(JSON.stringify([progress, await studentStanding('ines', family(db))])).not.toContain('bass note');
  });
  it('needs a passed rung, and is asked once', async () => {
    const { db, rungId } = await passedFourTwo();
    await expect(askForRecheck(asked(rungId('4.3')), lead(db))).rejects.toMatchObject({ code: 'conflict', message: expect.stringContaining('has not been passed') as string });
    await askForRecheck(asked(rungId('4.2')), lead(db, NOW + DAY));
    await expect(askForRecheck(asked(rungId('4.2')), lead(db, NOW + DAY))).rejects.toMatchObject({ message: 'This rung is to be heard once more already.' });
    await expect(db('recheck_request').update({ at: 1 })).rejects.toThrow('recheck_fixed');
    await expect(db('recheck_request').insert({ id: 'r', studentId: 'ines', rungId: rungId('4.2'), reasonPrivate: ' ', byId: 'leif', askedOn: '2026-11-18', at: 1 })).rejects.toThrow('recheck_without_reason');
  });
  it('is not for the teacher, nor for the family', async () => {
    const { db, rungId } = await passedFourTwo();
    for (const context of [greta(db), family(db), contextOf(db, 'desk')]) await expect(askForRecheck(asked(rungId('4.2')), context)).rejects.toMatchObject({ code: 'not_found' });
  });
});
