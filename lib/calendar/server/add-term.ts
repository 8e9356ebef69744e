import 'server-only';
import type * as z from 'zod';
import { recordAudit } from '@/db/audit';
import { findTermByName, insertTerm, isTermOverlap, termsTouching } from '@/db/terms';
import { transaction } from '@/db/transaction';
import { AppError } from '@/lib/errors';
import { formatDate } from '@/lib/format';
import type { Context } from '@/lib/server/context';
import { newId } from '@/lib/server/ids';
import { assertCan } from '@/policies/ability';
import { yearLabelOf } from '../term';
import type { addTermSchema } from '../term-schema';

type NewTerm = z.output<typeof addTermSchema>;

/**
 * A term from its first day to its last. No two terms share a day: a lesson belongs to one term, and what is billed and
 * counted for a term would count twice. The database refuses it; here the other term is named.
 */
export async function addTerm(input: NewTerm, context: Context): Promise<{ id: string }> {
  const { db, today, school } = context;
  assertCan(context.ability, 'create', 'Term', {});
  const term = { id: newId(), ...input, yearLabel: yearLabelOf(input.startsOn), state: input.startsOn <= today ? 'published' : 'planned' } as const;
  if (await findTermByName(db, term.name, term.yearLabel)) {
    throw new AppError('conflict', 'Two terms of one school year cannot have the same name.', { name: [`The school year ${term.yearLabel} has a term of this name already.`] });
  }
  const written = transaction(db, async (trx) => {
    await insertTerm(trx, term);
    const days = `${formatDate(term.startsOn, school.locale, 'full')} to ${formatDate(term.endsOn, school.locale, 'full')}`;
    await recordAudit(trx, context, { action: 'term', tableName: 'term', rowId: term.id, after: term, sentence: `Added the term ${term.name} ${term.yearLabel}, ${days}.` });
  });
  await written.catch(async (error: unknown) => { throw isTermOverlap(error) ? await overlapRefusal(input, context) : error; });
  return { id: term.id };
}

async function overlapRefusal(input: NewTerm, { db, school }: Context): Promise<AppError> {
  const [other] = await termsTouching(db, input);
  const day = (date: string) => formatDate(date, school.locale, 'full');
  const which = other ? `${other.name} ${other.yearLabel} runs from ${day(other.startsOn)} to ${day(other.endsOn)}` : 'another term runs then';
  const field = other && other.startsOn <= input.startsOn ? 'startsOn' : 'endsOn';
  return new AppError('conflict', `Two terms cannot share a day: ${which}.`, { [field]: ['Choose a day outside the other term.'] });
}
