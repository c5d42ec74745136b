import type { Page } from 'playwright-core';

import type { CellPage } from '@/lib/contract/cells';

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

const word = (label: string) => page.getByRole('button', { name: new RegExp(`^${label}: .* Change$`) });
const search = () => new URL(page.url()).searchParams;

async function setNumber(label: string, text: string) {
  await word(label).click();
  await page.getByRole('textbox', { name: label }).fill(text);
  await page.getByRole('button', { name: 'Use this' }).click();
}

/** What the panel beside the sliders says of the life. */
const shortLife = () =>
  page
    .getByRole('region', { name: 'Move the conditions' })
    .getByText(/to 80 %/)
    .textContent();

describe('is the label right?', () => {
  it('tells measured over label at the visitor’s own use, and a link to it shows the same', async () => {
    await page.goto('/');
    await setNumber('Temperature of the cells', '30');
    await setNumber('Depth of discharge', '70');
    await page.waitForURL(/heat=30/);
    const row = page
      .getByRole('row')
      .filter({ has: page.getByRole('link', { name: 'Skerry 240', exact: true }) });
    const words = await row.textContent();
    expect(words).toMatch(/×0\.\d\d measured/);
    await row.getByRole('link').click();
    await page.getByRole('heading', { name: 'Skerry 240', level: 1 }).waitFor();
    expect(search().get('heat')).toBe('30');
    expect(search().get('depth')).toBe('70');
    const life = await shortLife();
    // The list and the page tell one life.
    expect(words).toContain(life!.slice(0, life!.indexOf(' ')));
    const claims = page.getByRole('table', { name: 'Quoted claims beside measured life' });
    await claims
      .getByText(/banks reach about .* of what the label implies at this use/)
      .first()
      .waitFor();
    const ratio = await claims.textContent();

    const other = await demo.open();
    await other.goto(page.url());
    await other.getByRole('region', { name: 'Move the conditions' }).getByText(life!).waitFor();
    expect(await other.getByRole('table', { name: 'Quoted claims beside measured life' }).textContent()).toBe(
      ratio,
    );
    await other.context().close();
  });

  it('computes every life in the page: no request follows a change of the use', async () => {
    const asked: string[] = [];
    const note = (request: { url: () => string }) => {
      const { pathname } = new URL(request.url());
      if (pathname.startsWith('/api/cells')) asked.push(pathname);
    };
    page.on('request', note);
    await page.goto('/cells/skerry-240');
    await page.getByRole('figure').locator('svg').first().waitFor();
    const before = await shortLife();
    await setNumber('Temperature of the cells', '31');
    await page
      .getByRole('region', { name: 'Move the conditions' })
      .getByText(before!)
      .waitFor({ state: 'detached' });
    page.off('request', note);
    // Nor did the page itself: it came with its first answer.
    expect(asked).toEqual([]);
  });

  it('takes a use by its name, and says where the pool does not reach one', async () => {
    await page.goto('/');
    await page.getByRole('button', { name: 'Take a use by its name' }).click();
    await page.getByRole('radio', { name: /^Backup only/ }).click();
    await page.getByRole('button', { name: 'Done' }).click();
    await page
      .getByRole('heading', { name: 'Outside the pool' })
      .or(page.getByText('Outside the pool'))
      .first()
      .waitFor();
    await page.waitForURL(/cycles=0.03/);
  });

  it('answers a silly address with a note and the standard use', async () => {
    for (const address of ['/?depth=900&rate=fast', '/cells/skerry-240?depth=900&rate=fast']) {
      await page.goto(address);
      await page.getByText(/a depth that is not a number from 5 to 100 %; 60 % is shown/).waitFor();
      await page.getByText(/a rate that is not a number/).waitFor();
      await word('Depth of discharge').getByText('60').waitFor();
    }
  });
});

describe('the condition sliders', () => {
  it('move curve and life at once by the arrow keys, and the address after them', async () => {
    await page.goto('/cells/skerry-240');
    await page.getByRole('figure').locator('svg').first().waitFor();
    const curve = () =>
      page
        .getByRole('figure')
        .first()
        .locator('svg path')
        .evaluateAll((paths) => paths.map((path) => path.getAttribute('d')).join(' '));
    const [life, drawn] = [await shortLife(), await curve()];
    const slider = page.getByRole('slider', { name: 'Temperature of the cells' });
    await slider.focus();
    for (let i = 0; i < 6; i += 1) await page.keyboard.press('ArrowRight');
    expect(await slider.getAttribute('aria-valuetext')).toMatch(/^31/);
    expect(await shortLife()).not.toBe(life);
    expect(await curve()).not.toBe(drawn);
    await page.waitForURL(/heat=31/);
    await page.keyboard.press('Home');
    expect(await slider.getAttribute('aria-valuetext')).toMatch(/^0/);
  });
});

describe('the list', () => {
  it('is found, ordered and chosen in the address', async () => {
    await page.goto('/');
    await page.getByRole('textbox', { name: /^Find/ }).fill('skerry');
    await page.waitForURL(/find=skerry/);
    const names = page.getByRole('table').getByRole('rowheader');
    for (const text of await names.allTextContents()) expect(text).toContain('Skerry');
    await page.getByRole('button', { name: 'Cell type' }).click();
    await page.waitForURL(/sort=name/);
    const ordered = await names.allTextContents();
    expect(ordered).toEqual([...ordered].sort((a, b) => a.localeCompare(b, 'en', { numeric: true })));
    await page.reload();
    await names.first().waitFor();
    expect(await names.allTextContents()).toEqual(ordered);
    await page.getByRole('textbox', { name: /^Find/ }).fill('no such cell');
    await page.getByRole('heading', { name: 'No cell type is like that' }).waitFor();
    await page.getByRole('button', { name: 'Show all' }).click();
    await names.nth(20).waitFor();
  });
});

describe('the page of a cell type', () => {
  it('gives the share of banks above 80 % as a chart and as a table', async () => {
    const told = (await (await page.request.get('/api/cells/skerry-240')).json()) as CellPage;
    await page.goto('/cells/skerry-240');
    const figure = page.getByRole('figure', { name: /^Share of banks of Skerry 240/ });
    await figure.locator('svg').waitFor();
    await figure.getByRole('button', { name: /^Show as table/ }).click();
    expect(await figure.getByRole('table').getByRole('row').count()).toBe(told.survival!.points.length + 1);
  });

  it('draws against energy delivered, with medians of the raw checks in the table', async () => {
    await page.goto('/cells/skerry-240');
    await page.getByRole('radio', { name: 'Energy' }).click();
    const figure = page.getByRole('figure', { name: 'Fade of Skerry 240' });
    await figure.getByText(/against energy delivered since new, kWh per cell/).waitFor();
    await figure.getByRole('button', { name: /^Show as table/ }).click();
    await figure.getByRole('table', { name: /single checks summed up/ }).waitFor();
  });

  it('has the answer on the first screen of a phone, before and after the app is there', async () => {
    const phone = await demo.open({ viewport: { width: 390, height: 844 }, hasTouch: true });
    for (const [address, words] of [
      ['/', 'Tarnholt'],
      ['/cells/skerry-240', 'to 80 %,'],
    ] as const) {
      await phone.goto(address);
      await phone
        .getByRole('button', { name: /Change$/ })
        .first()
        .waitFor();
      const answer = phone.getByText(words).first();
      await answer.waitFor();
      expect((await answer.boundingBox())!.y).toBeLessThan(700);
    }
    await phone.context().close();
    const plain = await demo.open({ javaScriptEnabled: false });
    await plain.goto('/cells/skerry-240');
    await plain.getByRole('heading', { name: 'Skerry 240', level: 1 }).waitFor();
    await plain.getByText(/measured; 90 % range/).waitFor();
    await plain.context().close();
  });

  it('moves little while it loads', async () => {
    const phone = await demo.open({ viewport: { width: 390, height: 844 }, hasTouch: true });
    for (const address of ['/', '/cells/skerry-240']) {
      await phone.goto(address);
      await phone.waitForLoadState('networkidle');
      const shift = await phone.evaluate(
        () =>
          new Promise<number>((resolve) => {
            let sum = 0;
            new PerformanceObserver((list) => {
              for (const entry of list.getEntries())
                sum += (entry as PerformanceEntry & { value: number }).value;
            }).observe({ type: 'layout-shift', buffered: true });
            setTimeout(() => resolve(sum), 500);
          }),
      );
      expect(shift).toBeLessThan(0.05);
    }
    await phone.context().close();
  });

  it.each([
    '/?heat=30&depth=80',
    '/?depth=900',
    '/cells/skerry-240?heat=30',
    '/cells/skerry-240?band=depth:deep',
  ])('%s is sound in both themes at every width', async (address) => {
    await page.goto(address);
    await page
      .getByRole('img', { name: /^Skerry 240/ })
      .or(page.getByRole('figure').locator('svg'))
      .first()
      .waitFor();
    expect(await unsoundness(page)).toEqual([]);
  });
});
