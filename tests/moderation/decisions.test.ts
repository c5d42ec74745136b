import { OutboxMail, TrailEntry } from '@/server/db/models';

import { addBank, addCellType, addOwner } from '../support/poolFixture';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';
import { addSubmission, countTraces, decide, settleAt } from './support';

let server: TestServer;
let moderator: TestClient;
beforeEach(async () => {
  server = await startTestServer();
  server.deps.jobs.handle('refit', async () => undefined);
  moderator = await server.client('moderator');
  await addCellType();
});
afterEach(() => server.stop());

const later = '2026-12-01T12:00:31Z';
const actionsOf = async (subjectId: string) =>
  (await TrailEntry.findAll({ where: { subjectId }, order: [['id', 'ASC']] })).map(({ action }) => action);

describe('a correction', () => {
  const corrections = { capacityAh: 88, durationS: 15_840 };
  const correct = { action: 'correct', version: 1, corrections, reason: 'Read off the photo.' } as const;

  it('approves with the corrected figure, keeps the owner’s beside it, and tells the owner both', async () => {
    const check = await addSubmission();
    await decide(moderator, check.id, correct).expect(200);
    await check.reload();
    expect(check).toMatchObject({ state: 'approved', version: 2 });
    expect(check.reading.capacityAh).toBe(88);
    // 88 Ah of a bank rated 100 Ah, tested at 25 °C and 0.2 It: nothing to correct for.
    expect(check.sohFraction).toBeCloseTo(0.88, 6);
    expect(check.correction).toMatchObject({
      before: { capacityAh: 90, durationS: 16_200 },
      after: corrections,
      reason: 'Read off the photo.',
    });
    const entry = await TrailEntry.findOne({ where: { subjectId: check.id } });
    expect(entry).toMatchObject({ action: 'corrected', details: { correction: check.correction } });
    await settleAt(server, later);
    const mail = await OutboxMail.findOne();
    expect(mail?.text).toMatch(/90\.0\sAh as you gave it, 88\.0\sAh as corrected/);
    expect(mail?.text).toMatch(/object/);
    expect((await countTraces()).refits).toBe(1);
  });

  it('that the owner objects to puts the check back into the queue as it was given', async () => {
    const owner = await server.client('owner');
    const check = await addSubmission({ ownerId: owner.userId });
    await decide(moderator, check.id, correct).expect(200);
    await settleAt(server, later);
    const objection = { version: 2, reason: 'The photo is of last year.' };
    const answer = await owner.send('post', `/api/checks/${check.id}/objection`, objection).expect(200);
    expect(answer.body).toMatchObject({ state: 'submitted', version: 3, correction: null });
    expect(answer.body.reading.capacityAh).toBe(90);
    await check.reload();
    expect(check.sohFraction).toBeCloseTo(0.9, 6);
    expect(check.decidedAt).toBeNull();
    expect(await actionsOf(check.id)).toEqual(['corrected', 'objected']);
    const submission = await moderator.get(`/api/screening/${check.id}`);
    expect(submission.body.conversation.at(-1)).toMatchObject({
      by: 'owner',
      action: 'objected',
      text: 'The photo is of last year.',
    });
  });

  it('can be objected to by its owner only, once, and at its version', async () => {
    const owner = await server.client('owner');
    const check = await addSubmission({ ownerId: owner.userId });
    const object = (client: TestClient, version: number, reason = 'No.') =>
      client.send('post', `/api/checks/${check.id}/objection`, { version, reason });
    await object(owner, 1).expect(409);
    await decide(moderator, check.id, correct).expect(200);
    await object(await server.client('owner'), 2).expect(404);
    await object(moderator, 2).expect(404);
    await object(await server.client(), 2).expect(401);
    await object(owner, 1).expect(409);
    await object(owner, 2, ' ').expect(422);
    await object(owner, 2).expect(200);
    await object(owner, 3).expect(409);
  });

  it.each([
    [{ ...correct, corrections: {} }, 'corrections'],
    [{ ...correct, corrections: { capacityAh: 90 } }, 'corrections'],
    [{ ...correct, corrections: { capacityAh: -1 } }, 'corrections.capacityAh'],
    [{ ...correct, reason: '' }, 'reason'],
  ])('%j is refused beside its field', async (body, field) => {
    const check = await addSubmission();
    const answer = await moderator.send('post', `/api/screening/${check.id}/decision`, body).expect(422);
    expect(answer.body.error.fields).toHaveProperty([field]);
    expect((await check.reload()).state).toBe('submitted');
  });
});

describe('a real failure', () => {
  it('is approved, marked, and told to its owner with the caution that belongs there', async () => {
    const check = await addSubmission({ severity: 2, sohFraction: 0.5 });
    await decide(moderator, check.id, { action: 'realFailure', version: 1, note: 'Cell 11 is dead.' }).expect(
      200,
    );
    expect(await check.reload()).toMatchObject({ state: 'approved', isRealFailure: true });
    await settleAt(server, later);
    expect((await OutboxMail.findOne())?.text).toMatch(/stays out of use/);
  });

  it('may be marked on a check that was approved before', async () => {
    const check = await addSubmission({ state: 'approved' });
    await decide(moderator, check.id, { action: 'realFailure', version: 1 }).expect(200);
    expect(await check.reload()).toMatchObject({ state: 'approved', version: 2, isRealFailure: true });
  });
});

describe('a recall', () => {
  const recall = { action: 'recall', version: 1, reason: 'The meter was wired wrong.' } as const;

  it('takes an approved check out, tells the owner why, and asks for a refit', async () => {
    const check = await addSubmission({ state: 'approved' });
    await decide(moderator, check.id, recall).expect(200);
    expect(await check.reload()).toMatchObject({ state: 'recalled', version: 2 });
    await settleAt(server, later);
    expect((await OutboxMail.findOne())?.text).toContain(recall.reason);
    expect(await countTraces()).toEqual({ mails: 1, refits: 1 });
    expect(await actionsOf(check.id)).toEqual(['recalled']);
  });

  it.each(['submitted', 'sentBack', 'turnedAway', 'recalled'] as const)(
    'is refused on one that is %s',
    async (state) => {
      const check = await addSubmission({ state });
      await decide(moderator, check.id, recall).expect(409);
    },
  );

  it('is refused on an own check', async () => {
    const check = await addSubmission({ state: 'approved', ownerId: moderator.userId });
    await decide(moderator, check.id, recall).expect(403);
  });
});

describe('a merge', () => {
  async function twins(state: 'submitted' | 'approved' = 'submitted') {
    const bank = await addBank({ ownerId: (await addOwner()).id });
    const kept = await addSubmission({ bankId: bank.id, years: 5, state: 'approved' });
    return { kept, twin: await addSubmission({ bankId: bank.id, years: 6, state }) };
  }

  it('leaves the other check standing, and both know of it', async () => {
    const { kept, twin } = await twins();
    await decide(moderator, twin.id, { action: 'merge', version: 1, intoCheckId: kept.id }).expect(200);
    expect(await twin.reload()).toMatchObject({ state: 'turnedAway', mergedIntoId: kept.id });
    expect((await kept.reload()).state).toBe('approved');
    expect(await actionsOf(twin.id)).toEqual(['merged']);
    expect(await actionsOf(kept.id)).toEqual(['duplicateMerged']);
    await settleAt(server, later);
    expect((await OutboxMail.findOne())?.subject).toBe('Two of your capacity checks are one');
    expect((await countTraces()).refits).toBe(0);
  });

  it('of an approved one recalls it, which asks for a refit', async () => {
    const { kept, twin } = await twins('approved');
    await decide(moderator, twin.id, { action: 'merge', version: 1, intoCheckId: kept.id }).expect(200);
    expect((await twin.reload()).state).toBe('recalled');
    await settleAt(server, later);
    expect((await countTraces()).refits).toBe(1);
  });

  it('goes into a standing check of the same bank only, and not into itself', async () => {
    const { kept, twin } = await twins();
    const stranger = await addSubmission({ state: 'approved' });
    await kept.update({ state: 'turnedAway' });
    for (const intoCheckId of [stranger.id, twin.id, kept.id]) {
      const answer = await decide(moderator, twin.id, { action: 'merge', version: 1, intoCheckId }).expect(
        422,
      );
      expect(answer.body.error.fields).toHaveProperty('intoCheckId');
    }
  });
});

describe('undoing', () => {
  const approve = { action: 'approve', version: 1 } as const;
  const undo = (client: TestClient, ...decisionIds: string[]) =>
    client.send('post', '/api/screening/undo', { decisionIds });

  it('within half a minute brings the check back, with an entry in the trail, and mails nobody', async () => {
    const check = await addSubmission();
    const { decisionId } = (await decide(moderator, check.id, approve)).body;
    expect((await moderator.get(`/api/screening/${check.id}`)).body.undo.decisionId).toBe(decisionId);
    server.setNow('2026-12-01T12:00:29Z');
    const answer = await undo(moderator, decisionId).expect(200);
    expect(answer.body.results).toEqual([{ decisionId, problem: null }]);
    expect(await check.reload()).toMatchObject({ state: 'submitted', version: 3, decidedAt: null });
    expect(await actionsOf(check.id)).toEqual(['approved', 'decisionUndone']);
    await settleAt(server, '2026-12-01T12:05:00Z');
    expect((await countTraces()).mails).toBe(0);
    await decide(moderator, check.id, { ...approve, version: 3 }).expect(200);
  });

  it('brings back the owner’s figures of a correction, and the twin of a merge', async () => {
    const check = await addSubmission();
    const corrections = { capacityAh: 88 };
    const request = { action: 'correct', version: 1, corrections, reason: 'Photo.' } as const;
    const { decisionId } = (await decide(moderator, check.id, request)).body;
    await undo(moderator, decisionId).expect(200);
    await check.reload();
    expect(check).toMatchObject({ state: 'submitted', correction: null });
    expect(check.reading.capacityAh).toBe(90);
    expect(check.sohFraction).toBeCloseTo(0.9, 6);

    const twin = await addSubmission({ bankId: check.bankId, years: 5 });
    const merge = { action: 'merge', version: 1, intoCheckId: check.id } as const;
    const merged = (await decide(moderator, twin.id, merge)).body;
    await undo(moderator, merged.decisionId).expect(200);
    expect(await twin.reload()).toMatchObject({ state: 'submitted', mergedIntoId: null });
  });

  it('of a recall puts the check back into the pool', async () => {
    const check = await addSubmission({ state: 'approved' });
    const { decisionId } = (await decide(moderator, check.id, { action: 'recall', version: 1, reason: 'x' }))
      .body;
    await undo(moderator, decisionId).expect(200);
    expect((await check.reload()).state).toBe('approved');
  });

  it('is too late after half a minute, once done, and for others', async () => {
    const check = await addSubmission();
    const { decisionId } = (await decide(moderator, check.id, approve)).body;
    const problemOf = async (client: TestClient) =>
      (await undo(client, decisionId).expect(200)).body.results[0].problem;
    expect(await problemOf(await server.client('moderator'))).toMatch(/no decision of yours/);
    server.setNow('2026-12-01T12:00:30Z');
    expect(await problemOf(moderator)).toMatch(/too late/);
    server.setNow('2026-12-01T12:00:10Z');
    expect(await problemOf(moderator)).toBeNull();
    expect(await problemOf(moderator)).toMatch(/undone already/);
    expect((await moderator.get(`/api/screening/${check.id}`)).body.undo).toBeNull();
  });

  it('does not touch a check that moved on', async () => {
    const check = await addSubmission();
    const { decisionId } = (await decide(moderator, check.id, approve)).body;
    await check.reload();
    await check.update({ state: 'withdrawn', version: 3 });
    expect((await undo(moderator, decisionId)).body.results[0].problem).toMatch(/changed since/);
    expect((await check.reload()).state).toBe('withdrawn');
  });

  it('and what it would have caused never both happen, however close', async () => {
    const check = await addSubmission();
    const { decisionId } = (await decide(moderator, check.id, approve)).body;
    server.setNow('2026-12-01T12:00:29.999Z');
    const undoing = undo(moderator, decisionId);
    server.setNow('2026-12-01T12:00:31Z');
    const [answer] = await Promise.all([undoing, server.deps.jobs.settle()]);
    const isUndone = answer.body.results[0].problem === null;
    expect((await check.reload()).state).toBe(isUndone ? 'submitted' : 'approved');
    await server.deps.jobs.settle();
    expect((await countTraces()).mails).toBe(isUndone ? 0 : 1);
  });
});
