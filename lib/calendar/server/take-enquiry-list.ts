import 'server-only';
import type { Enquiry } from '@/db/enquiries';
import type { Cell } from '@/lib/exports/server/cells';
import type { ListColumn, TakenList } from '@/lib/exports/server/list-file';
import type { Context } from '@/lib/server/context';
import { localDateOf } from '@/lib/time';
import { assertCan } from '@/policies/ability';
import { ENQUIRY_WORDS, wishWords } from '../enquiry-words';
import { readEnquiries } from './read-enquiries';

const COLUMNS: readonly ListColumn[] = [
  { header: 'Student', width: 28 }, { header: 'Age', width: 8 }, { header: 'State', width: 16 }, { header: 'Asked', width: 12 }, { header: 'Could come', width: 40 }, { header: 'Contact', width: 28 }, { header: 'Next step', width: 12 },
];

/** The enquiries that the two tabs show: open ones, then those that ended lately. What strangers wrote about themselves stays in the house. */
export async function takeEnquiryList(context: Context): Promise<TakenList> {
  assertCan(context.ability, 'export', 'Enquiry', {});
  const { open, ended } = await readEnquiries(context);
  return { name: 'enquiries', tableName: 'enquiry', rowId: 'enquiries', columns: COLUMNS, rows: [...open, ...ended].map((enquiry) => cellsOf(enquiry, context.school.zone)) };
}

const cellsOf = ({ studentName, studentAge, state, createdAt, wishes, contactName, nextStepOn }: Enquiry, zone: string): Cell[] => [
  studentName, studentAge, ENQUIRY_WORDS[state], { date: localDateOf(createdAt, zone) }, wishWords(wishes), contactName, nextStepOn === null ? null : { date: nextStepOn },
];
