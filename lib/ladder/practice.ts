import type { NoteName } from '../harmony/note';
import { asksOf, judgeAsk, type DrawnKey } from './asks';
import { drawKeys, type KeyRecord } from './draw';
import { isKeyHeard, type HeardChord } from './hearing';
import { isSpoken, type RungText } from './play-spec';

/** From the lesson's set, come back for review, or the next rung to try ahead: that is practised, never marked. */
export type PracticeKind = 'set' | 'review' | 'ahead';
export type Feeling = 'easy' | 'fine' | 'hard';
export const FEELING_WORDS: Record<Feeling, string> = { easy: 'easy', fine: 'fine', hard: 'hard' };

/** Enough to bring it back, short enough to be done on a school day. */
const KEYS_OF_A_REVIEW = 3;
const KEYS_OF_A_TRY = 4;

type Rung = Pick<RungText, 'spec' | 'criteria'>;

/** The same words give the same number all day long, so that a page opened twice asks the same keys (FNV-1a, public domain). */
export function seedOf(text: string): number {
  let hash = 0x811c9dc5;
  for (let at = 0; at < text.length; at += 1) hash = Math.imul(hash ^ text.charCodeAt(at), 0x01000193);
  return hash >>> 0;
}

type Practice = { kind: PracticeKind; rung: Rung & Pick<RungText, 'keyPool'>; keys: readonly NoteName[]; seed: number; records: readonly KeyRecord[] };

/** Which keys are practised: those the teacher named, each with every turn of the rung; else a few, weak ones sooner. */
export function practiceKeys({ kind, rung, keys, seed, records }: Practice): DrawnKey[] {
  const turns = rung.spec.turns.map((_turn, turn) => turn);
  if (keys.length > 0) return keys.flatMap((key) => turns.map((turn) => ({ key, turn })));
  const count = Math.min(kind === 'review' ? KEYS_OF_A_REVIEW : KEYS_OF_A_TRY, rung.keyPool.length * turns.length);
  return drawKeys({ keyPool: rung.keyPool, turnCount: turns.length, count, isShuffled: rung.criteria.isShuffled, seed, records });
}

/** What came from the browser for one drawn key: keys as they were held, or the student's own word for what is told. */
export type PlayedKey = { chords: readonly { played: number[]; byEar: 'right' | 'not_right' | null }[] };
export type JudgedKey = DrawnKey & { isHeard: boolean; heard: HeardChord[] };

/** Judged again from the keys, without the clock: at home the notes count. A key that was not played is not heard. */
export function judgePractice(rung: Rung, drawn: readonly DrawnKey[], played: readonly PlayedKey[]): JudgedKey[] {
  const spoken = isSpoken(rung.spec.how);
  return drawn.map((one, at) => {
    const asks = asksOf(rung.spec, one);
    const heard = asks.flatMap((ask, chordAt): HeardChord[] => {
      const chord = played[at]?.chords[chordAt];
      if (!chord) return [];
      return [{ symbol: ask.symbol, played: [...chord.played], milliseconds: null, byEar: spoken ? chord.byEar : null, verdict: spoken ? null : judgeAsk(ask, chord.played) }];
    });
    return { ...one, heard, isHeard: isKeyHeard(heard, asks.length, { ...rung.criteria, seconds: undefined }) };
  });
}

/** Good when every key was heard. */
export const isGoodReview = (keys: readonly JudgedKey[]): boolean => keys.length > 0 && keys.every(({ isHeard }) => isHeard);
