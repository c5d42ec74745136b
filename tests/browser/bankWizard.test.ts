import type { Page } from 'playwright-core';

import { Bank, CellType, TrailEntry, User } from '@/server/db/models';

import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';
import { addBank, fillBank, newPassword, nextStep, register } from '../support/ownerSteps';
import { unsoundness } from '../support/pageSoundness';

jest.setTimeout(120_000);

const email = 'wizard@example.org';
const phone = { viewport: { width: 390, height: 844 } };

let demo: Demo;
let page: Page;

beforeAll(async () => {
  demo = await startDemo();
  page = await demo.open(phone);
  await register(page, email);
  await page.goto('/sign-in');
  await signIn(page);
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

const field = (name: string | RegExp) => page.getByRole('textbox', { name });
const invalid = (name: string) => field(name).and(page.locator('[aria-invalid=true]'));
const heading = (name: string) => page.getByRole('heading', { name, level: 1 });
const press = (name: string | RegExp) => page.getByRole('button', { name }).click();
const focused = () => page.evaluate(() => document.activeElement?.textContent ?? '');

async function signIn(on: Page): Promise<void> {
  await on.getByRole('textbox', { name: 'E-mail address' }).fill(email);
  await on.getByRole('textbox', { name: 'Password' }).fill(newPassword);
  await on.getByRole('button', { name: 'Sign in', exact: true }).click();
  await on.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
}

async function storedBank(name: string): Promise<Bank> {
  const { id: ownerId } = await User.findOne({ where: { email }, rejectOnEmpty: true });
  return Bank.findOne({ where: { ownerId, name }, rejectOnEmpty: true });
}

const sound = async () => expect(await unsoundness(page)).toEqual([]);

describe("a first bank, through the wizard's steps", () => {
  it('begins from the empty list, and asks for the cells before anything else', async () => {
    await page.goto('/banks');
    await page.getByRole('link', { name: 'Add a bank' }).first().click();
    await heading('Which cells').waitFor();
    await press(/^Next: /);
    const cellType = page.getByRole('combobox', { name: 'Cell type' });
    await cellType.and(page.locator('[aria-invalid=true]')).waitFor();
    await heading('Which cells').waitFor();
    await sound();
  });

  it('takes a cell type that is not listed, after pointing out one that may be meant', async () => {
    await press('It is not in the list');
    const dialog = page.getByRole('dialog', { name: 'Propose a cell type' });
    await dialog.getByRole('textbox', { name: 'Maker' }).fill('halmund');
    await dialog.getByRole('textbox', { name: 'Name of the type' }).fill('Skery 240');
    await dialog.getByRole('button', { name: /^Halmund Skerry 240/ }).waitFor();
    await sound();
    await dialog.getByRole('textbox', { name: 'Maker' }).fill('Quillmere');
    await dialog.getByRole('textbox', { name: 'Name of the type' }).fill('Fathom 314');
    await dialog.getByRole('textbox', { name: 'Area of the large face' }).fill('345');
    await dialog.getByRole('button', { name: 'Propose and use it' }).click();
    await dialog.getByRole('textbox', { name: 'Rated capacity' }).fill('314');
    await dialog.getByRole('button', { name: 'Propose and use it' }).click();
    await page.getByText('Quillmere Fathom 314 is proposed and chosen.').waitFor();
    await page.getByText(/^Your proposal: a moderator lists it/).waitFor();
    const stored = await CellType.findOne({ where: { name: 'Fathom 314' }, rejectOnEmpty: true });
    expect(stored).toMatchObject({ status: 'proposed', ratedAh: 314, faceAreaMm2: 34_500 });
    await nextStep(page, 'How they are wired');
  });

  it('moves the focus to the heading of each step, and says how far one is', async () => {
    expect(await focused()).toBe('How they are wired');
    const steps = page.getByRole('progressbar', { name: 'Steps' });
    expect(await steps.getAttribute('aria-valuetext')).toBe('Step 2 of 6: How they are wired');
    await sound();
  });

  it('says beside each field what is wrong with it, and stays', async () => {
    await field('Cells in parallel').fill('none');
    await field('Groups in series').fill('1.5');
    await press(/^Next: /);
    for (const name of ['Name', 'Cells in parallel', 'Groups in series', 'First use'])
      await invalid(name).waitFor();
    expect(await field('Cells in parallel').inputValue()).toBe('none');
    await sound();
  });

  it('is filled in and left by the keyboard alone', async () => {
    await field('Name').focus();
    await page.keyboard.type('Pump house');
    for (const text of ['1', '16']) {
      await page.keyboard.press('Tab');
      await page.keyboard.press('Control+a');
      await page.keyboard.type(text);
    }
    // A month is typed in its parts.
    await page.keyboard.press('Tab');
    await page.keyboard.type('05');
    await page.keyboard.press('ArrowRight');
    await page.keyboard.type('2023');
    await page.getByText('16 cells: 314 Ah rated, 51.2 V nominal.').waitFor();
    await page.keyboard.press('Enter');
    await heading('Clamping and spacing').waitFor();
    expect(await focused()).toBe('Clamping and spacing');
  });

  it('loses nothing to a reload in the middle, nor to the back button', async () => {
    await page.getByRole('radio', { name: /^Sprung end plates/ }).click();
    await page
      .getByText(/^saved on this/)
      .first()
      .waitFor();
    await page.reload();
    await page.getByText('Taken up where you left off').waitFor();
    await heading('Clamping and spacing').waitFor();
    expect(await page.getByRole('radio', { name: /^Sprung/ }).getAttribute('aria-checked')).toBe('true');
    await page.goto('/banks');
    await page.goBack();
    await heading('Clamping and spacing').waitFor();
    await press('Back to how they are wired');
    expect(await field('Name').inputValue()).toBe('Pump house');
    await nextStep(page, 'Clamping and spacing');
  });

  it('estimates the force from springs, and keeps that it is an estimate', async () => {
    await press('Estimate it from springs');
    await field('Rate of one spring').fill('25');
    await field('Compression').fill('8');
    // Enter in a helper does not leave the step.
    await page.keyboard.press('Enter');
    await sound();
    await press(/^Use 800/);
    expect(await field('Clamping force').inputValue()).toBe('800');
    const sources = page.getByRole('radiogroup', { name: 'How the clamping force is known' });
    expect(await sources.getByRole('radio', { name: 'estimated' }).getAttribute('aria-checked')).toBe('true');
    await page.getByText('On a face of 345 cm² that is 23 kPa (3.4 psi).').waitFor();
    await nextStep(page, 'Where and within which limits');
  });

  it('loses nothing to a sign-in that ran out, and goes on after signing in again', async () => {
    await page.getByRole('combobox', { name: 'Climate' }).selectOption('mild');
    await page.getByRole('combobox', { name: 'Place' }).selectOption('shed');
    await field(/^Charge ends at/).fill('3.45');
    await sound();
    await page
      .getByText(/^saved on this/)
      .first()
      .waitFor();
    await page.context().clearCookies();
    await page.reload();
    // In place: the address stays, and so does what was typed under it.
    await heading('Sign in again').waitFor();
    expect(await field('E-mail address').inputValue()).toBe(email);
    await field('Password').fill(newPassword);
    await page.getByRole('button', { name: 'Sign in', exact: true }).click();
    await heading('Where and within which limits').waitFor();
    expect(await field(/^Charge ends at/).inputValue()).toBe('3.45');
    await nextStep(page, 'Start and purchase');
  });

  it('looks over what was said, with the way back to each step, and is added', async () => {
    await page.getByRole('radio', { name: 'New', exact: true }).click();
    await field('Price of one cell').fill('61.50');
    await press(/^Next: /);
    const currency = page.getByRole('combobox', { name: 'Currency' });
    await currency.and(page.locator('[aria-invalid=true]')).waitFor();
    await currency.selectOption('EUR');
    await sound();
    await nextStep(page, 'Look over');
    for (const words of ['Quillmere Fathom 314', /^800.N, estimated$/, /^3\.45.V, read off the BMS$/])
      await page.getByText(words).first().waitFor();
    await sound();
    await press('Change: How they are wired');
    await field('First use').fill('2031-01');
    for (const title of ['Clamping and spacing', 'Where and within which limits', 'Start and purchase'])
      await nextStep(page, title);
    await nextStep(page, 'Look over');
    await press('Add the bank');
    // Only the server's clock can tell: back at the field, with its words.
    await heading('How they are wired').waitFor();
    await invalid('First use').waitFor();
    await field('First use').fill('2023-05');
    for (const title of ['Clamping and spacing', 'Where and within which limits', 'Start and purchase'])
      await nextStep(page, title);
    await nextStep(page, 'Look over');
    await press('Add the bank');
    await heading('Pump house').waitFor();
    expect(await storedBank('Pump house')).toMatchObject({
      parallel: 1,
      series: 16,
      clamping: 'sprung',
      clampForceN: 800,
      climateBand: 'mild',
      place: 'shed',
      priceMinor: 6150,
      sources: { clampForceN: 'estimated', chargeLimitV: 'readOff' },
    });
  });

  it('leaves no draft, and offers place and climate of the last bank as a start', async () => {
    await page.goto('/banks');
    await fillBank(page, 'Loft', '2024-02');
    await page.getByText('mild: 16 to 20 °C').waitFor();
    expect(await page.getByText('Taken up where you left off').count()).toBe(0);
    await press('Add the bank');
    await heading('Loft').waitFor();
  });
});

describe('a bank that is changed later', () => {
  it('is changed on one page, and the change is in the trail', async () => {
    await page.goto(`/banks/${(await storedBank('Loft')).id}/edit`);
    await field('Gap between cells').fill('3');
    await sound();
    await press('Save the changes');
    await heading('Loft').waitFor();
    const { id, version } = await storedBank('Loft');
    expect(version).toBe(2);
    const entry = await TrailEntry.findOne({ where: { subjectId: id, action: 'changed' } });
    expect(entry?.details).toMatchObject({ changes: { spacingMm: { from: null, to: 3 } } });
  });

  it('tells the second of two devices, and lets it choose', async () => {
    const { id } = await storedBank('Loft');
    const other = await demo.open();
    await other.goto('/sign-in');
    await signIn(other);
    await other.goto(`/banks/${id}/edit`);
    await page.goto(`/banks/${id}/edit`);
    const gapOf = (on: Page) => on.getByRole('textbox', { name: 'Gap between cells' });
    await gapOf(other).fill('5');
    await gapOf(page).fill('7');
    await other.getByRole('button', { name: 'Save the changes' }).click();
    await other.getByRole('heading', { name: 'Loft', level: 1 }).waitFor();
    await press('Save the changes');
    await page.getByText('stored 5, yours 7').waitFor();
    expect((await storedBank('Loft')).spacingMm).toBe(5);
    await sound();
    await press('Keep mine');
    await press('Save the changes');
    await heading('Loft').waitFor();
    expect(await storedBank('Loft')).toMatchObject({ spacingMm: 7, version: 4 });
    await other.context().close();
  });
});

describe('events of a bank', () => {
  const dialog = () => page.getByRole('dialog', { name: 'Add an event' });

  async function addEvent(kind: string, day: string, note: string): Promise<void> {
    await press('Add an event');
    await dialog().getByRole('combobox', { name: 'What happened' }).selectOption(kind);
    await dialog().getByRole('textbox', { name: 'Day' }).fill(day);
    await dialog()
      .getByRole('textbox', { name: /^(Note|Why)/ })
      .fill(note);
    await dialog().getByRole('button', { name: 'Add the event' }).click();
  }

  it('show what to heed after a cell swelled, until one is replaced', async () => {
    await page.goto('/banks');
    await addBank(page, 'Boathouse');
    await addEvent('swollen', '2026-06-02', 'Cell 7, a few millimetres.');
    await page.getByRole('note').getByText('A swollen cell means stop').waitFor();
    await sound();
    await addEvent('cellReplaced', '2026-06-09', '');
    await page.getByText('A swollen cell means stop').waitFor({ state: 'detached' });
  });

  it('end a bank with its reason, with thanks, and without asking for more', async () => {
    await addEvent('retired', '2026-10-11', '');
    await dialog()
      .getByRole('textbox', { name: 'Why it was retired' })
      .and(page.locator('[aria-invalid=true]'))
      .waitFor();
    await dialog().getByRole('textbox', { name: 'Why it was retired' }).fill('A larger bank took its place.');
    await dialog().getByRole('button', { name: 'Add the event' }).click();
    const thanks = page.getByRole('heading', { name: 'Thank you: this bank has done its part' });
    await thanks.waitFor();
    await page.waitForFunction(() => document.activeElement?.textContent?.startsWith('Thank you'));
    expect(await page.getByRole('link', { name: 'Add a check', exact: true }).count()).toBe(0);
    await page.getByText('No check was made').first().waitFor();
    await sound();
    await page.goto('/banks');
    await page.getByRole('listitem').filter({ hasText: 'Boathouse' }).getByText('retired').waitFor();
  });
});

it("is not reachable for somebody else's bank", async () => {
  const { id } = await storedBank('Loft');
  const other = await demo.open();
  await signInOn(other, 'owner2@demo.example');
  await other.goto(`/banks/${id}/edit`);
  await other.getByRole('alert').getByRole('heading', { name: 'Not found' }).waitFor();
  await other.context().close();
});
