import ExcelJS from 'exceljs';
import type { Knex } from 'knex';
import { beforeEach, describe, expect, it } from 'vitest';
import { firstBrokenAuditRow } from '@/db/audit';
import { insertEnquiry } from '@/db/enquiries';
import { insertPerson } from '@/db/people';
import { transaction } from '@/db/transaction';
import { readEnquiries } from '@/lib/calendar/server/read-enquiries';
import { takeEnquiryList } from '@/lib/calendar/server/take-enquiry-list';
import { takeFamilyList } from '@/lib/people/server/take-family-list';
import { takeStudentList } from '@/lib/people/server/take-student-list';
import { readStudents } from '@/lib/people/server/read-students';
import type { Context } from '@/lib/server/context';
import { holdFamily } from '@/lib/tuition/server/hold-family';
import { previewTuitionRun } from '@/lib/tuition/server/preview-tuition-run';
import { invoiceList, paymentList } from '@/lib/tuition/server/staff-invoice';
import { takeBillList } from '@/lib/tuition/server/take-bill-list';
import { takeDeskPayment } from '@/lib/tuition/server/take-desk-payment';
import { invoicesToTake, takeInvoiceList } from '@/lib/tuition/server/take-invoice-list';
import { paymentsToTake, takePaymentList } from '@/lib/tuition/server/take-payment-list';
import { tuitionRunDetail } from '@/lib/tuition/server/tuition-run-screen';
import { COLUMNS } from '@/policies/matrix';
import { accessHouse, contextOfColumn } from '@/tests/factories/access-house';
import { enrolled } from '@/tests/factories/lantern-money';
import { freshDb } from '@/tests/support/fresh-db';
import { listFile, type TakenList } from './list-file';

let db: Knex;
let owner: Context;
let runId: string;
beforeEach(async () => {
  db = freshDb();
  runId = (await accessHouse(db)).runId;
  owner = await contextOfColumn(db, 'owner');
});

const BOM = '\uFEFF';
// `text()` would swallow the mark at the beginning.
const textOf = async (response: Response) => new TextDecoder('utf-8', { ignoreBOM: true }).decode(await response.arrayBuffer());
const csvOf = async (list: TakenList) => textOf(await listFile(list, 'csv', owner));
async function sheetOf(list: TakenList): Promise<ExcelJS.Worksheet> {
  const book = new ExcelJS.Workbook();
  await book.xlsx.load(await (await listFile(list, 'xlsx', owner)).arrayBuffer());
  return book.worksheets[0]!;
}
const valuesOf = (sheet: ExcelJS.Worksheet, rowNo: number) => (sheet.getRow(rowNo).values as ExcelJS.CellValue[]).slice(1);
const pay = (payerId: string, amount: string, note: string) =>
  takeDeskPayment({ payerId, amount, method: 'cash', receivedOn: '2026-11-17', note, requestKey: `press-${payerId}-${amount}` }, owner);
const auditRows = (): Promise<{ sentence: string; actorId: string; tableName: string; afterJson: string }[]> => db('audit').where({ action: 'export' }).orderBy('seq').select('sentence', 'actorId', 'tableName', 'afterJson');

describe('the lists of people', () => {
  it('students leave as their list shows them, in UTF-8 with its mark and lines that end in CRLF', async () => {
    expect(await csvOf(await takeStudentList(owner))).toBe(`${BOM}${[
      'Student,Age,Enrolments,Weekday,Start,Minutes,Teacher,Room,Family', 'Wen Li,12,0,,,,,,', 'Theo Marsh,42,1,,,30,Ines,,marsh', 'Vik Rao,15,0,,,,,,', 'Uma Reyes,14,1,,,30,Viktor Reyes,,reyes', 'Ada Vale,13,1,,,30,Mara,,Vale', 'Ben Vale,11,1,,,30,Mara,,Vale', '',
    ].join('\r\n')}`);
  });
  it('a student with a weekly lesson leaves with its day, start and room', async () => {
    await db('series').insert({ id: 'weekly', lessonTypeId: 'single', subjectId: 'keyboard', teacherId: 'mara', roomId: 'q1', siteId: 'quay', termId: 'autumn', weekday: 2, startMin: 965, lengthMinutes: 30, firstOn: '2026-09-08', lastOn: '2026-12-19', zone: 'America/New_York' });
    await db('enrolment').where({ studentId: 'ada' }).update({ seriesId: 'weekly' });
    expect(await csvOf(await takeStudentList(owner))).toContain('\r\nAda Vale,13,1,Tuesday,16:05,30,Mara,Q1,Vale\r\n');
  });
  it('families leave with the names of students and payers and nothing else', async () => {
    expect(await csvOf(await takeFamilyList(owner))).toBe(`${BOM}Family,Students,Payers\r\nVale,"Ada, Ben","Noor Vale, Sam Vale"\r\nmarsh,Theo,Theo Marsh\r\nreyes,Uma,Rosa Reyes\r\n`);
  });
  it('enquiries leave open ones first, on the day of the school, without what strangers wrote or how to reach them', async () => {
    const enquiry = {
      contactName: 'Wren O’Dé 漢', contactEmail: 'wren@example.com', contactPhone: '0155 010 0199', studentName: 'Pip', studentAge: 9, isAdult: false, subjectId: null, experience: 'Plays by ear', levelGuess: 1,
      wishes: [{ weekday: 2, fromMin: 930, toMin: 1110 }], siteId: null, lengthMinutes: 30, source: 'web' as const, message: 'Pip has asthma', nextStepOn: '2026-11-19', createdAt: Date.UTC(2026, 10, 17, 2) / 1000,
    };
    await transaction(db, async (trx) => {
      await insertEnquiry(trx, { ...enquiry, id: 'ended', studentName: 'Moss', state: 'closed', createdAt: enquiry.createdAt - 86_400 });
      await insertEnquiry(trx, { ...enquiry, id: 'open', state: 'new' });
    });
    expect(await csvOf(await takeEnquiryList(owner))).toBe(`${BOM}Student,Age,State,Asked,Could come,Contact,Next step\r\nPip,9,new,2026-11-16,Tue 15:30–18:30,Wren O’Dé 漢,2026-11-19\r\nMoss,9,closed,2026-11-15,Tue 15:30–18:30,Wren O’Dé 漢,2026-11-19\r\n`);
    const { open, ended } = await readEnquiries(owner);
    expect((await takeEnquiryList(owner)).rows).toHaveLength(open.length + ended.length);
  });
  it('the same list gives the same bytes', async () => {
    const [one, two] = [await csvOf(await takeStudentList(owner)), await csvOf(await takeStudentList(owner))];
    expect(Buffer.from(one).equals(Buffer.from(two))).toBe(true);
  });
});

describe('names that a spreadsheet would run', () => {
  const PAYLOADS = ['=1+1', '+1', '-1', '@SUM(A1:A9)', '\t=1+1', '\r=1+1', '=HYPERLINK("http://example.org","x")', '=cmd|\' /C calc\'!A0', 'Ann\n=1+1'];
  beforeEach(() => transaction(db, async (trx) => {
    for (const [index, givenName] of PAYLOADS.entries()) await insertPerson(trx, { id: `hostile-${index}`, givenName, familyName: '', bornOn: null, isStudent: true });
  }));

  it('stay text in comma-separated files', async () => {
    const csv = await csvOf(await takeStudentList(owner));
    for (const start of ["'=1+1,", "'+1,", "'-1,", "'@SUM(A1:A9),", "'\t=1+1,", `"'=HYPERLINK(""http://example.org"",""x"")",`]) expect(csv, start).toContain(`\r\n${start}`);
    expect(csv).toContain(`"'\r=1+1"`);
    expect(csv).toContain('\r\n"Ann\n=1+1",,0');
    for (const line of csv.split('\r\n')) expect(line).not.toMatch(/(^|,)"?[=+\-@\t\r]/);
  });
  it('and in workbooks: no cell of any list holds a formula', async () => {
    const sheet = await sheetOf(await takeStudentList(owner));
    let cells = 0;
    sheet.eachRow((row) => row.eachCell((cell) => {
      cells += 1;
      expect(cell.formula).toBeUndefined();
      expect([ExcelJS.ValueType.Number, ExcelJS.ValueType.String]).toContain(cell.type);
    }));
    const names = sheet.getColumn(1).values.map(String);
    for (const payload of ['=1+1', '+1', '-1', '@SUM(A1:A9)', '\t=1+1']) expect(names).toContain(`'${payload}`);
    expect(cells).toBeGreaterThan(PAYLOADS.length + 9);
  });
});

describe('the lists of money', () => {
  it('invoices have the sums of the screen, as numbers and dates of a spreadsheet', async () => {
    await pay('payer-theo', '100.00', '');
    const rows = await invoiceList(owner);
    const sheet = await sheetOf(await takeInvoiceList(owner));
    expect(sheet.name).toBe('Invoices');
    expect(valuesOf(sheet, 1)).toEqual(['Invoices, November 17 2026: 3 rows']);
    expect(valuesOf(sheet, 3)).toEqual(['Number', 'Family', 'For', 'Issued', 'Due', 'Currency', 'Total', 'Open', 'State']);
    expect(valuesOf(sheet, 5)).toEqual(['L-00002', 'marsh', 'Autumn 2026/27', new Date('2026-11-17T00:00:00Z'), new Date('2026-12-01T00:00:00Z'), 'USD', 126, 26, 'part paid']);
    const sums = valuesOf(sheet, sheet.rowCount);
    expect(sums[0]).toBe('Total USD');
    expect(sums.slice(6, 8)).toEqual([491.4, 391.4]);
    expect([sums[6], sums[7]]).toEqual([rows.reduce((sum, { totalMinor }) => sum + totalMinor, 0) / 100, rows.reduce((sum, { openMinor }) => sum + openMinor, 0) / 100]);
    expect(sheet.getCell('G5').numFmt).toBe('#,##0.00');
    expect(await invoicesToTake(owner)).toBe(3);
  });
  it('payments have their sum, what is kept as credit, and never the note', async () => {
    await pay('payer-theo', '150.00', 'Ada was ill, see the health note');
    await pay('payer-rosa', '0.05', '=1+1');
    expect(await csvOf(await takePaymentList(owner))).toMatch(/^\uFEFFReceipt,Received,Payer,Family,By,Currency,Kept as credit,Amount\r\n[^,]+,2026-11-17,Rosa Reyes,reyes,cash,USD,0\.00,0\.05\r\n[^,]+,2026-11-17,Theo Marsh,marsh,cash,USD,24\.00,150\.00\r\n$/);
    const sums = valuesOf(await sheetOf(await takePaymentList(owner)), 6);
    expect([sums[0], sums[6], sums[7]]).toEqual(['Total USD', 24, 150.05]);
    expect(await paymentsToTake(owner)).toBe((await paymentList(owner)).length);
  });
  it('what a list leaves out on the screen for its length is taken out all the same', async () => {
    expect(await invoiceList(owner, 2)).toHaveLength(2);
    expect((await takeInvoiceList(owner)).rows).toHaveLength(3);
  });
  it('the bills of a run add up to the run; what is held back stands apart, without its reason', async () => {
    await enrolled(db, { studentId: 'ben', familyId: 'vale', teacherId: 'mara', dates: ['2027-01-12'], startMin: 600 });
    await enrolled(db, { studentId: 'theo', familyId: 'marsh', teacherId: 'ines', dates: ['2027-01-12', '2027-01-19'], startMin: 660 });
    const winter = await previewTuitionRun({ kind: 'term', period: 'winter', dueOn: '2027-01-11', instalments: 1, depositPercent: 0 }, owner);
    await holdFamily({ runId: winter.runId, familyId: 'vale', reason: 'Ben is in hospital' }, owner);
    const list = await takeBillList({ runId: winter.runId }, owner);
    const csv = await csvOf(list);
    expect(csv).toContain('\r\nVale,held back,changed,USD,239.40,,42.00\r\n');
    expect(csv).not.toContain('hospital');
    const { totalMinor } = await tuitionRunDetail({ runId: winter.runId }, owner);
    const sheet = await sheetOf(list);
    expect(valuesOf(sheet, sheet.rowCount)[5]).toBe(totalMinor / 100);
    expect((await listFile(list, 'csv', owner)).headers.get('Content-Disposition')).toBe('attachment; filename="bills-of-winter-2026-27-2026-11-17.csv"');
  });
  it('amounts of two currencies are never added together, each with its own decimals', async () => {
    const list: TakenList = {
      name: 'invoices', tableName: 'invoice', rowId: 'invoices', columns: [{ header: 'Number' }, { header: 'Total', isSummed: true }],
      rows: [['1', { amountMinor: 1250, currency: 'JPY' }], ['2', { amountMinor: 1250, currency: 'EUR' }], ['3', { amountMinor: 5 }], ['4', { amountMinor: 1, currency: 'JPY' }], ['5', null]],
    };
    expect(await csvOf(list)).toBe(`${BOM}Number,Total\r\n1,1250\r\n2,12.50\r\n3,0.05\r\n4,1\r\n5,\r\n`);
    const sheet = await sheetOf(list);
    expect([9, 10, 11].map((rowNo) => valuesOf(sheet, rowNo))).toEqual([['Total EUR', 12.5], ['Total JPY', 1251], ['Total USD', 0.05]]);
    expect([sheet.getCell('B9').numFmt, sheet.getCell('B10').numFmt]).toEqual(['#,##0.00', '#,##0']);
  });
  it('an empty list is a row of headers without a sum', async () => {
    expect(await csvOf(await takePaymentList(owner))).toBe(`${BOM}Receipt,Received,Payer,Family,By,Currency,Kept as credit,Amount\r\n`);
    expect((await sheetOf(await takePaymentList(owner))).rowCount).toBe(3);
  });
});

describe('who takes a list', () => {
  it('stands in the audit with the number of rows and the columns; the file is named after list and day', async () => {
    const before = (await auditRows()).length;
    const response = await listFile(await takeStudentList(owner), 'xlsx', owner);
    expect(response.headers.get('Content-Disposition')).toBe('attachment; filename="students-2026-11-17.xlsx"');
    expect(response.headers.get('Cache-Control')).toBe('no-store');
    const [row, ...more] = (await auditRows()).slice(before);
    expect(more).toEqual([]);
    expect(row).toMatchObject({ sentence: `Took the list of students: ${(await readStudents(owner)).length} rows.`, actorId: 'ruth', tableName: 'person' });
    expect(JSON.parse(row!.afterJson)).toEqual({ as: 'xlsx', rows: 6, columns: ['Student', 'Age', 'Enrolments', 'Weekday', 'Start', 'Minutes', 'Teacher', 'Room', 'Family'] });
    expect(await firstBrokenAuditRow(db)).toBeNull();
  });
  it.each(COLUMNS.filter((column) => column !== 'owner'))('%s takes none, is offered none, and nothing is written down', async (column) => {
    const context = await contextOfColumn(db, column);
    const before = (await auditRows()).length;
    for (const take of [takeStudentList, takeFamilyList, takeEnquiryList, takeInvoiceList, takePaymentList, (asking: Context) => takeBillList({ runId }, asking)]) {
      await expect(take(context)).rejects.toMatchObject({ name: 'AppError', code: expect.stringMatching(/^(not_found|forbidden)$/) as string });
    }
    expect([await invoicesToTake(context), await paymentsToTake(context)]).toEqual([null, null]);
    expect((await auditRows()).length).toBe(before);
  });
  it('the bills of a run that is not there are not found', async () => {
    await expect(takeBillList({ runId: '' }, owner)).rejects.toMatchObject({ code: 'not_found' });
  });
});
