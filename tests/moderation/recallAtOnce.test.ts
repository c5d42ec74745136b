import {
  Bank,
  type Check,
  Fit,
  Job,
  OutboxMail,
  PoolStep,
  PublicMember,
  TrailEntry,
} from '@/server/db/models';
import { findAtOnceOwners } from '@/server/fits/findAtOnceOwners';
import { ownerKey } from '@/server/fits/describeRows';

import { approvedMembers } from '@/server/pool/approvedRows';
import { coarsen } from '@/server/pool/leaveAtOnce';
import { publicBanks } from '@/server/pool/planStep';
import { publicMembers } from '@/server/pool/publicMembers';
import { coarsestLevel, namedLevel } from '@/server/publicView/identity';

import { addCellType } from '../support/poolFixture';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';
import { addSubmission, decide, settleAt } from './support';

let server: TestServer;
let moderator: TestClient;
let steward: TestClient;

beforeEach(async () => {
  server = await startTestServer();
  server.deps.jobs.handle('refit', async () => undefined);
  moderator = await server.client('moderator');
  steward = await server.client('steward');
  await addCellType();
});
afterEach(() => server.stop());

const reason = 'The photo shows another bank.';
const recall = (client: TestClient, { id, version }: Pick<Check, 'id' | 'version'>, words = reason) =>
  client.send('post', `/api/screening/${id}/recall-at-once`, { version, reason: words });
const later = (minutes: number) => new Date(Date.UTC(2026, 11, 1, 12, minutes)).toISOString();

/** Approved, and in the public pool as if a step had taken it along. */
async function published(): Promise<Check> {
  const check = await addSubmission();
  await decide(moderator, check.id, { action: 'approve', version: 1 }).expect(200);
  await settleAt(server, later(1));
  const step = await PoolStep.create({ owners: 5, added: 5, removed: 0 });
  const members = await server.deps.db.transaction((transaction) => approvedMembers(transaction));
  const member = members.find(({ checkId }) => checkId === check.id)!;
  await PublicMember.create({ ...member, stepId: step.id, level: namedLevel });
  return check.reload();
}

const putPublicFit = () => {
  const nothing = { parameters: null, covariance: null, diagnostics: null, curves: null };
  const counts = { owners: 5, banks: 5, checks: 5, durationMs: 1, isGood: true, reason: null };
  return Fit.create({
    ...{ ...nothing, ...counts, kind: 'public', trigger: 'refit', dataHash: 'a'.repeat(64) },
    ...{ codeVersion: 'test', createdAt: server.deps.clock() },
  });
};

describe('recalling at once', () => {
  it('takes the check out of both pools, records the reason, tells the owner, and asks for a refit', async () => {
    const check = await published();
    const answer = await recall(steward, check).expect(200);
    expect(answer.body).toEqual({ wasPublic: true });
    await check.reload();
    expect([check.state, check.version]).toEqual(['recalled', 3]);
    expect(await PublicMember.count()).toBe(0);
    const step = await PoolStep.findOne({ order: [['id', 'DESC']], rejectOnEmpty: true });
    expect(step).toMatchObject({ owners: 1, added: 0, removed: 1 });
    const entry = await TrailEntry.findOne({ where: { action: 'recalledAtOnce' }, rejectOnEmpty: true });
    expect(entry).toMatchObject({ actorRole: 'steward', subjectId: check.id });
    expect(entry.details).toEqual({ reason, version: 3, wasPublic: true });
    await server.deps.jobs.settle();
    const mail = await OutboxMail.findOne({ order: [['rowid', 'DESC']], rejectOnEmpty: true });
    expect(mail.subject).toBe('Your capacity check was taken out of the pool');
    expect(mail.text).toContain(reason);
    expect(await Job.count({ where: { kind: 'refit' } })).toBeGreaterThan(0);
  });

  it('can’t be undone', async () => {
    const check = await published();
    await recall(steward, check).expect(200);
    const submission = await steward.get(`/api/screening/${check.id}`);
    expect(submission.body.undoable ?? null).toBeNull();
  });

  it('takes out what was recalled before and is public still, without a second mail', async () => {
    const check = await published();
    await decide(moderator, check.id, { action: 'recall', version: 2, reason }).expect(200);
    await settleAt(server, later(2));
    const mails = await OutboxMail.count();
    await check.reload();
    expect(await PublicMember.count()).toBe(1);
    await recall(steward, check).expect(200);
    await server.deps.jobs.settle();
    expect(await PublicMember.count()).toBe(0);
    expect((await check.reload()).version).toBe(3);
    expect(await OutboxMail.count()).toBe(mails);
    const again = await recall(steward, check);
    expect([again.status, again.body.error.code]).toEqual([409, 'conflict']);
  });

  it('says when the check was not public', async () => {
    const check = await addSubmission();
    await decide(moderator, check.id, { action: 'approve', version: 1 }).expect(200);
    const answer = await recall(steward, await check.reload()).expect(200);
    expect(answer.body).toEqual({ wasPublic: false });
    expect(await PoolStep.count()).toBe(0);
  });

  it('refuses what was never in, an older version, no reason, one’s own, and nothing', async () => {
    const waiting = await addSubmission();
    expect((await recall(steward, waiting)).body.error.code).toBe('conflict');
    const check = await published();
    expect((await recall(steward, { id: check.id, version: 1 })).body.error.code).toBe('versionConflict');
    expect((await recall(steward, check, ' ')).status).toBe(422);
    expect((await recall(steward, { id: '6f9619ff-8b86-4011-b42d-00c04fc964ff', version: 1 })).status).toBe(
      404,
    );
    const own = await addSubmission({ ownerId: steward.userId });
    expect((await recall(steward, own)).status).toBe(404);
    expect((await check.reload()).state).toBe('approved');
  });

  it('is the steward’s alone', async () => {
    const check = await published();
    expect((await recall(moderator, check)).status).toBe(403);
    expect((await recall(await server.client('owner'), check)).status).toBe(403);
    expect((await recall(await server.client(), check)).status).toBe(401);
    expect(await PublicMember.count()).toBe(1);
  });
});

describe('the public fit after it', () => {
  it('knows whose views move at once, until a fit has taken that in', async () => {
    const before = await putPublicFit();
    expect(await findAtOnceOwners(before.id)).toEqual([]);
    const check = await published();
    await recall(steward, check).expect(200);
    const { ownerId } = await Bank.findByPk(check.bankId, { rejectOnEmpty: true });
    expect(await findAtOnceOwners(before.id)).toEqual([ownerKey(ownerId)]);
    server.setNow(later(30));
    const after = await putPublicFit();
    expect(await findAtOnceOwners(after.id)).toEqual([]);
  });
});

describe('banks that shared its class', () => {
  it('are generalised further while too few are left in it, and others stay as they are', async () => {
    await published();
    const [bank] = publicBanks(await publicMembers());
    const banks = (count: number, level: number) =>
      Array.from({ length: count }, (_, i) => ({
        ...{ ...bank!, bank: `bank-${level}-${i}`, owner: `owner-${level}-${i}`, level },
      }));
    const leaving = { ...bank!, level: 2 };
    const nothing = { coarser: [], dropped: [] };
    expect(coarsen(banks(5, 2), leaving)).toEqual(nothing);
    expect(coarsen([], leaving)).toEqual(nothing);
    const joined = coarsen([...banks(4, 2), ...banks(5, 3)], leaving);
    expect(joined.coarser.map(({ level }) => level)).toEqual([3, 3, 3, 3]);
    expect(joined.dropped).toEqual([]);
    const alone = coarsen(banks(4, 2), leaving);
    expect([alone.coarser.length, alone.dropped.length]).toEqual([0, 4]);
    const others = banks(5, coarsestLevel);
    expect(coarsen([...banks(4, 2), ...others], leaving).coarser).toHaveLength(4);
  });
});
