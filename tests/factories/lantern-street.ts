import { randomUUID } from 'node:crypto';
import type { Db } from '../../db/connection';
import { insertLessonTypes, insertSubject } from '../../db/lesson-types';
import { insertPerson } from '../../db/people';
import { ensureFeature, insertLegalEntity, insertOpeningSpans, insertRoom, insertSite, insertTravelTime } from '../../db/rooms';
import { insertSchool } from '../../db/school';
import { insertAvailability, insertEngagement, insertQualification, insertStaffDocument } from '../../db/teachers';
import { insertClosure, insertTerm } from '../../db/terms';
import { transaction } from '../../db/transaction';
import { FIRST_FEATURES, FIRST_LESSON_TYPES, FIRST_SUBJECT } from '../../lib/calendar/foundation';

const NEW_YORK = 'America/New_York';
const WEEKDAYS = [1, 2, 3, 4, 5, 6, 7];

/** The worked-example school of the scenarios: people, sites, rooms, terms and closures; ids are the names. */
export async function lanternStreet(db: Db): Promise<void> {
  await transaction(db, async (trx) => {
    await insertSchool(trx, { name: 'Lantern Street School', locale: 'en-US', zone: NEW_YORK, currency: 'USD' });
    await insertLegalEntity(trx, { id: 'lantern', name: 'Lantern Street School', country: 'US', currency: 'USD', numberPrefix: 'L-' });
    await insertLegalEntity(trx, { id: 'canal-entity', name: 'Canal School', country: 'IE', currency: 'EUR', numberPrefix: 'C-' });
    await insertSite(trx, { id: 'quay', legalEntityId: 'lantern', name: 'Quay', zone: NEW_YORK, orderNo: 1 });
    await insertSite(trx, { id: 'mill', legalEntityId: 'lantern', name: 'Mill', zone: NEW_YORK, orderNo: 2 });
    await insertSite(trx, { id: 'canal', legalEntityId: 'canal-entity', name: 'Canal', zone: 'Europe/Dublin', orderNo: 3 });
    for (const [fromSiteId, toSiteId] of [['quay', 'mill'], ['mill', 'quay']] as const) await insertTravelTime(trx, { fromSiteId, toSiteId, minutes: 25, milesTenths: 114 });
    for (const siteId of ['quay', 'mill', 'canal']) {
      await insertOpeningSpans(trx, WEEKDAYS.map((weekday) => ({ id: randomUUID(), siteId, weekday, fromMin: 9 * 60, toMin: 21 * 60 })));
    }
    await insertLessonTypes(trx, FIRST_LESSON_TYPES.map((type) => ({ id: type.code, ...type })));
    await insertSubject(trx, { id: 'keyboard', ...FIRST_SUBJECT });
    const features = new Map<string, string>();
    for (const feature of FIRST_FEATURES) features.set(feature.code, await ensureFeature(trx, { id: feature.code, ...feature }));
    const rooms = [
      { id: 'q1', siteId: 'quay', name: 'Q1', personLimit: 4, featureIds: ['acoustic_piano'] },
      { id: 'q2', siteId: 'quay', name: 'Q2', personLimit: 6, featureIds: ['digital_piano', 'drum_kit'] },
      { id: 'q3', siteId: 'quay', name: 'Q3', personLimit: 8, featureIds: ['digital_piano'] },
      { id: 'hall', siteId: 'quay', name: 'Hall', personLimit: 90, turnoverMin: 10, featureIds: ['acoustic_piano', 'grand_piano', 'pa'] },
      { id: 'm1', siteId: 'mill', name: 'M1', personLimit: 4, featureIds: ['digital_piano'] },
      { id: 'm2', siteId: 'mill', name: 'M2', personLimit: 4, featureIds: ['acoustic_piano'] },
      { id: 'c1', siteId: 'canal', name: 'C1', personLimit: 4, featureIds: ['digital_piano'] },
    ];
    for (const [orderNo, room] of rooms.entries()) await insertRoom(trx, { ...room, orderNo });
    const teachers = [
      { id: 'mara', givenName: 'Mara', levelTo: 6, kind: 'employee' },
      { id: 'leo', givenName: 'Leo', levelTo: 4, kind: 'contractor' },
      { id: 'ines', givenName: 'Ines', levelTo: 8, kind: 'employee' },
    ] as const;
    for (const { id, givenName, levelTo, kind } of teachers) {
      await insertPerson(trx, { id, givenName, familyName: '', bornOn: '1980-01-01' });
      await insertEngagement(trx, { id: `engagement-${id}`, personId: id, legalEntityId: 'lantern', kind, startsOn: '2020-01-01' });
      await insertQualification(trx, { id: `qualification-${id}`, personId: id, subjectId: 'keyboard', levelFrom: 1, levelTo, grantedOn: '2020-01-01' });
      await insertStaffDocument(trx, { id: `check-${id}`, personId: id, kind: 'background_check', issuedOn: '2020-01-01', expiresOn: '2030-01-01' });
      await insertAvailability(trx, WEEKDAYS.map((weekday) => ({ id: randomUUID(), personId: id, siteId: null, weekday, fromMin: 9 * 60, toMin: 21 * 60 })));
    }
    const students = [['ada', 'Ada', 'Vale', '2013-05-04'], ['ben', 'Ben', 'Vale', '2015-02-11'], ['theo', 'Theo', 'Marsh', '1984-03-02'], ['uma', 'Uma', 'Reyes', '2012-01-15'], ['vik', 'Vik', 'Rao', '2011-07-21'], ['wen', 'Wen', 'Li', '2014-09-09']] as const;
    for (const [id, givenName, familyName, bornOn] of students) await insertPerson(trx, { id, givenName, familyName, bornOn, isStudent: true });
    for (const [id, givenName] of [['ruth', 'Ruth'], ['pat', 'Pat'], ['noor', 'Noor'], ['sam', 'Sam']] as const) await insertPerson(trx, { id, givenName, familyName: id === 'noor' || id === 'sam' ? 'Vale' : '', bornOn: '1979-01-01' });
    const terms = [['autumn', 'Autumn', '2026-09-08', '2026-12-19'], ['winter', 'Winter', '2027-01-11', '2027-03-27'], ['spring', 'Spring', '2027-04-05', '2027-06-19']] as const;
    for (const [id, name, startsOn, endsOn] of terms) await insertTerm(trx, { id, name, yearLabel: '2026/27', startsOn, endsOn, state: 'published' });
    const closed = ['2026-10-12', '2026-11-26', '2026-11-27', '2026-11-28', '2027-01-18', '2027-02-15', '2027-05-31'];
    for (const closedOn of closed) await insertClosure(trx, { id: randomUUID(), closedOn, siteId: null, fromMin: null, toMin: null, kind: 'planned', reason: 'No teaching' });
  });
}
