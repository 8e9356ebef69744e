import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db, Trx } from './connection';

export const ENQUIRY_STATES = ['new', 'answered', 'slot_offered', 'trial_booked', 'trial_taken', 'deciding', 'waiting_list', 'enrolled', 'closed'] as const;
export type EnquiryState = (typeof ENQUIRY_STATES)[number];

export type WishWindow = { weekday: number; fromMin: number; toMin: number };
export type Enquiry = {
  id: string; contactName: string; contactEmail: string | null; contactPhone: string | null; contactPersonId: string | null; studentName: string;
  studentId: string | null; studentAge: number | null; isAdult: boolean; subjectId: string | null; experience: string; levelGuess: number;
  wishes: WishWindow[]; siteId: string | null; lengthMinutes: number; source: 'web' | 'phone' | 'desk' | 'import'; message: string;
  state: EnquiryState; nextStepOn: LocalDate | null; closedReason: string | null; createdAt: EpochSeconds; rowVersion: number;
};
type Row = Omit<Enquiry, 'wishes' | 'isAdult'> & { wishesJson: string; isAdult: number };

const toEnquiry = ({ wishesJson, isAdult, ...row }: Row): Enquiry => ({ ...row, isAdult: isAdult === 1, wishes: JSON.parse(wishesJson) as WishWindow[] });

export async function insertEnquiry(trx: Trx, { wishes, isAdult, ...enquiry }: Omit<Enquiry, 'contactPersonId' | 'studentId' | 'closedReason' | 'rowVersion'>): Promise<void> {
  await trx('enquiry').insert({ ...enquiry, isAdult: isAdult ? 1 : 0, wishesJson: JSON.stringify(wishes) });
}

export async function findEnquiry(db: Db, id: string): Promise<Enquiry | undefined> {
  const row = await db<Row>('enquiry').where({ id }).first();
  return row && toEnquiry(row);
}

export async function listEnquiries(db: Db, states: readonly EnquiryState[]): Promise<Enquiry[]> {
  const rows = await db<Row>('enquiry').whereIn('state', [...states]).orderBy('createdAt');
  return (rows).map(toEnquiry);
}

type Change = Partial<Pick<Enquiry, 'state' | 'nextStepOn' | 'closedReason' | 'contactPersonId' | 'studentId'>>;
export async function changeEnquiry(trx: Trx, id: string, change: Change): Promise<void> {
  await trx('enquiry').where({ id }).update({ ...change, rowVersion: trx.raw('row_version + 1') });
}

export type EnquiryEvent = { id: string; enquiryId: string; at: EpochSeconds; kind: string; text: string; byId: string | null };
export async function addEnquiryEvent(trx: Trx, event: EnquiryEvent): Promise<void> {
  await trx('enquiry_event').insert(event);
}
export const enquiryEvents = (db: Db, enquiryId: string): Promise<(EnquiryEvent & { byName: string | null })[]> =>
  db('enquiry_event as e').leftJoin('person as p', 'p.id', 'e.byId').where('e.enquiryId', enquiryId).orderBy('e.at', 'desc')
    .select('e.*', db.raw("trim(p.given_name || ' ' || p.family_name) AS by_name"));

export type Trial = {
  id: string; enquiryId: string; occurrenceId: string; studentId: string; feeMinor: number; creditUntilOn: LocalDate;
  outcome: 'good_fit' | 'second_trial' | 'not_now' | null; suggestedLevel: number | null; impression: string | null;
};
export async function insertTrial(trx: Trx, trial: Omit<Trial, 'outcome' | 'suggestedLevel' | 'impression'>): Promise<void> {
  await trx('trial').insert(trial);
}
export const trialsOfEnquiry = (db: Db, enquiryId: string): Promise<(Trial & { localDate: LocalDate; startMin: number })[]> =>
  db('trial as t').join('occurrence as o', 'o.id', 't.occurrenceId').where('t.enquiryId', enquiryId).orderBy('o.startsAt', 'desc')
    .select('t.*', 'o.localDate', 'o.startMin');
