import { readFileSync } from 'node:fs';
import path from 'node:path';
import { deflateRawSync } from 'node:zlib';
import ExcelJs from 'exceljs';
import { describe, expect, it } from 'vitest';
import { typedText } from '../cell';
import { parseWorkbook } from './parse-workbook';
import { assertSafeWorkbook } from './zip-directory';

/** A zip of deflated parts with the sizes its table of contents is to claim. */
function zipOf(parts: [name: string, packed: Buffer, claimedBytes: number][]): Buffer {
  const [bodies, directory]: [Buffer[], Buffer[]] = [[], []];
  let at = 0;
  for (const [name, packed, claimedBytes] of parts) {
    const local = Buffer.alloc(30);
    local.writeUInt32LE(0x04034b50, 0); local.writeUInt16LE(8, 8); local.writeUInt32LE(packed.length, 18); local.writeUInt32LE(claimedBytes, 22); local.writeUInt16LE(name.length, 26);
    const entry = Buffer.alloc(46);
    entry.writeUInt32LE(0x02014b50, 0); entry.writeUInt16LE(8, 10); entry.writeUInt32LE(packed.length, 20); entry.writeUInt32LE(claimedBytes, 24); entry.writeUInt16LE(name.length, 28); entry.writeUInt32LE(at, 42);
    bodies.push(local, Buffer.from(name), packed);
    directory.push(entry, Buffer.from(name));
    at += 30 + name.length + packed.length;
  }
  const end = Buffer.alloc(22);
  end.writeUInt32LE(0x06054b50, 0); end.writeUInt16LE(parts.length, 8); end.writeUInt16LE(parts.length, 10); end.writeUInt32LE(Buffer.concat(directory).length, 12); end.writeUInt32LE(at, 16);
  return Buffer.concat([...bodies, ...directory, end]);
}

const heron = () => readFileSync(path.resolve(import.meta.dirname, '../../../tests/support/data/heron-court.xlsx'));

describe('what may be uploaded', () => {
  it('lets a workbook through', () => expect(() => assertSafeWorkbook(heron(), 'Heron Court.XLSX')).not.toThrow());

  it.each([
    ['another ending', heron(), 'heron.xlsm'], ['no zip', Buffer.from('name,e-mail\n'.repeat(10)), 'list.xlsx'], ['an empty file', Buffer.alloc(0), 'list.xlsx'],
    ['a zip cut short', heron().subarray(0, 9000), 'list.xlsx'],
  ])('refuses %s', (_what, bytes, name) => expect(() => assertSafeWorkbook(bytes, name)).toThrow('This is not a workbook.'));

  it('refuses what is larger than 5 MB', () => expect(() => assertSafeWorkbook(Buffer.concat([heron(), Buffer.alloc(5 * 1024 * 1024)]), 'a.xlsx')).toThrow('larger than 5 MB'));

  it('refuses a bomb by its table of contents, without unpacking it', () => {
    const bytes = heron();
    const entry = bytes.indexOf(Buffer.from([0x50, 0x4b, 0x01, 0x02]));
    bytes.writeUInt32LE(200 * 1024 * 1024, entry + 24);
    expect(() => assertSafeWorkbook(bytes, 'bomb.xlsx')).toThrow('unpacks to more than is safe');
  });

  it('refuses a bomb whose table of contents lies about its size', async () => {
    const packed = deflateRawSync(Buffer.alloc(61 * 1024 * 1024));
    expect(packed.length).toBeLessThan(100_000);
    const bytes = zipOf([['[Content_Types].xml', deflateRawSync(Buffer.from('<Types/>')), 8], ['xl/workbook.xml', packed, 1000]]);
    expect(() => assertSafeWorkbook(bytes, 'bomb.xlsx')).not.toThrow();
    await expect(parseWorkbook(bytes, 'bomb.xlsx')).rejects.toThrow('unpacks to more than is safe');
  });

  it('says so when the parts cannot be unpacked or read', async () => {
    await expect(parseWorkbook(zipOf([['[Content_Types].xml', Buffer.from('not deflated'), 8], ['xl/workbook.xml', Buffer.from('x'), 1]]), 'a.xlsx')).rejects.toThrow('This is not a workbook.');
  });

  it('takes text that looks like a formula or a link as text', async () => {
    const book = new ExcelJs.Workbook();
    const sheet = book.addWorksheet('Students');
    sheet.addRow(['=1+1', '=HYPERLINK("http://example.com")', '+44', '-12.50', '@SUM(A1)']);
    sheet.getCell('F1').value = { formula: 'A1', result: undefined, date1904: false };
    sheet.getCell('G1').value = { text: 'Ada', hyperlink: 'javascript:alert(1)' };
    sheet.getCell('H1').value = { richText: [{ text: 'Cé' }, { text: 'lia' }] };
    sheet.getCell('I1').value = { formula: '30*0.9', result: 27, date1904: false };
    const [read] = await parseWorkbook(Buffer.from(await book.xlsx.writeBuffer()), 'a.xlsx');
    expect(read?.rows[0]?.cells.map(typedText)).toEqual(['=1+1', '=HYPERLINK("http://example.com")', '+44', '-12.50', '@SUM(A1)', '#formula without a saved value', 'Ada', 'Célia', '27']);
  });
});
