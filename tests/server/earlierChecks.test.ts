import { randomUUID } from 'node:crypto';

import type { EarlierReport } from '@/lib/contract/earlierChecks';
import { consent } from '@/lib/contract/consent';
import { limits } from '@/lib/contract/limits';
import { Check, Finding, TrailEntry } from '@/server/db/models';

import { checkInput, createBankOf, createCellType } from '../support/bankFixtures';
import { earlierFile, type RowChange } from '../support/earlierFile';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;
let bankId: string;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
});
afterAll(() => server.stop());
beforeEach(async () => {
  owner = await server.client('owner');
  bankId = await createBankOf(owner);
});

type Fields = Record<string, string>;

const post = (path: string, file: string | Buffer, fields: Fields, client = owner) => {
  const request = client.send('post', path);
  for (const [name, value] of Object.entries(fields)) request.field(name, value);
  return request.attach('file', Buffer.from(file), 'checks.csv');
};
const preview = (file: string | Buffer, fields: Fields = {}) =>
  post('/api/earlier-checks/preview', file, fields);
const agreed = { consent: String(consent.version) };

/** Looks at a file and sends it, as the page does. */
async function send(file: string, choice = 'allOrNothing', fields: Fields = {}): Promise<EarlierReport> {
  const { body } = await preview(file, fields);
  const answer = await post('/api/earlier-checks', file, {
    ...fields,
    ...agreed,
    choice,
    digest: body.digest,
  });
  expect([answer.status, answer.body.error]).toEqual([200, undefined]);
  return answer.body;
}

const years: RowChange[] = [
  { tested_on: '2025-10-04', counter_efc: '560' },
  { tested_on: '2023-10-01', counter_efc: '130', capacity_ah: '275', energy_kwh: '14.08' },
  { tested_on: '2024-10-02', counter_efc: '340', capacity_ah: '270', energy_kwh: '13.824' },
];
const problemsOf = ({ rows }: EarlierReport, row: number) =>
  rows.find((one) => one.row === row)?.problems.map(({ column }) => column);

describe('POST /api/earlier-checks/preview', () => {
  it('says what each row comes to and stores nothing', async () => {
    const trail = await TrailEntry.count();
    const { status, body } = await preview(earlierFile(years));
    expect(status).toBe(200);
    expect(body.counts).toEqual({ good: 3, there: 0, problem: 0 });
    expect(body.isStored).toBe(false);
    expect(body.rows.map(({ row }: { row: number }) => row)).toEqual([2, 3, 4]);
    // At 25 °C and 56 A = 0.2 It of 280 Ah the charge counted is the capacity at reference conditions.
    expect(body.rows[0]).toMatchObject({ bankId, bankName: 'Barn', outcome: 'good', checkId: null });
    expect(body.rows[0].capacityRefAh).toBeCloseTo(264, 9);
    expect(body.rows[0].sohFraction).toBeCloseTo(264 / 280, 9);
    expect(await Check.count({ where: { bankId } })).toBe(0);
    expect(await Finding.count()).toBe(0);
    expect(await TrailEntry.count()).toBe(trail);
  });

  it('names every problem of every row by its column, in the unit of the column', async () => {
    const file = earlierFile([
      { capacity_ah: '-3', tested_on: '4/10/2025' },
      {},
      { bank: 'Attic', depth_percent: '600', method: 'guess' },
      { tested_on: '2031-01-01', energy_kwh: '' },
      { tested_on: '2031-01-01' },
    ]);
    const { body } = await preview(file);
    expect(body.counts).toEqual({ good: 1, there: 0, problem: 4 });
    expect(problemsOf(body, 2)).toEqual(['tested_on', 'capacity_ah']);
    expect(problemsOf(body, 4)).toEqual(['bank', 'method', 'depth_percent']);
    expect(problemsOf(body, 5)).toEqual(['energy_kwh']);
    expect(problemsOf(body, 6)).toEqual(['tested_on']);
    const messages = (row: number) =>
      body.rows[row - 2].problems.map(({ message }: { message: string }) => message).join(' ');
    expect(messages(2)).toContain('Enter a number from 0.1 to 200,000 Ah.');
    expect(messages(4)).toContain('Enter a number from 5 to 100 %.');
    expect(messages(4)).toContain('None of your banks is called so.');
    expect(messages(6)).toContain('lies in the future');
  });

  it('hands the rows with a problem back as a file, which can be corrected and sent', async () => {
    const { body } = await preview(
      earlierFile([{}, { tested_on: '2024-10-02', counter_efc: '340', capacity_ah: 'much' }]),
    );
    expect(body.leftOver).toContain('capacity_ah: ""much"" is not a number.');
    const again = await preview((body.leftOver as string).replace(',much,', ',264,'));
    expect(again.body.counts).toEqual({ good: 1, there: 0, problem: 0 });
    expect(again.body.notes).toEqual([]);
  });

  it('says what stands out, as the screening of a single check does', async () => {
    const { body } = await preview(earlierFile([{ energy_kwh: '27' }]));
    expect(body.rows[0].outcome).toBe('good');
    expect(body.rows[0].remarks.length).toBeGreaterThan(0);
  });

  it('takes rows without a bank for those of the bank it is opened from, and no other bank then', async () => {
    await createBankOf(owner, { name: 'Attic' });
    const file = earlierFile([
      { bank: '' },
      { bank: 'Attic', tested_on: '2024-10-04' },
      { tested_on: '2023-10-04', counter_efc: '9' },
    ]);
    const { body } = await preview(file, { bankId });
    expect(body.rows.map(({ outcome }: { outcome: string }) => outcome)).toEqual(['good', 'problem', 'good']);
    expect(problemsOf(body, 3)).toEqual(['bank']);
    expect(problemsOf((await preview(file)).body, 2)).toEqual(['bank']);
  });

  it('asks for the id where two banks have the same name', async () => {
    const second = await createBankOf(owner, { name: 'barn ' });
    const { body } = await preview(earlierFile([{}, { bank: second }]));
    expect(body.rows[0].problems[0].message).toContain(second);
    expect(body.rows[1]).toMatchObject({ bankId: second, outcome: 'good' });
  });

  it("answers 404 for others' banks, 401 to visitors, and 422 without a file", async () => {
    const other = await server.client('owner');
    const others = await createBankOf(other);
    expect((await preview(earlierFile([{}]), { bankId: others })).status).toBe(404);
    expect((await preview(earlierFile([{}]), { bankId: randomUUID() })).status).toBe(404);
    const visitor = await server.client();
    expect((await post('/api/earlier-checks/preview', earlierFile([{}]), {}, visitor)).status).toBe(401);
    const without = await owner.send('post', '/api/earlier-checks/preview').field('bankId', '');
    expect([without.status, Object.keys(without.body.error.fields as object)]).toEqual([422, ['file']]);
    // Others' banks are nobody's by their names either.
    await createBankOf(other, { name: 'Lighthouse' });
    const { body } = await preview(earlierFile([{ bank: 'Lighthouse' }]));
    expect(problemsOf(body, 2)).toEqual(['bank']);
  });
});

describe('POST /api/earlier-checks', () => {
  it('stores every row as a submitted check, each computed from the ones before it', async () => {
    const byCycles = years.map((year) => ({ ...year, counter_efc: '', cycles_per_day: '0.9' }));
    const report = await send(earlierFile(byCycles));
    expect([report.isStored, report.counts.good]).toEqual([true, 3]);
    const checks = await Check.findAll({ where: { bankId }, order: [['testedOn', 'ASC']] });
    expect(checks.map(({ testedOn, state }) => [testedOn, state])).toEqual([
      ['2023-10-01', 'submitted'],
      ['2024-10-02', 'submitted'],
      ['2025-10-04', 'submitted'],
    ]);
    expect(report.rows.map(({ checkId }) => checkId).sort()).toEqual(checks.map(({ id }) => id).sort());
    // 2023-10-01 to 2024-10-02 are 367 days, and 367 more to 2025-10-04; 0.6 x 0.9 full cycles on each.
    expect(checks[1]!.efc - checks[0]!.efc).toBeCloseTo(367 * 0.6 * 0.9, 6);
    expect(checks[2]!.efc - checks[1]!.efc).toBeCloseTo(367 * 0.6 * 0.9, 6);
    expect(checks[0]).toMatchObject({ uploadId: null, photoId: null, consentVersion: consent.version });
    expect(checks[0]!.sources).toMatchObject({ capacityAh: 'metered' });
  });

  it('stores what the form would have stored', async () => {
    await send(
      earlierFile([
        {
          tested_on: '2026-10-03',
          duration_h: '4:42:51',
          counter_efc: '780',
          metered: 'capacity_ah',
          read_off: 'temperature_mean_c',
        },
      ]),
    );
    const { reading, conditions } = checkInput();
    const check = await Check.findOne({ where: { bankId }, rejectOnEmpty: true });
    expect(check.reading).toMatchObject(reading);
    expect(check.conditions).toMatchObject(conditions);
    expect(check.sources).toEqual({
      ...{ capacityAh: 'metered', energyWh: 'metered', meanCurrentA: 'metered', durationS: 'metered' },
      temperatureMeanC: 'readOff',
    });
    const [entry] = await TrailEntry.findAll({ where: { subjectId: check.id } });
    expect(entry).toMatchObject({ action: 'submitted', details: { consent: 1, fromFile: { row: 2 } } });
    const single = await createBankOf(owner, { name: 'Typed' });
    await owner.send('post', `/api/banks/${single}/checks`, checkInput());
    const typed = await Check.findOne({ where: { bankId: single }, rejectOnEmpty: true });
    expect(check.computed).toEqual(typed.computed);
    const rulesOf = async (checkId: string) =>
      (await Finding.findAll({ where: { checkId } })).map(({ rule, severity }) => [rule, severity]).sort();
    expect(await rulesOf(check.id)).toEqual(await rulesOf(typed.id));
  });

  it('stores nothing when a row has a problem and all were wanted, the good ones when those were', async () => {
    const file = earlierFile([...years, { tested_on: '2022-01-01', counter_efc: '1' }]);
    const whole = await send(file);
    expect([whole.isStored, whole.counts]).toEqual([false, { good: 3, there: 0, problem: 1 }]);
    expect(whole.rows[0]!.checkId).toBeNull();
    expect(await Check.count({ where: { bankId } })).toBe(0);
    const some = await send(file, 'goodRows');
    expect([some.isStored, some.counts]).toEqual([true, { good: 3, there: 0, problem: 1 }]);
    expect(problemsOf(some, 5)).toEqual(['tested_on']);
    expect(await Check.count({ where: { bankId } })).toBe(3);
  });

  it('names the rows that are there already, and stores none twice', async () => {
    const file = earlierFile(years);
    const first = await send(file);
    const again = await send(file);
    expect(again.counts).toEqual({ good: 0, there: 3, problem: 0 });
    expect(again.rows.map(({ checkId }) => checkId)).toEqual(first.rows.map(({ checkId }) => checkId));
    expect(await Check.count({ where: { bankId } })).toBe(3);
    const other = await send(earlierFile([{ capacity_ah: '250', energy_kwh: '12.8' }]));
    expect(other.rows[0]!.problems[0]!.message).toContain('is there already, with other figures');
  });

  it('stores one of each when the same file arrives several times at once', async () => {
    const file = earlierFile(years);
    const { body } = await preview(file);
    const fields = { ...agreed, choice: 'allOrNothing', digest: body.digest };
    const answers = await Promise.all([1, 2, 3].map(() => post('/api/earlier-checks', file, fields)));
    expect(answers.map(({ body: { counts } }) => counts.good).sort()).toEqual([0, 0, 3]);
    expect(await Check.count({ where: { bankId } })).toBe(3);
  });

  it('takes a row anew whose check was withdrawn', async () => {
    const { rows } = await send(earlierFile([{}]));
    await owner.send('post', `/api/checks/${rows[0]!.checkId}/withdraw`, { version: 1 });
    expect((await send(earlierFile([{}]))).counts.good).toBe(1);
  });

  it('names rows of the same day: a repeat counts once, other figures are a problem', async () => {
    const report = await send(earlierFile([{}, {}, { capacity_ah: '200', energy_kwh: '10.24' }]), 'goodRows');
    expect(report.rows.map(({ outcome }) => outcome)).toEqual(['good', 'there', 'problem']);
    expect(report.rows[1]!.remarks).toEqual(['The same as row 2; it counts once.']);
    expect(report.rows[2]!.problems[0]).toEqual({
      column: 'tested_on',
      message: 'Row 2 is of the same bank and day, with other figures.',
    });
  });

  it('takes many banks at once and screens those that wait anew', async () => {
    const attic = await createBankOf(owner, { name: 'Attic' });
    await owner.send('post', `/api/banks/${attic}/checks`, checkInput());
    const before = await Check.findOne({ where: { bankId: attic }, rejectOnEmpty: true });
    const findings = () => Finding.count({ where: { checkId: before.id, rule: 'capacityDrop' } });
    const without = await findings();
    await send(earlierFile([{}, { bank: 'ATTIC' }]));
    expect(await Check.count({ where: { bankId } })).toBe(1);
    expect(await Check.count({ where: { bankId: attic } })).toBe(2);
    expect([without, await findings()]).toEqual([0, 1]);
  });

  it('asks for consent to the licence, a choice, and the file that was looked at', async () => {
    const file = earlierFile([{}]);
    const { body } = await preview(file);
    const whole = { ...agreed, choice: 'goodRows', digest: body.digest as string };
    const fieldsOf = async (fields: Fields) =>
      Object.keys((await post('/api/earlier-checks', file, fields)).body.error.fields as object);
    expect(await fieldsOf({ ...whole, consent: '0' })).toEqual(['consent']);
    expect(await fieldsOf({ ...whole, choice: 'some' })).toEqual(['choice']);
    expect(await fieldsOf({ ...whole, digest: '' })).toEqual(['digest']);
    const changed = await post('/api/earlier-checks', earlierFile([{ capacity_ah: '263' }]), whole);
    expect([changed.status, changed.body.error.code]).toEqual([409, 'conflict']);
    expect(await Check.count({ where: { bankId } })).toBe(0);
    const visitor = await server.client();
    expect((await post('/api/earlier-checks', file, whole, visitor)).status).toBe(401);
    const others = await createBankOf(await server.client('owner'));
    expect((await post('/api/earlier-checks', file, { ...whole, bankId: others })).status).toBe(404);
  });

  it('takes as many rows as fit, and says from where on a second file is needed', async () => {
    const day = (index: number) =>
      new Date(Date.UTC(2023, 5, 1) + index * 86_400_000).toISOString().slice(0, 10);
    const rows = Array.from({ length: limits.tableRows.max + 1 }, (_one, index) => ({
      tested_on: day(index),
      counter_efc: String(50 + index * 0.5),
    }));
    const tooMany = await preview(earlierFile(rows));
    expect(tooMany.status).toBe(422);
    expect(tooMany.body.error.fields.file).toContain(`from ${limits.tableRows.max + 2} on`);
    const ofOne = await preview(earlierFile(rows.slice(0, limits.tableRowsOfBank.max + 1)));
    expect([ofOne.status, ofOne.body.error.fields.file]).toEqual([
      422,
      expect.stringContaining(`more than ${limits.tableRowsOfBank.max} checks of Barn`),
    ]);
  });
});
