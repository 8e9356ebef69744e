import { newId } from '@/lib/server/ids';
import { addDays, instantOf } from '@/lib/time';
import type { Trx } from '../connection';
import { addStudentToFamily, insertFamily, insertPayer, insertPercentSplit } from '../families';
import { insertConsent, insertContact, insertPerson, insertRelationship } from '../people';
import { giveAccount } from './demo-accounts';
import { FAMILY_NAMES, GIVEN_NAMES } from './demo-people';
import type { DemoStudent, House } from './demo-types';
import { between, pick, type Random } from './random';

type Base = Pick<House, 'random' | 'today' | 'zone' | 'legalEntityId' | 'passwordHash' | 'teachers'>;

const FAMILY_COUNT = 110;
const STUDENT_COUNT = 160;
const ADULT_COUNT = 14;

export async function layFamilies(trx: Trx, base: Base): Promise<DemoStudent[]> {
  const students = [...(await layVales(trx, base)), ...(await layTheo(trx, base)), ...(await layOsei(trx, base))];
  const left = FAMILY_COUNT - 3;
  let siblings = STUDENT_COUNT - students.length - left;
  for (let index = 0; index < left; index += 1) {
    const isAdult = index < ADULT_COUNT;
    const children = !isAdult && siblings > 0 && base.random() < 0.62 ? 2 : 1;
    siblings -= children - 1;
    students.push(...(await layFamily(trx, base, { index, children, isAdult })));
  }
  return students;
}

/** Beginners are many, high levels few. */
const levelFor = (random: Random): number => [1, 1, 1, 2, 2, 2, 2, 3, 3, 3, 4, 4, 5, 6][Math.floor(random() * 14)] ?? 1;
const birthday = (random: Random, today: string, low: number, high: number) => addDays(today, -365 * between(random, low, high) - between(random, 1, 360));
const phone = (index: number) => `0155 010 ${String(200 + index).padStart(4, '0')}`;

type Shape = { index: number; children: number; isAdult: boolean };

async function layFamily(trx: Trx, base: Base, { index, children, isAdult }: Shape): Promise<DemoStudent[]> {
  const { random, today } = base;
  const familyName = FAMILY_NAMES[index % FAMILY_NAMES.length] ?? 'Adair';
  const payerId = newId();
  const given = pick(random, GIVEN_NAMES);
  await insertPerson(trx, { id: payerId, givenName: given, familyName, bornOn: isAdult ? birthday(random, today, 22, 70) : birthday(random, today, 30, 52), isStudent: isAdult });
  await insertContact(trx, { id: newId(), personId: payerId, kind: 'email', value: `family${index + 1}@family.example.com` });
  await insertContact(trx, { id: newId(), personId: payerId, kind: 'phone', value: phone(index) });
  const familyId = await layAccount(trx, base, familyName, [payerId]);
  if (isAdult) {
    await addStudentToFamily(trx, familyId, payerId);
    return [{ id: payerId, familyId, name: `${given} ${familyName}`, isAdult: true, level: levelFor(random) }];
  }
  const laid: DemoStudent[] = [];
  for (let child = 0; child < children; child += 1) {
    const name = pick(random, GIVEN_NAMES.filter((candidate) => candidate !== given && !laid.some((other) => other.name.startsWith(`${candidate} `))));
    laid.push(await layChild(trx, base, { givenName: name, familyName, familyId, guardianIds: [payerId], photo: random() < 0.85 ? 'yes' : 'no', bornOn: birthday(random, today, 7, 16) }));
  }
  return laid;
}

async function layAccount(trx: Trx, { legalEntityId }: Base, name: string, payers: string[]): Promise<string> {
  const familyId = newId();
  await insertFamily(trx, { id: familyId, name, legalEntityId, currency: 'EUR' });
  for (const [order, personId] of payers.entries()) await insertPayer(trx, { id: newId(), familyId, personId, orderNo: order + 1 });
  return familyId;
}

type Child = { givenName: string; familyName: string; familyId: string; guardianIds: string[]; photo: 'yes' | 'no'; bornOn: string };

async function layChild(trx: Trx, { random, today, zone }: Base, child: Child): Promise<DemoStudent> {
  const id = newId();
  const givenAt = instantOf(addDays(today, -150), 600, zone);
  await insertPerson(trx, { id, givenName: child.givenName, familyName: child.familyName, bornOn: child.bornOn, isStudent: true, reachSemitones: child.bornOn > addDays(today, -365 * 12) ? 10 : 12 });
  for (const adultId of child.guardianIds) await insertRelationship(trx, { id: newId(), childId: id, adultId });
  for (const purpose of ['photo_wall', 'clip_keep', 'name_print']) {
    await insertConsent(trx, { id: newId(), personId: id, givenById: child.guardianIds[0] ?? null, purpose, answer: child.photo, textVersion: 'first', method: 'paper', givenAt });
  }
  await addStudentToFamily(trx, child.familyId, id);
  return { id, familyId: child.familyId, name: `${child.givenName} ${child.familyName}`, isAdult: false, level: levelFor(random) };
}

/** Two guardians who live apart and share the costs: tuition 60 to 40, everything else Sam's. */
async function layVales(trx: Trx, base: Base): Promise<DemoStudent[]> {
  const [noor, sam] = [newId(), newId()];
  await insertPerson(trx, { id: noor, givenName: 'Noor', familyName: 'Vale', bornOn: '1984-04-02' });
  await insertPerson(trx, { id: sam, givenName: 'Sam', familyName: 'Vale', bornOn: '1982-11-20' });
  await giveAccount(trx, { personId: noor, email: 'noor@family.example.com', roles: ['guardian'], passwordHash: base.passwordHash });
  await giveAccount(trx, { personId: sam, email: 'sam@family.example.com', roles: ['guardian'], passwordHash: base.passwordHash });
  const familyId = newId();
  const [payerNoor, payerSam] = [newId(), newId()];
  await insertFamily(trx, { id: familyId, name: 'Vale', legalEntityId: base.legalEntityId, currency: 'EUR' });
  await insertPayer(trx, { id: payerNoor, familyId, personId: noor, orderNo: 1 });
  await insertPayer(trx, { id: payerSam, familyId, personId: sam, orderNo: 2 });
  await insertPercentSplit(trx, { id: newId(), familyId, chargeKind: 'tuition', parts: [{ payerId: payerNoor, bp: 6000 }, { payerId: payerSam, bp: 4000 }] });
  await insertPercentSplit(trx, { id: newId(), familyId, chargeKind: '*', parts: [{ payerId: payerSam, bp: 10_000 }] });
  const shared = { familyName: 'Vale', familyId, guardianIds: [noor, sam], photo: 'yes' as const };
  const ada = await layChild(trx, base, { ...shared, givenName: 'Ada', bornOn: addDays(base.today, -365 * 13 - 100) });
  const ben = await layChild(trx, base, { ...shared, givenName: 'Ben', bornOn: addDays(base.today, -365 * 11 - 40) });
  const givenAt = instantOf(addDays(base.today, -150), 600, base.zone);
  await insertConsent(trx, { id: newId(), personId: ada.id, givenById: noor, purpose: 'account', answer: 'yes', textVersion: 'first', method: 'screen', givenAt });
  await giveAccount(trx, { personId: ada.id, email: 'ada@family.example.com', roles: ['student'], passwordHash: base.passwordHash });
  return [{ ...ada, level: 4, key: 'ada' }, { ...ben, level: 2, key: 'ben' }];
}

async function layTheo(trx: Trx, base: Base): Promise<DemoStudent[]> {
  const id = newId();
  await insertPerson(trx, { id, givenName: 'Theo', familyName: 'Marsh', bornOn: '1979-08-30', isStudent: true });
  await giveAccount(trx, { personId: id, email: 'theo@family.example.com', roles: ['student'], passwordHash: base.passwordHash });
  const familyId = await layAccount(trx, base, 'Marsh', [id]);
  await addStudentToFamily(trx, familyId, id);
  return [{ id, familyId, name: 'Theo Marsh', isAdult: true, level: 3, key: 'theo' }];
}

/** A teacher whose child studies here with a colleague. */
async function layOsei(trx: Trx, base: Base): Promise<DemoStudent[]> {
  const kwame = base.teachers.find(({ key }) => key === 'kwame');
  if (!kwame) throw new Error('the demo school lacks Kwame');
  const familyId = await layAccount(trx, base, 'Osei', [kwame.id]);
  const abena = await layChild(trx, base, { givenName: 'Abena', familyName: 'Osei', familyId, guardianIds: [kwame.id], photo: 'yes', bornOn: addDays(base.today, -365 * 9 - 77) });
  return [{ ...abena, level: 1, key: 'abena' }];
}
