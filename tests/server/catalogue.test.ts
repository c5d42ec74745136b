import type { ClaimFields } from '@/lib/contract/catalogue';
import { cellPageSchema } from '@/lib/contract/cells';
import { Bank, CellType, Check, Job, OutboxMail, QuotedClaim, TrailEntry } from '@/server/db/models';
import { verifyTrail } from '@/server/trail/verifyTrail';

import { addBank, addCellType, addCheck, addOwner } from '../support/poolFixture';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let moderator: TestClient;
beforeEach(async () => {
  server = await startTestServer();
  moderator = await server.client('moderator');
  await addCellType();
});
afterEach(() => server.stop());

const claim: ClaimFields = {
  cycles: 6000,
  endOfLifeFraction: 0.8,
  depthFraction: 1,
  chargeIt: 0.5,
  dischargeIt: 0.5,
  temperatureC: 25,
  clamping: 'clamped',
  clampForceN: 3000,
  whereItStands: 'Data sheet of 2024, page 3',
};

const path = (id: string, rest = '') => `/api/catalogue/${id}${rest}`;
const fieldsOf = async (id: string) => {
  const { maker, name, format, ratedAh, nominalV, version } = (await CellType.findByPk(id))!;
  return { maker, name, format, ratedAh, nominalV, faceAreaMm2: null, massKg: null, version };
};
const addClaimTo = (id: string, changes: Partial<ClaimFields> = {}) =>
  QuotedClaim.create({ ...claim, ...changes, cellTypeId: id });

async function addUse(cellTypeId: string, checks = 1) {
  const bank = await addBank({ ownerId: (await addOwner()).id, cellTypeId });
  for (let years = 1; years <= checks; years += 1)
    await addCheck({ bankId: bank.id, years, efc: 150 * years, sohFraction: 0.95 });
  return bank;
}

/** Waiting, running or done: the worker takes them up when it comes to it. */
const askedRefits = () => Job.count({ where: { kind: 'refit' } });

describe('GET /catalogue', () => {
  it('lists every cell type with what depends on it', async () => {
    await addCellType({ id: 'new-100', status: 'proposed' });
    await addUse('skerry-100', 2);
    await addUse('skerry-100', 1);
    await addClaimTo('skerry-100');
    const { body } = await moderator.get('/api/catalogue').expect(200);
    expect(body.cellTypes).toEqual([
      expect.objectContaining({ id: 'new-100', status: 'proposed', banks: 0, checks: 0, claims: 0 }),
      expect.objectContaining({ id: 'skerry-100', status: 'listed', banks: 2, checks: 3, claims: 1 }),
    ]);
  });

  it('says that there is no such entry', async () => {
    await moderator.get(path('nothing-here')).expect(404);
  });
});

describe('editing an entry', () => {
  it('keeps before and after in the trail, and moves the version on', async () => {
    const fields = await fieldsOf('skerry-100');
    const { body } = await moderator
      .send('put', path('skerry-100'), { ...fields, name: 'Skerry 100 B', massKg: 2.1 })
      .expect(200);
    expect(body).toMatchObject({ name: 'Skerry 100 B', massKg: 2.1, version: 2 });
    expect(body.trail[0]).toMatchObject({ action: 'edited', by: 'moderator' });
    expect(body.trail[0].changes).toContainEqual({
      field: 'name',
      before: 'skerry-100',
      after: 'Skerry 100 B',
    });
    await moderator.send('put', path('skerry-100'), fields).expect(409);
  });

  it('says what a new rating would work out anew, and does it once it is accepted', async () => {
    await addUse('skerry-100', 2);
    const edit = { ...(await fieldsOf('skerry-100')), ratedAh: 95 };
    const refused = await moderator.send('put', path('skerry-100'), edit).expect(422);
    expect(refused.body.error.fields.ratedAh).toMatch(/^2 checks of 1 bank would be worked out anew/);
    await moderator.send('put', path('skerry-100'), { ...edit, isRecomputeAccepted: true }).expect(200);
    const [before] = await Check.findAll({ order: [['testedOn', 'ASC']] });
    await server.deps.jobs.settle();
    const after = (await Check.findByPk(before!.id))!;
    // 95 Ah were measured at 25 °C and 20 A, near 0.2 It: all of a rating of 95 Ah.
    expect(after.sohFraction).toBeCloseTo(1, 2);
    expect(after.state).toBe('approved');
    expect(await TrailEntry.count({ where: { action: 'recomputed' } })).toBe(2);
    expect(await askedRefits()).toBe(1);
  });

  it('refuses maker and name of another entry', async () => {
    await addCellType({ id: 'skerry-105' });
    const edit = { ...(await fieldsOf('skerry-100')), name: 'skerry-105' };
    const { body } = await moderator.send('put', path('skerry-100'), edit).expect(409);
    expect(body.error.fields.name).toMatch(/Merge the two/);
  });

  it('refuses values that no cell has', async () => {
    const edit = { ...(await fieldsOf('skerry-100')), ratedAh: -3 };
    const { body } = await moderator.send('put', path('skerry-100'), edit).expect(422);
    expect(Object.keys(body.error.fields)).toEqual(['ratedAh']);
  });
});

describe('a proposal', () => {
  const propose = async () => {
    const proposer = await addOwner();
    await addCellType({ id: 'new-100', status: 'proposed' });
    await CellType.update({ proposedById: proposer.id }, { where: { id: 'new-100' } });
    return proposer;
  };

  it('is listed, public from then on, and its proposer is told', async () => {
    const proposer = await propose();
    await moderator.get('/api/cells/new-100').expect(404);
    await moderator.send('post', path('new-100', '/list'), { version: 1 }).expect(200);
    await moderator.get('/api/cells/new-100').expect(200);
    const mail = await OutboxMail.findOne({ where: { recipient: proposer.email }, rejectOnEmpty: true });
    expect(mail.subject).toBe('The cell type you proposed is listed');
    await moderator.send('post', path('new-100', '/list'), { version: 2 }).expect(409);
  });

  it('is declined with a reason, which goes to its proposer, and can still be listed', async () => {
    const proposer = await propose();
    await moderator.send('post', path('new-100', '/decline'), { version: 1, reason: ' ' }).expect(422);
    const decline = { version: 1, reason: 'The rating is that of a bank.' };
    const { body } = await moderator.send('post', path('new-100', '/decline'), decline).expect(200);
    expect(body).toMatchObject({
      status: 'declined',
      trail: [{ action: 'declined', reason: decline.reason }],
    });
    const mail = await OutboxMail.findOne({ where: { recipient: proposer.email }, rejectOnEmpty: true });
    expect(mail.text).toContain(decline.reason);
    const listed = await moderator.send('post', path('new-100', '/list'), { version: 2 }).expect(200);
    expect(listed.body.status).toBe('listed');
  });

  it('is not declined while approved checks rest on it, nor when it is listed', async () => {
    await propose();
    await addUse('new-100');
    const decline = { version: 1, reason: 'No.' };
    await moderator.send('post', path('new-100', '/decline'), decline).expect(409);
    await moderator.send('post', path('skerry-100', '/decline'), decline).expect(409);
    expect(await OutboxMail.count()).toBe(0);
  });
});

describe('merging two that are one', () => {
  const merge = (from: string, into: string, version = 1, intoVersion = 1) =>
    moderator.send('post', path(from, '/merge'), { version, intoId: into, intoVersion });

  it('says first what it would move, and moves nothing by that', async () => {
    await addCellType({ id: 'twin-100' });
    await addUse('twin-100', 3);
    await addClaimTo('twin-100');
    await addClaimTo('twin-100', { cycles: 4000 });
    await addClaimTo('skerry-100', { whereItStands: 'The same sheet, another print' });
    const { body } = await moderator.get(path('twin-100', '/merge?intoId=skerry-100')).expect(200);
    expect(body).toMatchObject({
      from: { id: 'twin-100', banks: 1, checks: 3 },
      into: { id: 'skerry-100', banks: 0 },
      ...{ claimsMoved: 1, claimsDropped: 1, approvedChecks: 3, isRecomputed: false },
    });
    expect(await Bank.count({ where: { cellTypeId: 'twin-100' } })).toBe(1);
  });

  it('moves banks and claims, leaves a pointer, and asks for one refit', async () => {
    await addCellType({ id: 'twin-100' });
    const banks = [await addUse('twin-100', 2), await addUse('twin-100')];
    await addUse('skerry-100');
    await addClaimTo('twin-100');
    await addClaimTo('twin-100', { cycles: 4000 });
    await addClaimTo('skerry-100', { whereItStands: 'The same sheet, another print' });
    const { body } = await merge('twin-100', 'skerry-100').expect(200);
    expect(body).toMatchObject({ id: 'skerry-100', banks: 3, checks: 4, version: 2 });
    expect(body.claims.map(({ cycles }: { cycles: number }) => cycles)).toEqual([6000, 4000]);
    expect(body.trail[0]).toMatchObject({ action: 'tookIn', otherId: 'twin-100' });
    const gone = (await moderator.get(path('twin-100')).expect(200)).body;
    expect(gone).toMatchObject({ status: 'merged', mergedIntoId: 'skerry-100', banks: 0, claims: [] });
    expect(await askedRefits()).toBe(1);
    const ofBanks = await TrailEntry.findAll({ where: { subjectType: 'bank', action: 'cellTypeMerged' } });
    expect(ofBanks.map(({ subjectId }) => subjectId).sort()).toEqual(banks.map(({ id }) => id).sort());
    const merged = await TrailEntry.findOne({ where: { subjectId: 'twin-100' }, rejectOnEmpty: true });
    expect(merged.details).toMatchObject({ intoId: 'skerry-100', claimsDropped: [{ cycles: 6000 }] });
    expect((await verifyTrail()).problems).toEqual([]);
  });

  it('answers the old address with the kept cell type, through a second merge too', async () => {
    await addCellType({ id: 'twin-100' });
    await addCellType({ id: 'third-100' });
    await merge('twin-100', 'skerry-100').expect(200);
    const visitor = await server.client();
    const page = async () =>
      cellPageSchema.parse((await visitor.get('/api/cells/twin-100').expect(200)).body);
    expect(await page()).toMatchObject({ movedFrom: 'twin-100', cellType: { id: 'skerry-100' } });
    await merge('skerry-100', 'third-100', 2).expect(200);
    expect(await page()).toMatchObject({ movedFrom: 'twin-100', cellType: { id: 'third-100' } });
    const list = (await visitor.get('/api/cell-types')).body.cellTypes;
    expect(list.map(({ id }: { id: string }) => id)).toEqual(['third-100']);
    expect(await askedRefits()).toBe(0);
  });

  it('works checks out anew where the ratings differ, and then asks for one refit', async () => {
    await addCellType({ id: 'twin-105', ratedAh: 105 });
    const bank = await addUse('twin-105', 2);
    await merge('twin-105', 'skerry-100').expect(200);
    expect(await askedRefits()).toBe(0);
    await server.deps.jobs.settle();
    expect(await TrailEntry.count({ where: { action: 'recomputed' } })).toBe(2);
    expect(await Check.count({ where: { bankId: bank.id, state: 'approved' } })).toBe(2);
    expect(await askedRefits()).toBe(1);
  });

  it('refuses itself, an older state, and one that is not listed', async () => {
    await addCellType({ id: 'new-100', status: 'proposed' });
    await merge('skerry-100', 'skerry-100').expect(422);
    await merge('new-100', 'skerry-100', 4).expect(409);
    await merge('skerry-100', 'new-100').expect(409);
    await merge('skerry-100', 'nothing-here').expect(404);
    expect(await TrailEntry.count()).toBe(0);
  });

  it('lets one of two moderators win who merge at the same moment', async () => {
    await addCellType({ id: 'twin-100' });
    await addUse('twin-100');
    const other = await server.client('moderator');
    const request = { version: 1, intoId: 'skerry-100', intoVersion: 1 };
    const answers = await Promise.all(
      [moderator, other].map((client) => client.send('post', path('twin-100', '/merge'), request)),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect(await askedRefits()).toBe(1);
  });
});

describe('quoted claims', () => {
  const send = (method: 'post' | 'put', rest: string, changes: Partial<ClaimFields>, version: number) =>
    moderator.send(method, path('skerry-100', rest), { version, claim: { ...claim, ...changes } });

  it('are added, put right and taken out, each kept in the trail', async () => {
    const added = (await send('post', '/claims', {}, 1).expect(200)).body;
    expect(added.claims).toEqual([expect.objectContaining({ cycles: 6000, notStated: [] })]);
    const at = `/claims/${added.claims[0].id}`;
    const edited = (await send('put', at, { cycles: 5000 }, 2).expect(200)).body;
    expect(edited.trail[0].changes).toEqual([{ field: 'cycles', before: '6000', after: '5000' }]);
    await send('put', at, { cycles: 1000 }, 2).expect(409);
    const removed = (await moderator.send('delete', path('skerry-100', `${at}?version=3`)).expect(200)).body;
    expect(removed.claims).toEqual([]);
    expect(removed.trail[0].changes).toContainEqual({
      field: 'whereItStands',
      before: claim.whereItStands,
      after: '',
    });
    await moderator.send('delete', path('skerry-100', `${at}?version=4`)).expect(404);
  });

  it.each([
    [{ depthFraction: null }, ['depthFraction']],
    [{ chargeIt: null, temperatureC: null }, ['chargeIt', 'temperatureC']],
    [{ dischargeIt: null }, ['dischargeIt']],
    [{ clamping: 'notStated' as const, clampForceN: null }, ['clamping']],
  ])('without %j are marked, and are compared with nothing', async (changes, notStated) => {
    const { body } = await send('post', '/claims', changes, 1).expect(200);
    expect(body.claims[0].notStated).toEqual(notStated);
  });

  it('are refused without where they stand, or with a force on cells that are not clamped', async () => {
    const { body } = await send('post', '/claims', { whereItStands: ' ' }, 1).expect(422);
    expect(Object.keys(body.error.fields)).toEqual(['claim.whereItStands']);
    const force = await send('post', '/claims', { clamping: 'none' }, 1).expect(422);
    expect(Object.keys(force.body.error.fields)).toEqual(['claim.clampForceN']);
  });
});
