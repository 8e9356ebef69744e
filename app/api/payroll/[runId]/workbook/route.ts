import * as z from 'zod';
import { payWorkbook } from '@/lib/payroll/server/pay-workbook';
import { readRoute } from '@/lib/server/route';

/** The pay run as a workbook, or its lines as comma-separated text. */
export const GET = readRoute(z.object({ runId: z.string().max(64), as: z.enum(['xlsx', 'csv']).default('xlsx') }), payWorkbook);
