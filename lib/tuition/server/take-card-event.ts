import 'server-only';
import { findSchool } from '@/db/school';
import { AppError } from '@/lib/errors';
import { database } from '@/lib/server/database';
import { log } from '@/lib/server/log';
import { receiveCardEvent } from './receive-card-event';

const BODY_LIMIT_CHARACTERS = 512 * 1024;

/** The door for the card processor: 200 when the event has been dealt with, 400 for a bad signature, anything else is sent again by the processor. */
export async function takeCardEvent(body: string, signature: string): Promise<{ status: number; message: string }> {
  if (body.length > BODY_LIMIT_CHARACTERS) return { status: 413, message: 'too large' };
  const db = database();
  const school = await findSchool(db);
  if (!school) return { status: 503, message: 'no school yet' };
  try {
    const effect = await receiveCardEvent({ body, signature }, { db, school, now: Math.floor(Date.now() / 1000) });
    log.info({ effect }, 'card event');
    return { status: 200, message: effect };
  } catch (error) {
    if (error instanceof AppError) return { status: 400, message: error.message };
    throw error;
  }
}
