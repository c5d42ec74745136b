import { join } from 'node:path';

import type { Page } from 'playwright-core';

import { Bank, Check, User } from '@/server/db/models';

import { type Actions, countActions } from '../support/countActions';
import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';
import { earlierFile, type RowChange } from '../support/earlierFile';
import { addBank, describeTest, newPassword, register, uploadLog } from '../support/ownerSteps';
import { unsoundness } from '../support/pageSoundness';

jest.setTimeout(240_000);

const email = 'first-time@example.org';
const log = join(__dirname, '../../data/demo/logs/barn-2026-11-14.csv');
const mostActions = 60;
const mostMs = 240_000;

let demo: Demo;
let page: Page;

beforeAll(async () => {
  demo = await startDemo();
  page = await demo.open({ viewport: { width: 390, height: 844 } });
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

async function bankOf(name: string): Promise<Bank> {
  const { id: ownerId } = await User.findOne({ where: { email }, rejectOnEmpty: true });
  return Bank.findOne({ where: { ownerId, name }, rejectOnEmpty: true });
}

it('gets from the registration to a check that is sent in at most 60 fields and taps', async () => {
  const parts: [string, number, number][] = [];
  const startedAt = performance.now();
  const actions: Actions = countActions(page);
  const part = async (name: string, work: () => Promise<void>) => {
    const before = [actions.fields.length, actions.taps.length] as const;
    await work();
    parts.push([name, actions.fields.length - before[0], actions.taps.length - before[1]]);
  };
  try {
    await part('account', async () => {
      await register(page, email);
      await signInOn(page, email, newPassword);
    });
    await part('bank', () => addBank(page, 'Barn'));
    await part('log', () => uploadLog(page, log));
    await part('test and life', () => describeTest(page));
    await part('sending', async () => {
      await page.getByRole('button', { name: 'Send the check' }).click();
      await page.getByText('Sent. A moderator looks at it next.').waitFor();
    });
  } finally {
    actions.stop();
  }
  const took = performance.now() - startedAt;
  const total = actions.fields.length + actions.taps.length;
  const each = parts.map(([name, fields, taps]) => `${name} ${fields} + ${taps}`).join(', ');
  process.stdout.write(
    `First check by the log: ${actions.fields.length} fields + ${actions.taps.length} taps = ${total} (${each}), ` +
      `${(took / 1000).toFixed(0)} s without anybody reading or thinking\n`,
  );
  expect(total).toBeLessThanOrEqual(mostActions);
  expect(took).toBeLessThan(mostMs);
  expect(await Check.count({ where: { bankId: (await bankOf('Barn')).id } })).toBe(1);
});

describe('earlier checks from a file', () => {
  // The bank is of 240 Ah and 16 in series: 226 Ah x 16 x 3.2 V = 11.5712 kWh, 226 Ah / 48 A = 4.708 h.
  const ofBarn: RowChange = {
    ...{ capacity_ah: '226', energy_kwh: '11.5712', mean_current_a: '48', duration_h: '4:42' },
    ...{ tested_on: '2025-11-10', counter_efc: '400' },
  };
  const rows = [ofBarn, { ...ofBarn, tested_on: '2024-11-09', counter_efc: '210', depth_percent: '600' }];
  const pick = (content: string) =>
    page
      .locator('input[type=file]')
      .setInputFiles({ name: 'notebook.csv', mimeType: 'text/csv', buffer: Buffer.from(content) });

  it('are offered beside the checks, with a template', async () => {
    await page.goto('/banks');
    await page.getByRole('link', { name: 'Add earlier checks' }).first().click();
    await page.getByRole('heading', { name: 'Add earlier checks', level: 1 }).waitFor();
    const download = page.waitForEvent('download');
    await page.getByRole('button', { name: 'Template, decimal point' }).click();
    expect((await download).suggestedFilename()).toBe('ebbline-earlier-checks.csv');
    await page.getByRole('button', { name: 'What each column holds' }).click();
    expect(await unsoundness(page)).toEqual([]);
  });

  it('are refused whole where the file is none, in words', async () => {
    await pick('name,price\nbolt,3\n');
    await page
      .getByRole('alert')
      .getByText(/none of the template's columns/)
      .waitFor();
  });

  it('are looked at row by row, and none is sent while all are wanted and one has a problem', async () => {
    await pick(earlierFile(rows));
    await page.getByText('1 row is good, 1 has a problem.').waitFor();
    await page.getByText(/^depth_percent: Enter a number from 5 to 100 %/).waitFor();
    expect(await page.getByRole('button', { name: /^Send / }).count()).toBe(0);
    expect(await unsoundness(page)).toEqual([]);
    const download = page.waitForEvent('download');
    await page.getByRole('button', { name: 'Save the rows with a problem' }).click();
    expect((await download).suggestedFilename()).toBe('ebbline-rows-to-correct.csv');
  });

  it('send the good rows where the owner says so, and the rest once corrected', async () => {
    await page.getByRole('radio', { name: /^Only the good rows: 1 check/ }).click();
    await page.getByRole('button', { name: 'Send 1 check', exact: true }).click();
    await page.getByText('1 row is sent, 1 has a problem.').waitFor();
    expect(await unsoundness(page)).toEqual([]);
    await page.getByRole('button', { name: 'Add another file' }).click();
    await pick(earlierFile([rows[0]!, { ...rows[1]!, depth_percent: '60' }]));
    await page.getByText('1 row is good, 1 is there already.').waitFor();
    await page.getByRole('button', { name: 'Send 1 check', exact: true }).click();
    await page.getByText('1 row is sent, 1 is there already.').waitFor();
    expect(await Check.count({ where: { bankId: (await bankOf('Barn')).id } })).toBe(3);
    await page.getByRole('link', { name: 'To my banks', exact: true }).click();
    await page.getByText(/3 checks, the last on/).waitFor();
  });
});
