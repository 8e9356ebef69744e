import type { Attendance } from '@/lib/calendar/attendance';
import type { ComparedLine } from '@/lib/tuition/run-difference';
import type { TuitionModel } from '@/lib/tuition/charges';
import type { EpochSeconds, LocalDate } from '@/lib/time';
import type { Db } from './connection';

export type BilledEnrolment = {
  id: string; familyId: string; familyName: string; legalEntityId: string; currency: string; taxMode: 'inclusive' | 'exclusive';
  studentId: string; studentName: string; subjectLabel: string; lessonTypeId: string; lessonLabel: string; lengthMinutes: number;
  siteId: string; tuitionModel: TuitionModel; unitPriceMinor: number | null; startsOn: LocalDate; endsOn: LocalDate | null;
  acceptedAt: EpochSeconds | null; createdAt: EpochSeconds; trialId: string | null; trialFeeMinor: number | null; trialCreditUntilOn: LocalDate | null; studentFirstStartsOn: LocalDate;
};
type Period = { from: LocalDate; to: LocalDate };

/** Enrolments that have something to do with the period, by family. */
export const enrolmentsIn = (db: Db, { from, to }: Period): Promise<BilledEnrolment[]> =>
  db('enrolment as e').join('family as f', 'f.id', 'e.familyId').join('legal_entity as n', 'n.id', 'f.legalEntityId').join('person as p', 'p.id', 'e.studentId')
    .join('subject as j', 'j.id', 'e.subjectId').join('lesson_type as t', 't.id', 'e.lessonTypeId').leftJoin('trial as x', 'x.id', 'e.trialId')
    .where('f.state', 'live').whereIn('e.state', ['active', 'paused', 'notice_given', 'ended']).where('e.startsOn', '<=', to)
    .andWhere((query) => query.whereNull('e.endsOn').orWhere('e.endsOn', '>=', from))
    .select('e.id', 'e.familyId', 'f.name as familyName', 'f.legalEntityId', 'f.currency', 'n.taxMode', 'e.studentId', 'j.label as subjectLabel', 'e.lessonTypeId', 't.label as lessonLabel',
      'e.lengthMinutes', 'e.siteId', 'e.tuitionModel', 'e.unitPriceMinor', 'e.startsOn', 'e.endsOn', 'e.acceptedAt', 'e.createdAt', 'e.trialId', 'x.feeMinor as trialFeeMinor', 'x.creditUntilOn as trialCreditUntilOn',
      db.raw("trim(coalesce(p.called_name, p.given_name) || ' ' || p.family_name) AS student_name"),
      db.raw('(SELECT min(o.starts_on) FROM enrolment o WHERE o.student_id = e.student_id) AS student_first_starts_on'))
    .orderBy(['f.name', 'f.id', 'p.bornOn', 'e.studentId', 'e.startsOn', 'e.rowid']);

export type BilledSeat = { seatId: string; enrolmentId: string; localDate: LocalDate; startMin: number; attendance: Attendance; isBilled: number };

/** The lessons of these enrolments inside the period. A moved lesson counts where it went. */
export const seatsIn = (db: Db, { from, to }: Period): Promise<BilledSeat[]> =>
  db('seat as s').join('occurrence as o', 'o.id', 's.occurrenceId').whereNotNull('s.enrolmentId').where('s.source', 'roster').whereNot('o.state', 'moved')
    .whereBetween('o.localDate', [from, to]).select('s.id as seatId', 's.enrolmentId', 'o.localDate', 'o.startMin', 's.attendance',
      db.raw('EXISTS (SELECT 1 FROM invoice_line_seat b WHERE b.seat_id = s.id) AS is_billed'))
    .orderBy(['s.enrolmentId', 'o.localDate', 'o.startMin']);

/** Tuition for a part of the period that stands on an issued invoice: it is not charged twice, and counts when children are ranked. */
export const billedTuition = (db: Db, { from, to }: Period): Promise<{ familyId: string; studentId: string; enrolmentId: string; grossMinor: number }[]> =>
  db('invoice_line as l').join('invoice as i', 'i.id', 'l.invoiceId').where('i.state', 'issued').where('l.chargeKind', 'tuition').where('l.grossMinor', '>=', 0)
    .whereNotNull('l.enrolmentId').whereNotNull('l.studentId').where('l.serviceFrom', '<=', to).where('l.serviceTo', '>=', from).select('i.familyId', 'l.studentId', 'l.enrolmentId', 'l.grossMinor');

/** Students who have paid for registration, and trials whose fee has been credited, whichever of their enrolments took it. */
export async function onceOnlyCharges(db: Db): Promise<{ registered: Set<string>; trialsCredited: Set<string> }> {
  const issued = () => db('invoice_line as l').join('invoice as i', 'i.id', 'l.invoiceId').join('product as p', 'p.id', 'l.productId').where('i.state', 'issued');
  const registered: { studentId: string }[] = await issued().where('p.kind', 'registration').whereNotNull('l.studentId').select('l.studentId');
  const credited: { trialId: string }[] = await issued().join('enrolment as e', 'e.id', 'l.enrolmentId').where('p.kind', 'trial').whereNotNull('e.trialId').select('e.trialId');
  return { registered: new Set(registered.map(({ studentId }) => studentId)), trialsCredited: new Set(credited.map(({ trialId }) => trialId)) };
}

type StoredLine = Omit<ComparedLine, 'discounts'> & { familyId: string; lineId: string; labels: string | null };

/** The tuition lines of the period before this one, by family: what a new run is compared with. */
export async function lastRunLines(db: Db, kind: 'term' | 'month', before: LocalDate): Promise<Map<string, ComparedLine[]>> {
  const [last]: { periodFrom: LocalDate | null }[] = await db('tuition_run').where({ kind, state: 'released' }).where('periodFrom', '<', before).max('periodFrom as periodFrom');
  const byFamily = new Map<string, ComparedLine[]>();
  if (!last?.periodFrom) return byFamily;
  const rows: StoredLine[] = await db('invoice_line as l').join('invoice as i', 'i.id', 'l.invoiceId').join('tuition_run as r', 'r.id', 'i.tuitionRunId')
    .where({ 'r.kind': kind, 'r.periodFrom': last.periodFrom, 'i.state': 'issued', 'l.chargeKind': 'tuition' }).whereNotNull('l.enrolmentId').where('l.grossMinor', '>', 0)
    .select('i.familyId', 'l.enrolmentId', 'l.text', 'l.quantity', 'l.unitMinor', 'l.netMinor',
      db.raw("(SELECT group_concat(s.label, '|') FROM line_step s WHERE s.invoice_line_id = l.id) AS labels"));
  for (const { familyId, labels, ...line } of rows) byFamily.set(familyId, [...(byFamily.get(familyId) ?? []), { ...line, discounts: labels ? labels.split('|') : [] }]);
  return byFamily;
}
