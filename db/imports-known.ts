import type { Known, KnownRecord } from '@/lib/imports/known';
import type { RowFacts } from '@/lib/imports/rows';
import { nameKey } from '@/lib/people/names';
import type { LocalDate, Span } from '@/lib/time';
import type { Db } from './connection';
import { liveRooms } from './rooms';

const NAME = "trim(p.given_name || ' ' || p.family_name)";
type Named = { id: string; name: string };

/** What the school has already, as far as a workbook can speak of it: rooms of one site, holds within one span. */
export async function whatSchoolKnows(db: Db, { siteId, today, span }: { siteId: string; today: LocalDate; span: Span | null }): Promise<Known> {
  const rooms = (await liveRooms(db)).filter((room) => room.siteId === siteId);
  return {
    byKey: await recordsByKey(db),
    byName: {
      teachers: uniqueNames(await teachers(db, today)), rooms: uniqueNames(rooms), families: uniqueNames(await db('family').where({ state: 'live' }).select<Named[]>('id', 'name')),
      students: uniqueNames(await db('person as p').where({ 'p.isStudent': 1, 'p.state': 'live' }).select<Named[]>('p.id', db.raw(`${NAME} AS name`))), enrolments: new Map(),
    },
    familyByPayer: await familiesByPayer(db), studentByFamily: await studentsByFamily(db), taken: span ? await takenBySchool(db, span) : new Map(),
  };
}

const teachers = (db: Db, today: LocalDate): Promise<Named[]> =>
  db('engagement as e').join('person as p', 'p.id', 'e.personId').where('p.state', 'live').andWhere((query) => query.whereNull('e.endsOn').orWhere('e.endsOn', '>=', today))
    .distinct('p.id').select<Named[]>(db.raw(`${NAME} AS name`));

/** Two of one name stand as null: nothing tells them apart. */
function uniqueNames(rows: readonly Named[]): Map<string, string | null> {
  const names = new Map<string, string | null>();
  for (const { id, name } of rows) names.set(nameKey(name), names.has(nameKey(name)) && names.get(nameKey(name)) !== id ? null : id);
  return names;
}

async function recordsByKey(db: Db): Promise<Map<string, KnownRecord>> {
  const brought: { targetId: string; rawJson: string }[] = await db('import_row as r').join('import_batch as b', 'b.id', 'r.batchId')
    .where('b.state', 'imported').where('r.verdict', 'new').whereNotNull('r.targetId').orderBy('b.importedAt').select('r.targetId', 'r.rawJson');
  const facts = new Map(brought.map(({ targetId, rawJson }) => [targetId, JSON.parse(rawJson) as { facts: RowFacts | null }]));
  const records = new Map<string, KnownRecord>();
  for (const table of ['person', 'room', 'family', 'enrolment']) {
    const rows: { id: string; externalKey: string }[] = await db(table).whereNotNull('externalKey').select('id', 'externalKey');
    for (const { id, externalKey } of rows) records.set(externalKey, { id, facts: facts.get(id)?.facts ?? null });
  }
  return records;
}

async function familiesByPayer(db: Db): Promise<Map<string, string>> {
  const rows: { id: string; name: string; email: string | null }[] = await db('family as f').join('payer as y', 'y.familyId', 'f.id')
    .leftJoin('contact_point as c', (on) => on.on('c.personId', 'y.personId').andOnVal('c.kind', 'email')).where({ 'f.state': 'live', 'y.orderNo': 1 }).select('f.id', 'f.name', 'c.value as email');
  return new Map(rows.map(({ id, name, email }) => [`${nameKey(name)}|${email?.toLowerCase() ?? ''}`, id]));
}

async function studentsByFamily(db: Db): Promise<Map<string, string>> {
  const rows: (Named & { familyId: string })[] = await db('family_student as f').join('person as p', 'p.id', 'f.studentId').where('p.state', 'live').select('p.id', 'f.familyId', db.raw(`${NAME} AS name`));
  return new Map(rows.map(({ id, familyId, name }) => [`${familyId}|${nameKey(name)}`, id]));
}

async function takenBySchool(db: Db, span: Span): Promise<Map<string, Span[]>> {
  const rows: (Span & { holderKind: string; holderId: string })[] = await db('hold').where('isLive', 1).where('startsAt', '<', span.endsAt).where('endsAt', '>', span.startsAt)
    .select('holderKind', 'holderId', 'startsAt', 'endsAt');
  const taken = new Map<string, Span[]>();
  for (const { holderKind, holderId, startsAt, endsAt } of rows) {
    const key = `${holderKind}:${holderId}`;
    taken.set(key, [...(taken.get(key) ?? []), { startsAt, endsAt }]);
  }
  return taken;
}
