import 'server-only';
import { hearingsOf } from '@/db/hearings';
import { allTerms } from '@/db/terms';
import type { Context } from '@/lib/server/context';
import type { LocalDate } from '@/lib/time';
import type { Outcome } from '../hearing';
import { progressWords, type ProgressWords } from '../progress-words';
import { projectedDate } from '../projection';
import { hasRung } from '../rung-state';
import type { StudentLadder } from '../student-ladder';
import { readStanding, toLadder, type Standing } from './ladder-of-student';

/** One decided hearing as the family reads it: the rung in plain words, the trade's name beside them, and the teacher's public note. */
export type PlainHearing = { id: string; plainTitle: string; title: string; outcome: Outcome; on: LocalDate; by: string; note: string };
export type StudentProgress = { ladder: StudentLadder; words: ProgressWords; hearings: PlainHearing[]; isReader: boolean };

const SHOWN = 12;

/** How far a student is, in plain words, for the guardian and the student. Notes for staff never leave the server. */
export async function progressOfStudent(studentId: string, context: Context): Promise<StudentProgress | null> {
  const read = await readStanding(studentId, context);
  if (!read) return null;
  const { db, actor } = context;
  const ladder = toLadder(read);
  const isReader = actor.role === 'student' && actor.personId === studentId;
  const texts = new Map(read.rungs.map((rung) => [rung.id, rung]));
  const decided = (await hearingsOf(db, studentId)).flatMap(({ id, rungId, outcome, decidedOn, assessorName, notePublic }): PlainHearing[] => {
    const text = texts.get(rungId);
    return text && outcome && decidedOn ? [{ id, plainTitle: text.plainTitle, title: text.title, outcome, on: decidedOn, by: assessorName, note: notePublic }] : [];
  });
  return { ladder, words: await wordsOf(read, ladder, { context, isReader }), hearings: decided.slice(0, SHOWN), isReader };
}

/** What can be played now and what comes next, as sentences for whoever reads. */
export async function wordsOf({ rungs, standing }: Standing, ladder: StudentLadder, { context, isReader }: { context: Context; isReader: boolean }): Promise<ProgressWords> {
  const { db, today, school } = context;
  const texts = new Map(rungs.map((rung) => [rung.id, rung]));
  const passed = standing.flatMap(({ rung, state, since }) => {
    const text = texts.get(rung);
    return text && since && hasRung(state) ? [{ ...text, on: since, isHeard: state === 'passed', isToRecheck: state === 'recheck_due' }] : [];
  });
  // The pace counts what was heard, not what was credited on one day or is in doubt since another.
  const passDates = passed.filter(({ isHeard }) => isHeard).map(({ on }) => on);
  return progressWords({
    name: ladder.student.firstName, isReader, passed, rungCount: ladder.rungCount, next: texts.get(ladder.next[0] ?? '') ?? null, today, locale: school.locale,
    projection: projectedDate(passDates, 1, await allTerms(db)),
  });
}
