import 'server-only';
import { insertFamily, insertPayer, insertPercentSplit } from '@/db/families';
import { insertContact, insertPerson } from '@/db/people';
import { splitName } from '@/lib/people/names';
import type { FamilyFacts, PayerFacts } from '../rows';
import { makeId, type ImportRun, type Place } from './import-run';

/** The account that is billed, its payers, and who pays which share of everything. */
export async function writeFamily(run: ImportRun, facts: FamilyFacts, place: Place): Promise<string> {
  const { trx, site, context } = run;
  const familyId = makeId(run, 'family', place);
  await insertFamily(trx, { id: familyId, name: facts.name, legalEntityId: site.legalEntityId, currency: context.school.currency, externalKey: place.key, createdBy: context.actor.personId });
  const parts: { payerId: string; bp: number }[] = [];
  for (const [index, payer] of facts.payers.entries()) {
    const personId = await writePayerPerson(run, payer, place);
    const payerId = makeId(run, 'payer', place);
    await insertPayer(trx, { id: payerId, familyId, personId, orderNo: index + 1 });
    run.payers.set(familyId, [...(run.payers.get(familyId) ?? []), { personId, name: payer.name, isMade: true }]);
    parts.push({ payerId, bp: payer.shareBp });
  }
  if (parts.length > 1) await insertPercentSplit(trx, { id: makeId(run, 'split_rule', place), familyId, chargeKind: '*', parts, createdBy: context.actor.personId });
  return familyId;
}

async function writePayerPerson(run: ImportRun, { name, email, phone }: PayerFacts, place: Place): Promise<string> {
  const { trx } = run;
  const personId = makeId(run, 'person', place);
  await insertPerson(trx, { id: personId, ...splitName(name) });
  if (email !== null) await insertContact(trx, { id: makeId(run, 'contact_point', place), personId, kind: 'email', value: email });
  if (phone !== null) await insertContact(trx, { id: makeId(run, 'contact_point', place), personId, kind: 'phone', value: phone });
  return personId;
}
