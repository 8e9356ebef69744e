import type { KeyNumber } from './note';

/** What one voice does at a change of chords. A voice that begins or ends there has no move. */
export type VoiceMove = { from: KeyNumber; to: KeyNumber; semitones: number };
export type Parallel = { kind: 'fifths' | 'octaves'; lower: VoiceMove; upper: VoiceMove };

export type Leading = {
  /** From the bottom up. */
  moves: VoiceMove[];
  /** Semitones that all voices move, added up. */
  distance: number;
  /** The same without the lowest voice: a bass that plays roots leaps by its nature. */
  distanceAboveBass: number;
  largestLeap: number;
  /** Semitones of the top voice, down is negative. */
  topMoves: number;
  parallels: Parallel[];
};

const ascending = (keys: readonly KeyNumber[]): KeyNumber[] => [...keys].sort((a, b) => a - b);

/**
 * How the voices of one chord go to the next: paired from the bottom up, which for equal numbers is the pairing
 * with the least movement. With unequal numbers the smaller chord takes those voices of the larger that make the
 * least movement, without crossing; the others begin or end.
 */
export function leadingBetween(from: readonly KeyNumber[], to: readonly KeyNumber[]): Leading {
  const pairs = pairVoices(ascending(from), ascending(to));
  const moves = pairs.map(([a, b]): VoiceMove => ({ from: a, to: b, semitones: b - a }));
  const sizes = moves.map(({ semitones }) => Math.abs(semitones));
  const distance = sizes.reduce((sum, size) => sum + size, 0);
  return {
    moves, distance, distanceAboveBass: distance - (sizes[0] ?? 0), largestLeap: Math.max(0, ...sizes),
    topMoves: (ascending(to).at(-1) ?? 0) - (ascending(from).at(-1) ?? 0), parallels: parallelsOf(moves),
  };
}

/** Semitones that all voices move, both chords from the bottom up: the figure of `leadingBetween` alone, for the path finder’s inner loop. */
export function sortedDistance(from: readonly KeyNumber[], to: readonly KeyNumber[]): number {
  if (from.length !== to.length) return from.length < to.length ? unevenDistance(from, to) : unevenDistance(to, from);
  let distance = 0;
  for (let at = 0; at < from.length; at += 1) distance += Math.abs((from[at] ?? 0) - (to[at] ?? 0));
  return distance;
}

/** The pairing of `fewInMany`, its cost only: `costs[at]` is the least when the voices so far end at or below `at`. */
function unevenDistance(few: readonly KeyNumber[], many: readonly KeyNumber[]): number {
  const costs = new Array<number>(many.length + 1).fill(0);
  for (const [row, key] of few.entries()) {
    let before = costs[row] ?? 0;
    costs[row] = Number.POSITIVE_INFINITY;
    for (let at = row; at < many.length; at += 1) {
      const cost = Math.min(before + Math.abs((many[at] ?? 0) - key), costs[at] ?? Number.POSITIVE_INFINITY);
      before = costs[at + 1] ?? 0;
      costs[at + 1] = cost;
    }
  }
  return costs[many.length] ?? 0;
}

type Pair = readonly [KeyNumber, KeyNumber];

function pairVoices(from: readonly KeyNumber[], to: readonly KeyNumber[]): Pair[] {
  if (from.length === to.length) return from.map((key, at): Pair => [key, to[at] ?? key]);
  if (from.length > to.length) return pairVoices(to, from).map(([a, b]): Pair => [b, a]);
  return fewInMany(from, to);
}

/** Each of the few goes to one of the many, in order, at the least cost. */
function fewInMany(few: readonly KeyNumber[], many: readonly KeyNumber[]): Pair[] {
  type Choice = { cost: number; pairs: Pair[] };
  const none: Choice = { cost: Number.POSITIVE_INFINITY, pairs: [] };
  const begin: Choice = { cost: 0, pairs: [] };
  const going = (before: Choice, key: KeyNumber, goal: KeyNumber): Choice => ({ cost: before.cost + Math.abs(goal - key), pairs: [...before.pairs, [key, goal]] });
  let best: Choice[] = [];
  for (const [row, key] of few.entries()) {
    let before = row === 0 ? begin : none;
    const reached = best;
    best = many.map((goal, at) => {
      if (row > 0 && at > 0) before = cheaper(before, reached[at - 1] ?? none);
      return going(before, key, goal);
    });
  }
  return best.reduce(cheaper, none).pairs;
}

const cheaper = <Choice extends { cost: number }>(a: Choice, b: Choice): Choice => (b.cost < a.cost ? b : a);

/**
 * Two voices a fifth or an octave apart that both move and stay so, compounds counted as the simple interval (Open
 * Music Theory, "First species": a fifth to a twelfth counts). A voice that stays makes oblique motion, never a
 * parallel; a diminished fifth that opens to a plain one is none. Information, not a fault: rootless forms have them.
 */
function parallelsOf(moves: readonly VoiceMove[]): Parallel[] {
  const found: Parallel[] = [];
  for (const [at, lower] of moves.entries()) {
    for (const upper of moves.slice(at + 1)) {
      const [before, after] = [(upper.from - lower.from) % 12, (upper.to - lower.to) % 12];
      const isSame = before === after && (before === 0 || before === 7);
      if (isSame && lower.semitones !== 0 && upper.semitones !== 0) found.push({ kind: before === 7 ? 'fifths' : 'octaves', lower, upper });
    }
  }
  return found;
}
