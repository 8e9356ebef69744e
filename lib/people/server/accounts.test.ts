import { describe, expect, it } from 'vitest';
import { findAccountByEmail } from '@/db/accounts';
import { ownRecords } from '@/db/actors';
import { firstBrokenAuditRow } from '@/db/audit';
import { insertPerson } from '@/db/people';
import { transaction } from '@/db/transaction';
import { contextOfUser } from '@/lib/server/user-context';
import { contextOf, NOW } from '@/tests/support/context';
import { freshDb } from '@/tests/support/fresh-db';
import { passwordFault } from '../passwords';
import { invitePerson } from './invite-person';
import { openSchool } from './open-school';
import { switchHat } from './session';
import { linkPurpose, requestReset, setPasswordByLink } from './sign-in-links';
import { signIn } from './sign-in';

const SET_UP = {
  schoolName: 'Harbour School', siteName: 'Quay Street', zone: 'Europe/Dublin', currency: 'EUR', country: 'IE', locale: 'en-IE',
  ownerName: 'Ruth Ames', ownerEmail: 'ruth@example.org', password: 'a quiet morning tide',
};
const attempt = (email: string, password: string, address = '10.0.0.1') => ({ email, password, address });

async function opened() {
  const db = freshDb();
  const moment = { db, now: NOW };
  const school = await openSchool(SET_UP, moment);
  const context = await contextOfUser(db, school.userId, NOW);
  if (!context) throw new Error('the owner cannot act');
  return { db, moment, school, context };
}

const tokenIn = (body: string) => /choose-password\/([\w-]+)/.exec(body)?.[1] ?? '';

async function mailedToken(db: Awaited<ReturnType<typeof opened>>['db']): Promise<string> {
  const row: { bodyText: string } | undefined = await db('outbox').orderBy('created_at', 'desc').orderBy('id', 'desc').first('bodyText');
  return tokenIn(row?.bodyText ?? '');
}

describe('opening a school', () => {
  it('happens once and lets the owner in', async () => {
    const { moment, context } = await opened();
    expect(context.actor.role).toBe('owner');
    await expect(signIn(attempt('Ruth@Example.org', SET_UP.password), moment)).resolves.toMatchObject({ ok: true });
    await expect(openSchool(SET_UP, moment)).rejects.toMatchObject({ code: 'conflict' });
  });
});

describe('signing in', () => {
  it('refuses a wrong password, an unknown account and an empty one alike', async () => {
    const { moment } = await opened();
    const refused = { ok: false };
    await expect(signIn(attempt('ruth@example.org', 'a quiet morning tidy'), moment)).resolves.toEqual(refused);
    await expect(signIn(attempt('nobody@example.org', SET_UP.password), moment)).resolves.toEqual(refused);
    await expect(signIn(attempt('ruth@example.org', ''), moment)).resolves.toEqual(refused);
  });

  it('stops checking passwords after ten failures in a quarter of an hour, then lets the owner in again', async () => {
    const { moment } = await opened();
    for (let index = 0; index < 10; index += 1) await signIn(attempt('ruth@example.org', `wrong ${index}`, `10.0.1.${index}`), moment);
    await expect(signIn(attempt('ruth@example.org', SET_UP.password), moment)).resolves.toEqual({ ok: false });
    await expect(signIn(attempt('ruth@example.org', SET_UP.password), { ...moment, now: NOW + 901 })).resolves.toMatchObject({ ok: true });
  });
});

describe('a mailed link', () => {
  it('sets a password once, ends older sessions and then is worth nothing', async () => {
    const { db, moment, school } = await opened();
    await requestReset({ email: 'ruth@example.org' }, moment);
    const token = await mailedToken(db);
    expect(token).toHaveLength(43);
    expect(await linkPurpose(token, moment)).toBe('reset');
    await setPasswordByLink({ token, password: 'seven grey herons wait' }, moment);
    await expect(signIn(attempt('ruth@example.org', 'seven grey herons wait'), moment)).resolves.toMatchObject({ ok: true, userId: school.userId, sessionVersion: 2 });
    await expect(setPasswordByLink({ token, password: 'another long password' }, moment)).rejects.toMatchObject({ code: 'not_found' });
    const stored: { secretHash: string }[] = await db('sign_in_link').select('secretHash');
    expect(JSON.stringify(stored)).not.toContain(token);
  });

  it('runs out after an hour', async () => {
    const { db, moment } = await opened();
    await requestReset({ email: 'ruth@example.org' }, moment);
    const token = await mailedToken(db);
    await expect(setPasswordByLink({ token, password: 'seven grey herons wait' }, { ...moment, now: NOW + 3601 })).rejects.toMatchObject({ code: 'not_found' });
  });

  it('says nothing about unknown addresses', async () => {
    const { db, moment } = await opened();
    await expect(requestReset({ email: 'nobody@example.org' }, moment)).resolves.toEqual({ asked: true });
    expect(await db('outbox')).toHaveLength(0);
  });
});

describe('invitations and hats', () => {
  it('invites a teacher who can then switch between two hats but to no third', async () => {
    const { db, moment, context } = await opened();
    await transaction(db, (trx) => insertPerson(trx, { id: 'greta', givenName: 'Greta', familyName: 'Dahl' }));
    const { userId } = await invitePerson({ personId: 'greta', email: 'greta@example.org', role: 'teacher' }, context);
    await setPasswordByLink({ token: await mailedToken(db), password: 'seven grey herons wait' }, moment);
    await invitePerson({ personId: 'greta', email: 'greta@example.org', role: 'guardian' }, context);
    const teacher = await contextOfUser(db, userId, NOW);
    expect(teacher?.roles.map(({ role }) => role)).toEqual(['teacher', 'guardian']);
    await switchHat({ role: 'guardian' }, teacher!);
    expect((await contextOfUser(db, userId, NOW))?.actor.role).toBe('guardian');
    await expect(switchHat({ role: 'owner' }, teacher!)).rejects.toMatchObject({ code: 'forbidden' });
    expect((await findAccountByEmail(db, 'greta@example.org'))?.state).toBe('live');
  });

  it('is the owner’s alone', async () => {
    const { db } = await opened();
    await transaction(db, (trx) => insertPerson(trx, { id: 'greta', givenName: 'Greta', familyName: 'Dahl' }));
    for (const role of ['desk', 'teacher', 'guardian', 'student'] as const) {
      await expect(invitePerson({ personId: 'greta', email: 'greta@example.org', role: 'owner' }, contextOf(db, role))).rejects.toMatchObject({ code: 'not_found' });
    }
    expect(await ownRecords(db, 'greta', 'guardian', '2026-11-17')).toMatchObject({ studentIds: [], payerIds: [] });
  });

  it('keeps at least one owner whatever is asked of the database', async () => {
    const { db } = await opened();
    await expect(db('role_grant').where({ role: 'owner' }).delete()).rejects.toThrow('last_owner');
    await expect(db('role_grant').where({ role: 'owner' }).update({ validTo: '2026-11-18' })).rejects.toThrow('last_owner');
  });
});

describe('passwords', () => {
  it.each([
    ['short', /At least 15/], ['a'.repeat(129), /At most 128/], ['aaaaaaaaaaaaaaaa', /repeats/], ['rungwell password keyboard', /anybody would try/],
    ['abcdefghijklmnopqrst', /run of letters/], ['12345678901234567', /run of letters/],
  ])('%s is refused', (password, words) => expect(passwordFault(password)).toMatch(words));
  it.each(['a quiet morning tide', '🌊 waves and gulls and rain', 'correct horse battery staple', 'ñandú salta por la orilla'])('%s is accepted', (password) => expect(passwordFault(password)).toBeNull());
});

it('chains the audit and shows the row that was tampered with', async () => {
  const { db, context } = await opened();
  await transaction(db, (trx) => insertPerson(trx, { id: 'greta', givenName: 'Greta', familyName: 'Dahl' }));
  await invitePerson({ personId: 'greta', email: 'greta@example.org', role: 'teacher' }, context);
  expect(await firstBrokenAuditRow(db)).toBeNull();
  await expect(db('audit').where({ seq: 1 }).update({ sentence: 'x' })).rejects.toThrow('audit_fixed');
  await db.raw('DROP TRIGGER audit_is_fixed');
  await db('audit').where({ seq: 1 }).update({ sentence: 'Nothing happened.' });
  expect(await firstBrokenAuditRow(db)).toBe(1);
});
