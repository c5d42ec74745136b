import { queueSchema, submissionSchema } from '@/lib/contract/moderation';
import type { PoolCheck } from '@/lib/fit';
import { Claim, CurrentFit, Fit, OutboxMail, Proposal, TrailEntry } from '@/server/db/models';

import type { FitOutput } from '@/server/fits/fitOutput';
import { runFitTask } from '@/server/fits/fitTask';

import { addBank, addCellType, addOwner } from '../support/poolFixture';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';
import { addSubmission, decide, settleAt } from './support';

let server: TestServer;
let moderator: TestClient;
let other: TestClient;
beforeEach(async () => {
  server = await startTestServer();
  server.deps.jobs.handle('refit', async () => undefined);
  [moderator, other] = [await server.client('moderator'), await server.client('moderator')];
  await addCellType();
});
afterEach(() => server.stop());

const approve = { action: 'approve', version: 1 } as const;
const turnAway = { action: 'turnAway', version: 1, reason: 'The log is of another bank.' } as const;
const unknownId = '6f9619ff-8b86-4011-b42d-00c04fc964ff';
const claim = (client: TestClient, checkId: string) => client.send('post', `/api/screening/${checkId}/claim`);
const release = (client: TestClient, checkId: string) =>
  client.send('post', `/api/screening/${checkId}/release`);
const entryOf = async (client: TestClient, checkId: string) => {
  const queue = queueSchema.parse((await client.get('/api/screening')).body);
  return queue.entries.find((entry) => entry.checkId === checkId);
};

describe('a claim', () => {
  it('keeps others from deciding, and they see it', async () => {
    const check = await addSubmission();
    const answer = await claim(moderator, check.id).expect(200);
    expect(answer.body.claim).toEqual({ by: 'me', until: '2026-12-01T12:15:00.000Z' });
    expect((await entryOf(other, check.id))?.claimedBy).toBe('other');
    expect((await entryOf(moderator, check.id))?.claimedBy).toBe('me');
    const submission = submissionSchema.parse((await other.get(`/api/screening/${check.id}`)).body);
    expect(submission.claim).toEqual({ by: 'other', until: '2026-12-01T12:15:00.000Z' });
    expect((await claim(other, check.id).expect(409)).body.error.code).toBe('conflict');
    expect((await decide(other, check.id, approve).expect(409)).body.error.message).toMatch(
      /at work on this one/,
    );
    await decide(moderator, check.id, approve).expect(200);
    expect(await Claim.count()).toBe(0);
  });

  it('expires after a quarter of an hour, and is kept by claiming again', async () => {
    const check = await addSubmission();
    await claim(moderator, check.id).expect(200);
    server.setNow('2026-12-01T12:14:59Z');
    await claim(other, check.id).expect(409);
    await claim(moderator, check.id).expect(200);
    server.setNow('2026-12-01T12:29:58Z');
    await claim(other, check.id).expect(409);
    server.setNow('2026-12-01T12:29:59Z');
    expect((await entryOf(other, check.id))?.claimedBy).toBeNull();
    await claim(other, check.id).expect(200);
    await decide(moderator, check.id, approve).expect(409);
  });

  it('is released by its own moderator only', async () => {
    const check = await addSubmission();
    await claim(moderator, check.id);
    await release(other, check.id).expect(200);
    await claim(other, check.id).expect(409);
    await release(moderator, check.id).expect(200);
    await claim(other, check.id).expect(200);
  });

  it('goes to exactly one of eight who reach for it at once', async () => {
    const check = await addSubmission();
    const clients = await Promise.all(Array.from({ length: 8 }, () => server.client('moderator')));
    const answers = await Promise.all(clients.map((client) => claim(client, check.id)));
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1);
    expect(answers.filter(({ status }) => status === 409)).toHaveLength(7);
  });

  it('is not to be had on own, decided, unknown checks, drafts, nor by owners and visitors', async () => {
    await claim(moderator, (await addSubmission({ ownerId: moderator.userId })).id).expect(404);
    await claim(moderator, (await addSubmission({ state: 'approved' })).id).expect(409);
    await claim(moderator, (await addSubmission({ state: 'draft' })).id).expect(404);
    await claim(moderator, unknownId).expect(404);
    const check = await addSubmission();
    await claim(await server.client('owner'), check.id).expect(403);
    await claim(await server.client(), check.id).expect(401);
  });
});

describe('approving clean ones together', () => {
  const bulk = (client: TestClient, checks: { checkId: string; version: number }[]) =>
    client.send('post', '/api/screening/approve-clean', { checks });

  it('approves what is clean, names what is not, and can be undone', async () => {
    const clean = [await addSubmission(), await addSubmission()];
    const doubtful = await addSubmission({ severity: 2 });
    const own = await addSubmission({ ownerId: moderator.userId });
    const claimed = await addSubmission();
    await claim(other, claimed.id);
    const stale = await addSubmission();
    await stale.update({ version: 2 });
    const asked = await addSubmission({ state: 'sentBack' });
    const all = [...clean, doubtful, own, claimed, stale, asked];
    const answer = await bulk(
      moderator,
      all.map(({ id }) => ({ checkId: id, version: 1 })),
    ).expect(200);
    const problems = answer.body.results.map(({ problem }: { problem: string | null }) => problem);
    expect(problems).toEqual([
      ...[null, null],
      expect.stringMatching(/Something was found/),
      expect.stringMatching(/your own/),
      expect.stringMatching(/at work on this one/),
      expect.stringMatching(/changed since/),
      expect.stringMatching(/waits for its owner/),
    ]);
    for (const check of all) await check.reload();
    expect(all.map(({ state }) => state)).toEqual([
      ...['approved', 'approved'],
      ...['submitted', 'submitted', 'submitted', 'submitted', 'sentBack'],
    ]);
    const decisionIds = answer.body.results.flatMap(
      ({ decisionId }: { decisionId: string | null }) => decisionId ?? [],
    );
    await moderator.send('post', '/api/screening/undo', { decisionIds }).expect(200);
    await settleAt(server, '2026-12-01T12:01:00Z');
    expect(await OutboxMail.count()).toBe(0);
    expect((await clean[0]!.reload()).state).toBe('submitted');
  });

  it('by two moderators at once approves each check once', async () => {
    const checks = await Promise.all(Array.from({ length: 6 }, () => addSubmission()));
    const request = checks.map(({ id }) => ({ checkId: id, version: 1 }));
    const answers = await Promise.all([bulk(moderator, request), bulk(other, [...request].reverse())]);
    const done = answers.flatMap(({ body }) => body.results).filter(({ problem }) => problem === null);
    expect(done).toHaveLength(6);
    expect(await TrailEntry.count({ where: { action: 'approved' } })).toBe(6);
  });

  it('takes one to a hundred checks, from moderators only', async () => {
    await bulk(moderator, []).expect(422);
    await bulk(
      moderator,
      Array.from({ length: 101 }, () => ({ checkId: unknownId, version: 1 })),
    ).expect(422);
    await bulk(await server.client('owner'), [{ checkId: unknownId, version: 1 }]).expect(403);
    await bulk(await server.client(), [{ checkId: unknownId, version: 1 }]).expect(401);
    const { results } = (await bulk(moderator, [{ checkId: unknownId, version: 1 }]).expect(200)).body;
    expect(results[0].problem).not.toBeNull();
  });
});

describe('a second opinion', () => {
  let anyOutput: FitOutput;
  beforeAll(() => {
    const rows = poolRowsOf({ banks: 12, checksEach: 3 });
    const outcome = runFitTask({ kind: 'working', rows, dataHash: 'a'.repeat(64), previous: null });
    if (!outcome.ok) throw new Error(outcome.reason);
    anyOutput = outcome.output;
  });

  /** A working fit in force in which a bank moves a figure by that many standard errors. */
  async function addFit(bankId: string, shiftInSe: number) {
    const fit = await Fit.create({
      ...{ kind: 'working', trigger: 'refit', isGood: true, reason: null, dataHash: 'a'.repeat(64) },
      ...{ codeVersion: 'test', owners: 5, banks: 5, checks: 20, durationMs: 1, createdAt: new Date() },
      ...{ parameters: null, covariance: null, curves: anyOutput },
      diagnostics: { influence: [{ bankId, parameter: 'bK', shiftInSe }] },
    });
    await CurrentFit.upsert({ kind: 'working', fitId: fit.id });
  }
  const influential = async (shiftInSe = -0.31, options = {}) => {
    const bank = await addBank({ ownerId: (await addOwner()).id });
    await addFit(bank.id, shiftInSe);
    return addSubmission({ ...options, bankId: bank.id });
  };

  it('is needed to turn away where the bank moves a figure by more than 0.3 of its standard error', async () => {
    const check = await influential();
    const first = await decide(moderator, check.id, turnAway).expect(200);
    expect(first.body).toMatchObject({ state: 'submitted', version: 1, isProposed: true, decisionId: null });
    expect((await check.reload()).state).toBe('submitted');
    expect((await decide(moderator, check.id, turnAway).expect(409)).body.error.message).toMatch(
      /Another moderator/,
    );

    const seen = submissionSchema.parse((await other.get(`/api/screening/${check.id}`)).body);
    expect(seen.secondOpinion).toMatchObject({
      isNeeded: true,
      largest: { parameter: 'bK', shiftInSe: -0.31 },
      proposal: { reason: turnAway.reason, isMine: false },
    });
    expect((await entryOf(other, check.id))?.isProposed).toBe(true);
    await decide(other, check.id, turnAway).expect(200);
    expect((await check.reload()).state).toBe('turnedAway');
    expect(await Proposal.count()).toBe(0);
    await settleAt(server, '2026-12-01T12:00:31Z');
    expect(await OutboxMail.count()).toBe(1);
  });

  it('is not needed up to 0.3, nor to approve', async () => {
    await decide(moderator, (await influential(0.3)).id, turnAway).expect(200);
    const check = await influential(0.9);
    const { body } = await decide(moderator, check.id, approve).expect(200);
    expect(body).toMatchObject({ state: 'approved', isProposed: false });
  });

  it('is needed to recall as well', async () => {
    const check = await influential(0.5, { state: 'approved' });
    const recall = { action: 'recall', version: 1, reason: 'Wired wrong.' } as const;
    expect((await decide(moderator, check.id, recall)).body.isProposed).toBe(true);
    expect((await decide(other, check.id, recall)).body.state).toBe('recalled');
  });

  it('falls with any other decision, and with a new version', async () => {
    const check = await influential();
    await decide(moderator, check.id, turnAway).expect(200);
    await check.update({ version: 2 });
    expect((await other.get(`/api/screening/${check.id}`)).body.secondOpinion.proposal).toBeNull();
    expect((await decide(other, check.id, { ...turnAway, version: 2 })).body.isProposed).toBe(true);
    await decide(moderator, check.id, { ...approve, version: 2 }).expect(200);
    expect(await Proposal.count()).toBe(0);
  });

  it('is not told to the owner', async () => {
    const owner = await server.client('owner');
    const bank = await addBank({ ownerId: owner.userId! });
    await addFit(bank.id, 1);
    const check = await addSubmission({ bankId: bank.id });
    await decide(moderator, check.id, turnAway).expect(200);
    const answer = await owner.get(`/api/checks/${check.id}`).expect(200);
    expect(answer.body.state).toBe('submitted');
    expect(answer.text).not.toContain(turnAway.reason);
  });

  it('of two who propose at once the later one agrees', async () => {
    const check = await influential();
    const answers = await Promise.all([
      decide(moderator, check.id, turnAway),
      decide(other, check.id, turnAway),
    ]);
    expect(answers.map(({ body }) => body.isProposed).sort()).toEqual([false, true]);
    expect((await check.reload()).state).toBe('turnedAway');
    expect(await TrailEntry.count({ where: { action: 'turnedAway' } })).toBe(1);
  });
});

/** Banks that fade alike, each of an owner of its own: a pool that can be fitted, no more. */
function poolRowsOf({ banks, checksEach }: { banks: number; checksEach: number }): PoolCheck[] {
  return Array.from({ length: banks * checksEach }, (_, i) => {
    const [bank, years] = [Math.floor(i / checksEach), 1 + (i % checksEach)];
    return {
      ...{ bank: `b${bank}`, owner: `o${bank}`, cellType: 'skerry-100', isClamped: bank % 2 === 0 },
      ...{ depthFraction: 0.6, dischargeIt: 0.1, temperatureC: 20 + (bank % 5), socMeanFraction: 0.5 },
      ...{ ageYears: years, efc: 180 * years, ratedAh: 100, relSd: 0.01 },
      capacityAh: 100 * (1 - 0.03 * Math.sqrt(years)) + (i % 3) * 0.2,
    };
  });
}
