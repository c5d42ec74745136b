import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';

import { publicFitSchema } from '@/lib/contract/fits';
import {
  type Release,
  releaseListSchema,
  type ReleasePreview,
  releasePreviewSchema,
} from '@/lib/contract/releases';
import { Bank, Check, OutboxMail, ReleaseBank, ReleaseFile, TrailEntry, User } from '@/server/db/models';
import { requestRefit } from '@/server/fits/requestRefit';
import { sweepStaleUploads } from '@/server/uploads/sweepStaleUploads';

import { addCellType, addOwnerWithChecks } from '../support/poolFixture';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

jest.setTimeout(240_000);

let server: TestServer;
let visitor: TestClient;
let steward: TestClient;
beforeAll(async () => {
  server = await startTestServer();
  visitor = await server.client();
  steward = await server.client('steward');
  await addCellType();
});
afterAll(() => server.stop());

let minutes = 0;
async function refit() {
  minutes += 1;
  server.setNow(new Date(Date.UTC(2026, 11, 1, 12, minutes)).toISOString());
  await server.deps.db.transaction((transaction) => requestRefit(server.deps, transaction));
  await server.deps.jobs.settle();
}

const owners: Awaited<ReturnType<typeof addOwnerWithChecks>>[] = [];
async function addOwners(from: number, to: number) {
  for (let seed = from; seed <= to; seed += 1) owners.push(await addOwnerWithChecks(seed));
}

const list = async () =>
  releaseListSchema.parse((await visitor.get('/api/releases').expect(200)).body).releases;
const preview = async (): Promise<ReleasePreview> =>
  releasePreviewSchema.parse((await steward.get('/api/releases/preview').expect(200)).body);
const make = (note = 'New checks.') => steward.send('post', '/api/releases', { note });
const file = (name: string, number = 1) => visitor.get(`/api/releases/${number}/files/${name}`);
const text = async (name: string, number = 1) => {
  const { body } = await file(name, number)
    .buffer(true)
    .parse((res, done) => {
      const pieces: Buffer[] = [];
      res.on('data', (piece: Buffer) => pieces.push(piece));
      res.on('end', () => done(null, Buffer.concat(pieces)));
    });
  return (body as Buffer).toString('utf8');
};
const sha256 = (content: string) => createHash('sha256').update(content).digest('hex');
const rowsOf = (csv: string) => csv.trim().split('\n').slice(1);

/** One after the other: each starts from the releases before it. */
describe('releases', () => {
  it('are none at first, and none can be made of nothing', async () => {
    expect(await list()).toEqual([]);
    expect(await preview()).toMatchObject({ number: 1, evidence: null, held: [] });
    const { status, body } = await make();
    expect([status, body.error.code]).toEqual([409, 'conflict']);
    expect((await make('')).status).toBe(422);
    expect((await file('checks.csv')).status).toBe(404);
  });

  it('are made by a steward of what is public, after a look at it', async () => {
    await addOwners(1, 12);
    await refit();
    await User.update({ noticeReleases: true }, { where: { id: owners[0]!.ownerId } });
    const before = await preview();
    expect(before).toMatchObject({ number: 1, isMaking: false, changes: { came: 12, left: 0, changed: 0 } });
    expect(before.moves.map(({ cellType, before: was }) => [cellType, was])).toEqual([
      [null, null],
      ['skerry-100', null],
    ]);
    expect((await make()).status).toBe(202);
    await server.deps.jobs.settle();
    const [release] = await list();
    expect(release).toMatchObject({ number: 1, note: 'New checks.', evidence: { checks: 48 } });
    expect(release!.evidence.owners).toEqual({ from: 10, to: 19 });
    expect(release!.files.map(({ name }) => name).sort()).toEqual(
      [
        ...['SHA256SUMS', 'changelog.md', 'checks.csv', 'checks.jsonl', 'citation.txt', 'dictionary.json'],
        ...['dictionary.md', 'ebbline-release-1.zip', 'fit.json', 'licence.txt', 'readme.md'],
      ].sort(),
    );
    expect(await TrailEntry.count({ where: { subjectType: 'release', action: 'released' } })).toBe(1);
  });

  it('tell those who follow them', async () => {
    const mails = await OutboxMail.findAll({ where: { subject: 'Release 1 of the pool' } });
    expect(mails.map(({ userId }) => userId)).toEqual([owners[0]!.ownerId]);
  });

  it('give their files by checksum, whole or in part, for good', async () => {
    const { files } = (await list())[0]!;
    const csv = await text('checks.csv');
    const listed = files.find(({ name }) => name === 'checks.csv')!;
    expect([sha256(csv), csv.length]).toEqual([listed.sha256, listed.bytes]);
    for (const line of (await text('SHA256SUMS')).trim().split('\n')) {
      const [sum, name] = line.split('  ');
      expect([name, sha256(await text(name!))]).toEqual([name, sum]);
    }
    const whole = await file('checks.csv');
    expect(whole.headers['cache-control']).toContain('immutable');
    expect(whole.headers.etag).toBe(`"${listed.sha256}"`);
    expect((await file('checks.csv').set('If-None-Match', whole.headers.etag!)).status).toBe(304);
    const part = await file('checks.csv').set('Range', 'bytes=5-14');
    expect([part.status, part.text, part.headers['content-range']]).toEqual([
      206,
      csv.slice(5, 15),
      `bytes 5-14/${csv.length}`,
    ]);
    expect((await file('checks.csv').set('Range', 'bytes=-10')).text).toBe(csv.slice(-10));
    expect((await file('checks.csv').set('Range', `bytes=${csv.length}-`)).status).toBe(416);
  });

  it('are fitted from the command line to the same digits, which are those of the pages', async () => {
    const folder = mkdtempSync(join(tmpdir(), 'release-'));
    const path = join(folder, 'checks.csv');
    writeFileSync(path, await text('checks.csv'));
    const { stdout, status } = spawnSync(
      process.execPath,
      ['--import', 'tsx', 'scripts/fit.ts', path, '--json', '-'],
      { cwd: resolve(__dirname, '../..'), encoding: 'utf8', maxBuffer: 1e8 },
    );
    rmSync(folder, { recursive: true });
    expect(status).toBe(0);
    const fitJson = await text('fit.json');
    expect(stdout).toBe(fitJson);
    const { fit } = publicFitSchema.parse((await visitor.get('/api/fits/public')).body);
    const published = fit!.parameters.map(({ name, estimate, se }) => [name, estimate, se]);
    const { parameters } = JSON.parse(fitJson) as { parameters: Parameter[] };
    expect(parameters.map(({ name, estimate, se }) => [name, estimate, se])).toEqual(published);
  });

  it('say of a bank only what the dictionary lists, under a name of this release', async () => {
    const csv = await text('checks.csv');
    const fields = (JSON.parse(await text('dictionary.json')) as { name: string }[]).map(({ name }) => name);
    expect(csv.split('\n')[0]).toBe(fields.join(','));
    const [first] = (await text('checks.jsonl')).split('\n');
    expect(Object.keys(JSON.parse(first!) as object)).toEqual(fields);
    const names = new Set(rowsOf(csv).map((row) => row.split(',')[0]!));
    expect(names.size).toBe(12);
    const banks = await Bank.findAll();
    for (const { pseudonym, id } of banks) {
      expect(names.has(pseudonym)).toBe(false);
      expect(csv).not.toContain(id);
    }
  });

  it('keep changes of fewer than five owners for a later one', async () => {
    await addOwners(21, 24);
    await refit();
    expect((await preview()).changes).toEqual({ came: 0, left: 0, changed: 0 });
    await addOwners(25, 26);
    // One owner's checks are withdrawn as well: theirs stay until four more go.
    await Check.update({ state: 'withdrawn' }, { where: { bankId: owners[0]!.bank.id } });
    await refit();
    expect((await preview()).changes).toEqual({ came: 6, left: 0, changed: 0 });
    expect((await make('Six more banks.')).status).toBe(202);
    await server.deps.jobs.settle();
    const [second] = (await list()) as [Release];
    expect(second).toMatchObject({ number: 2, changes: { came: 6, left: 0, changed: 0 } });
    const [one, two] = [await text('checks.csv'), await text('checks.csv', 2)];
    expect(rowsOf(two)).toHaveLength(72);
    const namesOf = (csv: string) => new Set(rowsOf(csv).map((row) => row.split(',')[0]!));
    expect([...namesOf(two)].filter((name) => namesOf(one).has(name))).toEqual([]);
  });

  it('no longer hold what five owners withdrew', async () => {
    const gone = owners.slice(0, 5).map(({ bank }) => bank.id);
    await Check.update({ state: 'withdrawn' }, { where: { bankId: gone } });
    await refit();
    await make('Five banks were withdrawn.');
    await server.deps.jobs.settle();
    expect((await list())[0]).toMatchObject({ number: 3, changes: { came: 0, left: 5, changed: 0 } });
    expect(rowsOf(await text('checks.csv', 3))).toHaveLength(52);
  });

  it('can not be changed, nor lose their files to the sweep', async () => {
    await expect(server.deps.db.query('UPDATE releases SET note = 1')).rejects.toThrow();
    await expect(server.deps.db.query('DELETE FROM releaseBanks')).rejects.toThrow();
    await sweepStaleUploads(server.deps);
    for (const { name, number } of await ReleaseFile.findAll()) {
      // One byte of JSON is no JSON: only the status is read.
      const answer = await file(name, number)
        .set('Range', 'bytes=0-0')
        .buffer(true)
        .parse((res, done) => {
          res.on('data', () => undefined);
          res.on('end', () => done(null, null));
        });
      expect([name, answer.status]).toEqual([name, 206]);
    }
    expect(await ReleaseBank.count({ where: { number: 1 } })).toBe(12);
  });
});

interface Described {
  'x-example': string;
  responses: Record<string, { content?: Record<string, { schema: { type: string } }> }>;
}

interface Parameter {
  name: string;
  estimate: number;
  se: number;
}

describe('the public API', () => {
  const api = (path: string) => visitor.get(`/api/v1${path}`);

  it('gives the rows of a release page by page, as JSON or CSV', async () => {
    const csv = await text('checks.csv', 2);
    const first = await api('/checks?release=2&limit=10').expect(200);
    expect(first.body.checks[0].bank).toBe(rowsOf(csv)[0]!.split(',')[0]);
    expect(first.headers.link).toContain('rel="next"');
    const second = await api(`/checks?release=2&limit=10&after=${first.body.next}`).expect(200);
    expect(second.body.next).toBeNull();
    expect(first.body.checks.length + second.body.checks.length).toBe(rowsOf(csv).length);
    const whole = await api('/checks?release=2&limit=1000').set('Accept', 'text/csv').expect(200);
    expect(whole.headers['content-type']).toContain('text/csv');
    expect(whole.text).toBe(csv);
    expect((await api('/checks?release=99')).status).toBe(404);
    expect((await api('/checks?after=x')).body.error.fields).toHaveProperty('after');
  });

  it('pages through cell types by their keys', async () => {
    await addCellType({ id: 'ayre-50' });
    const first = await api('/cells?limit=1').expect(200);
    expect(first.body.cells.map(({ cellType }: { cellType: { id: string } }) => cellType.id)).toEqual([
      'ayre-50',
    ]);
    const second = await api(`/cells?limit=1&after=${first.body.next}`).expect(200);
    expect(second.body).toMatchObject({ next: null, cells: [{ cellType: { id: 'skerry-100' } }] });
    expect((await api('/cells/skerry-100?band=depth:middle')).body.band).toBe('depth:middle');
    expect((await api('/cells/skerry-100?band=depth:odd')).status).toBe(422);
    expect((await api('/cells/nothing')).status).toBe(404);
  });

  it('may be kept a while, asked again by tag, and read from any origin', async () => {
    const { headers } = await api('/fit').set('Origin', 'https://elsewhere.example').expect(200);
    expect(headers['cache-control']).toBe('public, max-age=300');
    expect(headers['access-control-allow-origin']).toBe('*');
    expect(headers['access-control-allow-credentials']).toBeUndefined();
    expect((await api('/fit').set('If-None-Match', headers.etag!)).status).toBe(304);
    const { headers: own } = await visitor.get('/api/cells').set('Origin', 'https://elsewhere.example');
    expect(own['access-control-allow-origin']).toBeUndefined();
    expect((await visitor.send('post', '/api/v1/fit')).status).toBe(404);
  });

  it('describes every one of its addresses by its schema (OpenAPI 3.1)', async () => {
    const { body } = await api('/openapi.json').expect(200);
    expect(body.openapi).toBe('3.1.0');
    expect(Object.keys(body.paths).sort()).toEqual(
      ['/cells', '/cells/{cellId}', '/checks', '/fit', '/releases'].sort(),
    );
    for (const { get } of Object.values(body.paths) as { get: Described }[]) {
      expect(get.responses['200']!.content!['application/json']!.schema.type).toBe('object');
      const example = get['x-example'];
      if (!example.includes('skerry-240')) expect((await api(example)).status).toBe(200);
    }
    const names = (body.paths['/checks'].get.parameters as { name: string }[]).map(({ name }) => name);
    expect(names.sort()).toEqual(['after', 'limit', 'release']);
  });

  it('limits how often anyone asks, and says so in the standard headers', async () => {
    const limited = await startTestServer({ hasRateLimits: true });
    const client = await limited.client();
    const { headers } = await client.get('/api/v1/releases').expect(200);
    expect(headers.ratelimit).toMatch(/r=599/);
    expect(headers['ratelimit-policy']).toMatch(/q=600; w=900/);
    await limited.stop();
  });
});
