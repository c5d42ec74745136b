import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { Op, type Sequelize } from 'sequelize';

import { connect } from '@/server/db/connect';
import { migrate } from '@/server/db/migrate';
import {
  Check,
  CurrentFit,
  Decision,
  Fit,
  type FitKind,
  Job,
  OutboxMail,
  PoolStep,
  PublicMember,
  TrailEntry,
  User,
} from '@/server/db/models';
import { verifyTrail } from '@/server/trail/verifyTrail';

import { addCellType, addOwnerWithChecks } from '../support/poolFixture';
import {
  processConfig,
  type ServerProcess,
  signedInHeaders,
  startServerProcess,
} from '../support/serverProcess';

jest.setTimeout(120_000);

const dataDir = mkdtempSync(join(tmpdir(), 'ebbline-faults-'));
const config = processConfig(dataDir);
let db: Sequelize;
let server: ServerProcess;
let moderatorId: string;
let seed = 0;
let acknowledgedSoFar = 0;

beforeAll(async () => {
  db = await connect(config.databaseFile);
  await migrate(db);
  await addCellType();
  const account = { email: 'moderator@example.org', passwordHash: 'not-a-hash', role: 'moderator' } as const;
  moderatorId = (await User.create(account)).id;
  while (seed < 6) await addOwnerWithChecks((seed += 1));
  server = await startServerProcess(dataDir);
});
afterAll(async () => {
  await server.kill();
  await db.close();
  rmSync(dataDir, { recursive: true, force: true });
});

async function restart(): Promise<void> {
  server = await startServerProcess(dataDir);
}

async function until(isTrue: () => Promise<boolean>): Promise<void> {
  while (!(await isTrue())) await new Promise((resolve) => setTimeout(resolve, 5));
}

/** First checks of new owners, waiting for a decision. */
async function submitted(count: number): Promise<Check[]> {
  const checks: Check[] = [];
  for (let one = 0; one < count; one += 1)
    checks.push(...(await addOwnerWithChecks((seed += 1), { state: 'submitted', checks: 1 })).checks);
  return checks;
}

/** Sends an approval for each; each answers whether it was acknowledged. */
async function sendApprovals(checks: Check[]): Promise<Promise<boolean>[]> {
  const headers = await signedInHeaders(server, config, { userId: moderatorId, role: 'moderator' });
  return checks.map(async ({ id, version }) => {
    try {
      const answer = await fetch(`${server.url}/api/screening/${id}/decision`, {
        method: 'POST',
        headers: { ...headers, 'content-type': 'application/json' },
        body: JSON.stringify({ action: 'approve', version }),
      });
      return answer.status === 200;
    } catch {
      return false;
    }
  });
}

/** What belongs to an approval: all of it is there, or nothing. */
async function tracesOf({ id }: Check) {
  const { state, version } = await Check.findByPk(id, { rejectOnEmpty: true });
  const trail = await TrailEntry.count({
    where: { subjectType: 'check', subjectId: id, action: 'approved' },
  });
  const decisions = await Decision.findAll({ where: { checkId: id }, attributes: ['id'] });
  const jobs = await Job.findAll({ where: { kind: 'settleDecision' }, attributes: ['payload'] });
  const followUps = jobs.filter(({ payload }) => decisions.some((made) => made.id === payload.decisionId));
  return { state, version, trail, decisions: decisions.length, followUps: followUps.length };
}

const whole = { state: 'approved', version: 2, trail: 1, decisions: 1, followUps: 1 };
const nothing = { state: 'submitted', version: 1, trail: 0, decisions: 0, followUps: 0 };

const followUpKinds = ['settleDecision', 'refit', 'sendMail'];

/** Nothing that follows a decision is due any more. */
const isQuiet = async () =>
  (await Job.count({ where: { kind: followUpKinds, state: ['queued', 'running'] } })) === 0;

/** As if the time in which decisions can be undone were over. */
async function letDecisionsSettle(): Promise<void> {
  await Job.update({ runAfter: new Date() }, { where: { kind: 'settleDecision', state: 'queued' } });
}

async function fitInForce(kind: FitKind): Promise<Fit> {
  const { fitId } = await CurrentFit.findByPk(kind, { rejectOnEmpty: true });
  return Fit.findByPk(fitId, { rejectOnEmpty: true });
}

/** The fits of both pools stand on all that is approved, each made once, and every record agrees with the others. */
async function expectConsistent(): Promise<void> {
  const approved = await Check.count({ where: { state: 'approved' } });
  const working = await fitInForce('working');
  expect(working).toMatchObject({ checks: approved, isGood: true });
  const fits = await Fit.findAll({ attributes: ['kind', 'dataHash'] });
  expect(new Set(fits.map(({ kind, dataHash }) => kind + dataHash)).size).toBe(fits.length);
  const steps = await PoolStep.findAll();
  const members = await PublicMember.count();
  expect(steps.reduce((sum, { added, removed }) => sum + added - removed, 0)).toBe(members);
  expect(await fitInForce('public')).toMatchObject({ checks: members, isGood: true });
  expect(await TrailEntry.count({ where: { subjectType: 'pool', action: 'stepped' } })).toBe(steps.length);
  expect((await verifyTrail()).problems).toEqual([]);
}

const killAt: [string, (answers: Promise<boolean>[]) => Promise<unknown>][] = [
  ['at once', async () => undefined],
  ['after 10 ms', () => new Promise((resolve) => setTimeout(resolve, 10))],
  ['when the first is acknowledged', (answers) => Promise.race(answers)],
  ['when all are acknowledged', (answers) => Promise.all(answers)],
];

describe('a kill in the middle of approvals', () => {
  it.each(killAt)('%s loses none that was acknowledged and leaves none half done', async (_when, moment) => {
    const checks = await submitted(4);
    const answers = await sendApprovals(checks);
    await moment(answers);
    await server.kill();
    const acknowledged = await Promise.all(answers);
    acknowledgedSoFar += acknowledged.filter(Boolean).length;
    for (const [place, check] of checks.entries()) {
      const traces = await tracesOf(check);
      expect(acknowledged[place] ? [whole] : [whole, nothing]).toContainEqual(traces);
    }
    await restart();
  });

  it('was survived by approvals, and their refit is done after the restart, once', async () => {
    expect(acknowledgedSoFar).toBeGreaterThanOrEqual(5);
    await letDecisionsSettle();
    await until(isQuiet);
    await expectConsistent();
    const approved = await TrailEntry.count({ where: { subjectType: 'check', action: 'approved' } });
    expect(await OutboxMail.count({ where: { onceKey: { [Op.like]: 'decision:%' } } })).toBe(approved);
  });
});

describe('a kill in the middle of a refit', () => {
  const isRunning = async () => (await Job.count({ where: { kind: 'refit', state: 'running' } })) > 0;

  it('while it runs leaves the fit in force, and the refit is done after the restart', async () => {
    const before = await fitInForce('working');
    const fits = await Fit.count();
    const [check] = await submitted(1);
    await Promise.all(await sendApprovals([check!]));
    await letDecisionsSettle();
    await until(isRunning);
    await server.kill();
    expect(await isRunning()).toBe(true);
    expect(await Fit.count()).toBe(fits);
    expect((await fitInForce('working')).id).toBe(before.id);
    await restart();
    await until(isQuiet);
    expect(await fitInForce('working')).toMatchObject({ checks: before.checks + 1 });
    await expectConsistent();
  });

  it('between the working fit and the public one leaves nothing half public', async () => {
    const before = await fitInForce('public');
    const steps = await PoolStep.count();
    const working = await Fit.count({ where: { kind: 'working' } });
    await Promise.all(await sendApprovals(await submitted(5)));
    await letDecisionsSettle();
    await until(async () => (await Fit.count({ where: { kind: 'working' } })) > working);
    await server.kill();
    const members = await PublicMember.count();
    // The step is one transaction: all of it went public, or none.
    if (members === before.checks) expect(await PoolStep.count()).toBe(steps);
    else expect(await PoolStep.count()).toBe(steps + 1);
    await restart();
    await until(isQuiet);
    expect((await fitInForce('public')).checks).toBeGreaterThanOrEqual(before.checks + 5);
    await expectConsistent();
  });
});
