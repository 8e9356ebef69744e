import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import type { Trx } from '@/db/connection';
import { addEnquiryEvent, changeEnquiry, findEnquiry, trialsOfEnquiry } from '@/db/enquiries';
import { insertEnrolment, recordEnrolmentChange, setEnrolmentSeries } from '@/db/enrolments';
import { addStudentToFamily, familyOfStudent, insertFamily, insertPayer } from '@/db/families';
import { lessonTypeByCode } from '@/db/lesson-types';
import { findPerson, fullName, guardiansOf, type Person } from '@/db/people';
import { allSites, type Site } from '@/db/rooms';
import { closuresBetween, termOn, type TermRow } from '@/db/terms';
import { transaction } from '@/db/transaction';
import { AppError, notFound } from '@/lib/errors';
import { clockOf, weekdayOf, type LocalDate } from '@/lib/time';
import { formatDate, plural } from '@/lib/format';
import { queueMail } from '@/lib/messages/server/queue-mail';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import type { enrolSchema } from '../schema';
import { closedDatesFor, teachingDates } from '../term';
import { writeSeries } from './write-series';

type Enrolling = z.output<typeof enrolSchema>;
export type Enrolled = { enrolmentId: string; dates: LocalDate[]; familyId: string };

/**
 * Enrols a student: the weekly lesson appears on every teaching day from the first date to the end of the term,
 * at the same time on the wall. All of it or nothing: one clash and no lesson is written.
 */
export async function enrolStudent(input: Enrolling, context: Context): Promise<Enrolled> {
  const { db } = context;
  assertCan(context.ability, 'create', 'Enrolment', input);
  const [student, term, sites] = [await findPerson(db, input.studentId), await termOn(db, input.localDate), await allSites(db)];
  const site = sites.find(({ id }) => id === input.siteId);
  if (!student || !site) throw notFound('student');
  if (!term) throw new AppError('invalid', 'There is no term on that date.', { localDate: ['Choose a date inside a term.'] });
  const dates = await datesOf(input, term, context);
  return transaction(db, async (trx) => {
    const familyId = input.familyId ?? (await familyFor(trx, context, { student, site }));
    await addStudentToFamily(trx, familyId, student.id);
    const enrolmentId = await writeEnrolment(trx, context, { input, student, site, term, dates, familyId });
    if (input.enquiryId) await settleEnquiry(trx, context, input.enquiryId);
    await tellEnrolled(trx, context, { enrolmentId, student, input, dates });
    return { enrolmentId, dates, familyId };
  });
}

async function datesOf(input: Enrolling, term: TermRow, { db }: Context): Promise<LocalDate[]> {
  const closures = await closuresBetween(db, input.localDate, term.endsOn);
  const closed = closedDatesFor(closures, input.siteId, input.startMin, input.lengthMinutes);
  const lastOn = input.lastDate && input.lastDate < term.endsOn ? input.lastDate : term.endsOn;
  const dates = teachingDates(weekdayOf(input.localDate), { startsOn: input.localDate, endsOn: lastOn }, closed);
  if (dates.length === 0) throw new AppError('invalid', 'No teaching day is left from that date.', { localDate: ['Choose an earlier date.'] });
  return dates;
}

type Parts = { input: Enrolling; student: Person; site: Site; term: TermRow; dates: LocalDate[]; familyId: string };

async function writeEnrolment(trx: Trx, context: Context, { input, student, site, term, dates, familyId }: Parts): Promise<string> {
  const enrolmentId = newId();
  const lessonType = await lessonTypeByCode(trx, 'single');
  const trial = input.enquiryId ? (await trialsOfEnquiry(trx, input.enquiryId))[0] : undefined;
  const place = { teacherId: input.teacherId, roomId: input.roomId, siteId: site.id, zone: site.zone, startMin: input.startMin, lengthMinutes: input.lengthMinutes };
  await insertEnrolment(trx, {
    id: enrolmentId, studentId: student.id, familyId, subjectId: input.subjectId, lessonTypeId: lessonType.id, seriesId: null, lengthMinutes: input.lengthMinutes,
    teacherId: input.teacherId, siteId: site.id, tuitionModel: 'per_term_count', unitPriceMinor: null, startsOn: dates[0] ?? input.localDate, endsOn: null,
    state: 'active', trialId: trial?.id ?? null, acceptedAt: context.now, termsVersion: 'school-terms', createdBy: context.actor.personId,
  });
  const plan = { ...place, lessonType, subjectId: input.subjectId, level: input.level, title: '', termId: term.id, dates, seats: [{ studentId: student.id, enrolmentId }] };
  await setEnrolmentSeries(trx, enrolmentId, await writeSeries(trx, context, plan, { checked: true }));
  await recordEnrolmentChange(trx, { id: newId(), enrolmentId, kind: 'start', effectiveOn: dates[0] ?? input.localDate, before: null, after: place, byId: context.actor.personId, at: context.now });
  await recordAudit(trx, context, {
    action: 'enrol', tableName: 'enrolment', rowId: enrolmentId, after: { ...place, dates },
    sentence: `Enrolled ${fullName(student)}: ${formatDate(input.localDate, context.school.locale, 'weekday')} ${clockOf(input.startMin)}, ${plural(dates.length, 'lesson')}.`,
  });
  return enrolmentId;
}

/** The family that already pays for the student, or a new one paid by the first guardian, or by the adult student. */
async function familyFor(trx: Trx, context: Context, { student, site }: Pick<Parts, 'student' | 'site'>): Promise<string> {
  const known = await familyOfStudent(trx, student.id);
  if (known) return known.id;
  const guardians = await guardiansOf(trx, student.id);
  const payerId = guardians[0]?.adultId ?? student.id;
  const id = newId();
  await insertFamily(trx, {
    id, name: (guardians[0]?.familyName ?? student.familyName) || fullName(student), legalEntityId: site.legalEntityId, currency: context.school.currency, createdBy: context.actor.personId,
  });
  await insertPayer(trx, { id: newId(), familyId: id, personId: payerId });
  return id;
}

async function settleEnquiry(trx: Trx, { now, actor }: Context, enquiryId: string): Promise<void> {
  const enquiry = await findEnquiry(trx, enquiryId);
  if (!enquiry) throw notFound('enquiry');
  await changeEnquiry(trx, enquiryId, { state: 'enrolled', nextStepOn: null });
  await addEnquiryEvent(trx, { id: newId(), enquiryId, at: now, kind: 'enrolled', text: 'Enrolled.', byId: actor.personId });
}

type Told = { enrolmentId: string; student: Person; input: Enrolling; dates: LocalDate[] };

async function tellEnrolled(trx: Trx, context: Context, { enrolmentId, student, input, dates }: Told): Promise<void> {
  const guardians = await guardiansOf(trx, student.id);
  const readers = guardians.length > 0 ? guardians.map(({ adultId }) => adultId) : [student.id];
  const { locale } = context.school;
  for (const personId of readers) {
    await queueMail(trx, context, { personId }, {
      topic: 'enrolment', key: `enrolment:${enrolmentId}:${personId}`, subjectRef: enrolmentId, subject: `Enrolled at ${context.school.name}`,
      lines: [
        `${fullName(student)} is enrolled: ${plural(dates.length, 'lesson')}, weekly at ${clockOf(input.startMin)}, first on ${formatDate(dates[0] ?? input.localDate, locale, 'day')}, last this term on ${formatDate(dates.at(-1) ?? input.localDate, locale, 'day')}.`,
        'To tell us of an absence in good time, do so by the same hour on the day before.',
      ],
    });
  }
}
