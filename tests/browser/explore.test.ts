import type { Page } from 'playwright-core';

import { type Demo, demoStartMs, startDemo } from '../support/demo';
import { unsoundness } from '../support/pageSoundness';

jest.setTimeout(180_000);

let demo: Demo;
let page: Page;

beforeAll(async () => {
  demo = await startDemo();
  page = await demo.open();
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

const search = () => new URL(page.url()).searchParams;
const field = (name: string) => page.getByRole('textbox', { name, exact: true });

describe('plan my bank', () => {
  it('answers at once, and anew with every field; the address keeps it', async () => {
    await page.goto('/plan');
    const price = page.getByText(/^€0\.\d{3} \(/).first();
    const before = await price.textContent();
    await field('Cells, together').fill('3600');
    await page.waitForURL(/cells=3600/);
    await page.getByText('€4,500').waitFor();
    expect(await price.textContent()).not.toBe(before);
    await page
      .getByText(/The cheapest is about/)
      .first()
      .waitFor();

    const other = await demo.open();
    await other.goto(page.url());
    await other.getByText('€4,500').waitFor();
    await other.context().close();
  });

  it('says beside a field what can’t be read, and keeps the answer before', async () => {
    await field('Usable part').fill('900');
    await field('Usable part').blur();
    await page.getByText(/At most 100/).waitFor();
    await page.getByText(/this is the answer before/).waitFor();
    await field('Usable part').fill('90');
    await page.getByText(/this is the answer before/).waitFor({ state: 'detached' });
  });

  it('sets two plans side by side', async () => {
    await page.getByRole('button', { name: 'Set a second plan beside it' }).click();
    await field('Rated energy').fill('20');
    const both = page.getByRole('table', { name: 'Both plans' });
    await both.waitFor();
    await page.waitForURL(/beside\.size=20/);
    const row = both.getByRole('row', { name: /^Life/ });
    const cells = await row.getByRole('cell').allTextContents();
    expect(cells).toHaveLength(2);
    expect(cells[0]).not.toBe(cells[1]);
    await page.getByRole('button', { name: 'Drop plan 2' }).click();
    await both.waitFor({ state: 'detached' });
  });

  it('adds a list of loads up to the night', async () => {
    await page.getByRole('button', { name: /^Add it up from a list/ }).click();
    // 45 W x 12 h + 40 W x 5 h + 1500 W x 0.7 h
    await page.getByText(/^Together 1\.79/).waitFor();
    await page.getByRole('button', { name: 'Use this sum' }).click();
    expect(await field('Energy a night').inputValue()).toBe('1.79');
  });

  it('is sound in both themes', async () => {
    await page.goto('/plan');
    await page
      .getByText(/The cheapest is about/)
      .first()
      .waitFor();
    expect(await unsoundness(page)).toEqual([]);
  });
});

describe('compare and share', () => {
  it('holds cell types against each other, and the link shows the same', async () => {
    await page.goto('/compare');
    await page.getByRole('heading', { name: 'Choose two cell types' }).waitFor();
    await page.getByRole('combobox', { name: 'Cell type' }).selectOption('skerry-240');
    await page.getByRole('combobox', { name: 'Add a cell type' }).selectOption('sallow-105');
    const pairs = page.getByRole('table', { name: 'Which one lasts longer' });
    await pairs.getByText('Skerry 240 outlasts Sallow 105').waitFor();
    await page.waitForURL(/cells=skerry-240/);
    const words = await pairs.textContent();

    const other = await demo.open();
    await other.goto(page.url());
    await other.getByText('Skerry 240 outlasts Sallow 105').waitFor();
    expect(await other.getByRole('table', { name: 'Which one lasts longer' }).textContent()).toBe(words);
    await other.context().close();
    expect(await unsoundness(page)).toEqual([]);
  });

  it('helps where the address asks for what can’t be', async () => {
    const many = Array.from({ length: 40 }, (_, i) => `nobody-${i}`).join(',');
    await page.goto(`/compare?cells=${many}&depth=900`);
    await page.getByText(/At most 4 are compared/).waitFor();
    await page.getByText(/is not listed/).waitFor();
  });
});

describe('does clamping pay?', () => {
  it('answers by rate class, with the readings and a break-even that follows the price', async () => {
    await page.goto('/questions');
    await page.getByRole('link', { name: 'Does clamping pay?' }).first().click();
    await page.getByRole('heading', { name: 'Does clamping pay?', level: 1 }).waitFor();
    await page.getByText(/^Above 0\.3 It: A clamped bank lasts longer/).waitFor();
    const sentence = page.getByText(/the fixture pays when it adds/);
    const before = await sentence.textContent();
    await field('Price of the fixture').fill('900');
    await page.getByText(/above 0\.3 It: .* That does not pay for it\./).waitFor();
    expect(await sentence.textContent()).not.toBe(before);
    await page
      .getByText(/never pressed flat/)
      .first()
      .waitFor();
    expect(await unsoundness(page)).toEqual([]);
  });

  it.each(['depth', 'rate', 'heat', 'charge', 'end'])('the question of %s is sound', async (slug) => {
    await page.goto(`/questions/${slug}`);
    await page.getByRole('heading', { name: 'What could mislead' }).waitFor();
    expect(search().size).toBe(0);
    expect(await unsoundness(page)).toEqual([]);
  });

  it('says which questions there are where one is not known', async () => {
    await page.goto('/questions/nonsense');
    await page.getByRole('heading', { name: 'No such question' }).waitFor();
    await page.getByRole('link', { name: 'Warm or cool?' }).waitFor();
  });
});

it.each(['/data', '/data/privacy'])('%s is sound', async (path) => {
  await page.goto(path);
  await page.getByRole('heading', { level: 1 }).waitFor();
  expect(await unsoundness(page)).toEqual([]);
});
