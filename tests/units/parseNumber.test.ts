import fc from 'fast-check';
import { formatNumber, parseNumber } from '@/lib/units';

describe('parseNumber', () => {
  it.each([
    ['226.4', 226.4],
    ['226,4', 226.4],
    [' 12 ', 12],
    ['-3.5', -3.5],
    ['\u22123,5', -3.5],
    ['+7', 7],
    ['.5', 0.5],
    [',5', 0.5],
    ['5.', 5],
    ['1e3', 1000],
    ['1,5E-2', 0.015],
    ['1,234', 1.234],
    ['1,234.5', 1234.5],
    ['1.234,5', 1234.5],
    ['1,234,567', 1234567],
    ['1.234.567', 1234567],
    ['1,234,567.25', 1234567.25],
    ['1 234', 1234],
    ['1\u202f234\u202f567,5', 1234567.5],
    ['12\u00a0345', 12345],
    ["1'234.5", 1234.5],
    ['0', 0],
  ])('reads %j as %d', (text, value) => {
    expect(parseNumber(text)).toBe(value);
  });

  it.each([
    '',
    ' ',
    '-',
    '.',
    ',',
    '12abc',
    'abc',
    'Infinity',
    'NaN',
    '0x10',
    '1.2.3',
    '1,2,3',
    '1,23.5',
    '12 34',
    '1 2345',
    '1234 567',
    '1.5 000',
    '--1',
    '1e999',
    '5 Ah',
    '=1+1',
    '1_000',
    '1,234,56',
    '1,234.5.6',
  ])('rejects %j', (text) => {
    expect(parseNumber(text)).toBeUndefined();
  });

  it('reads back every number that formatNumber wrote with four decimals', () => {
    // Four decimals, because "1,234" alone is read with a decimal comma by design.
    fc.assert(
      fc.property(fc.double({ min: -1e9, max: 1e9, noNaN: true }), (value) => {
        const read = parseNumber(formatNumber(value, { decimals: 4 }));
        expect(read).toBeDefined();
        expect(Math.abs((read ?? NaN) - value)).toBeLessThanOrEqual(0.5001e-4);
      }),
    );
  });
});
