import { ATTENDANCE_WORDS, type Attendance, type MarkedAttendance } from '../calendar/attendance';
import type { DatedConsequences } from '../calendar/consequences';
import { say, sayPercent, type MoneyWords } from '../explained';
import { BASIS_POINTS, percentOf, ratioOf } from '../money';
import type { LocalDate, MinuteOfDay } from '../time';
import { payShareBp, substituteShareBp, type EngagementKind, type PayRule } from './pay-rules';
import { findRate, WORK_WORDS, type PayRate, type RateAnswer, type WorkType } from './rates';

export type PayLineKind = 'lesson' | 'group' | 'substitute' | 'absence' | 'other_time' | 'correction' | 'reimbursement';

/** A person's engagement on the day of the work. */
export type Worker = { engagementId: string; personId: string; name: string; kind: EngagementKind };
export type LessonFacts = {
  occurrenceId: string; localDate: LocalDate; startMin: MinuteOfDay; lengthMinutes: number;
  lessonTypeId: string; workType: WorkType; label: string; siteId: string;
  planned: Worker | null; taughtBy: Worker | null;
  seats: readonly { studentName: string; attendance: Attendance; countsForSize: boolean }[];
};
export type PayFacts = { rates: readonly PayRate[]; rules: readonly PayRule[]; consequences: readonly DatedConsequences[]; words: MoneyWords };

/** One amount with everything that explains it. `problem` is said in words and stands for no amount at all. */
export type PayLine = {
  engagementId: string; kind: PayLineKind; lineKey: string; occurrenceId: string | null; localDate: LocalDate; startMin: MinuteOfDay | null;
  text: string; minutes: number; rateId: string | null; rateMinor: number; shareBp: number; amountMinor: number; problem: string; explain: string[];
};

const NOT_MARKED = 'Not marked yet';
/** Where a line is put right: what is not marked, with the marks; everything else is a rate that is missing or doubtful. */
export const mendedBy = (problem: string): 'marks' | 'rates' => (problem.startsWith(NOT_MARKED) ? 'marks' : 'rates');

/**
 * What one lesson pays, from its attendance marks, the rates and the rules of its day (S26, S27). The substitute is paid
 * by HR7 and the absent teacher nothing; a group goes by its size at the start, not by who came. Rounded once per line.
 */
export function payLinesOfLesson(lesson: LessonFacts, facts: PayFacts): PayLine[] {
  const { planned, taughtBy } = lesson;
  const worker = taughtBy ?? planned;
  if (!worker) return [];
  const unmarked = lesson.seats.filter(({ attendance }) => attendance === 'expected');
  if (unmarked.length > 0) return [problemLine(lesson, worker, `${NOT_MARKED}: ${unmarked.map(({ studentName }) => studentName).join(', ')}.`)];
  if (!planned || planned.personId === worker.personId) return [ownLine(lesson, worker, facts)];
  return [substituteLine(lesson, worker, planned, facts), coveredLine(lesson, planned, worker)];
}

type Size = { seats: number; text: string };
const sizeOf = ({ seats }: LessonFacts): Size => {
  const count = seats.filter(({ countsForSize }) => countsForSize).length;
  return { seats: count, text: `group of ${count}` };
};

/** The share that the marks pay: of a group the best-paying mark counts, because the class was held or waited for. */
function shareOf(lesson: LessonFacts, worker: Worker, consequences: readonly DatedConsequences[]): { bp: number; mark: MarkedAttendance } {
  const marks = lesson.seats.map(({ attendance }) => attendance).filter((mark): mark is MarkedAttendance => mark !== 'expected');
  return marks.map((mark) => ({ mark, bp: payShareBp(mark, worker.kind, lesson.localDate, consequences) })).reduce((best, share) => (share.bp > best.bp ? share : best));
}

function rateFor(lesson: LessonFacts, worker: Worker, rates: readonly PayRate[]): RateAnswer {
  const wish = {
    engagementId: worker.engagementId, workType: lesson.workType, lessonTypeId: lesson.lessonTypeId, lengthMinutes: lesson.lengthMinutes,
    seats: lesson.workType === 'group' ? sizeOf(lesson).seats : null, siteId: lesson.siteId, on: lesson.localDate,
  };
  const answer = findRate(rates, wish);
  // A trial without a rate of its own is an ordinary lesson of that length.
  return answer.rate || lesson.workType !== 'trial' ? answer : findRate(rates, { ...wish, workType: 'lesson' });
}

const fullAmount = (rate: PayRate, minutes: number) => (rate.per === 'hour' ? ratioOf(rate.amountMinor, minutes, 60) : rate.amountMinor);
const sharedAmount = (rate: PayRate, minutes: number, bp: number) =>
  rate.per === 'hour' ? ratioOf(rate.amountMinor, minutes * bp, 60 * BASIS_POINTS) : percentOf(rate.amountMinor, bp);
const rateWords = (rate: PayRate, words: MoneyWords) => `${say(rate.amountMinor, words)}${rate.per === 'hour' ? ' an hour' : ''}`;

const whatOf = (lesson: LessonFacts) => `${lesson.lengthMinutes} min ${lesson.workType === 'group' ? sizeOf(lesson).text : lesson.label.toLowerCase()}`;
const studentsOf = ({ seats, workType, label }: LessonFacts) => (workType === 'group' ? label : seats.map(({ studentName }) => studentName).join(', '));

function ownLine(lesson: LessonFacts, worker: Worker, { rates, consequences, words }: PayFacts): PayLine {
  const { rate, problem } = rateFor(lesson, worker, rates);
  if (!rate) return problemLine(lesson, worker, problem);
  const { bp, mark } = shareOf(lesson, worker, consequences);
  const amountMinor = sharedAmount(rate, lesson.lengthMinutes, bp);
  const isTaught = bp === BASIS_POINTS;
  const share = isTaught ? '' : ` × ${sayPercent(bp)} (${ATTENDANCE_WORDS[mark]})`;
  return {
    ...baseLine(lesson, worker), kind: bp === 0 ? 'absence' : lesson.workType === 'group' ? 'group' : 'lesson',
    minutes: ratioOf(lesson.lengthMinutes, bp, BASIS_POINTS), rateId: rate.id, rateMinor: rate.amountMinor, shareBp: bp, amountMinor,
    text: `${studentsOf(lesson)}: ${ATTENDANCE_WORDS[mark]}`,
    explain: [`${whatOf(lesson)} at ${rateWords(rate, words)}${share} = ${say(amountMinor, words)}`],
  };
}

function substituteLine(lesson: LessonFacts, worker: Worker, absent: Worker, facts: PayFacts): PayLine {
  const isGroup = lesson.workType === 'group';
  const theirs = rateFor(lesson, absent, facts.rates);
  const own = isGroup ? theirs : rateFor(lesson, worker, facts.rates);
  if (!own.rate) return problemLine(lesson, worker, own.problem);
  const { bp } = shareOf(lesson, worker, facts.consequences);
  const full = fullAmount(own.rate, lesson.lengthMinutes);
  const floorBp = substituteShareBp(worker.kind, lesson.localDate, facts.rules);
  const floor = isGroup || floorBp === null || !theirs.rate ? null : { bp: floorBp, minor: percentOf(fullAmount(theirs.rate, lesson.lengthMinutes), floorBp) };
  const paidFull = Math.max(full, floor?.minor ?? 0);
  const amountMinor = percentOf(paidFull, bp);
  const share = bp === BASIS_POINTS ? '' : ` × ${sayPercent(bp)}`;
  return {
    ...baseLine(lesson, worker), kind: 'substitute', minutes: ratioOf(lesson.lengthMinutes, bp, BASIS_POINTS), rateId: own.rate.id,
    rateMinor: paidFull, shareBp: bp, amountMinor, text: `${studentsOf(lesson)}: covered for ${absent.name}`,
    explain: [`Cover, ${choiceWords(lesson, full, floor, facts.words)}${share} = ${say(amountMinor, facts.words)}`],
  };
}

function choiceWords(lesson: LessonFacts, full: number, floor: { bp: number; minor: number } | null, words: MoneyWords): string {
  if (floor) return `the larger of your own rate, ${say(full, words)}, and ${sayPercent(floor.bp)} of the absent teacher’s, ${say(floor.minor, words)}`;
  return `${whatOf(lesson)} ${lesson.workType === 'group' ? 'keeps the rate of the class' : 'at your own rate'}, ${say(full, words)}`;
}

const coveredLine = (lesson: LessonFacts, absent: Worker, worker: Worker): PayLine => ({
  ...baseLine(lesson, absent), kind: 'absence', shareBp: 0, text: `${studentsOf(lesson)}: taught by ${worker.name}`,
  explain: [`Taught by ${worker.name}, who is paid for it`],
});

const problemLine = (lesson: LessonFacts, worker: Worker, problem: string): PayLine => ({
  ...baseLine(lesson, worker), kind: lesson.workType === 'group' ? 'group' : 'lesson', text: studentsOf(lesson), problem, explain: [problem],
});

const baseLine = (lesson: LessonFacts, worker: Worker) => ({
  engagementId: worker.engagementId, lineKey: `lesson:${lesson.occurrenceId}`, occurrenceId: lesson.occurrenceId, localDate: lesson.localDate,
  startMin: lesson.startMin, minutes: 0, rateId: null, rateMinor: 0, shareBp: BASIS_POINTS, amountMinor: 0, problem: '',
});

export type TimeFacts = { timeEntryId: string; engagementId: string; workType: WorkType; localDate: LocalDate; minutes: number; siteId: string | null; note: string };

/** Other work by the hour: recitals, rehearsals, meetings, office, travel between sites (S26, S30). */
export function payLineOfTime(entry: TimeFacts, { rates, words }: PayFacts): PayLine {
  const name = WORK_WORDS[entry.workType];
  const base = {
    engagementId: entry.engagementId, kind: 'other_time' as const, lineKey: `time:${entry.timeEntryId}`, occurrenceId: null, localDate: entry.localDate, startMin: null,
    text: entry.note === '' ? name : `${name}: ${entry.note}`, minutes: entry.minutes, shareBp: BASIS_POINTS,
  };
  const { rate, problem } = findRate(rates, { ...entry, lessonTypeId: null, lengthMinutes: null, seats: null, on: entry.localDate });
  if (!rate) return { ...base, rateId: null, rateMinor: 0, amountMinor: 0, problem, explain: [problem] };
  const amountMinor = ratioOf(rate.amountMinor, entry.minutes, 60);
  const sentence = `${name}, ${hoursText(entry.minutes)} at ${rateWords(rate, words)} = ${say(amountMinor, words)}`;
  return { ...base, rateId: rate.id, rateMinor: rate.amountMinor, amountMinor, problem: '', explain: [sentence] };
}

/** "1.5 h", "25 min". */
export const hoursText = (minutes: number): string => (minutes < 60 ? `${minutes} min` : `${Math.round(minutes / 6) / 10} h`);

export type MileageFacts = { mileageEntryId: string; engagementId: string; localDate: LocalDate; milesTenths: number; rateMinorPerMile: number; route: string };

/** A reimbursement, kept apart from wages (S30). */
export function payLineOfMileage(entry: MileageFacts, words: MoneyWords): PayLine {
  const amountMinor = ratioOf(entry.rateMinorPerMile, entry.milesTenths, 10);
  const miles = `${Math.trunc(entry.milesTenths / 10)}.${entry.milesTenths % 10} miles`;
  return {
    engagementId: entry.engagementId, kind: 'reimbursement', lineKey: `mileage:${entry.mileageEntryId}`, occurrenceId: null, localDate: entry.localDate, startMin: null,
    text: `Mileage, ${entry.route}`, minutes: 0, rateId: null, rateMinor: entry.rateMinorPerMile, shareBp: BASIS_POINTS, amountMinor, problem: '',
    explain: [`${miles} at ${say(entry.rateMinorPerMile, words)} = ${say(amountMinor, words)}`],
  };
}
