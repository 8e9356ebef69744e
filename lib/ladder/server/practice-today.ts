import 'server-only';
import { keyRecords } from '@/db/hearings';
import { cardsOf, itemsOfSet, liveSet, logsSince, type PracticeLog } from '@/db/practice';
import type { Rung } from '@/db/ladders';
import { houseRulesOn } from '@/db/settings';
import type { ChordStyle } from '@/lib/harmony/chord-name';
import type { Context } from '@/lib/server/context';
import { addDays, type LocalDate } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import type { DrawnKey } from '../asks';
import type { Criteria, PlaySpec } from '../play-spec';
import { practiceKeys, seedOf, type PracticeKind } from '../practice';
import { dueReviews } from '../review';
import { readStanding, toLadder, type Standing } from './ladder-of-student';

export type PracticeRung = { id: string; code: string; title: string; plainTitle: string; canDo: string; soundsLike: string; spec: PlaySpec; criteria: Criteria; keys: DrawnKey[] };
export type PracticePiece = {
  /** Of the practice item, the review card, or the rung that is tried ahead. */
  id: string;
  kind: PracticeKind; rung: PracticeRung | null; text: string; beatsPerMinute: number | null; minutes: number | null; howRight: string; dueOn: LocalDate | null;
};
export type PracticeToday = {
  student: { id: string; firstName: string; reachSemitones: number };
  setBy: string | null; dueOn: LocalDate | null;
  pieces: PracticePiece[];
  minutesToday: number;
  /** The last fourteen days, oldest first. */
  days: { date: LocalDate; minutes: number }[];
  breakMinutes: number;
  chordStyle: ChordStyle;
};

const DAYS_SHOWN = 14;

/**
 * What a student practises today: what the teacher set, rungs that come back for review, and, when nothing else is
 * there, the next rung to try ahead. Null while the school has no ladder.
 */
export async function practiceToday({ studentId }: { studentId: string }, context: Context): Promise<PracticeToday | null> {
  const { db, ability, today, school } = context;
  assertCan(ability, 'read', 'Practice', { studentId });
  const read = await readStanding(studentId, context);
  if (!read) return null;
  const rules = await houseRulesOn(db, today);
  const set = await liveSet(db, studentId);
  const given = set ? await Promise.all((await itemsOfSet(db, set.id)).map((item) => piece(context, read, { ...item, kind: 'set', text: item.piece ?? '', dueOn: set.dueOn }))) : [];
  const due = dueReviews(await cardsOf(db, studentId), today, rules['practice.reviews_per_day']);
  const reviews = await Promise.all(due.map(({ id, rungId, dueOn }) => piece(context, read, { ...PLAIN, id, rungId, dueOn, kind: 'review' })));
  const known = [...given, ...reviews].filter((one) => one.rung !== null || one.text !== '');
  const next = toLadder(read).next[0];
  const ahead = known.some(({ kind }) => kind === 'set') || next === undefined ? [] : [await piece(context, read, { ...PLAIN, id: next, rungId: next, dueOn: null, kind: 'ahead' })];
  const logs = await logsSince(db, studentId, addDays(today, 1 - DAYS_SHOWN));
  return {
    student: { id: studentId, firstName: read.student.calledName ?? read.student.givenName, reachSemitones: read.student.reachSemitones }, setBy: set?.setByName ?? null, dueOn: set?.dueOn ?? null,
    pieces: [...known, ...ahead], minutesToday: minutesOn(logs, today), days: Array.from({ length: DAYS_SHOWN }, (_, at) => addDays(today, at + 1 - DAYS_SHOWN)).map((date) => ({ date, minutes: minutesOn(logs, date) })),
    breakMinutes: rules['practice.break_minutes'], chordStyle: school.chordStyle,
  };
}

const PLAIN = { keys: [], beatsPerMinute: null, minutes: null, howRight: '', text: '' };
const minutesOn = (logs: readonly PracticeLog[], date: LocalDate): number => logs.filter(({ practisedOn }) => practisedOn === date).reduce((sum, { minutes }) => sum + minutes, 0);

type Wanted = Omit<PracticePiece, 'rung'> & { rungId: string | null; keys: readonly string[] };

async function piece(context: Context, { rungs, student }: Standing, { id, rungId, kind, keys, text, beatsPerMinute, minutes, howRight, dueOn }: Wanted): Promise<PracticePiece> {
  const rung = rungs.find((one) => one.id === rungId);
  return { id, kind, text, beatsPerMinute: beatsPerMinute ?? rung?.criteria.tempo?.beatsPerMinute ?? null, minutes, howRight, dueOn, rung: rung ? await rungToPlay(context, rung, { id, kind, keys, studentId: student.id }) : null };
}

type Which = { id: string; kind: PracticeKind; keys: readonly string[]; studentId: string };

/** The keys of a piece on a day. Those of a review hang on nothing else, so that what comes back can be judged. */
export async function keysToday({ db, today }: Pick<Context, 'db' | 'today'>, rung: Rung, { id, kind, keys, studentId }: Which): Promise<DrawnKey[]> {
  return practiceKeys({ kind, rung, keys, seed: seedOf(`${id} ${today}`), records: kind === 'review' ? [] : await keyRecords(db, studentId, rung.id) });
}

async function rungToPlay(context: Context, rung: Rung, which: Which): Promise<PracticeRung> {
  const { id, code, title, plainTitle, canDo, soundsLike, spec, criteria } = rung;
  return { id, code, title, plainTitle, canDo, soundsLike, spec, criteria, keys: await keysToday(context, rung, which) };
}
