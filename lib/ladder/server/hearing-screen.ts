import 'server-only';
import { hearingsOf, hearingUnderWay, lastTries, proofsOf, type Hearing } from '@/db/hearings';
import { lastLessonAim, lessonOnDay, openAgreement } from '@/db/ladder-standing';
import type { Rung } from '@/db/ladders';
import { qualificationsOn } from '@/db/teachers';
import { notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { clockOf, type LocalDate } from '@/lib/time';
import { may } from '@/policies/ability';
import type { ChordStyle } from '@/lib/harmony/chord-name';
import type { DrawnKey } from '../asks';
import type { HeardChord, Outcome, StartProblem } from '../hearing';
import type { Criteria, PlaySpec } from '../play-spec';
import type { StudentLadder } from '../student-ladder';
import { undoSecondsLeft } from '../undo';
import { readStanding, toLadder, type Standing } from './ladder-of-student';
import { problemsOf } from './start-hearing';

export type PastHearing = { id: string; outcome: Outcome; on: LocalDate; by: string; keysHeard: number; notePublic: string; notePrivate: string };
export type HearingUnderWay = { id: string; byId: string; byName: string; isOwn: boolean; drawn: DrawnKey[]; tries: { drawnNo: number; isHeard: boolean; heard: HeardChord[] }[] };
/** Decided by this teacher a moment ago: it may still be taken back. */
export type JustDecided = { id: string; title: string; outcome: Outcome; secondsLeft: number };
export type HearingScreen = {
  ladder: StudentLadder;
  lesson: { id: string; time: string; roomName: string | null } | null;
  lastAim: string | null;
  rung: { id: string; code: string; title: string; canDo: string; spec: PlaySpec; criteria: Criteria; keysDrawn: number; keysNeeded: number; levelNo: number; state: string } | null;
  problems: StartProblem[];
  hasAgreement: boolean;
  may: { hear: boolean; agree: boolean; isQualified: boolean };
  underWay: HearingUnderWay | null;
  past: PastHearing[];
  justDecided: JustDecided[];
  chordStyle: ChordStyle;
};

/** Everything the teacher has before them while hearing a student. Null while the school has no ladder. */
export async function hearingScreen({ studentId, rungId }: { studentId: string; rungId?: string }, context: Context): Promise<HearingScreen | null> {
  const { db, ability, actor, today, school } = context;
  if (!may(ability, 'read', 'HearingNote', { studentId })) throw notFound('hearing');
  const read = await readStanding(studentId, context);
  if (!read) return null;
  const [ladder, hearings, lesson] = [toLadder(read), await hearingsOf(db, studentId), await lessonOnDay(db, studentId, today)];
  const rung = chosenRung(read, { ladder, hearings, wanted: rungId, assessorId: actor.personId });
  return {
    ladder, lesson: lesson ? { id: lesson.id, time: clockOf(lesson.startMin), roomName: lesson.roomName } : null, lastAim: await lastLessonAim(db, studentId),
    rung: rung ? rungOnScreen(rung, read) : null,
    problems: rung ? await problemsOf(db, context, { student: read.student, edition: read.edition, rung }) : [],
    hasAgreement: rung ? (await openAgreement(db, studentId, rung.id)) !== undefined : false,
    may: {
      hear: may(ability, 'create', 'Hearing', { studentId, assessorId: actor.personId }),
      agree: may(ability, 'approve', 'Hearing', { studentId }),
      isQualified: rung ? await isQualified(context, read, rung) : false,
    },
    underWay: rung ? await underWayOf(context, studentId, rung) : null,
    past: hearings.filter((hearing) => hearing.rungId === rung?.id).flatMap(toPast),
    justDecided: justDecided(read, hearings, context),
    chordStyle: school.chordStyle,
  };
}

type Choice = { ladder: StudentLadder; hearings: readonly Hearing[]; wanted: string | undefined; assessorId: string };

/** The rung in the address; else the one this teacher is hearing; else the nearest next one. */
function chosenRung({ rungs }: Standing, { ladder, hearings, wanted, assessorId }: Choice): Rung | undefined {
  const open = hearings.find((hearing) => hearing.outcome === null && hearing.assessorId === assessorId)?.rungId;
  const named = rungs.find(({ id }) => id === wanted);
  return named ?? rungs.find(({ id }) => id === open) ?? rungs.find(({ id }) => id === ladder.next[0]) ?? rungs.at(-1);
}

/** The newest decision on each rung, if it is this teacher's own and its ten minutes are not over. */
function justDecided({ rungs }: Standing, hearings: readonly Hearing[], { actor, now }: Context): JustDecided[] {
  return hearings.filter((hearing, at) => hearings.findIndex(({ rungId }) => rungId === hearing.rungId) === at && hearing.assessorId === actor.personId)
    .flatMap(({ id, rungId, outcome, decidedAt }) => {
      const secondsLeft = decidedAt === null ? 0 : undoSecondsLeft(decidedAt, now);
      return outcome && secondsLeft > 0 ? [{ id, outcome, secondsLeft, title: rungs.find((rung) => rung.id === rungId)?.title ?? 'This rung' }] : [];
    });
}

const rungOnScreen = ({ id, code, title, canDo, spec, criteria, keysDrawn, keysNeeded, levelNo }: Rung, { standing }: Standing) =>
  ({ id, code, title, canDo, spec, criteria, keysDrawn, keysNeeded, levelNo, state: standing.find(({ rung }) => rung === id)?.state ?? 'locked' });

async function isQualified({ db, actor, today }: Context, { edition }: Standing, { levelNo }: Rung): Promise<boolean> {
  const all = await qualificationsOn(db, edition.subjectId, today);
  return all.some(({ personId, levelFrom, levelTo }) => personId === actor.personId && levelFrom <= levelNo && levelNo <= levelTo);
}

async function underWayOf({ db, actor }: Context, studentId: string, rung: Rung): Promise<HearingUnderWay | null> {
  const hearing = await hearingUnderWay(db, studentId, rung.id);
  if (!hearing) return null;
  const tries = [...lastTries(await proofsOf(db, hearing.id)).values()].map(({ drawnNo, isHeard, heard }) => ({ drawnNo, isHeard, heard }));
  return { id: hearing.id, byId: hearing.assessorId, byName: hearing.assessorName, isOwn: hearing.assessorId === actor.personId, drawn: hearing.drawn, tries };
}

const toPast = ({ id, outcome, decidedOn, assessorName, keysHeard, notePublic, notePrivate }: Hearing): PastHearing[] =>
  (outcome && decidedOn ? [{ id, outcome, on: decidedOn, by: assessorName, keysHeard: keysHeard ?? 0, notePublic, notePrivate }] : []);
