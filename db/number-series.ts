import type { Trx } from './connection';

export type NumberKind = 'invoice' | 'credit_note' | 'receipt' | 'refund' | 'statement' | 'year_statement' | 'pay_statement' | 'export';
export type TakenNumber = { sequenceNo: number; documentNo: string };

const LETTERS: Record<NumberKind, string> = { invoice: '', credit_note: 'CN', receipt: 'R', refund: 'RF', statement: 'S', year_statement: 'Y', pay_statement: 'P', export: 'X' };

/**
 * The next number of a legal entity's series. Taken inside the transaction that issues the document, so that one which
 * fails leaves no hole; the database refuses a number that does not follow the one before it.
 */
export async function takeNumber(trx: Trx, legalEntityId: string, kind: NumberKind): Promise<TakenNumber> {
  const entity: { numberPrefix: string } | undefined = await trx('legal_entity').where({ id: legalEntityId }).first('numberPrefix');
  if (!entity) throw new Error('a document needs a legal entity');
  await trx('number_series').insert({ legalEntityId, kind, prefix: `${entity.numberPrefix}${LETTERS[kind]}` }).onConflict(['legal_entity_id', 'kind']).ignore();
  const rows = await trx.raw<{ sequenceNo: number; prefix: string }[]>(
    'UPDATE number_series SET next_no = next_no + 1 WHERE legal_entity_id = ? AND kind = ? RETURNING next_no - 1 AS sequence_no, prefix', [legalEntityId, kind]);
  const taken = rows[0];
  if (!taken) throw new Error('the number series is gone');
  return { sequenceNo: taken.sequenceNo, documentNo: `${taken.prefix}${String(taken.sequenceNo).padStart(5, '0')}` };
}
