import 'server-only';
import { hearingsOf } from '@/db/hearings';
import { cardsOf, itemsOfSet, liveSet, logsSince } from '@/db/practice';
import type { Context } from '@/lib/server/context';
import { addDays, type LocalDate } from '@/lib/time';
import { may } from '@/policies/ability';
import type { Outcome } from '../hearing';
import { tellsTeacher } from '../review';
import type { StudentLadder } from '../student-ladder';
import { readStanding, toLadder } from './ladder-of-student';

export type StaffHearing = { id: string; title: string; outcome: Outcome | null; on: LocalDate; by: string; notePublic: string; notePrivate: string };
export type StaffPractice = {
  set: { by: string; dueOn: LocalDate; items: string[] } | null;
  minutes: number;
  /** Rungs that failed their review twice in a row. */
  weak: string[];
  /** What the student wrote when playing hurt, newest first. */
  hurts: { on: LocalDate; note: string }[];
};
/** What may be set to practise: the ladder's rungs with the keys each is asked in. */
export type RungChoice = { id: string; label: string; keyPool: string[]; beatsPerMinute: number | null };
export type StudentStanding = { ladder: StudentLadder; hearings: StaffHearing[]; practice: StaffPractice; choices: RungChoice[]; mayHear: boolean; maySet: boolean };

const HEARINGS_SHOWN = 10;
const DAYS_LOOKED_AT = 14;

/** Where a student stands, for those who teach: ladder, hearings with their private notes, and how the practice goes. Null for who may not see progress. */
export async function studentStanding(studentId: string, context: Context): Promise<StudentStanding | null> {
  const { db, ability, actor } = context;
  if (!may(ability, 'read', 'HearingNote', { studentId })) return null;
  const read = await readStanding(studentId, context);
  if (!read) return null;
  const titles = new Map(read.rungs.map(({ id, code, title }) => [id, `${code} ${title}`]));
  const hearings = (await hearingsOf(db, studentId)).slice(0, HEARINGS_SHOWN);
  return {
    ladder: toLadder(read), practice: await practiceFor(studentId, titles, context),
    hearings: hearings.map(({ id, rungId, outcome, decidedOn, startedOn, assessorName, notePublic, notePrivate }) => ({ id, title: titles.get(rungId) ?? 'a rung of an earlier edition', outcome, on: decidedOn ?? startedOn, by: assessorName, notePublic, notePrivate })),
    choices: read.rungs.map(({ id, keyPool, criteria }) => ({ id, label: titles.get(id) ?? '', keyPool, beatsPerMinute: criteria.tempo?.beatsPerMinute ?? null })),
    mayHear: may(ability, 'create', 'Hearing', { studentId, assessorId: actor.personId }), maySet: actor.role === 'teacher' && may(ability, 'create', 'Practice', { studentId }),
  };
}

async function practiceFor(studentId: string, titles: ReadonlyMap<string, string>, { db, today }: Pick<Context, 'db' | 'today'>): Promise<StaffPractice> {
  const [set, cards, logs] = [await liveSet(db, studentId), await cardsOf(db, studentId), await logsSince(db, studentId, addDays(today, 1 - DAYS_LOOKED_AT))];
  const items = set ? await itemsOfSet(db, set.id) : [];
  return {
    set: set ? { by: set.setByName, dueOn: set.dueOn, items: items.map(({ rungId, piece, keys }) => [rungId === null ? '' : (titles.get(rungId) ?? ''), piece ?? '', keys.join(' ')].filter((part) => part !== '').join(', ')) } : null,
    minutes: logs.reduce((sum, { minutes }) => sum + minutes, 0),
    weak: cards.filter(tellsTeacher).map(({ rungId }) => titles.get(rungId) ?? ''),
    hurts: logs.filter(({ note }) => note.startsWith('Stopped: it hurt')).map(({ practisedOn, note }) => ({ on: practisedOn, note })),
  };
}
