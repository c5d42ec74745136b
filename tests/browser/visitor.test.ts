import type { Page } from 'playwright-core';

import type { CellList, CellPage } from '@/lib/contract/cells';
import type { ErrorBody } from '@/lib/contract/errors';

import { type Demo, demoStartMs, startDemo } from '../support/demo';
import { unsoundness } from '../support/pageSoundness';

jest.setTimeout(120_000);

let demo: Demo;
let page: Page;
let list: CellList;

beforeAll(async () => {
  demo = await startDemo();
  page = await demo.open();
  list = (await (await page.request.get('/api/cells')).json()) as CellList;
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

const heading = (name: string) => page.getByRole('heading', { name, level: 1 });

async function cellPage(cellId: string, query = ''): Promise<CellPage> {
  return (await page.request.get(`/api/cells/${cellId}${query}`)).json();
}

describe('the list of lifetimes', () => {
  beforeEach(() => page.goto('/'));

  it('shows every listed cell type, the longest life first and those without one of their own last', async () => {
    const links = page.getByRole('table', { name: 'Cell types by measured life' }).getByRole('link');
    await links.first().waitFor();
    const shown = await links.allTextContents();
    const years = new Map(
      list.cells.map(({ cellType, life }) => [
        cellType.name,
        life && life.basis === 'cellType' ? life.years.estimate : -1,
      ]),
    );
    expect(shown).toHaveLength(24);
    const lives = shown.map((name) => years.get(name)!);
    expect(lives).toEqual([...lives].sort((a, b) => b - a));
    expect(lives.filter((life) => life === -1).length).toBeGreaterThan(0);
  });

  it('says in words what each gauge shows, and gives a cell type of too few owners the pool’s figure', async () => {
    const thin = list.cells.filter(({ absence }) => absence === 'tooFewOwners');
    expect(thin.length).toBeGreaterThan(0);
    for (const { cellType, evidence } of thin) {
      expect(evidence).toBeNull();
      const link = page.getByRole('link', { name: cellType.name, exact: true });
      const row = page.getByRole('row').filter({ has: link });
      await row.getByText('too few owners').waitFor();
      await row.getByRole('img', { name: /The pool’s figure, over all cell types/ }).waitFor();
      expect(await row.textContent()).not.toMatch(/\d %/);
    }
    const gauge = page.getByRole('img', { name: /^Skerry 240: .* years to 80 %/ });
    expect(await gauge.count()).toBe(1);
  });

  it('leads to the page of a cell type and back to where one was', async () => {
    await page.getByRole('link', { name: 'Skerry 240' }).click();
    await heading('Skerry 240').waitFor();
    expect(await page.title()).toBe('Skerry 240: measured life · Ebbline');
    await page.goBack();
    await heading('How long home battery cells last, measured').waitFor();
  });
});

describe('the page of a cell type', () => {
  beforeEach(() => page.goto('/cells/skerry-240'));

  it('draws the curve, and gives the same figures in words and as a table', async () => {
    const { view } = await cellPage('skerry-240');
    const figure = page.getByRole('figure', { name: 'Fade of Skerry 240' });
    await figure.locator('svg').first().waitFor();
    await figure.getByText(`${view.dots.length} single checks are drawn.`).waitFor();
    await figure.getByRole('button', { name: 'Show as table' }).click();
    const rows = figure.getByRole('table').first().getByRole('row');
    await rows.nth(3).waitFor();
    const drawn = (await rows.allTextContents()).join(' ');
    for (const word of ['measured', 'projected']) expect(drawn).toContain(word);
    await figure.getByRole('button', { name: 'Hide the table' }).click();
    expect(await figure.getByRole('table').count()).toBe(0);
  });

  it('reads the curve out by the arrow keys', async () => {
    const reading = page.getByRole('slider', { name: 'Readings: Fade of Skerry 240' });
    await reading.focus();
    await page.keyboard.press('Home');
    const first = await reading.getAttribute('aria-valuetext');
    await page.keyboard.press('ArrowRight');
    const second = await reading.getAttribute('aria-valuetext');
    expect(first).toMatch(/\d.*%/);
    expect(second).toMatch(/\d.*%/);
    expect(second).not.toBe(first);
  });

  it('draws the curve against full cycles when asked', async () => {
    await page.getByRole('radio', { name: 'Full cycles' }).click();
    await page
      .getByText(/Fade of Skerry 240: .* against equivalent full cycles/)
      .first()
      .waitFor();
  });

  it('shows one band at a time, kept in the address', async () => {
    const whole = await cellPage('skerry-240');
    const deep = whole.bands.find(({ key }) => key === 'depth:deep')!;
    const inBand = await cellPage('skerry-240', '?band=depth:deep');
    expect(inBand.view.dots.length).toBeLessThan(whole.view.dots.length);
    await page.getByRole('button', { name: deep.label }).click();
    await page.getByRole('figure', { name: `Fade of Skerry 240, ${deep.label}` }).waitFor();
    await page.getByText(`${inBand.view.dots.length} single checks are drawn.`).waitFor();
    expect(new URL(page.url()).searchParams.get('band')).toBe('depth:deep');
    await page.reload();
    const choice = page.getByRole('button', { name: deep.label, pressed: true });
    await choice.click();
    await page.getByRole('figure', { name: 'Fade of Skerry 240', exact: true }).waitFor();
    await page.getByText(`${whole.view.dots.length} single checks are drawn.`).waitFor();
    expect(page.url()).not.toContain('band');
  });

  it('offers no band that fewer than five owners stand behind', async () => {
    const pages = await Promise.all(list.cells.map(({ cellType }) => cellPage(cellType.id)));
    const thin = pages.find(({ view, bands }) => view.life && bands.some((band) => !band.hasEnoughOwners))!;
    const band = thin.bands.find(({ hasEnoughOwners }) => !hasEnoughOwners)!;
    await page.goto(`/cells/${thin.cellType.id}`);
    const choice = page.getByRole('button', { name: `${band.label}: too few owners yet` });
    await choice.waitFor();
    expect(await choice.isDisabled()).toBe(true);
    await page.goto(`/cells/${thin.cellType.id}?band=${band.key}`);
    await page.getByRole('heading', { name: 'No life shown: too few owners yet' }).waitFor();
    expect(await page.getByRole('figure').count()).toBe(0);
  });

  it('says that the figures of a cell type of too few owners are the pool’s, and draws none of its checks', async () => {
    const { cellType } = list.cells.find(({ absence }) => absence === 'tooFewOwners')!;
    await page.goto(`/cells/${cellType.id}`);
    await page.getByText('The pool’s figures, not this cell type’s own').waitFor();
    await page
      .getByRole('figure', { name: /^Fade of/ })
      .getByText('No single checks are drawn.')
      .waitFor();
  });
});

describe('addresses that lead nowhere', () => {
  it.each(['/nowhere', '/cells', '/cells/skerry-240/more'])('%s says so and leads back', async (address) => {
    await page.goto(address);
    await heading('No such page').waitFor();
    expect(await page.title()).toBe('No such page · Ebbline');
    await page.getByRole('link', { name: 'To measured lifetimes' }).click();
    await heading('How long home battery cells last, measured').waitFor();
  });

  it.each(['unknown', '%3Cimg%20src=x%20onerror=alert(1)%3E', '..%2F..%2Fetc', '__proto__'])(
    'a cell type called %s is not found',
    async (name) => {
      const dialogs: string[] = [];
      page.once('dialog', (dialog) => {
        dialogs.push(dialog.message());
        void dialog.dismiss();
      });
      await page.goto(`/cells/${name}`);
      await page.getByRole('alert').getByRole('heading', { name: 'Not found' }).waitFor();
      expect(dialogs).toEqual([]);
    },
  );
});

describe('without a connection', () => {
  it('says so and shows the page when tried again', async () => {
    await page.route('**/api/cells', (route) => route.abort());
    await page.goto('/method');
    await page.getByRole('link', { name: 'Lifetimes' }).first().click();
    await page.getByRole('heading', { name: 'No connection' }).waitFor();
    await page.unroute('**/api/cells');
    await page.getByRole('button', { name: 'Try again' }).click();
    await page.getByRole('link', { name: 'Skerry 240' }).waitFor();
  });

  it('shows what was loaded before, and tells when something new can not be', async () => {
    await page.goto('/cells/skerry-240');
    await page.getByRole('figure').locator('svg').first().waitFor();
    await page.getByRole('link', { name: 'Back to Lifetimes' }).click();
    await page.getByRole('link', { name: 'Skerry 320' }).waitFor();
    await page.context().setOffline(true);
    await page.getByRole('link', { name: 'Skerry 240' }).click();
    await page.getByRole('figure').locator('svg').first().waitFor();
    await page.getByRole('link', { name: 'Back to Lifetimes' }).click();
    await page.getByRole('link', { name: 'Skerry 320' }).click();
    await page.getByRole('heading', { name: 'No connection' }).waitFor();
    // It is asked for again by itself when the network is back.
    await page.context().setOffline(false);
    await page.getByRole('figure', { name: 'Fade of Skerry 320' }).waitFor();
  });

  it('tells a failure of the server from it, with a reference for help', async () => {
    const json: ErrorBody = {
      error: { code: 'internal', message: 'Something failed here.', fields: {}, requestId: 'r-17' },
    };
    await page.route('**/api/cells', (route) => route.fulfill({ status: 500, json }));
    await page.goto('/method');
    await page.getByRole('link', { name: 'Lifetimes' }).first().click();
    await page.getByRole('heading', { name: 'This could not be loaded' }).waitFor();
    await page.getByText('Reference for help: r-17').waitFor();
  });

  afterEach(() => page.unrouteAll());
});

interface VisitorPage {
  address: string;
  title: string;
  /** What is there when the page has its data. */
  ready: () => Promise<void>;
}

const visible = (role: 'heading' | 'figure' | 'button' | 'link', name: string) => async () => {
  await page.getByRole(role, { name, exact: true }).waitFor();
};

const pages: VisitorPage[] = [
  { address: '/', title: 'Lifetimes of home battery cells', ready: visible('link', 'Skerry 240') },
  {
    address: '/cells/skerry-240',
    title: 'Skerry 240: measured life',
    ready: () => page.getByRole('figure').locator('svg').first().waitFor(),
  },
  { address: '/cells/unknown', title: 'Cell type', ready: visible('heading', 'Not found') },
  { address: '/nowhere', title: 'No such page', ready: visible('heading', 'No such page') },
  { address: '/sign-in', title: 'Sign in', ready: visible('heading', 'Demo accounts') },
  { address: '/register', title: 'Open an account', ready: visible('heading', 'Open an account') },
  {
    address: '/verify?token=abc',
    title: 'Confirm your address',
    ready: visible('button', 'Confirm the address'),
  },
  { address: '/reset', title: 'Choose a new password', ready: visible('heading', 'Choose a new password') },
  { address: '/outbox', title: 'Outbox', ready: visible('heading', 'Outbox') },
];

describe('every page of a visitor', () => {
  it.each(pages)('$address has its title, and is sound in both themes at every width', async (of) => {
    await page.goto(of.address);
    await of.ready();
    expect(await page.title()).toBe(`${of.title} · Ebbline`);
    expect(await unsoundness(page)).toEqual([]);
  });

  it('wears the colours of the theme that the system asks for', async () => {
    await page.goto('/');
    const paper = () => page.evaluate(() => getComputedStyle(document.documentElement).backgroundColor);
    // look.md: paper #F6F3EC light, #0F1B1F dark.
    expect(await paper()).toBe('rgb(246, 243, 236)');
    await page.emulateMedia({ colorScheme: 'dark' });
    expect(await paper()).toBe('rgb(15, 27, 31)');
    await page.emulateMedia({ colorScheme: 'light' });
  });

  it('has what a visitor needs in the bar of a phone', async () => {
    const phone = await demo.open({ viewport: { width: 390, height: 844 }, hasTouch: true });
    await phone.goto('/');
    const bar = phone.getByRole('navigation', { name: 'Places' });
    await bar.getByRole('link', { name: 'Lifetimes' }).waitFor();
    expect(await bar.getByRole('link').count()).toBeLessThanOrEqual(5);
    for (const link of await bar.getByRole('link').all())
      expect((await link.boundingBox())!.height).toBeGreaterThanOrEqual(44);
    await phone.context().close();
  });
});
