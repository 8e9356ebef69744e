import 'server-only';
import { notFound } from 'next/navigation';
import { AppError } from '@/lib/errors';

/** For pages: a missing and a foreign record both end on the same "not found" screen. */
export async function orNotFound<T>(read: Promise<T>): Promise<T> {
  try {
    return await read;
  } catch (error) {
    if (error instanceof AppError && error.code === 'not_found') notFound();
    throw error;
  }
}
