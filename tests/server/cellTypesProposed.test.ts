import { CellType, TrailEntry } from '@/server/db/models';

import { bankInput, createCellType } from '../support/bankFixtures';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;
let other: TestClient;
let visitor: TestClient;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  owner = await server.client('owner');
  other = await server.client('owner');
  visitor = await server.client();
});

afterAll(() => server.stop());

const ledge = {
  maker: 'Kittiwake',
  name: 'Ledge 260',
  format: 'prismatic',
  ratedAh: 260,
  nominalV: 3.2,
  faceAreaMm2: 34_800,
  massKg: 4.9,
};

const propose = (client: TestClient, change: object = {}) =>
  client.send('post', '/api/cell-types', { ...ledge, ...change });

async function seenBy(client: TestClient): Promise<string[]> {
  const { body } = await client.get('/api/cell-types');
  return (body.cellTypes as { id: string }[]).map(({ id }) => id);
}

describe('POST /api/cell-types', () => {
  it('stores a proposal that its proposer can use at once, with a trail entry', async () => {
    const { status, body } = await propose(owner);
    expect(status).toBe(201);
    expect(body).toMatchObject({ maker: 'Kittiwake', name: 'Ledge 260', ratedAh: 260, isProposed: true });
    expect(body.id).toMatch(/^ledge-260-[a-z0-9]{5}$/);
    const stored = await CellType.findByPk(body.id as string);
    expect(stored).toMatchObject({ status: 'proposed', proposedById: owner.userId, massKg: 4.9 });
    const entry = await TrailEntry.findOne({ where: { subjectType: 'cellType', subjectId: body.id } });
    expect(entry).toMatchObject({ action: 'proposed', actorId: owner.userId });
    const bank = await owner.send('post', '/api/banks', bankInput({ cellTypeId: body.id }));
    expect(bank.status).toBe(201);
    expect(bank.body).toMatchObject({ ratedAh: 260, cellType: { name: 'Ledge 260' } });
  });

  it('is seen and used by its proposer alone, and on no public page', async () => {
    const { body } = await propose(owner, { name: 'Ledge 300' });
    const id = body.id as string;
    expect(await seenBy(owner)).toContain(id);
    for (const client of [other, visitor, await server.client('moderator')])
      expect(await seenBy(client)).not.toContain(id);
    const taken = await other.send('post', '/api/banks', bankInput({ cellTypeId: id }));
    expect(taken.status).toBe(422);
    expect(taken.body.error.fields).toHaveProperty('cellTypeId');
    expect((await visitor.get(`/api/cells/${id}`)).status).toBe(404);
    const { body: cells } = await visitor.get('/api/cells');
    expect(JSON.stringify(cells)).not.toContain('Ledge');
  });

  it('lets two propose the same without a sign of each other', async () => {
    const [first, second] = [
      await propose(owner, { name: 'Twin 100' }),
      await propose(other, { name: 'Twin 100' }),
    ];
    expect([first.status, second.status]).toEqual([201, 201]);
    expect(second.body.id).not.toBe(first.body.id);
    const facts = ({ id, ...rest }: { id: string }) => [id.length, rest];
    expect(facts(second.body)).toEqual(facts(first.body));
    const { body } = await other.get('/api/cell-types');
    const twins = (body.cellTypes as { name: string }[]).filter(({ name }) => name.includes('Twin'));
    expect(twins).toMatchObject([{ id: second.body.id, name: 'Twin 100' }]);
    const bank = await other.send('post', '/api/banks', bankInput({ cellTypeId: second.body.id }));
    expect(bank.body.cellType.name).toBe('Twin 100');
    const { body: exported } = await other.get('/api/account/own-data.json');
    expect(exported.cellTypesProposed).toMatchObject([{ name: 'Twin 100', ratedAh: 260, isListed: false }]);
    expect(JSON.stringify(exported)).not.toContain('(proposal');
    // Moderators have to tell them apart.
    expect((await CellType.findByPk(second.body.id as string))?.name).toBe('Twin 100 (proposal 2)');
  });

  it.each([
    ['listed already', { maker: 'Gannet', name: 'Gannet gannet-280' }],
    ['listed already', { maker: ' gannet', name: 'GANNET  Gannet 280' }],
    ['proposed this cell type before', { maker: 'Kittiwake', name: 'ledge 260' }],
  ])('says that it is %s', async (words, change) => {
    const { status, body } = await propose(owner, change);
    expect(status).toBe(422);
    expect(body.error.fields.name).toContain(words);
  });

  it.each<[string, object, string]>([
    ['no maker', { maker: ' ' }, 'maker'],
    ['a name that is too long', { name: 'x'.repeat(81) }, 'name'],
    ['control characters', { name: 'a\u0000b' }, 'name'],
    ['no capacity', { ratedAh: 0 }, 'ratedAh'],
    ['the voltage of another chemistry', { nominalV: 3.7 }, 'nominalV'],
    ['a format that is not known', { format: 'round' }, 'format'],
    ['a face of a postage stamp', { faceAreaMm2: 4 }, 'faceAreaMm2'],
    ['a mass of nothing', { massKg: 0 }, 'massKg'],
  ])('answers %s with the field', async (_what, change, field) => {
    const { status, body } = await propose(owner, { name: 'Skua 90', ...change });
    expect(status).toBe(422);
    expect(Object.keys(body.error.fields as object)).toEqual([field]);
  });

  it('does not let status or proposer be set', async () => {
    const { body } = await propose(owner, { name: 'Auk 50', status: 'listed', proposedById: other.userId });
    const stored = await CellType.findByPk(body.id as string);
    expect(stored).toMatchObject({ status: 'proposed', proposedById: owner.userId });
  });

  it('takes twenty open proposals of a person, and no more', async () => {
    const keen = await server.client('owner');
    for (let number = 1; number <= 20; number += 1)
      expect((await propose(keen, { name: `Puffin ${number}` })).status).toBe(201);
    const { status, body } = await propose(keen, { name: 'Puffin 21' });
    expect(status).toBe(409);
    expect(body.error.message).toContain('20 of your proposals wait');
  });

  it('takes a name of marks alone', async () => {
    const { status, body } = await propose(owner, { name: '№ 九' });
    expect(status).toBe(201);
    expect(body.id).toMatch(/^[a-z0-9]+(-[a-z0-9]+)*$/);
  });

  it('refuses a visitor', async () => {
    expect((await propose(visitor)).status).toBe(401);
  });

  it('stays usable by its banks once it is listed', async () => {
    const { body } = await propose(owner, { name: 'Razorbill 80' });
    await CellType.update({ status: 'listed' }, { where: { id: body.id } });
    expect(await seenBy(visitor)).toContain(body.id);
    expect((await owner.send('post', '/api/banks', bankInput({ cellTypeId: body.id }))).status).toBe(201);
  });
});
