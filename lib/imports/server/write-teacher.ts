import 'server-only';
import { insertPayRates } from '@/db/pay-rates';
import { insertContact, insertPerson } from '@/db/people';
import { openingSpans } from '@/db/rooms';
import { insertAvailability, insertEngagement, insertQualification } from '@/db/teachers';
import { AppError } from '@/lib/errors';
import { splitName } from '@/lib/people/names';
import type { TeacherFacts } from '../rows';
import { makeId, subjectNamed, type ImportRun, type Place } from './import-run';

const COLOURS = ['petrol', 'plum', 'felt', 'brass'] as const;
/** Whoever gives no highest level is planned with beginners until the lead says more. */
const FIRST_LEVEL = 1;
/** The day as it is worked where the site's own hours for that weekday are not set. */
const WHOLE_DAY = { fromMin: 9 * 60, toMin: 21 * 60 };

/** A teacher with the engagement the owner chose, what they may teach and up to which level, their days and their rates. */
export async function writeTeacher(run: ImportRun, facts: TeacherFacts, place: Place): Promise<string> {
  const { trx, site, choices, firstDay } = run;
  if (choices.engagementKind === null) throw new AppError('invalid', 'Say how the teachers of this workbook are engaged.', { engagementKind: ['Choose employees or contractors.'] });
  const personId = makeId(run, 'person', place);
  await insertPerson(trx, { id: personId, ...splitName(facts.name), externalKey: place.key });
  if (facts.email !== null) await insertContact(trx, { id: makeId(run, 'contact_point', place), personId, kind: 'email', value: facts.email });
  const engagementId = makeId(run, 'engagement', place);
  const colour = COLOURS[place.rowNo % COLOURS.length] ?? 'petrol';
  await insertEngagement(trx, { id: engagementId, personId, legalEntityId: site.legalEntityId, kind: choices.engagementKind, startsOn: firstDay, colour });
  await writeQualifications(run, { facts, place, personId });
  await writeDays(run, { facts, place, personId });
  await insertPayRates(trx, facts.rates.map(({ lengthMinutes, amountMinor }) => ({
    id: makeId(run, 'pay_rate', place), engagementId, workType: 'lesson', lessonTypeId: null, lengthMinutes, seatsFrom: null, seatsTo: null, siteId: null,
    amountMinor, per: 'lesson', validFrom: firstDay, validTo: null, approvedBy: run.context.actor.personId,
  })));
  return personId;
}

type Parts = { facts: TeacherFacts; place: Place; personId: string };

async function writeQualifications(run: ImportRun, { facts, place, personId }: Parts): Promise<void> {
  const { trx, context, firstDay } = run;
  const subjects = new Map<string, string>();
  for (const word of facts.subjects.length > 0 ? facts.subjects : ['keyboard']) subjects.set((await subjectNamed(run, word, place)).id, word);
  for (const subjectId of subjects.keys()) {
    await insertQualification(trx, {
      id: makeId(run, 'qualification', place), personId, subjectId, levelFrom: 1, levelTo: facts.levelTo ?? FIRST_LEVEL, grantedOn: firstDay, grantedBy: context.actor.personId,
    });
  }
}

async function writeDays(run: ImportRun, { facts, place, personId }: Parts): Promise<void> {
  const { trx, site } = run;
  const hours = (await openingSpans(trx)).filter(({ siteId }) => siteId === site.id);
  const rows = facts.weekdays.flatMap((weekday) => {
    const spans = hours.filter((span) => span.weekday === weekday);
    return (spans.length > 0 ? spans : [WHOLE_DAY]).map(({ fromMin, toMin }) => ({ id: makeId(run, 'availability', place), personId, siteId: site.id, weekday, fromMin, toMin }));
  });
  await insertAvailability(trx, rows);
}
