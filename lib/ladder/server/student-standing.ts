import 'server-only';
import { hearingsOf, keysHeardIn, type Hearing } from '@/db/hearings';
import type { Rung } from '@/db/ladders';
import { creditsOf, rechecksOf, type AskedRecheck, type RungCredit } from '@/db/rung-history';
import type { ChordStyle } from '@/lib/harmony/chord-name';
import type { Context } from '@/lib/server/context';
import type { LocalDate } from '@/lib/time';
import { may } from '@/policies/ability';
import { drawnLabel } from '../asks';
import type { Outcome } from '../hearing';
import type { ProgressWords } from '../progress-words';
import { hasRung, type StudentRung } from '../rung-state';
import { currentLevel, type LadderRung, type StudentLadder } from '../student-ladder';
import { readStanding, toLadder, type Standing } from './ladder-of-student';
import { wordsOf } from './progress-of-student';

export type PassedRung = { id: string; code: string; title: string; on: LocalDate | null; /** "heard by Greta Dahl", or why it was credited */ how: string; isToRecheck: boolean };
export type HeardRung = {
  id: string; code: string; title: string; outcome: Outcome; on: LocalDate; by: string;
  keysHeard: string[]; keysMissed: string[]; notePublic: string; notePrivate: string;
};
export type OpenRecheck = { rungId: string; code: string; title: string; /** empty where a later hearing, not a request, left it open */ reason: string; by: string | null; on: LocalDate | null };
export type StudentStanding = {
  ladder: StudentLadder; words: ProgressWords; level: { no: number; title: string; passed: number; count: number } | null;
  next: LadderRung[]; passed: PassedRung[]; hearings: HeardRung[]; rechecks: OpenRecheck[];
  may: { hear: boolean; askRecheck: boolean };
};

/**
 * Where a student stands, for staff: level, passed rungs with day and teacher, hearings with their keys, what comes
 * next and what is to be heard once more. Null for who may not read progress, as the desk, and while there is no
 * ladder; notes for staff only go to those who may read them.
 */
export async function studentStanding(studentId: string, context: Context): Promise<StudentStanding | null> {
  const { db, ability, actor } = context;
  if (!may(ability, 'read', 'Progress', { studentId })) return null;
  const read = await readStanding(studentId, context);
  if (!read) return null;
  const ladder = toLadder(read);
  const hearings = may(ability, 'read', 'Hearing', { studentId }) ? await hearingsOf(db, studentId) : [];
  const seesNotes = may(ability, 'read', 'HearingNote', { studentId });
  return {
    ladder, words: await wordsOf(read, ladder, { context, isReader: false }), level: levelOf(ladder),
    next: ladder.next.flatMap((id) => ladder.levels.flatMap(({ rungs }) => rungs.filter((rung) => rung.id === id))),
    passed: passedRungs(read, hearings, await creditsOf(db, studentId)),
    hearings: await heardRungs(read, hearings, { context, seesNotes }),
    rechecks: openRechecks(read, seesNotes ? await rechecksOf(db, studentId) : []),
    may: { hear: may(ability, 'create', 'Hearing', { studentId, assessorId: actor.personId }), askRecheck: may(ability, 'create', 'Recheck', { studentId }) },
  };
}

function levelOf(ladder: StudentLadder): StudentStanding['level'] {
  const level = currentLevel(ladder);
  return level ? { no: level.no, title: level.title, passed: level.rungs.filter(({ state }) => hasRung(state)).length, count: level.rungs.length } : null;
}

const textOf = ({ rungs }: Standing, rungId: string): Rung | undefined => rungs.find(({ id }) => id === rungId);

/** The latest on top. */
function passedRungs(read: Standing, hearings: readonly Hearing[], credits: readonly RungCredit[]): PassedRung[] {
  return read.standing.filter(({ state }) => hasRung(state)).flatMap((one) => {
    const text = textOf(read, one.rung);
    return text ? [{ id: text.id, code: text.code, title: text.title, isToRecheck: one.state === 'recheck_due', ...passedWhen(one, hearings, credits) }] : [];
  }).reverse().sort((a, b) => (b.on ?? '').localeCompare(a.on ?? ''));
}

function passedWhen({ rung, since, hearingId }: StudentRung, hearings: readonly Hearing[], credits: readonly RungCredit[]): Pick<PassedRung, 'on' | 'how'> {
  const heard = hearings.find(({ id }) => id === hearingId);
  if (heard) return { on: heard.decidedOn, how: `heard by ${heard.assessorName}` };
  const credit = credits.find(({ rungId }) => rungId === rung);
  return credit ? { on: credit.creditedOn, how: `credited by ${credit.byName}: ${credit.reason}` } : { on: since, how: 'credited' };
}

const SHOWN = 20;

async function heardRungs(read: Standing, hearings: readonly Hearing[], { context, seesNotes }: { context: Context; seesNotes: boolean }): Promise<HeardRung[]> {
  const decided = hearings.filter(({ outcome }) => outcome !== null).slice(0, SHOWN);
  const heard = await keysHeardIn(context.db, decided.map(({ id }) => id));
  return decided.flatMap((hearing) => {
    const { id, outcome, decidedOn, assessorName, notePublic, notePrivate } = hearing;
    const text = textOf(read, hearing.rungId);
    if (!text || !outcome || !decidedOn) return [];
    const keys = keysOf(hearing, text, { heard: heard.get(id) ?? new Set<number>(), style: context.school.chordStyle });
    return [{ id, code: text.code, title: text.title, outcome, on: decidedOn, by: assessorName, ...keys, notePublic, notePrivate: seesNotes ? notePrivate : '' }];
  });
}

function keysOf({ drawn }: Hearing, { spec }: Rung, { heard, style }: { heard: ReadonlySet<number>; style: ChordStyle }): Pick<HeardRung, 'keysHeard' | 'keysMissed'> {
  const labels = drawn.map((one, no) => ({ label: drawnLabel(spec, one, style), isHeard: heard.has(no) }));
  return { keysHeard: labels.filter(({ isHeard }) => isHeard).map(({ label }) => label), keysMissed: labels.filter(({ isHeard }) => !isHeard).map(({ label }) => label) };
}

const openRechecks = (read: Standing, asked: readonly AskedRecheck[]): OpenRecheck[] =>
  read.standing.filter(({ state }) => state === 'recheck_due').flatMap(({ rung }) => {
    const [text, request] = [textOf(read, rung), asked.find(({ rungId }) => rungId === rung)];
    return text ? [{ rungId: rung, code: text.code, title: text.title, reason: request?.reasonPrivate ?? '', by: request?.byName ?? null, on: request?.askedOn ?? null }] : [];
  });
