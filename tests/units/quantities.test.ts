import fc from 'fast-check';
import { convert, cRateIt, currentOfIt, isConvertible, isUnit, pressureKPaOf, units } from '@/lib/units';

describe('convert', () => {
  it.each([
    [1500, 'mAh', 'Ah', 1.5],
    [11.57, 'kWh', 'Wh', 11570],
    [3650, 'mV', 'V', 3.65],
    [250, 'mA', 'A', 0.25],
    [2.5, 'kW', 'W', 2500],
    [90, 'min', 'h', 1.5],
    [1, 'd', 's', 86400],
    [1500, 'ms', 's', 1.5],
    [2, 'in', 'mm', 50.8],
    [68, '°F', '°C', 20],
    [0, 'K', '°C', -273.15],
  ] as const)('%d %s in %s to %d', (value, from, to, expected) => {
    expect(convert(value, from, to)).toBeCloseTo(expected, 12);
  });

  it('refuses units of different kinds', () => {
    expect(() => convert(1, 'Ah', 'Wh')).toThrow(RangeError);
    expect(() => convert(1, 'N', 'kPa')).toThrow(/one kind/);
    expect(isConvertible('Ah', 'Wh')).toBe(false);
    expect(isConvertible('kgf', 'lbf')).toBe(true);
  });

  it('comes back to the same value through any unit of the kind', () => {
    const pairs = units.flatMap((from) =>
      units.filter((to) => isConvertible(from, to)).map((to) => [from, to] as const),
    );
    fc.assert(
      fc.property(
        fc.constantFrom(...pairs),
        fc.double({ min: -1e6, max: 1e6, noNaN: true }),
        ([from, to], value) => {
          const back = convert(convert(value, from, to), to, from);
          expect(Math.abs(back - value)).toBeLessThanOrEqual(1e-12 * Math.max(1000, Math.abs(value)));
        },
      ),
    );
  });

  it('knows its units and nothing of the prototype', () => {
    expect(isUnit('kgf')).toBe(true);
    expect(isUnit('toString')).toBe(false);
    expect(isUnit('__proto__')).toBe(false);
  });
});

describe('cRateIt', () => {
  it('refuses a rated capacity that is not above zero', () => {
    expect(() => cRateIt(10, 0)).toThrow(RangeError);
    expect(() => currentOfIt(0.2, -5)).toThrow(RangeError);
    expect(() => cRateIt(10, NaN)).toThrow(RangeError);
  });
});

describe('pressureKPaOf', () => {
  it('refuses a face without area', () => {
    expect(() => pressureKPaOf(100, 0)).toThrow(RangeError);
  });
});
