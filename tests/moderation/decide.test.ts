import type { DecisionRequest } from '@/lib/contract/moderation';
import { type Check, Decision, Job, OutboxMail, TrailEntry } from '@/server/db/models';

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

async function addSubmission(
  options: { ownerId?: string; bought?: 'new' | 'used'; state?: Check['state'] } = {},
) {
  const ownerId = options.ownerId ?? (await addOwner()).id;
  const bank = await addBank({ ownerId, bought: options.bought });
  const state = options.state ?? 'submitted';
  return addCheck({ bankId: bank.id, years: 6, efc: 900, sohFraction: 0.9, state });
}

const decide = (client: TestClient, checkId: string, decision: DecisionRequest) =>
  client.send('post', `/api/screening/${checkId}/decision`, decision);

const question = 'Which cell ended the test?';
const reason = 'The log is of another bank.';
const approve: DecisionRequest = { action: 'approve', version: 1 };
const sendBack: DecisionRequest = { action: 'sendBack', version: 1, question };
const turnAway: DecisionRequest = { action: 'turnAway', version: 1, reason };

/** Half a minute later: what follows from decisions is done. */
async function letSettle() {
  server.setNow('2026-12-01T12:00:31Z');
  await server.deps.jobs.settle();
}

/** What a decision leaves beside the state. */
async function traces() {
  return {
    trail: await TrailEntry.count({ where: { subjectType: 'check' } }),
    mails: await OutboxMail.count(),
    refits: await Job.count({ where: { kind: 'refit' } }),
    waiting: await Job.count({ where: { kind: 'settleDecision', state: 'queued' } }),
  };
}

describe('a decision', () => {
  it('approves: state, trail, thanks to the owner and one refit', async () => {
    const check = await addSubmission();
    const answer = await decide(moderator, check.id, approve).expect(200);
    expect(answer.body).toMatchObject({
      ...{ state: 'approved', version: 2, isProposed: false, undoUntil: '2026-12-01T12:00:30.000Z' },
    });
    const stored = await check.reload();
    expect(stored).toMatchObject({ state: 'approved', version: 2 });
    expect(stored.decidedAt).toEqual(server.deps.clock());
    const entry = await TrailEntry.findOne({ where: { subjectId: check.id } });
    expect(entry).toMatchObject({ action: 'approved', actorId: moderator.userId, actorRole: 'moderator' });
    expect(await traces()).toMatchObject({ mails: 0, refits: 0, waiting: 1 });
    await letSettle();
    const mail = await OutboxMail.findOne();
    expect(mail?.text).toMatch(/approved/);
    expect(mail?.text).toMatch(/working fit/);
    expect(mail?.text).toContain(`${server.deps.config.publicUrl}/banks/${check.bankId}`);
    expect(mail?.text).not.toContain(moderator.email);
    expect(await Job.count({ where: { kind: 'refit' } })).toBe(1);
  });

  it('tells the owner of a used bank that it stays out of the pooled lives', async () => {
    const check = await addSubmission({ bought: 'used' });
    await decide(moderator, check.id, approve).expect(200);
    await letSettle();
    expect((await OutboxMail.findOne())?.text).toMatch(/not bought new/);
  });

  it('sends back with the question, and asks for no refit', async () => {
    const check = await addSubmission();
    const answer = await decide(moderator, check.id, sendBack).expect(200);
    expect(answer.body).toMatchObject({ state: 'sentBack', version: 2 });
    await letSettle();
    expect((await OutboxMail.findOne())?.text).toContain(question);
    expect((await TrailEntry.findOne())?.details).toMatchObject({ question });
    expect(await Job.count({ where: { kind: 'refit' } })).toBe(0);
    expect((await check.reload()).decidedAt).toBeNull();
  });

  it('turns away with the reason', async () => {
    const check = await addSubmission();
    const answer = await decide(moderator, check.id, turnAway).expect(200);
    expect(answer.body).toMatchObject({ state: 'turnedAway', version: 2 });
    await letSettle();
    expect((await OutboxMail.findOne())?.text).toContain(reason);
    expect((await TrailEntry.findOne())?.details).toMatchObject({ reason });
  });

  it('may follow a question that was not answered', async () => {
    const check = await addSubmission();
    await decide(moderator, check.id, sendBack).expect(200);
    await letSettle();
    await decide(moderator, check.id, { ...approve, version: 2 }).expect(200);
    server.setNow('2026-12-01T12:01:02Z');
    await server.deps.jobs.settle();
    expect(await OutboxMail.count()).toBe(2);
  });

  it('overtaken within the half minute mails the last one only', async () => {
    const check = await addSubmission();
    await decide(moderator, check.id, sendBack).expect(200);
    await decide(moderator, check.id, { ...approve, version: 2 }).expect(200);
    await letSettle();
    const mails = await OutboxMail.findAll();
    expect(mails.map(({ subject }) => subject)).toEqual(['Your capacity check was approved']);
  });

  it('of a burst of approvals mails each once and asks for refits that coalesce', async () => {
    const runs: unknown[] = [];
    server.deps.jobs.handle('refit', async (payload) => void runs.push(payload));
    for (let i = 0; i < 3; i += 1) await decide(moderator, (await addSubmission()).id, approve).expect(200);
    await letSettle();
    expect(await OutboxMail.count()).toBe(3);
    expect(runs.length).toBeGreaterThan(0);
    expect(await Job.count({ where: { kind: 'refit' } })).toBe(runs.length);
    // A second run of the same job, as after a kill, mails nobody twice.
    await Job.update({ state: 'queued' }, { where: { kind: 'settleDecision' } });
    await server.deps.jobs.settle();
    expect(await OutboxMail.count()).toBe(3);
  });
});

describe('two moderators at once', () => {
  it.each<[string, DecisionRequest, DecisionRequest]>([
    ['approve and turn away', approve, turnAway],
    ['send back and approve', sendBack, approve],
    ['approve and approve', approve, approve],
  ])('%s: one wins, the other is told, and only one leaves traces', async (_name, one, other) => {
    const check = await addSubmission();
    const second = await server.client('moderator');
    const answers = await Promise.all([decide(moderator, check.id, one), decide(second, check.id, other)]);
    const statuses = answers.map(({ status }) => status);
    expect([...statuses].sort()).toEqual([200, 409]);
    const loser = answers.find(({ status }) => status === 409);
    expect(loser?.body.error.code).toBe('alreadyDecided');
    const winner = answers.find(({ status }) => status === 200);
    expect((await check.reload()).state).toBe(winner?.body.state);
    expect(await traces()).toMatchObject({ trail: 1, waiting: 1 });
  });

  it('lets exactly one of eight through', async () => {
    const check = await addSubmission();
    const clients = await Promise.all(Array.from({ length: 8 }, () => server.client('moderator')));
    const answers = await Promise.all(
      clients.map((client, i) => decide(client, check.id, i % 2 ? approve : turnAway)),
    );
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1);
    expect(answers.filter(({ status }) => status === 409)).toHaveLength(7);
    expect(await traces()).toMatchObject({ trail: 1, waiting: 1 });
  });
});

describe('a decision that is refused', () => {
  const nothing = { trail: 0, mails: 0, refits: 0, waiting: 0 };

  it('is on an own check, whatever the role', async () => {
    for (const role of ['moderator', 'steward'] as const) {
      const client = await server.client(role);
      const check = await addSubmission({ ownerId: client.userId });
      const answer = await decide(client, check.id, approve).expect(403);
      expect(answer.body.error).toMatchObject({
        code: 'notAllowed',
        message: expect.stringMatching(/your own/),
      });
      expect((await check.reload()).state).toBe('submitted');
    }
    expect(await traces()).toEqual(nothing);
  });

  it('is on a check the owner has changed since', async () => {
    const check = await addSubmission();
    await check.update({ version: 2 });
    const answer = await decide(moderator, check.id, approve).expect(409);
    expect(answer.body.error.code).toBe('versionConflict');
    expect(await traces()).toEqual(nothing);
  });

  it('is on a check that was withdrawn', async () => {
    const check = await addSubmission({ state: 'withdrawn' });
    const answer = await decide(moderator, check.id, approve).expect(409);
    expect(answer.body.error).toMatchObject({
      code: 'conflict',
      message: expect.stringMatching(/withdrawn/),
    });
  });

  it.each(['approved', 'turnedAway', 'recalled'] as const)('is on one already %s', async (state) => {
    const check = await addSubmission({ state });
    const answer = await decide(moderator, check.id, turnAway).expect(409);
    expect(answer.body.error.code).toBe('alreadyDecided');
  });

  it.each([
    [{ action: 'sendBack', version: 1, question: '  ' }, 'question'],
    [{ action: 'turnAway', version: 1 }, 'reason'],
    [{ action: 'approve', version: 0 }, 'version'],
    [{ action: 'delete', version: 1 }, 'action'],
    [{ action: 'turnAway', version: 1, reason: 'x'.repeat(2001) }, 'reason'],
  ])('is %j, beside its field', async (body, field) => {
    const check = await addSubmission();
    const answer = await moderator.send('post', `/api/screening/${check.id}/decision`, body).expect(422);
    expect(answer.body.error.fields).toHaveProperty([field]);
    expect(await traces()).toEqual(nothing);
  });

  it('is by visitors, owners, and on nothing', async () => {
    const owner = await server.client('owner');
    const check = await addSubmission({ ownerId: owner.userId });
    await decide(owner, check.id, approve).expect(403);
    await decide(await server.client(), check.id, approve).expect(401);
    await decide(moderator, '6f9619ff-8b86-4011-b42d-00c04fc964ff', approve).expect(404);
    await decide(moderator, (await addSubmission({ state: 'draft' })).id, approve).expect(404);
    expect(await traces()).toEqual(nothing);
  });

  it('leaves nothing behind when a part of it fails', async () => {
    const check = await addSubmission();
    const fail = jest.spyOn(Decision, 'create').mockRejectedValueOnce(new Error('disk gone'));
    await decide(moderator, check.id, approve).expect(500);
    fail.mockRestore();
    expect((await check.reload()).state).toBe('submitted');
    expect(await traces()).toEqual(nothing);
    await decide(moderator, check.id, approve).expect(200);
  });
});
