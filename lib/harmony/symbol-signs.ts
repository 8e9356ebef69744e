/** The signs people type, print and paste for the same thing, each brought to one plain letter (UnicodeData 15). */
const SIGNS: Record<string, string> = {
  '♭': 'b', '♯': '#', '𝄫': 'bb', '𝄪': '##', '♮': '',
  // Increment and the Greek letter look like the white triangle and are typed in its place.
  '△': '△', 'Δ': '△', '∆': '△',
  'ø': 'ø', 'Ø': 'ø', '∅': 'ø', '⦰': 'ø',
  '°': '°', 'º': '°',
  '−': '-', '–': '-', '‐': '-',
  '⁄': '/', '∕': '/', '（': '(', '）': ')',
  '²': '2', '⁴': '4', '⁵': '5', '⁶': '6', '⁷': '7', '⁹': '9', '⁺': '+',
  '\u00a0': ' ', '\u202f': ' ',
};

/** Sliced by code point: the double accidentals are two UTF-16 units each. Not NFKC, which would turn º into o. */
export const plainSigns = (typed: string): string => Array.from(typed.normalize('NFC'), (sign) => SIGNS[sign] ?? sign).join('').trim();
