import { describe, expect, it } from 'vitest';
import { calendarFile, type CalendarEvent } from '@/lib/calendar/calendar-file';
import { overlaps } from '@/lib/time';

/**
 * C26 half-open spans and C28 lines of a calendar file (check list of operations 1.4). Source of C28: RFC 5545
 * section 3.1 (lines of at most 75 octets, folded with CRLF and a space) and section 3.3.11 (escaped text).
 */
const at = (hour: number, minute: number) => Date.UTC(2026, 10, 17, hour, minute) / 1000;
const span = (from: [number, number], to: [number, number]) => ({ startsAt: at(...from), endsAt: at(...to) });

describe('C26 half-open', () => {
  const lesson = span([16, 0], [16, 45]);
  it.each([
    ['what follows at once may stand', span([16, 45], [17, 30]), false], ['what ends as it begins may stand', span([15, 30], [16, 0]), false],
    ['one minute on either side of the end clashes', span([16, 44], [16, 46]), true], ['contained', span([16, 10], [16, 20]), true], ['containing', span([15, 0], [18, 0]), true], ['the same', lesson, true],
  ])('%s', (_case, other, clashes) => {
    expect(overlaps(lesson, other)).toBe(clashes);
    expect(overlaps(other, lesson)).toBe(clashes);
  });
});

const event = (over: Partial<CalendarEvent> = {}): CalendarEvent => ({ uid: 'lesson-1@example.org', startsAt: at(16, 0), endsAt: at(16, 45), summary: 'Lesson', location: 'Room 1', description: '', ...over });
const unfold = (file: string) => file.replaceAll('\r\n ', '').split('\r\n');
const unescape = (text: string) => text.replace(/\\([\\;,n])/g, (_all, mark: string) => (mark === 'n' ? '\n' : mark));
const valueOf = (file: string, name: string) => unescape(unfold(file).find((line) => line.startsWith(`${name}:`))?.slice(name.length + 1) ?? 'missing');

describe('C28 lines of a calendar file', () => {
  const texts = [
    'Lesson; Zoë O’Shea, duet\nwith Bjørn \\ Inés', '漢'.repeat(80), '🎹'.repeat(60), `${'a'.repeat(66)}é${'b'.repeat(80)}`, ';'.repeat(100), 'c:\\new\\notes', '',
  ];
  it.each(texts)('“%s” comes back as it was', (text) => {
    const file = calendarFile(event({ summary: text, description: `${text}\n${text}` }), at(9, 0));
    expect(valueOf(file, 'SUMMARY')).toBe(text);
    expect(valueOf(file, 'DESCRIPTION')).toBe(`${text}\n${text}`);
  });
  it.each(texts)('no line of “%s” is longer than 75 octets, and no character is cut', (text) => {
    const file = calendarFile(event({ summary: text, location: text }), at(9, 0));
    expect(file.endsWith('\r\n')).toBe(true);
    expect(file.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/);
    for (const line of file.split('\r\n')) {
      const octets = Buffer.from(line);
      expect(octets.length).toBeLessThanOrEqual(75);
      // Half of a character would not survive the way through UTF-8.
      expect(octets.toString()).toBe(line);
    }
  });
  it('instants go out in UTC and a change is counted', () => {
    const lines = unfold(calendarFile(event({ sequence: 2 }), at(9, 0)));
    expect(lines).toEqual(expect.arrayContaining(['DTSTART:20261117T160000Z', 'DTEND:20261117T164500Z', 'DTSTAMP:20261117T090000Z', 'SEQUENCE:2', 'UID:lesson-1@example.org']));
    expect([lines[0], lines.at(-2)]).toEqual(['BEGIN:VCALENDAR', 'END:VCALENDAR']);
  });
});
