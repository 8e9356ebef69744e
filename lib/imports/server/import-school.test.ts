import { readFileSync } from 'node:fs';
import path from 'node:path';
import ExcelJs from 'exceljs';
import { describe, expect, it } from 'vitest';
import type { Db } from '@/db/connection';
import { findImportBatch, importRowsOf } from '@/db/imports';
import { openSchool } from '@/lib/people/server/open-school';
import { contextOf } from '../../../tests/support/context';
import { freshDb } from '../../../tests/support/fresh-db';
import { checkAgain, readUpload, type Control } from './check-import';
import { runImport } from './run-import';
import { undoImport, undoObstacles } from './undo-import';
import { uploadWorkbook } from './upload-workbook';

const FILE = path.resolve(import.meta.dirname, '../../../tests/support/data/heron-court.xlsx');
const EXPECTED = JSON.parse(readFileSync(FILE.replace('.xlsx', '.expected.json'), 'utf8')) as { sheets: Record<string, { imported: number }> };
const TERM = { name: 'Autumn term', startsOn: '2026-09-07', endsOn: '2026-12-19' };

async function newSchool() {
  const db = freshDb();
  const opened = await openSchool({
    schoolName: 'Heron Court', siteName: 'Heron Court', zone: 'Europe/Dublin', currency: 'EUR', country: 'IE', locale: 'en-IE', ownerName: 'Orla Wintle',
    ownerEmail: 'owner@example.org', password: 'heron-court-by-the-river',
  }, { db, now: 1_788_000_000 });
  const context = contextOf(db, 'owner', { userId: opened.userId, personId: opened.ownerId });
  const choices = { siteId: opened.siteId, engagementKind: 'employee' as const, termId: null, newTerm: TERM, lessonsFrom: '2026-09-07' };
  return { db, context, choices };
}
type School = Awaited<ReturnType<typeof newSchool>>;

async function bring({ context, choices }: School, bytes: Buffer = readFileSync(FILE)): Promise<{ batchId: string; imported: Awaited<ReturnType<typeof runImport>> }> {
  const { batchId } = await uploadWorkbook({ bytes, fileName: 'heron-court.xlsx' }, context);
  await readUpload({ batchId }, context);
  const [term] = await context.db('term').select<{ id: string }[]>('id');
  await checkAgain({ batchId, choices: term ? { ...choices, termId: term.id, newTerm: null } : choices }, context);
  return { batchId, imported: await runImport({ batchId }, context) };
}

async function count(db: Db, table: string, where: object = {}): Promise<number> {
  const [row] = await db(table).where(where).count<{ n: number }[]>('* as n');
  return row?.n ?? 0;
}

const TABLES = ['person', 'contact_point', 'engagement', 'qualification', 'availability', 'pay_rate', 'room', 'room_feature', 'family', 'payer', 'split_rule', 'family_student', 'relationship', 'consent',
  'student_ladder', 'student_rung', 'rung_credit', 'series', 'enrolment', 'occurrence', 'seat', 'hold', 'term'] as const;
async function counts(db: Db): Promise<Record<string, number>> {
  const all: Record<string, number> = {};
  for (const table of TABLES) all[table] = await count(db, table);
  return all;
}

/** A workbook of one or more sheets, from rows as people type them. */
async function workbook(sheets: Record<string, (string | number | null)[][]>): Promise<Buffer> {
  const book = new ExcelJs.Workbook();
  for (const [name, rows] of Object.entries(sheets)) book.addWorksheet(name).addRows(rows);
  return Buffer.from(await book.xlsx.writeBuffer());
}

describe('bringing in a whole school', () => {
  it('imports what is expected of each sheet, and lays the weekly lessons of the term', async () => {
    const school = await newSchool();
    const { imported } = await bring(school);
    const expected = Object.fromEntries(Object.entries(EXPECTED.sheets).map(([sheet, { imported: n }]) => [sheet.toLowerCase(), n]));
    expect(imported).toEqual(expected);
    const { db } = school;
    expect(await count(db, 'engagement')).toBe(6);
    expect(await count(db, 'room')).toBe(4);
    expect(await count(db, 'family')).toBe(28);
    expect(await count(db, 'person', { isStudent: 1 })).toBe(42);
    expect(await count(db, 'enrolment', { state: 'active' })).toBe(42);
    // Fifteen of each weekday from Monday 7 September to Saturday 19 December.
    expect(await count(db, 'occurrence')).toBe(42 * 15);
    expect(await count(db, 'hold')).toBe(42 * 15 * 3);
  });

  it('keeps what the cells said: rates, shares, equipment, birthdays, prices, photo answers', async () => {
    const { db } = await (async () => { const school = await newSchool(); await bring(school); return school; })();
    const rates = await db('pay_rate as r').join('engagement as e', 'e.id', 'r.engagementId').join('person as p', 'p.id', 'e.personId').where('p.givenName', 'Greta').orderBy('r.lengthMinutes').select<{ amountMinor: number }[]>('r.amountMinor');
    expect(rates.map(({ amountMinor }) => amountMinor)).toEqual([1850, 2700, 3500]);
    const [split] = await db('split_rule as s').join('family as f', 'f.id', 's.familyId').where('f.name', 'Brekke').select<{ partsJson: string }[]>('s.partsJson');
    expect((JSON.parse(split?.partsJson ?? '[]') as { bp: number }[]).map(({ bp }) => bp)).toEqual([7500, 2500]);
    const loft = await db('room_feature as x').join('room as r', 'r.id', 'x.roomId').join('feature as f', 'f.id', 'x.featureId').where('r.name', 'Loft').select<{ code: string; quantity: number }[]>('f.code', 'x.quantity');
    expect(loft).toEqual([{ code: 'digital_piano', quantity: 2 }]);
    const student = (given: string, family: string) => db('person').where({ givenName: given, familyName: family, isStudent: 1 }).first<{ id: string; bornOn: string | null }>('id', 'bornOn');
    expect((await student('Hugo', 'Brekke')).bornOn).toBe('2012-05-21');
    expect((await student('Zora', 'Lomax')).bornOn).toBe('2017-07-01');
    expect((await student('Célia', 'Aldane')).bornOn).toBe('2013-02-01');
    const answers = async (given: string, family: string) => db('consent').where({ personId: (await student(given, family)).id }).distinct().pluck('answer');
    expect(await answers('Célia', 'Aldane')).toEqual(['no']);
    expect(await answers('Rhona', 'Dunmore')).toEqual(['yes']);
    expect(await answers('Maëlle', 'Corriston')).toEqual([]);
    const wanda = await student('Wanda', 'Eklund');
    const lesson = await db('enrolment as e').join('series as s', 's.id', 'e.seriesId').where('e.studentId', wanda.id).first<object>('e.unitPriceMinor', 's.weekday', 's.startMin', 'e.lengthMinutes');
    expect(lesson).toEqual({ unitPriceMinor: 4050, weekday: 2, startMin: 1125, lengthMinutes: 45 });
  });

  it('places students on the ladder: the rungs below their level are credited', async () => {
    const school = await newSchool();
    await bring(school);
    const rows = await school.db('rung_credit as c').join('person as p', 'p.id', 'c.studentId').join('rung_text as t', 't.rungId', 'c.rungId').join('level as v', 'v.id', 't.levelId')
      .where({ 'p.givenName': 'Hugo', 'p.familyName': 'Brekke' }).distinct().pluck('v.no');
    expect(rows.sort()).toEqual([1, 2]);
  });

  it('changes nothing when the same workbook comes a second time', async () => {
    const school = await newSchool();
    await bring(school);
    const before = await counts(school.db);
    const { batchId, imported } = await bring(school);
    expect(imported).toEqual({ teachers: 0, rooms: 0, families: 0, students: 0, enrolments: 0 });
    expect(await counts(school.db)).toEqual(before);
    const verdicts = (await importRowsOf(school.db, batchId)).filter(({ verdict }) => verdict === 'same').length;
    expect(verdicts).toBe(6 + 4 + 28 + 42 + 42);
  });

  it('leaves nothing behind when it is undone', async () => {
    const school = await newSchool();
    const before = await counts(school.db);
    const { batchId } = await bring(school);
    await undoImport({ batchId }, school.context);
    expect(await counts(school.db)).toEqual(before);
    expect((await findImportBatch(school.db, batchId))?.state).toBe('undone');
    // What was taken back can come again, whole.
    expect((await bring(school)).imported.enrolments).toBe(42);
  });

  it('refuses to undo what somebody has built on, and says which rows', async () => {
    const school = await newSchool();
    const { batchId } = await bring(school);
    const { db, context } = school;
    const person = await db('person').where({ givenName: 'Hugo', familyName: 'Brekke', isStudent: 1 }).first<{ id: string }>('id');
    await db('health_note').insert({ id: 'note', personId: person.id, kind: 'allergy', text: 'nuts' });
    await db('room').where({ name: 'North' }).update({ personLimit: 4 });
    const before = await counts(db);
    await expect(undoImport({ batchId }, context)).rejects.toThrow('2 rows have been used since');
    expect((await undoObstacles(db, batchId)).map(({ sheet, rowNo, title, what }) => [sheet, rowNo, title, what])).toEqual([
      ['Rooms', 2, 'North', 'the room changed since'], ['Students', 3, 'Hugo Brekke', 'has a health note']]);
    expect(await counts(db)).toEqual(before);
  });

  it('brings in only the rows that were put right, and names what differs from the school', async () => {
    const school = await newSchool();
    const rows = (born: string, seats: number) => workbook({
      Rooms: [['Room', 'Seats'], ['North', seats]], Families: [['Family', 'Payer 1'], ['Lomax', 'Zora Lomax']],
      Students: [['Student', 'Family', 'Born'], ['Fintan Lomax', 'Lomax', '31/12/2014'], ['Una Lomax', 'lomax ', born]],
    });
    expect((await bring(school, await rows('31/02/2014', 3))).imported).toMatchObject({ students: 1 });
    const { batchId, imported } = await bring(school, await rows('28/02/2014', 5));
    expect(imported).toEqual({ teachers: 0, rooms: 0, families: 0, students: 1, enrolments: 0 });
    const room = (await importRowsOf(school.db, batchId)).find(({ sheet }) => sheet === 'Rooms');
    expect(room).toMatchObject({ verdict: 'changed', reason: 'the school has another number of seats; it is left as it is' });
    expect(await school.db('room').select('personLimit')).toEqual([{ personLimit: 3 }]);
  });

  it('S40: of 120 rows, 3 blank, 5 listed twice and 4 faulty leave 108; put right they are 112; again nothing; undone none', async () => {
    const school = await newSchool();
    const student = (index: number) => [`Student ${String(index).padStart(3, '0')}`, 'Lomax', '13/02/2014', 2];
    const good = Array.from({ length: 108 }, (_, index) => student(index + 1));
    const wrong = [['Student 109', 'Lomax', '31/02/2014', 2], ['Student 110', 'Nobody', '', 2], ['Student 111', 'Nobody at all', '', 2], ['Student 112', 'Lomax', '', 'advanced']];
    const right = [109, 110, 111, 112].map(student);
    const sheet = (last: (string | number)[][]) => workbook({
      Families: [['Family', 'Payer 1'], ['Lomax', 'Zora Lomax']],
      Students: [['Student', 'Family', 'Born', 'Level'], ...good.slice(0, 50), [null], ...good.slice(50), ['', ' ', '', ''], ...good.slice(0, 5), [null], ...last],
    });
    const [first, fixed] = [await sheet(wrong), await sheet(right)];
    const firstRun = await bring(school, first);
    const control = JSON.parse((await findImportBatch(school.db, firstRun.batchId))?.controlJson ?? '') as Control;
    const students = control.sheets.find(({ sheet: name }) => name === 'Students');
    expect(students).toMatchObject({ rows: 117, good: 108, problems: 9, blanks: 3, byVerdict: { new: 108, duplicate: 5, faulty: 4, blank: 3 } });
    expect(firstRun.imported.students).toBe(108);
    const secondRun = await bring(school, fixed);
    expect(secondRun.imported.students).toBe(4);
    expect(await count(school.db, 'person', { isStudent: 1 })).toBe(112);
    const thirdRun = await bring(school, fixed);
    expect(thirdRun.imported.students).toBe(0);
    expect((await importRowsOf(school.db, thirdRun.batchId)).filter(({ sheet: name, verdict }) => name === 'Students' && verdict === 'same')).toHaveLength(112);
    await expect(undoImport({ batchId: firstRun.batchId }, school.context)).rejects.toThrow('cannot be undone');
    for (const { batchId } of [thirdRun, secondRun, firstRun]) await undoImport({ batchId }, school.context);
    expect(await count(school.db, 'person', { isStudent: 1 })).toBe(0);
    expect(await count(school.db, 'family')).toBe(0);
  });

  it('refuses a row that meets a booking of the school, with the day', async () => {
    const school = await newSchool();
    await bring(school);
    const { batchId } = await uploadWorkbook({ bytes: await workbook({ Enrolments: [['Student', 'Teacher', 'Day', 'Start', 'Minutes', 'Room'], ['Ilse Wintle', 'Greta Eklund', 'Tue', '18:30', 45, 'South']] }), fileName: 'more.xlsx' }, school.context);
    await readUpload({ batchId }, school.context);
    const [row] = await importRowsOf(school.db, batchId);
    expect(row).toMatchObject({ verdict: 'faulty', reason: 'room is taken at that time on 2026-11-17' });
  });

  it('makes one person of a grown-up student who pays, and two of a child with the payer’s name', async () => {
    const school = await newSchool();
    await bring(school, await workbook({
      Families: [['Family', 'Payer 1'], ['Marsh', 'Theo Marsh'], ['Vale', 'Ada Vale']],
      Students: [['Student', 'Family', 'Born'], ['Theo Marsh', 'Marsh', '1979-08-30'], ['Ada Vale', 'Vale', '2014-03-01']],
    }));
    expect(await count(school.db, 'person', { familyName: 'Marsh' })).toBe(1);
    expect(await count(school.db, 'person', { familyName: 'Vale' })).toBe(2);
    expect(await count(school.db, 'relationship')).toBe(1);
  });

  it('asks for the term and for the teachers’ engagement instead of guessing', async () => {
    const school = await newSchool();
    const { batchId } = await uploadWorkbook({ bytes: readFileSync(FILE), fileName: 'heron-court.xlsx' }, school.context);
    await readUpload({ batchId }, school.context);
    await expect(runImport({ batchId }, school.context)).rejects.toMatchObject({ code: 'invalid', fields: { newTerm: ['Enter the first and the last day of the term.'] } });
    await checkAgain({ batchId, choices: { ...school.choices, engagementKind: null } }, school.context);
    await expect(runImport({ batchId }, school.context)).rejects.toMatchObject({ fields: { engagementKind: ['Choose employees or contractors.'] } });
    expect(await count(school.db, 'engagement')).toBe(0);
    expect(await count(school.db, 'term')).toBe(0);
  });

  it('is the owner’s alone', async () => {
    const { db, context } = await newSchool();
    for (const role of ['desk', 'teacher', 'guardian', 'student'] as const) {
      await expect(uploadWorkbook({ bytes: readFileSync(FILE), fileName: 'heron-court.xlsx' }, { ...context, ...contextOf(db, role) })).rejects.toMatchObject({ code: 'not_found' });
    }
  });
});
