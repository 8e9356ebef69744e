import 'server-only';
import { findFamilies, findInvoices, findRoomsByName, findStudents, findTeachersByName } from '@/db/find';
import { formatDate } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { may } from '@/policies/ability';
import { typedDate, type Found } from '../found';

/** People, rooms, dates and invoices by what a person types, as far as their role may see them. */
export async function findAnything({ text }: { text: string }, context: Context): Promise<Found[]> {
  const { db, ability, today, school } = context;
  const wanted = text.trim();
  if (wanted.length < 2) return [];
  const date = may(ability, 'read', 'Room') ? typedDate(wanted, today) : null;
  const students = (await findStudents(db, ability, wanted)).map(({ id, name }) => ({ title: name, detail: 'student', href: `/students/${id}` }));
  return [...(date ? [{ title: formatDate(date, school.locale, 'day'), detail: 'room board', href: `/today?date=${date}` }] : []), ...students, ...(await staffFinds(wanted, context))];
}

async function staffFinds(text: string, { db, ability }: Context): Promise<Found[]> {
  const found: Found[] = [];
  if (may(ability, 'read', 'Family')) found.push(...(await findFamilies(db, text)).map(({ id, name, payers }) => ({ title: `${name} family`, detail: payers ?? 'family', href: `/families/${id}` })));
  if (may(ability, 'read', 'Room')) {
    found.push(...(await findTeachersByName(db, text)).map(({ id, name }) => ({ title: name, detail: 'teacher', href: `/calendar?teacher=${id}` })));
    found.push(...(await findRoomsByName(db, text)).map(({ id, name, siteName }) => ({ title: name, detail: `room, ${siteName}`, href: `/calendar?room=${id}` })));
  }
  if (may(ability, 'read', 'Invoice')) found.push(...(await findInvoices(db, text)).map(({ id, documentNo, familyName }) => ({ title: documentNo, detail: `invoice, ${familyName}`, href: `/tuition/invoices/${id}` })));
  return found;
}
