import { randomUUID } from 'node:crypto';
import type { Db } from '../../db/connection';
import { insertAward, insertDiscountRule, insertFund } from '../../db/discounts';
import { insertEnrolment, type Enrolment } from '../../db/enrolments';
import { addStudentToFamily, insertFamily, insertPayer } from '../../db/families';
import { insertOccurrence, insertSeats } from '../../db/occurrences';
import { insertContact } from '../../db/people';
import { insertPrice, insertProduct, insertTaxRate } from '../../db/prices';
import { transaction } from '../../db/transaction';
import { spanOf } from '../../lib/calendar/lesson-time';
import type { LocalDate } from '../../lib/time';

const FROM = '2026-01-01';

/** Prices, tax, discounts and the family Vale of the worked-example school, on top of `lanternStreet`. Ids are the names. */
export async function lanternMoney(db: Db): Promise<void> {
  await transaction(db, async (trx) => {
    const products = [
      { id: 'lesson', code: 'lesson', label: 'Lesson', kind: 'tuition', lessonTypeId: 'single', taxClass: 'tuition', accountCode: 'tuition_income' },
      { id: 'class', code: 'class', label: 'Class', kind: 'tuition', lessonTypeId: 'group', taxClass: 'tuition', accountCode: 'tuition_income' },
      { id: 'registration', code: 'registration', label: 'Registration', kind: 'registration', lessonTypeId: null, taxClass: 'tuition', accountCode: 'fee_income' },
      { id: 'trial', code: 'trial', label: 'Trial lesson', kind: 'trial', lessonTypeId: null, taxClass: 'tuition', accountCode: 'fee_income' },
    ] as const;
    for (const product of products) await insertProduct(trx, product);
    const prices = [['lesson', 30, 4200], ['lesson', 45, 6000], ['lesson', 60, 8000], ['class', null, 1800], ['registration', null, 3500]] as const;
    for (const [productId, lengthMinutes, amountMinor] of prices) await insertPrice(trx, { id: randomUUID(), productId, siteId: null, lengthMinutes, amountMinor, validFrom: FROM, validTo: null });
    for (const legalEntityId of ['lantern', 'canal-entity']) {
      await insertTaxRate(trx, { id: randomUUID(), legalEntityId, taxClass: 'tuition', treatment: 'exempt', rateBp: 0, exemptionReason: 'private tuition', validFrom: FROM });
    }
    await insertDiscountRule(trx, { id: 'second-child', code: 'second_child', label: 'Second child', qualifies: 'second_child', rateBp: 1000, orderNo: 1, familyId: null, validFrom: FROM });
    await insertDiscountRule(trx, { id: 'second-lesson', code: 'multi_lesson', label: 'Second lesson', qualifies: 'multi_lesson', rateBp: 500, orderNo: 2, familyId: null, validFrom: FROM });
    await insertFamily(trx, { id: 'vale', name: 'Vale', legalEntityId: 'lantern', currency: 'USD' });
    for (const [index, id] of ['noor', 'sam'].entries()) {
      await insertContact(trx, { id: `email-${id}`, personId: id, kind: 'email', value: `${id}@example.com` });
      await insertPayer(trx, { id: `payer-${id}`, familyId: 'vale', personId: id, orderNo: index + 1, billingAddress: `${id} street` });
    }
    for (const id of ['ada', 'ben']) await addStudentToFamily(trx, 'vale', id);
  });
}

export async function scholarship(db: Db, studentId: string, rateBp: number): Promise<void> {
  await transaction(db, async (trx) => {
    await insertFund(trx, { id: 'fund', name: 'Lantern fund', budgetMinor: 100_000, startsOn: FROM });
    await insertAward(trx, { id: 'award', fundId: 'fund', studentId, rateBp, committedMinor: 20_000, validFrom: FROM });
  });
}

type Wish = Partial<Enrolment> & { studentId: string; dates: readonly LocalDate[]; type?: 'single' | 'group'; startMin?: number };

/** An enrolment with its lessons in the calendar (Quay, Mara), long since enrolled unless `startsOn` says otherwise. */
export async function enrolled(db: Db, { dates, type = 'single', startMin = 960, ...over }: Wish): Promise<{ enrolmentId: string; occurrenceIds: string[] }> {
  const enrolmentId = randomUUID();
  const lengthMinutes = over.lengthMinutes ?? 30;
  return transaction(db, async (trx) => {
    await insertEnrolment(trx, {
      id: enrolmentId, familyId: 'vale', subjectId: 'keyboard', lessonTypeId: type, seriesId: null, lengthMinutes, teacherId: 'mara', siteId: 'quay', tuitionModel: 'per_term_count',
      unitPriceMinor: null, startsOn: '2025-09-08', endsOn: null, state: 'active', ...over,
    });
    const occurrenceIds: string[] = [];
    for (const localDate of dates) {
      const id = randomUUID();
      const time = { localDate, startMin, lengthMinutes, zone: 'America/New_York' };
      await insertOccurrence(trx, { id, ...spanOf(time), ...time, seriesId: null, lessonTypeId: type, subjectId: 'keyboard', title: '', siteId: 'quay', roomId: 'q1', plannedTeacherId: 'mara', mode: 'in_room', cancelDeadlineAt: null });
      await insertSeats(trx, [{ id: randomUUID(), occurrenceId: id, studentId: over.studentId, enrolmentId, source: 'roster' }]);
      occurrenceIds.push(id);
    }
    return { enrolmentId, occurrenceIds };
  });
}
