import { mkdirSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';

import { healthSchema, trailPageSchema } from '@/lib/contract/steward';
import { Check, CurrentFit, Fit, Job, OutboxMail, TrailCheck, TrailEntry } from '@/server/db/models';
import { codeVersion } from '@/server/fits/codeVersion';
import { refitIfOlder } from '@/server/fits/refitIfOlder';
import { checkTrail } from '@/server/steward/checkTrail';
import { median } from '@/server/steward/screeningFigures';
import { backupStamp } from '@/server/steward/readStorage';
import { appendTrail } from '@/server/trail/appendTrail';

import { createBankOf, createCellType, checkInput } from '../support/bankFixtures';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let steward: TestClient;

beforeEach(async () => {
  server = await startTestServer();
  steward = await server.client('steward');
});
afterEach(() => server.stop());

const unknownId = '6f9619ff-8b86-4011-b42d-00c04fc964ff';
const health = async () => healthSchema.parse((await steward.get('/api/steward/health')).body);

async function addChecks(): Promise<Check[]> {
  await createCellType();
  const owner = await server.client('owner');
  for (let i = 0; i < 5; i += 1)
    await owner.send('post', `/api/banks/${await createBankOf(owner)}/checks`, checkInput());
  return Check.findAll();
}

describe('the health of the exchange', () => {
  it('is told for an empty one', async () => {
    const body = await health();
    expect(body.queue).toEqual({
      ...{ counts: {}, oldestSubmittedAt: null, medianDecisionHours: null },
      shares: [
        { days: 30, decided: 0, approvedFraction: null },
        { days: 90, decided: 0, approvedFraction: null },
      ],
    });
    expect(body.fits).toEqual({ last: [], failedLately: [], isRunning: false });
    expect(body.lastBackup).toBeNull();
    expect(body.trail.lastCheck).toBeNull();
    expect(body.program.version).toMatch(/^\d+\.\d+\.\d+$/);
    expect(body.storage.databaseBytes).toBeGreaterThan(4096);
    expect(body.storage.diskFreeBytes).toBeGreaterThan(0);
    expect(body.storage.diskBytes).toBeGreaterThan(body.storage.diskFreeBytes);
  });

  it('counts the queue, its age, and how it was decided', async () => {
    const [a, b, c, d, e] = await addChecks();
    const at = (text: string) => new Date(text);
    const decide = (check: Check | undefined, state: Check['state'], from: string, to: string) =>
      check!.update({ state, submittedAt: at(from), decidedAt: at(to) });
    // 10 h, 30 h and 2 h: the median is 10 h; the one of 30 h lies more than 30 days back.
    await decide(a, 'approved', '2026-11-20T00:00:00Z', '2026-11-20T10:00:00Z');
    await decide(b, 'turnedAway', '2026-09-20T00:00:00Z', '2026-09-21T06:00:00Z');
    await decide(c, 'approved', '2026-11-21T00:00:00Z', '2026-11-21T02:00:00Z');
    // Too long ago to count.
    await decide(d, 'turnedAway', '2026-01-01T00:00:00Z', '2026-01-02T00:00:00Z');
    await e!.update({ submittedAt: at('2026-11-30T09:00:00Z') });
    const { queue } = await health();
    expect(queue).toEqual({
      counts: { approved: 2, turnedAway: 2, submitted: 1 },
      oldestSubmittedAt: '2026-11-30T09:00:00.000Z',
      medianDecisionHours: 10,
      shares: [
        { days: 30, decided: 2, approvedFraction: 1 },
        { days: 90, decided: 3, approvedFraction: 2 / 3 },
      ],
    });
  });

  it('takes the mean of the two in the middle as the median of an even number', () => {
    expect(median([4, 1, 9, 2])).toBe(3);
    expect(median([9, 1, 2])).toBe(2);
    expect(median([])).toBeNull();
  });

  it('reads the stamp of the last backup, and takes one it can’t read for none', async () => {
    const stamp = join(server.deps.config.dataDir, backupStamp);
    mkdirSync(dirname(stamp), { recursive: true });
    writeFileSync(stamp, JSON.stringify({ at: '2026-11-30T03:00:00.000Z', bytes: 12 }));
    expect((await health()).lastBackup).toEqual({ at: '2026-11-30T03:00:00.000Z', bytes: 12 });
    writeFileSync(stamp, '{');
    expect((await health()).lastBackup).toBeNull();
    rmSync(stamp);
  });

  it('tells failed fits with their reason', async () => {
    const nothing = { parameters: null, covariance: null, diagnostics: null, curves: null };
    const fit = { ...nothing, kind: 'working' as const, trigger: 'refit', dataHash: 'a'.repeat(64) };
    const counts = { owners: 0, banks: 0, checks: 0, durationMs: 12, createdAt: server.deps.clock() };
    await Fit.create({ ...fit, ...counts, isGood: false, reason: 'noConvergence', codeVersion });
    const { fits } = await health();
    expect(fits.last).toEqual(fits.failedLately);
    expect(fits.last[0]).toMatchObject({ isGood: false, reason: 'noConvergence', isOfThisCode: true });
  });
});

describe('failed jobs', () => {
  const failed = { payload: {}, state: 'failed', attempts: 5, runAfter: new Date(0) } as const;

  it('are listed, without addresses in what went wrong, and done when tried again', async () => {
    let runs = 0;
    server.deps.jobs.handle('noted', async () => void (runs += 1));
    const error = 'no mailbox for person@example.org';
    const job = await Job.create({ ...failed, kind: 'noted', dedupeKey: null, error });
    const { jobs } = await health();
    expect([jobs.failedCount, jobs.failed[0]?.kind, jobs.failed[0]?.attempts]).toEqual([1, 'noted', 5]);
    expect(jobs.failed[0]?.error).not.toContain('@');
    expect((await steward.send('post', `/api/steward/jobs/${job.id}/retry`)).status).toBe(200);
    await server.deps.jobs.settle();
    expect([runs, (await job.reload()).state]).toEqual([1, 'done']);
    const again = await steward.send('post', `/api/steward/jobs/${job.id}/retry`);
    expect([again.status, again.body.error.code]).toEqual([409, 'conflict']);
    expect((await steward.send('post', `/api/steward/jobs/${unknownId}/retry`)).status).toBe(404);
  });

  it('leave their work to a twin that waits', async () => {
    const job = await Job.create({ ...failed, kind: 'twin', dedupeKey: 'twin', error: 'x' });
    await Job.create({ ...failed, kind: 'twin', dedupeKey: 'twin', state: 'queued', attempts: 0 });
    await steward.send('post', `/api/steward/jobs/${job.id}/retry`);
    expect((await job.reload()).state).toBe('done');
    expect(await Job.count({ where: { kind: 'twin', state: 'queued' } })).toBe(1);
  });
});

describe('undelivered mails', () => {
  const mail = { recipient: 'person@example.org', subject: 'A subject', text: 'Words' };

  it('are those refused and those that wait long, without their address, and go out when tried again', async () => {
    const problem = '550 no person@example.org here';
    const refused = await OutboxMail.create({ ...mail, state: 'failed', problem });
    await OutboxMail.create({ ...mail, state: 'queued', createdAt: server.deps.clock() });
    const long = new Date(server.deps.clock().getTime() - 3_600_000);
    await OutboxMail.create({ ...mail, state: 'queued', createdAt: long });
    await OutboxMail.create({ ...mail, state: 'sent', createdAt: long });
    const { mails } = await health();
    expect(mails.undeliveredCount).toBe(2);
    expect(JSON.stringify(mails)).not.toContain('person@example.org');
    expect((await steward.send('post', `/api/steward/mails/${refused.id}/retry`)).status).toBe(200);
    await server.deps.jobs.settle();
    expect((await refused.reload()).state).toBe('sent');
    const again = await steward.send('post', `/api/steward/mails/${refused.id}/retry`);
    expect([again.status, again.body.error.code]).toEqual([409, 'conflict']);
    expect((await steward.send('post', `/api/steward/mails/${unknownId}/retry`)).status).toBe(404);
  });
});

const append = (action: string, at: string, extra: { subjectId?: string; words?: string } = {}) =>
  server.deps.db.transaction((transaction) =>
    appendTrail(
      {
        ...{ actor: 'system', at: new Date(at), subjectType: 'pool', action, details: { number: 1 } },
        subjectId: extra.subjectId ?? 'one',
        ...(extra.words ? { texts: { note: extra.words } } : {}),
      },
      transaction,
    ),
  );

describe('checking the trail', () => {
  it('is a job that stores what it found', async () => {
    await append('stepped', '2026-11-01T00:00:00Z');
    expect((await steward.send('post', '/api/steward/trail/check')).status).toBe(202);
    expect((await health()).trail.isChecking).toBe(true);
    await server.deps.jobs.settle();
    const { trail } = await health();
    expect(trail).toMatchObject({ entries: 1, isChecking: false });
    expect(trail.lastCheck).toMatchObject({ at: '2026-12-01T12:00:00.000Z', entries: 1, problems: [] });
  });

  it('finds an entry that was altered behind the triggers, and an end that was cut off', async () => {
    for (const day of [1, 2, 3]) await append('stepped', `2026-11-0${day}T00:00:00Z`);
    await checkTrail(server.deps)({});
    await server.deps.db.query('DROP TRIGGER trailNoUpdate');
    await server.deps.db.query('DROP TRIGGER trailNoDelete');
    await server.deps.db.query(`UPDATE trail SET action = 'other' WHERE id = 2`);
    await server.deps.db.query('DELETE FROM trail WHERE id = 3');
    await checkTrail(server.deps)({});
    const last = await TrailCheck.findOne({ order: [['id', 'DESC']], rejectOnEmpty: true });
    expect(last.problems.map(({ id }) => id)).toEqual([2, 3]);
    expect((await health()).trail.lastCheck?.problems).toHaveLength(2);
  });
});

describe('reading the trail', () => {
  const read = async (query = '') =>
    trailPageSchema.parse((await steward.get(`/api/steward/trail?${query}`)).body);

  it('pages from the newest on without a gap or a repeat', async () => {
    for (let i = 1; i <= 7; i += 1) await append(`step${i}`, `2026-11-0${i}T00:00:00Z`);
    const seen: string[] = [];
    let next: number | null = null;
    do {
      const page: Awaited<ReturnType<typeof read>> = await read(`limit=3${next ? `&before=${next}` : ''}`);
      seen.push(...page.entries.map(({ action }) => action));
      next = page.next;
    } while (next);
    expect(seen).toEqual(['step7', 'step6', 'step5', 'step4', 'step3', 'step2', 'step1']);
  });

  it('is narrowed by kind, record and days, both ends included', async () => {
    await append('a', '2026-11-01T23:59:59Z');
    await append('b', '2026-11-02T00:00:00Z', { subjectId: 'two' });
    await append('c', '2026-11-03T23:59:59Z');
    await append('d', '2026-11-04T00:00:00Z');
    const actions = async (query: string) => (await read(query)).entries.map(({ action }) => action);
    expect(await actions('from=2026-11-02&to=2026-11-03')).toEqual(['c', 'b']);
    expect(await actions('record=two')).toEqual(['b']);
    expect(await actions('kind=pool')).toEqual(['d', 'c', 'b', 'a']);
    expect(await actions('kind=check')).toEqual([]);
    expect((await steward.get('/api/steward/trail?from=yesterday')).status).toBe(422);
    expect((await steward.get('/api/steward/trail?kind=other')).status).toBe(422);
  });

  it('shows words beside an entry with addresses hidden, and says which are erased', async () => {
    const entry = await append('noted', '2026-11-01T00:00:00Z', { words: 'Write to me@example.org' });
    expect((await read()).entries[0]?.texts).toEqual([
      { field: 'note', text: 'Write to [e-mail address hidden]' },
    ]);
    await server.deps.db.query(`DELETE FROM trailTexts WHERE trailId = ${entry.id}`);
    expect((await read()).entries[0]?.texts).toEqual([{ field: 'note', text: null }]);
    expect(await TrailEntry.count()).toBe(1);
  });
});

describe('a fit in force that other code made', () => {
  async function putInForce(madeBy: string) {
    const nothing = { parameters: null, covariance: null, diagnostics: null, curves: null };
    const counts = { owners: 0, banks: 0, checks: 0, durationMs: 1, isGood: true, reason: null };
    const fit = await Fit.create({
      ...{ ...nothing, ...counts, kind: 'working', trigger: 'refit', dataHash: 'a'.repeat(64) },
      codeVersion: madeBy,
    });
    await CurrentFit.create({ kind: 'working', fitId: fit.id });
  }
  const refits = () => Job.count({ where: { kind: 'refit' } });

  it('is asked for anew at the start, once', async () => {
    // Stopped, so that what is asked for stays to be counted.
    await server.deps.jobs.stop();
    await putInForce('0.0.1+older');
    await refitIfOlder(server.deps);
    await refitIfOlder(server.deps);
    expect(await refits()).toBe(1);
  });

  it('stays when this code made it, and when there is none', async () => {
    await refitIfOlder(server.deps);
    await putInForce(codeVersion);
    await refitIfOlder(server.deps);
    expect(await refits()).toBe(0);
  });
});
