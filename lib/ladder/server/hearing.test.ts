import type { Knex } from 'knex';
import { describe, expect, it } from 'vitest';
import { countHeard, findHearing, keyRecords, proofsOf } from '@/db/hearings';
import { findRung } from '@/db/ladders';
import { rebuildStudentRungs } from '@/db/ladder-standing';
import { firstBrokenAuditRow } from '@/db/audit';
import { transaction } from '@/db/transaction';
import { credited, ladderHouse } from '@/tests/factories/ladder-house';
import { playKey } from '@/tests/factories/played-key';
import { contextOf, NOW } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { asksOf } from '../asks';
import { agreeHearing } from './agree-hearing';
import { decideHearing, stopHearing } from './decide-hearing';
import { installLadder } from './install-ladder';
import { recordProof } from './record-proof';
import { startHearing } from './start-hearing';

const DAY = 86_400;
const greta = (db: Knex, now = NOW) => contextOf(db, 'teacher', { personId: 'greta', taughtStudentIds: ['ines', 'theo'], now });
const otto = (db: Knex) => contextOf(db, 'teacher', { personId: 'otto', taughtStudentIds: ['somebody'] });
const lead = (db: Knex, now = NOW) => contextOf(db, 'teacher', { personId: 'leif', isLead: true, now });

async function house() {
  const db = freshDb();
  const { rungId } = await ladderHouse(db);
  return { db, rungId };
}
const BELOW_FOUR = ['1.1', '1.2', '1.3', '1.4', '1.5', '2.1', '2.2', '2.3'];

async function onLevelFour() {
  const { db, rungId } = await house();
  await credited(db, 'ines', BELOW_FOUR.map(rungId));
  return { db, rungId };
}

type Deciding = Parameters<typeof decideHearing>[0];
const decision = (over: Pick<Deciding, 'hearingId' | 'outcome'> & Partial<Deciding>): Deciding => ({ passReason: '', notePublic: '', notePrivate: '', marks: [], ...over });

const play = (db: Knex, hearingId: string, drawnNo: number, change?: (keys: number[]) => number[]) => playKey(greta(db), hearingId, drawnNo, change);

describe('install', () => {
  it('lays ten levels and 37 rungs once', async () => {
    const { db } = await house();
    const again = await installLadder({}, contextOf(db, 'owner', { personId: 'leif' }));
    expect(again.isNew).toBe(false);
    expect(await db('level')).toHaveLength(10);
    expect(await db('rung_text')).toHaveLength(37);
    expect(await db('ladder_edition')).toMatchObject([{ state: 'live' }]);
  });
  it('is the owner\'s business', async () => {
    const { db } = await house();
    await expect(installLadder({}, greta(db))).rejects.toMatchObject({ code: 'forbidden' });
  });
  it('keeps a live edition as it was printed, and one live at a time', async () => {
    const { db } = await house();
    const [edition]: { id: string; ladderId: string }[] = await db('ladder_edition');
    await expect(db('rung_text').update({ title: 'Other' })).rejects.toThrow('edition_fixed');
    await expect(db('rung_text').delete()).rejects.toThrow('edition_fixed');
    await expect(db('ladder_edition').insert({ id: 'second', ladderId: edition?.ladderId, label: 'Second', state: 'live', startsOn: '2027-01-01' })).rejects.toThrow('UNIQUE');
  });
});

describe('start', () => {
  it('draws the keys with a stored seed and joins the ladder', async () => {
    const { db, rungId } = await onLevelFour();
    const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db));
    const hearing = await findHearing(db, hearingId);
    expect(hearing).toMatchObject({ state: 'keys_drawn', assessorId: 'greta', termId: 'autumn', startedOn: '2026-11-17' });
    expect(hearing?.drawn).toHaveLength(12);
    expect(hearing?.seed).toBeTypeOf('number');
    expect(await db('student_ladder')).toMatchObject([{ studentId: 'ines', sinceOn: '2026-11-17' }]);
    expect(await db('student_rung').where({ rungId: rungId('4.2') })).toMatchObject([{ state: 'working', hearingId }]);
  });
  it('takes up the one under way instead of a second', async () => {
    const { db, rungId } = await onLevelFour();
    const first = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db));
    expect(await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db))).toEqual(first);
    await expect(startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, lead(db))).rejects.toMatchObject({ code: 'conflict', message: 'Greta Dahl is hearing this rung already.' });
    expect(await db('hearing')).toHaveLength(1);
  });
  it('a stranger\'s student and a missing one answer alike', async () => {
    const { db, rungId } = await onLevelFour();
    const foreign = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, otto(db)).catch((error: unknown) => error);
    const missing = await startHearing({ studentId: 'nobody', rungId: rungId('4.2'), leadReason: '' }, otto(db)).catch((error: unknown) => error);
    expect(foreign).toMatchObject({ code: 'not_found', message: 'This hearing was not found.' });
    expect(missing).toMatchObject({ code: 'not_found', message: 'This hearing was not found.' });
  });
  it.each(['guardian', 'student', 'desk', 'owner'] as const)('is not for a %s', async (role) => {
    const { db, rungId } = await onLevelFour();
    const context = contextOf(db, role, { personId: 'ada', studentIds: ['ines'] });
    await expect(startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, context)).rejects.toThrow();
    expect(await db('hearing')).toHaveLength(0);
  });
  it('refuses a level beyond the teacher\'s qualification, in words and in the table itself', async () => {
    const { db, rungId } = await house();
    await expect(startHearing({ studentId: 'ines', rungId: rungId('5.1'), leadReason: '' }, greta(db))).rejects.toMatchObject({ code: 'forbidden', message: expect.stringContaining('level 5') as string });
    const [edition]: { id: string }[] = await db('ladder_edition');
    await expect(db('hearing').insert({ id: 'h', studentId: 'ines', rungId: rungId('5.1'), editionId: edition?.id, assessorId: 'greta', startedOn: '2026-11-17', createdAt: NOW })).rejects.toThrow('assessor_not_qualified');
  });
  it('names what must come first; the lead may agree with a reason', async () => {
    const { db, rungId } = await house();
    await credited(db, 'ines', BELOW_FOUR.slice(0, -1).map(rungId));
    const starting = { studentId: 'ines', rungId: rungId('4.1') };
    await expect(startHearing({ ...starting, leadReason: 'I say so' }, greta(db))).rejects.toMatchObject({ code: 'conflict', message: expect.stringContaining('First comes: Shells shuffled.') as string });
    await expect(startHearing({ ...starting, leadReason: '' }, lead(db))).rejects.toMatchObject({ code: 'conflict' });
    await expect(startHearing({ ...starting, leadReason: 'Plays it every week.' }, lead(db))).resolves.toBeDefined();
  });
  it('an agreement of the lead serves once', async () => {
    const { db, rungId } = await house();
    await expect(agreeHearing({ studentId: 'ines', rungId: rungId('2.1'), reason: 'Placed late' }, greta(db))).rejects.toMatchObject({ code: 'forbidden' });
    await agreeHearing({ studentId: 'ines', rungId: rungId('2.1'), reason: 'Placed late' }, lead(db));
    const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('2.1'), leadReason: '' }, greta(db));
    expect(await db('hearing_agreement')).toMatchObject([{ usedByHearingId: hearingId }]);
    await stopHearing({ hearingId, reason: 'Unwell' }, greta(db));
    await expect(startHearing({ studentId: 'ines', rungId: rungId('2.1'), leadReason: '' }, greta(db))).rejects.toMatchObject({ code: 'conflict' });
  });
});

describe('proof', () => {
  it('is judged on the server and kept with every try; the last try counts', async () => {
    const { db, rungId } = await onLevelFour();
    const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db));
    const wrong = await play(db, hearingId, 0, (keys) => keys.slice(0, -1));
    expect(wrong).toMatchObject({ isHeard: false, keysHeard: 0, tryNo: 1 });
    expect(wrong.heard[0]?.verdict).toMatchObject({ kind: 'missing', missing: ['5'] });
    expect(await play(db, hearingId, 0)).toMatchObject({ isHeard: true, keysHeard: 1, tryNo: 2 });
    expect(await findHearing(db, hearingId)).toMatchObject({ state: 'played' });
    expect((await proofsOf(db, hearingId)).map(({ tryNo, isHeard, judgeVersion }) => [tryNo, isHeard, judgeVersion])).toEqual([[1, false, 1], [2, true, 1]]);
  });
  it('right but too late does not count', async () => {
    const { db, rungId } = await onLevelFour();
    const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db));
    const hearing = await findHearing(db, hearingId);
    const rung = hearing && (await findRung(db, hearing.editionId, hearing.rungId));
    const [ask] = rung && hearing?.drawn[0] ? asksOf(rung.spec, hearing.drawn[0]) : [];
    const late = await recordProof({ hearingId, drawnNo: 0, source: 'midi', heard: [{ played: ask?.shown.notes.map(({ key }) => key) ?? [], milliseconds: 5001, byEar: null }] }, greta(db));
    expect(late).toMatchObject({ isHeard: false });
    expect(late.heard[0]?.verdict?.isRight).toBe(true);
  });
  it('a spoken rung takes the teacher\'s word', async () => {
    const { db, rungId } = await house();
    const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('1.1'), leadReason: '' }, greta(db));
    const told = { hearingId, drawnNo: 0, source: 'ear' as const };
    expect(await recordProof({ ...told, heard: [{ played: [], milliseconds: null, byEar: 'right' }] }, greta(db))).toMatchObject({ isHeard: true });
    await expect(recordProof({ ...told, source: 'midi', heard: [{ played: [60], milliseconds: 10, byEar: null }] }, greta(db))).rejects.toThrow('told, not played');
  });
  it('refuses keys that were not drawn, more chords than asked, and somebody else\'s hearing', async () => {
    const { db, rungId } = await onLevelFour();
    const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db));
    const one = { played: [60], milliseconds: 100, byEar: null };
    await expect(recordProof({ hearingId, drawnNo: 12, source: 'midi', heard: [one] }, greta(db))).rejects.toThrow('not drawn');
    await expect(recordProof({ hearingId, drawnNo: 0, source: 'midi', heard: [one, one] }, greta(db))).rejects.toThrow('More chords');
    await expect(recordProof({ hearingId, drawnNo: 0, source: 'midi', heard: [one] }, otto(db))).rejects.toMatchObject({ code: 'not_found' });
    await expect(recordProof({ hearingId: 'none', drawnNo: 0, source: 'midi', heard: [one] }, greta(db))).rejects.toMatchObject({ code: 'not_found' });
    await expect(db('proof').insert({ id: 'p', hearingId: 'none', drawnNo: 0, heardJson: '[{}]', isHeard: 1, source: 'midi', judgeVersion: 1, at: NOW })).rejects.toThrow('hearing_not_open');
  });
});

async function heardTen() {
  const { db, rungId } = await onLevelFour();
  const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db));
  for (let drawnNo = 0; drawnNo < 10; drawnNo += 1) await play(db, hearingId, drawnNo);
  return { db, rungId, hearingId };
}

describe('heard by ear at a piano without MIDI', () => {
  it('counts, says so in the proof, and a pass then needs words', async () => {
    const { db, rungId } = await onLevelFour();
    const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db));
    const heard = [{ played: [], milliseconds: null, byEar: 'right' as const }];
    for (let drawnNo = 0; drawnNo < 10; drawnNo += 1) await recordProof({ hearingId, drawnNo, source: 'ear', heard }, greta(db));
    await expect(recordProof({ hearingId, drawnNo: 10, source: 'midi', heard }, greta(db))).rejects.toThrow('cannot be overruled');
    expect((await proofsOf(db, hearingId))[0]).toMatchObject({ source: 'ear', heard: [{ byEar: 'right', verdict: null }] });
    await expect(decideHearing(decision({ hearingId, outcome: 'passed' }), greta(db))).rejects.toMatchObject({ message: expect.stringContaining('10 keys were heard by ear') as string });
    await expect(decideHearing(decision({ hearingId, outcome: 'passed', passReason: 'At the grand in the hall, all ten clean.' }), greta(db))).resolves.toMatchObject({ keysHeard: 10 });
  });
});

describe('decide', () => {
  it('passes when enough keys were heard, tells the guardian who sees progress, and opens what follows', async () => {
    const { db, rungId, hearingId } = await heardTen();
    const decided = await decideHearing(decision({ hearingId, outcome: 'passed', notePublic: 'Lovely even touch.' }), greta(db));
    expect(decided).toEqual({ outcome: 'passed', keysHeard: 10, earliestAgainOn: null, told: 1 });
    expect(await db('student_rung').where({ rungId: rungId('4.2') })).toMatchObject([{ state: 'passed', sinceOn: '2026-11-17', hearingId }]);
    const mails: { toAddress: string; bodyText: string; subject: string }[] = await db('outbox').where({ topic: 'rung_passed' });
    expect(mails.map(({ toAddress }) => toAddress)).toEqual(['ada@example.org']);
    expect(mails[0]?.subject).toBe('Inés passed a rung: The minor chord built of fourths');
    expect(mails[0]?.bodyText).toContain('Inés can now play a wide minor chord built of fourths in all twelve keys.');
    expect(mails[0]?.bodyText).toContain('Lovely even touch.');
    expect(await firstBrokenAuditRow(db)).toBeNull();
    expect(await db('audit').where({ action: 'decide' })).toMatchObject([{ sentence: 'Inés Okafor, 4.2 Minor fourth stack: passed, 10 of 12 keys heard.' }]);
  });
  it('a grown student is told directly', async () => {
    const { db, rungId } = await house();
    await credited(db, 'theo', BELOW_FOUR.map(rungId));
    const { hearingId } = await startHearing({ studentId: 'theo', rungId: rungId('4.1'), leadReason: '' }, greta(db));
    await decideHearing(decision({ hearingId, outcome: 'passed', passReason: 'Played it at the recital.' }), greta(db));
    expect(await db('outbox').where({ topic: 'rung_passed' })).toMatchObject([{ toAddress: 'theo@example.org', subject: 'You passed a rung: The full major ninth chord' }]);
  });
  it('fewer keys need a reason in words', async () => {
    const { db, rungId } = await onLevelFour();
    const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db));
    await play(db, hearingId, 0);
    await expect(decideHearing(decision({ hearingId, outcome: 'passed' }), greta(db))).rejects.toMatchObject({ code: 'invalid', fields: { passReason: [expect.stringContaining('1 of the 10 keys')] } });
    await expect(decideHearing(decision({ hearingId, outcome: 'passed', passReason: 'The other keys were heard on Friday.' }), greta(db))).resolves.toMatchObject({ keysHeard: 1 });
  });
  it('not yet needs a note, sets the waiting days, tells nobody by mail', async () => {
    const { db, rungId, hearingId } = await heardTen();
    await expect(decideHearing(decision({ hearingId, outcome: 'not_yet' }), greta(db))).rejects.toMatchObject({ fields: { notePublic: ['What comes next?'] } });
    const decided = await decideHearing(decision({ hearingId, outcome: 'not_yet', notePublic: 'E flat and A flat once more.' }), greta(db));
    expect(decided).toMatchObject({ earliestAgainOn: '2026-11-24', told: 0 });
    expect(await db('student_rung').where({ rungId: rungId('4.2') })).toMatchObject([{ state: 'working' }]);
    expect(await db('outbox')).toHaveLength(0);
    const again = (now: number) => startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db, now));
    await expect(again(NOW + 6 * DAY)).rejects.toMatchObject({ message: expect.stringContaining('Tue 24 Nov') as string });
    await expect(again(NOW + 7 * DAY)).resolves.toBeDefined();
  });
  it('the third attempt in a term needs the lead (S33)', async () => {
    const { db, rungId } = await onLevelFour();
    for (const day of [0, 7]) {
      const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db, NOW + day * DAY));
      await decideHearing(decision({ hearingId, outcome: 'not_yet', notePublic: 'Again.' }), greta(db, NOW + day * DAY));
    }
    const third = { studentId: 'ines', rungId: rungId('4.2') };
    await expect(startHearing({ ...third, leadReason: '' }, greta(db, NOW + 14 * DAY))).rejects.toMatchObject({ message: expect.stringContaining('2 times this term') as string });
    await expect(startHearing({ ...third, leadReason: 'Ready now.' }, lead(db, NOW + 14 * DAY))).resolves.toBeDefined();
  });
  it('marks: 4, 4, 1 is below the line without a reason (S33)', async () => {
    const { db, hearingId } = await heardTen();
    const marks = [{ criterion: 'Notes', weightPercent: 50, score: 4 }, { criterion: 'Time', weightPercent: 30, score: 4 }, { criterion: 'Tone', weightPercent: 20, score: 1 }];
    await expect(decideHearing(decision({ hearingId, outcome: 'passed', marks }), greta(db))).rejects.toMatchObject({ code: 'invalid' });
    await decideHearing(decision({ hearingId, outcome: 'passed', marks, passReason: 'A cold; tone was fine last week.' }), greta(db));
    expect(await findHearing(db, hearingId)).toMatchObject({ totalHundredths: 340, outcome: 'passed' });
  });
  it('is for good: no second decision, no edit, no new proof', async () => {
    const { db, hearingId } = await heardTen();
    await decideHearing(decision({ hearingId, outcome: 'passed' }), greta(db));
    await expect(decideHearing(decision({ hearingId, outcome: 'not_yet', notePublic: 'No.' }), greta(db))).rejects.toMatchObject({ code: 'conflict' });
    await expect(play(db, hearingId, 11)).rejects.toMatchObject({ code: 'conflict' });
    await expect(db('hearing').where({ id: hearingId }).update({ notePublic: 'Changed' })).rejects.toThrow('hearing_fixed');
    await expect(db('hearing').where({ id: hearingId }).delete()).rejects.toThrow();
    await expect(db('proof').where({ hearingId }).update({ isHeard: 0 })).rejects.toThrow('proof_fixed');
    await expect(db('proof').where({ hearingId }).delete()).rejects.toThrow('proof_fixed');
    expect(countHeard(await proofsOf(db, hearingId))).toBe(10);
  });
  it('a passed rung is not heard again unless a re-check is due', async () => {
    const { db, rungId, hearingId } = await heardTen();
    await decideHearing(decision({ hearingId, outcome: 'passed' }), greta(db));
    const again = { studentId: 'ines', rungId: rungId('4.2'), leadReason: '' };
    await expect(startHearing(again, greta(db, NOW + DAY))).rejects.toThrow('passed already');
    await db('recheck_request').insert({ id: 'r', studentId: 'ines', rungId: rungId('4.2'), reasonPrivate: 'Standards meeting', byId: 'leif', askedOn: '2026-11-18', at: NOW + DAY });
    await expect(startHearing(again, greta(db, NOW + 2 * DAY))).resolves.toBeDefined();
  });
  it('a colleague may not decide it', async () => {
    const { db, hearingId } = await heardTen();
    await expect(decideHearing(decision({ hearingId, outcome: 'passed' }), otto(db))).rejects.toMatchObject({ code: 'not_found' });
    await expect(decideHearing(decision({ hearingId, outcome: 'passed' }), lead(db))).rejects.toMatchObject({ code: 'forbidden' });
  });
});

it('stopped counts as no attempt and frees the rung', async () => {
  const { db, rungId } = await onLevelFour();
  const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db));
  await stopHearing({ hearingId, reason: 'Felt unwell' }, greta(db));
  expect(await db('student_rung').where({ rungId: rungId('4.2') })).toMatchObject([{ state: 'open' }]);
  await expect(startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db))).resolves.not.toEqual({ hearingId });
});

it('weak keys are remembered for the next draw', async () => {
  const { db, rungId } = await onLevelFour();
  const { hearingId } = await startHearing({ studentId: 'ines', rungId: rungId('4.2'), leadReason: '' }, greta(db));
  await play(db, hearingId, 0, () => [60]);
  await play(db, hearingId, 1);
  const records = await keyRecords(db, 'ines', rungId('4.2'));
  expect(records.map(({ asked, wrong }) => [asked, wrong])).toEqual([[1, 1], [1, 0]]);
});

it('rebuilding student_rung gives the same rows (invariant 19)', async () => {
  const { db, rungId, hearingId } = await heardTen();
  await decideHearing(decision({ hearingId, outcome: 'passed' }), greta(db));
  const before: unknown[] = await db('student_rung').orderBy('rungId');
  expect(before).toHaveLength(37);
  const [edition]: { id: string }[] = await db('ladder_edition');
  await db('student_rung').delete();
  await transaction(db, (trx) => rebuildStudentRungs(trx, 'ines', edition?.id ?? ''));
  expect(await db('student_rung').orderBy('rungId')).toEqual(before);
  expect(await db('student_rung').where({ rungId: rungId('5.1') })).toMatchObject([{ state: 'locked' }]);
});
