import { demoAccounts } from '@/server/accounts/demoAccounts';
import { isPasswordOf } from '@/server/accounts/passwords';
import {
  Bank,
  BankEvent,
  CellType,
  Check,
  CurrentFit,
  Finding,
  Fit,
  Job,
  PoolStep,
  PublicMember,
  QuotedClaim,
  TrailEntry,
  User,
} from '@/server/db/models';
import { publicStep } from '@/server/pool/publicStep';
import { findWaiting } from '@/server/pool/waiting';
import { seedDemo } from '@/server/seed/seedDemo';
import { trailHash } from '@/server/trail/appendTrail';

import { startTestServer, type TestServer } from '../support/testServer';

let server: TestServer;
let seedCpuS: number;
let hasSeeded: boolean;

beforeAll(async () => {
  server = await startTestServer();
  // Of the processor, not of the clock: a machine with other work to do is slower, not wrong.
  const before = process.cpuUsage();
  hasSeeded = await seedDemo(server.deps);
  const { user, system } = process.cpuUsage(before);
  seedCpuS = (user + system) / 1e6;
}, 180_000);
afterAll(() => server.stop(), 60_000);

describe('seedDemo on an empty database', () => {
  test('puts the whole scenario in place, in under 20 s of the processor', async () => {
    expect(hasSeeded).toBe(true);
    expect(seedCpuS).toBeLessThan(20);
    expect(await User.count({ where: { role: 'owner' } })).toBe(900);
    expect(await CellType.count()).toBe(24);
    expect(await QuotedClaim.count()).toBeGreaterThan(30);
    expect(await Bank.count()).toBe(1200);
    expect(await BankEvent.count()).toBeGreaterThan(100);
    expect(await Check.count({ where: { state: 'submitted' } })).toBe(14);
    expect(await Check.count({ where: { state: 'sentBack' } })).toBe(1);
    expect(await Check.count({ where: { state: 'approved' } })).toBeGreaterThan(4000);
  });

  test('gives every account of the sign-in page, verified, with its password', async () => {
    for (const { email, password, role } of demoAccounts) {
      const user = await User.findOne({ where: { email } });
      expect(user).toMatchObject({ role });
      expect(user!.emailVerifiedAt).not.toBeNull();
      expect(await isPasswordOf(user, password, server.deps.config.bcryptCost)).toBe(true);
    }
  });

  test('publishes every approved check of a bank bought new in one step, and nothing waits', async () => {
    const approved = await Check.count({
      where: { state: 'approved' },
      include: [{ model: Bank, as: 'bank', where: { bought: 'new' }, required: true }],
    });
    expect(await PublicMember.count()).toBe(approved);
    expect(await PoolStep.count()).toBe(1);
    expect(await findWaiting(server.deps)).toBe('none');
  });

  test('asks for the first fit, which is good and stands for working and public pool', async () => {
    await server.deps.jobs.settle();
    const job = await Job.findOne({ where: { kind: 'refit' } });
    expect(job).toMatchObject({ state: 'done', error: null });
    expect(await Fit.count({ where: { isGood: true } })).toBe(2);
    expect(await CurrentFit.count()).toBe(2);
    // A fit moves the pool where it may: there was nothing left to move.
    expect(await PoolStep.count()).toBe(1);
  }, 60_000);

  test('chains the trail as it is chained elsewhere, in the order of time', async () => {
    const entries = await TrailEntry.findAll({ order: [['id', 'ASC']] });
    let previousHash = '';
    let at = 0;
    for (const entry of entries) {
      const { actorId, actorRole, subjectType, subjectId, action, details } = entry;
      const content = { at: entry.at, actorId, actorRole, subjectType, subjectId, action, details };
      if (entry.previousHash !== previousHash || entry.hash !== trailHash(content, previousHash))
        throw new Error(`the chain breaks at entry ${entry.id}`);
      expect(entry.at.getTime()).toBeGreaterThanOrEqual(at);
      previousHash = entry.hash;
      at = entry.at.getTime();
    }
    expect(entries.filter(({ action }) => action === 'submitted')).toHaveLength(await Check.count());
  });

  test('is not done twice', async () => {
    expect(await seedDemo(server.deps)).toBe(false);
    expect(await Bank.count()).toBe(1200);
  });
});

describe('the seeded queue', () => {
  const remarksOf = async () => {
    const checks = await Check.findAll({
      where: { state: 'submitted' },
      include: [
        { model: Finding, as: 'findings' },
        { model: Bank, as: 'bank' },
      ],
      order: [['severity', 'DESC']],
    });
    return checks.map(({ bank, findings, severity }) => ({
      cellType: bank!.cellTypeId,
      rules: findings!.filter((finding) => finding.severity > 0).map(({ rule }) => rule),
      severity,
    }));
  };

  test('is remarked on by the rule that each mistake is for, and by none where there is none', async () => {
    const queue = await remarksOf();
    const withRule = (rule: string) =>
      queue.filter(({ rules }) => rules.includes(rule)).map(({ cellType }) => cellType);
    expect(withRule('parallelTwice')).toEqual(['skerry-240']);
    expect(withRule('seriesAddedUp')).toEqual(['tarnholt-280']);
    expect(withRule('whForAh')).toEqual(['marram-310']);
    expect(withRule('ratedCapacity')).toEqual(['shingle-250']);
    expect(withRule('testTemperature')).toEqual(['corrie-c272']);
    expect(withRule('cutoffReached')).toEqual(['corrie-c272']);
    expect(withRule('duplicate')).toEqual(['skerry-320']);
    expect(withRule('counterBackwards')).toEqual(['sallow-300']);
    expect(withRule('capacityRise')).toEqual(['tarnholt-200']);
    expect(withRule('capacityDrop')).toEqual(['sallow-210']);
    expect(queue.filter(({ severity }) => severity === 0).map(({ cellType }) => cellType)).toEqual(
      Array(5).fill('skerry-240'),
    );
  });

  test('moves the public pool only when all five clean checks are approved', async () => {
    const clean = await Check.findAll({ where: { state: 'submitted', severity: 0 } });
    const before = await PublicMember.count();
    const approve = (checks: Check[]) =>
      Promise.all(checks.map((check) => check.update({ state: 'approved' })));
    const step = () => server.deps.db.transaction((transaction) => publicStep(server.deps, transaction));
    await approve(clean.slice(0, 4));
    expect(await step()).toBe(false);
    expect(await findWaiting(server.deps, 'skerry-240')).toBe('fewerThanFiveOwners');
    await approve(clean.slice(4));
    expect(await step()).toBe(true);
    expect(await PublicMember.count()).toBe(before + 5);
  });
});
