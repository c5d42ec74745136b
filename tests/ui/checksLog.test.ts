import { readingOfLog, resultKey } from '@/components/checks/logFill';
import { withAnswers, withColumn } from '@/components/checks/logMapping';
import type { LogMapping, LogResult, Upload } from '@/lib/contract/uploads';

const mapping: LogMapping = {
  delimiter: ',',
  decimal: '.',
  headerLine: 0,
  columns: [
    { index: 0, quantity: 'time', unit: '' },
    { index: 1, quantity: 'voltage', unit: 'V' },
    { index: 2, quantity: 'current', unit: 'mA' },
  ],
  timeFormat: 'dmy',
  window: null,
};

const result: LogResult = {
  capacityAh: 413.35872,
  energyWh: 21_233.918,
  meanCurrentA: 95.3899,
  meanTemperatureC: 23.17,
  startTemperatureC: 21.5,
  endTemperatureC: null,
  startVoltageV: 54.6,
  endVoltageV: 43.6,
  lowestCellAtEndV: 2.6004,
  highestCellAtEndV: null,
  lowestCellAtFullV: 3.4926,
  highestCellAtFullV: 3.5118,
  durationS: 15_630,
  windowStartS: 3300,
  windowEndS: 18_930,
  firstStamp: '2026-11-07T23:30:00.000Z',
  rowsRead: 660,
  rowsUsed: 660,
  rowsSkipped: 0,
  legs: 1,
  gapChargeFraction: 0,
  warnings: [],
  series: { timeS: [], voltageV: [], currentA: [], temperatureC: [] },
};

describe("an owner's answers", () => {
  const ask = (field: string, ...choices: string[]) => ({ field, text: '', choices });

  it('go where each question says', () => {
    const questions = [
      ask('timeFormat', 'dmy', 'mdy'),
      ask('unit:2', 'mA', 'A'),
      ask('dischargeSign', 'positive', 'negative'),
    ];
    const answered = withAnswers(mapping, questions, {
      timeFormat: 'mdy',
      'unit:2': 'A',
      dischargeSign: 'negative',
    });
    expect(answered).toMatchObject({ timeFormat: 'mdy', dischargeSign: 'negative' });
    expect(answered.columns[2]).toEqual({ index: 2, quantity: 'current', unit: 'A' });
    expect(mapping.columns[2]?.unit).toBe('mA');
  });

  it('move a quantity to the column that holds it', () => {
    const { columns } = withAnswers(mapping, [ask('column:current', '2', '4')], { 'column:current': '4' });
    expect(columns).toEqual([
      { index: 0, quantity: 'time', unit: '' },
      { index: 1, quantity: 'voltage', unit: 'V' },
      { index: 4, quantity: 'current', unit: 'A' },
    ]);
  });

  it('that are none of the choices change nothing', () => {
    const questions = [ask('timeFormat', 'dmy', 'mdy'), ask('column:__proto__', '2')];
    expect(withAnswers(mapping, questions, { timeFormat: 'ymd', 'column:__proto__': '2' })).toEqual(mapping);
  });
});

it('a column that is put to another use takes a unit of that, and one not used is left out', () => {
  const asPower = withColumn(mapping, 1, { quantity: 'power', unit: 'V' });
  expect(asPower.columns[1]).toEqual({ index: 1, quantity: 'power', unit: 'W' });
  expect(withColumn(mapping, 1, { quantity: 'lowestCell', unit: 'mV' }).columns[1]?.unit).toBe('mV');
  expect(withColumn(mapping, 1, null).columns.map(({ index }) => index)).toEqual([0, 2]);
});

it('a log fills the reading as it is typed, and leaves open what it does not hold', () => {
  expect(readingOfLog(result)).toEqual({
    testedOn: '2026-11-07',
    method: 'countedDischarge',
    capacityAh: '413.36',
    energyWh: '21.234',
    meanCurrentA: '95.39',
    durationS: '4:20:30',
    temperatureStartC: '21.5',
    temperatureEndC: '23.2',
    lowestCellAtFullV: '3.493',
    highestCellAtFullV: '3.512',
    lowestCellAtEndV: '2.6',
  });
  const bare = {
    ...result,
    energyWh: null,
    startTemperatureC: null,
    meanTemperatureC: null,
    firstStamp: null,
  };
  expect(Object.keys(readingOfLog(bare))).not.toEqual(
    expect.arrayContaining(['energyWh', 'temperatureStartC', 'testedOn']),
  );
});

it('the same file counted over another part is another result', () => {
  const upload = { id: 'a', result } as Upload;
  const other = { ...upload, result: { ...result, windowStartS: 3600, capacityAh: 400 } };
  expect(resultKey(other)).not.toBe(resultKey(upload));
  expect(resultKey({ ...upload, result: null })).toBe('');
});
