import * as z from 'zod';
import { LEAST_REACH, MOST_REACH } from '../harmony/reach';
import { isLocalDate, isZone } from '../time';
import { passwordFault } from './passwords';

const name = (what: string) => z.string().trim().min(1, `Enter ${what}.`).max(120, 'At most 120 characters.');
const email = z.email('Enter an e-mail address like name@example.org.').max(254).transform((text) => text.toLowerCase());

export const newPasswordSchema = z.string().superRefine((password, check) => {
  const fault = passwordFault(password);
  if (fault) check.addIssue({ code: 'custom', message: fault });
});

export const setUpSchema = z.object({
  schoolName: name('the school’s name'),
  siteName: name('the name of your first site'),
  zone: z.string().refine(isZone, 'Choose a time zone from the list.'),
  currency: z.string().regex(/^[A-Z]{3}$/, 'Choose a currency.'),
  country: z.string().regex(/^[A-Z]{2}$/, 'Choose a country.'),
  locale: z.string().min(2).max(20).default('en-IE'),
  ownerName: name('your name'),
  ownerEmail: email,
  password: newPasswordSchema,
});
export type SetUpInput = z.input<typeof setUpSchema>;

export const setPasswordSchema = z.object({ token: z.string().min(20).max(200), password: newPasswordSchema });
export const resetRequestSchema = z.object({ email });
export const switchHatSchema = z.object({ role: z.enum(['owner', 'desk', 'teacher', 'student', 'guardian']) });

export const inviteSchema = z.object({
  personId: z.string().min(1, 'Choose a person.').max(64),
  email,
  role: z.enum(['owner', 'desk', 'teacher', 'student', 'guardian'], 'Choose a role.'),
  isLead: z.boolean().default(false),
});
export const userSchema = z.object({ userId: z.string().min(1).max(64) });
export const newStaffSchema = z.object({
  name: name('the name'),
  email,
  role: z.enum(['owner', 'desk'], 'Choose a role.'),
});

const day = z.string().refine(isLocalDate, 'Enter a date.');
export const backgroundCheckSchema = z.object({
  personIds: z.array(z.string().max(64)).min(1, 'Choose at least one teacher.').max(200),
  issuedOn: day,
  expiresOn: day,
});

const REACH_RANGE = `From ${LEAST_REACH} to ${MOST_REACH} semitones.`;
export const changeReachSchema = z.object({
  studentId: z.string().min(1).max(64),
  reachSemitones: z.coerce.number<string | number>(REACH_RANGE).int(REACH_RANGE).min(LEAST_REACH, REACH_RANGE).max(MOST_REACH, REACH_RANGE),
});
