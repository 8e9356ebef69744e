import { existsSync, mkdirSync, readdirSync, rmSync } from 'node:fs';
import path from 'node:path';
import { closeForGood, copyChecked, isDamage, moveDatabase } from '@/db/backup';
import { AppError } from '@/lib/errors';

const HOURS_KEPT = 24;
const BACKUP_NAME = /^\d{4}-\d\d-\d\dT\d\d-\d\d-\d\dZ\.db$/;
const HOUR_LENGTH = '2026-11-17T09'.length;

const stampOf = (moment: Date): string => `${moment.toISOString().slice(0, 19).replaceAll(':', '-')}Z`;

/** Backups stand in a folder beside the database, named by the moment in UTC. */
const backupFolderOf = (databaseFile: string): string => path.join(path.dirname(databaseFile), 'backups');

/** Writes one checked backup of the school, in use or not, and tidies: of each hour the newest stays, for the last 24 hours that have one. */
export async function takeBackup(databaseFile: string, moment: Date): Promise<string> {
  if (!existsSync(databaseFile)) throw new AppError('not_found', `There is no school at ${databaseFile} yet.`);
  const folder = backupFolderOf(databaseFile);
  mkdirSync(folder, { recursive: true });
  const file = path.join(folder, `${stampOf(moment)}.db`);
  await copyOrSay(databaseFile, file);
  for (const name of outdated(readdirSync(folder))) rmSync(path.join(folder, name), { force: true });
  return file;
}

/** The names that may go, from all names in the folder; what is not named like a backup is nobody's to remove. */
export function outdated(names: readonly string[]): string[] {
  const newestFirst = names.filter((name) => BACKUP_NAME.test(name)).sort().reverse();
  const newestOfHour = new Map<string, string>();
  for (const name of newestFirst) if (!newestOfHour.has(name.slice(0, HOUR_LENGTH))) newestOfHour.set(name.slice(0, HOUR_LENGTH), name);
  const kept = new Set([...newestOfHour.values()].slice(0, HOURS_KEPT));
  return newestFirst.filter((name) => !kept.has(name));
}

export type Restored = { movedAsideTo: string | null };

/**
 * Puts a backup in the place of the school. The backup is checked first, on a copy, so that a damaged one changes nothing;
 * refused while another process has the school open. The school as it was is moved aside, not removed.
 */
export async function restoreBackup(backupFile: string, databaseFile: string, moment: Date): Promise<Restored> {
  if (!existsSync(backupFile)) throw new AppError('not_found', `There is no file ${backupFile}.`);
  if (path.resolve(backupFile) === path.resolve(databaseFile)) throw new AppError('invalid', 'This file is the school itself, not a backup of it.');
  mkdirSync(path.dirname(databaseFile), { recursive: true });
  const ready = `${databaseFile}.restoring`;
  await copyOrSay(backupFile, ready);
  const isThere = existsSync(databaseFile);
  if (isThere && !closeForGood(databaseFile)) {
    rmSync(ready);
    throw new AppError('conflict', 'The school is still open in another process. Stop it (Ctrl-C where it runs) and try again.');
  }
  const aside = `${databaseFile}.before-${stampOf(moment)}`;
  if (isThere) moveDatabase(databaseFile, aside);
  moveDatabase(ready, databaseFile);
  return { movedAsideTo: isThere ? aside : null };
}

async function copyOrSay(fromFile: string, toFile: string): Promise<void> {
  try {
    await copyChecked(fromFile, toFile);
  } catch (error) {
    const why = isDamage(error) ? 'The file is damaged, or it is not a database.' : error instanceof Error ? error.message : 'The reason is not known.';
    throw new AppError('invalid', `${fromFile} could not be copied whole. ${why}`);
  }
}
