import type { Knex } from 'knex';
import { beforeEach, describe, expect, it } from 'vitest';
import { lanternMoney, enrolled } from '@/tests/factories/lantern-money';
import { lanternStreet } from '@/tests/factories/lantern-street';
import { contextOf } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import type { Context } from '@/lib/server/context';
import { weekdayCounts } from '../term';
import { addClosureSchema, addTermSchema } from '../term-schema';
import { addClosure } from './add-closure';
import { addTerm } from './add-term';
import { readTerms } from './read-terms';
import { takeClosureAway } from './take-closure-away';

let db: Knex;
let owner: Context;
beforeEach(async () => {
  db = freshDb();
  await lanternStreet(db);
  owner = contextOf(db, 'owner', { personId: 'ruth', school: { locale: 'en-IE' } });
});
const close = (over: Partial<Parameters<typeof addClosure>[0]>) => addClosure({ from: '2026-10-06', until: over.from ?? '2026-10-06', siteId: '', reason: 'Staff day', fromTime: '', toTime: '', ...over }, owner);
const closedDays = async () => (await readTerms(owner)).closures.map(({ closedOn }) => closedOn);

describe('adding a term', () => {
  it('a school without terms gets one, with its school year and a line in the audit', async () => {
    await db('closure').delete();
    await db('term').delete();
    await addTerm({ name: 'Herbst é 漢', startsOn: '2026-11-01', endsOn: '2026-12-19' }, owner);
    expect((await readTerms(owner)).terms).toMatchObject([{ name: 'Herbst é 漢', yearLabel: '2026/27', startsOn: '2026-11-01', endsOn: '2026-12-19', state: 'published' }]);
    expect(await db('audit').orderBy('seq', 'desc').first('sentence')).toEqual({ sentence: 'Added the term Herbst é 漢 2026/27, 1 November 2026 to 19 December 2026.' });
  });
  it.each([['2026-12-19', '2027-01-05', 'Autumn', 'startsOn'], ['2026-12-20', '2027-01-11', 'Winter', 'endsOn'], ['2026-08-01', '2027-07-20', 'Autumn', 'endsOn']])('from %s to %s it would share a day with %s', async (startsOn, endsOn, other, field) => {
    const refused = addTerm({ name: 'New', startsOn, endsOn }, owner);
    await expect(refused).rejects.toMatchObject({ code: 'conflict', message: expect.stringContaining(`Two terms cannot share a day: ${other} 2026/27 runs from`) as string, fields: { [field]: [expect.any(String)] } });
    expect(await db('term').where({ name: 'New' })).toEqual([]);
    expect(await db('audit')).toEqual([]);
  });
  it('between two terms there is room to the day', async () => {
    await addTerm({ name: 'Between', startsOn: '2026-12-20', endsOn: '2027-01-10' }, owner);
    expect(await db('term').where({ name: 'Between' })).toHaveLength(1);
  });
  it('the same name twice in a school year is said on its field', async () => {
    await expect(addTerm({ name: 'Autumn', startsOn: '2027-07-01', endsOn: '2027-07-20' }, owner)).rejects.toMatchObject({ fields: { name: ['The school year 2026/27 has a term of this name already.'] } });
  });
  it.each([['2026-02-30', '2026-03-30'], ['2026-03-30', '2026-03-30'], ['2026-03-30', '2026-03-01'], ['2026-03-30', '2037-03-01']])('%s to %s is no term', (startsOn, endsOn) => {
    expect(addTermSchema.safeParse({ name: 'X', startsOn, endsOn }).success).toBe(false);
  });
});

describe('closing days', () => {
  it('a span is closed day by day, and the weekday counts follow', async () => {
    const before = await readTerms(owner);
    await close({ from: '2026-10-26', until: '2026-10-31', reason: 'Half-term' });
    const after = await readTerms(owner);
    const [autumn, quay] = [after.terms[0]!, after.sites[0]!];
    const counts = (closures: typeof after.closures) => weekdayCounts(autumn, closures, quay).map(({ lessons }) => lessons);
    expect(counts(after.closures)).toEqual(counts(before.closures).map((count, index) => (index < 6 ? count - 1 : count)));
  });
  it('one site closes and the others teach', async () => {
    await close({ from: '2026-10-06', siteId: 'mill' });
    const { terms, closures, sites } = await readTerms(owner);
    expect(sites.map((site) => weekdayCounts(terms[0]!, closures, site)[1]!.lessons)).toEqual([15, 14, 15]);
  });
  it('a day closed already is named, except where the two do not touch', async () => {
    await expect(close({ from: '2026-10-10', until: '2026-10-14' })).rejects.toMatchObject({ code: 'conflict', message: 'Monday 12 October is closed already: No teaching. Take that away first, or leave the day out.' });
    await close({ from: '2026-10-06', siteId: 'mill', fromTime: '09:00', toTime: '12:00' });
    await close({ from: '2026-10-06', siteId: 'quay' });
    await close({ from: '2026-10-06', siteId: 'mill', fromTime: '12:00', toTime: '15:00' });
    await expect(close({ from: '2026-10-06' })).rejects.toMatchObject({ code: 'conflict' });
    expect((await closedDays()).filter((day) => day === '2026-10-06')).toHaveLength(3);
  });
  it('a site that is not there is refused on its field', async () => {
    await expect(close({ siteId: 'nowhere' })).rejects.toMatchObject({ code: 'invalid', fields: { siteId: ['Choose a site from the list.'] } });
  });
  it.each([{ from: '2026-10-07' }, { from: '2026-10-06', until: '2027-10-06' }, { fromTime: '10:00', toTime: '' }, { fromTime: '10:00', toTime: '09:00' }, { fromTime: '25:00', toTime: '26:00' }, { reason: '  ' }])('%j is refused before it is sent', (over) => {
    expect(addClosureSchema.safeParse({ from: '2026-10-06', until: '2026-10-06', siteId: '', reason: 'x', fromTime: '', toTime: '', ...over }).success).toBe(false);
  });
});

describe('where lessons are booked', () => {
  beforeEach(async () => {
    await lanternMoney(db);
    for (const [index, [studentId, teacherId]] of ([['ada', 'mara'], ['ben', 'mara'], ['ada', 'leo']] as const).entries()) {
      await enrolled(db, { studentId, familyId: 'vale', teacherId, dates: ['2026-11-17'], startMin: 960 + 60 * index });
    }
    const booked: { occurrenceId: string; teacherId: string }[] = await db('seat as s').join('enrolment as e', 'e.id', 's.enrolmentId').select('s.occurrenceId', 'e.teacherId');
    for (const { occurrenceId, teacherId } of booked) await db('occurrence').where({ id: occurrenceId }).update({ plannedTeacherId: teacherId });
  });
  it('the refusal names how many lessons and whose, and nothing is closed', async () => {
    await expect(close({ from: '2026-11-16', until: '2026-11-18' })).rejects.toMatchObject({ code: 'conflict', message: '3 lessons are booked on these days: Leo and Mara (2). Move or cancel them first; then the school can close.' });
    expect(await closedDays()).not.toContain('2026-11-16');
  });
  it('cancelled lessons, another site and hours that only touch do not stand in the way', async () => {
    await expect(close({ from: '2026-11-17', fromTime: '17:00', toTime: '18:00' })).rejects.toMatchObject({ message: expect.stringContaining('1 lesson is booked on Tuesday 17 November: Mara.') as string });
    await close({ from: '2026-11-17', siteId: 'mill' });
    await close({ from: '2026-11-17', siteId: 'quay', fromTime: '09:00', toTime: '16:00' });
    await db('occurrence').update({ state: 'cancelled' });
    await close({ from: '2026-11-17', siteId: 'quay', fromTime: '16:00', toTime: '21:00' });
  });
  it('a closed day that weekly lessons were planned round stays; one that nothing depends on goes', async () => {
    await close({ from: '2026-11-24' });
    await close({ from: '2026-11-25' });
    const row = async (on: string) => (await readTerms(owner)).closures.find(({ closedOn }) => closedOn === on)!;
    await db('series').insert({ id: 's', lessonTypeId: 'single', teacherId: 'mara', siteId: 'quay', zone: 'America/New_York', weekday: 2, startMin: 960, lengthMinutes: 30, firstOn: '2026-11-10', lastOn: '2026-12-15' });
    await expect(takeClosureAway({ closureId: (await row('2026-11-24')).id }, owner)).rejects.toMatchObject({ code: 'conflict', message: '1 weekly lesson was planned round Tuesday 24 November: Mara. It stays closed: those lessons and their bills were counted without it.' });
    await takeClosureAway({ closureId: (await row('2026-11-25')).id }, owner);
    expect(await closedDays()).toContain('2026-11-24');
    expect(await closedDays()).not.toContain('2026-11-25');
    await db('term').where({ id: 'autumn' }).update({ state: 'closed' });
    await expect(takeClosureAway({ closureId: (await row('2026-10-12')).id }, owner)).rejects.toMatchObject({ code: 'conflict', message: 'The term of this day is closed. Its days stay as they were.' });
    await expect(takeClosureAway({ closureId: 'gone' }, owner)).rejects.toMatchObject({ code: 'not_found' });
  });
});
