import { fitDetailSchema, fitListSchema, publicFitSchema } from '@/lib/contract/fits';
import { Check, CurrentFit, Fit, Job, PoolStep, PublicMember, TrailEntry } from '@/server/db/models';
import { fitPool } from '@/lib/fit';
import { requestRefit } from '@/server/fits/requestRefit';
import { readDiagnostics, readParameters } from '@/server/fits/storedFit';
import { JobRunner } from '@/server/jobs/JobRunner';
import { approvedMembers } from '@/server/pool/approvedRows';
import { registerJobs } from '@/server/registerJobs';

import { addCellType, addCheck, addOwnerWithChecks } from '../support/poolFixture';
import { startTestServer, type TestServer } from '../support/testServer';

// Every refit starts a worker thread of its own.
jest.setTimeout(30_000);

let server: TestServer;
beforeEach(async () => {
  server = await startTestServer();
  await addCellType();
});
afterEach(() => server.stop());

/** As a refit reads them. */
async function approvedMembersSorted() {
  const members = await server.deps.db.transaction((transaction) => approvedMembers(transaction));
  return members.sort((a, b) => (a.checkId < b.checkId ? -1 : 1));
}

let minutes = 0;

/** Asks for a refit a minute later and waits for it. */
async function refit() {
  minutes += 1;
  server.setNow(new Date(Date.UTC(2026, 11, 1, 12, minutes)).toISOString());
  await server.deps.db.transaction((transaction) => requestRefit(server.deps, transaction));
  await server.deps.jobs.settle();
}

async function addOwners(from: number, to: number) {
  for (let seed = from; seed <= to; seed += 1) await addOwnerWithChecks(seed);
}

const fitsOf = (kind: 'working' | 'public') =>
  Fit.findAll({ where: { kind }, order: [['createdAt', 'ASC']] });

describe('refit', () => {
  it('fits the working pool, and leaves the public pool alone below five owners', async () => {
    await addOwners(2, 5);
    await refit();
    const working = await fitsOf('working');
    expect(working).toHaveLength(1);
    expect(working[0]).toMatchObject({ isGood: true, owners: 4, banks: 4, checks: 16 });
    expect(await fitsOf('public')).toHaveLength(0);
    expect(await PublicMember.count()).toBe(0);
  });

  it('moves the public pool in one step with the fifth owner, and fits it', async () => {
    await addOwners(1, 4);
    await refit();
    await addOwners(5, 5);
    await refit();
    expect(await PublicMember.count()).toBe(20);
    expect(await PoolStep.findAll({ raw: true })).toMatchObject([{ owners: 5, added: 20, removed: 0 }]);
    const entry = await TrailEntry.findOne({ where: { subjectType: 'pool' } });
    expect(entry).toMatchObject({ action: 'stepped', actorRole: 'system' });
    const [fit] = await fitsOf('public');
    expect(fit).toMatchObject({ isGood: true, owners: 5, checks: 20 });
    expect((await CurrentFit.findByPk('public'))?.fitId).toBe(fit?.id);
    // The fourteen parameters of the pooled model, with their covariance and how the fit went.
    expect(fit?.parameters).toMatchObject({
      parameters: expect.arrayContaining([expect.objectContaining({ name: 'lnA', priorSd: 0.5 })]),
    });
    expect(fit?.covariance).toHaveLength(14);
    expect(fit?.diagnostics).toMatchObject({
      used: { owners: 5, banks: 5, checks: 20 },
      screen: [],
      iterations: expect.any(Number),
    });
  });

  it('stores no new fit while the data are the same', async () => {
    await addOwners(1, 5);
    await refit();
    await refit();
    expect(await Fit.count()).toBe(2);
  });

  it('leaves out banks that were not bought new, and checks that are not approved', async () => {
    await addOwners(1, 2);
    await addOwnerWithChecks(3, { bought: 'used' });
    await addOwnerWithChecks(4, { bought: 'unknown' });
    await addOwnerWithChecks(5, { state: 'submitted' });
    await refit();
    expect((await fitsOf('working'))[0]).toMatchObject({ owners: 2, checks: 8 });
  });

  it('stores a failed fit with its reason and leaves the old one in force', async () => {
    await addOwners(1, 5);
    await refit();
    const [good] = await fitsOf('working');
    const { bank } = await addOwnerWithChecks(6);
    await addCheck({ bankId: bank.id, years: 6, efc: 1200, sohFraction: 0.9, relSdNew: 0 });
    await refit();
    const failed = (await fitsOf('working')).at(-1);
    expect(failed?.isGood).toBe(false);
    expect(failed?.reason).toMatch(/relSd: is 0; it must be from 0.0005/);
    expect(failed).toMatchObject({ parameters: null, covariance: null, curves: null });
    expect((await CurrentFit.findByPk('working'))?.fitId).toBe(good?.id);
    const answer = await (await server.client('moderator')).get(`/api/fits/${failed!.id}`).expect(200);
    expect(fitDetailSchema.parse(answer.body)).toMatchObject({
      run: { isGood: false, isCurrent: false, reason: failed!.reason },
      findings: null,
    });
  });

  it('starts from the fit before, and comes to the same place as a cold one', async () => {
    await addOwners(1, 6);
    await refit();
    await addOwners(7, 7);
    await refit();
    const rows = (await approvedMembersSorted()).map(({ row }) => row);
    const cold = fitPool(rows);
    const warm = (await fitsOf('working')).at(-1)!;
    const { parameters } = readParameters(warm)!;
    if (!cold.ok) throw new Error(cold.reason);
    // The stop rule leaves at most sqrt(1e-7) standard errors on either side.
    cold.parameters.forEach(({ estimate, se }, i) =>
      expect(Math.abs(parameters[i]!.estimate - estimate) / se).toBeLessThan(0.002),
    );
    expect(readDiagnostics(warm)!.iterations).toBeLessThan(cold.iterations);
  });

  it('takes recalled checks out of the public pool once five owners are concerned', async () => {
    const bankIds: string[] = [];
    for (let seed = 1; seed <= 11; seed += 1) bankIds.push((await addOwnerWithChecks(seed)).bank.id);
    await refit();
    const recall = (count: number) =>
      Check.update({ state: 'recalled' }, { where: { bankId: bankIds.slice(0, count) } });
    await recall(4);
    await refit();
    expect(await PublicMember.count()).toBe(44);
    await recall(5);
    await refit();
    expect(await PublicMember.count()).toBe(24);
    expect((await fitsOf('public')).at(-1)).toMatchObject({ owners: 6, checks: 24 });
  });

  it('is not changed once stored', async () => {
    await addOwners(1, 5);
    await refit();
    await expect(Fit.update({ isGood: false, reason: 'no' }, { where: {} })).rejects.toMatchObject({
      parent: { message: expect.stringMatching(/immutable/) },
    });
    expect(await Fit.count({ where: { isGood: true } })).toBe(2);
  });
});

describe('a refit that was killed', () => {
  it('is run again by the next process, once', async () => {
    await addOwners(1, 5);
    await server.deps.jobs.stop();
    // What a killed process leaves behind: the job it had claimed, nothing written yet.
    await Job.create({
      ...{ kind: 'refit', payload: {}, dedupeKey: 'refit', state: 'running', attempts: 1 },
      runAfter: server.deps.clock(),
    });
    await restart();
    expect(await Fit.count()).toBe(2);
    expect((await Job.findAll({ where: { kind: 'refit' } })).map(({ state }) => state)).toEqual(['done']);
  });

  it('goes on after the step it had made: no second step, and the fit that was missing', async () => {
    await addOwners(1, 5);
    await refit();
    const publicFit = (await fitsOf('public'))[0]!;
    expect(publicFit.isGood).toBe(true);
    // A step was made and the process killed before its fit: ten owners in the pool, the fit of five in force.
    await addOwners(6, 10);
    const { publicStep } = await import('@/server/pool/publicStep');
    await server.deps.db.transaction((transaction) => publicStep(server.deps, transaction));
    await server.deps.jobs.stop();
    await Job.create({
      ...{ kind: 'refit', payload: {}, dedupeKey: 'refit', state: 'running', attempts: 1 },
      runAfter: server.deps.clock(),
    });
    server.setNow('2026-12-02T08:00:00Z');
    await restart();
    expect(await PoolStep.count()).toBe(2);
    expect((await fitsOf('public')).at(-1)).toMatchObject({ isGood: true, owners: 10 });
  });

  it('leaves neither fit nor pointer when the last write fails', async () => {
    await addOwners(1, 5);
    const fail = jest.spyOn(CurrentFit, 'upsert').mockRejectedValueOnce(new Error('disk gone'));
    await refit();
    fail.mockRestore();
    expect(await Fit.count()).toBe(0);
    expect(await CurrentFit.count()).toBe(0);
    const [job] = await Job.findAll({ where: { kind: 'refit' } });
    expect(job).toMatchObject({ state: 'queued', error: 'disk gone' });
    server.setNow('2026-12-03T08:00:00Z');
    await server.deps.jobs.settle();
    expect(await Fit.count()).toBe(2);
  });

  /** A new runner on the same database, as a new process has. */
  async function restart() {
    const { db, logger, clock } = server.deps;
    const jobs = new JobRunner(db, logger, clock);
    const closeWorkers = registerJobs({ ...server.deps, jobs });
    await jobs.start();
    await jobs.settle();
    await jobs.stop();
    await closeWorkers();
  }
});

describe('GET /api/fits', () => {
  it('lists the runs for moderators, newest first', async () => {
    await addOwners(1, 5);
    await refit();
    const answer = await (await server.client('moderator')).get('/api/fits').expect(200);
    const { fits, isRefitRunning } = fitListSchema.parse(answer.body);
    expect(fits.map(({ kind, isCurrent }) => [kind, isCurrent])).toEqual(
      expect.arrayContaining([
        ['working', true],
        ['public', true],
      ]),
    );
    expect(fits[0]?.evidence).toEqual({ owners: 5, banks: 5, checks: 20 });
    expect(isRefitRunning).toBe(false);
    expect(JSON.stringify(answer.body)).not.toContain('curves');
  });

  it('says that a refit waits', async () => {
    await Job.create({
      ...{ kind: 'refit', payload: {}, dedupeKey: 'refit', state: 'queued' },
      runAfter: new Date('2030-01-01T00:00:00Z'),
    });
    const answer = await (await server.client('steward')).get('/api/fits').expect(200);
    expect(answer.body).toMatchObject({ fits: [], isRefitRunning: true });
  });

  it('is closed to visitors and owners', async () => {
    await (await server.client()).get('/api/fits').expect(401);
    await (await server.client('owner')).get('/api/fits').expect(403);
  });
});

describe('GET /api/fits/:fitId', () => {
  it('tells moderators what the screen found, by pseudonym', async () => {
    await addOwners(1, 6);
    const { bank } = await addOwnerWithChecks(7);
    // 30 % below what the bank's other four checks say: far beyond any cut.
    const odd = await addCheck({ bankId: bank.id, years: 5, efc: 900, sohFraction: 0.62 });
    await refit();
    const run = (await fitsOf('working'))[0]!;
    const answer = await (await server.client('moderator')).get(`/api/fits/${run.id}`).expect(200);
    const { findings } = fitDetailSchema.parse(answer.body);
    expect(findings?.screen).toEqual([
      expect.objectContaining({ checkId: odd.id, bank: bank.pseudonym, action: 'quarantine' }),
    ]);
    expect(findings!.screen[0]!.t).toBeLessThan(-4);
    expect(answer.text).not.toContain(bank.id);
    expect(readDiagnostics(run)?.used.checks).toBe(28);
  });

  it('is closed to visitors and owners, and has nothing at a run there is not', async () => {
    const id = '00000000-0000-4000-8000-000000000000';
    await (await server.client()).get(`/api/fits/${id}`).expect(401);
    await (await server.client('owner')).get(`/api/fits/${id}`).expect(403);
    const moderator = await server.client('moderator');
    await moderator.get(`/api/fits/${id}`).expect(404);
    await moderator.get('/api/fits/none').expect(404);
  });
});

describe('GET /api/fits/public', () => {
  const report = async () => {
    const answer = await (await server.client()).get('/api/fits/public').expect(200);
    return { ...publicFitSchema.parse(answer.body), text: answer.text };
  };

  it('has no fit before there is one', async () => {
    expect(await report()).toMatchObject({ fit: null, history: [] });
  });

  it('gives everyone parameters beside their priors, pictures of at least five owners, and no key', async () => {
    const owners = [];
    for (let seed = 1; seed <= 8; seed += 1) owners.push(await addOwnerWithChecks(seed));
    // Two checks on one day, which the fit names in its statements.
    await addCheck({ bankId: owners[0]!.bank.id, years: 4, efc: 900, sohFraction: 0.9 });
    await refit();
    const { fit, history, text } = await report();
    expect(fit!.parameters).toHaveLength(14);
    expect(fit!.parameters.every(({ source }) => source.length > 0)).toBe(true);
    expect(fit!.coverage.within.map(({ level }) => level)).toEqual([0.5, 0.8, 0.9]);
    const bins = [...fit!.residuals.flatMap((one) => one.bins), ...fit!.predicted];
    expect(bins.length).toBeGreaterThan(6);
    for (const { evidence, lower, median, upper } of bins) {
      expect(leastOf(evidence.owners)).toBeGreaterThanOrEqual(5);
      expect(lower).toBeLessThanOrEqual(median);
      expect(upper).toBeGreaterThanOrEqual(median);
    }
    // Nobody of the fixture clamps: nothing to compare.
    expect(fit).toMatchObject({ matched: null, balance: null });
    expect(fit!.interactions).toHaveLength(3);
    expect(fit!.interactions.every(({ effect }) => effect === null)).toBe(true);
    expect(history).toHaveLength(1);
    for (const { ownerId, bank, checks } of owners)
      for (const key of [ownerId, bank.id, bank.pseudonym, checks[0]!.id]) expect(text).not.toContain(key);
  });

  it('keeps its history, and its pictures until five owners have changed them', async () => {
    await addOwners(1, 8);
    await refit();
    const before = await report();
    await addOwners(9, 12);
    await refit();
    expect((await report()).history).toHaveLength(1);
    await addOwners(13, 13);
    await refit();
    const after = await report();
    expect(after.history.map(({ evidence }) => evidence.owners)).toEqual([teens, fewOwners]);
    const yearOne = (of: typeof before) => of.fit!.residuals[0]!.bins[0]!.evidence.owners;
    expect([yearOne(before), yearOne(after)]).toEqual([fewOwners, teens]);
  });
});

// Counts below 20 are told as ranges.
const fewOwners = { from: 5, to: 9 };
const teens = { from: 10, to: 19 };

function leastOf(count: number | { from: number }): number {
  return typeof count === 'number' ? count : count.from;
}
