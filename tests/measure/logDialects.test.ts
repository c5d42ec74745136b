import { recogniseColumns } from '@/lib/measure';
import type { LogMapping, LogResult } from '@/lib/measure';
import { integrateText, plainChargeAh, plainDischarge, stamps, writeLog } from '../support/logDialects';
import type { Dialect, Reading } from '../support/logDialects';

const volts = (reading: Reading) => reading.voltageV;
const amps = (reading: Reading) => reading.currentA;
const celsius = (reading: Reading) => reading.temperatureC;
const seconds = (reading: Reading) => reading.timeS;

interface Case {
  name: string;
  dialect: Dialect;
  /** What its owner answers to the questions asked. */
  answers?: Partial<LogMapping>;
  asked?: string[];
  timeFormat: string;
  says?: string[];
}

const cases: Case[] = [
  {
    name: 'ISO stamps, commas',
    dialect: {
      delimiter: ',',
      header: ['timestamp', 'voltage_V', 'current_A', 'temperature_C'],
      columns: [(row) => stamps.iso(row.timeS), volts, amps, celsius],
    },
    timeFormat: 'ymd',
  },
  {
    name: 'ISO stamps with an offset, CRLF, quoted fields',
    dialect: {
      delimiter: ',',
      header: ['"Time"', '"Pack voltage (V)"', '"Pack current (A)"', '"Cell temp (°C)"'],
      columns: [
        (row) => `"${stamps.iso(row.timeS).slice(0, 19)}+02:00"`,
        (row) => `"${row.voltageV}"`,
        amps,
        (row) => `"${row.temperatureC}"`,
      ],
      lineEnd: '\r\n',
    },
    timeFormat: 'ymd',
  },
  {
    name: 'semicolons, decimal commas, days first with points, a preamble and German names',
    dialect: {
      delimiter: ';',
      decimal: ',',
      preamble: ['Messprotokoll', 'Gerät;Messwandler 3', 'Erstellt am;02.11.2026', ''],
      header: ['Zeit', 'Spannung [V]', 'Strom [A]', 'Temperatur [°C]'],
      columns: [
        (row) => `${stamps.day(row.timeS, 'dmy', '.')} ${stamps.clock(row.timeS)}`,
        volts,
        amps,
        celsius,
      ],
    },
    timeFormat: 'dmy',
  },
  {
    name: 'tabs, units in a row of their own',
    dialect: {
      delimiter: '\t',
      header: ['Elapsed', 'Voltage', 'Current', 'Temperature'],
      unitRow: ['s', 'V', 'A', '°C'],
      columns: [seconds, volts, amps, celsius],
    },
    timeFormat: 'elapsedS',
  },
  {
    name: 'milliseconds, millivolts and milliamps',
    dialect: {
      delimiter: ',',
      header: ['t_ms', 'U_mV', 'I_mA', 'temp_C'],
      columns: [
        (row) => row.timeS * 1000,
        (row) => row.voltageV * 1000,
        (row) => row.currentA * 1000,
        celsius,
      ],
    },
    timeFormat: 'elapsedMs',
  },
  {
    name: 'day before month with slashes, 12-hour clock, day and clock in two columns',
    dialect: {
      delimiter: ',',
      header: ['Date', 'Time', 'Voltage (V)', 'Current (A)', 'Temp (F)'],
      columns: [
        (row) => stamps.day(row.timeS, 'dmy'),
        (row) => stamps.clock12(row.timeS, 11),
        volts,
        amps,
        (row) => row.temperatureC * 1.8 + 32,
      ],
    },
    answers: { timeFormat: 'dmy' },
    asked: ['timeFormat'],
    timeFormat: 'dmy',
  },
  {
    name: 'month before day, 12-hour clock past midnight',
    dialect: {
      delimiter: ',',
      header: ['Record time', 'V', 'A', '°F'],
      columns: [
        (row) => `${stamps.day(row.timeS, 'mdy', '/', 23.5)} ${stamps.clock12(row.timeS, 23.5)}`,
        volts,
        amps,
        (row) => row.temperatureC * 1.8 + 32,
      ],
    },
    answers: { timeFormat: 'mdy' },
    asked: ['timeFormat'],
    timeFormat: 'mdy',
  },
  {
    name: 'time of day only, past midnight',
    dialect: {
      delimiter: ';',
      header: ['Time', 'Volts', 'Amps', 'Temperature'],
      columns: [(row) => stamps.clock(row.timeS, 23.5), volts, amps, celsius],
    },
    timeFormat: 'clock',
    says: ['midnight'],
  },
  {
    name: 'time of day with am and pm, past midnight',
    dialect: {
      delimiter: ';',
      header: ['Time', 'Volts', 'Amps', 'Temperature'],
      columns: [(row) => stamps.clock12(row.timeS, 23.5), volts, amps, celsius],
    },
    timeFormat: 'clock',
    says: ['midnight'],
  },
  {
    name: 'a 12-hour clock without am and pm, past one',
    dialect: {
      delimiter: ';',
      header: ['Time', 'Volts', 'Amps', 'Temperature'],
      columns: [(row) => stamps.clock12(row.timeS, 12.25).replace(/ [AP]M/, ''), volts, amps, celsius],
    },
    timeFormat: 'clock',
    says: ['twelveHour'],
  },
  {
    name: 'elapsed hours, minutes and seconds',
    dialect: {
      delimiter: ',',
      header: ['Elapsed time', 'Voltage', 'Current', 'Temp'],
      columns: [(row) => stamps.clock(row.timeS, 0), volts, amps, celsius],
    },
    timeFormat: 'elapsedClock',
  },
  {
    name: 'seconds since 1970, discharging negative',
    dialect: {
      delimiter: ',',
      header: ['epoch', 'battery_voltage', 'battery_current', 'battery_temperature'],
      columns: [(row) => stamps.at(row.timeS).getTime() / 1000, volts, (row) => -row.currentA, celsius],
    },
    timeFormat: 'epochS',
  },
  {
    name: 'milliseconds since 1970, kilowatts instead of a current',
    dialect: {
      delimiter: ',',
      header: ['time', 'voltage (V)', 'power (kW)', 'temperature (K)'],
      columns: [
        (row) => stamps.at(row.timeS).getTime(),
        volts,
        (row) => ((row.currentA * row.voltageV) / 1000).toFixed(9),
        (row) => row.temperatureC + 273.15,
      ],
    },
    timeFormat: 'epochMs',
    says: ['currentFromPower'],
  },
  {
    name: 'spreadsheet days with decimal commas and thousands',
    dialect: {
      delimiter: ';',
      decimal: ',',
      header: ['Datum', 'Spannung (mV)', 'Strom (A)', 'Temperatur (°C)'],
      columns: [
        (row) => (46328 + (row.timeS + 50400) / 86400).toFixed(9).replace('.', ','),
        (row) =>
          `${Math.floor(row.voltageV)}.${String(Math.round((row.voltageV % 1) * 1000)).padStart(3, '0')},0`,
        amps,
        celsius,
      ],
    },
    timeFormat: 'serialDays',
  },
  {
    name: 'month in letters, units behind the numbers, old line ends',
    dialect: {
      delimiter: ',',
      header: ['Time', 'Voltage', 'Current', 'Temperature'],
      columns: [
        (row) => `02-Nov-2026 ${stamps.clock(row.timeS)}`,
        (row) => `${row.voltageV.toFixed(4)} V`,
        (row) => `${row.currentA} A`,
        (row) => `${row.temperatureC.toFixed(3)} °C`,
      ],
      lineEnd: '\r',
    },
    timeFormat: 'dmy',
  },
  {
    name: 'columns nobody needs, a sep line, unicode minus',
    dialect: {
      delimiter: ';',
      preamble: ['sep=;'],
      header: [
        'No.',
        'State',
        'Time (s)',
        'State of charge (%)',
        'Voltage (V)',
        'Current (A)',
        'Energy (Wh)',
        'Temperature (°C)',
      ],
      columns: [
        (row) => row.timeS / 10,
        (row) => (row.currentA > 0 ? 'discharging' : 'idle'),
        seconds,
        (row) => 100 - row.timeS / 60,
        volts,
        (row) => (row.currentA > 0 ? `\u2212${row.currentA}` : '0'),
        (row) => row.timeS * 3,
        celsius,
      ],
    },
    timeFormat: 'elapsedS',
  },
  {
    name: 'a time without unit, answered as minutes',
    dialect: {
      delimiter: ',',
      header: ['Time', 'Voltage', 'Current', 'Temperature'],
      columns: [(row) => row.timeS / 60, volts, amps, celsius],
    },
    answers: { timeFormat: 'elapsedMin' },
    asked: ['timeFormat'],
    timeFormat: 'elapsedMin',
  },
  {
    name: 'no header at all, columns chosen by hand',
    dialect: {
      delimiter: ',',
      header: null,
      columns: [(row) => stamps.iso(row.timeS), volts, amps, celsius],
    },
    answers: {
      columns: [
        { index: 0, quantity: 'time', unit: '' },
        { index: 1, quantity: 'voltage', unit: 'V' },
        { index: 2, quantity: 'current', unit: 'A' },
        { index: 3, quantity: 'temperature', unit: '°C' },
      ],
    },
    asked: ['column:current'],
    timeFormat: 'ymd',
  },
];

describe('a log', () => {
  it.each(cases)(
    'in $name gives the same discharge',
    ({ dialect, answers, asked = [], timeFormat, says = [] }) => {
      const text = writeLog(plainDischarge(), dialect);
      const recognised = recogniseColumns(text.slice(0, 8000));
      expect(recognised).toMatchObject({ ok: true });
      if (!recognised.ok) return;
      expect(recognised.questions.map(({ field }) => field)).toEqual(asked);
      if (asked.length === 0) expect(recognised.mapping.timeFormat).toBe(timeFormat);

      const result = integrateText(text, answers) as LogResult;
      expect(result).toMatchObject({ ok: true });
      // Closed form of the made-up discharge; rounding of written numbers allows 1e-5.
      expect(Math.abs(result.capacityAh / plainChargeAh() - 1)).toBeLessThan(1e-5);
      // Mean of a straight line from 54.4 to 44.8 V is 49.6 V; the ramps are half a step at either end.
      const energyWh = 56 * 49.6 + ((56 * 10) / 3600 / 2) * (54.4 + 44.8);
      expect(Math.abs((result.energyWh ?? 0) / energyWh - 1)).toBeLessThan(1e-5);
      expect(result.meanCurrentA).toBeCloseTo(56, 0);
      // 20 to 25 °C in a straight line over the window.
      expect(result.meanTemperatureC).toBeCloseTo(22.5, 2);
      expect(result.startVoltageV).toBeCloseTo(54.4, 3);
      expect(result.endVoltageV).toBeCloseTo(44.8, 3);
      expect(result.startTemperatureC).toBeCloseTo(20, 2);
      expect(result.endTemperatureC).toBeCloseTo(25, 2);
      expect(result.durationS).toBeCloseTo(3620, 2);
      expect(result).toMatchObject({ legs: 1, rowsRead: 421, rowsUsed: 363, rowsSkipped: 0 });
      const expected = dialect.header === null ? ['directionAssumed'] : [];
      expect(result.warnings.map(({ code }) => code).filter((code) => !expected.includes(code))).toEqual(
        says,
      );
    },
  );

  it('is read the same in pieces of any length', () => {
    const text = writeLog(plainDischarge(), cases[1]!.dialect);
    const whole = integrateText(text);
    for (const pieceLength of [1, 7, 1000]) expect(integrateText(text, {}, { pieceLength })).toEqual(whole);
  });

  it('with a voltage for each cell gives the lowest and the highest', () => {
    const text = writeLog(plainDischarge(), {
      delimiter: ',',
      header: ['time (s)', 'current (A)', 'pack voltage', 'Cell 1', 'Cell 2', 'Cell 3'],
      columns: [
        seconds,
        amps,
        volts,
        (row) => row.highestCellV,
        (row) => row.lowestCellV,
        (row) => row.voltageV / 16,
      ],
    });
    const result = integrateText(text) as LogResult;
    expect(result.lowestCellAtEndV).toBeCloseTo(2.79, 4);
    expect(result.highestCellAtEndV).toBeCloseTo(2.82, 4);
    expect(result.lowestCellAtStartV).toBeCloseTo(3.39, 4);
    // The log begins after charging ended, so it cannot say how full the cells were.
    expect(result.highestCellAtFullV).toBeNull();
  });

  it('with columns for lowest and highest cell knows them by name', () => {
    const recognised = recogniseColumns(
      writeLog(plainDischarge(60), {
        delimiter: ',',
        header: ['time (s)', 'current (A)', 'Cell min (mV)', 'MaxCellV', 'Discharged (Ah)'],
        columns: [seconds, amps, (row) => row.lowestCellV * 1000, (row) => row.highestCellV, seconds],
      }),
    );
    expect(recognised).toMatchObject({ ok: true, questions: [] });
    if (!recognised.ok) return;
    expect(recognised.mapping.columns).toEqual([
      { index: 0, quantity: 'time', unit: 's' },
      { index: 1, quantity: 'current', unit: 'A' },
      { index: 2, quantity: 'lowestCell', unit: 'mV' },
      { index: 3, quantity: 'highestCell', unit: 'V' },
      { index: 4, quantity: 'counter', unit: 'Ah' },
    ]);
  });
});

describe('what a log does not tell is asked', () => {
  const ask = (header: string[], columns: Dialect['columns']) => {
    const recognised = recogniseColumns(writeLog(plainDischarge(), { delimiter: ',', header, columns }));
    return recognised.ok ? recognised.questions : [];
  };
  it('whether 56,000 without a unit are milliamps', () => {
    const questions = ask(['time (s)', 'current'], [seconds, (row) => 40000 + row.currentA * 1000]);
    expect(questions).toMatchObject([{ field: 'unit:1', choices: ['mA', 'A'] }]);
  });
  it('whether 68 without a unit are degrees Fahrenheit', () => {
    const questions = ask(
      ['time (s)', 'current (A)', 'temperature'],
      [seconds, amps, (row) => row.temperatureC * 1.8 + 32],
    );
    expect(questions).toMatchObject([{ field: 'unit:2', choices: ['°F', '°C'] }]);
  });
  it('which of two equal currents is the bank’s', () => {
    const questions = ask(['time (s)', 'current A', 'current (A)'], [seconds, amps, amps]);
    expect(questions).toMatchObject([{ field: 'column:current', choices: ['1', '2'] }]);
  });
  it('which rising count is the time, when no name tells', () => {
    const questions = ask(['Nr', 'Ticks', 'current (A)'], [(row) => row.timeS / 10, seconds, amps]);
    expect(questions.map(({ field }) => field)).toEqual(['column:time', 'timeFormat']);
    expect(questions[0]?.choices).toEqual(['0', '1']);
  });
  it('but not where a day above 12 settles the order', () => {
    expect(ask(['time', 'current (A)'], [(row) => `13/11/2026 ${stamps.clock(row.timeS)}`, amps])).toEqual(
      [],
    );
    expect(ask(['time', 'current (A)'], [(row) => `11/13/2026 ${stamps.clock(row.timeS)}`, amps])).toEqual(
      [],
    );
  });
});
