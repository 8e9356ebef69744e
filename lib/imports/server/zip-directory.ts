import 'server-only';
import { inflateRawSync } from 'node:zlib';
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
const LOCAL_HEADER = 0x04034b50;
const LOCAL_HEADER_BYTES = 30;

const NOT_A_WORKBOOK = 'This is not a workbook. Save it as .xlsx in your spreadsheet program and choose it again.';
const TOO_MUCH = 'This workbook unpacks to more than is safe to open. Copy the rows into a new workbook and choose that one.';
const refuse = (message: string) => new AppError('invalid', message, { file: [message] });

type Entry = { name: string; isDeflated: boolean; packedBytes: number; unpackedBytes: number; headerAt: number };

/**
 * Looks at the table of contents of a zip before anything is unpacked: the parser has no limit of its own, and a
 * 200 kB file can take 400 MB of memory. Throws in words; answers nothing when the file looks harmless.
 */
export function assertSafeWorkbook(bytes: Buffer, fileName: string): void {
  if (!/\.xlsx$/i.test(fileName)) throw refuse(NOT_A_WORKBOOK);
  if (bytes.length > UPLOAD_LIMIT_BYTES) throw refuse('This workbook is larger than 5 MB. Take out pictures and sheets that are not needed.');
  const entries = readDirectory(bytes);
  const names = entries.map(({ name }) => name);
  if (!names.includes('[Content_Types].xml') || !names.some((name) => /^xl\/workbook\.xml$/i.test(name))) throw refuse(NOT_A_WORKBOOK);
  if (entries.reduce((sum, { unpackedBytes }) => sum + unpackedBytes, 0) > UNPACKED_LIMIT_BYTES) throw refuse(TOO_MUCH);
}

/** A table of contents may lie about sizes, so every part is unpacked once against the limit before the parser sees it. */
export function assertUnpacksSafely(bytes: Buffer): void {
  let left = UNPACKED_LIMIT_BYTES;
  for (const { isDeflated, packedBytes, headerAt } of readDirectory(bytes)) {
    if (headerAt + LOCAL_HEADER_BYTES > bytes.length || bytes.readUInt32LE(headerAt) !== LOCAL_HEADER) throw refuse(NOT_A_WORKBOOK);
    const from = headerAt + LOCAL_HEADER_BYTES + bytes.readUInt16LE(headerAt + 26) + bytes.readUInt16LE(headerAt + 28);
    left -= isDeflated ? inflatedBytes(bytes.subarray(from, from + packedBytes), left) : packedBytes;
    if (left <= 0) throw refuse(TOO_MUCH);
  }
}

function inflatedBytes(packed: Buffer, most: number): number {
  try {
    return inflateRawSync(packed, { maxOutputLength: most }).length;
  } catch (error) {
    throw refuse(error instanceof RangeError ? TOO_MUCH : NOT_A_WORKBOOK);
  }
}

function readDirectory(bytes: Buffer): Entry[] {
  if (bytes.length < END_RECORD_BYTES || bytes.readUInt32LE(0) !== LOCAL_HEADER) throw refuse(NOT_A_WORKBOOK);
  const end = findEnd(bytes);
  const count = bytes.readUInt16LE(end + 10);
  if (count > ENTRY_LIMIT) throw refuse('This workbook has more parts than is safe to open. Copy the rows into a new workbook and choose that one.');
  const entries: Entry[] = [];
  let at = bytes.readUInt32LE(end + 16);
  for (let index = 0; index < count; index += 1) {
    if (at + ENTRY_BYTES > bytes.length || bytes.readUInt32LE(at) !== DIRECTORY_ENTRY) throw refuse(NOT_A_WORKBOOK);
    const nameLength = bytes.readUInt16LE(at + 28);
    entries.push({
      name: bytes.toString('utf8', at + ENTRY_BYTES, at + ENTRY_BYTES + nameLength), isDeflated: bytes.readUInt16LE(at + 10) !== 0,
      packedBytes: bytes.readUInt32LE(at + 20), unpackedBytes: bytes.readUInt32LE(at + 24), headerAt: bytes.readUInt32LE(at + 42),
    });
    at += ENTRY_BYTES + nameLength + bytes.readUInt16LE(at + 30) + bytes.readUInt16LE(at + 32);
  }
  return entries;
}

function findEnd(bytes: Buffer): number {
  const first = Math.max(0, bytes.length - END_RECORD_BYTES - LONGEST_COMMENT);
  for (let at = bytes.length - END_RECORD_BYTES; at >= first; at -= 1) {
    if (bytes.readUInt32LE(at) === END_RECORD) return at;
  }
  throw refuse(NOT_A_WORKBOOK);
}
