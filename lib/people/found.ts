/** One thing that Find shows: what it is called, what it is, where it leads. */
export type Found = { title: string; detail: string; href: string };

/** Somebody chosen in a form. */
export type PickedKind = 'student' | 'teacher';
export type PickedPerson = { id: string; name: string; detail: string };

const MONTHS = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec'];

/**
 * A date as people type it: "17 Nov", "17/11", "2026-11-17", "17.11.2026". Day before month. Without a year it is the
 * nearest such day to `today`. Null when it is not a date that exists.
 */
export function typedDate(text: string, today: string): string | null {
  const iso = /^(\d{4})-(\d{1,2})-(\d{1,2})$/.exec(text.trim());
  if (iso) return existing(Number(iso[1]), Number(iso[2]), Number(iso[3]));
  const match = /^(\d{1,2})[\s./-]+([a-z]{3,9}|\d{1,2})(?:[\s./-]+(\d{4}))?$/i.exec(text.trim());
  if (!match) return null;
  const named = MONTHS.indexOf((match[2] ?? '').slice(0, 3).toLowerCase()) + 1;
  const month = named > 0 ? named : Number(match[2]);
  const year = Number(today.slice(0, 4));
  if (match[3]) return existing(Number(match[3]), month, Number(match[1]));
  const candidates = [year - 1, year, year + 1].map((candidate) => existing(candidate, month, Number(match[1]))).filter((date) => date !== null);
  return candidates.sort((a, b) => Math.abs(Date.parse(a) - Date.parse(today)) - Math.abs(Date.parse(b) - Date.parse(today)))[0] ?? null;
}

function existing(year: number, month: number, day: number): string | null {
  const date = new Date(Date.UTC(year, month - 1, day));
  const isReal = date.getUTCFullYear() === year && date.getUTCMonth() === month - 1 && date.getUTCDate() === day;
  return isReal ? date.toISOString().slice(0, 10) : null;
}
