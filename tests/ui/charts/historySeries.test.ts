import {
  historyDomain,
  historyReading,
  joinedChecks,
  type HistoryCheck,
} from '@/components/charts/historySeries';

const check = (x: number, soh: number, more: Partial<HistoryCheck> = {}): HistoryCheck => ({
  id: String(x),
  x,
  soh,
  plusMinus: 0.01,
  when: '2 Nov 2026',
  ...more,
});

it('joins only what the fit keeps, in order of age', () => {
  const checks = [check(3, 0.94), check(1, 0.97), check(2, 0.5, { isLeftOut: true })];
  expect(joinedChecks(checks).map((one) => one.x)).toEqual([1, 3]);
});

it('spans all that is drawn, with its uncertainty', () => {
  const { x, y } = historyDomain([check(4.1, 0.88)], [{ x: 6, inner: [0.9, 0.92], outer: [0.84, 0.95] }]);
  expect(x[0]).toBe(0);
  expect(x[1]).toBeGreaterThan(6);
  expect(y[0]).toBeLessThanOrEqual(0.84);
  expect(y[1]).toBeGreaterThanOrEqual(1);
});

it('says what was read, how sure, and whether it counts', () => {
  const text = historyReading(check(2, 0.938, { isLeftOut: true, remark: 'this check' })).replace(
    /[\u202f\u00a0]/g,
    ' ',
  );
  expect(text).toBe('2 Nov 2026: 93.8 % ± 1.0 %, this check, left out of the fit');
});
