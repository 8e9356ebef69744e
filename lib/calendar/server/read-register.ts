import 'server-only';
import { unmarkedRegister, type RegisterRow } from '@/db/register';
import type { Context } from '@/lib/server/context';
import { addDays } from '@/lib/time';

/** A quarter of a year: older lessons belong to closed periods. */
const CHASED_DAYS = 92;

export const readRegister = ({ db, ability, today }: Context): Promise<RegisterRow[]> => unmarkedRegister(db, ability, { from: addDays(today, -CHASED_DAYS), before: today });
