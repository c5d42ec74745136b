import { readFileSync } from 'node:fs';

import type { Page } from 'playwright-core';

import { demoAccounts } from '@/server/accounts/demoAccounts';
import { Bank, OutboxMail, User } from '@/server/db/models';
import { sendDueReminders } from '@/server/reminders/sendDueReminders';

import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';
import { unsoundness } from '../support/pageSoundness';

jest.setTimeout(120_000);

const email = 'owner@demo.example';
const password = demoAccounts[0]!.password;
const newPassword = 'a different sentence';
const moved = 'moved@demo.example';

let demo: Demo;
let page: Page;
let bank: Bank;

beforeAll(async () => {
  demo = await startDemo();
  page = await demo.open({ viewport: { width: 390, height: 844 } });
  const { id: ownerId } = await User.findOne({ where: { email }, rejectOnEmpty: true });
  bank = await Bank.findOne({ where: { ownerId, name: 'House bank' }, rejectOnEmpty: true });
  await sendDueReminders(demo.deps)({});
  await signInOn(page, email);
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

const press = (name: string | RegExp) => page.getByRole('button', { name }).last().click();
const fill = (name: string, text: string, place = 0) =>
  page.getByRole('textbox', { name, exact: true }).nth(place).fill(text);

/** A link of the newest mail to somebody, as a path of this product. */
async function linkMailed(recipient: string, path: string): Promise<string> {
  const mails = await OutboxMail.findAll({ where: { recipient }, order: [['rowid', 'DESC']] });
  const found = mails.flatMap(({ text }) => new RegExp(`${path}\\?token=\\S+`).exec(text) ?? [])[0];
  if (!found) throw new Error(`no link to ${path} was mailed to ${recipient}`);
  return found;
}

async function saved(button: RegExp): Promise<{ name: string; text: string }> {
  const [download] = await Promise.all([page.waitForEvent('download'), press(button)]);
  return { name: download.suggestedFilename(), text: readFileSync((await download.path())!, 'utf8') };
}

it('puts a reminder off from its mail, after a press and without a sign-in', async () => {
  const visitor = await demo.open({ viewport: { width: 390, height: 844 } });
  await visitor.goto(await linkMailed(email, '/remind-later'));
  await visitor.getByRole('button', { name: 'Remind me in a month' }).waitFor();
  expect(await unsoundness(visitor)).toEqual([]);
  await visitor.getByRole('button', { name: 'Remind me in a month' }).click();
  await visitor.getByText('The next one comes on 1 Jan 2027.').waitFor();
});

it('stops reminders from the foot of a mail, and the account shows it', async () => {
  const visitor = await demo.open({ viewport: { width: 390, height: 844 } });
  await visitor.goto(await linkMailed(email, '/unsubscribe'));
  await visitor.getByRole('button', { name: 'Stop them' }).click();
  await visitor.getByText('No more reminders of the yearly check are mailed to you.').waitFor();
  await page.goto('/settings');
  const reminders = page.getByRole('checkbox', { name: 'Reminders of the yearly check' });
  await reminders.waitFor();
  expect(await reminders.isChecked()).toBe(false);
  await reminders.click();
  await page.getByRole('checkbox', { name: 'Reminders of the yearly check', checked: true }).waitFor();
});

it('keeps a day of one’s own for a bank, and saves it for the calendar', async () => {
  await page.goto(`/banks/${bank.id}`);
  await press('Change the day');
  await page.getByRole('radio', { name: /On a day I choose/ }).click();
  const day = page.getByLabel('Day', { exact: true });
  await day.fill('');
  await press('Keep it');
  await page.getByText('This is needed.').waitFor();
  expect(await unsoundness(page)).toEqual([]);
  await day.fill('2027-05-04');
  await press('Keep it');
  await page.getByText('Due on 4 May 2027, the day you chose.').waitFor();
  const { name, text } = await saved(/Save for the calendar/);
  expect(name).toBe('check-2027-05-04.ics');
  expect(text).toContain('DTSTART;VALUE=DATE:20270504\r\n');
});

it('takes everything along as files', async () => {
  await page.goto('/settings');
  const everything = await saved(/Save everything/);
  expect(everything.name).toBe('ebbline-own-data-2026-12-01.json');
  expect(JSON.parse(everything.text).banks.map((one: Bank) => one.name)).toContain('House bank');
  const checks = await saved(/Save the checks/);
  expect(checks.name).toBe('ebbline-checks-2026-12-01.csv');
  expect(checks.text.split('\r\n').length).toBeGreaterThan(5);
});

it('moves to another address and takes another password, with what is wrong beside its field', async () => {
  await page.goto('/settings');
  await press('Change the e-mail address');
  await fill('New e-mail address', moved);
  await fill('Present password', 'not this one');
  await press('Mail the link');
  await page.getByText('This is not your present password.').waitFor();
  expect(await page.getByRole('textbox', { name: 'New e-mail address' }).inputValue()).toBe(moved);
  await press('Change the password');
  expect(await unsoundness(page)).toEqual([]);
  await fill('Present password', password);
  await press('Mail the link');
  await page.getByText(`A link is on its way to ${moved}.`).waitFor();
  await page.goto(await linkMailed(moved, '/confirm-address'));
  await press('Use this address from now on');
  await page.getByText('Your address is changed').waitFor();
  await page.goto('/settings');
  await page.getByText(moved).waitFor();
  await page.getByRole('button', { name: 'Change the password' }).click();
  await fill('Present password', password);
  await fill('New password', newPassword);
  await press('Change the password');
  await page.getByText('The password is changed. Other browsers are signed out.').waitFor();
});

it('deletes the account once it is told what becomes of the checks, and leaves a visitor', async () => {
  await page.goto('/settings');
  await press('Delete the account');
  await press('Delete it now');
  await page.getByText('Choose one.').waitFor();
  expect(await unsoundness(page)).toEqual([]);
  await page.getByRole('radio', { name: /Leave my checks/ }).click();
  await fill('Present password', newPassword);
  await press('Delete it now');
  await page.getByText('Your account is deleted').waitFor();
  await page.goto('/banks');
  await page.waitForURL('**/sign-in?**');
  expect(await User.count({ where: { email: moved } })).toBe(0);
});
