import type { OpenItem } from '@/lib/tuition/allocation';
import type { LocalDate } from '@/lib/time';
import type { Db } from './connection';

/** What was open on a day can be worked out for any day, whatever was paid since. */
const FOREVER = '9999-12-31';

export type OpenInstalment = {
  id: string; shareId: string; invoiceId: string; payerId: string; documentNo: string; sequenceNo: number; label: string; instalmentNo: number; dueOn: LocalDate;
  amountMinor: number; settledMinor: number; openMinor: number;
};

const ALLOCATED = (target: string, id: string) =>
  `coalesce((SELECT sum(a.amount_minor) FROM allocation a WHERE a.${target} = ${id} AND a.made_on <= :asAt AND (a.reversed_on IS NULL OR a.reversed_on > :asAt)), 0)`;
const WRITTEN_OFF = 'coalesce((SELECT sum(w.amount_minor) FROM write_off w WHERE w.instalment_id = n.id AND w.written_off_on <= :asAt), 0)';

const settledInstalment = (db: Db, asAt: LocalDate) => db.raw(`${ALLOCATED('instalment_id', 'n.id')} + ${WRITTEN_OFF} AS settled_minor`, { asAt });
const settledFee = (db: Db, asAt: LocalDate) => db.raw(`${ALLOCATED('late_fee_id', 'f.id')} AS settled_minor`, { asAt });

/** Instalments of issued invoices with what has settled them, for some payers or for all. */
export async function instalmentsFor(db: Db, payerIds: readonly string[] | 'all', asAt: LocalDate = FOREVER): Promise<OpenInstalment[]> {
  const query = db('instalment as n').join('invoice_share as s', 's.id', 'n.shareId').join('invoice as i', 'i.id', 's.invoiceId')
    .where('i.state', 'issued').where('i.issuedOn', '<=', asAt).whereNull('n.replacedAt')
    .select<Omit<OpenInstalment, 'openMinor'>[]>('n.id', 'n.shareId', 's.invoiceId', 's.payerId', 'i.documentNo', 'i.sequenceNo', 'i.label', 'n.instalmentNo', 'n.dueOn', 'n.amountMinor', settledInstalment(db, asAt))
    .orderBy(['n.dueOn', 'i.sequenceNo', 'n.instalmentNo']);
  const rows = await (payerIds === 'all' ? query : query.whereIn('s.payerId', [...payerIds]));
  return rows.map((row) => ({ ...row, openMinor: row.amountMinor - row.settledMinor }));
}

type OpenFee = { id: string; payerId: string; documentNo: string; sequenceNo: number; computedOn: LocalDate; amountMinor: number; settledMinor: number };
const feesFor = (db: Db, payerIds: readonly string[], asAt: LocalDate): Promise<OpenFee[]> =>
  db('late_fee as f').join('instalment as n', 'n.id', 'f.instalmentId').join('invoice_share as s', 's.id', 'n.shareId').join('invoice as i', 'i.id', 's.invoiceId')
    .whereIn('f.payerId', [...payerIds]).where('f.computedOn', '<=', asAt).andWhere((query) => query.whereNull('f.waivedOn').orWhere('f.waivedOn', '>', asAt))
    .select('f.id', 'f.payerId', 'i.documentNo', 'i.sequenceNo', 'f.computedOn', 'f.amountMinor', settledFee(db, asAt));

/** Everything a payer still owes, ready for the allocation rule. */
export async function openItemsOf(db: Db, payerId: string, asAt: LocalDate = FOREVER): Promise<(OpenItem & { shareId: string | null })[]> {
  const [instalments, fees] = [await instalmentsFor(db, [payerId], asAt), await feesFor(db, [payerId], asAt)];
  const open = instalments.filter(({ openMinor }) => openMinor > 0).map((row) => (
    { id: row.id, kind: 'instalment' as const, shareId: row.shareId, label: `invoice ${row.documentNo}`, dueOn: row.dueOn, numberNo: row.sequenceNo * 100 + row.instalmentNo, openMinor: row.openMinor }));
  const openFees = fees.filter((fee) => fee.amountMinor > fee.settledMinor).map((fee) => (
    { id: fee.id, kind: 'late_fee' as const, shareId: null, label: `late fee on invoice ${fee.documentNo}`, dueOn: fee.computedOn, numberNo: fee.sequenceNo * 100, openMinor: fee.amountMinor - fee.settledMinor }));
  return [...open, ...openFees];
}

/** Money received and credited that settles nothing yet. */
export async function creditOfPayers(db: Db, payerIds: readonly string[]): Promise<Map<string, number>> {
  const rows: { payerId: string; creditMinor: number }[] = await db('payer_credit').whereIn('payerId', [...payerIds]).select('payerId', 'creditMinor');
  return new Map(rows.map(({ payerId, creditMinor }) => [payerId, creditMinor]));
}
