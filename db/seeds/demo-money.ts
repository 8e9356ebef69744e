import { newId } from '@/lib/server/ids';
import { plainAmount } from '@/lib/money';
import { previewTuitionRun } from '@/lib/tuition/server/preview-tuition-run';
import { releaseTuitionRun } from '@/lib/tuition/server/release-tuition-run';
import { takeDeskPayment } from '@/lib/tuition/server/take-desk-payment';
import { addDays, instantOf, type LocalDate } from '@/lib/time';
import { insertDiscountRule } from '../discounts';
import { insertPrice, insertTaxRate, liveProducts } from '../prices';
import { transaction } from '../transaction';
import { findTuitionRun } from '../tuition-runs';
import type { TermRow } from '../terms';
import { ownerAt } from './demo-context';
import type { House } from './demo-types';
import { between, pick } from './random';

const LESSON_PRICES = [[30, 2800], [45, 4000], [60, 5200]] as const;

/** Prices, tax and discounts of the demo school; invented, like everything here. */
export async function layPrices({ db, terms, legalEntityId, owner }: House): Promise<void> {
  const validFrom = addDays(terms.last.startsOn, -60);
  const products = await liveProducts(db);
  const idOf = (code: string) => products.find((product) => product.code === code)?.id ?? '';
  await transaction(db, async (trx) => {
    const approvedBy = owner.actor.personId;
    for (const [lengthMinutes, amountMinor] of LESSON_PRICES) await insertPrice(trx, { id: newId(), productId: idOf('lesson'), siteId: null, lengthMinutes, amountMinor, validFrom, validTo: null, approvedBy });
    await insertPrice(trx, { id: newId(), productId: idOf('class'), siteId: null, lengthMinutes: null, amountMinor: 1600, validFrom, validTo: null, approvedBy });
    await insertPrice(trx, { id: newId(), productId: idOf('registration'), siteId: null, lengthMinutes: null, amountMinor: 3000, validFrom, validTo: null, approvedBy });
    await insertPrice(trx, { id: newId(), productId: idOf('trial'), siteId: null, lengthMinutes: null, amountMinor: 2500, validFrom, validTo: null, approvedBy });
    await insertTaxRate(trx, { id: newId(), legalEntityId, taxClass: 'tuition', treatment: 'exempt', rateBp: 0, exemptionReason: 'Demo setting: private tuition. Check your local rules.', validFrom, approvedBy });
    await insertDiscountRule(trx, { id: newId(), code: 'second_child', label: 'Second child', qualifies: 'second_child', rateBp: 1000, orderNo: 1, familyId: null, validFrom, approvedBy });
    await insertDiscountRule(trx, { id: newId(), code: 'multi_lesson', label: 'Second lesson', qualifies: 'multi_lesson', rateBp: 500, orderNo: 2, familyId: null, validFrom, approvedBy });
  });
}

/** Releases a term's tuition as its owner did, a fortnight before it began. */
export async function layTuitionRun(house: House, term: TermRow, { instalments }: { instalments: number }): Promise<void> {
  const context = ownerAt(house, instantOf(addDays(term.startsOn, -14), 10 * 60, house.zone));
  const { runId } = await previewTuitionRun({ kind: 'term', period: term.id, dueOn: term.startsOn, instalments, depositPercent: 0 }, context);
  const run = await findTuitionRun(house.db, runId);
  await releaseTuitionRun({ runId, controlTotalMinor: run?.controlTotalMinor ?? 0 }, context);
}

type DuePart = { payerId: string; dueOn: LocalDate; amountMinor: number; isNoor: number };

/** Families pay about when it is due; a few are late, and one share of the Vales is left for the demo to pay. */
export async function layPayments(house: House, term: TermRow, { allPaid }: { allPaid: boolean }): Promise<void> {
  const { db, random, today, zone } = house;
  const parts: DuePart[] = await db('instalment as n').join('invoice_share as s', 's.id', 'n.shareId').join('invoice as i', 'i.id', 's.invoiceId').join('tuition_run as r', 'r.id', 'i.tuitionRunId')
    .join('payer as y', 'y.id', 's.payerId').join('person as p', 'p.id', 'y.personId').where('r.termId', term.id).where('n.amountMinor', '>', 0)
    .select('s.payerId', 'n.dueOn', 'n.amountMinor', db.raw("(p.given_name = 'Noor') AS is_noor")).orderBy('n.dueOn');
  for (const part of parts) {
    const paidOn = addDays(part.dueOn, between(random, -6, 4));
    const isLate = !allPaid && (random() < 0.07 || part.isNoor === 1) && part.dueOn > addDays(today, -35);
    if (paidOn > today || isLate) continue;
    await takeDeskPayment({
      payerId: part.payerId, amount: plainAmount(part.amountMinor, 'EUR'), method: pick(random, ['transfer', 'transfer', 'transfer', 'cash'] as const), receivedOn: paidOn, note: '', requestKey: newId(),
    }, ownerAt(house, instantOf(paidOn, 12 * 60, zone)));
  }
}
