import { AppError } from '@/lib/errors';
import { env } from '@/lib/server/env';
import { restoreBackup } from './backups';
import { readSettingsFile } from './settings-file';

/** `npm run restore -- <file>`: a backup takes the place of the school, which must be stopped. */
async function main(): Promise<void> {
  readSettingsFile();
  const [backupFile] = process.argv.slice(2);
  if (backupFile === undefined) throw new AppError('invalid', 'Name the backup: npm run restore -- var/backups/<name>.db');
  const port = process.env.PORT ?? '3000';
  const isAnswering = await fetch(`http://localhost:${port}/api/health`, { signal: AbortSignal.timeout(3000) }).then(() => true, () => false);
  if (isAnswering) throw new AppError('conflict', `A server answers on port ${port}. Stop it (Ctrl-C where it runs) and try again.`);
  const { movedAsideTo } = await restoreBackup(backupFile, env().DATABASE_FILE, new Date());
  console.info(`The school is back as it was in ${backupFile}.`);
  if (movedAsideTo) console.info(`What was there before is kept as ${movedAsideTo}.`);
}

main().catch((error: unknown) => {
  console.error(error instanceof AppError ? error.message : error);
  process.exitCode = 1;
});
