import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type TuitionRunState = 'preview' | 'releasing' | 'released' | 'dropped';
export type TuitionRun = {
  id: string; label: string; kind: 'term' | 'month'; termId: string | null; periodFrom: LocalDate; periodTo: LocalDate; issuedOn: LocalDate; dueOn: LocalDate;
  planJson: string; state: TuitionRunState; controlTotalMinor: number; previewedAt: EpochSeconds | null; releasedAt: EpochSeconds | null;
};
export type ItemState = 'planned' | 'held' | 'problem' | 'released' | 'gone';
export type TuitionRunItem = {
  id: string; runId: string; familyId: string; state: ItemState; totalMinor: number; lastTotalMinor: number | null; changeKind: 'new' | 'gone' | 'changed' | 'same';
  changeText: string; problem: string; heldReason: string; billJson: string; invoiceId: string | null;
};
export type ItemWithFamily = TuitionRunItem & { familyName: string; legalEntityId: string; currency: string };

const RUN = ['id', 'label', 'kind', 'termId', 'periodFrom', 'periodTo', 'issuedOn', 'dueOn', 'planJson', 'state', 'controlTotalMinor', 'previewedAt', 'releasedAt'] as const;

export async function insertTuitionRun(trx: Trx, run: Omit<TuitionRun, 'controlTotalMinor' | 'previewedAt' | 'releasedAt'> & { createdBy: string }): Promise<void> {
  await trx('tuition_run').insert(run);
}
export const findTuitionRun = (db: Db, id: string): Promise<TuitionRun | undefined> => db<TuitionRun>('tuition_run').where({ id }).first(...RUN);
export const openTuitionRun = (db: Db, kind: 'term' | 'month', periodFrom: LocalDate): Promise<TuitionRun | undefined> =>
  db<TuitionRun>('tuition_run').where({ kind, periodFrom }).whereIn('state', ['preview', 'releasing']).first(...RUN);
export async function hasReleasedRun(db: Db, kind: 'term' | 'month', periodFrom: LocalDate): Promise<boolean> {
  return (await db('tuition_run').where({ kind, periodFrom, state: 'released' }).first('id')) !== undefined;
}

export type RunListRow = TuitionRun & { familyCount: number; heldCount: number; releasedCount: number };
export const allTuitionRuns = (db: Db): Promise<RunListRow[]> =>
  db('tuition_run as r').whereNot('r.state', 'dropped').orderBy([{ column: 'r.periodFrom', order: 'desc' }, { column: 'r.createdAt', order: 'desc' }])
    .select(...RUN.map((column) => `r.${column}`), ...countsOf(db));

const countsOf = (db: Db) => [['family_count', ["planned", "held", "problem", "released"]], ['held_count', ["held", "problem"]], ['released_count', ['released']]].map(([name, states]) =>
  db.raw(`(SELECT count(*) FROM tuition_run_item i WHERE i.run_id = r.id AND i.state IN (${(states as string[]).map((state) => `'${state}'`).join(', ')})) AS ${name as string}`));

export async function changeTuitionRun(trx: Trx, id: string, change: Partial<TuitionRun> & { releasedBy?: string | null }): Promise<void> {
  await trx('tuition_run').where({ id }).update({ ...change, rowVersion: trx.raw('row_version + 1') });
}

/** Writes the worked-out bills of a run afresh. Families held by a person stay held, with their reason. */
export async function replaceItems(trx: Trx, runId: string, items: Omit<TuitionRunItem, 'heldReason' | 'invoiceId'>[]): Promise<void> {
  const held: { familyId: string; heldReason: string; heldBy: string | null; heldAt: number | null }[] =
    await trx('tuition_run_item').where({ runId, state: 'held' }).select('familyId', 'heldReason', 'heldBy', 'heldAt');
  await trx('tuition_run_item').where({ runId }).whereNot('state', 'released').delete();
  for (let at = 0; at < items.length; at += 100) await trx('tuition_run_item').insert(items.slice(at, at + 100));
  for (const { familyId, ...hold } of held) await trx('tuition_run_item').where({ runId, familyId, state: 'planned' }).update({ state: 'held', ...hold });
}

const joinedItems = (db: Db) => db('tuition_run_item as i').join('family as f', 'f.id', 'i.familyId').select<ItemWithFamily[]>('i.*', 'f.name as familyName', 'f.legalEntityId', 'f.currency');
export const itemsOfRun = (db: Db, runId: string): Promise<ItemWithFamily[]> => joinedItems(db).where('i.runId', runId).orderBy(['f.name', 'f.id']);
export const findItem = (db: Db, runId: string, familyId: string): Promise<ItemWithFamily | undefined> => joinedItems(db).where({ 'i.runId': runId, 'i.familyId': familyId }).first();

export async function plannedItemIds(db: Db, runId: string): Promise<string[]> {
  const rows: { familyId: string }[] = await db('tuition_run_item as i').join('family as f', 'f.id', 'i.familyId').where({ 'i.runId': runId, 'i.state': 'planned' }).orderBy(['f.name', 'f.id']).select('i.familyId');
  return rows.map(({ familyId }) => familyId);
}

export async function holdItem(trx: Trx, id: string, hold: { heldReason: string; heldBy: string; heldAt: EpochSeconds } | null): Promise<void> {
  await trx('tuition_run_item').where({ id }).update(hold ? { state: 'held', ...hold } : { state: 'planned', heldReason: '', heldBy: null, heldAt: null });
}
export async function markItemReleased(trx: Trx, id: string, invoiceId: string): Promise<void> {
  await trx('tuition_run_item').where({ id }).update({ state: 'released', invoiceId });
}

/** Counts and sums by state: the control total is what stands as planned. */
export const itemTotals = (db: Db, runId: string): Promise<{ state: ItemState; families: number; totalMinor: number }[]> =>
  db('tuition_run_item').where({ runId }).groupBy('state').select('state', db.raw('count(*) AS families'), db.raw('sum(total_minor) AS total_minor'));
