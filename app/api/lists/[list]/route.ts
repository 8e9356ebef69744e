import * as z from 'zod';
import { takeEnquiryList } from '@/lib/calendar/server/take-enquiry-list';
import { FILE_KINDS, LISTS, type ListName } from '@/lib/exports/lists';
import { listFile, type TakenList } from '@/lib/exports/server/list-file';
import { takeFamilyList } from '@/lib/people/server/take-family-list';
import { takeStudentList } from '@/lib/people/server/take-student-list';
import type { Context } from '@/lib/server/context';
import { readRoute } from '@/lib/server/route';
import { takeBillList } from '@/lib/tuition/server/take-bill-list';
import { takeInvoiceList } from '@/lib/tuition/server/take-invoice-list';
import { takePaymentList } from '@/lib/tuition/server/take-payment-list';

const schema = z.object({ list: z.enum(LISTS), as: z.enum(FILE_KINDS).default('xlsx'), runId: z.string().max(64).default('') });

const TAKE: Record<ListName, (context: Context, query: { runId: string }) => Promise<TakenList>> = {
  students: takeStudentList, families: takeFamilyList, enquiries: takeEnquiryList, invoices: takeInvoiceList, payments: takePaymentList, bills: (context, query) => takeBillList(query, context),
};

/** A whole list as a file, for who may take it out of the house. */
export const GET = readRoute(schema, async (query, context) => listFile(await TAKE[query.list](context, query), query.as, context));
