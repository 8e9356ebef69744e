import { randomUUID } from 'node:crypto';
import type { Knex } from 'knex';
import { insertAccount } from '../../db/accounts';
import { ownRecords } from '../../db/actors';
import { addStudentToFamily, insertFamily, insertPayer } from '../../db/families';
import { installFirstLadder } from '../../db/ladder-install';
import { insertContact, insertPerson, insertRelationship } from '../../db/people';
import { transaction } from '../../db/transaction';
import { sendForCheck } from '../../lib/payroll/server/close-pay-run';
import { buildPayRuns } from '../../lib/payroll/server/gather-pay-run';
import { payRunList } from '../../lib/payroll/server/pay-run-screen';
import type { Context } from '../../lib/server/context';
import { previewTuitionRun } from '../../lib/tuition/server/preview-tuition-run';
import { releaseTuitionRun } from '../../lib/tuition/server/release-tuition-run';
import { abilityFor, type Role } from '../../policies/ability';
import type { Column } from '../../policies/matrix';
import { contextOf } from '../support/context';
import { enrolled, lanternMoney } from './lantern-money';
import { lanternPay } from './lantern-pay';
import { lanternStreet } from './lantern-street';

/** Tuesday 17 November 2026, 13:00 at the school. */
const NOW = Date.UTC(2026, 10, 17, 18) / 1000;
const school = { zone: 'America/New_York', currency: 'USD', locale: 'en-US' };
const [LAST_MONTH, TODAY, NEXT_WEEK] = ['2026-10-06', '2026-11-17', '2026-11-24'];

/**
 * The worked-example school at work, for the access matrix: Ada is taught by Mara, Ben’s lessons up to today are
 * covered by Leo, Theo is grown and pays for himself, and Uma, taught by Viktor, is a stranger to everybody else.
 */
export async function accessHouse(db: Knex): Promise<{ runId: string; payRunId: string; rungId: string; closureId: string }> {
  await lanternStreet(db);
  await lanternMoney(db);
  await lanternPay(db);
  await db('engagement').where({ personId: 'leo' }).update({ kind: 'employee' });
  await transaction(db, async (trx) => {
    for (const [id, givenName] of [['rosa', 'Rosa'], ['viktor', 'Viktor']] as const) await insertPerson(trx, { id, givenName, familyName: 'Reyes', bornOn: '1980-01-01' });
    for (const [family, payer, student] of [['marsh', 'theo', 'theo'], ['reyes', 'rosa', 'uma']] as const) {
      await insertFamily(trx, { id: family, name: family, legalEntityId: 'lantern', currency: 'USD' });
      await insertContact(trx, { id: `email-${payer}`, personId: payer, kind: 'email', value: `${payer}@example.com` });
      await insertPayer(trx, { id: `payer-${payer}`, familyId: family, personId: payer });
      await addStudentToFamily(trx, family, student);
    }
    for (const [childId, adultId] of [['ada', 'noor'], ['ben', 'noor'], ['uma', 'rosa']] as const) await insertRelationship(trx, { id: `${childId}-${adultId}`, childId, adultId });
    await insertAccount(trx, { id: 'user-owner', personId: 'ruth', email: 'ruth@example.org', passwordHash: null, state: 'live' });
    await installFirstLadder(trx, { subjectId: 'keyboard', startsOn: '2026-09-01', createdBy: null, newId: randomUUID });
  });
  for (const [index, [studentId, familyId, teacherId]] of ([['ada', 'vale', 'mara'], ['ben', 'vale', 'mara'], ['theo', 'marsh', 'ines'], ['uma', 'reyes', 'viktor']] as const).entries()) {
    await enrolled(db, { studentId, familyId, teacherId, dates: [LAST_MONTH, TODAY, NEXT_WEEK], startMin: 600 + 30 * index });
    await db('occurrence').whereIn('id', db('seat').where({ studentId }).select('occurrenceId')).update({ plannedTeacherId: teacherId });
  }
  await db('seat').whereIn('occurrenceId', db('occurrence').where({ localDate: LAST_MONTH }).select('id')).update({ attendance: 'present', markedAt: 1, rowVersion: 2 });
  await db('occurrence').whereIn('localDate', [TODAY, LAST_MONTH]).whereIn('id', db('seat').where({ studentId: 'ben' }).select('occurrenceId')).update({ taughtById: 'leo' });
  const [closure]: { id: string }[] = await db('closure').where({ closedOn: '2027-05-31' }).select('id');
  return { ...(await runs(db)), rungId: await firstRung(db), closureId: closure?.id ?? '' };
}

async function runs(db: Knex): Promise<{ runId: string; payRunId: string }> {
  const owner = contextOf(db, 'owner', { personId: 'ruth', now: NOW, school });
  const { runId } = await previewTuitionRun({ kind: 'term', period: 'autumn', dueOn: '2026-12-01', instalments: 1, depositPercent: 0 }, owner);
  const [run]: { controlTotalMinor: number }[] = await db('tuition_run').where({ id: runId });
  await releaseTuitionRun({ runId, controlTotalMinor: run?.controlTotalMinor ?? 0 }, owner);
  await buildPayRuns({ month: '2026-10' }, owner);
  const payRunId = (await payRunList(owner)).runs.find(({ label }) => label.includes('employees'))?.payRunId ?? '';
  await sendForCheck({ payRunId, answerByOn: '2026-11-20' }, owner);
  return { runId, payRunId };
}

async function firstRung(db: Knex): Promise<string> {
  const [rung]: { id: string }[] = await db('rung').where({ code: '1.1' });
  return rung?.id ?? '';
}

const PEOPLE: Record<Column, { personId: string; role: Role; isLead?: boolean }> = {
  owner: { personId: 'ruth', role: 'owner' }, desk: { personId: 'pat', role: 'desk' }, teacher: { personId: 'mara', role: 'teacher' }, substitute: { personId: 'leo', role: 'teacher' },
  lead: { personId: 'ines', role: 'teacher', isLead: true }, student: { personId: 'theo', role: 'student' }, guardian: { personId: 'noor', role: 'guardian' },
};

/** The context that the person of a column works in, with what is theirs read from the tables as at sign-in. */
export async function contextOfColumn(db: Knex, column: Column): Promise<Context> {
  const person = PEOPLE[column];
  const context = contextOf(db, person.role, { ...person, now: NOW, school });
  const actor = { ...context.actor, ...(await ownRecords(db, person.personId, person.role, context.today)) };
  return { ...context, actor, ability: abilityFor(actor) };
}
