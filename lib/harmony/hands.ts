import { plural } from '../format';
import type { KeyNumber } from './note';

const FINGERS = 5;

export type Hands = {
  left: KeyNumber[];
  right: KeyNumber[];
  leftSpan: number;
  rightSpan: number;
  span: number;
  /** `fits`: both hands reach. `drop_fifth`: it fits without the plain fifth. `roll`: play it from the bottom up. */
  advice: 'fits' | 'drop_fifth' | 'roll';
};

const spanOf = (keys: readonly KeyNumber[]): number => (keys.length === 0 ? 0 : (keys.at(-1) ?? 0) - (keys[0] ?? 0));

/**
 * Shares a voicing between the hands so that neither passes the student's reach: the left takes as many keys
 * from the bottom as it reaches, the right the rest. What fits no way is played without its plain fifth or
 * rolled; a stretch is never asked for.
 *
 * @param keys from the bottom up
 * @param fifth the key of a plain fifth in it, which may be left out
 */
export function splitHands(keys: readonly KeyNumber[], reachSemitones: number, fifth?: KeyNumber): Hands {
  const whole = widestLeft(keys, reachSemitones);
  if (whole) return { ...whole, span: spanOf(keys), advice: 'fits' };
  const thinned = keys.filter((key) => key !== fifth);
  const withoutFifth = thinned.length < keys.length ? widestLeft(thinned, reachSemitones) : null;
  if (withoutFifth) return { ...withoutFifth, span: spanOf(thinned), advice: 'drop_fifth' };
  const half = Math.ceil(keys.length / 2);
  return { ...sharedAt(keys, half), span: spanOf(keys), advice: 'roll' };
}

function widestLeft(keys: readonly KeyNumber[], reach: number): Omit<Hands, 'span' | 'advice'> | null {
  for (let count = Math.min(FINGERS, keys.length); count >= 0; count -= 1) {
    const hands = sharedAt(keys, count);
    if (hands.leftSpan <= reach && hands.rightSpan <= reach && hands.right.length <= FINGERS) return hands;
  }
  return null;
}

function sharedAt(keys: readonly KeyNumber[], count: number): Omit<Hands, 'span' | 'advice'> {
  const [left, right] = [keys.slice(0, count), keys.slice(count)];
  return { left, right, leftSpan: spanOf(left), rightSpan: spanOf(right) };
}

/** What the hands panel says; general information, not medical advice. */
export function handsSentence({ span, left, right, leftSpan, rightSpan, advice }: Hands): string {
  const hands = right.length === 0 ? 'in one hand' : `over two hands: left ${leftSpan}, right ${rightSpan}`;
  const wide = `Span here is ${plural(span, 'semitone')} ${left.length === 0 ? 'in the right hand' : hands}.`;
  const said = { fits: '', drop_fifth: ' For this reach the 5th may be left out.', roll: ' For this reach it is rolled from the bottom up; rolled counts.' };
  return `${wide}${said[advice]} Stop if a stretch hurts; re-spread the voicing instead.`;
}
