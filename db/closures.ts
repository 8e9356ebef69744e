import type { Closure } from '@/lib/calendar/term';
import type { LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';
import { LIVE_STATES } from './occurrences';

export type ClosureRow = Closure & { id: string; kind: 'planned' | 'unplanned'; reason: string };
const COLUMNS = ['id', 'closedOn', 'siteId', 'fromMin', 'toMin', 'kind', 'reason'] as const;
export const allClosures = (db: Db): Promise<ClosureRow[]> => db<ClosureRow>('closure').orderBy(['closedOn', 'siteId', 'fromMin']).select(...COLUMNS);
export const findClosure = (db: Db, id: string): Promise<ClosureRow | undefined> => db<ClosureRow>('closure').where({ id }).first(...COLUMNS);

export async function deleteClosure(trx: Trx, id: string): Promise<void> {
  await trx('closure').where({ id }).delete();
}

export type ClosedSpan = { from: LocalDate; until: LocalDate } & Pick<Closure, 'siteId' | 'fromMin' | 'toMin'>;
export type TeacherCount = { teacherName: string; lessons: number };
const TEACHER = "coalesce(nullif(trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name), ''), 'no teacher yet') AS teacher_name";

/** Lessons that stand in the calendar within a span that is to be closed, by who teaches them. */
export const lessonsWithin = (db: Db, { from, until, siteId, fromMin, toMin }: ClosedSpan): Promise<TeacherCount[]> =>
  db('occurrence as o').join('lesson_type as t', 't.id', 'o.lessonTypeId').leftJoin('person as p', 'p.id', db.raw('coalesce(o.taught_by_id, o.planned_teacher_id)'))
    .where('t.isTaught', 1).whereIn('o.state', LIVE_STATES).whereBetween('o.localDate', [from, until])
    .modify((query) => {
      if (siteId !== null) void query.where('o.siteId', siteId);
      if (fromMin !== null && toMin !== null) void query.whereRaw('o.start_min < ? AND o.start_min + o.length_minutes > ?', [toMin, fromMin]);
    })
    .groupBy('p.id').orderBy('teacherName').select(db.raw(TEACHER), db.raw('count(*) AS lessons'));

/** Weekly lessons that run past a closed day and were planned round it, by who teaches them. */
export const seriesRound = (db: Db, { closedOn, siteId, fromMin, toMin }: Closure): Promise<TeacherCount[]> =>
  db('series as s').leftJoin('person as p', 'p.id', 's.teacherId').where('s.firstOn', '<=', closedOn).where('s.lastOn', '>=', closedOn)
    .whereRaw("s.weekday = ((CAST(strftime('%w', ?) AS INTEGER) + 6) % 7) + 1", [closedOn])
    .modify((query) => {
      if (siteId !== null) void query.where('s.siteId', siteId);
      if (fromMin !== null && toMin !== null) void query.whereRaw('s.start_min < ? AND s.start_min + s.length_minutes > ?', [toMin, fromMin]);
    })
    .groupBy('p.id').orderBy('teacherName').select(db.raw(TEACHER), db.raw('count(*) AS lessons'));
