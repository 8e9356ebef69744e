import 'server-only';
import { AppError } from '@/lib/errors';

/** No workbook of a school comes near these; a small file that unpacks to hundreds of megabytes does. */
const UPLOAD_LIMIT_BYTES = 5 * 1024 * 1024;
const UNPACKED_LIMIT_BYTES = 60 * 1024 * 1024;
const ENTRY_LIMIT = 300;

const END_RECORD = 0x06054b50;
const DIRECTORY_ENTRY = 0x02014b50;
const END_RECORD_BYTES = 22;
const LONGEST_COMMENT = 65_535;
const ENTRY_BYTES = 46;
/** Sizes beyond 32 bits are written elsewhere; such a file is far over the limit anyway. */
const BEYOND_32_BITS = 0xffffffff;

const NOT_A_WORKBOOK = 'This is not a workbook. Save it as .xlsx in your spreadsheet program and choose it again.';
const refuse = (message: string) => new AppError('invalid', message, { file: [message] });

/**
 * Looks at the table of contents of a zip before anything is unpacked: the parser has no limit of its own, and a
 * 200 kB file can take 400 MB of memory. Throws in words; answers nothing when the file is harmless to open.
 */
export function assertSafeWorkbook(bytes: Buffer, fileName: string): void {
  if (!/\.xlsx$/i.test(fileName)) throw refuse(NOT_A_WORKBOOK);
  if (bytes.length > UPLOAD_LIMIT_BYTES) throw refuse('This workbook is larger than 5 MB. Take out pictures and sheets that are not needed.');
  if (bytes.length < END_RECORD_BYTES || bytes.readUInt32LE(0) !== 0x04034b50) throw refuse(NOT_A_WORKBOOK);
  const { names, unpackedBytes } = readDirectory(bytes);
  if (!names.includes('[Content_Types].xml') || !names.some((name) => /^xl\/workbook\.xml$/i.test(name))) throw refuse(NOT_A_WORKBOOK);
  if (unpackedBytes > UNPACKED_LIMIT_BYTES) throw refuse('This workbook unpacks to more than is safe to open. Copy the rows into a new workbook and choose that one.');
}

function readDirectory(bytes: Buffer): { names: string[]; unpackedBytes: number } {
  const end = findEnd(bytes);
  const count = bytes.readUInt16LE(end + 10);
  if (count > ENTRY_LIMIT) throw refuse('This workbook has more parts than is safe to open. Copy the rows into a new workbook and choose that one.');
  const names: string[] = [];
  let unpackedBytes = 0;
  let at = bytes.readUInt32LE(end + 16);
  for (let entry = 0; entry < count; entry += 1) {
    if (at + ENTRY_BYTES > bytes.length || bytes.readUInt32LE(at) !== DIRECTORY_ENTRY) throw refuse(NOT_A_WORKBOOK);
    const [size, nameLength] = [bytes.readUInt32LE(at + 24), bytes.readUInt16LE(at + 28)];
    if (size === BEYOND_32_BITS) throw refuse(NOT_A_WORKBOOK);
    unpackedBytes += size;
    names.push(bytes.toString('utf8', at + ENTRY_BYTES, at + ENTRY_BYTES + nameLength));
    at += ENTRY_BYTES + nameLength + bytes.readUInt16LE(at + 30) + bytes.readUInt16LE(at + 32);
  }
  return { names, unpackedBytes };
}

function findEnd(bytes: Buffer): number {
  const first = Math.max(0, bytes.length - END_RECORD_BYTES - LONGEST_COMMENT);
  for (let at = bytes.length - END_RECORD_BYTES; at >= first; at -= 1) {
    if (bytes.readUInt32LE(at) === END_RECORD) return at;
  }
  throw refuse(NOT_A_WORKBOOK);
}
