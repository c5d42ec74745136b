import { createLogReader, decodeSniff, recogniseColumns } from '@/lib/measure';
import type { LogMapping, LogResult } from '@/lib/measure';
import { integrateText, plainChargeAh, plainDischarge, stamps, writeLog } from '../support/logDialects';
import type { Reading } from '../support/logDialects';

const header = ['time (s)', 'voltage (V)', 'current (A)'];
const columns = [(row: Reading) => row.timeS, (row: Reading) => row.voltageV, (row: Reading) => row.currentA];
const plain = (readings = plainDischarge()) => writeLog(readings, { delimiter: ',', header, columns });
const bytesOf = (text: string, encoding: 'utf8' | 'utf16le' | 'latin1' = 'utf8') =>
  new Uint8Array(Buffer.from(text, encoding));
const codes = (result: LogResult) => result.warnings.map(({ code }) => code);
const swapped = (bytes: Uint8Array) => new Uint8Array(Buffer.from(bytes).swap16());

describe('the encoding of a file', () => {
  it.each([
    ['UTF-8', bytesOf('Zeit;Strom\n1;2\n'), 'utf-8', 0],
    ['UTF-8 with accents', bytesOf('Intensité;°C\n'), 'utf-8', 0],
    ['UTF-8 with a mark', bytesOf('\ufeffZeit;Strom\n'), 'utf-8', 3],
    ['UTF-16 LE with a mark', bytesOf('\ufeffZeit;Strom\n', 'utf16le'), 'utf-16le', 2],
    ['UTF-16 BE with a mark', swapped(bytesOf('\ufeffZeit;Strom\n', 'utf16le')), 'utf-16be', 2],
    ['UTF-16 LE without', bytesOf('Zeit;Strom\n1;2\n', 'utf16le'), 'utf-16le', 0],
    ['UTF-16 BE without', swapped(bytesOf('Zeit;Strom\n1;2\n', 'utf16le')), 'utf-16be', 0],
    ['Latin text', bytesOf('Temp °C;Intensité\n', 'latin1'), 'windows-1252', 0],
    ['UTF-8 cut within a character', bytesOf('Temp °C °').slice(0, -1), 'utf-8', 0],
  ])('%s is told', (_, bytes, encoding, bomBytes) => {
    expect(decodeSniff(bytes)).toEqual({ ok: true, encoding, bomBytes });
    // The name is one that decoders know, and leads back to the text.
    expect(() => new TextDecoder(encoding)).not.toThrow();
  });

  it.each([
    ['an empty file', new Uint8Array(), 'empty'],
    ['a mark and nothing else', bytesOf('\ufeff'), 'empty'],
    ['a spreadsheet', Uint8Array.of(0x50, 0x4b, 3, 4, 20, 0), 'binary'],
    ['a PDF', bytesOf('%PDF-1.7 ...'), 'binary'],
    ['a picture', Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10, 0, 0, 0, 13), 'binary'],
    ['control characters', Uint8Array.from({ length: 200 }, (_, index) => index % 9), 'binary'],
  ])('%s is refused', (_, bytes, reason) => {
    expect(decodeSniff(bytes)).toMatchObject({ ok: false, reason });
  });
});

describe('a file that is no log', () => {
  it.each([
    ['nothing', '', 'empty'],
    ['blank lines', '\n\n \n', 'empty'],
    ['zero bytes', 'time,current\n1,2\u0000\n', 'binary'],
    ['text in the wrong encoding', '\ufffd\ufffdt\ufffdi;\ufffd\n1;2\n', 'wrongEncoding'],
    ['a letter', 'Dear all,\nthe log follows tomorrow, I hope.\nRegards\n', 'noTable'],
    ['a web page', '<html><head><title>Sign in</title></head><body>Please, sign in</body></html>', 'noTable'],
    ['a table without times', 'voltage,current\n53.2,1\n53.1,2\n53.3,1\n', 'noTimeColumn'],
    ['a table of times alone', 'date,time\n2026-11-02,14:00:00\n2026-11-02,14:00:10\n', 'noCurrentColumn'],
    [
      'decimal commas between commas',
      'time,voltage,current\n0,0,53,2,56,1\n10,0,53,1,56,0\n20,0,53,0,56,1\n',
      'delimiterUnclear',
    ],
    ['a header without rows', 'time (s),voltage (V),current (A)\n', 'noTable'],
  ])('%s is refused with a reason', (_, text, reason) => {
    const result = recogniseColumns(text);
    expect(result).toMatchObject({ ok: false, reason });
    expect(result).toHaveProperty('message', expect.stringMatching(/\w.*\.$/));
  });
});

describe('a mapping that cannot be followed', () => {
  const mapping: LogMapping = {
    delimiter: ',',
    decimal: '.',
    headerLine: 0,
    columns: [
      { index: 0, quantity: 'time', unit: 's' },
      { index: 2, quantity: 'current', unit: 'A' },
    ],
    timeFormat: 'elapsedS',
  };
  const readWith = (changes: Partial<LogMapping>) =>
    createLogReader({ mapping: { ...mapping, ...changes } }).push(plain());
  it.each<[string, Partial<LogMapping>, string]>([
    ['without time', { columns: mapping.columns.slice(1) }, 'noTimeColumn'],
    ['without current', { columns: mapping.columns.slice(0, 1) }, 'noCurrentColumn'],
    [
      'with volts for a current',
      { columns: [mapping.columns[0]!, { index: 2, quantity: 'current', unit: 'V' }] },
      'badMapping',
    ],
    [
      'with an unknown unit',
      { columns: [mapping.columns[0]!, { index: 2, quantity: 'current', unit: '__proto__' }] },
      'badMapping',
    ],
    ['with an unknown time format', { timeFormat: 'constructor' }, 'badMapping'],
    [
      'with a column before the first',
      { columns: [...mapping.columns, { index: -1, quantity: 'voltage', unit: 'V' }] },
      'badMapping',
    ],
  ])('%s is refused', (_, changes, reason) => {
    expect(readWith(changes)).toMatchObject({ ok: false, reason });
  });
  it('with the wrong time format says at which row', () => {
    expect(integrateText(plain(), { timeFormat: 'dmy' })).toMatchObject({
      ok: false,
      reason: 'unreadableTime',
      row: 2,
    });
  });
  it('with words for a current says at which row', () => {
    const text = writeLog(plainDischarge(), {
      delimiter: ',',
      header: [...header, 'state'],
      columns: [...columns, () => 'idle'],
    });
    const wrong = { columns: [mapping.columns[0]!, { index: 3, quantity: 'current' as const, unit: 'A' }] };
    expect(integrateText(text, wrong)).toMatchObject({ ok: false, reason: 'unreadableRows', row: 2 });
  });
});

describe('a damaged log', () => {
  it('with its last line cut short leaves that out and says so', () => {
    const text = plain();
    const cut = text.slice(0, text.lastIndexOf(',') - 2);
    const result = integrateText(cut) as LogResult;
    expect(result).toMatchObject({ ok: true, rowsRead: 420 });
    expect(codes(result)).toContain('truncatedLastLine');
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
  });

  it('with unreadable rows leaves them out, counts them and names the first', () => {
    const lines = plain().split('\n');
    lines[50] = 'sensor error';
    lines[200] = '1990,52.1,';
    lines[300] = "=cmd|' /C calc'!A0,<script>,\"); DROP TABLE checks;--";
    const result = integrateText(lines.join('\n')) as LogResult;
    expect(result).toMatchObject({ ok: true, rowsRead: 421, rowsSkipped: 3 });
    expect(result.warnings).toContainEqual(
      expect.objectContaining({ code: 'rowsSkipped', count: 3, atRow: 51 }),
    );
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
  });

  it('with rows repeated and out of order puts them right', () => {
    const readings = plainDischarge();
    const [a, b] = [readings[100]!, readings[101]!];
    readings.splice(100, 2, b, a, a);
    const result = integrateText(plain(readings)) as LogResult;
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    expect(result.warnings).toContainEqual(
      expect.objectContaining({ code: 'outOfOrder', count: 2, atRow: 103 }),
    );
    expect(result.warnings).toContainEqual(expect.objectContaining({ code: 'duplicateStamps', count: 1 }));
  });

  it('that runs backwards is turned round', () => {
    const result = integrateText(plain(plainDischarge().reverse())) as LogResult;
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    expect(result.endVoltageV).toBeCloseTo(44.8, 6);
    expect(codes(result)).toEqual(['newestFirst']);
  });

  it('whose count starts again goes on where it stopped', () => {
    const readings = plainDischarge().map((row) => ({
      ...row,
      timeS: row.timeS > 2000 ? row.timeS - 2010 : row.timeS,
    }));
    const result = integrateText(plain(readings)) as LogResult;
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    expect(result.warnings).toContainEqual(
      expect.objectContaining({ code: 'restart', count: 1, atRow: 203 }),
    );
  });

  it('whose clock was set back an hour goes on', () => {
    const text = writeLog(plainDischarge(), {
      delimiter: ',',
      header,
      columns: [
        (row) => stamps.iso(row.timeS - (row.timeS > 2000 ? 3600 : 0)).slice(0, 19),
        ...columns.slice(1),
      ],
    });
    const result = integrateText(text) as LogResult;
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
    expect(codes(result)).toEqual(['setBack']);
  });

  it('whose header comes again is read on', () => {
    const lines = plain().split('\n');
    lines.splice(200, 0, lines[0]!);
    const result = integrateText(lines.join('\n')) as LogResult;
    expect(result).toMatchObject({ rowsRead: 421, rowsSkipped: 0 });
    expect(result.capacityAh).toBeCloseTo(plainChargeAh(), 9);
  });

  it('without some voltages says how many were filled in', () => {
    const text = writeLog(plainDischarge(), {
      delimiter: ',',
      header,
      columns: [columns[0]!, (row) => (row.timeS % 100 === 50 ? '' : row.voltageV), columns[2]!],
    });
    const result = integrateText(text) as LogResult;
    expect(result.warnings).toContainEqual(expect.objectContaining({ code: 'voltageMissing', count: 42 }));
    expect(result.energyWh! / (56 * 49.6)).toBeCloseTo(1, 2);
  });

  it('with more rows than allowed is refused at the row', () => {
    expect(integrateText(plain(), {}, { maxRows: 100 })).toMatchObject({
      ok: false,
      reason: 'tooManyRows',
      row: 102,
    });
  });

  it('with a line that never ends is refused', () => {
    const reader = createLogReader({
      mapping: {
        delimiter: ',',
        decimal: '.',
        headerLine: 0,
        columns: [
          { index: 0, quantity: 'time', unit: 's' },
          { index: 1, quantity: 'current', unit: 'A' },
        ],
        timeFormat: 'elapsedS',
      },
    });
    reader.push('time,current\n');
    expect(reader.push('1,'.repeat(150_000))).toMatchObject({ ok: false, reason: 'lineTooLong', row: 2 });
    expect(reader.finish()).toMatchObject({ ok: false, reason: 'lineTooLong' });
  });

  it('with long hostile fields is read without delay', () => {
    const long = `1${' '.repeat(100_000)}!`;
    const lines = plain().split('\n');
    lines.splice(10, 0, `${long},${long},${long}`, `${'T'.repeat(100_000)},1:,1`);
    const began = performance.now();
    expect(integrateText(lines.join('\n'))).toMatchObject({ ok: false, reason: 'lineTooLong' });
    expect(recogniseColumns(lines.join('\n'))).toMatchObject({ ok: true });
    const shorter = lines.map((line) => line.slice(0, 150_000)).join('\n');
    expect(integrateText(shorter)).toMatchObject({ ok: true, rowsSkipped: 2 });
    // Patterns that run over such fields in quadratic time take minutes.
    expect(performance.now() - began).toBeLessThan(3000);
  });

  it('with hostile names of columns shows them as plain text', () => {
    const text = writeLog(plainDischarge(), {
      delimiter: ',',
      header: [...header, '__proto__', 'constructor', '=HYPERLINK("x")', `x${'y'.repeat(300)}\u202e`],
      columns: [...columns, () => 1, () => 2, () => 3, () => 4],
    });
    const recognised = recogniseColumns(text);
    expect(recognised).toMatchObject({ ok: true, questions: [] });
    if (!recognised.ok) return;
    expect(recognised.mapping.columns.map(({ index }) => index)).toEqual([0, 1, 2]);
    expect(recognised.header[3]).toBe('__proto__');
    expect(Math.max(...recognised.header.map((name) => name.length))).toBeLessThanOrEqual(80);
    expect(({} as Record<string, unknown>)['quantity']).toBeUndefined();
    expect(integrateText(text)).toMatchObject({ ok: true });
  });
});
