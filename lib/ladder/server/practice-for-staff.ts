import 'server-only';
import { cardsOf, itemsOfSet, liveSet, logsSince } from '@/db/practice';
import type { Context } from '@/lib/server/context';
import { addDays, type LocalDate } from '@/lib/time';
import { may } from '@/policies/ability';
import { tellsTeacher } from '../review';
import { readStanding, toLadder } from './ladder-of-student';

/** What may be set to practise: a rung of the ladder, with the keys it is asked in. */
export type RungChoice = { id: string; label: string; keyPool: string[]; beatsPerMinute: number | null };
export type StaffPractice = {
  studentId: string; firstName: string;
  set: { by: string; dueOn: LocalDate; items: string[] } | null;
  minutes: number;
  /** Rungs that failed their review twice in a row. */
  weak: string[];
  /** What the student wrote when playing hurt, newest first. */
  hurts: { on: LocalDate; note: string }[];
  choices: RungChoice[]; nextRungId: string; maySet: boolean;
};

const DAYS_LOOKED_AT = 14;

/** How the practice goes, for those who teach: what is set, the minutes, what does not sit any more, whether it hurt. Null for who may not read it. */
export async function practiceForStaff(studentId: string, context: Context): Promise<StaffPractice | null> {
  const { db, ability, actor, today } = context;
  if (!may(ability, 'read', 'HearingNote', { studentId }) || !may(ability, 'read', 'Practice', { studentId })) return null;
  const read = await readStanding(studentId, context);
  if (!read) return null;
  const ladder = toLadder(read);
  const titles = new Map(read.rungs.map(({ id, code, title }) => [id, `${code} ${title}`]));
  const [set, cards, logs] = [await liveSet(db, studentId), await cardsOf(db, studentId), await logsSince(db, studentId, addDays(today, 1 - DAYS_LOOKED_AT))];
  const items = set ? await itemsOfSet(db, set.id) : [];
  return {
    studentId, firstName: ladder.student.firstName, nextRungId: ladder.next[0] ?? '', maySet: actor.role === 'teacher' && may(ability, 'create', 'Practice', { studentId }),
    set: set ? { by: set.setByName, dueOn: set.dueOn, items: items.map(({ rungId, piece, keys }) => [rungId === null ? '' : (titles.get(rungId) ?? ''), piece ?? '', keys.join(' ')].filter((part) => part !== '').join(', ')) } : null,
    minutes: logs.reduce((sum, { minutes }) => sum + minutes, 0),
    weak: cards.filter(tellsTeacher).map(({ rungId }) => titles.get(rungId) ?? ''),
    hurts: logs.filter(({ note }) => note.startsWith('Stopped: it hurt')).map(({ practisedOn, note }) => ({ on: practisedOn, note })),
    choices: read.rungs.map(({ id, keyPool, criteria }) => ({ id, label: titles.get(id) ?? '', keyPool, beatsPerMinute: criteria.tempo?.beatsPerMinute ?? null })),
  };
}
