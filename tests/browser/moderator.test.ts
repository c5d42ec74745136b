import type { Page } from 'playwright-core';

import { Check, Decision, OutboxMail } from '@/server/db/models';

import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';
import { unsoundness } from '../support/pageSoundness';

jest.setTimeout(120_000);

let demo: Demo;
let page: Page;

beforeAll(async () => {
  demo = await startDemo();
  page = await demo.open();
  await signInOn(page, 'moderator@demo.example');
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

const queueOf = (of: Page) => of.getByRole('list', { name: 'Submissions' });
const entry = (of: Page, words: string) => queueOf(of).getByRole('link').filter({ hasText: words }).first();
const decision = (of: Page) => of.getByRole('toolbar', { name: 'Decision' });
const toast = (of: Page, words: string | RegExp) => of.getByRole('status').getByText(words);

/** Opens the first submission of the queue with these words; answers its id. */
async function openSubmission(of: Page, words: string): Promise<string> {
  await of.goto('/screening');
  await entry(of, words).click();
  await decision(of).waitFor();
  return new URL(of.url()).pathname.split('/').pop()!;
}

const stateOf = async (checkId: string) => (await Check.findByPk(checkId, { rejectOnEmpty: true })).state;

describe('the queue', () => {
  it('is shut to visitors, who are asked to sign in and brought back', async () => {
    const visitor = await demo.open();
    await visitor.goto('/screening');
    await visitor.getByRole('heading', { name: 'Sign in', level: 1 }).waitFor();
    await visitor.getByRole('button', { name: /^moderator@demo.example/ }).click();
    await visitor.getByRole('button', { name: 'Sign in', exact: true }).click();
    await visitor.getByRole('heading', { name: 'Screening', level: 1 }).waitFor();
    await visitor.context().close();
  });

  it('is shut to owners, who are told so', async () => {
    const owner = await demo.open();
    await signInOn(owner, 'owner@demo.example');
    await owner.goto('/screening');
    await owner.getByRole('heading', { name: 'Not for this account' }).waitFor();
    await owner.context().close();
  });

  it('shows the fourteen that wait, doubtful ones first, and names no owner', async () => {
    await page.goto('/screening');
    await page.getByText('14 waiting. Doubtful first, then the oldest.').waitFor();
    const entries = await queueOf(page).getByRole('listitem').allTextContents();
    expect(entries).toHaveLength(14);
    const severities = entries.map((text) => /repairable|doubtful|look|fits/.exec(text)![0]);
    expect(severities).toEqual([
      ...Array<string>(3).fill('repairable'),
      ...Array<string>(3).fill('doubtful'),
      ...Array<string>(3).fill('look'),
      ...Array<string>(5).fill('fits'),
    ]);
    expect(await page.locator('body').textContent()).not.toContain('@');
  });

  it('shows those of another state when asked', async () => {
    await page.goto('/screening');
    await queueOf(page).waitFor();
    await page.getByRole('combobox', { name: 'Show' }).selectOption('sentBack');
    await page.waitForFunction(() => document.querySelectorAll('[role=listitem]').length === 1);
  });
});

describe('a submission', () => {
  it('shows findings, figures, the history and its chart, and the working fit', async () => {
    await openSubmission(page, 'Bank figure for a cell');
    await page
      .getByText(/which fits\.$/)
      .first()
      .waitFor();
    await page.getByRole('figure', { name: 'Checks of this bank' }).locator('svg').first().waitFor();
    expect(await page.getByRole('table', { name: 'Checks of this bank' }).getByRole('row').count()).toBe(5);
    await page.getByRole('button', { name: 'Working fit of Skerry 240' }).click();
    await page.getByRole('figure', { name: 'Working fit of Skerry 240' }).locator('svg').first().waitFor();
    expect(await page.title()).toMatch(/^Bank [A-Z0-9]{5}, Skerry 240, 2p16s · Ebbline$/);
  });

  it('is turned away by the key T, with a reason that is asked for and not lost', async () => {
    const checkId = await openSubmission(page, 'Same figures twice');
    await page.keyboard.press('t');
    const dialog = page.getByRole('dialog', { name: 'Turn away' });
    await dialog.getByRole('button', { name: 'Turn away' }).click();
    const reason = dialog.getByRole('textbox', { name: 'Reason' });
    await reason.and(page.locator('[aria-invalid=true]')).waitFor();
    await reason.fill('  The same figures as last year: a reading typed twice.');
    await page.route('**/decision', (route) => route.abort());
    await dialog.getByRole('button', { name: 'Turn away' }).click();
    await dialog.getByRole('alert').waitFor();
    expect(await reason.inputValue()).toContain('a reading typed twice.');
    await page.unroute('**/decision');
    await dialog.getByRole('button', { name: 'Turn away' }).click();
    await page.getByText(/turned away with your reason\. It takes effect/).waitFor();
    expect(await stateOf(checkId)).toBe('turnedAway');
    // The next one is there already.
    await page.waitForURL((url) => !url.pathname.endsWith(checkId));
    await decision(page).waitFor();
    const kept = await Decision.findOne({ where: { checkId }, rejectOnEmpty: true });
    expect(kept.words).toBe('The same figures as last year: a reading typed twice.');
  });

  it('has a dialog that Escape closes, from which keys decide nothing', async () => {
    const checkId = await openSubmission(page, 'Counter ran backwards');
    await page.keyboard.press('q');
    const dialog = page.getByRole('dialog', { name: 'Ask the owner' });
    await dialog.waitFor();
    await dialog.getByRole('textbox', { name: 'Question' }).pressSequentially('at');
    await page.keyboard.press('Escape');
    await dialog.waitFor({ state: 'detached' });
    expect(await stateOf(checkId)).toBe('submitted');
  });

  it('is kept from a second moderator while the first is at work, and decided once', async () => {
    const second = await demo.open();
    await signInOn(second, 'steward@demo.example');
    const checkId = await openSubmission(page, 'Rises beyond its uncertainty');
    await page.waitForResponse((answer) => answer.url().endsWith('/claim')).catch(() => undefined);
    await second.goto(`/screening/${checkId}`);
    await second.getByText('Another moderator is at work on this one').waitFor();
    expect(await decision(second).count()).toBe(0);
    await second.keyboard.press('a');
    await page.keyboard.press('a');
    await page.getByText(/approved\. It takes effect/).waitFor();
    expect(await stateOf(checkId)).toBe('approved');
    await second.context().close();
  });

  it('is brought back by the key U, and nothing was sent', async () => {
    const checkId = await openSubmission(page, 'Cut-off not reached');
    const mails = await OutboxMail.count();
    await page.keyboard.press('a');
    await page.getByText(/approved\. It takes effect/).waitFor();
    expect(await stateOf(checkId)).toBe('approved');
    await page.keyboard.press('u');
    await toast(page, 'Taken back. Nothing was sent.').waitFor();
    expect(await stateOf(checkId)).toBe('submitted');
    expect(await OutboxMail.count()).toBe(mails);
  });

  it('walks the queue by keys alone, with a list of them behind ?', async () => {
    await openSubmission(page, 'Bank figure for a cell');
    const first = page.url();
    await page.keyboard.press('j');
    await page.waitForURL((url) => url.href !== first);
    await decision(page).waitFor();
    await page.keyboard.press('k');
    await page.waitForURL(first);
    await page.keyboard.press('?');
    const keys = page.getByRole('dialog', { name: 'Keys' });
    await keys.getByRole('checkbox', { name: 'Single keys work here' }).click();
    await page.keyboard.press('Escape');
    await page.keyboard.press('j');
    await page.keyboard.press('q');
    expect(page.url()).toBe(first);
    expect(await page.getByRole('dialog').count()).toBe(0);
    await page.keyboard.press('?');
    await keys.getByRole('checkbox', { name: 'Single keys work here' }).click();
    await page.keyboard.press('Escape');
  });
});

describe('the pages of a moderator', () => {
  it('the queue is sound in both themes at every width', async () => {
    await page.goto('/screening');
    await queueOf(page).waitFor();
    expect(await page.title()).toBe('Screening · Ebbline');
    expect(await unsoundness(page)).toEqual([]);
  });

  it('a submission is sound in both themes at every width', async () => {
    await openSubmission(page, 'Wh typed as Ah');
    await page.getByRole('figure').locator('svg').first().waitFor();
    expect(await unsoundness(page)).toEqual([]);
  });

  it('a decision is sound in both themes at every width', async () => {
    await openSubmission(page, 'Wh typed as Ah');
    await page.getByRole('button', { name: 'Ask the owner' }).click();
    await page.getByRole('dialog').waitFor();
    expect(await unsoundness(page)).toEqual([]);
  });
});
