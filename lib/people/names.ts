/** "Wren van der Berg" → given "Wren", family "van der Berg". One word is a given name. No case is changed. */
export function splitName(typed: string): { givenName: string; familyName: string } {
  const [givenName = '', ...rest] = tidyName(typed).split(' ');
  return { givenName, familyName: rest.join(' ') };
}

/** Single ordinary spaces, none at the ends; any script. */
export const tidyName = (typed: string): string => typed.normalize('NFC').replace(/[\s\u00a0\u202f]+/g, ' ').trim();

/** For comparing only: case, accents' encoding and spaces do not make a different name. */
export const nameKey = (typed: string): string => tidyName(typed).toLocaleLowerCase('und').replace(/[’‘`]/g, "'");
