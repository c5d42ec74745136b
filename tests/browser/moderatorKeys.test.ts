import type { Page } from 'playwright-core';

import { Bank, Check, Decision, User } from '@/server/db/models';

import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';

jest.setTimeout(240_000);

let demo: Demo;
let page: Page;

beforeAll(async () => {
  demo = await startDemo();
  page = await demo.open();
  await signInOn(page, 'moderator@demo.example');
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

const decision = (of: Page) => of.getByRole('toolbar', { name: 'Decision' });
const stateOf = async (checkId: string) => (await Check.findByPk(checkId, { rejectOnEmpty: true })).state;
const checkIdOf = (of: Page) => new URL(of.url()).pathname.split('/').pop()!;

/** Presses Tab until the element with the focus has these words. */
async function tabTo(words: RegExp): Promise<void> {
  for (let pressed = 0; pressed < 80; pressed += 1) {
    await page.keyboard.press('Tab');
    const found = await page.evaluate(() => {
      const at = document.activeElement;
      if (!(at instanceof HTMLElement)) return '';
      const labels = at instanceof HTMLTextAreaElement ? [...(at.labels ?? [])] : [];
      return [at.getAttribute('aria-label'), at.textContent, ...labels.map((one) => one.textContent)].join(
        ' ',
      );
    });
    if (words.test(found)) return;
  }
  throw new Error(`no element with ${words} came by`);
}

/** Waits for the next submission after a decision; its id. */
async function nextAfter(checkId: string): Promise<string> {
  await page.waitForURL((url) => !url.pathname.endsWith(checkId));
  await decision(page).waitFor();
  return checkIdOf(page);
}

it('five submissions are decided on by the keyboard alone', async () => {
  await page.goto('/screening');
  await page.getByRole('list', { name: 'Submissions' }).waitFor();
  await tabTo(/Bank figure for a cell/);
  await page.keyboard.press('Enter');
  await decision(page).waitFor();
  const first = checkIdOf(page);
  await page.keyboard.press('a');
  const second = await nextAfter(first);

  await page.keyboard.press('t');
  const turnAway = page.getByRole('dialog', { name: 'Turn away' });
  await turnAway.waitFor();
  await tabTo(/Reason/);
  await page.keyboard.type('The charge of single cells was added up.');
  await tabTo(/Turn away/);
  await page.keyboard.press('Enter');
  const third = await nextAfter(second);

  await page.keyboard.press('q');
  const ask = page.getByRole('dialog', { name: 'Ask the owner' });
  await ask.waitFor();
  await tabTo(/Question/);
  await page.keyboard.type('Is this in Wh or in Ah?');
  await tabTo(/Send/);
  await page.keyboard.press('Enter');
  const fourth = await nextAfter(third);

  await page.keyboard.press('j');
  const fifth = await nextAfter(fourth);
  await page.keyboard.press('a');
  const sixth = await nextAfter(fifth);
  await page.keyboard.press('a');
  await nextAfter(sixth);

  expect(await Promise.all([first, second, third, fourth, fifth, sixth].map(stateOf))).toEqual([
    'approved',
    'turnedAway',
    'sentBack',
    'submitted',
    'approved',
    'approved',
  ]);
  const words = await Decision.findAll({
    where: { checkId: [second, third] },
    order: [['decidedAt', 'ASC']],
  });
  expect(words.map((one) => one.words)).toEqual([
    'The charge of single cells was added up.',
    'Is this in Wh or in Ah?',
  ]);
});

it('a question goes to the owner, the answer comes back, and the check is approved', async () => {
  await demo.pass(31);
  const asked = await Decision.findOne({ where: { action: 'sendBack' }, rejectOnEmpty: true });
  const check = await Check.findByPk(asked.checkId, { rejectOnEmpty: true });
  const bank = await Bank.findByPk(check.bankId, { rejectOnEmpty: true });
  const { email } = await User.findByPk(bank.ownerId, { rejectOnEmpty: true });
  const owner = await demo.open();
  await signInOn(owner, email);
  await owner.goto(`/banks/${bank.id}/checks/${check.id}`);
  await owner.getByText('Is this in Wh or in Ah?').first().waitFor();
  await owner
    .getByRole('textbox', { name: 'Your answer' })
    .fill('In Wh: I read the wrong line of the meter.');
  await owner.getByRole('button', { name: 'Send the answer' }).click();
  await owner.getByText('Your answer is sent.').waitFor();
  expect(await stateOf(check.id)).toBe('submitted');
  await owner.context().close();

  await page.goto(`/screening/${check.id}`);
  await page.getByText('In Wh: I read the wrong line of the meter.').waitFor();
  expect(await page.locator('body').textContent()).not.toContain(email);
  await decision(page)
    .getByRole('button', { name: /^Approve/ })
    .click();
  await page.getByText(/approved.*It takes effect/).waitFor();
  expect(await stateOf(check.id)).toBe('approved');
});
