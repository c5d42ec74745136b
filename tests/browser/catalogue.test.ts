import type { Page } from 'playwright-core';

import { Bank, CellType, QuotedClaim } from '@/server/db/models';

import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';
import { unsoundness } from '../support/pageSoundness';

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

async function openEntry(name: string): Promise<void> {
  await page.goto('/screening/cell-types');
  await page.getByLabel(/^Maker or name/).fill(name);
  await page.getByRole('link', { name: new RegExp(`${name}$`) }).click();
  await page.getByRole('heading', { name: 'Quoted claims' }).waitFor();
}

describe('the catalogue', () => {
  it('is reached from the queue, lists what hangs on each cell type, and is sound', async () => {
    await page.goto('/screening');
    await page
      .getByRole('navigation', { name: 'Screening' })
      .getByRole('link', { name: 'Cell types' })
      .click();
    await page.getByRole('table', { name: 'Cell types' }).getByRole('row').nth(24).waitFor();
    expect(await unsoundness(page)).toEqual([]);
  });

  it('marks a claim without conditions, and keeps in the trail what is taken out', async () => {
    await openEntry('Skerry 240');
    await page.getByRole('button', { name: 'Add a claim' }).click();
    const dialog = page.getByRole('dialog', { name: 'Add a claim' });
    await dialog.getByRole('textbox', { name: 'Cycles' }).fill('9000');
    await dialog.getByRole('radio', { name: 'Not stated' }).click();
    await dialog.getByRole('textbox', { name: 'Where it stands' }).fill('Leaflet of a fair');
    await dialog.getByRole('button', { name: 'Keep the claim' }).click();
    const claim = page
      .getByRole('list', { name: 'Quoted claims' })
      .getByRole('listitem')
      .filter({ hasText: '9,000' });
    await claim.getByText('conditions not stated').waitFor();
    await claim.getByRole('button', { name: 'Take it out' }).click();
    await page.getByRole('dialog').getByRole('button', { name: 'Take it out' }).click();
    await page.getByText('where it stands: nothing, was Leaflet of a fair').waitFor();
    expect(await QuotedClaim.count({ where: { cycles: 9000 } })).toBe(0);
    expect(await unsoundness(page)).toEqual([]);
  });

  it('says what hangs on a rating before it is changed', async () => {
    await openEntry('Skerry 240');
    await page.getByRole('button', { name: 'Edit', exact: true }).click();
    const dialog = page.getByRole('dialog', { name: 'Edit the cell type' });
    await dialog.getByRole('textbox', { name: 'Rated capacity' }).fill('230');
    await dialog.getByText(/banks with .* checks are worked out anew/).waitFor();
    await dialog.getByRole('button', { name: 'Save' }).click();
    await dialog
      .getByText(/would be worked out anew/)
      .first()
      .waitFor();
    await dialog.getByRole('button', { name: 'Not now' }).click();
    expect((await CellType.findByPk('skerry-240'))!.ratedAh).toBe(240);
  });

  it('makes two that are one into one, after a preview, and the old address leads to the kept one', async () => {
    const moved = await Bank.count({ where: { cellTypeId: 'corrie-c180' } });
    expect(moved).toBeGreaterThan(0);
    await openEntry('Corrie C180');
    await page.getByRole('button', { name: 'Merge into another' }).click();
    const dialog = page.getByRole('dialog', { name: 'Merge into another' });
    await dialog.getByRole('combobox', { name: 'The cell type that stays' }).selectOption('corrie-c272');
    await dialog.getByText('The ratings differ').waitFor();
    expect(await unsoundness(page)).toEqual([]);
    await dialog.getByRole('button', { name: 'Merge the two' }).click();
    await page.waitForURL('**/screening/cell-types/corrie-c272');
    await page.getByText('A moderator merged another into it').waitFor();
    expect(await Bank.count({ where: { cellTypeId: 'corrie-c180' } })).toBe(0);
    const visitor = await demo.open();
    await visitor.goto('/cells/corrie-c180');
    await visitor.getByRole('heading', { name: 'Corrie C272', level: 1 }).waitFor();
    await visitor.context().close();
  });
});

it('the agreement says that nothing was looked at twice yet, and is sound', async () => {
  await page.goto('/screening/agreement');
  await page.getByRole('heading', { name: 'Nothing has been looked at twice yet' }).waitFor();
  expect(await unsoundness(page)).toEqual([]);
});
