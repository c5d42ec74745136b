import type { DecisionRequest } from '@/lib/contract/moderation';
import { isDrawn } from '@/server/agreement/isDrawn';
import { BlindReview, Check, OutboxMail, TrailEntry } from '@/server/db/models';

import { addBank, addCellType } from '../support/poolFixture';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';
import { addSubmission, decide, settleAt } from './support';

const sampleSeed = 'a seed for these tests alone';
let server: TestServer;
let first: TestClient;
let second: TestClient;
beforeEach(async () => {
  server = await startTestServer({ sampleSeed });
  [first, second] = [await server.client('moderator'), await server.client('moderator')];
  await addCellType();
});
afterEach(() => server.stop());

/** A submission that the sample draws; its id is what the draw looks at. */
async function addDrawn(options: Parameters<typeof addSubmission>[0] = {}): Promise<Check> {
  for (;;) {
    const check = await addSubmission(options);
    if (isDrawn(check.id, sampleSeed)) return check;
    await check.destroy();
  }
}

let minute = 0;
async function decideAndSettle(by: TestClient, check: Check, decision: Partial<DecisionRequest> = {}) {
  const request = { action: 'approve', version: check.version, ...decision } as DecisionRequest;
  await decide(by, check.id, request).expect(200);
  minute += 1;
  await settleAt(server, new Date(Date.UTC(2026, 11, 1, 13, minute)).toISOString());
}

const waitingOf = async (client: TestClient) =>
  (await client.get('/api/blind-reviews').expect(200)).body.reviews;
const reviewIdOf = async (client: TestClient) => (await waitingOf(client))[0].reviewId as string;
const verdict = (client: TestClient, reviewId: string, body: object = { verdict: 'approve' }) =>
  client.send('post', `/api/blind-reviews/${reviewId}`, body);

describe('the draw', () => {
  it('takes 5 % of the checks, the same ones each time, and others with another seed', () => {
    // Of 20,000, 5 % within 4 standard deviations: 1000 ± 4 sqrt(20000 x .05 x .95) = ± 123.
    const ids = Array.from({ length: 20_000 }, (_, i) => `check ${i}`);
    const drawn = ids.filter((id) => isDrawn(id, 'one'));
    expect(Math.abs(drawn.length - 1000)).toBeLessThan(123);
    expect(ids.filter((id) => isDrawn(id, 'one'))).toEqual(drawn);
    const both = drawn.filter((id) => isDrawn(id, 'two'));
    expect(both.length).toBeLessThan(100);
  });

  it('gives a settled decision to a moderator who did not make it', async () => {
    const check = await addDrawn();
    await decide(first, check.id, { action: 'approve', version: 1 }).expect(200);
    expect(await BlindReview.count()).toBe(0);
    await settleAt(server, '2026-12-01T12:01:00Z');
    expect(await waitingOf(first)).toEqual([]);
    expect(await waitingOf(second)).toEqual([expect.objectContaining({ layout: '1p16s' })]);
  });

  it('leaves out decisions that were taken back, questions, and checks it did not draw', async () => {
    const undone = await addDrawn();
    const { body } = await decide(first, undone.id, { action: 'approve', version: 1 });
    await first.send('post', '/api/screening/undo', { decisionIds: [body.decisionId] }).expect(200);
    const asked = await addDrawn();
    await decide(first, asked.id, { action: 'sendBack', version: 1, question: 'Which meter?' }).expect(200);
    let notDrawn = await addSubmission();
    while (isDrawn(notDrawn.id, sampleSeed)) notDrawn = await addSubmission();
    await decideAndSettle(first, notDrawn);
    expect(await BlindReview.count()).toBe(0);
  });

  it('never asks for an own submission: with nobody else there it waits for somebody', async () => {
    const bank = await addBank({ ownerId: second.userId! });
    const check = await addDrawn({ bankId: bank.id });
    await decideAndSettle(first, check);
    expect(await waitingOf(second)).toEqual([]);
    const third = await server.client('moderator');
    expect(await waitingOf(third)).toHaveLength(1);
    expect(await waitingOf(first)).toEqual([]);
  });
});

describe('the second look', () => {
  it('shows the submission as it stood, and nothing of the decision', async () => {
    const check = await addDrawn();
    const corrections = { capacityAh: 88 };
    await decideAndSettle(first, check, { action: 'correct', corrections, reason: 'A slip of the pen.' });
    const { body, text } = await second.get(`/api/blind-reviews/${await reviewIdOf(second)}`).expect(200);
    expect(body.fields.reading.capacityAh).toBe(90);
    expect(body.computed.sohFraction).toBeCloseTo(0.9, 1);
    expect(body.history.map(({ state }: { state: string }) => state)).toEqual(['submitted']);
    expect(body).not.toHaveProperty('correction');
    expect(body).not.toHaveProperty('state');
    expect(text).not.toMatch(/slip of the pen|approved|"capacityAh":88/);
  });

  it('keeps the decision from the reader everywhere until it is done', async () => {
    const check = await addDrawn();
    await decideAndSettle(first, check, { action: 'turnAway', reason: 'Of another bank.' });
    const later = await addSubmission({ bankId: check.bankId, years: 5 });
    const listOf = async (client: TestClient) =>
      (await client.get('/api/screening?state=turnedAway').expect(200)).body.entries;
    expect(await listOf(first)).toHaveLength(1);
    expect(await listOf(second)).toEqual([]);
    await second.get(`/api/screening/${check.id}`).expect(409);
    await second.get(`/api/screening/${check.id}/effect`).expect(409);
    const states = async (client: TestClient) =>
      (await client.get(`/api/screening/${later.id}`)).body.history.map(
        (one: { state: string }) => one.state,
      );
    expect(await states(first)).toContain('turnedAway');
    expect(await states(second)).not.toContain('turnedAway');
    const agreement = await second.get('/api/agreement').expect(200);
    expect(agreement.text).not.toContain('turned');
    expect(agreement.body).toMatchObject({ drawn: 1, done: 0, waiting: 1, kappa: null, differing: [] });
    await verdict(second, await reviewIdOf(second)).expect(200);
    expect(await listOf(second)).toHaveLength(1);
    await second.get(`/api/screening/${check.id}`).expect(200);
  });

  it('changes nothing, tells both verdicts, and lists the case where they differ', async () => {
    const check = await addDrawn();
    await decideAndSettle(first, check);
    const mails = await OutboxMail.count();
    const reviewId = await reviewIdOf(second);
    const words = 'The cut-off was not reached.';
    const { body } = await verdict(second, reviewId, { verdict: 'sendBack', words }).expect(200);
    expect(body).toEqual({ first: 'approve', second: 'sendBack', words: '' });
    const after = (await Check.findByPk(check.id))!;
    expect([after.state, after.version]).toEqual(['approved', 2]);
    expect(await OutboxMail.count()).toBe(mails);
    expect(await TrailEntry.count({ where: { action: 'lookedAtBlind', subjectId: check.id } })).toBe(1);
    const agreement = (await first.get('/api/agreement').expect(200)).body;
    expect(agreement).toMatchObject({ drawn: 1, done: 1, waiting: 0, agreedFraction: 0 });
    expect(agreement.differing).toEqual([
      expect.objectContaining({
        checkId: check.id,
        first: 'approve',
        second: 'sendBack',
        secondWords: words,
      }),
    ]);
    await verdict(second, reviewId).expect(409);
    await second.get(`/api/blind-reviews/${reviewId}`).expect(409);
  });

  it('is closed to everybody else', async () => {
    await decideAndSettle(first, await addDrawn());
    const reviewId = await reviewIdOf(second);
    await first.get(`/api/blind-reviews/${reviewId}`).expect(404);
    await verdict(first, reviewId).expect(404);
    await verdict(second, reviewId, { verdict: 'perhaps' }).expect(422);
    const owner = await server.client('owner');
    await owner.get(`/api/blind-reviews/${reviewId}`).expect(403);
  });

  it('adds up to the table of both verdicts, with kappa once both used two', async () => {
    for (const [decision, given] of [
      [{}, 'approve'],
      [{}, 'approve'],
      [{ action: 'turnAway', reason: 'No.' }, 'turnAway'],
      [{ action: 'turnAway', reason: 'No.' }, 'approve'],
    ] as const) {
      await decideAndSettle(first, await addDrawn(), decision);
      await verdict(second, await reviewIdOf(second), { verdict: given }).expect(200);
    }
    const { body } = await first.get('/api/agreement').expect(200);
    // approve/approve 2, turnAway/approve 1, turnAway/turnAway 1: po = .75, pe = .5 x .75 + .5 x .25 = .5, kappa = .5.
    expect(body).toMatchObject({ done: 4, agreedFraction: 0.75 });
    expect(body.kappa.estimate).toBeCloseTo(0.5, 12);
  });
});
