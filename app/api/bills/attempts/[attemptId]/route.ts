import { readRoute } from '@/lib/server/route';
import { attemptSchema } from '@/lib/tuition/schema';
import { readCardPayment } from '@/lib/tuition/server/start-card-payment';

/** The page after paying asks again until the signed event has come. */
export const GET = readRoute(attemptSchema, readCardPayment);
