import type { Knex } from 'knex';
import { describe, expect, it } from 'vitest';
import { rebuildStudentRungs } from '@/db/ladder-standing';
import { liveEdition } from '@/db/ladders';
import { enterReview } from '@/db/practice';
import { transaction } from '@/db/transaction';
import { credited, ladderHouse } from '@/tests/factories/ladder-house';
import { contextOf, NOW } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { addDays } from '@/lib/time';
import { asksOf } from '../asks';
import { firstReview } from '../review';
import { finishPractice } from './finish-practice';
import { practiceForStaff } from './practice-for-staff';
import { itHurts } from './it-hurts';
import { practiceToday, type PracticePiece } from './practice-today';
import { setPractice } from './set-practice';


const DAY = 86_400;
const ines = (db: Knex, now = NOW) => contextOf(db, 'student', { personId: 'ines', studentIds: ['ines'], now });
const greta = (db: Knex, now = NOW) => contextOf(db, 'teacher', { personId: 'greta', taughtStudentIds: ['ines'], now });

async function house() {
  const db = freshDb();
  const { rungId } = await ladderHouse(db);
  await credited(db, 'ines', ['1.1', '1.2', '1.3', '1.4', '1.5', '2.1'].map(rungId));
  await transaction(db, async (trx) => {
    await rebuildStudentRungs(trx, 'ines', (await liveEdition(trx))?.id ?? '');
    for (const code of ['1.2', '2.1']) await enterReview(trx, { ...firstReview('2026-11-16'), id: `card-${code}`, studentId: 'ines', rungId: rungId(code) });
  });
  return { db, rungId };
}

const playedRight = ({ rung }: PracticePiece) => (rung?.keys ?? []).map((drawn) => ({ chords: asksOf(rung?.spec ?? { how: 'voicing', turns: [] }, drawn).map((ask) => ({ played: ask.shown.notes.map(({ key }) => key), byEar: null })) }));
const finishing = (over: Partial<Parameters<typeof finishPractice>[0]>) => ({ studentId: 'ines', kind: 'review' as const, itemId: 'card-1.2', minutes: 6, how: 'timed' as const, feeling: null, note: '', played: [], ...over });

async function review(db: Knex, itemId: string) {
  const found = (await practiceToday({ studentId: 'ines' }, ines(db)))?.pieces.find(({ id }) => id === itemId);
  if (!found) throw new Error(`no ${itemId}`);
  return found;
}

describe('today', () => {
  it('brings back what is due and offers the next rung to try ahead', async () => {
    const { db, rungId } = await house();
    const today = await practiceToday({ studentId: 'ines' }, ines(db));
    expect(today?.pieces.map(({ kind, rung }) => [kind, rung?.code])).toEqual([['review', '1.2'], ['review', '2.1'], ['ahead', '2.2']]);
    expect(today?.pieces.map(({ rung }) => rung?.keys.length)).toEqual([3, 3, 4]);
    expect(today).toMatchObject({ minutesToday: 0, breakMinutes: 25, setBy: null });
    expect(today?.days).toHaveLength(14);
    expect(rungId('2.2')).toBe(today?.pieces[2]?.id);
  });
  it('asks the same keys all day, and others another day', async () => {
    const { db } = await house();
    const keys = async (now: number) => (await practiceToday({ studentId: 'ines' }, ines(db, now)))?.pieces.map(({ rung }) => rung?.keys);
    expect(await keys(NOW)).toEqual(await keys(NOW + 3600));
    expect(await keys(NOW)).not.toEqual(await keys(NOW + DAY));
  });
  it('is read by the student, the guardian who sees progress and the teacher; by nobody else', async () => {
    const { db } = await house();
    await expect(practiceToday({ studentId: 'ines' }, contextOf(db, 'guardian', { studentIds: ['ines'] }))).resolves.not.toBeNull();
    for (const stranger of [contextOf(db, 'student', { personId: 'theo', studentIds: ['theo'] }), contextOf(db, 'desk'), contextOf(db, 'teacher', { personId: 'otto' })]) {
      await expect(practiceToday({ studentId: 'ines' }, stranger)).rejects.toMatchObject({ code: 'not_found' });
    }
  });
});

describe('a review', () => {
  it('played right goes one box up, from the day it was done', async () => {
    const { db } = await house();
    const done = await finishPractice(finishing({ played: playedRight(await review(db, 'card-1.2')) }), ines(db));
    expect(done).toEqual({ minutes: 6, isGood: true, nextDueOn: addDays('2026-11-17', 3) });
    expect(await db('review_card').where({ id: 'card-1.2' })).toMatchObject([{ box: 2, failuresInRow: 0 }]);
    expect(await db('review_done')).toMatchObject([{ isGood: 1, doneOn: '2026-11-17' }]);
    await expect(finishPractice(finishing({}), ines(db))).rejects.toMatchObject({ code: 'conflict' });
  });
  it('is judged here, whatever the screen thought: one wrong key, one missing, nothing at all', async () => {
    const { db } = await house();
    const right = playedRight(await review(db, 'card-1.2'));
    const wrong = right.map((key, at) => (at === 0 ? { chords: key.chords.map(({ played, byEar }) => ({ played: played.map((one) => one + 1), byEar })) } : key));
    expect((await finishPractice(finishing({ played: wrong }), ines(db))).isGood).toBe(false);
    expect((await finishPractice(finishing({ itemId: 'card-2.1', played: right.slice(0, 1) }), ines(db))).isGood).toBe(false);
    expect(await db('review_card').select('box', 'failuresInRow')).toEqual([{ box: 1, failuresInRow: 1 }, { box: 1, failuresInRow: 1 }]);
  });
  it('two failures in a row tell the teacher, and the rung stays passed', async () => {
    const { db } = await house();
    await db('enrolment').insert(await enrolmentRow(db));
    await finishPractice(finishing({}), ines(db));
    expect(await db('outbox').where({ topic: 'practice' })).toHaveLength(0);
    await finishPractice(finishing({}), ines(db, NOW + DAY));
    expect(await db('outbox').where({ topic: 'practice' }).select('recipientId', 'subject')).toEqual([{ recipientId: 'greta', subject: 'Inés: Shells 1-3-7 and 1-7-3 does not sit any more' }]);
    expect(await db('student_rung').where({ studentId: 'ines', state: 'credited' })).toHaveLength(6);
  });
  it('of somebody else is none', async () => {
    const { db } = await house();
    await expect(finishPractice(finishing({ studentId: 'theo' }), contextOf(db, 'student', { personId: 'theo', studentIds: ['theo'] }))).rejects.toMatchObject({ code: 'not_found' });
    await expect(finishPractice(finishing({}), contextOf(db, 'student', { personId: 'theo', studentIds: ['theo'] }))).rejects.toThrow();
  });
});

describe('what the teacher sets', () => {
  const item = { rungId: '', piece: '', keys: [], beatsPerMinute: null, minutes: 10, howRight: 'No key sticks out.' };
  it('stands first, in the keys that were named, and replaces the older set', async () => {
    const { db, rungId } = await house();
    await setPractice({ studentId: 'ines', dueOn: '2026-11-24', items: [{ ...item, piece: 'Scales, slowly' }] }, greta(db));
    await setPractice({ studentId: 'ines', dueOn: '2026-11-24', items: [{ ...item, rungId: rungId('2.2'), keys: ['Gb', 'B'] }, { ...item, piece: 'The left hand of the study' }] }, greta(db, NOW + 60));
    const today = await practiceToday({ studentId: 'ines' }, ines(db));
    expect(today).toMatchObject({ setBy: 'Greta Dahl', dueOn: '2026-11-24' });
    expect(today?.pieces.map(({ kind, text, rung }) => [kind, rung?.code ?? text])).toEqual([['set', '2.2'], ['set', 'The left hand of the study'], ['review', '1.2'], ['review', '2.1']]);
    const keys: string[] = (today?.pieces[0]?.rung?.keys ?? []).map(({ key }) => key);
    expect(new Set(keys)).toEqual(new Set(['Gb', 'B']));
    expect(await db('practice_set').orderBy('createdAt').select('state')).toEqual([{ state: 'replaced' }, { state: 'live' }]);
  });
  it('keeps the minutes with the item; practising ahead marks nothing', async () => {
    const { db } = await house();
    await setPractice({ studentId: 'ines', dueOn: '2026-11-24', items: [{ ...item, piece: 'Scales' }] }, greta(db));
    const set = (await practiceToday({ studentId: 'ines' }, ines(db)))?.pieces[0];
    await finishPractice(finishing({ kind: 'set', itemId: set?.id ?? '', minutes: 12, feeling: 'fine' }), ines(db));
    await finishPractice(finishing({ kind: 'ahead', itemId: 'any', minutes: 5 }), ines(db));
    expect((await practiceToday({ studentId: 'ines' }, ines(db)))?.minutesToday).toBe(17);
    expect(await db('hearing')).toHaveLength(0);
  });
  it('refuses a past day, a strange rung or key, a stranger and the student', async () => {
    const { db, rungId } = await house();
    const set = (over: object, context = greta(db)) => setPractice({ studentId: 'ines', dueOn: '2026-11-24', items: [{ ...item, rungId: rungId('1.2') }], ...over }, context);
    await expect(set({ dueOn: '2026-11-16' })).rejects.toMatchObject({ code: 'invalid' });
    await expect(set({ items: [{ ...item, rungId: 'nowhere' }] })).rejects.toMatchObject({ code: 'invalid' });
    await expect(set({ items: [{ ...item, rungId: rungId('1.2'), keys: ['Gb'] }] })).rejects.toThrow('not asked in Gb');
    await expect(set({}, contextOf(db, 'teacher', { personId: 'otto' }))).rejects.toMatchObject({ code: 'not_found' });
    await expect(set({}, ines(db))).rejects.toMatchObject({ code: 'forbidden' });
    expect(await db('practice_set')).toHaveLength(0);
  });
});

it('"this hurts" tells the teacher and the guardian who may know, and keeps the minutes', async () => {
  const { db } = await house();
  await db('enrolment').insert(await enrolmentRow(db));
  const { told } = await itHurts({ studentId: 'ines', minutes: 9, where: 'left wrist' }, ines(db));
  const mails: { recipientId: string; bodyText: string }[] = await db('outbox').where({ topic: 'practice_hurt' }).orderBy('recipientId').select('recipientId', 'bodyText');
  expect(told).toBe(mails.length);
  expect(mails.map(({ recipientId }) => recipientId)).toEqual(['ada', 'greta']);
  expect(mails[0]?.bodyText).toContain('left wrist');
  expect(await db('practice_log')).toMatchObject([{ minutes: 9, feeling: 'hard', note: 'Stopped: it hurt (left wrist).' }]);
});

describe('what the teacher sees of a student', () => {
  it('ladder, what is set, minutes, failed reviews and pain; the desk and strangers see none of it', async () => {
    const { db, rungId } = await house();
    await setPractice({ studentId: 'ines', dueOn: '2026-11-24', items: [{ rungId: rungId('2.2'), piece: '', keys: ['Gb'], beatsPerMinute: null, minutes: 10, howRight: '' }] }, greta(db));
    await finishPractice(finishing({}), ines(db));
    await finishPractice(finishing({}), ines(db, NOW + DAY));
    await itHurts({ studentId: 'ines', minutes: 3, where: '' }, ines(db, NOW + DAY));
    const seen = await practiceForStaff('ines', greta(db, NOW + DAY));
    expect(seen).toMatchObject({
      set: { by: 'Greta Dahl', dueOn: '2026-11-24', items: ['2.2 Six kinds of shell in twelve keys, Gb'] }, minutes: 15, weak: ['1.2 Shells 1-3-7 and 1-7-3'], hurts: [{ on: '2026-11-18', note: 'Stopped: it hurt.' }],
      nextRungId: rungId('2.2'), maySet: true,
    });
    expect((await practiceForStaff('ines', contextOf(db, 'owner')))?.maySet).toBe(false);
    for (const other of [contextOf(db, 'desk'), contextOf(db, 'guardian', { studentIds: ['ines'] }), contextOf(db, 'teacher', { personId: 'otto' })]) expect(await practiceForStaff('ines', other)).toBeNull();
  });
});

/** Greta teaches Inés; she has an address, so that mails to her can leave. */
async function enrolmentRow(db: Knex) {
  await db('contact_point').insert({ id: 'c-greta', personId: 'greta', kind: 'email', value: 'greta@example.org' });
  await db('legal_entity').insert({ id: 'entity', name: 'Saltmarsh', country: 'IE', currency: 'EUR' });
  await db('site').insert({ id: 'quay', name: 'Quay Street', zone: 'Europe/Dublin', legalEntityId: 'entity' });
  await db('family').insert({ id: 'okafor', name: 'Okafor', legalEntityId: 'entity', currency: 'EUR' });
  await db('lesson_type').insert({ id: 'single', code: 'single', label: 'Lesson' });
  return { id: 'e1', studentId: 'ines', familyId: 'okafor', subjectId: 'keyboard', lessonTypeId: 'single', lengthMinutes: 45, teacherId: 'greta', siteId: 'quay', tuitionModel: 'per_term_count', startsOn: '2026-09-07', state: 'active' };
}
