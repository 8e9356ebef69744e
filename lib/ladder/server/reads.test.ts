import type { Knex } from 'knex';
import { describe, expect, it } from 'vitest';
import { credited, ladderHouse } from '@/tests/factories/ladder-house';
import { contextOf, NOW } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { decideHearing } from './decide-hearing';
import { hearingScreen } from './hearing-screen';
import { ladderOfStudent } from './ladder-of-student';
import { progressOfStudent } from './progress-of-student';
import { schoolLadder } from './school-ladder';
import { startHearing } from './start-hearing';

const greta = (db: Knex, now = NOW) => contextOf(db, 'teacher', { personId: 'greta', taughtStudentIds: ['ines'], now });
const BELOW_FOUR = ['1.1', '1.2', '1.3', '1.4', '1.5', '2.1', '2.2', '2.3'];

async function house() {
  const db = freshDb();
  const { rungId } = await ladderHouse(db);
  await credited(db, 'ines', BELOW_FOUR.map(rungId));
  return { db, rungId };
}

async function passed(db: Knex, rungId: string, now: number) {
  const { hearingId } = await startHearing({ studentId: 'ines', rungId, leadReason: '' }, greta(db, now));
  await decideHearing({ hearingId, outcome: 'passed', passReason: 'Heard in the lesson.', notePublic: 'Well done.', notePrivate: 'Wrists were tense.', marks: [] }, greta(db, now));
}

describe('ladder of a student', () => {
  it('is the same for teacher, guardian and student, from the bottom up', async () => {
    const { db } = await house();
    const seen = await ladderOfStudent('ines', greta(db));
    expect(await ladderOfStudent('ines', contextOf(db, 'guardian', { personId: 'ada', studentIds: ['ines'] }))).toEqual(seen);
    expect(await ladderOfStudent('ines', contextOf(db, 'student', { personId: 'ines', studentIds: ['ines'] }))).toEqual(seen);
    expect(seen).toMatchObject({ passedCount: 8, rungCount: 37, student: { name: 'Inés Okafor', firstName: 'Inés' } });
    expect(seen?.levels).toHaveLength(10);
    expect(seen?.levels[3]?.rungs.map(({ state }) => state)).toEqual(['open', 'open', 'open', 'locked']);
    expect(seen?.levels[3]?.rungs[3]?.missing).toHaveLength(3);
  });
  it.each([['guardian', { personId: 'x', studentIds: ['other'] }], ['student', { personId: 'theo', studentIds: ['theo'] }], ['teacher', { personId: 'otto', taughtStudentIds: [] }]] as const)(
    'is "not found" for a foreign %s, as for a student who does not exist', async (role, over) => {
      const { db } = await house();
      await expect(ladderOfStudent('ines', contextOf(db, role, over))).rejects.toMatchObject({ code: 'not_found', message: 'This progress was not found.' });
      await expect(ladderOfStudent('nobody', contextOf(db, role, over))).rejects.toMatchObject({ code: 'not_found', message: 'This progress was not found.' });
    });
  it('is nothing while the school has no ladder', async () => {
    const db = freshDb();
    await db('person').insert({ id: 'ines', givenName: 'Ines', isStudent: 1 });
    expect(await ladderOfStudent('ines', contextOf(db, 'owner'))).toBeNull();
  });
});

describe('hearing screen', () => {
  it('opens on the nearest rung, and on the one under way', async () => {
    const { db, rungId } = await house();
    expect((await hearingScreen({ studentId: 'ines' }, greta(db)))?.rung?.code).toBe('3.1');
    await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db));
    const screen = await hearingScreen({ studentId: 'ines' }, greta(db));
    expect(screen).toMatchObject({ rung: { code: '4.2', keysNeeded: 10 }, may: { hear: true, agree: false, isQualified: true }, underWay: { isOwn: true } });
    expect(screen?.underWay?.drawn).toHaveLength(12);
  });
  it('says what stands against a rung before anybody presses', async () => {
    const { db, rungId } = await house();
    expect(await hearingScreen({ studentId: 'ines', rungId: rungId('4.4') }, greta(db))).toMatchObject({ problems: [{ kind: 'needs' }], rung: { code: '4.4' } });
    expect(await hearingScreen({ studentId: 'ines', rungId: rungId('6.1') }, greta(db))).toMatchObject({ may: { isQualified: false } });
  });
  it('is not found for a teacher of others', async () => {
    const { db } = await house();
    await expect(hearingScreen({ studentId: 'ines' }, contextOf(db, 'teacher', { personId: 'otto' }))).rejects.toMatchObject({ code: 'not_found' });
    await expect(hearingScreen({ studentId: 'nobody' }, contextOf(db, 'teacher', { personId: 'otto' }))).rejects.toMatchObject({ code: 'not_found' });
  });
});

describe('progress in plain words', () => {
  it('gives no date before three gaps, and never a note for staff', async () => {
    const { db, rungId } = await house();
    await passed(db, rungId('4.1'), NOW);
    const progress = await progressOfStudent('ines', contextOf(db, 'guardian', { personId: 'ada', studentIds: ['ines'] }));
    expect(progress?.words).toMatchObject({ now: 'Inés can now play a full major ninth chord in all twelve keys.', when: null, count: '9 of 37 rungs passed.' });
    expect(progress?.hearings).toMatchObject([{ plainTitle: 'The full major ninth chord', outcome: 'passed', note: 'Well done.' }]);
    expect(JSON.stringify(progress)).not.toContain('tense');
  });
  it('projects from four passes', async () => {
    const { db, rungId } = await house();
    const day = 86_400;
    for (const [at, code] of ['4.1', '4.2', '4.3', '3.1'].entries()) await passed(db, rungId(code), NOW - (21 - 7 * at) * day);
    const progress = await progressOfStudent('ines', contextOf(db, 'student', { personId: 'ines', studentIds: ['ines'] }));
    expect(progress?.words.when).toBe('At this pace it should follow around 24 Nov.');
    expect(progress?.words.now).toContain('You can now');
  });
});

describe('school ladder', () => {
  it('counts without names', async () => {
    const { db, rungId } = await house();
    await passed(db, rungId('4.1'), NOW);
    const ladder = await schoolLadder(greta(db));
    const rung = ladder?.levels[3]?.rungs[0];
    expect(rung).toMatchObject({ code: '4.1', passed: 1, working: 0, needs: [{ title: '2.3 Shells shuffled', kind: 'must' }] });
    expect(JSON.stringify(ladder)).not.toMatch(/Okafor|ines/);
  });
  it('offers the owner to install one while there is none', async () => {
    const db = freshDb();
    expect(await schoolLadder(contextOf(db, 'owner'))).toBeNull();
  });
});

describe('a published report (invariant 5)', () => {
  it('is for good, except that the family may say it was read, once', async () => {
    const { db } = await house();
    const [edition]: { id: string }[] = await db('ladder_edition');
    await db('term_report').insert({ id: 'report', studentId: 'ines', termId: 'autumn', editionId: edition?.id, authorId: 'greta' });
    await db('report_section').insert({ id: 'words', termReportId: 'report', kind: 'teacher', text: 'A lovely term.' });
    await db('term_report').where({ id: 'report' }).update({ state: 'published', approverId: 'leif', publishedAt: NOW });
    await expect(db('term_report').where({ id: 'report' }).update({ factsJson: '{"more":1}' })).rejects.toThrow('report_fixed');
    await expect(db('term_report').where({ id: 'report' }).delete()).rejects.toThrow();
    await expect(db('report_section').where({ id: 'words' }).update({ text: 'Other' })).rejects.toThrow('report_fixed');
    await expect(db('report_section').insert({ id: 'more', termReportId: 'report', kind: 'at_home', text: 'More' })).rejects.toThrow('report_fixed');
    await db('term_report').where({ id: 'report' }).update({ acknowledgedAt: NOW + 60 });
    await expect(db('term_report').where({ id: 'report' }).update({ acknowledgedAt: NOW + 120 })).rejects.toThrow('report_fixed');
  });
});
