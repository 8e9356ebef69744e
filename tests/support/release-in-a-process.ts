import { openDatabase } from '@/db/connection';
import { releaseTuitionRun } from '@/lib/tuition/server/release-tuition-run';
import { contextOf } from './context';

/** A second program at work on the same file: `release-in-a-process.ts <file> <runId> <total> <now>`. */
async function main([file = '', runId = '', total = '', now = '']: string[]): Promise<void> {
  const db = openDatabase(file);
  const context = contextOf(db, 'owner', { personId: 'ruth', now: Number(now), school: { zone: 'America/New_York', currency: 'USD', locale: 'en-US' } });
  const released = await releaseTuitionRun({ runId, controlTotalMinor: Number(total) }, context);
  process.stdout.write(String(released.invoices));
  await db.destroy();
}

void main(process.argv.slice(2));
