import type { Knex } from 'knex';
import { describe, expect, it } from 'vitest';
import { splitHands } from '@/lib/harmony/hands';
import { reachWords } from '@/lib/harmony/reach';
import { hearingScreen } from '@/lib/ladder/server/hearing-screen';
import { ladderHouse } from '@/tests/factories/ladder-house';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { changeReachSchema } from '../schema';
import { changeReach } from './change-reach';
import { readStudent } from './read-students';

const greta = (db: Knex) => contextOf(db, 'teacher', { personId: 'greta', taughtStudentIds: ['ines'] });
async function house(): Promise<Knex> {
  const db = freshDb();
  await ladderHouse(db);
  return db;
}

describe('the reach of a hand in words', () => {
  it.each([[5, 'a fourth'], [7, 'a fifth'], [12, 'an octave'], [14, 'a ninth, an octave and a whole tone'], [15, 'a minor tenth'], [16, 'a tenth, an octave and a major third'], [19, 'a twelfth']])('%i semitones are %s', (semitones, said) => {
    expect(reachWords(semitones).startsWith(said)).toBe(true);
    expect(reachWords(semitones)).toContain(`(${semitones} semitones)`);
  });
});

describe('changing the reach', () => {
  it('is noted with before and after, and the next hearing shares the notes by it', async () => {
    const db = await house();
    const wide = [48, 55, 64];
    const before = await hearingScreen({ studentId: 'ines' }, greta(db));
    expect(splitHands(wide, before?.ladder.student.reachSemitones ?? 0)).toMatchObject({ left: [48, 55], right: [64] });
    await changeReach({ studentId: 'ines', reachSemitones: 16 }, greta(db));
    const after = await hearingScreen({ studentId: 'ines' }, greta(db));
    expect(splitHands(wide, after?.ladder.student.reachSemitones ?? 0)).toMatchObject({ left: [48, 55, 64], right: [] });
    expect(await db('audit').where({ action: 'change_reach' })).toMatchObject([{
      sentence: 'Noted the hand of Inés Okafor: a tenth, an octave and a major third (16 semitones).', beforeJson: '{"reachSemitones":12}', afterJson: '{"reachSemitones":16}',
    }]);
  });
  it('the same number again writes nothing', async () => {
    const db = await house();
    await changeReach({ studentId: 'ines', reachSemitones: 12 }, greta(db));
    expect(await db('audit').where({ action: 'change_reach' })).toEqual([]);
  });
  it.each([4, 20, 12.5, Number.NaN])('%d semitones are refused in words', (reachSemitones) => {
    expect(changeReachSchema.safeParse({ studentId: 'ines', reachSemitones }).error?.issues[0]?.message).toBe('From 5 to 19 semitones.');
  });
  it.each(['5', '19'])('%s, as a form sends it, is taken and stored', async (typed) => {
    const db = await house();
    await expect(changeReach(changeReachSchema.parse({ studentId: 'ines', reachSemitones: typed }), greta(db))).resolves.toEqual({ reachSemitones: Number(typed) });
  });
  it('is for who teaches the student, the lead and the owner; the desk does not even see it', async () => {
    const db = await house();
    const change = { studentId: 'ines', reachSemitones: 10 };
    for (const context of [contextOf(db, 'desk'), contextOf(db, 'teacher', { personId: 'otto' }), contextOf(db, 'guardian', { personId: 'ada', studentIds: ['ines'] })]) {
      await expect(changeReach(change, context)).rejects.toMatchObject({ code: 'not_found' });
    }
    expect((await readStudent({ id: 'ines' }, contextOf(db, 'desk')))?.reach).toBeNull();
    await changeReach(change, contextOf(db, 'teacher', { personId: 'leif', isLead: true }));
    await changeReach({ ...change, reachSemitones: 11 }, contextOf(db, 'owner', { personId: 'leif' }));
    expect((await readStudent({ id: 'ines' }, greta(db)))?.reach).toEqual({ semitones: 11, mayChange: true });
    await expect(changeReach({ ...change, studentId: 'ada' }, contextOf(db, 'owner', { personId: 'leif' }))).rejects.toMatchObject({ code: 'not_found' });
  });
});

describe('contacts of a student', () => {
  it('names each adult with legal care, their number and address, and the student’s own', async () => {
    const db = await house();
    await db('contact_point').insert({ id: 'phone-ada', personId: 'ada', kind: 'phone', value: '0155 010 0201' });
    expect((await readStudent({ id: 'ines' }, contextOf(db, 'desk')))?.contacts).toMatchObject([
      { name: 'Ada Okafor', relation: 'guardian', phone: '0155 010 0201', email: 'ada@example.org' }, { name: 'Bo Okafor', relation: 'guardian', phone: null, email: 'bo@example.org' },
      { name: 'Inés Okafor', relation: 'self', phone: null, email: 'ines@example.org' },
    ]);
    expect((await readStudent({ id: 'ines' }, greta(db)))?.contacts).toBeNull();
  });
});
