import {
  addMonths,
  calendarDateOf,
  daysBetween,
  formatAgo,
  formatDate,
  formatInstant,
  formatMonth,
  isCalendarDate,
  isCalendarMonth,
  yearsBetween,
} from '@/lib/units';

describe('calendar dates', () => {
  it.each(['2026-11-02', '2024-02-29', '2000-02-29', '0001-01-01'])('accepts %s', (text) => {
    expect(isCalendarDate(text)).toBe(true);
  });
  it.each([
    '2026-02-29',
    '1900-02-29',
    '2026-13-01',
    '2026-00-01',
    '2026-04-31',
    '2026-11',
    '2026-1-2',
    '',
    '2026-11-02T00:00',
  ])('rejects %s', (text) => {
    expect(isCalendarDate(text)).toBe(false);
  });
  it('tells months from days', () => {
    expect(isCalendarMonth('2026-11')).toBe(true);
    expect(isCalendarMonth('2026-13')).toBe(false);
    expect(isCalendarMonth('2026-11-02')).toBe(false);
  });

  it('are written day, month, year', () => {
    expect(formatDate('2026-11-02')).toBe('2 Nov 2026');
    expect(formatDate('2026-11')).toBe('Nov 2026');
    expect(formatMonth('2026-11-02')).toBe('Nov 2026');
    expect(formatInstant('2026-11-02T14:05:09Z')).toBe('2 Nov 2026, 14:05 UTC');
    expect(() => formatDate('yesterday')).toThrow(RangeError);
    expect(() => formatInstant('yesterday')).toThrow(RangeError);
  });
});

describe('yearsBetween', () => {
  it('counts years of 365.2425 days', () => {
    // 400 Gregorian years are 146,097 days (calendar arithmetic), hence exactly 400 mean years.
    expect(daysBetween('1600-03-01', '2000-03-01')).toBe(146097);
    expect(yearsBetween('1600-03-01', '2000-03-01')).toBeCloseTo(400, 12);
  });
  it('lets a month count as its 15th', () => {
    expect(daysBetween('2026-11', '2026-12-01')).toBe(16);
    expect(yearsBetween('2020-06', '2026-06-15')).toBeCloseTo(2191 / 365.2425, 12);
  });
  it('is 0, never negative, for a day inside the month of first use', () => {
    expect(yearsBetween('2026-11', '2026-11-02')).toBe(0);
    expect(yearsBetween('2026-11', '2026-11-28')).toBe(0);
    expect(yearsBetween('2026-11-02', '2026-11-28')).toBeGreaterThan(0);
  });
  it('is negative when the days run backwards', () => {
    expect(yearsBetween('2026-11-02', '2025-11-02')).toBeLessThan(0);
  });
});

describe('addMonths', () => {
  it.each([
    ['2026-01-31', 1, '2026-02-28'],
    ['2024-02-29', 12, '2025-02-28'],
    ['2026-11-02', 12, '2027-11-02'],
    ['2026-11', 2, '2027-01'],
    ['2026-01-15', -1, '2025-12-15'],
  ])('%s and %d months is %s', (date, count, expected) => {
    expect(addMonths(date, count)).toBe(expected);
  });
});

describe('instants', () => {
  it('fall on a UTC day', () => {
    expect(calendarDateOf(new Date('2026-11-02T23:59:59Z'))).toBe('2026-11-02');
    expect(calendarDateOf(new Date('2026-11-02T23:59:59Z'), 'local')).toBe('2026-11-02');
  });
  it.each([
    ['2026-12-01T11:59:40Z', 'just now'],
    ['2026-12-01T11:55:00Z', '5\u202fmin ago'],
    ['2026-12-01T09:00:00Z', '3\u202fh ago'],
    ['2026-11-30T11:00:00Z', '1 day ago'],
    ['2026-11-20T12:00:00Z', '11 days ago'],
    ['2026-09-02T12:00:00Z', '2 Sep 2026'],
    ['2026-12-01T12:05:00Z', 'just now'],
  ])('%s is %s', (instant, text) => {
    expect(formatAgo(instant, new Date('2026-12-01T12:00:00Z'))).toBe(text);
  });
});
