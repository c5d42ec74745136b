import { randomUUID } from 'node:crypto';

import type { CheckState } from '@/lib/contract/checks';
import { Check, Finding, Job, TrailEntry } from '@/server/db/models';

import { bankInput, checkInput, createBankOf, createCellType } from '../support/bankFixtures';
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

const submit = (bankId: string, request: object = checkInput(), client = owner) =>
  client.send('post', `/api/banks/${bankId}/checks`, request);

async function submitted(overrides: Parameters<typeof checkInput>[0] = {}) {
  const bankId = await createBankOf(owner);
  const { status, body } = await submit(bankId, checkInput(overrides));
  expect(status).toBe(201);
  return { bankId, checkId: body.id as string, body };
}

/** As a moderator's decision would leave it. */
async function decide(checkId: string, state: CheckState) {
  const check = await Check.findByPk(checkId);
  await check!.update({ state, version: check!.version + 1 });
  return check!.version;
}

const actionsOf = async (subjectId: string) =>
  (await TrailEntry.findAll({ where: { subjectId }, order: [['id', 'ASC']] })).map(({ action }) => action);

describe('POST /api/banks/:bankId/checks', () => {
  it('stores the check with its figures, its findings and its first entry whole', async () => {
    const request = checkInput({ note: 'First year' });
    const bankId = await createBankOf(owner);
    const { status, body } = await submit(bankId, request);
    expect(status).toBe(201);
    expect(body).toMatchObject({
      bankId,
      state: 'submitted',
      version: 1,
      submittedAt: '2026-12-01T12:00:00.000Z',
    });
    expect(body.reading).toMatchObject(request.reading);
    // 264 Ah at 25 °C and 56 A = 0.2 It of 280 Ah: already at reference conditions; 3.2 V by the fixture's energy.
    expect(body.computed.capacityRefAh).toBeCloseTo(264, 9);
    expect(body.computed.sohFraction).toBeCloseTo(264 / 280, 9);
    expect(body.computed.meanIt).toBeCloseTo(0.2, 9);
    expect(body.computed.meanCellV).toBeCloseTo(3.2, 9);
    // 15 March 2023 to 3 October 2026 are 1298 days.
    expect(body.computed.ageYears).toBeCloseTo(1298 / 365.2425, 9);
    expect(body.computed.efc).toBe(780);
    expect(body.findings.length).toBeGreaterThan(0);
    expect(Object.keys(body.findings[0] as object).sort()).toEqual(['rule', 'severity', 'text', 'title']);
    const stored = await Finding.findAll({ where: { checkId: body.id } });
    expect(stored).toHaveLength(body.findings.length);
    const [entry] = await TrailEntry.findAll({ where: { subjectId: body.id } });
    const { idempotencyKey: _key, note: _note, consent, ...entered } = request;
    expect(entry?.action).toBe('submitted');
    expect(entry?.details).toMatchObject({ entered, consent: 1 });
    expect([consent, (await Check.findByPk(body.id))?.consentVersion]).toEqual([1, 1]);
    expect(body.history).toEqual([
      { at: '2026-12-01T12:00:00.000Z', by: 'owner', action: 'submitted', text: '' },
    ]);
  });

  it('takes the whole bank for rated capacity: two in parallel halve the share', async () => {
    const bankId = await createBankOf(owner, { parallel: 2 });
    const { body } = await submit(bankId);
    // 56 A is then 0.1 It: (0.1/0.2)^0.01 by the formula of calculation 2.
    expect(body.computed.meanIt).toBeCloseTo(0.1, 9);
    expect(body.computed.sohFraction).toBeCloseTo((264 / 560) * 0.5 ** 0.01, 9);
    expect((await owner.get(`/api/banks/${bankId}`)).body.checkCount).toBe(1);
  });

  it('answers the same check to a repeat, also when repeats race', async () => {
    const bankId = await createBankOf(owner);
    const request = checkInput();
    const answers = await Promise.all(Array.from({ length: 8 }, () => submit(bankId, request)));
    expect(answers.map(({ status }) => status)).toEqual(Array(8).fill(201));
    expect(new Set(answers.map(({ body }) => body.id)).size).toBe(1);
    expect(await Check.count({ where: { bankId } })).toBe(1);
    expect(await actionsOf(answers[0]!.body.id as string)).toEqual(['submitted']);
    const later = await submit(bankId, { ...request, note: 'changed' });
    expect([later.body.id, later.body.note]).toEqual([answers[0]!.body.id, '']);
  });

  it('takes one of two checks of the same day, whichever comes first', async () => {
    const bankId = await createBankOf(owner);
    const answers = await Promise.all([submit(bankId), submit(bankId), submit(bankId)]);
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409, 409]);
    const { body } = answers.find(({ status }) => status === 409)!;
    expect(body.error.code).toBe('conflict');
    expect(body.error.fields).toHaveProperty(['reading.testedOn']);
  });

  it.each<CheckState>(['withdrawn', 'turnedAway', 'recalled'])(
    'leaves the day of a check that is %s free',
    async (state) => {
      const { bankId, checkId } = await submitted();
      await decide(checkId, state);
      expect((await submit(bankId)).status).toBe(201);
    },
  );

  it.each<[string, object, string]>([
    ['a day in the future', { reading: { testedOn: '2026-12-03' } }, 'reading.testedOn'],
    ['a day before first use', { reading: { testedOn: '2023-02-28' } }, 'reading.testedOn'],
    ['a day that does not exist', { reading: { testedOn: '2026-02-30' } }, 'reading.testedOn'],
    ['text for a number', { reading: { capacityAh: '264' } }, 'reading.capacityAh'],
    ['no number', { reading: { capacityAh: null } }, 'reading.capacityAh'],
    ['nothing at all', { reading: { capacityAh: 0 } }, 'reading.capacityAh'],
    ['more than fits', { reading: { energyWh: 1e300 } }, 'reading.energyWh'],
    ['a depth above 1', { conditions: { depthFraction: 60 } }, 'conditions.depthFraction'],
    ['no state of charge', { conditions: { socMeanFraction: null } }, 'conditions.socMeanFraction'],
    [
      'neither counter nor cycles',
      { conditions: { counterKind: null, counterValue: null } },
      'conditions.counterValue',
    ],
    ['a counter without a unit', { conditions: { counterKind: null } }, 'conditions.counterValue'],
    ['cells the wrong way round', { reading: { highestCellAtEndV: 2.2 } }, 'reading.highestCellAtEndV'],
    ['a method that is not known', { reading: { method: 'guess' } }, 'reading.method'],
    ['a key that is no id', { idempotencyKey: 'again' }, 'idempotencyKey'],
    ['a log that is not there', { uploadId: randomUUID() }, 'uploadId'],
    ['a source that is not known', { sources: { capacityAh: 'heard' } }, 'sources.capacityAh'],
    ['a source of what is not asked', { sources: { constructor: 'metered' } }, 'sources'],
  ])('answers %s with the field and stores nothing', async (_what, change, field) => {
    const bankId = await createBankOf(owner);
    const { status, body } = await submit(bankId, checkInput(change));
    expect(status).toBe(422);
    expect(body.error.code).toBe('invalid');
    expect(body.error.fields).toHaveProperty([field]);
    expect(await Check.count({ where: { bankId } })).toBe(0);
  });

  it('stores nothing without consent to the data licence as it stands', async () => {
    const bankId = await createBankOf(owner);
    const { consent: agreed, ...without } = checkInput();
    for (const request of [without, { ...without, consent: agreed + 1 }, { ...without, consent: true }]) {
      const { status, body } = await submit(bankId, request);
      expect([status, Object.keys(body.error.fields as object)]).toEqual([422, ['consent']]);
    }
    expect(await Check.count({ where: { bankId } })).toBe(0);
  });

  it('takes "today" of an owner whose clock is ahead of ours', async () => {
    const { body } = await submitted({ reading: { testedOn: '2026-12-02' } });
    expect(body.reading.testedOn).toBe('2026-12-02');
  });

  it('keeps HTML, SQL and formulas as the text they are', async () => {
    const note = `<b onclick="x()">'); DROP TABLE checks; -- =1+1`;
    const { body } = await submitted({ note, reading: { instrument: '=HYPERLINK("x")' } });
    expect(body.note).toBe(note);
    expect(body.reading.instrument).toBe('=HYPERLINK("x")');
  });

  it("answers 404 for others' banks and banks that are not, 401 to visitors", async () => {
    const bankId = await createBankOf(owner);
    expect((await submit(bankId, checkInput(), other)).status).toBe(404);
    expect((await submit(bankId, checkInput(), await server.client('steward'))).status).toBe(404);
    expect((await submit(bankId, checkInput(), visitor)).status).toBe(401);
    expect((await submit(randomUUID())).status).toBe(404);
  });
});

describe('GET /api/banks/:bankId/checks and /api/checks/:checkId', () => {
  it('answers checks in order of their day, in words for their owner only', async () => {
    const { bankId, checkId } = await submitted();
    await submit(
      bankId,
      checkInput({ reading: { testedOn: '2025-09-30' }, conditions: { counterValue: 500 } }),
    );
    const { status, body } = await owner.get(`/api/banks/${bankId}/checks`);
    expect(status).toBe(200);
    expect(body.checks.map(({ reading }: { reading: { testedOn: string } }) => reading.testedOn)).toEqual([
      '2025-09-30',
      '2026-10-03',
    ]);
    const single = await owner.get(`/api/checks/${checkId}`);
    expect(single.body).toEqual(body.checks[1]);
    expect(JSON.stringify(single.body)).not.toMatch(/moderatorText|evidence|pseudonym|ownerId/);
  });

  it("answers 404 for others' checks, moderators included, and 401 to visitors", async () => {
    const { bankId, checkId } = await submitted();
    for (const client of [other, await server.client('moderator')]) {
      expect((await client.get(`/api/banks/${bankId}/checks`)).status).toBe(404);
      expect((await client.get(`/api/checks/${checkId}`)).status).toBe(404);
    }
    expect((await visitor.get(`/api/banks/${bankId}/checks`)).status).toBe(401);
    expect((await visitor.get(`/api/checks/${checkId}`)).status).toBe(401);
    expect((await owner.get(`/api/checks/${randomUUID()}`)).status).toBe(404);
    expect((await owner.get('/api/checks/1')).status).toBe(404);
  });
});

describe('PUT /api/checks/:checkId', () => {
  const change = (version: number, overrides: Parameters<typeof checkInput>[0] = {}) => {
    const { idempotencyKey, ...fields } = checkInput(overrides);
    return { ...fields, version, answer: '', spare: idempotencyKey };
  };
  const put = (checkId: string, request: object, client = owner) =>
    client.send('put', `/api/checks/${checkId}`, request);

  it('edits a check nobody has decided on; the first entry stays in the trail', async () => {
    const { checkId } = await submitted();
    const { status, body } = await put(checkId, change(1, { reading: { capacityAh: 250 } }));
    expect(status).toBe(200);
    expect(body).toMatchObject({ state: 'submitted', version: 2, reading: { capacityAh: 250 } });
    expect(body.computed.sohFraction).toBeCloseTo(250 / 280, 9);
    const entries = await TrailEntry.findAll({ where: { subjectId: checkId }, order: [['id', 'ASC']] });
    expect(entries.map(({ action }) => action)).toEqual(['submitted', 'edited']);
    expect(entries[0]?.details).toMatchObject({ entered: { reading: { capacityAh: 264 } } });
    expect(entries[1]?.details).toMatchObject({ entered: { reading: { capacityAh: 250 } } });
  });

  it('submits a check that was sent back again, with the answer, and screens it anew', async () => {
    const { checkId } = await submitted({ reading: { capacityAh: 100 } });
    const before = await Finding.findAll({ where: { checkId } });
    const version = await decide(checkId, 'sentBack');
    const request = { ...change(version), answer: 'A slip of the pen.' };
    const { body } = await put(checkId, request);
    expect(body).toMatchObject({ state: 'submitted', version: version + 1 });
    expect(body.history.at(-1)).toMatchObject({
      by: 'owner',
      action: 'resubmitted',
      text: 'A slip of the pen.',
    });
    const after = await Finding.findAll({ where: { checkId } });
    const severities = (findings: Finding[]) => Math.max(...findings.map(({ severity }) => severity));
    expect(severities(before)).toBeGreaterThan(severities(after));
    expect((await Check.findByPk(checkId))?.severity).toBe(severities(after));
  });

  it('refuses an older version, and lets one of several edits through', async () => {
    const { checkId } = await submitted();
    const answers = await Promise.all(
      [1, 2, 3, 4].map((rest) => put(checkId, change(1, { reading: { restMinutes: rest } }))),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409, 409, 409]);
    const late = answers.find(({ status }) => status === 409)!;
    expect(late.body.error.code).toBe('versionConflict');
  });

  it.each<CheckState>(['approved', 'turnedAway', 'recalled'])('refuses one that is %s', async (state) => {
    const { checkId } = await submitted();
    const version = await decide(checkId, state);
    const { status, body } = await put(checkId, change(version));
    expect([status, body.error.code]).toEqual([409, 'alreadyDecided']);
  });

  it('does not count itself as another check of its day, but does count others', async () => {
    const { bankId, checkId } = await submitted();
    await submit(
      bankId,
      checkInput({ reading: { testedOn: '2025-09-30' }, conditions: { counterValue: 500 } }),
    );
    expect((await put(checkId, change(1))).status).toBe(200);
    const clash = await put(checkId, change(2, { reading: { testedOn: '2025-09-30' } }));
    expect(clash.status).toBe(409);
    expect(clash.body.error.fields).toHaveProperty(['reading.testedOn']);
  });

  it("answers invalid fields, 404 for others' checks and 401 to visitors", async () => {
    const { checkId } = await submitted();
    const wrong = await put(checkId, change(1, { reading: { capacityAh: -1 } }));
    expect(wrong.body.error.fields).toHaveProperty(['reading.capacityAh']);
    expect((await put(checkId, change(1), other)).status).toBe(404);
    expect((await put(checkId, change(1), visitor)).status).toBe(401);
    expect((await put(randomUUID(), change(1))).status).toBe(404);
  });
});

describe('POST /api/checks/:checkId/answer', () => {
  const answer = (checkId: string, request: object, client = owner) =>
    client.send('post', `/api/checks/${checkId}/answer`, request);

  it('answers the question and submits the check again, its values as they were', async () => {
    const { checkId, body: before } = await submitted();
    const version = await decide(checkId, 'sentBack');
    const { status, body } = await answer(checkId, { version, answer: 'The cells were cold.' });
    expect(status).toBe(200);
    expect(body).toMatchObject({ state: 'submitted', version: version + 1, reading: before.reading });
    expect(body.history.at(-1)).toMatchObject({
      by: 'owner',
      action: 'answered',
      text: 'The cells were cold.',
    });
  });

  it('refuses where nothing was asked, an older version, an empty answer', async () => {
    const { checkId } = await submitted();
    expect((await answer(checkId, { version: 1, answer: 'Hello' })).body.error.code).toBe('conflict');
    const version = await decide(checkId, 'sentBack');
    expect((await answer(checkId, { version: 1, answer: 'Hello' })).body.error.code).toBe('versionConflict');
    const empty = await answer(checkId, { version, answer: ' ' });
    expect([empty.status, Object.keys(empty.body.error.fields as object)]).toEqual([422, ['answer']]);
    await decide(checkId, 'approved');
    expect((await answer(checkId, { version: 3, answer: 'Hello' })).body.error.code).toBe('alreadyDecided');
  });

  it("answers 404 for others' checks and 401 to visitors", async () => {
    const { checkId } = await submitted();
    const request = { version: 1, answer: 'Hello' };
    expect((await answer(checkId, request, other)).status).toBe(404);
    expect((await answer(checkId, request, visitor)).status).toBe(401);
    expect((await answer(randomUUID(), request)).status).toBe(404);
  });
});

describe('POST /api/checks/:checkId/withdraw', () => {
  const withdraw = (checkId: string, version: number, client = owner) =>
    client.send('post', `/api/checks/${checkId}/withdraw`, { version });
  const refits = () => Job.count({ where: { kind: 'refit' } });

  it('withdraws one that waits, without a new fit', async () => {
    const before = await refits();
    const { checkId } = await submitted();
    const { status, body } = await withdraw(checkId, 1);
    expect([status, body.state, body.version]).toEqual([200, 'withdrawn', 2]);
    expect(body.history.at(-1)).toMatchObject({ by: 'owner', action: 'withdrawn' });
    expect(await refits()).toBe(before);
  });

  it('withdraws one that was approved, and has the pool fitted anew', async () => {
    const { checkId } = await submitted();
    const version = await decide(checkId, 'approved');
    await Job.destroy({ where: { kind: 'refit' } });
    expect((await withdraw(checkId, version)).status).toBe(200);
    const [job] = await Job.findAll({ where: { kind: 'refit' } });
    expect(job?.dedupeKey).toBe('refit');
  });

  it.each<CheckState>(['withdrawn', 'turnedAway', 'recalled'])('refuses one that is %s', async (state) => {
    const { checkId } = await submitted();
    const { status, body } = await withdraw(checkId, await decide(checkId, state));
    expect([status, body.error.code]).toEqual([409, 'conflict']);
  });

  it("refuses an older version; answers 404 for others' checks and 401 to visitors", async () => {
    const { checkId } = await submitted();
    expect((await withdraw(checkId, 7)).body.error.code).toBe('versionConflict');
    expect((await withdraw(checkId, 1, other)).status).toBe(404);
    expect((await withdraw(checkId, 1, visitor)).status).toBe(401);
    expect((await withdraw(randomUUID(), 1)).status).toBe(404);
    expect(
      (await owner.send('post', `/api/checks/${checkId}/withdraw`, {})).body.error.fields,
    ).toHaveProperty('version');
  });
});

describe('what a change of the bank does to its checks', () => {
  it('computes waiting checks anew and makes a new version of them', async () => {
    const { bankId, checkId } = await submitted();
    await owner.send('put', `/api/banks/${bankId}`, { ...bankInput({ parallel: 2 }), version: 1 });
    const { body } = await owner.get(`/api/checks/${checkId}`);
    expect(body.version).toBe(2);
    expect(body.computed.meanIt).toBeCloseTo(0.1, 9);
    expect(body.history.at(-1)).toMatchObject({ by: 'system', action: 'recomputed' });
  });

  it('refuses to change what approved checks were computed with', async () => {
    const { bankId, checkId } = await submitted();
    await decide(checkId, 'approved');
    const { status, body } = await owner.send('put', `/api/banks/${bankId}`, {
      ...bankInput({ series: 15 }),
      version: 1,
    });
    expect([status, body.error.code]).toEqual([409, 'conflict']);
    expect(body.error.fields).toHaveProperty('series');
    const rename = await owner.send('put', `/api/banks/${bankId}`, {
      ...bankInput({ name: 'Attic' }),
      version: 1,
    });
    expect(rename.status).toBe(200);
  });

  it('has the pool fitted anew when approved checks move in it, and only then', async () => {
    const { bankId, checkId } = await submitted();
    await decide(checkId, 'approved');
    await Job.destroy({ where: { kind: 'refit' } });
    const put = (change: object) => owner.send('put', `/api/banks/${bankId}`, { ...bankInput(), ...change });
    await put({ name: 'Attic', version: 1 });
    expect(await Job.count({ where: { kind: 'refit' } })).toBe(0);
    await put({ name: 'Attic', clamping: 'rigid', version: 2 });
    expect(await Job.count({ where: { kind: 'refit' } })).toBe(1);
  });

  it('screens waiting checks anew when an event may explain them, without a new version', async () => {
    const { bankId, checkId } = await submitted();
    const first = (await owner.get(`/api/checks/${checkId}`)).body;
    await submit(
      bankId,
      checkInput({ reading: { testedOn: '2025-09-30', capacityAh: 240 }, conditions: { counterValue: 500 } }),
    );
    const findingsBefore = (await owner.get(`/api/checks/${checkId}`)).body.findings;
    expect(findingsBefore).not.toEqual(first.findings);
    const event = { happenedOn: '2026-02-01', kind: 'rebalanced', note: '' };
    await owner.send('post', `/api/banks/${bankId}/events`, event);
    const { body } = await owner.get(`/api/checks/${checkId}`);
    expect(body.findings).not.toEqual(findingsBefore);
    expect(body.version).toBe(first.version);
  });
});
