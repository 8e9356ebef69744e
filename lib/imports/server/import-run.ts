import 'server-only';
import type { Trx } from '@/db/connection';
import type { Made, MadeTable } from '@/db/imports-made';
import { lessonTypeByCode, allSubjects, insertSubject, type LessonType, type Subject } from '@/db/lesson-types';
import { installFirstLadder } from '@/db/ladder-install';
import { liveEdition, rungsOf, type Edition } from '@/db/ladders';
import type { Site } from '@/db/rooms';
import { AppError } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import type { LocalDate } from '@/lib/time';
import type { Known } from '../known';
import { codeOf, isKeyboard } from '../features';
import type { CheckedRow, Reference } from '../rows';
import type { ImportChoices } from '../schema';
import type { LessonPlan } from '../weekly-slots';

export type FamilyPayer = { personId: string; name: string; isMade: boolean };

/** One import while it is being written: where it goes, what it has made so far, and under which ids. */
export type ImportRun = {
  trx: Trx; context: Context; site: Site; known: Known; choices: ImportChoices;
  plan: LessonPlan; termId: string; lessonType: LessonType; keyboard: Subject; subjects: Map<string, Subject>;
  edition: Edition | null; rungs: { id: string; levelNo: number }[];
  /** From when teachers are engaged and rates hold: the first day anything of the import can lie on. */
  firstDay: LocalDate;
  made: Made[]; ids: Map<string, string>; payers: Map<string, FamilyPayer[]>;
};
export type Place = Pick<CheckedRow, 'sheet' | 'rowNo' | 'key'>;

type Start = Pick<ImportRun, 'trx' | 'context' | 'site' | 'known' | 'choices' | 'plan' | 'termId'> & { placesStudents: boolean };

export async function startRun({ placesStudents, ...start }: Start): Promise<ImportRun> {
  const { trx, plan, context } = start;
  const subjects = await allSubjects(trx);
  const keyboard = subjects.find(({ code }) => code === 'keyboard_harmony') ?? subjects[0];
  if (!keyboard) throw new AppError('conflict', 'The school teaches no subject yet. Add one in the settings first.');
  const firstDay = [context.today, plan.term.startsOn].sort()[0] ?? context.today;
  // Students placed at a level need a ladder to stand on: the one that ships, if the school has not chosen one.
  if (placesStudents) await installFirstLadder(trx, { subjectId: keyboard.id, startsOn: firstDay, createdBy: context.actor.personId, newId });
  const edition = (await liveEdition(trx)) ?? null;
  const rungs = edition ? await rungsOf(trx, edition.id) : [];
  return {
    ...start, lessonType: await lessonTypeByCode(trx, 'single'), keyboard, subjects: new Map(subjects.map((subject) => [subject.code, subject])), edition, rungs,
    firstDay, made: [], ids: new Map(), payers: new Map(),
  };
}

/** A new id, written down as made for this row. */
export function makeId(run: ImportRun, table: MadeTable, { sheet, rowNo }: Pick<Place, 'sheet' | 'rowNo'>): string {
  const id = newId();
  run.made.push({ table, id, sheet, rowNo });
  return id;
}

/** The record behind a reference: made in this run, or in the school already. */
export function idBehind({ ids, known }: ImportRun, reference: Reference): string {
  const id = 'id' in reference ? reference.id : (ids.get(reference.key) ?? known.byKey.get(reference.key)?.id);
  if (id === undefined) throw new Error('a row refers to a row that was not imported');
  return id;
}

/** Piano and keyboard are the school's own subject; other words become subjects of their own. */
export async function subjectNamed(run: ImportRun, word: string, place: Place): Promise<Subject> {
  if (isKeyboard(word)) return run.keyboard;
  const known = run.subjects.get(codeOf(word));
  if (known) return known;
  const subject = { id: makeId(run, 'subject', place), code: codeOf(word), label: word.charAt(0).toUpperCase() + word.slice(1) };
  await insertSubject(run.trx, subject);
  run.subjects.set(subject.code, subject);
  return subject;
}
