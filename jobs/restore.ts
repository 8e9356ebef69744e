import { AppError } from '@/lib/errors';
import { env } from '@/lib/server/env';
import { restoreBackup } from './backups';
import { readSettingsFile } from './settings-file';

/** `npm run restore -- <file>`: a backup takes the place of the school, which must be stopped. */
async function main(): Promise<void> {
  readSettingsFile();
  const [backupFile] = process.argv.slice(2);
  if (backupFile === undefined) throw new AppError('invalid', 'Name the backup: npm run restore -- var/backups/<name>.db');
  const { DATABASE_FILE, NEXTAUTH_URL } = env();
  const isAnswering = await fetch(new URL('/api/health', NEXTAUTH_URL), { signal: AbortSignal.timeout(3000) }).then(() => true, () => false);
  if (isAnswering) throw new AppError('conflict', `A school answers at ${NEXTAUTH_URL}. Stop it (Ctrl-C where it runs) and try again.`);
  const { movedAsideTo } = await restoreBackup(backupFile, DATABASE_FILE, new Date());
  console.info(`The school is back as it was in ${backupFile}.`);
  if (movedAsideTo) console.info(`What was there before is kept as ${movedAsideTo}.`);
}

main().catch((error: unknown) => {
  console.error(error instanceof AppError ? error.message : error);
  process.exitCode = 1;
});
