import type { AppAbility } from '@/policies/ability';
import { allowedRows } from '@/policies/where';
import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db } from './connection';

export type InvoiceHead = {
  id: string; familyId: string; familyName: string; documentNo: string; sequenceNo: number; label: string; issuedOn: LocalDate; dueOn: LocalDate; currency: string;
  netMinor: number; taxMinor: number; totalMinor: number; sellerJson: string; createdAt: EpochSeconds;
};
const heads = (db: Db) => db('invoice as i').join('family as f', 'f.id', 'i.familyId').where('i.state', 'issued')
  .select<InvoiceHead[]>('i.id', 'i.familyId', 'f.name as familyName', 'i.documentNo', 'i.sequenceNo', 'i.label', 'i.issuedOn', 'i.dueOn', 'i.currency', 'i.netMinor', 'i.taxMinor', 'i.totalMinor', 'i.sellerJson', 'i.createdAt');

export const findInvoice = (db: Db, id: string): Promise<InvoiceHead | undefined> => heads(db).where('i.id', id).first();
export const invoicesOfFamily = (db: Db, familyId: string): Promise<InvoiceHead[]> => heads(db).where('i.familyId', familyId).orderBy('i.sequenceNo', 'desc');
/** Newest first, all of them for a null; the screen filters and sorts what it was given. */
export const recentInvoices = (db: Db, limit: number | null): Promise<InvoiceHead[]> => {
  const newest = heads(db).orderBy('i.issuedOn', 'desc').orderBy('i.sequenceNo', 'desc');
  return limit === null ? newest : newest.limit(limit);
};
export async function countInvoices(db: Db): Promise<number> {
  const [row]: { count: number }[] = await db('invoice').where({ state: 'issued' }).count('id as count');
  return row?.count ?? 0;
}

export type LineRow = { id: string; invoiceId: string; lineNo: number; chargeKind: string; text: string; quantity: number; unitMinor: number; grossMinor: number; netMinor: number; taxMinor: number; taxTreatment: string; taxBp: number; explainJson: string; studentId: string | null };
export const linesOfInvoice = (db: Db, invoiceId: string): Promise<LineRow[]> =>
  db<LineRow>('invoice_line').where({ invoiceId }).orderBy('lineNo').select('id', 'invoiceId', 'lineNo', 'chargeKind', 'text', 'quantity', 'unitMinor', 'grossMinor', 'netMinor', 'taxMinor', 'taxTreatment', 'taxBp', 'explainJson', 'studentId');

export type TaxRow = { treatment: 'taxed' | 'zero' | 'exempt'; rateBp: number; netMinor: number; taxMinor: number; reason: string };
export const taxOfInvoice = (db: Db, invoiceId: string): Promise<TaxRow[]> => db<TaxRow & { invoiceId: string }>('invoice_tax').where({ invoiceId }).select('treatment', 'rateBp', 'netMinor', 'taxMinor', 'reason');

export type ShareRow = { id: string; invoiceId: string; payerId: string; amountMinor: number; payerName: string; payerAddress: string };
const SHARE = ['s.id', 's.invoiceId', 's.payerId', 's.amountMinor', 's.payerName', 's.payerAddress'] as const;

/** Only the shares that this person may read leave the database: a payer's own, never the other payer's. */
export const sharesFor = (db: Db, ability: AppAbility, invoiceIds: readonly string[]): Promise<ShareRow[]> =>
  db('invoice_share as s').whereIn('s.invoiceId', [...invoiceIds]).where(allowedRows(ability, 'read', 'InvoiceShare', 's')).orderBy(['s.invoiceId', 's.payerName']).select<ShareRow[]>(...SHARE);

export type OwnShare = ShareRow & Pick<InvoiceHead, 'documentNo' | 'label' | 'issuedOn' | 'currency' | 'familyName'>;
export const ownShares = (db: Db, ability: AppAbility, payerIds: readonly string[]): Promise<OwnShare[]> =>
  db('invoice_share as s').join('invoice as i', 'i.id', 's.invoiceId').join('family as f', 'f.id', 'i.familyId').where('i.state', 'issued').whereIn('s.payerId', [...payerIds])
    .where(allowedRows(ability, 'read', 'InvoiceShare', 's')).orderBy('i.issuedOn', 'desc').orderBy('i.sequenceNo', 'desc')
    .select<OwnShare[]>(...SHARE, 'i.documentNo', 'i.label', 'i.issuedOn', 'i.currency', 'f.name as familyName');

export type PartRow = { shareId: string; chargeKind: string; wholeMinor: number; amountMinor: number; shareBp: number | null; sentence: string };
export const partsOfShares = (db: Db, shareIds: readonly string[]): Promise<PartRow[]> =>
  db<PartRow>('invoice_share_part').whereIn('shareId', [...shareIds]).orderBy('chargeKind').select('shareId', 'chargeKind', 'wholeMinor', 'amountMinor', 'shareBp', 'sentence');

/** Paid by money, and taken off by credit notes, per share. */
export async function settledOfShares(db: Db, shareIds: readonly string[]): Promise<Map<string, { paidMinor: number; creditedMinor: number }>> {
  const rows: { shareId: string; paidMinor: number; creditedMinor: number }[] = await db('allocation as a').join('instalment as n', 'n.id', 'a.instalmentId')
    .whereIn('n.shareId', [...shareIds]).whereNull('a.reversedOn').groupBy('n.shareId')
    .select('n.shareId', db.raw('sum(CASE WHEN a.payment_id IS NOT NULL THEN a.amount_minor ELSE 0 END) AS paid_minor'),
      db.raw('sum(CASE WHEN a.credit_note_share_id IS NOT NULL THEN a.amount_minor ELSE 0 END) AS credited_minor'));
  return new Map(rows.map(({ shareId, ...sums }) => [shareId, sums]));
}
