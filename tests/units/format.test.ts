import {
  currencyDecimals,
  formatCount,
  formatDuration,
  formatMoney,
  formatNumber,
  formatPercent,
  formatQuantity,
  formatRange,
  formatUncertainty,
  formatYears,
  minorUnitsOf,
} from '@/lib/units';

const s = '\u202f';

describe('numbers as text', () => {
  it.each([
    [1204.5, {}, '1,204.5'],
    [0.12345, {}, '0.12'],
    [3.194, { decimals: 3 }, '3.194'],
    [0.0123456, { significant: 3 }, '0.0123'],
    [12345, { significant: 3 }, '12,300'],
    [-2.5, {}, '\u22122.5'],
    [-0.001, { decimals: 1 }, '0.0'],
    [NaN, {}, '–'],
    [Infinity, {}, '–'],
  ])('%d with %j is %s', (value, options, text) => {
    expect(formatNumber(value, options)).toBe(text);
  });

  it('joins value and unit by a space that does not break', () => {
    expect(formatQuantity(226.4, 'Ah', { decimals: 1 })).toBe(`226.4${s}Ah`);
    expect(formatQuantity(NaN, 'Ah')).toBe('–');
    expect(formatPercent(0.923)).toBe(`92${s}%`);
    expect(formatPercent(0.0123, 1)).toBe(`1.2${s}%`);
    expect(formatCount(1204)).toBe('1,204');
    expect(formatYears(13.04)).toBe(`13.0${s}years`);
  });

  it('sets ranges with an en dash, and with a word where a bound is negative', () => {
    expect(formatRange(11.2, 15.14, { decimals: 1, unit: 'years' })).toBe(`11.2–15.1${s}years`);
    expect(formatRange(-2, 3, {})).toBe('\u22122 to 3');
  });

  // Rounding of the ± to two significant digits: JCGM 100:2008, 7.2.6.
  it.each([
    [226.43, 2.51, `226.4${s}±${s}2.5${s}Ah`],
    [226.43, 12.4, `226${s}±${s}12${s}Ah`],
    [226.43, 0.0996, `226.43${s}±${s}0.10${s}Ah`],
    [1226.4, 0.034, `1,226.400${s}±${s}0.034${s}Ah`],
    [226.43, 251, `226${s}±${s}251${s}Ah`],
    [226.43, 0, `226.4${s}±${s}0.0${s}Ah`],
  ])('%d ± %d matches decimals', (value, margin, text) => {
    expect(formatUncertainty(value, margin, 'Ah')).toBe(text);
  });

  it.each([
    [16920, `4${s}h 42${s}min`],
    [47 * 3600, `47${s}h`],
    [200, `3${s}min 20${s}s`],
    [120, `2${s}min`],
    [12.4, `12${s}s`],
    [0, `0${s}s`],
    [3599, `1${s}h`],
    [1500, `25${s}min`],
    [NaN, '–'],
  ])('%d s is %s', (seconds, text) => {
    expect(formatDuration(seconds)).toBe(text);
  });
});

describe('money', () => {
  it('is formatted from minor units with the digits of its currency', () => {
    expect(formatMoney(123456, 'EUR')).toBe('€1,234.56');
    expect(formatMoney(1234, 'JPY')).toBe('JP¥1,234');
    expect(formatMoney(-250, 'GBP')).toBe('\u2212£2.50');
    expect(() => formatMoney(1, 'nope')).toThrow(RangeError);
  });

  it('is stored in minor units without binary slips', () => {
    expect(minorUnitsOf(12.5, 'EUR')).toBe(1250);
    expect(minorUnitsOf(1.005, 'EUR')).toBe(101);
    expect(minorUnitsOf(0.29, 'EUR')).toBe(29);
    expect(minorUnitsOf(700, 'JPY')).toBe(700);
    expect(currencyDecimals('JPY')).toBe(0);
  });
});
