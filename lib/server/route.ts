import 'server-only';
import { NextResponse, type NextRequest } from 'next/server';
import type * as z from 'zod';
import { AppError, type ErrorCode } from '@/lib/errors';
import { currentContext, type Context } from './context';

const STATUS: Record<ErrorCode, number> = { not_found: 404, forbidden: 403, conflict: 409, invalid: 422, too_many: 429 };

type Params = { params: Promise<Record<string, string | string[] | undefined>> };

/** A JSON read for the browser. Same order as an action: caller, input, work, plain answer. Address parameters join the query. */
export function readRoute<S extends z.ZodType, T>(schema: S, work: (query: z.output<S>, context: Context) => Promise<T>) {
  return async (request: NextRequest, { params }: Params): Promise<Response> => {
    const context = await currentContext();
    if (!context) return refuse(401, 'Sign in first.');
    const query = schema.safeParse({ ...Object.fromEntries(request.nextUrl.searchParams), ...(await params) });
    if (!query.success) return refuse(400, 'The address lacks something this list needs.');
    return answer(() => work(query.data, context));
  };
}

async function answer<T>(work: () => Promise<T>): Promise<Response> {
  try {
    const result = await work();
    return result instanceof Response ? result : NextResponse.json(result ?? {}, { headers: { 'Cache-Control': 'no-store' } });
  } catch (error) {
    if (error instanceof AppError) return refuse(STATUS[error.code], error.message, error.fields);
    throw error;
  }
}

const refuse = (status: number, message: string, fields = {}) =>
  NextResponse.json({ message, fields }, { status, headers: { 'Cache-Control': 'no-store' } });
