import { MINUTES_PER_DAY, type MinuteOfDay } from '../time';
import { typedText, type Cell } from './cell';
import { faulty, read, type Reading } from './reading';

const CLOCK = /^(\d{1,2})(?:[:.h]?(\d{2}))?(?::\d{2})? ?([ap])\.?m\.?$/i;
const CLOCK_24 = /^(\d{1,2})[:.h](\d{2})(?::\d{2})?$/i;

/** Reads a time of day: "6.30pm", "4:45 PM", "14:45", a time cell, or a part of a day (0.59375 is 14:15). */
export function readTime(cell: Cell): Reading<MinuteOfDay> {
  if (cell.kind === 'date') return read(cell.minute);
  if (cell.kind === 'number') return readDayPart(cell.value);
  const text = typedText(cell);
  if (text === '') return faulty('time is missing');
  const half = CLOCK.exec(text);
  if (half) return halfDay(Number(half[1]), Number(half[2] ?? 0), (half[3] ?? '').toLowerCase() === 'p');
  const whole = CLOCK_24.exec(text);
  if (!whole) return faulty('time is not understood');
  const [hour, minute] = [Number(whole[1]), Number(whole[2])];
  return hour < 24 && minute < 60 ? read(hour * 60 + minute) : faulty('time does not exist');
}

function readDayPart(value: number): Reading<MinuteOfDay> {
  if (value < 0 || value >= 1) return faulty('time does not exist');
  const minute = Math.round(value * MINUTES_PER_DAY);
  return minute < MINUTES_PER_DAY ? read(minute) : faulty('time does not exist');
}

function halfDay(hour: number, minute: number, isAfternoon: boolean): Reading<MinuteOfDay> {
  if (hour < 1 || hour > 12 || minute > 59) return faulty('time does not exist');
  return read((hour % 12) * 60 + minute + (isAfternoon ? 720 : 0));
}

const SHORTEST = 15;
const LONGEST = 180;

/** Reads the length of a lesson: 45, "45 min", "1 h", "1.5 hours". */
export function readMinutes(cell: Cell): Reading<number> {
  const text = typedText(cell).toLowerCase();
  if (text === '') return faulty('length is missing');
  const match = /^(\d+(?:[.,]\d+)?) ?(?:(m|min|mins|minutes|')|(h|hr|hrs|hour|hours))?\.?$/.exec(text);
  if (!match) return faulty('length is not a number of minutes');
  const amount = Number((match[1] ?? '').replace(',', '.'));
  const minutes = match[3] ? amount * 60 : amount;
  if (!Number.isInteger(minutes)) return faulty('length is not a number of minutes');
  return minutes >= SHORTEST && minutes <= LONGEST ? read(minutes) : faulty(`length must lie between ${SHORTEST} and ${LONGEST} minutes`);
}

const DAY_STARTS = ['mo', 'tu', 'we', 'th', 'fr', 'sa', 'su'];
const DAY_NAMES = ['monday', 'tuesday', 'wednesday', 'thursday', 'friday', 'saturday', 'sunday'];

/** 1 = Monday … 7 = Sunday, from "Thu", "wed", "Friday", "Tues."; null for anything else. */
function weekdayNamed(word: string): number | null {
  const name = word.toLowerCase().replace(/\.$/, '');
  const index = DAY_STARTS.indexOf(name.slice(0, 2));
  if (index < 0) return null;
  const full = DAY_NAMES[index] ?? '';
  // "Tues", "Thur" and "Thurs" are the beginning of the day's name, and so is "Weds" but for its s.
  return full.startsWith(name) || full.startsWith(name.replace(/s$/, '')) ? index + 1 : null;
}

export function readWeekday(cell: Cell): Reading<number> {
  const text = typedText(cell);
  if (text === '') return faulty('day is missing');
  const weekday = weekdayNamed(text.replace(/s$/i, '')) ?? weekdayNamed(text);
  return weekday === null ? faulty('day is not a weekday') : read(weekday);
}

/** Reads a list of weekdays: "Mon-Fri", "Tue–Sat", "Mon, Tue, Thu", "Mon Wed Fri", "Sat to Mon". Blank is no day. */
export function readWeekdays(cell: Cell): Reading<number[]> {
  const days = new Set<number>();
  const text = typedText(cell).replace(/ ?(?:[-–—]|\bto\b) ?/gi, '-');
  for (const part of text.split(/[\s,;/&+]+|\band\b/i).filter((word) => word !== '')) {
    const ends = part.split('-').map(weekdayNamed);
    const [from, until = from] = ends;
    if (from === null || from === undefined || until === null || until === undefined || ends.length > 2) return faulty('days are not weekdays');
    for (let step = 0; step <= (until - from + 7) % 7; step += 1) days.add(((from - 1 + step) % 7) + 1);
  }
  return read([...days].sort((a, b) => a - b));
}
