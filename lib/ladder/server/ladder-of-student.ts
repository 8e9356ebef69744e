import 'server-only';
import { standingOf } from '@/db/ladder-standing';
import { editionOfStudent, levelsOf, needsOf, rungsOf, type Edition, type Level, type Rung } from '@/db/ladders';
import { findPerson, fullName, type Person } from '@/db/people';
import { notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { assertCan } from '@/policies/ability';
import { missingNeeds, type Need } from '../needs';
import { hasRung, nextRungs, type StudentRung } from '../rung-state';
import type { LadderLevel, StudentLadder } from '../student-ladder';

const NEXT_SHOWN = 5;

/** Where a student stands, for the teacher, the student and the guardian alike. Null while the school has no ladder. */
export async function ladderOfStudent(studentId: string, context: Context): Promise<StudentLadder | null> {
  const read = await readStanding(studentId, context);
  return read && toLadder(read);
}

export type Standing = { student: Person; edition: Edition; levels: Level[]; rungs: Rung[]; needs: Need[]; standing: StudentRung[] };

export async function readStanding(studentId: string, { db, ability }: Context): Promise<Standing | null> {
  assertCan(ability, 'read', 'Progress', { studentId });
  const student = await findPerson(db, studentId);
  if (!student?.isStudent || student.state === 'erased') throw notFound('progress');
  const edition = await editionOfStudent(db, studentId);
  if (!edition) return null;
  return {
    student, edition, levels: await levelsOf(db, edition.id), rungs: await rungsOf(db, edition.id), needs: await needsOf(db, edition.id),
    standing: await standingOf(db, studentId, edition.id),
  };
}

export function toLadder(read: Standing): StudentLadder {
  const { student, edition, levels, rungs, standing } = read;
  return {
    student: { id: student.id, name: fullName(student), firstName: student.calledName ?? student.givenName, reachSemitones: student.reachSemitones },
    editionLabel: edition.label,
    levels: levels.map((level) => toLevel(level, read)),
    passedCount: standing.filter(({ state }) => hasRung(state)).length,
    rungCount: rungs.length,
    next: nextRungs(standing, NEXT_SHOWN).map(({ rung }) => rung),
  };
}

function toLevel({ id, ...titles }: Level, { rungs, needs, standing }: Standing): LadderLevel {
  const passed = new Set(standing.filter(({ state }) => hasRung(state)).map(({ rung }) => rung));
  const states = new Map(standing.map((one) => [one.rung, one]));
  const own = rungs.filter(({ levelId }) => levelId === id).map((rung) => {
    const missing = missingNeeds(rung.id, needs, passed);
    const { id: rungId, code, title, plainTitle, canDo, soundsLike } = rung;
    return {
      id: rungId, code, title, plainTitle, canDo, soundsLike, state: states.get(rungId)?.state ?? 'locked' as const, since: states.get(rungId)?.since ?? null,
      missing: rungs.filter((other) => missing.includes(other.id)).map((other) => ({ title: other.title, plainTitle: other.plainTitle })),
    };
  });
  return { no: titles.no, title: titles.title, shortTitle: titles.shortTitle, plainTitle: titles.plainTitle, rungs: own };
}
