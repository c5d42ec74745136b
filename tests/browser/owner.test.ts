import { join } from 'node:path';

import type { Page } from 'playwright-core';

import { undoSeconds } from '@/lib/contract/moderation';
import { Bank, Check, User } from '@/server/db/models';

import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';
import { describeTest, nextStep, uploadLog } from '../support/ownerSteps';
import { coveredTargets, unsoundness } from '../support/pageSoundness';

jest.setTimeout(120_000);

const logs = join(__dirname, '../../data/demo/logs');

let demo: Demo;
let page: Page;

beforeAll(async () => {
  demo = await startDemo();
  page = await demo.open({ viewport: { width: 390, height: 844 } });
  await signInOn(page, 'owner@demo.example');
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

const field = (name: string) => page.getByRole('textbox', { name });
const invalid = (name: string) => field(name).and(page.locator('[aria-invalid=true]'));

async function bankOf(email: string, name?: string): Promise<Bank> {
  const { id: ownerId } = await User.findOne({ where: { email }, rejectOnEmpty: true });
  return Bank.findOne({ where: { ownerId, ...(name && { name }) }, rejectOnEmpty: true });
}

async function openBank(name: string): Promise<void> {
  await page.goto(`/banks/${(await bankOf('owner@demo.example', name)).id}`);
  await page.getByRole('heading', { name, level: 1 }).waitFor();
}

describe('the banks of an owner', () => {
  it('lists them, each sound in both themes at every width', async () => {
    await page.goto('/banks');
    await page.getByRole('link', { name: 'House bank' }).waitFor();
    expect(await page.title()).toBe('My banks · Ebbline');
    expect(await unsoundness(page)).toEqual([]);
  });

  it('shows a bank with its history, sound in both themes at every width', async () => {
    await openBank('House bank');
    await page.getByRole('figure').locator('svg').first().waitFor();
    expect(await page.title()).toBe('House bank · Ebbline');
    expect(await unsoundness(page)).toEqual([]);
  });

  it("does not open somebody else's", async () => {
    await page.goto(`/banks/${(await bankOf('owner2@demo.example')).id}`);
    await page.getByRole('alert').getByRole('heading', { name: 'Not found' }).waitFor();
  });
});

describe('the form of a check', () => {
  it('is sound at every step, in both themes at every width', async () => {
    await openBank('House bank');
    const found: Record<string, string[]> = {};
    const look = async (step: string) => {
      const against = await unsoundness(page);
      // The step with the most targets.
      if (step === 'lived') against.push(...(await coveredTargets(page)));
      if (against.length > 0) found[step] = against;
    };
    await page.getByRole('link', { name: 'Add a check' }).first().click();
    await page.getByRole('heading', { name: 'Before you start' }).waitFor();
    await look('cautions');
    await page.goBack();
    await uploadLog(page, join(logs, 'house-bank-2026-11-07.csv'));
    await look('log');
    await describeTest(page, look);
    await look('look over');
    expect(found).toEqual({});
  });

  it('is taken up where it was left, after a reload in the middle', async () => {
    await page.reload();
    await page.getByText('Taken up where you left off').waitFor();
    await page.getByRole('heading', { name: 'Look over and send', level: 1 }).waitFor();
    await page.getByRole('button', { name: 'Back to how the bank lived' }).click();
    expect(await field('Counter, since new').inputValue()).toBe('640');
  });

  it('goes on only when what is asked at a step is right, and says what is not', async () => {
    await field('Depth of a typical day').fill('600');
    await page.getByRole('button', { name: /^Next: / }).click();
    await invalid('Depth of a typical day').waitFor();
    await page.getByRole('heading', { name: 'How the bank lived', level: 1 }).waitFor();
    await field('Depth of a typical day').fill('60');
    await nextStep(page, 'Look over and send');
  });

  it('waits on the device when it can not be sent, can be taken back, and is sent once', async () => {
    await page.route('**/checks', (route) =>
      route.request().method() === 'POST' ? route.abort() : route.continue(),
    );
    const bank = await bankOf('owner@demo.example', 'House bank');
    const before = await Check.count({ where: { bankId: bank.id } });
    await page.getByRole('button', { name: 'Send the check' }).click();
    await page.getByText('A check waits to be sent').waitFor();
    await page.getByRole('link', { name: 'Look at it' }).click();
    await page.getByRole('button', { name: 'Take it back and change it' }).click();
    await page.getByRole('heading', { name: 'Look over and send', level: 1 }).waitFor();
    expect(await Check.count({ where: { bankId: bank.id } })).toBe(before);
    await page.unroute('**/checks');
    await page.getByRole('button', { name: 'Send the check' }).click();
    await page.getByText('Sent. A moderator looks at it next.').waitFor();
    expect(await Check.count({ where: { bankId: bank.id } })).toBe(before + 1);
    expect(await unsoundness(page)).toEqual([]);
  });

  it.each([
    [
      'a picture',
      { name: 'meter.csv', mimeType: 'text/csv', buffer: Buffer.from([0x89, 0x50, 0x4e, 0x47, 0, 0, 1]) },
    ],
    ['an empty file', { name: 'empty.csv', mimeType: 'text/csv', buffer: Buffer.alloc(0) }],
    [
      'a table of something else',
      { name: 'prices.csv', mimeType: 'text/csv', buffer: Buffer.from('a,b\n1,2\n') },
    ],
  ])('says of %s that it can not be read as a log, and takes another', async (_what, file) => {
    await openBank('Workshop');
    await page.getByRole('link', { name: 'Add a check' }).first().click();
    const aware = page.getByRole('checkbox', { name: /^I have read the cautions/ });
    if (await aware.isVisible()) {
      await aware.click();
      await nextStep(page, 'The log, or typed');
    }
    await page.getByRole('radio', { name: /^I have a log of it/ }).click();
    await page.locator('input[type=file]').setInputFiles(file);
    await page.getByRole('alert').first().waitFor();
    const another = page.getByRole('button', { name: /^(Use another file|Choose a file)/ });
    await another.waitFor();
    if ((await another.textContent()) === 'Use another file') await another.click();
    await page.locator('input[type=file]').setInputFiles(join(logs, 'workshop-2026-11-15.csv'));
    await page.getByRole('button', { name: 'Use these figures' }).waitFor();
    await page.getByRole('button', { name: 'Use another file' }).click();
  });
});

describe('a question of a moderator', () => {
  it('is answered by the owner and ends in an approval', async () => {
    const moderator = await demo.open();
    await signInOn(moderator, 'moderator@demo.example');
    const { pseudonym } = await bankOf('owner@demo.example', 'House bank');
    const open = async () => {
      await moderator.goto('/screening');
      await moderator
        .getByRole('list', { name: 'Submissions' })
        .getByRole('link')
        .filter({ hasText: pseudonym })
        .click();
      await moderator.getByRole('toolbar', { name: 'Decision' }).waitFor();
    };
    await open();
    await moderator.keyboard.press('q');
    const dialog = moderator.getByRole('dialog', { name: 'Ask the owner' });
    await dialog.getByRole('textbox', { name: 'Question' }).fill('Was the load off in the gap?');
    await dialog.getByRole('button', { name: 'Send back' }).click();
    await moderator.getByText(/sent back.*It takes effect/).waitFor();
    await demo.pass(undoSeconds + 1);

    await openBank('House bank');
    await page.getByText('Was the load off in the gap?').first().waitFor();
    expect(await unsoundness(page)).toEqual([]);
    await field('Your answer').fill('No, only the logger was.');
    await page.getByRole('button', { name: 'Send the answer' }).click();
    await page.getByText('Your answer is sent.').waitFor();

    await open();
    await moderator.getByText('No, only the logger was.').waitFor();
    await moderator.keyboard.press('a');
    await moderator.getByText(/approved\. It takes effect/).waitFor();
    await page.reload();
    await page.getByRole('main').getByText('approved', { exact: true }).first().waitFor();
    await moderator.context().close();
  });
});
