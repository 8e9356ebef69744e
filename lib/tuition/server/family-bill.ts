import 'server-only';
import type { Product } from '@/db/prices';
import type { BilledEnrolment, BilledSeat } from '@/db/tuition-facts';
import { consequencesOn } from '@/lib/calendar/consequences';
import { closedDatesFor } from '@/lib/calendar/term';
import type { MoneyWords } from '@/lib/explained';
import { localDateOf, type LocalDate } from '@/lib/time';
import { buildBill, MissingTaxRule, type Bill, type DraftLine } from '../bill';
import { chargeFor, chargeText, missingPriceText, plannedDatesOf, type EnrolmentFacts } from '../charges';
import { priceOf } from '../prices';
import { differenceOf, type ComparedLine, type Difference } from '../run-difference';
import { trialFeeCredit } from '../trial-fee';
import type { BillingFacts } from './billing-facts';

export type FamilyBill = { familyId: string; bill: Bill | null; problem: string; difference: Difference; lastTotalMinor: number | null };

/** The worked-out bill of one family for the period, or what stands in its way, in words; null when there is nothing to charge. */
export function familyBillOf(familyId: string, enrolments: readonly BilledEnrolment[], facts: BillingFacts): FamilyBill | null {
  const [first] = enrolments;
  if (!first) return null;
  const words: MoneyWords = { currency: first.currency, locale: facts.manner.locale };
  const before = facts.before.get(familyId) ?? null;
  const lastTotalMinor = before === null || before.length === 0 ? null : before.reduce((sum, { netMinor }) => sum + netMinor, 0);
  const problems: string[] = [];
  const gathering: Gathering = { facts, words, problems, trialsCredited: new Set(facts.trialsCredited) };
  const lines = [...enrolments.flatMap((enrolment) => tuitionLines(enrolment, gathering)), ...registrationLines(enrolments, facts)];
  if (lines.length === 0 && problems.length === 0) return null;
  const answer = problems.length > 0 ? problems[0]! : billOrProblem(lines, { familyId, first, facts, words });
  if (typeof answer === 'string') return { familyId, bill: null, problem: answer, difference: { kind: before ? 'changed' : 'new', sentence: '' }, lastTotalMinor };
  return { familyId, bill: answer, problem: '', difference: differenceOf(before, comparedLines(answer), words), lastTotalMinor };
}

type Family = { familyId: string; first: BilledEnrolment; facts: BillingFacts; words: MoneyWords };

function billOrProblem(lines: DraftLine[], { familyId, first, facts, words }: Family): Bill | string {
  const payer = facts.payers.get(familyId)?.[0];
  if (!payer) return 'Nobody pays for this family yet. Add a payer first.';
  try {
    const bill = buildBill({
      lines, words, plan: facts.plan, awards: facts.awards, discountMode: facts.rules['tuition.discount_mode'],
      discountRules: facts.discounts.filter((rule) => rule.familyId === null || rule.familyId === familyId),
      billedBefore: (facts.billed.get(familyId) ?? []).map((line) => ({ key: line.enrolmentId, studentId: line.studentId, grossMinor: line.grossMinor })),
      taxRules: facts.taxRates.filter(({ legalEntityId }) => legalEntityId === first.legalEntityId).map(({ exemptionReason, ...rule }) => ({ ...rule, reason: exemptionReason })),
      taxMode: first.taxMode, defaultPayerId: payer.id, splitRules: facts.splits.filter((split) => split.familyId === familyId).map(({ rule }) => rule),
    });
    const isBelowZero = bill.totalMinor < 0 || bill.shares.some(({ amountMinor }) => amountMinor < 0);
    return isBelowZero ? 'The credits are larger than the charges. Bill this family together with its next period.' : bill;
  } catch (error) {
    if (error instanceof MissingTaxRule) return `How ${error.taxClass.replaceAll('_', ' ')} is taxed is not set. Set it before billing.`;
    throw error;
  }
}

/** What is gathered while the enrolments of one family are gone through: problems in words, and trials whose fee has come off. */
type Gathering = { facts: BillingFacts; words: MoneyWords; problems: string[]; trialsCredited: Set<string> };

const isBilledBefore = ({ id, familyId, tuitionModel }: BilledEnrolment, { billed }: BillingFacts): boolean =>
  tuitionModel !== 'per_lesson' && (billed.get(familyId) ?? []).some(({ enrolmentId }) => enrolmentId === id);

function tuitionLines(enrolment: BilledEnrolment, gathering: Gathering): DraftLine[] {
  const { facts, words, problems } = gathering;
  if (isBilledBefore(enrolment, facts)) return [];
  const seats = chargeableSeats(enrolment, facts);
  const { product, unitMinor } = priceFor(enrolment, seats[0]?.localDate ?? facts.period.from, facts);
  const charged = enrolmentFacts(enrolment, seats, unitMinor ?? 0, facts);
  const charge = chargeFor(charged, { monthRule: facts.rules['tuition.month_rule'], words });
  if (!charge) return [];
  if (unitMinor === null) {
    problems.push(missingPriceText(charged));
    return [];
  }
  const line: DraftLine = {
    chargeKind: 'tuition', ...productFields(product), enrolmentId: enrolment.id, studentId: enrolment.studentId, text: chargeText(charged, charge.value), ...charge.value,
    serviceFrom: facts.period.from, serviceTo: facts.period.to,
    explain: charge.steps, isDiscountable: true, seatIds: enrolment.tuitionModel === 'per_lesson' ? seats.map(({ seatId }) => seatId) : [],
  };
  return [line, ...trialLines(enrolment, line, gathering)];
}

const productFields = (product: Product | undefined) =>
  ({ productId: product?.id ?? null, taxClass: product?.taxClass ?? 'tuition', accountCode: product?.accountCode ?? 'income' });

/** The price agreed with the enrolment, or else the list's of the day of the first lesson. */
function priceFor(enrolment: BilledEnrolment, on: LocalDate, { products, prices }: BillingFacts): { product: Product | undefined; unitMinor: number | null } {
  const product = products.find(({ kind, lessonTypeId }) => kind === 'tuition' && lessonTypeId === enrolment.lessonTypeId);
  const listed = product ? priceOf(prices, { productId: product.id, siteId: enrolment.siteId, lengthMinutes: enrolment.lengthMinutes, on }) : null;
  return { product, unitMinor: enrolment.unitPriceMinor ?? listed };
}

/** Lesson by lesson, what was marked and is charged for by the table of its day; otherwise every planned lesson. */
function chargeableSeats(enrolment: BilledEnrolment, facts: BillingFacts): BilledSeat[] {
  const own = (facts.seats.get(enrolment.id) ?? []).filter(({ localDate }) => localDate >= enrolment.startsOn && (enrolment.endsOn === null || localDate <= enrolment.endsOn));
  if (enrolment.tuitionModel !== 'per_lesson') return own;
  return own.filter(({ isBilled, attendance, localDate }) => isBilled === 0 && attendance !== 'expected' && consequencesOn(facts.consequences, localDate)[attendance].charged);
}

function enrolmentFacts(enrolment: BilledEnrolment, seats: readonly BilledSeat[], unitMinor: number, { period, closures }: BillingFacts): EnrolmentFacts {
  const lessonDates = seats.map(({ localDate }) => localDate);
  const closed = closedDatesFor(closures, enrolment.siteId, seats[0]?.startMin ?? 0, enrolment.lengthMinutes);
  return {
    enrolmentId: enrolment.id, studentId: enrolment.studentId, studentName: enrolment.studentName, subjectLabel: enrolment.subjectLabel, lessonLabel: enrolment.lessonLabel,
    lengthMinutes: enrolment.lengthMinutes, model: enrolment.tuitionModel, startsOn: enrolment.startsOn, unitMinor, lessonDates,
    plannedDates: plannedDatesOf(lessonDates, { startsOn: period.from, endsOn: period.to }, closed),
  };
}

/** The fee of the trial comes off the first bill, once per trial however many enrolments follow from it. It is shared as tuition is. */
function trialLines(enrolment: BilledEnrolment, tuition: DraftLine, { facts, words, problems, trialsCredited }: Gathering): DraftLine[] {
  const { trialId, trialFeeMinor: feeMinor, trialCreditUntilOn: creditUntilOn } = enrolment;
  if (!trialId || feeMinor === null || creditUntilOn === null || trialsCredited.has(trialId)) return [];
  const enrolledOn = localDateOf(enrolment.acceptedAt ?? enrolment.createdAt, facts.manner.zone);
  const credit = trialFeeCredit({ feeMinor, creditUntilOn }, enrolledOn, words);
  if (credit.value === 0) return [];
  trialsCredited.add(trialId);
  const product = facts.products.find(({ kind }) => kind === 'trial');
  // The product is how a later run knows that the fee has come off: without it, the fee would come off again and again.
  if (!product) {
    problems.push('The price list has no trial lesson, so its fee cannot be credited. Add it before billing.');
    return [];
  }
  return [{
    ...tuition, productId: product.id, accountCode: product.accountCode, text: `${enrolment.studentName}: trial fee credited`,
    quantity: 1, unitMinor: credit.value, grossMinor: credit.value, explain: credit.steps, isDiscountable: false, seatIds: [],
  }];
}

/** Once per student, with the first bill of their first enrolment. */
function registrationLines(enrolments: readonly BilledEnrolment[], { products, prices, registered, period }: BillingFacts): DraftLine[] {
  const product = products.find(({ kind }) => kind === 'registration');
  if (!product) return [];
  const students = [...new Map(enrolments.map((enrolment) => [enrolment.studentId, enrolment])).values()];
  return students.flatMap((student) => {
    const isNew = student.studentFirstStartsOn >= period.from && student.studentFirstStartsOn <= period.to && !registered.has(student.studentId);
    const unitMinor = isNew ? priceOf(prices, { productId: product.id, siteId: student.siteId, lengthMinutes: null, on: student.startsOn }) : null;
    if (unitMinor === null) return [];
    return [{
      chargeKind: 'registration', productId: product.id, enrolmentId: null, studentId: student.studentId, text: `${student.studentName}: ${product.label.toLowerCase()}`, quantity: 1, unitMinor, grossMinor: unitMinor,
      taxClass: product.taxClass, accountCode: product.accountCode, serviceFrom: period.from, serviceTo: period.to, explain: ['Once per student, with the first bill'], isDiscountable: false, seatIds: [],
    }];
  });
}

const comparedLines = (bill: Bill): ComparedLine[] => bill.lines.flatMap((line) => (line.chargeKind === 'tuition' && line.enrolmentId && line.grossMinor > 0
  ? [{ enrolmentId: line.enrolmentId, text: line.text, quantity: line.quantity, unitMinor: line.unitMinor, netMinor: line.netMinor, discounts: line.steps.map(({ label }) => label) }] : []));
