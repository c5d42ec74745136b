import type { Response } from 'playwright-core';

import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';

jest.setTimeout(120_000);

/** What a phone may be asked to fetch and run before the first page answers, bytes of brotli. */
const mostScriptBytes = 320_000;

interface Fetched {
  path: string;
  bytes: number;
  encoding: string | undefined;
  caching: string | undefined;
  text: string;
}

let demo: Demo;

beforeAll(async () => {
  demo = await startDemo();
}, demoStartMs);
afterAll(() => demo.stop());

/** Every script that a browser without a cache fetches for an address, once `ready` is there. */
async function scriptsOf(address: string, ready: string): Promise<Fetched[]> {
  const page = await demo.open();
  const responses: Response[] = [];
  page.on('response', (response) => {
    if (response.request().resourceType() === 'script') responses.push(response);
  });
  await page.goto(address);
  await page.locator(ready).first().waitFor();
  await page.waitForLoadState('networkidle');
  const fetched = await Promise.all(responses.map(describeResponse));
  await page.context().close();
  return fetched;
}

async function describeResponse(response: Response): Promise<Fetched> {
  const { responseBodySize } = await response.request().sizes();
  const headers = await response.allHeaders();
  return {
    path: new URL(response.url()).pathname,
    bytes: responseBodySize,
    encoding: headers['content-encoding'],
    caching: headers['cache-control'],
    text: await response.text(),
  };
}

const drawsCharts = ({ text }: Fetched) => text.includes('VictoryAxis');
const list = () => scriptsOf('/', 'a[href="/cells/skerry-240"]');

describe('the first load of the list of lifetimes', () => {
  it('fetches no more script than a phone can be asked for', async () => {
    const scripts = await list();
    expect(scripts.length).toBeGreaterThan(0);
    const bytes = scripts.reduce((sum, script) => sum + script.bytes, 0);
    // Far less would mean that the sizes were not measured.
    expect(bytes).toBeGreaterThan(100_000);
    expect(bytes).toBeLessThanOrEqual(mostScriptBytes);
  });

  it('leaves the drawing of charts to the pages that have one', async () => {
    const scripts = await list();
    expect(scripts.filter(drawsCharts)).toEqual([]);
    const ofCell = await scriptsOf('/cells/skerry-240', '[role=figure] svg');
    expect(ofCell.filter(drawsCharts)).toHaveLength(1);
  });

  it('gets every script compressed beforehand, and keeps for a year those whose name says what they hold', async () => {
    const scripts = await list();
    expect(scripts.map(({ encoding }) => encoding)).toEqual(scripts.map(() => 'br'));
    const hashed = scripts.filter(({ path }) => path.startsWith('/_expo/'));
    expect(hashed.length).toBeGreaterThan(0);
    for (const { path, caching } of hashed) {
      expect(path).toMatch(/-[0-9a-f]{32}\.js$/);
      expect(caching).toBe('public, max-age=31536000, immutable');
    }
    for (const { caching } of scripts.filter((script) => !hashed.includes(script)))
      expect(caching).toBe('no-cache');
  });

  it.each(['/', '/cells/skerry-240', '/index.html'])(
    'asks for the page at %s again each time',
    async (address) => {
      const answer = await fetch(demo.url + address);
      expect(answer.status).toBe(200);
      expect(answer.headers.get('content-type')).toMatch(/^text\/html/);
      expect(answer.headers.get('cache-control')).toBe('no-cache');
    },
  );
});

describe('a part of the program that can not be fetched', () => {
  it.each([
    ['the drawing of charts', '/cells/skerry-240', '**/js/web/drawings-*.js', '[role=figure] svg'],
    ["the members' pages", '/sign-in', '**/js/web/pages-*.js', 'form'],
  ])('%s says so in its place, and comes when asked for again', async (_part, address, script, ready) => {
    const page = await demo.open();
    await page.route(script, (route) => route.abort());
    await page.goto(address);
    await page.getByRole('heading', { name: 'No connection' }).first().waitFor();
    await page.unroute(script);
    // Asked for again at one place it is there at all.
    await page.getByRole('button', { name: 'Try again' }).first().click();
    await page.locator(ready).first().waitFor();
    expect(await page.getByRole('heading', { name: 'No connection' }).count()).toBe(0);
    await page.context().close();
  });

  it("the members' pages are there before they are needed, once somebody is signed in", async () => {
    const page = await demo.open();
    await signInOn(page, 'owner@demo.example');
    const fetched = page.waitForResponse('**/js/web/pages-*.js');
    await page.goto('/');
    await fetched;
    await page.context().setOffline(true);
    await page.getByRole('link', { name: 'Account' }).click();
    await page.getByRole('heading', { level: 1, name: 'Account' }).waitFor();
    await page.context().close();
  });
});
