import type { Chord } from './chord';
import type { VoicedNote } from './degree';
import { FORMS, stacksOfForm, type FormName } from './forms';
import { splitHands } from './hands';
import type { KeyNumber } from './note';
import { placementsOf, type Place } from './target';
import { leadingBetween, sortedDistance, type Leading } from './voice-leading';

/** One way to play one chord. */
export type VoicingOption = { notes: VoicedNote[]; keys: KeyNumber[]; label: string };

export type PathLimits = Place & {
  forms: readonly FormName[];
  /** The widest span of one hand; a voicing no split of the hands reaches is not offered. */
  reachSemitones?: number;
};

/** The voicings of a chord inside the register and the reach, the lowest first. */
export function voicingOptions(chord: Chord, { forms, reachSemitones, ...place }: PathLimits): VoicingOption[] {
  return forms
    .flatMap((form) => stacksOfForm(chord, form).flatMap((stack) => placementsOf(chord.root, stack, place).map((notes) => optionOf(notes, FORMS[form]))))
    .filter(({ keys }) => reachSemitones === undefined || splitHands(keys, reachSemitones).advice === 'fits')
    .sort((a, b) => (a.keys[0] ?? 0) - (b.keys[0] ?? 0));
}

export const optionOf = (notes: VoicedNote[], label: string): VoicingOption => ({ notes, keys: notes.map(({ key }) => key), label });

export type SmoothPath = { voicings: VoicingOption[]; /** semitones that all voices move in all */ cost: number; changes: Leading[] };

/**
 * The voicings that move least in all: exact, by dynamic programming over every option of every chord. Equal costs
 * are settled by the lower start, so that the same question has one answer. Null when a chord has no option.
 */
export function smoothestPath(options: readonly (readonly VoicingOption[])[]): SmoothPath | null {
  if (options.length === 0 || options.some((row) => row.length === 0)) return null;
  let costs = options[0]?.map(() => 0) ?? [];
  const cameFrom: number[][] = [];
  for (let at = 1; at < options.length; at += 1) {
    const step = cheapestArrivals(options[at - 1] ?? [], options[at] ?? [], costs);
    costs = step.costs;
    cameFrom.push(step.cameFrom);
  }
  const voicings = walkBack(options, cameFrom, indexOfLeast(costs));
  return { voicings, cost: Math.min(...costs), changes: voicings.slice(1).map(({ keys }, at) => leadingBetween(voicings[at]?.keys ?? [], keys)) };
}

function cheapestArrivals(before: readonly VoicingOption[], row: readonly VoicingOption[], costs: readonly number[]): { costs: number[]; cameFrom: number[] } {
  const [arrivals, cameFrom]: [number[], number[]] = [[], []];
  for (const { keys } of row) {
    let [least, from] = [Number.POSITIVE_INFINITY, 0];
    for (let at = 0; at < before.length; at += 1) {
      const cost = (costs[at] ?? 0) + sortedDistance(before[at]?.keys ?? [], keys);
      if (cost < least) [least, from] = [cost, at];
    }
    arrivals.push(least);
    cameFrom.push(from);
  }
  return { costs: arrivals, cameFrom };
}

const indexOfLeast = (costs: readonly number[]): number => costs.reduce((best, cost, at) => (cost < (costs[best] ?? 0) ? at : best), 0);

function walkBack(options: readonly (readonly VoicingOption[])[], cameFrom: readonly (readonly number[])[], last: number): VoicingOption[] {
  const path: VoicingOption[] = [];
  let at = last;
  for (let step = options.length - 1; step >= 0; step -= 1) {
    const chosen = options[step]?.[at];
    if (chosen) path.unshift(chosen);
    at = cameFrom[step - 1]?.[at] ?? 0;
  }
  return path;
}

/** The path for chords in a row; null when one of them fits nowhere. */
export const smoothestVoicings = (chords: readonly Chord[], limits: PathLimits): SmoothPath | null =>
  smoothestPath(chords.map((chord) => voicingOptions(chord, limits)));
