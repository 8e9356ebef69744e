import type { Knex } from 'knex';
import type { SignedIn } from '@/lib/server/user-context';
import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { TermRow } from '../terms';
import type { DemoTeacher } from './demo-people';
import type { Random } from './random';

export type DemoStudent = { id: string; familyId: string; name: string; isAdult: boolean; level: number; key?: 'ada' | 'ben' | 'theo' | 'abena' };
export type DemoRoom = { id: string; name: string; siteIndex: 0 | 1 };
export type House = {
  db: Knex; random: Random; now: EpochSeconds; today: LocalDate; zone: string; owner: SignedIn; subjectId: string; legalEntityId: string; siteIds: readonly [string, string];
  rooms: DemoRoom[]; teachers: (DemoTeacher & { id: string; engagementId: string })[]; students: DemoStudent[]; terms: Record<'last' | 'current' | 'next', TermRow>;
  passwordHash: string;
};
