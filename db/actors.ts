import type { LocalDate } from '@/lib/time';
import type { Role } from '@/policies/ability';
import type { Db } from './connection';

export type OwnRecords = { studentIds: string[]; payerIds: string[]; familyIds: string[]; taughtStudentIds: string[]; coveredTodayIds: string[] };

const NONE: OwnRecords = { studentIds: [], payerIds: [], familyIds: [], taughtStudentIds: [], coveredTodayIds: [] };

/** The records that are a person's own in one hat. Read with every session, so each list comes from an index. */
export async function ownRecords(db: Db, personId: string, role: Role, today: LocalDate): Promise<OwnRecords> {
  switch (role) {
    case 'owner':
    case 'desk':
      return NONE;
    case 'teacher':
      return { ...NONE, taughtStudentIds: await taughtStudents(db, personId, today), coveredTodayIds: await coveredOn(db, personId, today) };
    case 'student':
      return { ...NONE, studentIds: [personId], ...(await payingFor(db, personId)) };
    case 'guardian':
      return { ...NONE, studentIds: await childrenOf(db, personId), ...(await payingFor(db, personId)) };
  }
}

async function taughtStudents(db: Db, teacherId: string, today: LocalDate): Promise<string[]> {
  const enrolled = db('enrolment').select('studentId').where({ teacherId }).whereIn('state', ['active', 'paused', 'notice_given']);
  const covered = db('seat as s').select('s.studentId').join('occurrence as o', 'o.id', 's.occurrenceId')
    .where('o.localDate', today).andWhere((query) => query.where('o.taughtById', teacherId).orWhere('o.plannedTeacherId', teacherId));
  const rows = (await enrolled.union([covered])) as { studentId: string }[];
  return rows.map((row) => row.studentId);
}

async function coveredOn(db: Db, teacherId: string, today: LocalDate): Promise<string[]> {
  const rows: { id: string }[] = await db('occurrence').where({ taughtById: teacherId, localDate: today }).select('id');
  return rows.map(({ id }) => id);
}

async function childrenOf(db: Db, adultId: string): Promise<string[]> {
  const rows = (await db('relationship').select('childId').where({ adultId, hasLegalCare: 1, seesProgress: 1 })) as { childId: string }[];
  return rows.map((row) => row.childId);
}

async function payingFor(db: Db, personId: string): Promise<Pick<OwnRecords, 'payerIds' | 'familyIds'>> {
  const rows = (await db('payer').select('id', 'familyId').where({ personId })) as { id: string; familyId: string }[];
  return { payerIds: rows.map((row) => row.id), familyIds: rows.map((row) => row.familyId) };
}
