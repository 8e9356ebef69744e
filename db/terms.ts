import type { Closure } from '@/lib/calendar/term';
import type { LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export type TermRow = { id: string; name: string; yearLabel: string; startsOn: LocalDate; endsOn: LocalDate; state: 'planned' | 'published' | 'closed' };
const COLUMNS = ['id', 'name', 'yearLabel', 'startsOn', 'endsOn', 'state'] as const;

export const allTerms = (db: Db): Promise<TermRow[]> => db<TermRow>('term').orderBy('startsOn').select(...COLUMNS);
export const findTerm = (db: Db, id: string): Promise<TermRow | undefined> => db<TermRow>('term').where({ id }).first(...COLUMNS);
export const termOn = (db: Db, date: LocalDate): Promise<TermRow | undefined> =>
  db<TermRow>('term').where('startsOn', '<=', date).where('endsOn', '>=', date).first(...COLUMNS);
/** The term of this day, or the next one to come. */
export const currentOrNextTerm = (db: Db, date: LocalDate): Promise<TermRow | undefined> =>
  db<TermRow>('term').where('endsOn', '>=', date).orderBy('startsOn').first(...COLUMNS);

export async function insertTerm(trx: Trx, term: TermRow): Promise<void> {
  await trx('term').insert(term);
}

/** Terms that share a day with these dates. */
export const termsTouching = (db: Db, { startsOn, endsOn }: Pick<TermRow, 'startsOn' | 'endsOn'>): Promise<TermRow[]> =>
  db<TermRow>('term').where('startsOn', '<=', endsOn).where('endsOn', '>=', startsOn).orderBy('startsOn').select(...COLUMNS);
export const findTermByName = (db: Db, name: string, yearLabel: string): Promise<TermRow | undefined> => db<TermRow>('term').where({ name, yearLabel }).first(...COLUMNS);
export const isTermOverlap = (error: unknown): boolean => error instanceof Error && error.message.includes('term_overlap');

export const closuresBetween = (db: Db, from: LocalDate, until: LocalDate): Promise<(Closure & { reason: string; kind: string })[]> =>
  db<Closure & { reason: string; kind: string }>('closure').whereBetween('closedOn', [from, until])
    .select('closedOn', 'siteId', 'fromMin', 'toMin', 'reason', 'kind').orderBy('closedOn');

export async function insertClosure(trx: Trx, closure: Closure & { id: string; kind: 'planned' | 'unplanned'; reason: string; declaredBy?: string | null }): Promise<void> {
  await trx('closure').insert(closure);
}
