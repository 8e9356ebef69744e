import type { Span } from '../time';
import type { SheetKind } from './columns';
import type { Reference, RowFacts } from './rows';

/** A record that an earlier import brought in, with the facts it brought; null where it was made in another way. */
export type KnownRecord = { id: string; facts: RowFacts | null };

/** What the school has already, as far as a workbook can speak of it. */
export type Known = {
  byKey: ReadonlyMap<string, KnownRecord>;
  /** By comparable name; several of one name are told apart by nothing, so they stand as null. */
  byName: Record<SheetKind, ReadonlyMap<string, string | null>>;
  /** Families of the school by name and first payer's e-mail: `name|address`. */
  familyByPayer: ReadonlyMap<string, string>;
  /** Students by family and name: `family id|name`. */
  studentByFamily: ReadonlyMap<string, string>;
  /** Live holds by `room:id`, `teacher:id`, `student:id`. */
  taken: ReadonlyMap<string, readonly Span[]>;
};

export const NOTHING_KNOWN: Known = {
  byKey: new Map(), familyByPayer: new Map(), studentByFamily: new Map(), taken: new Map(),
  byName: { teachers: new Map(), rooms: new Map(), families: new Map(), students: new Map(), enrolments: new Map() },
};

export const idOf = (known: Known, reference: Reference): string | null => ('id' in reference ? reference.id : (known.byKey.get(reference.key)?.id ?? null));
