import type { Page } from 'playwright-core';

import { demoAccounts } from '@/server/accounts/demoAccounts';
import { Job, SecondFactor, User } from '@/server/db/models';

import { codeAt } from '../support/codes';
import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';
import { unsoundness } from '../support/pageSoundness';

jest.setTimeout(180_000);

const password = demoAccounts[0]!.password;
const appointed = 'owner2@demo.example';
/** The step of the codes, s. */
const step = 30;

let demo: Demo;
let page: Page;

beforeAll(async () => {
  demo = await startDemo();
  page = await demo.open();
  await signInOn(page, 'steward@demo.example');
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

const toast = (words: string) => page.getByRole('status').getByText(words).waitFor();
const rowOf = (of: Page, words: string) => of.getByRole('row').filter({ hasText: words });
const fillIn = (name: string, text: string) => page.getByRole('dialog').getByLabel(name).fill(text);
const confirm = (name: string) => page.getByRole('dialog').getByRole('button', { name, exact: true }).click();

async function enterPassword(of: Page, email: string) {
  await of.goto('/sign-in');
  await of.getByRole('textbox', { name: 'E-mail address' }).fill(email);
  await of.getByRole('textbox', { name: 'Password' }).fill(password);
  await of.getByRole('button', { name: 'Sign in', exact: true }).click();
}

describe('the steward’s pages', () => {
  it('are shut to moderators and owners, who are told so', async () => {
    const other = await demo.open();
    await signInOn(other, 'moderator@demo.example');
    for (const path of ['/steward', '/steward/people', '/steward/trail']) {
      await other.goto(path);
      await other.getByRole('heading', { name: 'Not for this account' }).waitFor();
    }
    expect(await other.getByRole('link', { name: 'Steward' }).count()).toBe(0);
    await other.context().close();
  });

  it('show the health, and try a failed job again by the keyboard', async () => {
    const failed = { payload: {}, state: 'failed', attempts: 5, runAfter: new Date(0) } as const;
    const job = await Job.create({
      ...failed,
      kind: 'verifyTrail',
      dedupeKey: null,
      error: 'The disk was full.',
    });
    await page.getByRole('link', { name: 'Steward' }).first().click();
    await page.getByRole('heading', { name: 'Health', level: 1 }).waitFor();
    await page.getByText('The disk was full.').waitFor();
    await page.getByText('none yet').waitFor();
    expect(await unsoundness(page)).toEqual([]);
    await page.getByRole('button', { name: /^Try again: Checking the trail/ }).focus();
    await page.keyboard.press('Enter');
    await toast('It is being tried again.');
    await demo.deps.jobs.settle();
    expect((await job.reload()).state).toBe('done');
    await page.reload();
    await page.getByText(/Checked on 1 Dec 2026.*: whole, /).waitFor();
    expect(await page.getByText('The disk was full.').count()).toBe(0);
  });

  it('appoint with a password, and what is wrong stands beside its field', async () => {
    await page.goto('/steward/people');
    await page.getByRole('button', { name: 'Appoint someone' }).click();
    await fillIn('E-mail address of their account', appointed);
    await page
      .getByRole('dialog')
      .getByRole('radio', { name: /Moderator/ })
      .click();
    await page.getByRole('dialog').getByRole('textbox', { name: 'Your own password' }).fill('not this one');
    await confirm('Appoint');
    await page.getByText('This is not your present password.').waitFor();
    expect(await unsoundness(page)).toEqual([]);
    await page.getByRole('dialog').getByRole('textbox', { name: 'Your own password' }).fill(password);
    await confirm('Appoint');
    await toast('Appointed. A mail says so.');
    await rowOf(page, appointed).getByText('Moderator').waitFor();
    expect(await unsoundness(page)).toEqual([]);
  });

  it('take a role away at once from a sign-in that is open', async () => {
    const other = await demo.open();
    await signInOn(other, appointed);
    await other.getByRole('heading', { name: 'Screening', level: 1 }).waitFor();
    await page.getByRole('button', { name: `Take the role away: ${appointed}` }).click();
    await fillIn('Reason', 'Asked to be let go.');
    await page.getByRole('dialog').getByRole('textbox', { name: 'Your own password' }).fill(password);
    await confirm('Take the role away');
    await toast('The role is taken away.');
    const answer = await other.request.get('/api/screening');
    expect(answer.status()).toBe(403);
    await other.goto('/screening');
    await other.getByRole('heading', { name: 'Not for this account' }).waitFor();
    await other.context().close();
  });

  it('lock an account that was found, and unlock it', async () => {
    const other = await demo.open();
    await signInOn(other, appointed);
    await page.getByRole('textbox', { name: 'E-mail address or account number' }).fill(appointed);
    await page.getByRole('button', { name: 'Find', exact: true }).click();
    await page.getByRole('button', { name: `Lock: ${appointed}` }).click();
    await fillIn('Reason', 'Many made-up checks.');
    await page.getByRole('dialog').getByRole('textbox', { name: 'Your own password' }).fill(password);
    await confirm('Lock');
    await toast('The account is locked.');
    await other.goto('/banks');
    await other.getByRole('heading', { name: 'Sign in again' }).waitFor();
    await other.getByRole('textbox', { name: 'Password' }).fill(password);
    await other.getByRole('button', { name: 'Sign in', exact: true }).click();
    await other.getByText('This account is locked.').first().waitFor();
    await page
      .getByRole('button', { name: `Unlock: ${appointed}` })
      .first()
      .click();
    await fillIn('Reason', 'They were not made up.');
    await page.getByRole('dialog').getByRole('textbox', { name: 'Your own password' }).fill(password);
    await confirm('Unlock');
    await toast('The account is unlocked.');
    await signInOn(other, appointed);
    await other.context().close();
  });

  it('read the trail, narrowed and page by page, without an address', async () => {
    await page.goto('/steward/trail');
    const entries = page.getByRole('list', { name: 'Entries, newest first' }).locator('> li');
    await entries.first().waitFor();
    expect(await entries.count()).toBe(50);
    await page.getByRole('button', { name: 'Show earlier ones' }).click();
    await page.waitForFunction(() => document.querySelectorAll('.ebb-plain > li').length === 100);
    expect(await unsoundness(page)).toEqual([]);
    await page.getByRole('combobox', { name: 'Of what' }).selectOption('account');
    await page.waitForURL(/kind=account/);
    await page.getByText('“Many made-up checks.”').waitFor();
    const words = await entries.allTextContents();
    expect(words.map((text) => /^account([A-Z][a-z]+)/.exec(text)![1])).toEqual([
      'Unlocked',
      'Locked',
      'Dismissed',
      'Appointed',
    ]);
    expect(words.join(' ')).not.toContain('@');
    await page.getByRole('button', { name: 'All of entry' }).first().click();
    expect(await unsoundness(page)).toEqual([]);
  });
});

describe('the code at sign-in', () => {
  const email = 'moderator@demo.example';
  let other: Page;
  let secret: string;
  let codes: string[];

  beforeAll(async () => {
    other = await demo.open({ viewport: { width: 390, height: 844 } });
  });

  const codeNow = () => codeAt(secret, demo.deps.clock());
  const secretOf = async () => {
    await other.getByRole('button', { name: 'Type the secret instead' }).click();
    const words = await other.locator('dd').first().textContent();
    return words!.replace(/\s/g, '');
  };

  it('is offered on the pages of those who sign in without, and set up in three steps', async () => {
    await signInOn(other, email);
    await other.getByText('The demo lets its accounts in without a code.').waitFor();
    await other.getByRole('link', { name: 'Set up a code' }).click();
    await other.getByRole('textbox', { name: 'Present password' }).fill(password);
    await other.getByRole('button', { name: 'Go on' }).click();
    await other.getByRole('img', { name: /^QR code/ }).waitFor();
    secret = await secretOf();
    expect(secret).toMatch(/^[A-Z2-7]{32}$/);
    expect(await unsoundness(other)).toEqual([]);
    await other.getByRole('textbox', { name: 'Code' }).fill('12');
    await other.getByRole('button', { name: 'Turn it on' }).click();
    await other.getByText(/This code is not right/).waitFor();
    await other.getByRole('textbox', { name: 'Code' }).fill(await codeNow());
    await other.getByRole('button', { name: 'Turn it on' }).click();
    const list = other.getByRole('list', { name: 'Recovery codes' });
    await list.waitFor();
    codes = await list.getByRole('listitem').allTextContents();
    expect(new Set(codes).size).toBe(10);
    expect(await unsoundness(other)).toEqual([]);
    await other.getByRole('link', { name: 'I have kept them' }).click();
    await other.getByText(/10 recovery codes are left/).waitFor();
    expect(await unsoundness(other)).toEqual([]);
  });

  it('is asked for after the password, and signs in by the keyboard alone', async () => {
    await other.context().clearCookies();
    await demo.pass(step);
    await enterPassword(other, email);
    await other.getByRole('heading', { name: 'Enter the code' }).waitFor();
    expect(await unsoundness(other)).toEqual([]);
    await other.getByRole('textbox', { name: 'Code' }).focus();
    await other.keyboard.type(await codeNow());
    await other.keyboard.press('Enter');
    await other.getByRole('heading', { name: 'Screening', level: 1 }).waitFor();
  });

  it('gives way to a recovery code, once', async () => {
    for (const isFirst of [true, false]) {
      await other.context().clearCookies();
      await enterPassword(other, email);
      await other.getByRole('radio', { name: 'Recovery code' }).click();
      await other.getByRole('textbox', { name: 'Recovery code' }).fill(codes[0]!);
      await other.getByRole('button', { name: 'Sign in', exact: true }).click();
      if (isFirst) await other.getByRole('heading', { name: 'Screening', level: 1 }).waitFor();
      else await other.getByText(/This code is not right/).waitFor();
    }
  });

  it('is asked for too where a sign-in has run out on an open page', async () => {
    await demo.pass(step);
    await other.getByRole('textbox', { name: 'Recovery code' }).fill(codes[1]!);
    await other.getByRole('button', { name: 'Sign in', exact: true }).click();
    await other.getByRole('heading', { name: 'Screening', level: 1 }).waitFor();
    await other.context().clearCookies();
    await other.goto('/screening/agreement');
    await other.getByRole('heading', { name: 'Sign in again' }).waitFor();
    await other.getByRole('textbox', { name: 'Password' }).fill(password);
    await other.getByRole('button', { name: 'Sign in', exact: true }).click();
    await other.getByRole('textbox', { name: 'Code' }).fill(await codeNow());
    await other.getByRole('button', { name: 'Sign in', exact: true }).click();
    await other.getByRole('heading', { name: 'Agreement', level: 1 }).waitFor();
  });

  it('is cleared by a steward for somebody who has lost app and recovery codes', async () => {
    await page.goto('/steward/people');
    await page.getByRole('button', { name: `Clear the second factor: ${email}` }).click();
    await fillIn('Reason', 'Lost the phone; known by voice.');
    await page.getByRole('dialog').getByRole('textbox', { name: 'Your own password' }).fill(password);
    expect(await unsoundness(page)).toEqual([]);
    await confirm('Clear the second factor');
    await toast('The second factor is cleared.');
    const { id } = await User.findOne({ where: { email }, rejectOnEmpty: true });
    expect(await SecondFactor.findByPk(id)).toBeNull();
    await other.context().clearCookies();
    await signInOn(other, email);
    await other.getByText('The demo lets its accounts in without a code.').waitFor();
  });

  it('is set up anew, and turned off with password and code', async () => {
    await other.getByRole('link', { name: 'Set up a code' }).click();
    await other.getByRole('textbox', { name: 'Present password' }).fill(password);
    await other.getByRole('button', { name: 'Go on' }).click();
    await other.getByRole('img', { name: /^QR code/ }).waitFor();
    secret = await secretOf();
    await other.getByRole('textbox', { name: 'Code' }).fill(await codeNow());
    await other.getByRole('button', { name: 'Turn it on' }).click();
    await other.getByRole('link', { name: 'I have kept them' }).click();
    await demo.pass(step);
    await other.goto('/settings');
    await other.getByRole('button', { name: 'Turn the code off' }).click();
    await other.getByRole('textbox', { name: 'Present password' }).fill(password);
    await other.getByRole('textbox', { name: 'Code' }).fill(await codeNow());
    await other.getByRole('button', { name: 'Turn it off' }).click();
    await other.getByRole('link', { name: 'Set up the code' }).waitFor();
    const { id } = await User.findOne({ where: { email }, rejectOnEmpty: true });
    expect(await SecondFactor.findByPk(id)).toBeNull();
  });
});
