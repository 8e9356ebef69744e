import 'server-only';
import { AppError } from '@/lib/errors';
import { env } from './env';

/**
 * Whatever changes something must come from a page of ours. The framework lets a request without an Origin
 * header through; we do not.
 */
export function assertOwnOrigin(origin: string | null): void {
  if (origin !== null && origin === new URL(env().NEXTAUTH_URL).origin) return;
  throw new AppError('forbidden', 'This request did not come from the school’s own pages. Open the page again and retry.');
}
