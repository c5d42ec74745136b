import { type CalendarEntry, calendarFile } from '@/lib/units/calendarFile';

/** The rules are those of RFC 5545: 3.1 folding, 3.3.11 text, 3.6.1 VEVENT, 3.6.6 VALARM, 3.8.6.3 TRIGGER. */
const stampedAt = new Date('2026-12-01T12:00:00Z');
const entry: CalendarEntry = {
  uid: 'a@ebbline.invalid',
  title: 'Capacity check: Barn',
  description: 'Bring the meter.',
  at: { day: '2027-10-03', alarmHour: 9 },
};
const file = (changes: Partial<CalendarEntry> = {}) => calendarFile({ ...entry, ...changes }, stampedAt);
const unfolded = (text: string) => text.replace(/\r\n /g, '').split('\r\n');

it('ends every line with CRLF and has no bare line ends', () => {
  const text = file({ description: 'one\ntwo\r\nthree' });
  expect(text.endsWith('END:VCALENDAR\r\n')).toBe(true);
  expect(text.replace(/\r\n/g, '')).not.toMatch(/[\r\n]/);
});

it('opens and closes its parts in order, with what each must hold', () => {
  const lines = unfolded(file());
  expect(lines.filter((line) => /^(BEGIN|END):/.test(line))).toEqual([
    'BEGIN:VCALENDAR',
    'BEGIN:VEVENT',
    'BEGIN:VALARM',
    'END:VALARM',
    'END:VEVENT',
    'END:VCALENDAR',
  ]);
  expect(lines).toEqual(expect.arrayContaining(['VERSION:2.0', 'UID:a@ebbline.invalid', 'ACTION:DISPLAY']));
  expect(lines).toContain('DTSTAMP:20261201T120000Z');
});

it('makes a day a whole one that ends with the day after, and rings at nine on it', () => {
  const lines = unfolded(file({ at: { day: '2027-12-31', alarmHour: 9 } }));
  expect(lines).toContain('DTSTART;VALUE=DATE:20271231');
  expect(lines).toContain('DTEND;VALUE=DATE:20280101');
  expect(lines).toContain('TRIGGER:PT9H');
});

it('puts a one-off alarm at its instant, ringing before it', () => {
  const start = new Date('2026-12-01T17:35:00Z');
  const lines = unfolded(file({ at: { start, minutes: 15, alarmMinutesBefore: 5 } }));
  expect(lines).toContain('DTSTART:20261201T173500Z');
  expect(lines).toContain('DTEND:20261201T175000Z');
  expect(lines).toContain('TRIGGER:-PT5M');
});

it('escapes backslash, semicolon, comma and line ends, and leaves colons', () => {
  const lines = unfolded(file({ title: 'Barn; left, C:\\new', description: 'a\r\nb\nc' }));
  expect(lines).toContain('SUMMARY:Barn\\; left\\, C:\\\\new');
  expect(lines).toContain('DESCRIPTION:a\\nb\\nc');
});

it('lets no text begin a property of its own', () => {
  const lines = unfolded(file({ title: 'x\r\nATTACH:https://elsewhere.example' }));
  expect(lines.some((line) => line.startsWith('ATTACH'))).toBe(false);
});

it.each([
  ['letters', 'x'.repeat(400)],
  ['two octets each', 'é'.repeat(200)],
  ['three octets each', '電'.repeat(120)],
  ['four octets each', '🔋'.repeat(90)],
])('folds lines of %s at 75 octets without cutting a character', (_name, title) => {
  const text = file({ title });
  for (const line of text.split('\r\n')) expect(Buffer.byteLength(line)).toBeLessThanOrEqual(75);
  expect(unfolded(text)).toContain(`SUMMARY:${title}`);
});

it('refuses what is no day', () => {
  expect(() => file({ at: { day: '2027-13-01', alarmHour: 9 } })).toThrow(RangeError);
});
