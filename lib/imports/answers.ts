import { strictAddress } from '../messages/address';
import { typedText, type Cell } from './cell';
import { faulty, read, type Reading } from './reading';

const YES = ['yes', 'y', 'true', '1', 'x', '✓', '✔', 'ok'];
const NO = ['no', 'n', 'false', '0', '–', '-'];

/** A yes or a no; blank means that nobody asked, and stays so. */
export function readAnswer(cell: Cell): Reading<'yes' | 'no' | null> {
  const text = typedText(cell).toLowerCase();
  if (text === '' || text === '?') return read(null);
  if (YES.includes(text)) return read('yes');
  return NO.includes(text) ? read('no') : faulty('answer is neither yes nor no');
}

/** One strictly written address, in lower case; blank is null. */
export function readEmail(cell: Cell, whose: string): Reading<string | null> {
  const text = typedText(cell).replace(/^mailto:/i, '');
  if (text === '') return read(null);
  const address = strictAddress(text);
  return address === null ? faulty(`${whose} e-mail is not an address`) : read(address.toLowerCase());
}

/** A telephone number as it was typed; blank is null. A number cell has lost its leading zero, which is put back. */
export function readPhone(cell: Cell, whose: string): Reading<string | null> {
  const text = cell.kind === 'number' ? `0${cell.value}` : typedText(cell);
  if (text === '') return read(null);
  const isNumber = /^[+\d][\d\s()./-]*$/.test(text) && text.replace(/\D/g, '').length >= 6;
  return isNumber ? read(text) : faulty(`${whose} phone is not a number`);
}

/** For comparing only: "+44 (0)155-010-0100" and "0155 010 0100" are one number. */
export const phoneKey = (typed: string): string => typed.replace(/\(0\)/g, '').replace(/\D/g, '').slice(-9);
