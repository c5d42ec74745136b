import {
  createLogReader,
  integrateLog,
  joinLogs,
  type LogFailure,
  type LogFile,
  type LogResult,
  type LogSamples,
  recogniseColumns,
} from '@/lib/measure';

import { plainChargeAh, plainDischarge, type Reading, stamps, writeLog } from '../support/logDialects';

type Stamp = (seconds: number) => string | number;
const dated: Stamp = (seconds) => stamps.iso(seconds).slice(0, 19);

/** With `timeFormat` its times are read as those of the first file of the log. */
function fileOf(
  name: string,
  readings: Reading[],
  stamp: Stamp,
  { timeHeader = 'time', timeFormat }: { timeHeader?: string; timeFormat?: string } = {},
): LogFile {
  const text = writeLog(readings, {
    delimiter: ',',
    header: [timeHeader, 'voltage (V)', 'current (A)'],
    columns: [(row) => stamp(row.timeS), (row) => row.voltageV, (row) => row.currentA],
  });
  const recognised = recogniseColumns(text);
  if (!recognised.ok) throw new Error(recognised.message);
  const reader = createLogReader({
    mapping: { ...recognised.mapping, timeFormat: timeFormat ?? recognised.mapping.timeFormat },
  });
  reader.push(text);
  const samples = reader.finish();
  if (!samples.ok) throw new Error(samples.message);
  return { name, samples };
}

const between = (from: number, to: number) =>
  plainDischarge().filter(({ timeS }) => timeS >= from && timeS <= to);
const codes = ({ warnings }: { warnings: { code: string }[] }) => warnings.map(({ code }) => code);
const joinedResult = (files: LogFile[]) => integrateLog(joinLogs(files) as LogSamples) as LogResult;

// Expected charge: the closed form of plainDischarge, as for the same log in one file.
describe('a log split in several files', () => {
  it('is one log again, whatever the order the files are given in', () => {
    const files = [
      fileOf('c.csv', between(2810, 4200), dated),
      fileOf('a.csv', between(0, 1400), dated),
      fileOf('b.csv', between(1410, 2800), dated),
    ];
    const result = joinedResult(files);
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    expect(result).toMatchObject({ rowsRead: 421, warnings: [] });
  });

  it('counts what several files hold once, and says how far they overlap', () => {
    const files = [fileOf('a.csv', between(0, 2400), dated), fileOf('b.csv', between(1200, 4200), dated)];
    const result = joinedResult(files);
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    const overlap = result.warnings.find(({ code }) => code === 'filesOverlap');
    // From 1200 to 2400 s, one row every 10 s, both ends held.
    expect(overlap).toMatchObject({ count: 121, text: expect.stringMatching(/overlap by 20.min/) });
  });

  it('says what lies between files that do not meet', () => {
    const files = [fileOf('a.csv', between(0, 2000), dated), fileOf('b.csv', between(2600, 4200), dated)];
    const result = joinedResult(files);
    const apart = result.warnings.find(({ code }) => code === 'filesApart');
    expect(apart?.text).toMatch(/Between a\.csv and b\.csv lie 10.min without rows/);
    // The current is the same on both sides, so the gap is counted whole.
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    expect(codes(result)).toContain('gapHoldsCharge');
  });

  it('leaves out a file that lies within another one', () => {
    const files = [fileOf('a.csv', between(0, 4200), dated), fileOf('b.csv', between(1200, 1500), dated)];
    const result = joinedResult(files);
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    expect(result.warnings[0]?.text).toMatch(/b\.csv lies wholly within the time of a\.csv/);
  });

  it('puts times of day in order across midnight, and says so', () => {
    const startS = (Date.parse(`${dated(0)}Z`) / 1000) % 86_400;
    const late: Stamp = (seconds) => stamps.iso(seconds + 86_400 - startS - 2205).slice(11, 19);
    const asClock = { timeFormat: 'clock' };
    const result = joinedResult([
      fileOf('b.csv', between(2210, 4200), late, asClock),
      fileOf('a.csv', between(0, 2200), late, asClock),
    ]);
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    expect(codes(result)).toEqual(['filesByClock']);
  });

  it('goes on counting seconds over files that do', () => {
    const seconds: Stamp = (value) => value;
    const files = [
      fileOf('b.csv', between(2010, 4200), seconds, { timeHeader: 'time (s)' }),
      fileOf('a.csv', between(0, 2000), seconds, { timeHeader: 'time (s)' }),
    ];
    expect(joinedResult(files).capacityAh).toBeCloseTo(plainChargeAh(), 9);
  });

  it('is refused in words where its order can not be told, or its times are of two kinds', () => {
    const anew: Stamp = (seconds) => seconds % 2000;
    const unordered = joinLogs([
      fileOf('a.csv', between(0, 1990), anew, { timeHeader: 'time (s)' }),
      fileOf('b.csv', between(2000, 3990), anew, { timeHeader: 'time (s)' }),
    ]) as LogFailure;
    expect(unordered).toMatchObject({ ok: false, reason: 'filesUnordered' });
    const mixed = joinLogs([
      fileOf('a.csv', between(0, 2000), dated),
      fileOf('b.csv', between(2010, 4200), (seconds) => seconds, { timeHeader: 'time (s)' }),
    ]) as LogFailure;
    expect(mixed).toMatchObject({
      ok: false,
      reason: 'filesDiffer',
      message: expect.stringMatching(/b\.csv/),
    });
  });

  it('of one file is that file', () => {
    const file = fileOf('a.csv', between(0, 4200), dated);
    expect(joinLogs([file])).toBe(file.samples);
    expect(() => joinLogs([])).toThrow(RangeError);
  });
});
