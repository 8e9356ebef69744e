import 'server-only';
import { addStudentToFamily } from '@/db/families';
import { becomeStudent, insertPlacementCredits } from '@/db/imports-write';
import { joinLadder, rebuildStudentRungs } from '@/db/ladder-standing';
import { payersOfFamilies } from '@/db/payers';
import { insertConsent, insertPerson, insertRelationship } from '@/db/people';
import { nameKey, splitName } from '@/lib/people/names';
import { ageOn } from '@/lib/time';
import type { StudentFacts } from '../rows';
import { idBehind, makeId, type FamilyPayer, type ImportRun, type Place } from './import-run';

const ADULT_AGE = 18;
const PHOTO_PURPOSES = ['photo_wall', 'photo_web'] as const;

/**
 * A student in their family. The first payer becomes the guardian who is told and sees progress; a second payer only
 * pays, until somebody says more. A grown-up student with the payer's name is that payer, not a second person.
 */
export async function writeStudent(run: ImportRun, facts: StudentFacts, place: Place): Promise<string> {
  const familyId = idBehind(run, facts.family);
  const payers = await payersOf(run, familyId);
  const self = isGrown(run, facts) ? payers.find(({ name, isMade }) => isMade && nameKey(name) === nameKey(facts.name)) : undefined;
  const studentId = await writePerson(run, { facts, place, selfId: self?.personId ?? null });
  await addStudentToFamily(run.trx, familyId, studentId);
  const guardianId = isGrown(run, facts) ? null : (payers[0]?.personId ?? null);
  if (guardianId !== null) await insertRelationship(run.trx, { id: makeId(run, 'relationship', place), childId: studentId, adultId: guardianId });
  await writePhotoAnswer(run, { facts, place, studentId, givenById: guardianId ?? studentId });
  await placeOnLadder(run, { facts, place, studentId });
  return studentId;
}

async function writePerson(run: ImportRun, { facts, place, selfId }: { facts: StudentFacts; place: Place; selfId: string | null }): Promise<string> {
  if (selfId !== null) {
    await becomeStudent(run.trx, selfId, { externalKey: place.key, bornOn: facts.bornOn });
    return selfId;
  }
  const id = makeId(run, 'person', place);
  await insertPerson(run.trx, { id, ...splitName(facts.name), bornOn: facts.bornOn, isStudent: true, externalKey: place.key });
  return id;
}

const isGrown = ({ context }: ImportRun, { bornOn }: StudentFacts): boolean => bornOn !== null && ageOn(bornOn, context.today) >= ADULT_AGE;

async function payersOf(run: ImportRun, familyId: string): Promise<FamilyPayer[]> {
  const made = run.payers.get(familyId);
  if (made) return made;
  const known = (await payersOfFamilies(run.trx, [familyId])).flatMap(({ personId, name }) => (personId === null ? [] : [{ personId, name, isMade: false }]));
  run.payers.set(familyId, known);
  return known;
}

type Answer = { facts: StudentFacts; place: Place; studentId: string; givenById: string };

/** A yes or a no; where the cell was blank nobody asked, and nothing is written. */
async function writePhotoAnswer(run: ImportRun, { facts, place, studentId, givenById }: Answer): Promise<void> {
  if (facts.photo === null) return;
  for (const purpose of PHOTO_PURPOSES) {
    await insertConsent(run.trx, { id: makeId(run, 'consent', place), personId: studentId, givenById, purpose, answer: facts.photo, textVersion: 'import', method: 'import', givenAt: run.context.now });
  }
}

/** Placed at a level, the rungs below it count as credited. Without a live ladder the level stays with the row. */
async function placeOnLadder(run: ImportRun, { facts, place, studentId }: Omit<Answer, 'givenById'>): Promise<void> {
  const { trx, edition, context, rungs } = run;
  if (edition === null || facts.level === null) return;
  const level = facts.level;
  await joinLadder(trx, { id: makeId(run, 'student_ladder', place), studentId, ladderId: edition.ladderId, editionId: edition.id, sinceOn: context.today });
  const below = rungs.filter(({ levelNo }) => levelNo < level);
  await insertPlacementCredits(trx, below.map(({ id: rungId }) => ({
    id: makeId(run, 'rung_credit', place), studentId, rungId, reason: `Placed at level ${level} when the school began with Rungwell`, byId: context.actor.personId, creditedOn: context.today, at: context.now,
  })));
  await rebuildStudentRungs(trx, studentId, edition.id);
}
