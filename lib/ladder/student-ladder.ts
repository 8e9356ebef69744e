import type { RungState } from './rung-state';
import type { LocalDate } from '../time';

/** A student's ladder as every reader sees it; what a reader may not see is not in it. */
export type LadderRung = {
  id: string; code: string; title: string; plainTitle: string; canDo: string; soundsLike: string;
  state: RungState; since: LocalDate | null;
  /** Titles of the rungs that must be passed first and are not. */
  missing: { title: string; plainTitle: string }[];
};
export type LadderLevel = { no: number; title: string; shortTitle: string; plainTitle: string; rungs: LadderRung[] };
export type StudentLadder = {
  student: { id: string; name: string; firstName: string; reachSemitones: number };
  editionLabel: string;
  levels: LadderLevel[];
  passedCount: number;
  rungCount: number;
  /** Ids of the rungs to climb next, nearest first. */
  next: string[];
};

/** The level a student is at: that of the nearest next rung, else the last. */
export const currentLevel = ({ levels, next }: Pick<StudentLadder, 'levels' | 'next'>): LadderLevel | undefined =>
  levels.find(({ rungs }) => rungs.some(({ id }) => id === next[0])) ?? levels.at(-1);

/** So many levels round the current one, for a small picture: one below it where there is one, the rest above. */
export function levelsAround({ levels, next }: Pick<StudentLadder, 'levels' | 'next'>, count: number): LadderLevel[] {
  const current = currentLevel({ levels, next });
  const at = current ? levels.indexOf(current) : 0;
  const first = Math.max(0, Math.min(at - 1, levels.length - count));
  return levels.slice(first, first + count);
}
