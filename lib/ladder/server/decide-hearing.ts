import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { countByEar, countHeard, decide, insertScores, proofsOf, stop, type Hearing } from '@/db/hearings';
import { rebuildStudentRungs } from '@/db/ladder-standing';
import { findRung, type Rung } from '@/db/ladders';
import { findPerson, fullName, type Person } from '@/db/people';
import { enterReview } from '@/db/practice';
import { houseRulesOn } from '@/db/settings';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import type { LocalDate } from '@/lib/time';
import { earliestRehearing, mayMove, OUTCOME_WORDS, passProblem, type KeyCount } from '../hearing';
import { isSpoken } from '../play-spec';
import { firstReview } from '../review';
import { weightedScore, type WeightedScore } from '../score';
import type { decideHearingSchema, stopHearingSchema } from '../schema';
import { ownHearing } from './record-proof';
import { tellRungPassed } from './tell-rung-passed';

type Deciding = z.output<typeof decideHearingSchema>;
export type Decided = { outcome: 'passed' | 'not_yet'; keysHeard: number; earliestAgainOn: LocalDate | null; told: number };

/**
 * Passed or not yet: the teacher's ear has the last word, and the words beside it. A pass with fewer keys heard
 * than the rung asks, or marks below the line, takes a reason; "not yet" takes a note on what to work on. Decided
 * is for good: the guardians are told of a pass, and where the student stands is worked out anew.
 */
export async function decideHearing(input: Deciding, context: Context): Promise<Decided> {
  const { db, now, today } = context;
  return transaction(db, async (trx) => {
    const hearing = await ownHearing(trx, input.hearingId, context);
    const [rung, student] = [await findRung(trx, hearing.editionId, hearing.rungId), await findPerson(trx, hearing.studentId)];
    if (!rung || !student) throw notFound('hearing');
    const proofs = await proofsOf(trx, hearing.id);
    const keysHeard = countHeard(proofs);
    const count: KeyCount = { heard: keysHeard, needed: rung.keysNeeded, byEar: isSpoken(rung.spec.how) ? 0 : countByEar(proofs) };
    const totalHundredths = assertDecidable(input, hearing, count);
    const waitDays = (await houseRulesOn(trx, today))['hearing.wait_days'];
    const earliestAgainOn = input.outcome === 'not_yet' ? earliestRehearing(today, waitDays) : null;
    await insertScores(trx, input.marks.map((mark) => ({ id: newId(), hearingId: hearing.id, ...mark })));
    const { outcome, passReason, notePublic, notePrivate } = input;
    await decide(trx, hearing.id, { outcome, passReason, notePublic, notePrivate, keysHeard, totalHundredths, decidedAt: now, decidedOn: today, earliestAgainOn });
    await rebuildStudentRungs(trx, student.id, hearing.editionId);
    if (outcome === 'passed') await enterReview(trx, { ...firstReview(today), id: newId(), studentId: student.id, rungId: rung.id });
    await auditDecision(trx, context, { hearing, rung, student, input, keysHeard });
    const told = outcome === 'passed' ? await tellRungPassed(trx, context, { hearing, rung, student, notePublic }) : 0;
    return { outcome, keysHeard, earliestAgainOn, told };
  });
}

function assertDecidable(input: Deciding, hearing: Hearing, count: KeyCount): number | null {
  if (!mayMove(hearing.state, 'decided')) throw new AppError('conflict', 'This hearing is decided already. What was decided stays.');
  const score = input.marks.length > 0 ? scoreOf(input.marks) : null;
  if (input.outcome === 'not_yet') assertHasNote(input);
  else assertPassStands(input, count, score);
  return score?.totalHundredths ?? null;
}

function assertHasNote({ notePublic }: Deciding): void {
  if (notePublic === '') throw new AppError('invalid', 'Say in a few words what to work on; the family reads it.', { notePublic: ['What comes next?'] });
}

function assertPassStands({ passReason }: Deciding, count: KeyCount, score: WeightedScore | null): void {
  const isBelowLine = score !== null && !score.isPassed && passReason === '';
  const problem = passProblem(count, passReason) ?? (isBelowLine ? (score.steps.at(-1) ?? null) : null);
  if (problem) throw new AppError('invalid', problem, { passReason: [problem] });
}

function scoreOf(marks: Deciding['marks']): WeightedScore {
  const sum = marks.reduce((total, { weightPercent }) => total + weightPercent, 0);
  if (sum !== 100) throw new AppError('invalid', 'The weights of the criteria must add up to 100.', { marks: [`They add up to ${sum}.`] });
  return weightedScore(marks);
}

type Told = { hearing: Hearing; rung: Rung; student: Person; input: Deciding; keysHeard: number };
const auditDecision = (trx: Trx, context: Context, { hearing, rung, student, input, keysHeard }: Told): Promise<void> =>
  recordAudit(trx, context, {
    action: 'decide', tableName: 'hearing', rowId: hearing.id, before: { state: hearing.state }, after: { outcome: input.outcome, keysHeard }, reason: input.passReason,
    sentence: `${fullName(student)}, ${rung.code} ${rung.title}: ${OUTCOME_WORDS[input.outcome]}, ${keysHeard} of ${rung.keysDrawn} keys heard.`,
  });

/** Illness, distress, a broken instrument: it ends here and counts as no attempt. */
export async function stopHearing({ hearingId, reason }: z.output<typeof stopHearingSchema>, context: Context): Promise<void> {
  await transaction(context.db, async (trx) => {
    const hearing = await ownHearing(trx, hearingId, context);
    if (!mayMove(hearing.state, 'stopped')) throw new AppError('conflict', 'This hearing is over already.');
    await stop(trx, hearing.id, reason);
    await rebuildStudentRungs(trx, hearing.studentId, hearing.editionId);
    await recordAudit(trx, context, { action: 'stop', tableName: 'hearing', rowId: hearing.id, reason, sentence: 'Stopped a hearing; it counts as no attempt.' });
  });
}
