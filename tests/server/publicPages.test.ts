import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import sharp from 'sharp';

import { cellListSchema, cellPageSchema } from '@/lib/contract/cells';
import { Check, CellType } from '@/server/db/models';
import { requestRefit } from '@/server/fits/requestRefit';
import { readTemplate } from '@/server/pages/renderPage';

import { addCellType, addOwnerWithChecks } from '../support/poolFixture';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

jest.setTimeout(60_000);

const built = `<!DOCTYPE html><html lang="en"><head><meta charset="utf-8"><title>Ebbline</title>
<meta name="description" content="Of the app."></head><body><div id="root"></div><script src="/app.js" defer></script></body></html>`;
/** A name that would do harm in a head, in a page and in a script. */
const hostile = `</script><script>alert("1")</script><img src=x onerror='alert(2)'>&`;

let webDir: string;
let server: TestServer;
let visitor: TestClient;
beforeEach(async () => {
  webDir = mkdtempSync(join(tmpdir(), 'ebbline-web-'));
  writeFileSync(join(webDir, 'index.html'), built);
  server = await startTestServer({ webDir, publicUrl: 'https://exchange.example' });
  visitor = await server.client();
});
afterEach(async () => {
  await server.stop();
  rmSync(webDir, { recursive: true, force: true });
});

async function fillPool() {
  await addCellType();
  for (let seed = 1; seed <= 11; seed += 1)
    await addOwnerWithChecks(seed, { conditions: { temperatureMeanC: 25 } });
  await server.deps.db.transaction((transaction) => requestRefit(server.deps, transaction));
  await server.deps.jobs.settle();
}

const firstAnswers = (page: string): { path: string; body: unknown }[] => {
  const json = /<script type="application\/json" id="first-answers">(.*?)<\/script>/s.exec(page)?.[1];
  if (json === undefined) throw new Error('the page has no first answers');
  return JSON.parse(json);
};

describe('a public page as the server sends it', () => {
  it('has its head, what it says in words, and the answer of the API it begins with', async () => {
    await fillPool();
    const list = (await visitor.get('/').expect(200).expect('content-type', /html/)).text;
    expect(list.match(/<title>/g)).toHaveLength(1);
    expect(list.match(/name="description"/g)).toHaveLength(1);
    expect(list).toContain('<title>Lifetimes of home battery cells · Ebbline</title>');
    expect(list).toContain('<link rel="canonical" href="https://exchange.example/">');
    expect(list).toContain('<a href="/cells/skerry-100">skerry-100</a>');
    expect(list).toMatch(/skerry-100<\/a>, 100.Ah:\s+[^<]* to 80 %/);
    const [answer] = firstAnswers(list);
    expect(answer!.path).toBe('/api/cells');
    expect(cellListSchema.parse(answer!.body)).toEqual((await visitor.get('/api/cells')).body);

    const cell = (await visitor.get('/cells/skerry-100?depth=80').expect(200)).text;
    expect(cell).toContain('<title>skerry-100: measured life · Ebbline</title>');
    expect(cell).toContain('<link rel="canonical" href="https://exchange.example/cells/skerry-100">');
    expect(cell).toMatch(
      /<meta property="og:image" content="https:\/\/exchange\.example\/pictures\/cells\/skerry-100\.png\?v=\d+">/,
    );
    const page = (await visitor.get('/api/cells/skerry-100')).body;
    expect(cellPageSchema.parse(firstAnswers(cell)[0]!.body)).toEqual(page);
    // The words and the answer say the same life.
    expect(cell).toContain(`${Math.round(page.view.life.leftAtReachFraction.estimate * 100)}`);
  });

  it('runs no script of its own, under the strict content policy', async () => {
    await addCellType();
    const answer = await visitor.get('/').expect(200);
    expect(answer.headers['content-security-policy']).toMatch(/script-src 'self'/);
    const scripts = answer.text.match(/<script[^>]*>/g)!;
    expect(scripts).toEqual([
      '<script type="application/json" id="first-answers">',
      '<script src="/app.js" defer>',
    ]);
  });

  it('lets no name out of the place it stands in', async () => {
    await addCellType({ id: 'odd-100' });
    await CellType.update({ name: hostile, maker: hostile }, { where: { id: 'odd-100' } });
    for (const address of ['/', '/cells/odd-100']) {
      const page = (await visitor.get(address).expect(200)).text;
      expect(page).not.toContain('<script>alert');
      expect(page).not.toContain('<img src=x');
      expect(page).not.toMatch(/content="[^"]*<script/);
      expect(page).toContain('&lt;img src=x onerror=&#39;alert(2)&#39;&gt;&amp;');
      const body = firstAnswers(page)[0]!.body as {
        cellType?: { name: string };
        cells?: { cellType: { name: string } }[];
      };
      expect((body.cellType ?? body.cells![0]!.cellType).name).toBe(hostile);
    }
  });

  it('says that there is nothing under an unknown name, with a way back', async () => {
    for (const address of ['/cells/nobody-1', '/cells/%3Cscript%3E', '/cells/%E0%A4%A', '/cells/__proto__']) {
      const answer = await visitor.get(address);
      expect([400, 404]).toContain(answer.status);
      expect(answer.text).not.toContain('<script>');
      if (answer.status === 404) expect(answer.text).toContain('There is no cell type under this name.');
    }
    const page = (await visitor.get('/cells/nobody-1')).text;
    expect(page).toContain('<meta name="robots" content="noindex">');
    expect(page).not.toContain('first-answers');
  });

  it('leaves the pages of members, and those it has no words for, to the app', async () => {
    for (const address of ['/banks', '/sign-in', '/nowhere'])
      expect((await visitor.get(address).expect(200)).text).toBe(built);
  });

  it('asks for a built page of the form it knows', () => {
    expect(() => readTemplate('<html><body></body></html>')).toThrow(/title, head or root/);
  });
});

describe('what search engines ask for', () => {
  it('is a list of the public addresses, and what not to follow', async () => {
    await addCellType();
    await addCellType({ id: 'proposed-50', status: 'proposed' });
    const map = await visitor.get('/sitemap.xml').expect(200).expect('content-type', /xml/);
    const text = map.text ?? String(map.body);
    expect(text).toContain('<loc>https://exchange.example/cells/skerry-100</loc>');
    expect(text).toContain('<loc>https://exchange.example/method</loc>');
    expect(text).not.toContain('proposed-50');
    const robots = (await visitor.get('/robots.txt').expect(200)).text;
    expect(robots).toContain('Disallow: /banks');
    expect(robots).toContain('Sitemap: https://exchange.example/sitemap.xml');
  });
});

describe('the picture for previews of links', () => {
  it('is a PNG of 1200 x 630 that tells cell types apart', async () => {
    await fillPool();
    await addCellType({ id: 'other-100' });
    const pictureOf = async (path: string) =>
      (await visitor.get(path).expect(200).expect('content-type', 'image/png')).body as Buffer;
    const own = await pictureOf('/pictures/cells/skerry-100.png');
    const { width, height, format } = await sharp(own).metadata();
    expect({ width, height, format }).toEqual({ width: 1200, height: 630, format: 'png' });
    // Fewer than two colours would be an empty sheet.
    expect((await sharp(own).stats()).entropy).toBeGreaterThan(0.1);
    expect(own.equals(await pictureOf('/pictures/cells/other-100.png'))).toBe(false);
    await pictureOf('/pictures/lifetimes.png');
    await visitor.get('/pictures/cells/nobody-1.png').expect(404);
    await visitor.get('/pictures/cells/nobody-1.svg').expect(404);
  });
});

describe('answers kept for visitors', () => {
  it('carry a tag, and are not sent again to who has them', async () => {
    await fillPool();
    for (const address of ['/api/cells', '/api/cells/skerry-100', '/', '/cells/skerry-100']) {
      const { etag, 'cache-control': caching } = (await visitor.get(address).expect(200)).headers;
      expect(etag).toMatch(/^W\/"[\w-]{22}"$/);
      expect(caching).toBe('no-cache');
      const again = await visitor.get(address).set('If-None-Match', etag!).expect(304);
      expect(again.text).toBe('');
      await visitor.get(address).set('If-None-Match', 'W/"another"').expect(200);
    }
  });

  it('change their tag with another fit, and with what waits for one', async () => {
    await fillPool();
    const tag = async () => (await visitor.get('/api/cells/skerry-100').expect(200)).headers.etag;
    const first = await tag();
    expect(await tag()).toBe(first);
    const [check] = await Check.findAll({ where: { state: 'approved' }, limit: 1 });
    await server.deps.db.transaction(async (transaction) => {
      await check!.update({ state: 'recalled' }, { transaction });
      // Not committed yet: others still see what was.
      expect(await tag()).toBe(first);
    });
    const waiting = await tag();
    expect(waiting).not.toBe(first);
    for (let seed = 31; seed <= 36; seed += 1)
      await addOwnerWithChecks(seed, { conditions: { temperatureMeanC: 25 } });
    server.setNow('2026-12-01T13:00:00Z');
    await server.deps.db.transaction((transaction) => requestRefit(server.deps, transaction));
    await server.deps.jobs.settle();
    expect([first, waiting]).not.toContain(await tag());
  });

  it('come packed as the client can read them, with the same matter', async () => {
    await addCellType();
    const packed = await visitor.get('/api/cells').set('Accept-Encoding', 'gzip').expect(200);
    expect(packed.headers['content-encoding']).toBe('gzip');
    const plain = await visitor.get('/api/cells').set('Accept-Encoding', 'identity').expect(200);
    expect(plain.headers['content-encoding']).toBeUndefined();
    expect(packed.body).toEqual(plain.body);
    expect(packed.headers.vary).toMatch(/Accept-Encoding/);
  });
});
