import type { Page } from 'playwright-core';

/** What an owner does on the screens, one after the other; each begins where the one before ends. */

export const newPassword = 'tide table in the hall';

/** Opens an account and confirms its address by the mail in the outbox; ends on the page that says so. */
export async function register(page: Page, email: string): Promise<void> {
  await page.goto('/register');
  await page.getByRole('textbox', { name: 'E-mail address' }).fill(email);
  await page.getByRole('textbox', { name: 'Password' }).fill(newPassword);
  await page.getByRole('button', { name: 'Open the account' }).click();
  await page.getByRole('heading', { name: 'Check your mail' }).waitFor();
  await page.getByRole('main').getByRole('link', { name: 'Open the outbox' }).click();
  await page.getByText(`To ${email},`).first().waitFor();
  await page
    .getByRole('link', { name: /\/verify\?token=/ })
    .first()
    .click();
  await page.getByRole('button', { name: 'Confirm the address' }).click();
  await page.getByRole('heading', { name: 'Your address is confirmed' }).waitFor();
}

/** From the list of banks through the wizard to its last step, for 1p16s of Skerry 240, not clamped. */
export async function fillBank(page: Page, name: string, firstUse: string): Promise<void> {
  await page.getByRole('link', { name: 'Add a bank' }).first().click();
  await page
    .getByRole('combobox', { name: 'Cell type' })
    .selectOption({ label: 'Halmund Skerry 240, 240 Ah' });
  await nextStep(page, 'How they are wired');
  await page.getByRole('textbox', { name: 'Name' }).fill(name);
  await page.getByRole('textbox', { name: 'Groups in series' }).fill('16');
  await page.getByRole('textbox', { name: 'First use' }).fill(firstUse);
  await nextStep(page, 'Clamping and spacing');
  await page.getByRole('radio', { name: /^Not clamped/ }).click();
  await nextStep(page, 'Where and within which limits');
  await nextStep(page, 'Start and purchase');
  await page.getByRole('radio', { name: 'New', exact: true }).click();
  await nextStep(page, 'Look over');
}

/** From the list of banks to the page of a new one, in use since May 2023. */
export async function addBank(page: Page, name: string): Promise<void> {
  await fillBank(page, name, '2023-05');
  await page.getByRole('button', { name: 'Add the bank' }).click();
  await page.getByRole('heading', { name, level: 1 }).waitFor();
}

export async function nextStep(page: Page, heading: string): Promise<void> {
  await page.getByRole('button', { name: /^Next: / }).click();
  await page.getByRole('heading', { name: heading, level: 1 }).waitFor();
}

/** From the page of a bank to the result of an uploaded log, in the form. */
export async function uploadLog(page: Page, file: string): Promise<void> {
  await page.getByRole('link', { name: 'Add a check' }).first().click();
  await page.getByRole('checkbox', { name: /^I have read the cautions/ }).click();
  await nextStep(page, 'The log, or typed');
  await page.getByRole('radio', { name: /^I have a log of it/ }).click();
  const chooser = page.waitForEvent('filechooser');
  await page.getByRole('button', { name: /^Choose a file/ }).click();
  await (await chooser).setFiles(file);
  await page.getByRole('button', { name: 'Use these figures' }).click();
  await page.getByText('These figures are in the form').waitFor();
}

/** From the log's figures to the last step, with a plausible life behind the bank; `look` is called at each step. */
export async function describeTest(page: Page, look = async (_step: string) => {}): Promise<void> {
  await page.getByRole('textbox', { name: 'Meter' }).fill('Shunt of 300 A');
  await page.getByRole('textbox', { name: 'Its own error' }).fill('0.5');
  await page.getByRole('textbox', { name: 'Scatter of its readings' }).fill('0.2');
  await nextStep(page, 'What the meter says');
  await look('meter');
  await nextStep(page, 'How it was charged and ended');
  await look('ends');
  await page.getByRole('radio', { name: /^The maker's voltage and tail current/ }).click();
  await page.getByRole('radio', { name: /^The lowest cell at its voltage/ }).click();
  await nextStep(page, 'How the bank lived');
  await look('lived');
  await page.getByRole('textbox', { name: 'Depth of a typical day' }).fill('60');
  await page.getByRole('textbox', { name: 'Current in use, mean' }).fill('30');
  await page.getByRole('textbox', { name: 'Mean over the year' }).fill('19');
  await page.getByRole('textbox', { name: 'Mean state of charge' }).fill('55');
  await page.getByRole('combobox', { name: 'A counter shows' }).selectOption('Full cycles since new');
  await page.getByRole('textbox', { name: 'Counter, since new' }).fill('640');
  await page.getByRole('textbox', { name: 'Cycles a day' }).fill('0.8');
  for (const radio of await page.getByRole('radio', { name: 'estimated' }).all()) await radio.click();
  await nextStep(page, 'Look over and send');
}
