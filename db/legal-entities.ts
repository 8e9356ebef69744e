import type { Db } from './connection';

export type LegalEntity = { id: string; name: string; country: string; currency: string; taxNumber: string | null; addressLines: string; numberPrefix: string; taxMode: 'inclusive' | 'exclusive' };
const COLUMNS = ['id', 'name', 'country', 'currency', 'taxNumber', 'addressLines', 'numberPrefix', 'taxMode'] as const;

export const allLegalEntities = (db: Db): Promise<LegalEntity[]> => db<LegalEntity>('legal_entity').orderBy('name').select(...COLUMNS);
export const findLegalEntity = (db: Db, id: string): Promise<LegalEntity | undefined> => db<LegalEntity>('legal_entity').where({ id }).first(...COLUMNS);
