import type { Page } from 'playwright-core';

import { Bank } from '@/server/db/models';

import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';
import { fillBank, nextStep } from '../support/ownerSteps';
import { unsoundness } from '../support/pageSoundness';

jest.setTimeout(180_000);

let demo: Demo;
let page: Page;
let bankId: string;

beforeAll(async () => {
  demo = await startDemo();
  page = await demo.open({ viewport: { width: 390, height: 844 } });
  await signInOn(page, 'owner@demo.example');
  await page.goto('/banks');
  await fillBank(page, 'At the bank', '2023-05');
  await page.getByRole('button', { name: 'Add the bank' }).click();
  await page.getByRole('heading', { name: 'At the bank', level: 1 }).waitFor();
  bankId = (await Bank.findOne({ where: { name: 'At the bank' }, rejectOnEmpty: true })).id;
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

const stage = (title: string) => page.getByRole('heading', { name: title, level: 1 }).waitFor();
const goOn = (label: string) => page.getByRole('button', { name: label }).click();

/** Seconds since the stage began, as the clock on the page says: "0:12:05". */
async function elapsed(label: string): Promise<number> {
  const text = (await page.getByRole('timer', { name: new RegExp(`^${label}`) }).textContent()) ?? '';
  const [, hours = '0', minutes = '0', seconds = '0'] = /(\d+):(\d\d):(\d\d)/.exec(text) ?? [];
  return Number(hours) * 3600 + Number(minutes) * 60 + Number(seconds);
}

describe('running the test', () => {
  it('goes no further before the cautions are acknowledged', async () => {
    await page.getByRole('link', { name: 'Run the test' }).click();
    await stage('Run the test');
    await goOn('Begin with the full charge');
    await page
      .getByText(/cautions/i)
      .first()
      .waitFor();
    await stage('Run the test');
    await page.getByRole('checkbox', { name: /^I have read the cautions/ }).click();
    expect(await unsoundness(page)).toEqual([]);
    await goOn('Begin with the full charge');
    await stage('Charge it full');
  });

  it('times a stage by when it began: right after a reload, an hour asleep, and from another page', async () => {
    await goOn('It is full: start the rest');
    await stage('Let it rest');
    await page.reload();
    await stage('Let it rest');
    expect(await elapsed('Rest')).toBeLessThan(60);
    // As if the phone had slept for 61 minutes: the instant kept on the device lies that far back.
    await page.evaluate(() => {
      for (const key of Object.keys(localStorage).filter((one) => one.includes('/test/'))) {
        const text = localStorage.getItem(key)!;
        const hourAgo = new Date(Date.now() - 61 * 60_000).toISOString();
        localStorage.setItem(key, text.replace(/(rest\\?":\\?")[^"\\]+/, `$1${hourAgo}`));
      }
    });
    await page.reload();
    await page.getByText('The bank has rested for an hour').first().waitFor();
    expect(await elapsed('Rest')).toBeGreaterThanOrEqual(61 * 60);
    await page.goto(`/banks/${bankId}`);
    await page.getByRole('link', { name: 'To the test' }).click();
    await stage('Let it rest');
  });

  it('takes the readings noted on the way into the form', async () => {
    await goOn('The load is on: start the discharge');
    await stage('Discharge it');
    await page.getByText(/0\.2/).first().waitFor();
    await page.getByRole('textbox', { name: 'Lowest cell at the end' }).fill('2.61');
    expect(await unsoundness(page)).toEqual([]);
    await goOn('I have stopped the load');
    await stage('Recharge it at once');
    await page.getByRole('textbox', { name: 'Charge taken out' }).fill('226.4');
    await goOn('It is charging, and noted');
    await stage('Into the form');
    await goOn('On to the form of the check');
    await page.waitForURL(/\/check$/);
    // The form keeps what it took over as its own draft.
    await page.waitForFunction(() =>
      Object.keys(localStorage).some(
        (key) => key.includes('/check/') && localStorage.getItem(key)!.includes('226.4'),
      ),
    );
  });
});

describe('the log’s window', () => {
  it('is moved by the arrow keys and says where it stands', async () => {
    await page.goto('/banks');
    await fillBank(page, 'With a log', '2023-05');
    await page.getByRole('button', { name: 'Add the bank' }).click();
    await page.getByRole('link', { name: 'Add a check' }).first().click();
    await page.getByRole('checkbox', { name: /^I have read the cautions/ }).click();
    await nextStep(page, 'The log, or typed');
    await page.getByRole('radio', { name: /^I have a log of it/ }).click();
    const chooser = page.waitForEvent('filechooser');
    await page.getByRole('button', { name: /^Choose a file/ }).click();
    await (await chooser).setFiles('data/demo/logs/house-bank-2026-11-07.csv');
    const edge = page.getByRole('slider', { name: 'Counted to' });
    await edge.focus();
    const before = await edge.getAttribute('aria-valuetext');
    await page.keyboard.press('ArrowLeft');
    await page.keyboard.press('ArrowLeft');
    expect(await edge.getAttribute('aria-valuetext')).not.toBe(before);
  });
});
