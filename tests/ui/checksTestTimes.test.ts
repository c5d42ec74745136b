import { referenceLoad, timedReadings } from '@/components/checks/testTimes';
import { newTestRun, type TestRun } from '@/components/checks/testRun';

const runOf = (startedAt: TestRun['startedAt']): TestRun => ({ ...newTestRun, stage: 'noted', startedAt });

it('takes the day, the rest and the duration from when the stages began', () => {
  const readings = timedReadings(
    runOf({
      rest: '2026-11-28T08:00:00Z',
      discharge: '2026-11-28T09:10:20Z',
      recharge: '2026-11-28T13:52:50Z',
    }),
  );
  // 70 min 20 s and 4 h 42 min 30 s, to the minute.
  expect(readings).toEqual({ testedOn: '2026-11-28', restMinutes: '70', durationS: '4:43' });
});

it('says nothing of stages that did not begin, or that a clock set back would make negative', () => {
  expect(timedReadings(runOf({}))).toEqual({});
  const setBack = runOf({ discharge: '2026-11-28T09:00:00Z', recharge: '2026-11-28T08:30:00Z' });
  expect(timedReadings(setBack)).toEqual({ testedOn: '2026-11-28' });
});

it("gives the load of 0.2 It in the bank's own amps and watts", () => {
  // IEC 61434: 0.2 It of 280 Ah is 56 A; 56 A x 16 x 3.2 V = 2867.2 W.
  const { amps, watts } = referenceLoad({ ratedAh: 280, series: 16, nominalV: 3.2 });
  expect(amps).toBeCloseTo(56, 9);
  expect(watts).toBeCloseTo(2867.2, 9);
});
