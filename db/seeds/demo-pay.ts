import { askAboutPay, agreeToPay } from '@/lib/payroll/server/check-pay';
import { approvePayRun, closePayRun, sendForCheck } from '@/lib/payroll/server/close-pay-run';
import { buildPayRuns } from '@/lib/payroll/server/gather-pay-run';
import type { PayRate } from '@/lib/payroll/rates';
import { newId } from '@/lib/server/ids';
import { addDays, addMonths, instantOf, type LocalDate } from '@/lib/time';
import { insertPayRates, insertPayRule } from '../pay-rates';
import { linesOfRun } from '../pay-lines';
import { checksOf } from '../pay-runs';
import { transaction } from '../transaction';
import { ownerAt, teacherAt } from './demo-context';
import type { House } from './demo-types';

/** Cents per lesson at a rate factor of one hundred. */
const LESSON_RATES = [[30, 1850], [45, 2700], [60, 3500]] as const;
const TRIAL_RATE_MINOR = 1850;

export async function layRates({ db, teachers, terms, owner }: House): Promise<void> {
  const validFrom = addDays(terms.last.startsOn, -400);
  const scaled = (amountMinor: number, factor: number) => Math.round((amountMinor * factor) / 5000) * 50;
  await transaction(db, async (trx) => {
    for (const { engagementId, rateFactor } of teachers) {
      const base: Omit<PayRate, 'id' | 'workType' | 'lengthMinutes' | 'amountMinor' | 'per'> = { engagementId, lessonTypeId: null, seatsFrom: null, seatsTo: null, siteId: null, validFrom, validTo: null };
      await insertPayRates(trx, [
        ...LESSON_RATES.map(([lengthMinutes, amountMinor]) => ({ ...base, id: newId(), workType: 'lesson' as const, lengthMinutes, amountMinor: scaled(amountMinor, rateFactor), per: 'lesson' as const, approvedBy: owner.actor.personId })),
        { ...base, id: newId(), workType: 'trial', lengthMinutes: null, amountMinor: TRIAL_RATE_MINOR, per: 'lesson' },
        { ...base, id: newId(), workType: 'recital', lengthMinutes: null, amountMinor: 2000, per: 'hour' },
        { ...base, id: newId(), workType: 'rehearsal', lengthMinutes: null, amountMinor: 2000, per: 'hour' },
        { ...base, id: newId(), workType: 'meeting', lengthMinutes: null, amountMinor: 1800, per: 'hour' },
      ]);
    }
    await insertPayRule(trx, { id: newId(), kind: 'substitute', engagementKind: null, value: { ofAbsentRateBp: 9000 }, validFrom, validTo: null, approvedBy: owner.actor.personId });
  });
}

const monthOf = (date: LocalDate) => date.slice(0, 7);

/** Closed pay of the months since the last term began; the newest whole month is with the teachers or waits for marks. */
export async function layPayRuns(house: House): Promise<void> {
  const thisMonth = `${monthOf(house.today)}-01`;
  const first = `${monthOf(house.terms.last.startsOn)}-01`;
  for (let month = first; month < thisMonth; month = addMonths(month, 1)) {
    const isNewest = addMonths(month, 1) === thisMonth;
    await layPayRun(house, month, { isClosed: !isNewest });
  }
}

async function layPayRun(house: House, month: LocalDate, { isClosed }: { isClosed: boolean }): Promise<void> {
  const afterwards = instantOf(addDays(addMonths(month, 1), 2), 10 * 60, house.zone);
  const context = ownerAt(house, Math.min(afterwards, house.now));
  const { payRunIds } = await buildPayRuns({ month: monthOf(month) }, context);
  for (const payRunId of payRunIds) {
    const problems = (await linesOfRun(house.db, payRunId)).some(({ problem }) => problem !== '');
    if (problems) continue;
    await sendForCheck({ payRunId, answerByOn: addDays(context.today, 4) }, context);
    const checks = await checksOf(house.db, payRunId);
    for (const [index, { engagementId }] of checks.entries()) {
      const teacher = house.teachers.find((candidate) => candidate.engagementId === engagementId);
      if (!teacher || (!isClosed && index % 3 === 2)) continue;
      const own = teacherAt(house, teacher.id, [], context.now);
      if (!isClosed && index === 1) await ask(house, own, { payRunId, engagementId });
      else await agreeToPay({ payRunId, engagementId }, own);
    }
    if (!isClosed) continue;
    await approvePayRun({ payRunId }, context);
    await closePayRun({ payRunId }, context);
  }
}

async function ask(house: House, own: ReturnType<typeof teacherAt>, { payRunId, engagementId }: { payRunId: string; engagementId: string }): Promise<void> {
  const line = (await linesOfRun(house.db, payRunId)).find((candidate) => candidate.engagementId === engagementId);
  if (!line) return;
  await askAboutPay({ payRunId, engagementId, lineId: line.id, aboutOn: line.localDate, text: 'I think we went on for fifteen minutes longer that day. Could you look?' }, own);
}
