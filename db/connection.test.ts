import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import Sqlite from 'better-sqlite3';
import type { Knex } from 'knex';
import { describe, expect, it, onTestFinished } from 'vitest';
import { freshDb } from '@/tests/support/fresh-db';
import { CONNECTION_PRAGMAS, openDatabase } from './connection';
import { transaction } from './transaction';

async function fileOf(db: Knex): Promise<string> {
  const [database]: { file: string }[] = await db.raw('PRAGMA database_list');
  return database?.file ?? '';
}

async function pragmasOf(db: Knex): Promise<Record<string, unknown>> {
  const read: Record<string, unknown> = {};
  for (const name of Object.keys(CONNECTION_PRAGMAS)) {
    const [row]: Record<string, unknown>[] = await db.raw(`PRAGMA ${name}`);
    read[name] = Object.values(row ?? {})[0];
  }
  return read;
}

function secondHand(file: string): Sqlite.Database {
  const raw = new Sqlite(file, { timeout: 0 });
  onTestFinished(() => void raw.close());
  return raw;
}

const WANTED = { journal_mode: 'wal', synchronous: 2, foreign_keys: 1, busy_timeout: 5000 };

describe('what every connection must have', () => {
  it('reads back on opening, and again after closing and opening', async () => {
    const first = freshDb();
    expect(await pragmasOf(first)).toEqual(WANTED);
    const file = await fileOf(first);
    await first.destroy();
    const again = openDatabase(file);
    onTestFinished(() => again.destroy());
    expect(await pragmasOf(again)).toEqual(WANTED);
  });
  it('is not what a connection has by itself', async () => {
    const raw = secondHand(await fileOf(freshDb()));
    expect(raw.pragma('synchronous', { simple: true })).not.toBe(2);
  });
  it('columns are snake_case in the file and camelCase in the program', async () => {
    const db = freshDb();
    await db('person').insert({ id: 'ada', givenName: 'Inés', familyName: 'O’Shea' });
    expect(await db('person').first('givenName', 'familyName')).toEqual({ givenName: 'Inés', familyName: 'O’Shea' });
    expect(secondHand(await fileOf(db)).prepare('SELECT given_name FROM person').get()).toEqual({ given_name: 'Inés' });
  });
});

async function withCounter(): Promise<{ db: Knex; file: string }> {
  const db = freshDb();
  await db('person').insert({ id: 'counter', givenName: 'Counter', familyName: '', reachSemitones: 10 });
  return { db, file: await fileOf(db) };
}

describe('reading first and writing then, beside a second process', () => {
  it('a deferred transaction of the ordinary kind would fail at once', async () => {
    const { file } = await withCounter();
    const [one, two] = [secondHand(file), secondHand(file)];
    one.exec('BEGIN');
    one.prepare('SELECT reach_semitones FROM person').all();
    two.exec("UPDATE person SET reach_semitones = 12 WHERE id = 'counter'");
    expect(() => one.exec("UPDATE person SET reach_semitones = 13 WHERE id = 'counter'")).toThrow(expect.objectContaining({ code: 'SQLITE_BUSY_SNAPSHOT' }));
  });
  it('ours holds the pen from its first read on, so that nobody writes in between', async () => {
    const { db, file } = await withCounter();
    const other = secondHand(file);
    await transaction(db, async (trx) => {
      expect(await trx('person').where({ id: 'counter' }).first('reachSemitones')).toEqual({ reachSemitones: 10 });
      expect(() => other.exec("UPDATE person SET reach_semitones = 12 WHERE id = 'counter'")).toThrow(expect.objectContaining({ code: 'SQLITE_BUSY' }));
      await trx('person').where({ id: 'counter' }).update({ reachSemitones: 11 });
    });
    expect(other.prepare("SELECT reach_semitones AS reach FROM person WHERE id = 'counter'").get()).toEqual({ reach: 11 });
  });
  it('what fails leaves nothing behind, and the next may write', async () => {
    const { db } = await withCounter();
    await expect(transaction(db, async (trx) => {
      await trx('person').where({ id: 'counter' }).update({ reachSemitones: 14 });
      throw new Error('the lights went out');
    })).rejects.toThrow('the lights went out');
    expect(await db('person').where({ id: 'counter' }).first('reachSemitones')).toEqual({ reachSemitones: 10 });
    await transaction(db, (trx) => trx('person').where({ id: 'counter' }).update({ reachSemitones: 11 }).then(() => undefined));
    expect(await db('person').where({ id: 'counter' }).first('reachSemitones')).toEqual({ reachSemitones: 11 });
  });
  it('two processes that read, add one and write lose no step', async () => {
    const { db, file } = await withCounter();
    await db('setting_version').insert({ id: 'count', key: 'count', valueJson: '0', validFrom: '2026-01-01' });
    const script = ['--conditions=react-server', '--import', 'tsx', 'tests/support/count-in-a-process.ts', file, '100'];
    const answers = await Promise.all([1, 2].map(() => promisify(execFile)(process.execPath, script)));
    expect(answers.map(({ stdout }) => stdout)).toEqual(['100', '100']);
    expect(await db('setting_version').where({ id: 'count' }).first('valueJson')).toEqual({ valueJson: '200' });
  }, 60_000);
});
