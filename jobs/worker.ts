import { randomUUID } from 'node:crypto';
import { sendDueMails } from '@/lib/messages/server/send-due-mails';
import { lapseOpenings } from '@/lib/calendar/server/hold-opening';
import { findSchool } from '@/db/school';
import { database } from '@/lib/server/database';
import { log } from '@/lib/server/log';
import { localDateOf } from '@/lib/time';
import { runNextJob } from './run-job';

const OWNER = `worker-${process.pid}-${randomUUID().slice(0, 8)}`;
const PAUSE_MS = 500;
const clock = () => Math.floor(Date.now() / 1000);

let isStopping = false;
const stopped = new Promise<void>((resolve) => {
  for (const signal of ['SIGINT', 'SIGTERM'] as const) process.on(signal, () => { isStopping = true; resolve(); });
});

/** One round: mails that are due, openings that lapsed, one piece of slow work. */
async function round(): Promise<void> {
  const db = database();
  await sendDueMails({ db, owner: OWNER, clock });
  const school = await findSchool(db);
  if (!school) return;
  const now = clock();
  await lapseOpenings({ db, now, today: localDateOf(now, school.zone) });
  await runNextJob({ db, owner: OWNER, clock });
}

async function main(): Promise<void> {
  log.info('worker started');
  while (!isStopping) {
    await round().catch((error: unknown) => log.error({ error: error instanceof Error ? error.message : 'unknown' }, 'a round of the worker failed'));
    await Promise.race([stopped, new Promise((resolve) => setTimeout(resolve, PAUSE_MS))]);
  }
  await database().destroy();
  log.info('worker stopped');
}

void main();
