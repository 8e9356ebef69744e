import { minorDigitsOf, type Money } from './money';
import { clockOf, type EpochSeconds, type LocalDate, type MinuteOfDay } from './time';

/** How the school writes things. Dates, money and names follow the school's locale through `Intl`. */
export type Manner = { locale: string; zone: string };

const formatters = new Map<string, Intl.DateTimeFormat>();

/** Building a formatter costs far more than using one, so each kind is built once. */
function dateFormatter(locale: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = locale + JSON.stringify(options);
  const known = formatters.get(key) ?? new Intl.DateTimeFormat(locale, options);
  formatters.set(key, known);
  return known;
}

const utcNoon = (date: LocalDate) => new Date(`${date}T12:00:00Z`);

export const DATE_STYLES = {
  /** "Tuesday 17 November" */ day: { weekday: 'long', day: 'numeric', month: 'long' },
  /** "Tue 17 Nov" */ short: { weekday: 'short', day: 'numeric', month: 'short' },
  /** "17 Nov" */ plain: { day: 'numeric', month: 'short' },
  /** "17 November 2026" */ full: { day: 'numeric', month: 'long', year: 'numeric' },
  /** "November 2026" */ month: { month: 'long', year: 'numeric' },
  /** "Tue" */ weekday: { weekday: 'short' },
} as const satisfies Record<string, Intl.DateTimeFormatOptions>;

export const formatDate = (date: LocalDate, locale: string, style: keyof typeof DATE_STYLES = 'plain'): string =>
  dateFormatter(locale, { ...DATE_STYLES[style], timeZone: 'UTC' }).format(utcNoon(date)).replace(/,/g, '');

/** "Tue 17 Nov, 16:05" at the school. */
export const formatInstant = (at: EpochSeconds, { locale, zone }: Manner): string =>
  dateFormatter(locale, {
    weekday: 'short', day: 'numeric', month: 'short', hour: '2-digit', minute: '2-digit', hourCycle: 'h23', timeZone: zone,
  }).format(new Date(at * 1000));

/** "€1,234.50". Built from digits: the value never passes through a float. */
export function formatMoney({ amountMinor, currency }: Money, locale: string): string {
  const digits = minorDigitsOf(currency);
  const whole = Math.trunc(Math.abs(amountMinor) / 10 ** digits);
  const fraction = String(Math.abs(amountMinor) % 10 ** digits).padStart(digits, '0');
  const parts = new Intl.NumberFormat(locale, {
    style: 'currency', currency, minimumFractionDigits: digits, maximumFractionDigits: digits,
  }).formatToParts(amountMinor < 0 ? -whole : whole);
  const text = parts.map((part) => (part.type === 'fraction' ? fraction : part.value)).join('');
  return amountMinor < 0 && whole === 0 && !text.startsWith('-') ? `-${text}` : text;
}

export const formatTimeRange = (startMin: MinuteOfDay, lengthMin: number): string =>
  `${clockOf(startMin)}–${clockOf((startMin + lengthMin) % 1440)}`;

export const plural = (count: number, one: string, many = `${one}s`): string => `${count} ${count === 1 ? one : many}`;

/** "a, b and c" in the reader's language. */
export const listOf = (words: readonly string[], locale: string): string =>
  new Intl.ListFormat(locale, { type: 'conjunction' }).format(words);
