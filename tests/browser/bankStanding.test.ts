import type { Page } from 'playwright-core';

import { Bank, HealthRecord, User } from '@/server/db/models';

import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';
import { unsoundness } from '../support/pageSoundness';

jest.setTimeout(180_000);

let demo: Demo;
let page: Page;
let link: string;

beforeAll(async () => {
  demo = await startDemo();
  page = await demo.open({ viewport: { width: 390, height: 844 } });
  await signInOn(page, 'owner@demo.example');
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

async function openBank(): Promise<Bank> {
  const { id: ownerId } = await User.findOne({ where: { email: 'owner@demo.example' }, rejectOnEmpty: true });
  const bank = await Bank.findOne({ where: { ownerId, name: 'House bank' }, rejectOnEmpty: true });
  await page.goto(`/banks/${bank.id}`);
  await page.getByRole('heading', { name: 'Among banks used like it', exact: true }).waitFor();
  return bank;
}

describe('my bank', () => {
  it('stands on the lines of banks used like it, in words and with a forecast', async () => {
    await openBank();
    const chart = page.getByRole('figure', { name: 'Checks of this bank, among banks used like it' });
    await chart.locator('svg').first().waitFor();
    await page
      .getByText(/banks used like it/)
      .first()
      .waitFor();
    await page.getByRole('heading', { name: 'When it reaches 80 %' }).waitFor();
    await page.getByText(/checks published on this cell type/).waitFor();
    expect(await unsoundness(page)).toEqual([]);
  });

  it('runs by years and by full cycles', async () => {
    await page.getByRole('radio', { name: 'Full cycles' }).click();
    await page
      .getByText(/against full cycles since new/)
      .first()
      .waitFor({ state: 'attached' });
    await page.getByRole('radio', { name: 'Years' }).click();
  });

  it('answers what a lever would do, moved by the keyboard', async () => {
    const lever = page.getByRole('slider', { name: 'Mean cell temperature' });
    const before = Number(await lever.inputValue());
    await lever.focus();
    await page.keyboard.press('ArrowRight');
    await page.keyboard.press('ArrowRight');
    expect(Number(await lever.inputValue())).toBeGreaterThan(before);
    await page.getByRole('group', { name: /^Heat, / }).waitFor();
    await page.getByRole('slider', { name: 'Depth of a typical day' }).focus();
    await page.keyboard.press('ArrowLeft');
    await page.getByRole('group', { name: /^Together, / }).waitFor();
    expect(await unsoundness(page)).toEqual([]);
    await page.getByRole('button', { name: 'Back to how it is' }).click();
    await page.getByRole('group', { name: /^Heat, / }).waitFor({ state: 'detached' });
  });
});

describe('a health record', () => {
  it('is issued with its link', async () => {
    await page.getByRole('button', { name: 'Issue a health record' }).click();
    await page.getByRole('button', { name: 'Issue it' }).click();
    await page.getByRole('heading', { name: 'The health record is issued' }).waitFor();
    const address = await page.getByText(/\/records\/[\w-]{43}$/).textContent();
    link = new URL(address!).pathname;
    expect(await unsoundness(page)).toEqual([]);
    await page.getByRole('button', { name: 'Done' }).click();
    await page.getByText(/^in force, digest/).waitFor();
  });

  it('opens for anyone with the link, sound on screen, and says nothing of whose it is', async () => {
    const stranger = await demo.open();
    await stranger.goto(link);
    await stranger.getByRole('heading', { name: 'Health record of a storage bank' }).waitFor();
    await stranger.getByRole('figure').locator('svg').first().waitFor();
    expect(await unsoundness(stranger)).toEqual([]);
    const { pseudonym, name } = await openBank();
    const text = await stranger.getByRole('main').innerText();
    for (const hidden of [pseudonym, name, 'owner@demo.example']) expect(text).not.toContain(hidden);
    const response = await stranger.request.get(link);
    expect(response.headers()['x-robots-tag']).toContain('noindex');
    await stranger.context().close();
  });

  it('prints on paper: nothing of the shell, nothing wider than a page', async () => {
    const stranger = await demo.open();
    await stranger.goto(link);
    await stranger.getByRole('figure').locator('svg').first().waitFor();
    await stranger.emulateMedia({ media: 'print' });
    await stranger.setViewportSize({ width: 673, height: 900 });
    expect(await stranger.getByRole('navigation').filter({ visible: true }).count()).toBe(0);
    expect(await stranger.getByRole('button').filter({ visible: true }).count()).toBe(0);
    expect(await stranger.evaluate(() => document.scrollingElement!.scrollWidth)).toBeLessThanOrEqual(673);
    expect(await stranger.getByText(link).isVisible()).toBe(true);
    expect((await stranger.pdf({ format: 'A4' })).length).toBeGreaterThan(10_000);
    await stranger.context().close();
  });

  it('says that it was withdrawn once its owner withdrew it, and nothing else', async () => {
    await openBank();
    await page.getByRole('button', { name: /^Withdraw the record of/ }).click();
    await page.getByRole('button', { name: 'Withdraw it' }).click();
    await page.getByText(/^withdrawn /).waitFor();
    expect(await HealthRecord.count({ where: { revokedAt: null } })).toBe(0);
    const stranger = await demo.open();
    await stranger.goto(link);
    await stranger.getByRole('heading', { name: 'This health record was withdrawn' }).waitFor();
    expect(await stranger.getByRole('main').innerText()).not.toMatch(/\d/);
    expect(await unsoundness(stranger)).toEqual([]);
    await stranger.context().close();
  });
});
