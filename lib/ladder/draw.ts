import type { DrawnKey } from './asks';
import type { NoteName } from '../harmony/note';

/** How often a key was asked of this student before, and how often it went wrong. */
export type KeyRecord = { key: NoteName; asked: number; wrong: number };

/**
 * Numbers from 0 up to 1 that the same seed always repeats (mulberry32, public domain), so that a draw can be
 * shown to have been fair long after.
 */
export function randomFrom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4_294_967_296;
  };
}

/** A key that always went right weighs 1, one that always went wrong 4; one never asked lies between. */
export function keyWeight(record: KeyRecord | undefined): number {
  return record && record.asked > 0 ? 1 + (3 * record.wrong) / record.asked : 2;
}

type Draw = { keyPool: readonly NoteName[]; turnCount: number; count: number; isShuffled: boolean; seed: number; records: readonly KeyRecord[] };

/**
 * Which keys this hearing asks, in which order. Every key of the pool comes once before one comes again; where not
 * all of them fit, weak keys come sooner. Without "shuffled" each round goes along the cycle of fourths. The turns
 * of the rung are dealt evenly, and no key gets the same turn twice while it has one it has not had.
 */
export function drawKeys({ keyPool, turnCount, count, isShuffled, seed, records }: Draw): DrawnKey[] {
  const random = randomFrom(seed);
  const drawn: DrawnKey[] = [];
  const hands = new Map(keyPool.map((key) => [key, [] as number[]]));
  let deck: number[] = [];
  while (drawn.length < count) {
    const round = weightedOrder(keyPool, records, random).slice(0, count - drawn.length);
    const ordered = isShuffled ? round : keyPool.filter((key) => round.includes(key));
    for (const key of ordered) {
      if (deck.length === 0) deck = shuffled(turnCount, random);
      const had = hands.get(key) ?? [];
      const at = Math.max(0, deck.findIndex((turn) => !had.includes(turn)));
      const [turn = 0] = deck.splice(at, 1);
      had.push(turn);
      drawn.push({ key, turn });
    }
  }
  return drawn;
}

function weightedOrder(keys: readonly NoteName[], records: readonly KeyRecord[], random: () => number): NoteName[] {
  const ranked = keys.map((key) => ({ key, rank: random() ** (1 / keyWeight(records.find((record) => record.key === key))) }));
  return ranked.sort((a, b) => b.rank - a.rank).map(({ key }) => key);
}

function shuffled(count: number, random: () => number): number[] {
  const ranked = Array.from({ length: count }, (_empty, turn) => ({ turn, rank: random() }));
  return ranked.sort((a, b) => a.rank - b.rank).map(({ turn }) => turn);
}
