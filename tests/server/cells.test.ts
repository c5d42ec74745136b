import { cellListSchema, cellPageSchema } from '@/lib/contract/cells';
import { Check, QuotedClaim } from '@/server/db/models';
import { requestRefit } from '@/server/fits/requestRefit';

import { addCellType, addOwnerWithChecks } from '../support/poolFixture';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let visitor: TestClient;
beforeEach(async () => {
  server = await startTestServer();
  visitor = await server.client();
  await addCellType();
});
afterEach(() => server.stop());

let minutes = 0;
async function refit() {
  minutes += 1;
  server.setNow(new Date(Date.UTC(2026, 11, 1, 12, minutes)).toISOString());
  await server.deps.db.transaction((transaction) => requestRefit(server.deps, transaction));
  await server.deps.jobs.settle();
}

async function addOwners(from: number, to: number, cellTypeId?: string) {
  const owners = [];
  for (let seed = from; seed <= to; seed += 1) owners.push(await addOwnerWithChecks(seed, { cellTypeId }));
  return owners;
}

const list = async () => cellListSchema.parse((await visitor.get('/api/cells').expect(200)).body);
const page = async (query = '', id = 'skerry-100') =>
  cellPageSchema.parse((await visitor.get(`/api/cells/${id}${query}`).expect(200)).body);

describe('GET /api/cells', () => {
  it('lists cell types before anything is published, without figures', async () => {
    const { cells, pool, use } = await list();
    expect(cells).toHaveLength(1);
    expect(cells[0]).toMatchObject({ evidence: null, life: null, absence: 'noFit' });
    expect(pool).toEqual({ evidence: null, reachYears: null, fittedAt: null, waiting: 'none' });
    expect(use).toMatchObject({ depthFraction: 0.6, dischargeIt: 0.1, cyclesPerDay: 1 });
  });

  it('states a life at the standard use: years are EFC over 0.6 x 365.2425', async () => {
    await addOwners(1, 8);
    await refit();
    const life = (await list()).cells[0]?.life;
    expect(life?.years?.estimate).toBeCloseTo(life!.efc!.estimate / 219.1455, 9);
    // The truth of the fixture: 0.2 = 0.06 (n/500)^0.8, n = 500 (0.2/0.06)^1.25 = 2252 EFC; its range must hold it.
    expect(life?.efc?.lower).toBeLessThan(2252);
    expect(life?.efc?.upper).toBeGreaterThan(2252);
    // Four yearly checks of at most 280 EFC a year: 80 % lies past twice the reach or near it.
    expect(['projected', 'extrapolated']).toContain(life?.status);
    const left = life!.leftAtReachFraction;
    // At reach n = reachEfc: 1 - 0.06 (n/500)^0.8 within 1.5 points.
    expect(left.estimate).toBeCloseTo(1 - 0.06 * (life!.reachEfc / 500) ** 0.8, 1);
    expect(left.lower).toBeLessThanOrEqual(left.estimate);
    expect(left.upper).toBeGreaterThanOrEqual(left.estimate);
  });

  it('leaves out cell types that are not listed yet', async () => {
    await addCellType({ id: 'proposed-50', status: 'proposed' });
    expect((await list()).cells.map(({ cellType }) => cellType.id)).toEqual(['skerry-100']);
  });

  it('says nothing of a cell type with fewer than five owners, not even how many', async () => {
    await addCellType({ id: 'thin-100' });
    await addOwners(1, 6);
    await addOwners(7, 12, 'skerry-100');
    await addOwners(20, 23, 'thin-100');
    await refit();
    const thin = (await list()).cells.find(({ cellType }) => cellType.id === 'thin-100');
    expect(thin).toMatchObject({ evidence: null, life: null, absence: 'tooFewOwners' });
    expect((await page('', 'thin-100')).view).toMatchObject({ evidence: null, curve: [], dots: [] });
  });
});

describe('the public pool', () => {
  it('stays as it is with four owners waiting, and moves with the fifth', async () => {
    await addOwners(1, 8);
    await refit();
    const before = await page();
    expect(before.pool.waiting).toBe('none');

    await addOwners(11, 14);
    await refit();
    const waiting = await page();
    expect(waiting.pool.waiting).toBe('fewerThanFiveOwners');
    expect((await list()).pool.waiting).toBe('fewerThanFiveOwners');
    expect(waiting.view).toEqual(before.view);

    await addOwners(15, 15);
    expect((await page()).pool.waiting).toBe('due');
    await refit();
    const after = await page();
    expect(after.pool).toMatchObject({ waiting: 'none', evidence: { owners: 13, banks: 13, checks: 52 } });
    expect(after.view.evidence).toEqual({ owners: 13, banks: 13, checks: 52 });
    expect(after.view.life).not.toEqual(before.view.life);
  });

  it('tells of waiting only at the cell types concerned', async () => {
    await addCellType({ id: 'other-100' });
    await addOwners(1, 6);
    await addOwners(21, 26, 'other-100');
    await refit();
    await addOwners(31, 32, 'other-100');
    await refit();
    expect((await page('', 'other-100')).pool.waiting).toBe('fewerThanFiveOwners');
    expect((await page()).pool.waiting).toBe('none');
  });

  it('counts recalled checks as waiting', async () => {
    const [first] = await addOwners(1, 6);
    await refit();
    await Check.update({ state: 'recalled' }, { where: { bankId: first!.bank.id } });
    expect((await page()).pool.waiting).toBe('fewerThanFiveOwners');
  });
});

describe('GET /api/cells/:cellId', () => {
  it('draws the curve to three times the reach, with its statuses in order', async () => {
    await addOwners(1, 8);
    await refit();
    const { view } = await page();
    const statuses = view.curve.map(({ status }) => status);
    expect([...new Set(statuses)]).toEqual(['measured', 'projected', 'extrapolated']);
    const reach = view.life!.reachEfc;
    expect(view.curve[0]).toMatchObject({ efc: 0, sohFraction: 1 });
    expect(view.curve.at(-1)?.efc).toBeCloseTo(3 * reach, 6);
    expect(view.curve.filter(({ status }) => status === 'measured').at(-1)?.efc).toBeCloseTo(reach, 6);
    expect(view.curve.filter(({ status }) => status === 'projected').at(-1)?.efc).toBeCloseTo(2 * reach, 6);
    for (const { lower, sohFraction, upper } of view.curve) {
      expect(lower).toBeLessThanOrEqual(sohFraction + 1e-12);
      expect(upper).toBeGreaterThanOrEqual(sohFraction - 1e-12);
    }
  });

  it('rounds its dots and gives no key of bank, owner or check', async () => {
    const owners = await addOwners(1, 6);
    await refit();
    const answer = await visitor.get('/api/cells/skerry-100').expect(200);
    const { view } = cellPageSchema.parse(answer.body);
    expect(view.dots).toHaveLength(24);
    for (const { years, efc, sohFraction } of view.dots) {
      expect(years * 10).toBeCloseTo(Math.round(years * 10), 9);
      expect(efc % 10).toBe(0);
      expect(sohFraction * 1000).toBeCloseTo(Math.round(sohFraction * 1000), 9);
    }
    for (const { ownerId, bank, checks } of owners)
      for (const key of [ownerId, bank.id, bank.pseudonym, checks[0]!.id])
        expect(answer.text).not.toContain(key);
  });

  it('shows one band at a time, and greys out those without enough owners', async () => {
    await addOwners(1, 8);
    await refit();
    const { bands, band, view } = await page('?band=depth:middle');
    expect(band).toBe('depth:middle');
    expect(view.evidence?.owners).toBe(8);
    const enough = bands.filter(({ hasEnoughOwners }) => hasEnoughOwners).map(({ key }) => key);
    expect(enough).toEqual(['depth:middle', 'rate:slow', 'temperature:middle', 'clamping:none']);
    expect((await page('?band=depth:deep')).view).toMatchObject({
      evidence: null,
      absence: 'tooFewOwners',
      dots: [],
    });
  });

  it('gives quoted claims with their full cycles, none where the depth is not stated', async () => {
    const claim = {
      cellTypeId: 'skerry-100',
      endOfLifeFraction: 0.8,
      chargeIt: 0.5,
      dischargeIt: 0.5,
      temperatureC: 25,
      clamping: 'notStated' as const,
      clampForceN: null,
      whereItStands: 'Data sheet, page 2',
    };
    await QuotedClaim.create({ ...claim, cycles: 4000, depthFraction: 0.8 });
    await QuotedClaim.create({ ...claim, cycles: 6000, depthFraction: null });
    const { claims } = await page();
    expect(claims.map(({ cycles, efc }) => [cycles, efc])).toEqual([
      [6000, null],
      [4000, 3200],
    ]);
  });

  it('answers an unknown cell type with 404, an unknown band with 422 and the ones there are', async () => {
    const missing = await visitor.get('/api/cells/nobody-1').expect(404);
    expect(missing.body.error.message).toMatch(/no cell type/);
    await visitor.get('/api/cells/__proto__').expect(404);
    const unknown = await visitor.get('/api/cells/skerry-100?band=depth:abyss').expect(422);
    expect(unknown.body.error.fields.band).toMatch(/depth:deep/);
    const broken = await visitor.get('/api/cells/skerry-100?band=%3Cscript%3E').expect(422);
    expect(broken.body.error.fields.band).toBeDefined();
    await visitor.get('/api/cells/skerry-100?band=depth:deep&band=rate:fast').expect(422);
  });

  it('answers signed-in people like visitors', async () => {
    for (const role of ['owner', 'moderator', 'steward'] as const) {
      const client = await server.client(role);
      expect((await client.get('/api/cells')).body).toEqual((await visitor.get('/api/cells')).body);
    }
  });
});
