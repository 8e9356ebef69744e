import type { LocalDate } from '../time';

export type WorkType = 'lesson' | 'group' | 'trial' | 'recital' | 'rehearsal' | 'meeting' | 'admin' | 'training' | 'travel' | 'mileage';
export const WORK_WORDS: Record<WorkType, string> = {
  lesson: 'Lesson', group: 'Group', trial: 'Trial lesson', recital: 'Recital', rehearsal: 'Rehearsal', meeting: 'Meeting',
  admin: 'Office work', training: 'Training', travel: 'Travel between sites', mileage: 'Mileage',
};

/** What kind of work a kind of lesson is; what is not here is paid by the hour through time entries. */
export const WORK_OF_LESSON: Record<string, WorkType> = { single: 'lesson', make_up: 'lesson', trial: 'trial', group: 'group', ensemble: 'group', workshop: 'group', drop_in: 'group' };
export const isTaughtWork = (workType: WorkType): boolean => workType === 'lesson' || workType === 'group' || workType === 'trial';

export type PayRate = {
  id: string; engagementId: string; workType: WorkType;
  /** Each of these narrows the row; null fits everything. */
  lessonTypeId: string | null; lengthMinutes: number | null; seatsFrom: number | null; seatsTo: number | null; siteId: string | null;
  amountMinor: number; per: 'lesson' | 'hour' | 'mile'; validFrom: LocalDate; validTo: LocalDate | null;
};

export type RateWish = { engagementId: string; workType: WorkType; lessonTypeId: string | null; lengthMinutes: number | null; seats: number | null; siteId: string | null; on: LocalDate };
export type RateAnswer = { rate: PayRate; problem: null } | { rate: null; problem: string };

const isOpenOrSame = <T>(narrowing: T | null, wished: T | null) => narrowing === null || narrowing === wished;
const isInForce = (row: PayRate, on: LocalDate) => row.validFrom <= on && (row.validTo === null || on < row.validTo);

const fits = (row: PayRate, wish: RateWish): boolean =>
  row.engagementId === wish.engagementId && row.workType === wish.workType && isInForce(row, wish.on)
  && isOpenOrSame(row.lessonTypeId, wish.lessonTypeId) && isOpenOrSame(row.lengthMinutes, wish.lengthMinutes)
  && isOpenOrSame(row.siteId, wish.siteId) && fitsSeats(row, wish.seats);

const fitsSeats = ({ seatsFrom, seatsTo }: PayRate, seats: number | null): boolean =>
  seatsFrom === null || (seats !== null && seatsFrom <= seats && (seatsTo === null || seats <= seatsTo));

const weightOf = (row: PayRate): number =>
  [row.lessonTypeId, row.lengthMinutes, row.seatsFrom, row.siteId].filter((narrowing) => narrowing !== null).length;

/**
 * The rate in force for one piece of work: the row that narrows the most wins. No row, or two that narrow equally,
 * is a problem in words, never zero and never a guess (job map B13, catalogue C19).
 */
export function findRate(rows: readonly PayRate[], wish: RateWish): RateAnswer {
  const fitting = rows.filter((row) => fits(row, wish));
  const best = Math.max(...fitting.map(weightOf));
  const winners = fitting.filter((row) => weightOf(row) === best);
  const what = describe(wish);
  if (winners.length === 1 && winners[0]) return { rate: winners[0], problem: null };
  if (winners.length === 0) return { rate: null, problem: `There is no rate for ${what}.` };
  return { rate: null, problem: `${winners.length} rates fit ${what} equally well. End one of them.` };
}

function describe({ workType, lengthMinutes, seats }: RateWish): string {
  const length = lengthMinutes === null ? '' : ` of ${lengthMinutes} minutes`;
  return `${WORK_WORDS[workType].toLowerCase()}${length}${workType === 'group' && seats !== null ? ` with ${seats} seats` : ''}`;
}
