import type { Knex } from 'knex';
import { contextOfUser } from '@/lib/server/user-context';
import { newId } from '@/lib/server/ids';
import { hashPassword } from '@/lib/server/passwords';
import { openSchool } from '@/lib/people/server/open-school';
import { addDays } from '@/lib/time';
import type { Role } from '@/policies/ability';
import type { Trx } from '../connection';
import { insertPerson } from '../people';
import { ensureFeature, insertOpeningSpans, insertRoom, insertSite, insertTravelTime } from '../rooms';
import { insertAvailability, insertEngagement, insertQualification, insertStaffDocument } from '../teachers';
import { insertClosure, insertTerm, type TermRow } from '../terms';
import { transaction } from '../transaction';
import { giveAccount } from './demo-accounts';
import { demoClosures, type demoTerms } from './demo-calendar-plan';
import { layFamilies } from './demo-families';
import { DEMO_PASSWORD, DEMO_TEACHERS } from './demo-people';
import type { DemoRoom, House } from './demo-types';

type Start = Pick<House, 'db' | 'random' | 'now' | 'today' | 'zone'> & { terms: ReturnType<typeof demoTerms> };

const ROOMS = [
  { name: 'Room 1', description: 'grand piano', siteIndex: 0, personLimit: 6, features: ['acoustic_piano', 'grand_piano', 'step_free'] },
  { name: 'Room 2', description: 'upright', siteIndex: 0, personLimit: 4, features: ['acoustic_piano', 'step_free'] },
  { name: 'Room 3', description: 'two uprights', siteIndex: 0, personLimit: 8, features: ['acoustic_piano'] },
  { name: 'Room 4', description: 'digital piano', siteIndex: 0, personLimit: 4, features: ['digital_piano'] },
  { name: 'Studio', description: 'drums, PA', siteIndex: 0, personLimit: 10, features: ['digital_piano', 'drum_kit', 'pa'] },
  { name: 'Hall', description: 'grand, 60 seats', siteIndex: 0, personLimit: 60, features: ['acoustic_piano', 'grand_piano', 'pa', 'step_free'], turnoverMin: 10 },
  { name: 'Loft', description: 'upright', siteIndex: 1, personLimit: 4, features: ['acoustic_piano'] },
  { name: 'Garden Room', description: 'digital pianos', siteIndex: 1, personLimit: 8, features: ['digital_piano', 'step_free'] },
  { name: 'Snug', description: 'digital piano', siteIndex: 1, personLimit: 3, features: ['digital_piano'] },
] as const;

export const TEACHING_HOURS = { weekday: { fromMin: 14 * 60, toMin: 20 * 60 }, weekend: { fromMin: 10 * 60, toMin: 16 * 60 } };
export const hoursOn = (weekday: number) => (weekday >= 6 ? TEACHING_HOURS.weekend : TEACHING_HOURS.weekday);

export async function layHouse(db: Knex, start: Omit<Start, 'db'>): Promise<House> {
  const { now, today, zone, random, terms } = start;
  const beginning = now - 300 * 86_400;
  const school = await openSchool({
    schoolName: 'Saltmarsh Music Rooms', siteName: 'Quay Street', zone, currency: 'EUR', country: 'IE', locale: 'en-IE',
    ownerName: 'Ruth Ames', ownerEmail: 'ruth@saltmarsh.example.org', password: DEMO_PASSWORD,
  }, { db, now: beginning });
  const owner = await contextOfUser(db, school.userId, now);
  if (!owner) throw new Error('the owner of the demo school cannot act');
  const passwordHash = await hashPassword(DEMO_PASSWORD);
  return transaction(db, async (trx) => {
    await trx('school').update({ isDemo: 1, publicEmail: 'office@saltmarsh.example.org', publicPhone: '0155 010 0100', safeguardingContact: 'Ruth Ames, 0155 010 0100' });
    const millId = newId();
    await insertSite(trx, { id: millId, legalEntityId: school.legalEntityId, name: 'Mill Lane', zone, orderNo: 2, colour: 'felt' });
    const siteIds = [school.siteId, millId] as const;
    await layPlaces(trx, siteIds);
    const base = { db, random, now, today, zone, owner, subjectId: school.subjectId, legalEntityId: school.legalEntityId, siteIds, passwordHash };
    const rooms = await layRooms(trx, siteIds);
    const teachers = await layTeachers(trx, base);
    const desk = newId();
    await insertPerson(trx, { id: desk, givenName: 'Pat', familyName: 'Linden', bornOn: '1988-03-09' });
    await giveAccount(trx, { personId: desk, email: 'pat@saltmarsh.example.org', roles: ['desk'], passwordHash });
    const termRows = { last: await layTermRow(trx, terms.last), current: await layTermRow(trx, terms.current), next: await layTermRow(trx, terms.next) };
    const students = await layFamilies(trx, { ...base, teachers });
    return { ...base, rooms, teachers, students, terms: termRows };
  });
}

async function layPlaces(trx: Trx, [quayId, millId]: readonly [string, string]): Promise<void> {
  await insertOpeningSpans(trx, [1, 2, 3, 4, 5, 6].map((weekday) => ({ id: newId(), siteId: millId, weekday, fromMin: 9 * 60, toMin: 21 * 60 })));
  await insertOpeningSpans(trx, [quayId, millId].map((siteId) => ({ id: newId(), siteId, weekday: 7, fromMin: 10 * 60, toMin: 17 * 60 })));
  for (const [fromSiteId, toSiteId] of [[quayId, millId], [millId, quayId]] as const) await insertTravelTime(trx, { fromSiteId, toSiteId, minutes: 20, milesTenths: 23 });
}

async function layRooms(trx: Trx, siteIds: readonly [string, string]): Promise<DemoRoom[]> {
  const rooms: DemoRoom[] = [];
  for (const [orderNo, room] of ROOMS.entries()) {
    const id = newId();
    const featureIds: string[] = [];
    for (const code of room.features) featureIds.push(await ensureFeature(trx, { id: newId(), code, label: code.replace('_', ' ') }));
    const isStepFree = (room.features as readonly string[]).includes('step_free');
    await insertRoom(trx, { id, siteId: siteIds[room.siteIndex], name: room.name, description: room.description, personLimit: room.personLimit, turnoverMin: 'turnoverMin' in room ? room.turnoverMin : 0, orderNo, isStepFree, featureIds });
    rooms.push({ id, name: room.name, siteIndex: room.siteIndex });
  }
  return rooms;
}

async function layTermRow(trx: Trx, term: ReturnType<typeof demoTerms>['last']): Promise<TermRow> {
  const row = { id: newId(), ...term };
  await insertTerm(trx, row);
  for (const { closedOn, reason } of demoClosures(term)) await insertClosure(trx, { id: newId(), closedOn, siteId: null, fromMin: null, toMin: null, kind: 'planned', reason });
  return row;
}

/** Who teaches today whatever the weekday, so that the demo school is always found at work. */
const ALWAYS_TODAY = ['greta', 'ines', 'kwame'];

async function layTeachers(trx: Trx, house: Pick<House, 'today' | 'subjectId' | 'legalEntityId' | 'siteIds' | 'passwordHash'>): Promise<House['teachers']> {
  const weekdayToday = new Date(`${house.today}T12:00:00Z`).getUTCDay() || 7;
  const laid: House['teachers'] = [];
  for (const teacher of DEMO_TEACHERS) {
    const [id, engagementId] = [newId(), newId()];
    const days = ALWAYS_TODAY.includes(teacher.key) ? { [weekdayToday]: 0 as const, ...teacher.days } : teacher.days;
    await insertPerson(trx, { id, givenName: teacher.givenName, familyName: teacher.familyName, bornOn: '1982-06-15' });
    await insertEngagement(trx, { id: engagementId, personId: id, legalEntityId: house.legalEntityId, kind: teacher.kind, startsOn: addDays(house.today, -700), colour: teacher.colour });
    await insertQualification(trx, { id: newId(), personId: id, subjectId: house.subjectId, levelFrom: 1, levelTo: teacher.levelTo, grantedOn: addDays(house.today, -700) });
    await insertStaffDocument(trx, { id: newId(), personId: id, kind: 'background_check', issuedOn: addDays(house.today, -500), expiresOn: addDays(house.today, teacher.key === 'bram' ? 24 : 595) });
    await insertAvailability(trx, Object.entries(days).map(([weekday, siteIndex]) => ({ id: newId(), personId: id, siteId: house.siteIds[siteIndex], weekday: Number(weekday), ...hoursOn(Number(weekday)) })));
    const roles: Role[] = teacher.key === 'kwame' ? ['teacher', 'guardian'] : ['teacher'];
    await giveAccount(trx, { personId: id, email: `${teacher.key}@saltmarsh.example.org`, roles, passwordHash: house.passwordHash, isLead: teacher.key === 'ines' });
    laid.push({ ...teacher, days, id, engagementId });
  }
  return laid;
}
