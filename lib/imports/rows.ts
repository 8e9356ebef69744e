import type { LocalDate, MinuteOfDay } from '../time';
import type { SheetKind } from './columns';

/** A person, room or family that a row speaks of: one of this workbook, by its key, or one that the school has already. */
export type Reference = { key: string } | { id: string };

export type TeacherFacts = { kind: 'teachers'; name: string; email: string | null; subjects: string[]; levelTo: number | null; rates: { lengthMinutes: number; amountMinor: number }[]; weekdays: number[] };
export type RoomFacts = { kind: 'rooms'; name: string; personLimit: number; description: string; features: { code: string; label: string; quantity: number }[] };
export type PayerFacts = { name: string; email: string | null; phone: string | null; shareBp: number };
export type FamilyFacts = { kind: 'families'; name: string; payers: PayerFacts[] };
export type StudentFacts = { kind: 'students'; name: string; family: Reference; bornOn: LocalDate | null; level: number | null; photo: 'yes' | 'no' | null };
export type EnrolmentFacts = {
  kind: 'enrolments'; student: Reference; teacher: Reference; room: Reference; weekday: number; startMin: MinuteOfDay; lengthMinutes: number; priceMinor: number | null; startsOn: LocalDate | null;
};
export type RowFacts = TeacherFacts | RoomFacts | FamilyFacts | StudentFacts | EnrolmentFacts;

/**
 * What becomes of a row. `new` will be brought in. `same` and `changed` are in the school already; a changed one is
 * named and left as the school has it. `duplicate` and `faulty` are left out, each with its reason. `blank` holds nothing.
 */
export type Verdict = 'new' | 'same' | 'changed' | 'duplicate' | 'faulty' | 'blank';
export const VERDICT_WORDS: Record<Verdict, string> = { new: 'new', same: 'in the school', changed: 'changed', duplicate: 'listed twice', faulty: 'left out', blank: 'blank' };

export type CheckedRow = {
  sheet: string; kind: SheetKind; rowNo: number;
  /** What makes the row itself, run after run. */
  key: string;
  /** Who or what it is about, for a list. */
  title: string;
  verdict: Verdict;
  reason: string;
  facts: RowFacts | null;
  /** The record it stands for, where the school has it already. */
  targetId: string | null;
};
