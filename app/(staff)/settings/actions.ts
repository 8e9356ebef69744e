'use server';

import { revalidatePath } from 'next/cache';
import { changeConsequenceSchema } from '@/lib/calendar/consequence-schema';
import { addClosure } from '@/lib/calendar/server/add-closure';
import { addTerm } from '@/lib/calendar/server/add-term';
import { changeConsequence } from '@/lib/calendar/server/change-consequence';
import { takeClosureAway } from '@/lib/calendar/server/take-closure-away';
import { addClosureSchema, addTermSchema, closureSchema } from '@/lib/calendar/term-schema';
import { backgroundCheckSchema, inviteSchema, newStaffSchema, userSchema } from '@/lib/people/schema';
import { endAccess } from '@/lib/people/server/access';
import { addStaff } from '@/lib/people/server/add-staff';
import { changeHouseRule, changeRuleSchema } from '@/lib/people/server/house-rules';
import { invitePerson } from '@/lib/people/server/invite-person';
import { recordBackgroundCheck } from '@/lib/people/server/staff-papers';
import { beginRateSchema } from '@/lib/payroll/rate-schema';
import { beginRate } from '@/lib/payroll/server/pay-rates';
import { action } from '@/lib/server/action';
import { changePriceSchema, changeTaxSchema } from '@/lib/tuition/price-schema';
import { setPrice, setTax } from '@/lib/tuition/server/price-list';

const fresh = () => revalidatePath('/settings');

export const savePrice = action(changePriceSchema, async (input, context) => { await setPrice(input, context); fresh(); });
export const saveTax = action(changeTaxSchema, async (input, context) => { await setTax(input, context); fresh(); });
export const saveRule = action(changeRuleSchema, async (input, context) => { await changeHouseRule(input, context); fresh(); });
export const invite = action(inviteSchema, async (input, context) => { const invited = await invitePerson(input, context); fresh(); return invited; });
export const inviteNew = action(newStaffSchema, async (input, context) => { const invited = await addStaff(input, context); fresh(); return invited; });
export const shutOut = action(userSchema, async (input, context) => { await endAccess(input, context); fresh(); });
export const saveCheck = action(backgroundCheckSchema, async (input, context) => { const recorded = await recordBackgroundCheck(input, context); fresh(); return recorded; });
export const saveTerm = action(addTermSchema, async (input, context) => { const added = await addTerm(input, context); fresh(); return added; });
export const saveClosure = action(addClosureSchema, async (input, context) => { const closed = await addClosure(input, context); fresh(); return closed; });
export const dropClosure = action(closureSchema, async (input, context) => { await takeClosureAway(input, context); fresh(); });
export const saveConsequence = action(changeConsequenceSchema, async (input, context) => { await changeConsequence(input, context); fresh(); });
export const saveRate = action(beginRateSchema, async (input, context) => { await beginRate(input, context); fresh(); });
