import { calendarDateOf } from './dates';

/** One entry for a calendar, with an alarm of its own. */
export interface CalendarEntry {
  /** Stays the same for the same thing, so that a calendar that takes the file again changes the entry it has. */
  uid: string;
  title: string;
  description: string;
  /** A page to open. */
  url?: string;
  /** A whole day in the reader's own zone, or an instant with a length. */
  at: { day: string; alarmHour: number } | { start: Date; minutes: number; alarmMinutesBefore: number };
}

const lineOctets = 75;
const minuteMs = 60_000;

/**
 * An entry as an iCalendar file (RFC 5545): one VEVENT with one VALARM, CRLF line ends, lines folded at 75 octets, text
 * escaped. A whole day's alarm rings at an hour of that day on the reader's own clock.
 * @param stampedAt when the file was made
 * @throws RangeError for text that is no day
 */
export function calendarFile(entry: CalendarEntry, stampedAt: Date): string {
  const { uid, title, description, url, at } = entry;
  const lines = [
    'BEGIN:VCALENDAR',
    'VERSION:2.0',
    'PRODID:-//Ebbline//Capacity checks//EN',
    'CALSCALE:GREGORIAN',
    'BEGIN:VEVENT',
    `UID:${escapeText(uid)}`,
    `DTSTAMP:${instantText(stampedAt)}`,
    ...timeLines(at),
    `SUMMARY:${escapeText(title)}`,
    `DESCRIPTION:${escapeText(description)}`,
    ...(url === undefined ? [] : [`URL:${url}`]),
    'TRANSP:TRANSPARENT',
    'BEGIN:VALARM',
    'ACTION:DISPLAY',
    `TRIGGER:${'day' in at ? `PT${at.alarmHour}H` : `-PT${at.alarmMinutesBefore}M`}`,
    `DESCRIPTION:${escapeText(title)}`,
    'END:VALARM',
    'END:VEVENT',
    'END:VCALENDAR',
  ];
  return lines.map((line) => `${fold(line)}\r\n`).join('');
}

function timeLines(at: CalendarEntry['at']): string[] {
  if ('start' in at) {
    const end = new Date(at.start.getTime() + at.minutes * minuteMs);
    return [`DTSTART:${instantText(at.start)}`, `DTEND:${instantText(end)}`];
  }
  const start = new Date(`${at.day}T00:00:00Z`);
  if (Number.isNaN(start.getTime()))
    throw new RangeError(`calendarFile requires YYYY-MM-DD, got "${at.day}"`);
  // The end of a whole day is the day after: it is not part of the entry.
  const next = calendarDateOf(new Date(start.getTime() + 24 * 60 * minuteMs));
  return [`DTSTART;VALUE=DATE:${compact(at.day)}`, `DTEND;VALUE=DATE:${compact(next)}`];
}

const compact = (text: string) => text.replace(/[-:]/g, '');
const instantText = (instant: Date) => `${compact(instant.toISOString().slice(0, 19))}Z`;

/** RFC 5545 3.3.11: backslash, semicolon and comma are escaped, a line end is \n. */
const escapeText = (text: string) =>
  text.replace(/[\\;,]/g, (character) => `\\${character}`).replace(/\r\n|\r|\n/g, '\\n');

const octetsOf = (character: string) => {
  const code = character.codePointAt(0) ?? 0;
  return code < 0x80 ? 1 : code < 0x800 ? 2 : code < 0x10000 ? 3 : 4;
};

/** RFC 5545 3.1: no line is longer than 75 octets; a continuation begins with a space. Characters stay whole. */
function fold(line: string): string {
  let folded = '';
  let octets = 0;
  for (const character of line) {
    const more = octetsOf(character);
    if (octets + more > lineOctets) {
      folded += '\r\n ';
      octets = 1;
    }
    folded += character;
    octets += more;
  }
  return folded;
}
