import { secondsAt, stepBy, withEdge } from '@/components/charts/timeWindow';

const domain = [0, 36_000] as const;
const counted = { startS: 3600, endS: 20_000 };

it('moves an edge within the log and never past the other one', () => {
  expect(withEdge(counted, 'startS', 5000.4, domain)).toEqual({ startS: 5000, endS: 20_000 });
  expect(withEdge(counted, 'startS', -50, domain).startS).toBe(0);
  expect(withEdge(counted, 'startS', 30_000, domain).startS).toBe(19_940);
  expect(withEdge(counted, 'endS', 0, domain).endS).toBe(3660);
  expect(withEdge(counted, 'endS', 90_000, domain).endS).toBe(36_000);
});

it('steps by a minute and by ten, of short logs by less', () => {
  expect(stepBy('ArrowRight', 3600, domain)).toBe(3660);
  expect(stepBy('PageDown', 3600, domain)).toBe(3000);
  expect(stepBy('ArrowLeft', 300, [0, 600])).toBe(297);
  expect(stepBy('End', 3600, domain)).toBe(36_000);
  expect(stepBy('Tab', 3600, domain)).toBeUndefined();
});

it('reads seconds off a place across the drawing', () => {
  const plot = {
    ...{ width: 400, height: 180, left: 50, right: 50, top: 0, bottom: 0 },
    ...{ xDomain: domain, yDomain: [0, 1] as const },
  };
  expect(secondsAt(plot, 50)).toBe(0);
  expect(secondsAt(plot, 200)).toBe(18_000);
  expect(secondsAt(plot, 350)).toBe(36_000);
});
