import { asksOf } from '@/lib/ladder/asks';
import { isSpoken } from '@/lib/ladder/play-spec';
import { decideHearing } from '@/lib/ladder/server/decide-hearing';
import { installLadder } from '@/lib/ladder/server/install-ladder';
import { recordProof } from '@/lib/ladder/server/record-proof';
import { startHearing } from '@/lib/ladder/server/start-hearing';
import { newId } from '@/lib/server/ids';
import { instantOf } from '@/lib/time';
import { findHearing } from '../hearings';
import { joinLadder, rebuildStudentRungs } from '../ladder-standing';
import { insertPlacementCredits } from '../imports-write';
import { liveEdition, needsOf, rungsOf, type Edition, type Rung } from '../ladders';
import { transaction } from '../transaction';
import { teacherAt, ownerAt } from './demo-context';
import type { House } from './demo-types';
import { demoSlots, type DemoSlot } from './demo-lessons';
import { between } from './random';

const NOTES = ['Even and unhurried.', 'The top note sang. Keep it there.', 'Steady time from the first key to the last.', 'A warm sound; the left hand led well.'] as const;

/** The ladder, where everybody was placed, and what has been heard since: some rungs of each student's level, with their proofs. */
export async function layLadder(house: House): Promise<void> {
  await installLadder({}, ownerAt(house, instantOf(house.terms.last.startsOn, 540, house.zone)));
  const edition = await liveEdition(house.db);
  if (!edition) throw new Error('the demo school has no ladder');
  const rungs = await rungsOf(house.db, edition.id);
  for (const slot of demoSlots(house)) {
    await place(house, edition, rungs, slot);
    await hearSome(house, edition, rungs, slot);
  }
}

async function place({ db, owner, terms, zone }: House, edition: Edition, rungs: Rung[], { student }: DemoSlot): Promise<void> {
  const creditedOn = terms.last.startsOn;
  await transaction(db, async (trx) => {
    await joinLadder(trx, { id: newId(), studentId: student.id, ladderId: edition.ladderId, editionId: edition.id, sinceOn: creditedOn });
    await insertPlacementCredits(trx, rungs.filter(({ levelNo }) => levelNo < student.level).map(({ id: rungId }) => ({
      id: newId(), studentId: student.id, rungId, reason: `Placed at level ${student.level} on joining the ladder`, byId: owner.actor.personId, creditedOn, at: instantOf(creditedOn, 540, zone),
    })));
    await rebuildStudentRungs(trx, student.id, edition.id);
  });
}

type Taught = { id: string; startsAt: number };

/** Up to four rungs, one every few taught lessons, in the order of the ladder and its needs. */
async function hearSome(house: House, edition: Edition, rungs: Rung[], slot: DemoSlot): Promise<void> {
  const { db, random, now } = house;
  const taught: Taught[] = await db('occurrence as o').join('seat as s', 's.occurrenceId', 'o.id').where('s.studentId', slot.student.id).where('o.state', 'taught').where('o.endsAt', '<', now)
    .orderBy('o.startsAt').select('o.id', 'o.startsAt');
  const count = slot.student.key === 'ada' ? 5 : between(random, 0, 4);
  const passed = new Set(rungs.filter(({ levelNo }) => levelNo < slot.student.level).map(({ id }) => id));
  const needs = await needsOf(db, edition.id);
  for (let at = 0; at < count; at += 1) {
    const lesson = taught[Math.floor(((at + 1) * taught.length) / (count + 1))];
    const next = rungs.find((rung) => !passed.has(rung.id) && rung.levelNo >= slot.student.level && needs.filter(({ rung: of }) => of === rung.id).every(({ needs: needed }) => passed.has(needed)));
    const teacher = house.teachers.find(({ id }) => id === slot.teacherId);
    // A rung played freely has no one voicing to play back.
    if (!lesson || !next || !teacher || teacher.levelTo < next.levelNo || next.spec.how === 'free') return;
    await hear(house, slot, next, { lesson, at });
    passed.add(next.id);
  }
}

async function hear(house: House, { student, teacherId }: DemoSlot, rung: Rung, { lesson, at }: { lesson: Taught; at: number }): Promise<void> {
  const context = teacherAt(house, teacherId, [student.id], lesson.startsAt + 20 * 60);
  const { hearingId } = await startHearing({ studentId: student.id, rungId: rung.id, occurrenceId: lesson.id, leadReason: '' }, context);
  const drawn = (await findHearing(house.db, hearingId))?.drawn ?? [];
  const spoken = isSpoken(rung.spec.how);
  for (const [drawnNo, key] of drawn.entries()) {
    const heard = asksOf(rung.spec, key).map((ask) => (spoken
      ? { played: [], milliseconds: null, byEar: 'right' as const }
      : { played: ask.shown.notes.map((note) => note.key), milliseconds: 900 + between(house.random, 0, 1600), byEar: null }));
    await recordProof({ hearingId, drawnNo, source: spoken ? 'ear' : 'midi', heard }, context);
  }
  await decideHearing({ hearingId, outcome: 'passed', passReason: '', notePublic: NOTES[at % NOTES.length] ?? '', notePrivate: '', marks: [] }, context);
}
