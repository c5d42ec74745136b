import { join } from 'node:path';

import type { Page } from 'playwright-core';

import { Bank, Check, Session, User } from '@/server/db/models';

import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';
import { describeTest, fillBank, nextStep } from '../support/ownerSteps';
import { unsoundness } from '../support/pageSoundness';
import { drawPicture } from '../support/pictures';

jest.setTimeout(180_000);

let demo: Demo;
let page: Page;
let bankId: string;

beforeAll(async () => {
  demo = await startDemo();
  page = await demo.open({ viewport: { width: 390, height: 844 }, serviceWorkers: 'allow' });
  await signInOn(page, 'owner@demo.example');
  await page.goto('/banks');
  await fillBank(page, 'No signal', '2023-05');
  await page.getByRole('button', { name: 'Add the bank' }).click();
  await page.getByRole('heading', { name: 'No signal', level: 1 }).waitFor();
  bankId = (await Bank.findOne({ where: { name: 'No signal' }, rejectOnEmpty: true })).id;
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

const checks = () => Check.count({ where: { bankId } });
const field = (name: string) => page.getByRole('textbox', { name });

/** Waits until the shell is kept, and a page has been loaded under it. */
async function settleShell(): Promise<void> {
  await page.evaluate(async () => {
    await navigator.serviceWorker.ready;
  });
  await page.reload();
  await page.waitForFunction(() => navigator.serviceWorker.controller !== null);
}

/** From the page of the bank to the last step of a check whose figures are typed. */
async function typeCheck(): Promise<void> {
  await page.getByRole('link', { name: 'Add a check' }).first().click();
  await page.getByRole('checkbox', { name: /^I have read the cautions/ }).click();
  await nextStep(page, 'The log, or typed');
  await page.getByRole('radio', { name: /^I type what the meter shows/ }).click();
  await field('Day of the test').fill('2026-11-28');
  await page.getByRole('radio', { name: /^Counted while discharging/ }).click();
  await describeTest(page, async (step) => {
    if (step === 'meter') {
      await field('Charge taken out').fill('226.4');
      await field('Energy taken out').fill('11.57');
      await field('Discharge current, mean').fill('48');
      await field('Duration').fill('4:43');
      await field('Cells at the start').fill('21');
      await field('Cells at the end').fill('24');
      const chooser = page.waitForEvent('filechooser');
      await page.getByRole('button', { name: 'Choose a picture' }).click();
      const buffer = await drawPicture(600, 800).jpeg().toBuffer();
      await (await chooser).setFiles({ name: 'meter.jpg', mimeType: 'image/jpeg', buffer });
      await page.getByText('meter.jpg is kept on this device').waitFor();
      expect(await unsoundness(page)).toEqual([]);
    }
    if (step === 'ends') {
      await field('Highest cell at full').fill('3.46');
      await field('Lowest cell at the end').fill('2.6');
    }
  });
}

/** The steps are one story: each stands on the one before. */
describe('without a network', () => {
  it('the pages open, reloaded or anew, and know the banks', async () => {
    await settleShell();
    await page.goto(`/banks/${bankId}`);
    await page.getByRole('heading', { name: 'No signal', level: 1 }).waitFor();
    await page.context().setOffline(true);
    await page.reload();
    await page.getByRole('heading', { name: 'No signal', level: 1 }).waitFor();
    await page.goto('/banks');
    await page.getByRole('link', { name: 'House bank' }).waitFor();
    await page.getByRole('link', { name: 'No signal' }).click();
    await page.getByRole('heading', { name: 'No signal', level: 1 }).waitFor();
  });

  it('a check is filled in, kept over a reload, and waits when it is sent', async () => {
    await typeCheck();
    await page.reload();
    await page.getByRole('heading', { name: 'Look over and send', level: 1 }).waitFor();
    await page.getByRole('button', { name: 'Go on' }).click();
    await page.getByRole('button', { name: 'Send the check' }).click();
    await page.getByText('A check waits to be sent').waitFor();
    expect(await unsoundness(page)).toEqual([]);
    await page.reload();
    await page.getByText('A check waits to be sent').waitFor();
    expect(await checks()).toBe(0);
  });

  it('what waits is sent once when the network is back, its photo with it, and said', async () => {
    await page.context().setOffline(false);
    await page.getByText('The check of No signal that waited is sent.').waitFor();
    await page.getByText('A check waits to be sent').waitFor({ state: 'hidden' });
    expect(await checks()).toBe(1);
    const { photoId } = await Check.findOne({ where: { bankId }, rejectOnEmpty: true });
    expect(photoId).not.toBeNull();
    await page.reload();
    await page.getByRole('heading', { name: 'No signal', level: 1 }).waitFor();
    await page.waitForLoadState('networkidle');
    expect(await checks()).toBe(1);
  });

  it('a check whose answer was lost is not stored twice', async () => {
    const other = await demo.open({ viewport: { width: 390, height: 844 } });
    await signInOn(other, 'owner@demo.example');
    await other.goto(`/banks/${bankId}`);
    // The server stores it, and the answer never arrives.
    await other.route(`**/api/banks/${bankId}/checks`, async (route) => {
      if (route.request().method() !== 'POST') return route.continue();
      await route.fetch();
      // The page may have gone on meanwhile.
      await route.abort().catch(() => undefined);
    });
    const before = page;
    page = other;
    await page.context().setOffline(false);
    await page.getByRole('link', { name: 'Add a check' }).first().click();
    await page.getByRole('checkbox', { name: /^I have read the cautions/ }).click();
    await nextStep(page, 'The log, or typed');
    await page.getByRole('radio', { name: /^I have a log of it/ }).click();
    const logs = join(__dirname, '../../data/demo/logs');
    await page.locator('input[type=file]').setInputFiles(join(logs, 'barn-2026-11-14.csv'));
    await page.getByRole('button', { name: 'Use these figures' }).click();
    await describeTest(page);
    await page.getByRole('button', { name: 'Send the check' }).click();
    await page.getByText('A check waits to be sent').waitFor();
    expect(await checks()).toBe(2);
    await other.unroute(`**/api/banks/${bankId}/checks`);
    await page.reload();
    await page.getByText('The check of No signal that waited is sent.').waitFor();
    expect(await checks()).toBe(2);
    page = before;
    await other.context().close();
  });
});

describe('an account on a device', () => {
  it('whose sign-in has run out signs in again in place and goes on with what was typed', async () => {
    await page.goto(`/banks/${bankId}/check`);
    await page.getByRole('checkbox', { name: /^I have read the cautions/ }).click();
    await nextStep(page, 'The log, or typed');
    await field('Meter').fill('Shunt in the barn');
    await page
      .getByText(/^saved on this/)
      .first()
      .waitFor();
    const { id: userId } = await User.findOne({
      where: { email: 'owner@demo.example' },
      rejectOnEmpty: true,
    });
    await Session.destroy({ where: { userId } });
    await page.context().clearCookies();
    await page.reload();
    await page.getByRole('heading', { name: 'Sign in again' }).waitFor();
    expect(await unsoundness(page)).toEqual([]);
    expect(await page.getByRole('textbox', { name: 'E-mail address' }).inputValue()).toBe(
      'owner@demo.example',
    );
    await page.getByRole('textbox', { name: 'Password' }).fill('ebb-and-flow-2026');
    await page.getByRole('button', { name: 'Sign in', exact: true }).click();
    await page.getByRole('heading', { name: 'The log, or typed', level: 1 }).waitFor();
    expect(await field('Meter').inputValue()).toBe('Shunt in the barn');
    expect(new URL(page.url()).pathname).toBe(`/banks/${bankId}/check`);
  });

  it('leaves nothing of its banks to the next one, and finds its draft again', async () => {
    await page.goto('/settings');
    await page.getByRole('button', { name: 'Sign out here' }).click();
    await page.getByRole('heading', { name: 'You are signed out' }).waitFor();
    await page.context().setOffline(true);
    await page.goto('/banks');
    await page.getByRole('heading', { name: 'No connection' }).waitFor();
    expect(await page.getByText('No signal').count()).toBe(0);
    await page.context().setOffline(false);
    await signInOn(page, 'owner2@demo.example');
    await page.goto(`/banks/${bankId}/check`);
    await page.getByRole('alert').getByRole('heading', { name: 'Not found' }).waitFor();
    expect(await page.getByText('Shunt in the barn').count()).toBe(0);
    await page.goto('/settings');
    await page.getByRole('button', { name: 'Sign out here' }).click();
    await page.getByRole('heading', { name: 'You are signed out' }).waitFor();
    await signInOn(page, 'owner@demo.example');
    await page.goto(`/banks/${bankId}/check`);
    await page.getByText('Taken up where you left off').waitFor();
    expect(await field('Meter').inputValue()).toBe('Shunt in the barn');
  });
});
