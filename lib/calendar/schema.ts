import * as z from 'zod';
import { isLocalDate } from '../time';

export const localDateSchema = z.string().refine(isLocalDate, 'Enter a date that exists.');
const minuteSchema = z.number().int().min(0, 'Enter a time.').max(1439, 'Enter a time.');
const idSchema = z.string().min(1, 'Choose one.').max(64);

const lengthSchema = z.number().int().min(15, 'At least 15 minutes.').max(180, 'At most 3 hours.');

export const windowSchema = z
  .object({ weekday: z.number().int().min(1).max(7), fromMin: minuteSchema, toMin: z.number().int().min(1).max(1440) })
  .refine(({ fromMin, toMin }) => fromMin < toMin, 'The end must come after the beginning.');

/** What a stranger tells the school. A child gives only enough to reach a guardian. */
export const enquirySchema = z.object({
  contactName: z.string().trim().min(1, 'Enter your name.').max(120, 'At most 120 characters.'),
  contactEmail: z.email('Enter an e-mail address like name@example.org.').max(254),
  contactPhone: z.string().trim().max(40, 'At most 40 characters.').regex(/^[+()\d\s.-]*$/, 'Use digits, spaces and +.').default(''),
  studentName: z.string().trim().min(1, 'Enter the student’s name.').max(120, 'At most 120 characters.'),
  isAdult: z.boolean().default(false),
  studentAge: z.number('Enter the age in years.').int('Whole years, please.').min(3, 'From 3 years.').max(120, 'Enter the age in years.').nullable().default(null),
  experience: z.string().trim().max(500, 'At most 500 characters.').default(''),
  wishes: z.array(windowSchema).min(1, 'Tick at least one time that suits you.').max(21),
  siteId: z.string().max(64).nullable().default(null),
  lengthMinutes: lengthSchema.default(30),
  message: z.string().trim().max(2000, 'At most 2000 characters.').default(''),
  mayWrite: z.literal(true, 'Tick this so that we may answer you.'),
  /** Left empty by people; filled in by programs that fill in everything. */
  website: z.string().max(200).default(''),
});
export type EnquiryInput = z.input<typeof enquirySchema>;

export const openingSearchSchema = z.object({
  enquiryId: z.string().max(64).optional(),
  subjectId: idSchema,
  level: z.number().int().min(1).max(20).default(1),
  lengthMinutes: lengthSchema,
  isWeekly: z.boolean().default(false),
  fromDate: localDateSchema,
  untilDate: localDateSchema,
  windows: z.array(windowSchema).min(1, 'Say when the student could come.').max(21),
  siteId: z.string().max(64).nullable().default(null),
  features: z.array(z.string().max(60)).max(10).default([]),
});
export type OpeningSearchInput = z.input<typeof openingSearchSchema>;

export const placeSchema = z.object({
  teacherId: idSchema, roomId: idSchema, siteId: idSchema, localDate: localDateSchema, startMin: minuteSchema, lengthMinutes: lengthSchema,
});

export const holdOpeningSchema = placeSchema.extend({ enquiryId: idSchema, subjectId: idSchema, isWeekly: z.boolean().default(false) });
export const bookTrialSchema = z.object({ offerId: idSchema });

export const enrolSchema = placeSchema.extend({
  enquiryId: z.string().max(64).nullable().default(null),
  studentId: idSchema,
  familyId: z.string().max(64).nullable().default(null),
  subjectId: idSchema,
  level: z.number().int().min(1).max(20).default(1),
  lastDate: localDateSchema.optional(),
  hasAcceptedTerms: z.literal(true, 'The terms must be accepted by a guardian or the adult student.'),
});

export const markAttendanceSchema = z.object({
  seatId: idSchema,
  attendance: z.enum(['present', 'late', 'left_early', 'online', 'away_with_notice', 'late_notice', 'no_show', 'excused', 'teacher_away', 'school_closed']),
  minutesLate: z.number().int().min(0).max(180).nullable().default(null),
  /** When an absence was told, if not just now: a call taken at 15:58 and typed at 16:20 counts as 15:58. */
  toldAt: z.number().int().nullable().default(null),
  toldVia: z.enum(['phone', 'email', 'screen', 'desk', 'lesson']).default('desk'),
  rowVersion: z.number().int(),
});
export const spanQuerySchema = z.object({ from: z.coerce.number().int(), until: z.coerce.number().int() });
export const dayQuerySchema = z.object({ date: localDateSchema });
export const calendarQuerySchema = spanQuerySchema.extend({ teacherId: z.string().max(64).optional(), roomId: z.string().max(64).optional() });

const clockSchema = z.string().regex(/^\d{1,2}:\d{2}$/, 'Enter a time like 16:30.');
/** One booking made by hand: a lesson of a student, or a rehearsal, rental, tuning or meeting without one. */
export const bookSchema = z.object({
  lessonTypeCode: z.enum(['single', 'make_up', 'rehearsal', 'rental', 'tuning', 'meeting']),
  title: z.string().trim().max(120, 'At most 120 characters.').default(''),
  studentId: z.string().max(64).nullable().default(null),
  teacherId: z.string().max(64).nullable().default(null),
  roomId: z.string('Choose a room.').min(1, 'Choose a room.').max(64),
  localDate: localDateSchema,
  start: clockSchema,
  lengthMinutes: z.number('Enter the minutes.').int('Whole minutes.').min(5, 'At least 5 minutes.').max(720, 'At most 12 hours.'),
});
export type BookInput = z.input<typeof bookSchema>;

/** An enquiry that the desk takes down on the telephone. */
export const deskEnquirySchema = enquirySchema.omit({ mayWrite: true, website: true }).extend({
  contactEmail: z.union([z.literal(''), z.email('Enter an e-mail address like name@example.org.')]).default(''),
  levelGuess: z.number().int().min(1).max(20).default(1),
}).refine(({ contactEmail, contactPhone }) => contactEmail !== '' || contactPhone !== '', { path: ['contactPhone'], message: 'Enter an e-mail address or a telephone number.' });
export type DeskEnquiryInput = z.input<typeof deskEnquirySchema>;

export const roomSchema = z.object({
  siteId: idSchema,
  name: z.string().trim().min(1, 'Enter a name.').max(60, 'At most 60 characters.'),
  description: z.string().trim().max(80, 'At most 80 characters.').default(''),
  personLimit: z.number('Enter a number.').int('Whole people.').min(1, 'At least one.').max(2000, 'At most 2000.'),
  turnoverMin: z.number('Enter minutes.').int('Whole minutes.').min(0).max(120, 'At most two hours.').default(0),
  features: z.array(z.string().max(60)).max(20).default([]),
});
export type RoomInput = z.input<typeof roomSchema>;
