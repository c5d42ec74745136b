import { extentOf, niceStep, niceTicks, xOf, yOf, type PlotArea } from '@/components/charts/chartScale';

const plot: PlotArea = {
  width: 300,
  height: 200,
  left: 40,
  right: 10,
  top: 20,
  bottom: 30,
  xDomain: [0, 10],
  yDomain: [0.7, 1],
};

describe('scales', () => {
  it('put the ends of the domain on the edges of the plot', () => {
    expect([xOf(plot, 0), xOf(plot, 10)]).toEqual([40, 290]);
    expect(yOf(plot, 0.7)).toBeCloseTo(170, 9);
    expect(yOf(plot, 1)).toBeCloseTo(20, 9);
  });

  it('run downwards for greater values', () => {
    expect(yOf(plot, 0.9)).toBeLessThan(yOf(plot, 0.8));
  });
});

describe('ticks', () => {
  it.each([
    [[0, 16], 8, [0, 2, 4, 6, 8, 10, 12, 14, 16]],
    [[0, 16], 4, [0, 5, 10, 15]],
    [[0.7, 1.02], 5, [0.7, 0.8, 0.9, 1]],
    [[2, 3], 4, [2, 2.25, 2.5, 2.75, 3]],
    [[-0.3, 0.3], 3, [-0.2, 0, 0.2]],
  ] as const)('of %p, about %p of them, are %p', (domain, count, expected) => {
    expect(niceTicks(domain, count)).toEqual(expected);
  });

  it('have steps of 1, 2, 2.5 or 5 times a power of ten', () => {
    for (let span = 0.013; span < 1e6; span *= 1.7) {
      const step = niceStep(span, 6);
      const mantissa = Number((step / 10 ** Math.floor(Math.log10(step) + 1e-9)).toFixed(6));
      expect([1, 2, 2.5, 5]).toContain(mantissa);
      expect(span / step).toBeLessThanOrEqual(6 + 1e-9);
    }
  });
});

it('extentOf leaves out what is not finite, and answers undefined for nothing', () => {
  expect(extentOf([3, NaN, -1, Infinity])).toEqual([-1, 3]);
  expect(extentOf([])).toBeUndefined();
});
