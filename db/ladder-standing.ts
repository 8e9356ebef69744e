import { rungStates, type RungFact, type RungState, type StudentRung } from '@/lib/ladder/rung-state';
import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';
import { needsOf } from './ladders';

type HearingRow = { id: string; rung: string; outcome: 'passed' | 'not_yet' | null; decidedAt: number | null; decidedOn: string | null; createdAt: number; startedOn: string };
type Dated = { rung: string; at: EpochSeconds; on: LocalDate };

/** Everything from which a student's standing follows. */
async function rungFactsOf(db: Db, studentId: string): Promise<RungFact[]> {
  const hearings: HearingRow[] = await db('hearing as h').where({ studentId }).whereNot('state', 'stopped')
    .whereRaw('NOT EXISTS (SELECT 1 FROM hearing n WHERE n.replaces_id = h.id)').select('id', 'rungId as rung', 'outcome', 'decidedAt', 'decidedOn', 'createdAt', 'startedOn');
  const credits: Dated[] = await db('rung_credit').where({ studentId }).select('rungId as rung', 'at', 'creditedOn as on');
  const rechecks: Dated[] = await db('recheck_request').where({ studentId }).select('rungId as rung', 'at', 'askedOn as on');
  return [
    ...hearings.map(({ id, rung, outcome, decidedAt, decidedOn, createdAt, startedOn }): RungFact => (outcome === null || decidedAt === null || decidedOn === null
      ? { kind: 'begun', rung, at: createdAt, on: startedOn, hearingId: id } : { kind: 'hearing', rung, outcome, at: decidedAt, on: decidedOn, hearingId: id })),
    ...credits.map((fact): RungFact => ({ kind: 'credit', ...fact })),
    ...rechecks.map((fact): RungFact => ({ kind: 'recheck', ...fact })),
  ];
}

/** Where a student stands on every rung of an edition, worked out afresh. */
export async function standingOf(db: Db, studentId: string, editionId: string): Promise<StudentRung[]> {
  const rungs: { rungId: string }[] = await db('rung_text').where({ editionId }).orderBy('orderNo').select('rungId');
  return rungStates(rungs.map(({ rungId }) => rungId), await needsOf(db, editionId), await rungFactsOf(db, studentId));
}

/** Writes the derived rows anew; they may be thrown away and rebuilt at any time. */
export async function rebuildStudentRungs(trx: Trx, studentId: string, editionId: string): Promise<StudentRung[]> {
  const standing = await standingOf(trx, studentId, editionId);
  await trx('student_rung').where({ studentId }).delete();
  const rows = standing.map(({ rung, state, since, hearingId }) => ({ studentId, rungId: rung, editionId, state, sinceOn: since, hearingId }));
  for (let at = 0; at < rows.length; at += 100) await trx('student_rung').insert(rows.slice(at, at + 100));
  return standing;
}

export async function joinLadder(trx: Trx, join: { id: string; studentId: string; ladderId: string; editionId: string; sinceOn: LocalDate }): Promise<void> {
  await trx('student_ladder').insert(join).onConflict(['student_id', 'ladder_id']).ignore();
}

export type RungCount = { rungId: string; state: RungState; count: number };
/** How many students stand where; no names leave the database. */
export const rungCounts = (db: Db, editionId: string): Promise<RungCount[]> =>
  db('student_rung').where({ editionId }).groupBy('rungId', 'state').select<RungCount[]>('rungId', 'state', db.raw('count(*) AS count'));

export async function countClimbers(db: Db): Promise<number> {
  const [row] = await db('enrolment').where({ onLadder: 1 }).whereIn('state', ['active', 'paused', 'notice_given']).countDistinct<{ count: number }[]>('studentId as count');
  return row?.count ?? 0;
}

export type Agreement = { id: string; reason: string; byId: string };
export const openAgreement = (db: Db, studentId: string, rungId: string): Promise<Agreement | undefined> =>
  db('hearing_agreement').where({ studentId, rungId }).whereNull('usedByHearingId').orderBy('at', 'desc').first<Agreement | undefined>('id', 'reason', 'byId');
export async function insertAgreement(trx: Trx, agreement: Agreement & { studentId: string; rungId: string; at: EpochSeconds }): Promise<void> {
  await trx('hearing_agreement').insert(agreement);
}
export async function spendAgreement(trx: Trx, id: string, usedByHearingId: string): Promise<void> {
  await trx('hearing_agreement').where({ id }).update({ usedByHearingId });
}

export type LessonOfDay = { id: string; startMin: number; roomName: string | null };
/** The lesson in which a hearing takes place: the student's next one of this day that has not ended long ago. */
export const lessonOnDay = (db: Db, studentId: string, date: LocalDate): Promise<LessonOfDay | undefined> =>
  db('occurrence as o').join('seat as s', 's.occurrenceId', 'o.id').leftJoin('room as r', 'r.id', 'o.roomId').where({ 's.studentId': studentId, 'o.localDate': date })
    .whereNotIn('o.state', ['cancelled', 'moved', 'closed_by_school']).orderBy('o.startMin').first<LessonOfDay | undefined>('o.id', 'o.startMin', 'r.name as roomName');

export async function lastLessonAim(db: Db, studentId: string): Promise<string | null> {
  const row = await db('lesson_note').where({ studentId }).whereNot('nextAim', '').orderBy('createdAt', 'desc').first<{ nextAim: string } | undefined>('nextAim');
  return row?.nextAim ?? null;
}

/** Adults who are told of a child's progress: legal care, wants messages, and may see progress. */
export async function progressReaders(db: Db, childId: string): Promise<string[]> {
  const rows: { adultId: string }[] = await db('relationship').where({ childId, hasLegalCare: 1, getsMessages: 1, seesProgress: 1 }).select('adultId');
  return rows.map(({ adultId }) => adultId);
}
