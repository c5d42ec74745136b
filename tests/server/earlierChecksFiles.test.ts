import { deflateRawSync } from 'node:zlib';

import Papa from 'papaparse';

import type { EarlierReport } from '@/lib/contract/earlierChecks';
import { limits } from '@/lib/contract/limits';

import { createBankOf, createCellType } from '../support/bankFixtures';
import { earlierFile, everyHeader, goodRow, type RowChange } from '../support/earlierFile';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  owner = await server.client('owner');
  await createBankOf(owner);
});
afterAll(() => server.stop());

const preview = (file: string | Buffer) =>
  owner.send('post', '/api/earlier-checks/preview').attach('file', Buffer.from(file), 'checks.csv');

const good = earlierFile([{}]);
const header = good.split('\r\n')[0]!;
const withHeader = (change: (names: string[]) => string[]) =>
  good.replace(header, change(header.split(',')).join(','));
const utf16 = (text: string, isBigEndian = false) => {
  const bytes = Buffer.from(`\ufeff${text}`, 'utf16le');
  return isBigEndian ? bytes.swap16() : bytes;
};

describe('a file that is refused whole', () => {
  it.each<[string, string | Buffer, string]>([
    ['nothing', '', 'The file is empty.'],
    ['a mark and nothing else', '\ufeff', 'The file is empty.'],
    [
      'a spreadsheet under another name',
      Buffer.from([0x50, 0x4b, 0x03, 0x04, 0, 0, 1, 2]),
      'not a text file',
    ],
    ['a program', Buffer.from([0x7f, 0x45, 0x4c, 0x46, 2, 1, 1, 0, 0, 0]), 'not a text file'],
    ['a picture', Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a, 0, 0]), 'not a text file'],
    ['packed bytes', deflateRawSync(Buffer.alloc(100_000)), 'not a text file'],
    ['another table', 'name,price\nbolt,3\n', "none of the template's columns"],
    ['one long line', 'x'.repeat(200_000), "none of the template's columns"],
    [
      'no column of the capacity',
      withHeader((names) => names.map((name) => (name === 'capacity_ah' ? 'capacity' : name))),
      'Row 1 lacks: capacity_ah.',
    ],
    [
      'no column of the energy in either unit',
      withHeader((names) => names.map((name) => (name === 'energy_kwh' ? '' : name))),
      'energy_kwh or energy_wh',
    ],
    [
      'a column twice',
      withHeader((names) => names.map((name) => (name === 'rest_min' ? 'Capacity AH' : name))),
      'twice, in places 7 and 14',
    ],
    ['names alone', `${header}\r\n`, 'no check in this file'],
    ['remarks alone', `${header}\r\n# 2025-10-04,Barn\r\n,,,\r\n`, 'no check in this file'],
    ['an open quotation mark', good.replace('Shunt', '"Shunt'), 'Row 2 has a quotation mark'],
  ])('%s', async (_what, file, message) => {
    const { status, body } = await preview(file);
    expect([status, body.error.code]).toEqual([422, 'invalid']);
    expect(body.error.fields.file).toContain(message);
  });

  it('more bytes than fit', async () => {
    const { status, body } = await preview(Buffer.alloc(limits.tableBytes.max + 1, 0x61));
    expect([status, body.error.fields.file]).toEqual([413, 'The file is larger than 1 MB.']);
  });
});

describe('a file that is read', () => {
  const comma = (rows: RowChange[]) =>
    rows.map((row) =>
      Object.fromEntries(
        Object.entries({ ...goodRow, ...row }).map(([name, cell]) => [name, cell.replace('.', ',')]),
      ),
    );
  const accents = (text: string) => text.replace('Shunt', 'Zähler');

  it.each<[string, string | Buffer]>([
    ['with a mark before it', `\ufeff${good}`],
    ['with ; between the values and decimal commas', earlierFile(comma([{}]), ';')],
    ['with tabs and decimal commas', earlierFile(comma([{}]), '\t')],
    ['with decimal commas in quotation marks', earlierFile(comma([{}]))],
    ['in UTF-16, low byte first', utf16(accents(good))],
    ['in UTF-16, high byte first', utf16(accents(good), true)],
    ['in Windows-1252', Buffer.from(accents(good), 'latin1')],
    ['with lines ended by LF', good.replaceAll('\r\n', '\n')],
    ['with lines ended by CR', good.replaceAll('\r\n', '\r')],
    ['with names in capitals and blanks', good.replace(header, header.toUpperCase().replaceAll('_', ' '))],
    ['with blank rows, remarks and blank cells behind', `${good},,,\r\n# a remark\r\n,,,,\r\n\r\n`],
    ['with a unit behind a figure', earlierFile([{ depth_percent: '60 %', capacity_ah: '264 Ah' }])],
    ['with a day as day, month, year set apart by points', earlierFile([{ tested_on: '4.10.2025' }])],
    ['with the words of a choice as they are stored', earlierFile([{ discharge_ended_by: 'Lowest cell' }])],
    [
      'in other units',
      earlierFile([
        {
          ...{ energy_kwh: '', energy_wh: '13516.8', use_mean_it: '', use_mean_a: '28' },
          ...{ temperature_start_c: '', temperature_start_f: '77', lowest_cell_at_end_v: '' },
          ...{ lowest_cell_at_end_mv: '2600', counter_efc: '', counter_ah: '156800', duration_h: '4.7142' },
        },
      ]),
    ],
  ])('%s', async (_what, file) => {
    const { body } = await preview(file);
    expect(body.rows?.[0]).toMatchObject({ row: 2, outcome: 'good', problems: [], testedOn: '2025-10-04' });
    expect(body.rows[0].sohFraction).toBeCloseTo(264 / 280, 9);
    expect(body.counts).toEqual({ good: 1, there: 0, problem: 0 });
  });

  it('says that it was not in UTF-8, and which columns it did not read', async () => {
    const file = Buffer.from(accents(earlierFile([{ shelf: 'top' }])), 'latin1');
    const { notes } = (await preview(file)).body as EarlierReport;
    expect(notes).toEqual([
      expect.stringContaining('Windows-1252'),
      'Not read, because the template has no such column: shelf.',
    ]);
  });

  it.each<[string, RowChange, string | null, string]>([
    ['a formula in place of a figure', { capacity_ah: '=SUM(A1:A9)' }, 'capacity_ah', 'This is a formula.'],
    ['a formula in place of words', { instrument: '=HYPERLINK("x")' }, 'instrument', 'This is a formula.'],
    ['a formula in another dialect', { instrument: '@SUM(1)' }, 'instrument', 'This is a formula.'],
    ['words in place of a figure', { mean_current_a: 'about 50' }, 'mean_current_a', '"about 50" is not a'],
    ['more digits than a number has', { capacity_ah: '9'.repeat(400) }, 'capacity_ah', 'is not a number'],
    ['a figure out of its range', { temperature_end_c: '99' }, 'temperature_end_c', '−30 to 70 °C'],
    [
      'a figure in °F out of its range',
      { temperature_end_c: '', temperature_end_f: '200' },
      'temperature_end_f',
      '−22 to 158 °F',
    ],
    [
      'amperes beyond what the bank is rated for',
      { use_mean_it: '', use_mean_a: '700' },
      'use_mean_a',
      '1.4 to 560 A',
    ],
    ['a figure in two units', { energy_wh: '13516' }, 'energy_wh', 'energy_kwh is filled in this row too'],
    ['two counters', { counter_ah: '2000' }, 'counter_ah', 'counter_efc is filled in this row too'],
    [
      'no state of charge',
      { soc_mean_percent: '' },
      'soc_mean_percent',
      'Give the mean state of charge, or the daily window',
    ],
    ['no counter and no cycles', { counter_efc: '' }, 'counter_efc', 'Give a counter since new'],
    ['cells the wrong way round', { highest_cell_at_end_v: '2.2' }, 'highest_cell_at_end_v', 'below'],
    ['a day that can be read in two ways', { tested_on: '4/10/2025' }, 'tested_on', 'year-month-day'],
    ['a day that is none', { tested_on: '2025-02-30' }, 'tested_on', 'year-month-day'],
    ['a duration that is none', { duration_h: 'all day' }, 'duration_h', 'is not a number'],
    ['a word that is no choice', { method: 'guess' }, 'method', 'none of: discharge, charge'],
    ['a source of no column', { estimated: 'depth_percent colour' }, 'estimated', '"colour" is no column'],
    [
      'two sources of one column',
      { estimated: 'depth_percent', metered: 'depth' },
      'estimated',
      'depth_percent stands in metered too',
    ],
    ['control characters', { note: 'a\u0007b' }, 'note', 'control characters'],
    ['a name that is too long', { instrument: 'x'.repeat(90) }, 'instrument', 'Keep it to 80 characters'],
  ])('names %s by row and column', async (_what, change, column, message) => {
    const { status, body } = await preview(
      earlierFile([{ tested_on: '2024-10-04', counter_efc: '9' }, change]),
    );
    expect(status).toBe(200);
    expect(body.rows[0].outcome).toBe('good');
    expect(body.rows[1]).toMatchObject({ row: 3, outcome: 'problem' });
    expect(body.rows[1].problems).toHaveLength(1);
    expect(body.rows[1].problems[0].column).toBe(column);
    const spaced = (text: string) => text.replace(/[\u202f\u00a0]/g, ' ');
    expect(spaced(body.rows[1].problems[0].message as string)).toContain(message);
  });

  it('names a row that a decimal comma has made too long', async () => {
    const { body } = await preview(good.replace(',13.5168,', ',13,5168,'));
    expect(body.rows[0].problems[0]).toMatchObject({
      column: null,
      message: expect.stringContaining('quotation marks'),
    });
  });
});

describe('GET /api/earlier-checks/template.csv', () => {
  it.each([
    ['point', ','],
    ['comma', ';'],
  ])('with decimal %s is read by its names, and its example is a good row', async (style, delimiter) => {
    const { status, text, headers } = await owner.get(`/api/earlier-checks/template.csv?style=${style}`);
    expect(status).toBe(200);
    expect(headers['content-disposition']).toContain('ebbline-earlier-checks.csv');
    const { data } = Papa.parse<string[]>(text.replace(/^\ufeff/, ''), { delimiter });
    const [names = [], example = []] = data;
    expect(everyHeader).toEqual(expect.arrayContaining(names.slice(0, -3)));
    expect(names.slice(-3)).toEqual(['metered', 'read_off', 'estimated']);
    expect(example).toHaveLength(names.length);
    expect((await preview(text)).body.error.fields.file).toContain('no check in this file');
    const filled = Papa.unparse([names, [example[0]!.replace('# example ', ''), ...example.slice(1)]], {
      delimiter,
    });
    const { body } = await preview(filled);
    expect(body.rows).toMatchObject([{ outcome: 'good', problems: [], testedOn: '2025-10-04' }]);
  });

  it('says of each column what it holds, in which range, and whether it is needed', async () => {
    const { text } = await owner.get('/api/earlier-checks/template.csv');
    expect(text).toContain('# capacity_ah: Charge, of the whole bank; 0.1 to 200,000 Ah; needed.');
    expect(text).toContain('# Your banks: Barn');
    for (const name of text.slice(1).split('\r\n')[0]!.split(','))
      if (!/^counter_(ah|kwh)$/.test(name)) expect(text).toMatch(new RegExp(`# ${name}: `));
  });

  it('is for people with an account', async () => {
    expect((await (await server.client()).get('/api/earlier-checks/template.csv')).status).toBe(401);
    expect((await owner.get('/api/earlier-checks/template.csv?style=tabs')).status).toBe(422);
  });
});
