import { clockOfDuration, parseDuration } from '@/lib/units';

describe('parseDuration', () => {
  // 4 h 42 min = 4 x 3600 + 42 x 60 = 16920 s.
  it.each([
    ['4:42', 16_920],
    ['04:42:10', 16_930],
    ['4 h 42 min', 16_920],
    ['4\u202fh 42\u202fmin', 16_920],
    ['4h42', 16_920],
    ['4,7 h', 16_920],
    ['282 min', 16_920],
    ['16920 s', 16_920],
  ])('reads %j', (text, seconds) => {
    expect(parseDuration(text)).toBeCloseTo(seconds, 6);
  });

  it.each(['', '282', '4:75', 'about four hours', '-3 h', '4:42:99', '1e3'])(
    'reads no duration in %j',
    (text) => {
      expect(parseDuration(text)).toBeUndefined();
    },
  );

  it('reads a number alone where its unit is said', () => {
    expect(parseDuration('90', { plainUnit: 's' })).toBe(90);
    expect(parseDuration('1,5', { plainUnit: 'h' })).toBe(5400);
    expect(parseDuration('-90', { plainUnit: 's' })).toBeUndefined();
  });
});

describe('clockOfDuration', () => {
  it('names seconds only where there are some', () => {
    expect(clockOfDuration(16_920)).toBe('4:42');
    expect(clockOfDuration(16_930)).toBe('4:42:10');
    expect(clockOfDuration(0)).toBe('0:00');
  });

  it('is read back as it was written', () => {
    for (const seconds of [0, 59, 60, 3599, 3600, 86_399, 100 * 3600 + 7])
      expect(parseDuration(clockOfDuration(seconds))).toBe(seconds);
  });
});
