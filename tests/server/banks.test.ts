import { randomUUID } from 'node:crypto';

import { Bank, TrailEntry, TrailText } from '@/server/db/models';

import { bankInput, createBankOf, createCellType } from '../support/bankFixtures';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;
let other: TestClient;
let visitor: TestClient;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  await createCellType({ id: 'gannet-100', ratedAh: 100 });
  await createCellType({ id: 'tern-90', ratedAh: 90, status: 'proposed' });
  owner = await server.client('owner');
  other = await server.client('owner');
  visitor = await server.client();
});

afterAll(() => server.stop());

describe('GET /api/cell-types', () => {
  it('answers listed cell types to anyone, by maker and name', async () => {
    const { status, body } = await visitor.get('/api/cell-types');
    expect(status).toBe(200);
    const [maker, nominalV, faceAreaMm2, isProposed] = ['Gannet', 3.2, null, false];
    const rest = { maker, nominalV, faceAreaMm2, isProposed };
    expect(body.cellTypes).toEqual([
      { id: 'gannet-100', name: 'Gannet gannet-100', ratedAh: 100, ...rest },
      { id: 'gannet-280', name: 'Gannet gannet-280', ratedAh: 280, ...rest },
    ]);
  });
});

describe('POST /api/banks', () => {
  it('stores the bank under its owner with a trail entry and a pseudonym that is not told', async () => {
    const { status, body } = await owner.send('post', '/api/banks', bankInput({ parallel: 2 }));
    expect(status).toBe(201);
    expect(body).toMatchObject({
      name: 'Barn',
      version: 1,
      ratedAh: 560,
      checkCount: 0,
      events: [],
      madeMonth: null,
    });
    expect(body.cellType.id).toBe('gannet-280');
    const bank = await Bank.findByPk(body.id as string);
    expect(bank?.ownerId).toBe(owner.userId);
    expect(bank?.pseudonym).toMatch(/^[CDFGHJKMNPQRTVWXY34679]{5}$/);
    expect(JSON.stringify(body)).not.toContain(bank!.pseudonym);
    const [entry] = await TrailEntry.findAll({ where: { subjectId: body.id } });
    expect(entry).toMatchObject({ action: 'created', actorId: owner.userId, subjectType: 'bank' });
  });

  it('refuses a visitor', async () => {
    const { status, body } = await visitor.send('post', '/api/banks', bankInput());
    expect(status).toBe(401);
    expect(body.error.code).toBe('notSignedIn');
  });

  it.each<[string, object, string]>([
    ['no name', { name: '  ' }, 'name'],
    ['a name that is too long', { name: 'x'.repeat(81) }, 'name'],
    ['a cell type that is not there', { cellTypeId: 'no-such-cell' }, 'cellTypeId'],
    ['a cell type that is only proposed', { cellTypeId: 'tern-90' }, 'cellTypeId'],
    ['SQL for a cell type', { cellTypeId: "x'; DROP TABLE banks; --" }, 'cellTypeId'],
    ['no cells in series', { series: 0 }, 'series'],
    ['half a cell in parallel', { parallel: 1.5 }, 'parallel'],
    ['text for a number', { parallel: '2' }, 'parallel'],
    ['a month that does not exist', { firstUseMonth: '2024-13' }, 'firstUseMonth'],
    ['a first use in the future', { firstUseMonth: '2027-01' }, 'firstUseMonth'],
    ['a making after first use', { madeMonth: '2024-01' }, 'madeMonth'],
    ['a force without clamping', { clampForceN: 300 }, 'clamping'],
    ['a price without a currency', { priceMinor: 9000 }, 'priceCurrency'],
    ['limits the wrong way round', { chargeLimitV: 2.8, dischargeLimitV: 3.4 }, 'dischargeLimitV'],
    ['a source of a field that is not asked', { sources: { owner: 'metered' } }, 'sources'],
  ])('answers %s with the field', async (_what, change, field) => {
    const { status, body } = await owner.send('post', '/api/banks', { ...bankInput(), ...change });
    expect(status).toBe(422);
    expect(body.error.code).toBe('invalid');
    expect(Object.keys(body.error.fields as object)).toContain(field);
  });

  it.each([
    ['a list', '[1,2]'],
    ['null', 'null'],
    ['broken JSON', '{"name":'],
    ['prototype keys', '{"__proto__":{"name":"x"},"constructor":{"prototype":{"isAdmin":true}}}'],
  ])('answers %s for a body with a 4xx in the one error shape', async (_what, text) => {
    const { status, body } = await owner
      .send('post', '/api/banks')
      .set('content-type', 'application/json')
      .send(text);
    expect([400, 422]).toContain(status);
    expect(body.error).toMatchObject({
      code: expect.any(String),
      message: expect.any(String),
      fields: expect.any(Object),
    });
    expect(({} as Record<string, unknown>).isAdmin).toBeUndefined();
  });

  it('keeps HTML and formulas as the text they are', async () => {
    const name = '<script>alert(1)</script> =cmd|calc';
    const { status, body } = await owner.send('post', '/api/banks', bankInput({ name }));
    expect(status).toBe(201);
    expect(body.name).toBe(name);
  });

  it('does not let the owner or the pseudonym be set', async () => {
    const request = { ...bankInput(), ownerId: other.userId, pseudonym: 'AAAAA' };
    const { body } = await owner.send('post', '/api/banks', request);
    const bank = await Bank.findByPk(body.id as string);
    expect(bank?.ownerId).toBe(owner.userId);
    expect(bank?.pseudonym).not.toBe('AAAAA');
  });
});

describe('GET /api/banks', () => {
  it("lists one's own banks only, oldest first", async () => {
    const client = await server.client('owner');
    const first = await createBankOf(client, { name: 'First' });
    const second = await createBankOf(client, { name: 'Second' });
    const { status, body } = await client.get('/api/banks');
    expect(status).toBe(200);
    expect(body.banks.map(({ id }: { id: string }) => id)).toEqual([first, second]);
  });

  it('refuses a visitor', async () => {
    expect((await visitor.get('/api/banks')).status).toBe(401);
  });
});

describe('GET /api/banks/:bankId', () => {
  it('answers the owner, and nobody else', async () => {
    const bankId = await createBankOf(owner);
    expect((await owner.get(`/api/banks/${bankId}`)).body.id).toBe(bankId);
    expect((await visitor.get(`/api/banks/${bankId}`)).status).toBe(401);
    for (const client of [other, await server.client('moderator'), await server.client('steward')])
      expect((await client.get(`/api/banks/${bankId}`)).status).toBe(404);
  });

  it.each(['2b0f5d9e-3a50-4c4e-9d0b-3f9f6f1f7a11', 'not-an-id', '..%2f..', '%00'])(
    'answers 404 for %s',
    async (bankId) => {
      const { status, body } = await owner.get(`/api/banks/${bankId}`);
      expect(status).toBe(404);
      expect(body.error.code).toBe('notFound');
    },
  );
});

describe('PUT /api/banks/:bankId', () => {
  it('changes the bank, counts the version up and notes what changed', async () => {
    const bankId = await createBankOf(owner);
    const change = { ...bankInput({ name: 'Shed', parallel: 2 }), version: 1 };
    const { status, body } = await owner.send('put', `/api/banks/${bankId}`, change);
    expect(status).toBe(200);
    expect(body).toMatchObject({ name: 'Shed', parallel: 2, version: 2, ratedAh: 560 });
    const [, entry] = await TrailEntry.findAll({ where: { subjectId: bankId }, order: [['id', 'ASC']] });
    expect(entry).toMatchObject({
      action: 'changed',
      details: { changes: { parallel: { from: 1, to: 2 } } },
    });
    const texts = await TrailText.findAll({ where: { trailId: entry!.id }, order: ['field'] });
    expect(texts.map(({ field, text }) => [field, text])).toEqual([
      ['name', 'Shed'],
      ['nameBefore', 'Barn'],
    ]);
  });

  it('leaves version and trail alone when nothing changed', async () => {
    const bankId = await createBankOf(owner);
    const { body } = await owner.send('put', `/api/banks/${bankId}`, { ...bankInput(), version: 1 });
    expect(body.version).toBe(1);
    expect(await TrailEntry.count({ where: { subjectId: bankId } })).toBe(1);
  });

  it('refuses an older version', async () => {
    const bankId = await createBankOf(owner);
    await owner.send('put', `/api/banks/${bankId}`, { ...bankInput({ name: 'A' }), version: 1 });
    const { status, body } = await owner.send('put', `/api/banks/${bankId}`, {
      ...bankInput({ name: 'B' }),
      version: 1,
    });
    expect(status).toBe(409);
    expect(body.error.code).toBe('versionConflict');
    expect((await owner.get(`/api/banks/${bankId}`)).body.name).toBe('A');
  });

  it('lets exactly one of several changes of the same version through', async () => {
    const bankId = await createBankOf(owner);
    const names = ['A', 'B', 'C', 'D', 'E'];
    const answers = await Promise.all(
      names.map((name) => owner.send('put', `/api/banks/${bankId}`, { ...bankInput({ name }), version: 1 })),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409, 409, 409]);
  });

  it('keeps a cell type that is no longer listed, but does not choose one', async () => {
    const retired = await createCellType({ id: 'gannet-old' });
    const bankId = await createBankOf(owner, { cellTypeId: 'gannet-old' });
    await retired.update({ status: 'proposed' });
    const keep = { ...bankInput({ cellTypeId: 'gannet-old', name: 'Kept' }), version: 1 };
    expect((await owner.send('put', `/api/banks/${bankId}`, keep)).status).toBe(200);
    const choose = { ...bankInput({ cellTypeId: 'tern-90' }), version: 2 };
    expect((await owner.send('put', `/api/banks/${bankId}`, choose)).body.error.fields).toHaveProperty(
      'cellTypeId',
    );
  });

  it("answers 404 for others' banks, 401 to visitors, 422 without a version", async () => {
    const bankId = await createBankOf(owner);
    const change = { ...bankInput({ name: 'Taken' }), version: 1 };
    expect((await other.send('put', `/api/banks/${bankId}`, change)).status).toBe(404);
    expect((await visitor.send('put', `/api/banks/${bankId}`, change)).status).toBe(401);
    expect((await owner.send('put', `/api/banks/${randomUUID()}`, change)).status).toBe(404);
    const { status, body } = await owner.send('put', `/api/banks/${bankId}`, bankInput());
    expect(status).toBe(422);
    expect(body.error.fields).toHaveProperty('version');
  });
});

describe('POST /api/banks/:bankId/events', () => {
  const event = { happenedOn: '2025-05-04', kind: 'rebalanced', note: 'Two weeks at 3.45 V' };

  it('adds the event in order of its day', async () => {
    const bankId = await createBankOf(owner);
    await owner.send('post', `/api/banks/${bankId}/events`, event);
    const earlier = { ...event, happenedOn: '2024-01-01', kind: 'cellFailed' };
    const { status, body } = await owner.send('post', `/api/banks/${bankId}/events`, earlier);
    expect(status).toBe(201);
    expect(body.events).toMatchObject([{ kind: 'cellFailed' }, { kind: 'rebalanced', note: event.note }]);
    const entry = await TrailEntry.findOne({ where: { subjectId: bankId, action: 'eventAdded' } });
    const { note, ...rest } = event;
    expect(entry?.details).toMatchObject(rest);
    expect(await TrailText.findAll({ where: { trailId: entry!.id } })).toMatchObject([
      { field: 'note', text: note },
    ]);
  });

  it.each<[string, object, string]>([
    ['a day that does not exist', { happenedOn: '2025-02-30' }, 'happenedOn'],
    ['a day in the future', { happenedOn: '2026-12-03' }, 'happenedOn'],
    ['a day before first use', { happenedOn: '2023-02-28' }, 'happenedOn'],
    ['a kind that is not known', { kind: 'painted' }, 'kind'],
    ['a note with control characters', { note: 'a\u0000b' }, 'note'],
    ['a note that is too long', { note: 'x'.repeat(2001) }, 'note'],
    ['a retirement without its reason', { kind: 'retired', note: ' ' }, 'note'],
  ])('answers %s with the field', async (_what, change, field) => {
    const bankId = await createBankOf(owner);
    const { status, body } = await owner.send('post', `/api/banks/${bankId}/events`, { ...event, ...change });
    expect(status).toBe(422);
    expect(body.error.fields).toHaveProperty([field]);
  });

  it.each([
    ['sold', ''],
    ['retired', 'It made way for a larger one.'],
  ])('keeps a bank that was %s, and no reminder of it', async (kind, note) => {
    const bankId = await createBankOf(owner);
    const reminder = await owner.send('put', `/api/banks/${bankId}/reminder`, { isOn: true, dueOn: null });
    expect(reminder.body.isEnded).toBe(false);
    const { status, body } = await owner.send('post', `/api/banks/${bankId}/events`, {
      ...event,
      kind,
      note,
    });
    expect(status).toBe(201);
    expect(body.events).toMatchObject([{ kind, note }]);
    expect((await owner.get(`/api/banks/${bankId}/reminder`)).body).toMatchObject({
      isEnded: true,
      dueOn: null,
    });
    const { body: listed } = await owner.get('/api/banks');
    expect(listed.banks.map(({ id }: { id: string }) => id)).toContain(bankId);
  });

  it("answers 404 for others' banks and 401 to visitors", async () => {
    const bankId = await createBankOf(owner);
    expect((await other.send('post', `/api/banks/${bankId}/events`, event)).status).toBe(404);
    expect((await visitor.send('post', `/api/banks/${bankId}/events`, event)).status).toBe(401);
    expect((await owner.send('post', `/api/banks/${randomUUID()}/events`, event)).status).toBe(404);
  });
});
