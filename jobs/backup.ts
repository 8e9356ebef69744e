import { AppError } from '@/lib/errors';
import { env } from '@/lib/server/env';
import { takeBackup } from './backups';
import { readSettingsFile } from './settings-file';

/** `npm run backup`: one checked backup, also while the school is open. */
async function main(): Promise<void> {
  readSettingsFile();
  const file = await takeBackup(env().DATABASE_FILE, new Date());
  console.info(`The school is backed up and checked: ${file}`);
}

main().catch((error: unknown) => {
  console.error(error instanceof AppError ? error.message : error);
  process.exitCode = 1;
});
