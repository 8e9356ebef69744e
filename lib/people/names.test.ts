import { describe, expect, it } from 'vitest';
import { nameKey, nameMatches, plainName, splitName } from './names';

describe('names', () => {
  it('takes the first word as the given name and keeps every script as it is typed', () => {
    expect(splitName('  Wren van der\u00a0Berg ')).toEqual({ givenName: 'Wren', familyName: 'van der Berg' });
    expect(splitName('李')).toEqual({ givenName: '李', familyName: '' });
  });
  it('compares without case, kinds of spaces and apostrophes, but keeps accents apart', () => {
    expect(nameKey(' O’SHEE\u00a0(Mill  Rd)')).toBe("o'shee (mill rd)");
    expect(nameKey('Nørgaard')).not.toBe(nameKey('Norgaard'));
  });
  it.each([['Søren Quarles', 'soren q'], ['Maëlle Zielonka', 'ziel mael'], ['Una O’Shee', "o'shee"], ['Straße', 'strasse'], ['漢字 Li', '漢']])('finds %s by %s', (name, typed) => expect(nameMatches(name, typed)).toBe(true));
  it.each([['Søren Quarles', 'sorin'], ['Una O’Shee', 'una quarles']])('does not find %s by %s', (name, typed) => expect(nameMatches(name, typed)).toBe(false));
  it('writes a name as on a plain keyboard', () => expect(plainName('Célia Grøntved')).toBe('celia grontved'));
});
