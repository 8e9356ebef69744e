import { Temporal } from 'temporal-polyfill';
import type { EpochSeconds } from '../time';

/** One dated thing for somebody's own calendar (RFC 5545). Instants go out in UTC, so no time zone has to be described. */
export type CalendarEvent = { uid: string; startsAt: EpochSeconds; endsAt: EpochSeconds; summary: string; location: string; description: string; sequence?: number };

const stamp = (at: EpochSeconds) => Temporal.Instant.fromEpochMilliseconds(at * 1000).toString({ smallestUnit: 'second' }).replace(/[-:]/g, '');
const escapeText = (text: string) => text.replace(/\\/g, '\\\\').replace(/;/g, '\\;').replace(/,/g, '\\,').replace(/\r?\n/g, '\\n');

/** Octets of a character in UTF-8. */
function octetsOf(codePoint: number): number {
  if (codePoint < 0x80) return 1;
  if (codePoint < 0x800) return 2;
  return codePoint < 0x10000 ? 3 : 4;
}

/** Lines of at most 75 octets, folded between characters, never inside one. */
function fold(line: string): string {
  const parts: string[] = [];
  let part = '';
  let octets = 0;
  for (const character of line) {
    const size = octetsOf(character.codePointAt(0) ?? 0);
    if (octets + size > (parts.length === 0 ? 75 : 74)) {
      parts.push(part);
      [part, octets] = ['', 0];
    }
    part += character;
    octets += size;
  }
  return [...parts, part].join('\r\n ');
}

/** A calendar file with one event, as an attachment of a mail. `writtenAt` is the time of writing (DTSTAMP, in UTC). */
export function calendarFile(event: CalendarEvent, writtenAt: EpochSeconds): string {
  const lines = [
    'BEGIN:VCALENDAR', 'VERSION:2.0', 'PRODID:-//Rungwell//Calendar//EN', 'METHOD:PUBLISH', 'BEGIN:VEVENT',
    `UID:${event.uid}`, `DTSTAMP:${stamp(writtenAt)}`, `DTSTART:${stamp(event.startsAt)}`, `DTEND:${stamp(event.endsAt)}`,
    `SEQUENCE:${event.sequence ?? 0}`, `SUMMARY:${escapeText(event.summary)}`, `LOCATION:${escapeText(event.location)}`,
    `DESCRIPTION:${escapeText(event.description)}`, 'END:VEVENT', 'END:VCALENDAR',
  ];
  return `${lines.map(fold).join('\r\n')}\r\n`;
}
