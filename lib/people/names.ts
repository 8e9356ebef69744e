/** "Wren van der Berg" → given "Wren", family "van der Berg". One word is a given name. No case is changed. */
export function splitName(typed: string): { givenName: string; familyName: string } {
  const [givenName = '', ...rest] = tidyName(typed).split(' ');
  return { givenName, familyName: rest.join(' ') };
}

/** Single ordinary spaces, none at the ends; any script. Workbooks are full of spaces that do not break or have no width. */
export const tidyName = (typed: string): string => typed.normalize('NFC').replace(/[\s\u00a0\u202f\u200b]+/g, ' ').trim();

/** For comparing only: case, accents' encoding and spaces do not make a different name. */
export const nameKey = (typed: string): string => tidyName(typed).toLocaleLowerCase('und').replace(/[’‘`]/g, "'");

const LETTERS: Record<string, string> = { ø: 'o', æ: 'ae', œ: 'oe', ß: 'ss', đ: 'd', ð: 'd', þ: 'th', ł: 'l', ı: 'i' };

/** For finding: as people type a name on a plain keyboard. "Søren O’Shee" → "soren o'shee". */
export const plainName = (name: string): string =>
  nameKey(name).normalize('NFD').replace(/\p{M}/gu, '').replace(/[øæœßđðþłı]/g, (letter) => LETTERS[letter] ?? letter);

/** Whether every word that was typed begins or stands in the name. */
export function nameMatches(name: string, typed: string): boolean {
  const plain = plainName(name);
  return plainName(typed).split(' ').every((word) => plain.includes(word));
}
