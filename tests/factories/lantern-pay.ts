import { randomUUID } from 'node:crypto';
import type { Db } from '../../db/connection';
import { insertPayRates, insertPayRule } from '../../db/pay-rates';
import { insertContact } from '../../db/people';
import { transaction } from '../../db/transaction';
import type { PayRate } from '../../lib/payroll/rates';

const FROM = '2026-01-01';
const rate = (engagementId: string, over: Partial<PayRate>): PayRate => ({
  id: randomUUID(), engagementId, workType: 'lesson', lessonTypeId: null, lengthMinutes: null, seatsFrom: null, seatsTo: null, siteId: null, amountMinor: 0, per: 'lesson', validFrom: FROM, validTo: null, ...over,
});

const BY_LENGTH = { mara: [[30, 2100], [45, 3000], [60, 3800]], leo: [[30, 1900], [45, 2700], [60, 3400]], ines: [[30, 2400], [45, 3400], [60, 4400]] } as const;
const TIERS = [[1, 3, 4000], [4, 6, 4600], [7, null, 5200]] as const;

/** Pay rates and rules of the worked-example school, on top of `lanternStreet`. */
export async function lanternPay(db: Db): Promise<void> {
  await transaction(db, async (trx) => {
    for (const [name, lengths] of Object.entries(BY_LENGTH)) {
      const engagementId = `engagement-${name}`;
      await insertPayRates(trx, [
        ...lengths.map(([lengthMinutes, amountMinor]) => rate(engagementId, { lengthMinutes, amountMinor })),
        ...TIERS.map(([seatsFrom, seatsTo, amountMinor]) => rate(engagementId, { workType: 'group', seatsFrom, seatsTo, amountMinor })),
        rate(engagementId, { workType: 'recital', amountMinor: 2000, per: 'hour' }), rate(engagementId, { workType: 'admin', amountMinor: 1800, per: 'hour' }),
      ]);
      await insertContact(trx, { id: `email-${name}`, personId: name, kind: 'email', value: `${name}@example.org` });
    }
    await insertPayRule(trx, { id: 'substitute', kind: 'substitute', engagementKind: null, value: { ofAbsentRateBp: 9000 }, validFrom: FROM, validTo: null });
  });
}
