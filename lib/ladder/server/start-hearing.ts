import 'server-only';
import { randomInt } from 'node:crypto';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Db, Trx } from '@/db/connection';
import { countAttempts, hearingUnderWay, insertHearing, keyRecords, lastNotYetOn } from '@/db/hearings';
import { joinLadder, openAgreement, rebuildStudentRungs, standingOf, spendAgreement } from '@/db/ladder-standing';
import { editionOfStudent, findRung, needsOf, rungsOf, type Edition, type Rung } from '@/db/ladders';
import { findPerson, fullName, type Person } from '@/db/people';
import { houseRulesOn } from '@/db/settings';
import { qualificationsOn } from '@/db/teachers';
import { termOn } from '@/db/terms';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { formatDate } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { drawKeys } from '../draw';
import { startProblems, type StartProblem } from '../hearing';
import { missingNeeds } from '../needs';
import { hasRung } from '../rung-state';
import type { startHearingSchema } from '../schema';

type Starting = z.output<typeof startHearingSchema>;
type Asked = { student: Person; edition: Edition; rung: Rung };

const SEED_LIMIT = 2 ** 32;

/**
 * Begins to hear a rung: draws the keys with a stored seed, weak keys sooner. The teacher teaches the student (or
 * is the lead) and is qualified for the level; needs, waiting days and the attempts of a term are kept, unless the
 * lead agrees with a reason. One that is under way is taken up again, not begun twice.
 */
export async function startHearing(input: Starting, context: Context): Promise<{ hearingId: string }> {
  const { db, actor, ability } = context;
  const student = await findPerson(db, input.studentId);
  assertCan(ability, 'create', 'Hearing', { studentId: input.studentId, assessorId: actor.personId });
  if (!student?.isStudent || student.state !== 'live') throw notFound('hearing');
  return transaction(db, async (trx) => {
    const asked = await askedRung(trx, student, input.rungId);
    const underWay = await hearingUnderWay(trx, student.id, asked.rung.id);
    if (underWay?.assessorId === actor.personId) return { hearingId: underWay.id };
    if (underWay) throw new AppError('conflict', `${underWay.assessorName} is hearing this rung already.`);
    await assertQualified(trx, context, asked);
    const agreementId = await assertMayBeHeard(trx, context, { asked, leadReason: input.leadReason });
    return { hearingId: await writeHearing(trx, context, { asked, agreementId, input }) };
  });
}

async function askedRung(db: Db, student: Person, rungId: string): Promise<Asked> {
  const edition = await editionOfStudent(db, student.id);
  const rung = edition && (await findRung(db, edition.id, rungId));
  if (!edition || !rung) throw notFound('rung');
  return { student, edition, rung };
}

async function assertQualified(db: Db, { actor, today }: Context, { edition, rung }: Asked): Promise<void> {
  const own = (await qualificationsOn(db, edition.subjectId, today)).filter(({ personId }) => personId === actor.personId);
  if (own.some(({ levelFrom, levelTo }) => levelFrom <= rung.levelNo && rung.levelNo <= levelTo)) return;
  throw new AppError('forbidden', `Your qualification does not reach level ${rung.levelNo}. A colleague who has it, or the lead, can hear this rung.`);
}

/** What stands against hearing this rung today; shown before anybody presses, checked again when they do. */
export async function problemsOf(db: Db, { today }: Pick<Context, 'today'>, { student, edition, rung }: Asked): Promise<StartProblem[]> {
  const [standing, needs, rules, term] = [await standingOf(db, student.id, edition.id), await needsOf(db, edition.id), await houseRulesOn(db, today), await termOn(db, today)];
  const passed = new Set(standing.filter(({ state }) => hasRung(state)).map((one) => one.rung));
  const missing = missingNeeds(rung.id, needs, passed);
  const titles = missing.length === 0 ? [] : (await rungsOf(db, edition.id)).filter(({ id }) => missing.includes(id)).map(({ title }) => title);
  return startProblems({
    missing: titles, today, lastNotYetOn: await lastNotYetOn(db, student.id, rung.id), waitDays: rules['hearing.wait_days'], attemptsPerTerm: rules['hearing.attempts_per_term'],
    attemptsThisTerm: term ? await countAttempts(db, student.id, rung.id, term) : 0,
  });
}

/** Answers the agreement to be used up, or null when none is needed. */
async function assertMayBeHeard(trx: Trx, context: Context, { asked, leadReason }: { asked: Asked; leadReason: string }): Promise<string | null> {
  const standing = await standingOf(trx, asked.student.id, asked.edition.id);
  if (standing.find((one) => one.rung === asked.rung.id)?.state === 'passed') throw new AppError('conflict', 'This rung is passed already.');
  const problems = await problemsOf(trx, context, asked);
  if (problems.length === 0 || (context.actor.isLead && leadReason !== '')) return null;
  const agreement = await openAgreement(trx, asked.student.id, asked.rung.id);
  if (agreement) return agreement.id;
  const said = problems.map(({ text, until }) => (until ? `${text} From ${formatDate(until, context.school.locale, 'short')} it may be heard again.` : text)).join(' ');
  throw new AppError('conflict', `${said} ${context.actor.isLead ? 'As lead you may agree, with a reason.' : 'The lead may agree to it.'}`, { leadReason: ['Say why it is heard all the same.'] });
}

async function writeHearing(trx: Trx, context: Context, { asked, agreementId, input }: { asked: Asked; agreementId: string | null; input: Starting }): Promise<string> {
  const { student, edition, rung } = asked;
  const { actor, now, today } = context;
  const [hearingId, seed] = [newId(), randomInt(SEED_LIMIT)];
  const drawn = drawKeys({
    keyPool: rung.keyPool, turnCount: rung.spec.turns.length, count: rung.keysDrawn, isShuffled: rung.criteria.isShuffled, seed, records: await keyRecords(trx, student.id, rung.id),
  });
  await joinLadder(trx, { id: newId(), studentId: student.id, ladderId: edition.ladderId, editionId: edition.id, sinceOn: today });
  await insertHearing(trx, {
    id: hearingId, studentId: student.id, rungId: rung.id, editionId: edition.id, occurrenceId: input.occurrenceId ?? null, termId: (await termOn(trx, today))?.id ?? null,
    assessorId: actor.personId, startedOn: today, createdAt: now, seed, drawn,
  });
  if (agreementId) await spendAgreement(trx, agreementId, hearingId);
  await rebuildStudentRungs(trx, student.id, edition.id);
  await recordAudit(trx, context, {
    action: 'start', tableName: 'hearing', rowId: hearingId, after: { rungId: rung.id, seed, drawn }, reason: input.leadReason,
    sentence: `Began to hear ${fullName(student)}: ${rung.code} ${rung.title}.`,
  });
  return hearingId;
}
