import type { PayLine } from '@/lib/payroll/pay-lines';
import type { Db, Trx } from './connection';

export type StoredPayLine = Omit<PayLine, 'explain'> & { id: string; payRunId: string; explain: string[]; queryId: string | null; lengthMinutes: number | null; label: string | null };
type Row = Omit<StoredPayLine, 'explain'> & { explainJson: string };

const joined = (db: Db) => db('pay_line as l').leftJoin('occurrence as o', 'o.id', 'l.occurrenceId').leftJoin('lesson_type as t', 't.id', 'o.lessonTypeId')
  .select<Row[]>('l.id', 'l.payRunId', 'l.engagementId', 'l.kind', 'l.lineKey', 'l.occurrenceId', 'l.localDate', 'l.startMin', 'l.text', 'l.minutes', 'l.rateId', 'l.rateMinor', 'l.shareBp', 'l.amountMinor', 'l.problem', 'l.explainJson', 'l.queryId', 'o.lengthMinutes', 't.label')
  .orderBy(['l.localDate', 'l.startMin', 'l.lineKey']);
const toLine = ({ explainJson, ...row }: Row): StoredPayLine => ({ ...row, explain: JSON.parse(explainJson) as string[] });

export const linesOfRun = async (db: Db, payRunId: string): Promise<StoredPayLine[]> => (await joined(db).where({ 'l.payRunId': payRunId })).map(toLine);
export const linesOfTeacher = async (db: Db, payRunId: string, engagementId: string): Promise<StoredPayLine[]> => (await joined(db).where({ 'l.payRunId': payRunId, 'l.engagementId': engagementId })).map(toLine);
export async function findPayLine(db: Db, id: string): Promise<StoredPayLine | undefined> {
  const row = await joined(db).where('l.id', id).first();
  return row && toLine(row);
}

const keyOf = ({ engagementId, lineKey }: Pick<PayLine, 'engagementId' | 'lineKey'>) => `${engagementId} ${lineKey}`;
const rowOf = ({ explain, ...line }: PayLine) => ({ ...line, timeEntryId: sourceOf(line.lineKey, 'time'), mileageEntryId: sourceOf(line.lineKey, 'mileage'), explainJson: JSON.stringify(explain) });
const sourceOf = (lineKey: string, kind: string) => (lineKey.startsWith(`${kind}:`) ? lineKey.slice(kind.length + 1) : null);

/** Brings a run's lines to what the facts say now. A line that stays keeps its id, and with it what was asked about it; answers to questions stay. */
export async function replaceLines(trx: Trx, payRunId: string, lines: readonly PayLine[], newId: () => string): Promise<void> {
  const before = (await linesOfRun(trx, payRunId)).filter(({ kind }) => kind !== 'correction');
  const wanted = new Map(lines.map((line) => [keyOf(line), line]));
  for (const old of before) {
    const line = wanted.get(keyOf(old));
    wanted.delete(keyOf(old));
    if (line) await trx('pay_line').where({ id: old.id }).update(rowOf(line));
    else {
      await trx('pay_query').where({ payLineId: old.id }).update({ payLineId: null });
      await trx('pay_line').where({ id: old.id }).delete();
    }
  }
  const fresh = [...wanted.values()].map((line) => ({ id: newId(), payRunId, ...rowOf(line) }));
  for (let at = 0; at < fresh.length; at += 100) await trx('pay_line').insert(fresh.slice(at, at + 100));
}

export async function insertPayLine(trx: Trx, payRunId: string, line: PayLine & { id: string; queryId: string }): Promise<void> {
  const { id, queryId, ...rest } = line;
  await trx('pay_line').insert({ id, queryId, payRunId, ...rowOf(rest) });
}
