import type { Knex } from 'knex';
import { findSchool } from '@/db/school';
import { localDateOf, type EpochSeconds } from '@/lib/time';
import { demoTerms } from './demo-calendar-plan';
import { layHistory } from './demo-history';
import { layHouse } from './demo-house';
import { layTerm } from './demo-lessons';
import { layOpenQuestions } from './demo-questions';
import { seededRandom } from './random';

/** The seed number of the demo school: the same number on the same day gives the same school. */
const SEED = 20_260_907;
const ZONE = 'Europe/Dublin';

/**
 * Lays Saltmarsh Music Rooms around today: two sites, twelve teachers, about 160 students of 110 families, a closed
 * term, one under way in its ninth week and the next in planning. People and bookings go through the same
 * operations as the screens, so that bills, pay and ladder follow from them.
 */
export async function layDemoSchool(db: Knex, now: EpochSeconds): Promise<void> {
  const random = seededRandom(SEED);
  const today = localDateOf(now, ZONE);
  const terms = demoTerms(today);
  const house = await layHouse(db, { random, now, today, zone: ZONE, terms });
  await layTerm(house, { term: house.terms.last, until: house.terms.last.endsOn });
  await layTerm(house, { term: house.terms.current, until: today });
  await layHistory(house);
  await layOpenQuestions(house);
  if (!(await findSchool(db))?.isDemo) throw new Error('the demo school is not marked as one');
  // What was written while laying the past has been "sent" long ago; nothing of it goes out now.
  await db('outbox').where({ state: 'queued' }).update({ state: 'sent', sentAt: now });
}
