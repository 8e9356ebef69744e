import { semitonesOf, type Degree } from './degree';

/** A chord symbol taken apart: what stands after the root. */
export type QualityParts = {
  third: Degree | null;
  fifth: Degree | null;
  seventh: Extract<Degree, '6' | 'bb7' | 'b7' | '7'> | null;
  /** The highest tension that is stacked in thirds, 9 for "Cm9"; 0 without. */
  top: 0 | 9 | 11 | 13;
  altered: Degree[];
  added: Degree[];
  left: Degree[];
  /** "alt": root, third and seventh stand, fifth and ninth are altered in no one definite way. */
  isAlt: boolean;
};

/** The degrees of a chord from the root up, as the symbol states them. */
export function degreesOfParts(parts: QualityParts): Degree[] {
  if (parts.isAlt) return ['1', '3', 'b7'];
  const stacked: Degree[] = ['1', ...present(parts.third), ...present(parts.fifth), ...present(parts.seventh), ...tensions(parts)];
  const kept = stacked.filter((degree) => !isReplaced(degree, parts.altered) && !parts.left.includes(degree));
  return [...new Set([...kept, ...parts.altered, ...parts.added])].sort((a, b) => semitonesOf(a) - semitonesOf(b));
}

const present = (degree: Degree | null): Degree[] => (degree ? [degree] : []);

/** A thirteenth leaves the natural 11 out above a major third, because the two clash; above a minor third it stays. */
function tensions({ top, third }: QualityParts): Degree[] {
  const isSus = third === '4' || third === '2';
  switch (top) {
    case 0: return [];
    case 9: return ['9'];
    case 11: return isSus ? ['9'] : ['9', '11'];
    case 13: return third === 'b3' ? ['9', '11', '13'] : ['9', '13'];
  }
}

const REPLACES: Partial<Record<Degree, Degree>> = { b5: '5', '#5': '5', b9: '9', '#9': '9', '#11': '11', b13: '13' };
const isReplaced = (degree: Degree, altered: readonly Degree[]): boolean => altered.some((change) => REPLACES[change] === degree);

/** One plain spelling for every way of writing the same chord: "m7b5" for ø7, "7#5" for +7, "m(maj7)" for −△7. */
export function suffixOfParts(parts: QualityParts): string {
  if (parts.isAlt) return '7alt';
  const whole = wholeNameOf(parts);
  const altered = [...present(parts.fifth).filter((fifth) => fifth !== '5' && !whole.isFifthSaid), ...parts.altered];
  const signs = [...new Set(altered)].sort((a, b) => semitonesOf(a) - semitonesOf(b)).join('');
  const added = parts.added.filter((degree) => !(degree === '9' && whole.text.endsWith('6/9')));
  const text = whole.text + sus(parts) + (whole.text + sus(parts) === '' && signs ? `(${signs})` : signs);
  return text + added.map((degree) => `add${degree}`).join('') + parts.left.map((degree) => `no${degree}`).join('');
}

function wholeNameOf(parts: QualityParts): { text: string; isFifthSaid: boolean } {
  const triad = parts.seventh === null ? TRIAD_NAMES[`${parts.third ?? 'none'} ${parts.fifth ?? 'none'}`] : undefined;
  const text = parts.seventh === 'bb7' ? 'dim7' : triad;
  if (text !== undefined) return { text, isFifthSaid: true };
  return { text: (parts.third === 'b3' ? 'm' : '') + seventhName(parts), isFifthSaid: false };
}

const TRIAD_NAMES: Record<string, string | undefined> = { 'none 5': '5', 'b3 b5': 'dim', '3 #5': 'aug' };

function seventhName({ seventh, top, added, third }: QualityParts): string {
  const number = top === 0 ? 7 : top;
  if (seventh === '6') return added.includes('9') ? '6/9' : '6';
  if (seventh === 'b7') return String(number);
  if (seventh === '7') return third === 'b3' ? `(maj${number})` : `maj${number}`;
  return '';
}

const sus = ({ third }: QualityParts): string => (third === '4' ? 'sus4' : third === '2' ? 'sus2' : '');
