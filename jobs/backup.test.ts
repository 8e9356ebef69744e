import { closeSync, mkdtempSync, openSync, readdirSync, rmSync, statSync, writeFileSync, writeSync } from 'node:fs';
import path from 'node:path';
import { beforeEach, describe, expect, it, onTestFinished } from 'vitest';
import { openDatabase } from '@/db/connection';
import { migrate } from '@/db/migrate';
import { findSchool, insertSchool } from '@/db/school';
import { transaction } from '@/db/transaction';
import { outdated, restoreBackup, takeBackup } from './backups';

const MOMENT = new Date('2026-11-17T09:05:00Z');
const LATER = new Date('2026-11-17T10:05:00Z');
let folder: string;
let file: string;

beforeEach(() => {
  folder = mkdtempSync('var/test-backup-');
  file = path.join(folder, 'school.db');
  return () => rmSync(folder, { recursive: true, force: true });
});

/** Opens (and at first makes) the school's file; whoever does not close it himself has it closed at the end. */
function opened() {
  const db = openDatabase(file);
  onTestFinished(() => db.destroy());
  return db;
}
async function laid() {
  const db = opened();
  await migrate(db);
  await transaction(db, (trx) => insertSchool(trx, { name: 'Before', locale: 'en-IE', zone: 'Europe/Dublin', currency: 'EUR' }));
  return db;
}
async function nameIn(place: string): Promise<string | undefined> {
  const db = openDatabase(place);
  const school = await findSchool(db);
  await db.destroy();
  return school?.name;
}
/** Overwrites part of the middle of a file, as a failing disk does. */
function damage(place: string): void {
  const descriptor = openSync(place, 'r+');
  writeSync(descriptor, Buffer.alloc(60_000, 0x5a), 0, 60_000, Math.floor(statSync(place).size / 2));
  closeSync(descriptor);
}

describe('a backup', () => {
  it('holds what an open school has written, in one file under its own name', async () => {
    await laid();
    const backup = await takeBackup(file, MOMENT);
    expect(path.basename(backup)).toBe('2026-11-17T09-05-00Z.db');
    expect(readdirSync(path.dirname(backup))).toEqual(['2026-11-17T09-05-00Z.db']);
    expect(await nameIn(backup)).toBe('Before');
  });

  it('of a damaged school is refused, leaves nothing and spares the backups that are there', async () => {
    const db = await laid();
    await takeBackup(file, MOMENT);
    await db.destroy();
    damage(file);
    await expect(takeBackup(file, LATER)).rejects.toMatchObject({ code: 'invalid', message: expect.stringContaining('damaged') as string });
    expect(readdirSync(path.join(folder, 'backups'))).toEqual(['2026-11-17T09-05-00Z.db']);
  });

  it('of a school whose rows point nowhere is refused', async () => {
    const db = await laid();
    await db.raw('PRAGMA foreign_keys = OFF');
    await db('enquiry_event').insert({ id: 'astray', enquiryId: 'nobody', at: 1, kind: 'received', text: 'x', byId: null });
    await expect(takeBackup(file, MOMENT)).rejects.toMatchObject({ message: expect.stringContaining('enquiry_event') as string });
  });

  it('of a school that is not there says so', async () => {
    await expect(takeBackup(file, MOMENT)).rejects.toMatchObject({ code: 'not_found' });
  });

  it('keeps the newest of each hour for 24 hours, and nothing that is not a backup goes', () => {
    const hour = (index: number) => `2026-11-${String(16 + Math.floor(index / 24))}T${String(index % 24).padStart(2, '0')}`;
    const hourly = Array.from({ length: 30 }, (_, index) => `${hour(index)}-00-00Z.db`);
    expect(outdated([...hourly, 'kept-for-the-auditor.db'])).toEqual(hourly.slice(0, 6).reverse());
    expect(outdated(['2026-11-17T09-00-00Z.db', '2026-11-17T09-59-00Z.db', '2026-11-17T10-00-00Z.db'])).toEqual(['2026-11-17T09-00-00Z.db']);
  });
});

describe('restoring', () => {
  async function backedUpAndChanged(): Promise<string> {
    const db = await laid();
    const backup = await takeBackup(file, MOMENT);
    await db('school').update({ name: 'After' });
    await db.destroy();
    return backup;
  }

  it('brings the school back and keeps what was there', async () => {
    const backup = await backedUpAndChanged();
    const { movedAsideTo } = await restoreBackup(backup, file, LATER);
    expect(await nameIn(file)).toBe('Before');
    expect(await nameIn(movedAsideTo ?? '')).toBe('After');
    expect(await nameIn(backup)).toBe('Before');
  });

  it('works where nothing stands yet', async () => {
    const backup = await backedUpAndChanged();
    rmSync(file);
    expect(await restoreBackup(backup, file, LATER)).toEqual({ movedAsideTo: null });
    expect(await nameIn(file)).toBe('Before');
  });

  it('of a damaged backup is refused and changes nothing', async () => {
    const backup = await backedUpAndChanged();
    damage(backup);
    await expect(restoreBackup(backup, file, LATER)).rejects.toMatchObject({ code: 'invalid' });
    expect(await nameIn(file)).toBe('After');
    expect(readdirSync(folder).sort()).toEqual(['backups', 'school.db']);
  });

  it('of something else is refused', async () => {
    await backedUpAndChanged();
    const letter = path.join(folder, 'letter.txt');
    writeFileSync(letter, 'Dear school, '.repeat(2000));
    await expect(restoreBackup(letter, file, LATER)).rejects.toMatchObject({ message: expect.stringContaining('not a database') as string });
    writeFileSync(letter, '');
    await expect(restoreBackup(letter, file, LATER)).rejects.toMatchObject({ message: expect.stringContaining('no school') as string });
    expect(await nameIn(file)).toBe('After');
  });

  it('is refused while the school is open', async () => {
    const backup = await backedUpAndChanged();
    await findSchool(opened());
    await expect(restoreBackup(backup, file, LATER)).rejects.toMatchObject({ code: 'conflict' });
    expect(readdirSync(folder).filter((name) => name.includes('restoring') || name.includes('before'))).toEqual([]);
  });

  it('brings a school back whose own file is damaged', async () => {
    const backup = await backedUpAndChanged();
    writeFileSync(file, 'not a database any more '.repeat(500));
    await restoreBackup(backup, file, LATER);
    expect(await nameIn(file)).toBe('Before');
  });
});
