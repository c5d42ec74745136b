import { queueSchema, submissionSchema } from '@/lib/contract/moderation';
import { BankEvent, Finding, Job, TrailEntry, Upload } from '@/server/db/models';
import { requestRefit } from '@/server/fits/requestRefit';

import { addBank, addCellType, addCheck, addOwner, addOwnerWithChecks } from '../support/poolFixture';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';
import { screenContext } from './screenContext';

let server: TestServer;
let moderator: TestClient;
beforeEach(async () => {
  server = await startTestServer();
  moderator = await server.client('moderator');
  await addCellType();
});
afterEach(() => server.stop());

const unknownId = '6f9619ff-8b86-4011-b42d-00c04fc964ff';

async function addSubmission(
  severity: number,
  submittedAt: string,
  state: 'submitted' | 'approved' = 'submitted',
) {
  const owner = await addOwner();
  const bank = await addBank({ ownerId: owner.id });
  const check = await addCheck({
    bankId: bank.id,
    years: 6,
    efc: 900,
    sohFraction: 0.9,
    state,
    severity,
    submittedAt,
  });
  return { owner, bank, check };
}

async function queue(query = '') {
  return queueSchema.parse((await moderator.get(`/api/screening${query}`).expect(200)).body);
}

describe('GET /api/screening', () => {
  it('puts the worst first, then the oldest', async () => {
    const mild = await addSubmission(0, '2026-10-01T08:00:00Z');
    const late = await addSubmission(2, '2026-11-02T08:00:00Z');
    const early = await addSubmission(2, '2026-11-01T08:00:00Z');
    const worst = await addSubmission(3, '2026-11-03T08:00:00Z');
    const { entries, next } = await queue();
    expect(entries.map(({ checkId }) => checkId)).toEqual(
      [worst, early, late, mild].map(({ check }) => check.id),
    );
    expect(entries.map(({ severity }) => severity)).toEqual(['repairable', 'doubtful', 'doubtful', 'fits']);
    expect(next).toBeNull();
  });

  it('pages by cursor without leaving out or repeating one, though others arrive in between', async () => {
    const added = [];
    for (let i = 0; i < 7; i += 1) added.push(await addSubmission(i % 2, `2026-11-0${i + 1}T08:00:00Z`));
    const first = await queue('?limit=3');
    await addSubmission(3, '2026-11-09T08:00:00Z');
    const second = await queue(`?limit=3&after=${first.next}`);
    const third = await queue(`?limit=3&after=${second.next}`);
    expect(third.next).toBeNull();
    const seen = [first, second, third].flatMap(({ entries }) => entries.map(({ checkId }) => checkId));
    expect(new Set(seen).size).toBe(7);
    expect([...seen].sort()).toEqual(added.map(({ check }) => check.id).sort());
  });

  it('tells equal severities and times apart by id', async () => {
    for (let i = 0; i < 4; i += 1) await addSubmission(1, '2026-11-01T08:00:00Z');
    const first = await queue('?limit=2');
    const second = await queue(`?limit=2&after=${first.next}`);
    const seen = [...first.entries, ...second.entries].map(({ checkId }) => checkId);
    expect(new Set(seen).size).toBe(4);
  });

  it('filters by state and counts every state but drafts', async () => {
    await addSubmission(0, '2026-11-01T08:00:00Z');
    await addSubmission(0, '2026-11-01T08:00:00Z', 'approved');
    const { entries, counts } = await queue('?state=approved');
    expect(entries).toHaveLength(1);
    expect(counts).toEqual({ submitted: 1, approved: 1 });
    expect((await queue('?state=draft')).entries).toEqual([]);
  });

  it('heads an entry by its worst finding', async () => {
    const { check } = await addSubmission(2, '2026-11-01T08:00:00Z');
    const finding = { checkId: check.id, ownerText: '', moderatorText: '', evidence: {} };
    await Finding.create({ ...finding, rule: 'testTemperature', title: 'Tested at 9 °C', severity: 1 });
    await Finding.create({
      ...finding,
      rule: 'counterBackwards',
      title: 'Counter ran backwards',
      severity: 2,
    });
    await addSubmission(0, '2026-11-01T08:00:00Z');
    const { entries } = await queue();
    expect(entries.map(({ headline }) => headline)).toEqual(['Counter ran backwards', 'Nothing found']);
    expect(entries[0]?.layout).toBe('1p16s');
  });

  it('filters by severity, cell type and rule, page by page, and names what can be filtered by', async () => {
    await addCellType({ id: 'tern-280', ratedAh: 280 });
    const add = async (severity: number, rule: string, cellTypeId = 'skerry-100') => {
      const bank = await addBank({ ownerId: (await addOwner()).id, cellTypeId });
      const check = await addCheck({
        ...{ bankId: bank.id, years: 6, efc: 900, sohFraction: 0.9, state: 'submitted', severity },
      });
      const texts = { ownerText: '', moderatorText: '', evidence: {} };
      await Finding.create({ checkId: check.id, rule, title: `Title of ${rule}`, severity, ...texts });
      return check.id;
    };
    const looks = [
      await add(1, 'endedByBms'),
      await add(1, 'endedByBms'),
      await add(1, 'endedByBms', 'tern-280'),
    ];
    const doubtful = await add(2, 'meanVoltage', 'tern-280');
    // A rule that looked and found nothing is no finding to filter by.
    await add(0, 'endedByBms');
    const idsOf = async (query: string) => (await queue(query)).entries.map(({ checkId }) => checkId);
    expect((await idsOf('?severity=look')).sort()).toEqual([...looks].sort());
    expect((await idsOf('?rule=endedByBms')).sort()).toEqual([...looks].sort());
    expect((await idsOf('?cellType=tern-280')).sort()).toEqual([looks[2], doubtful].sort());
    expect(await idsOf('?cellType=tern-280&severity=look&rule=endedByBms')).toEqual([looks[2]]);
    expect(await idsOf('?rule=nothing')).toEqual([]);
    const first = await queue('?rule=endedByBms&limit=2');
    const second = await queue(`?rule=endedByBms&limit=2&after=${first.next}`);
    expect([...first.entries, ...second.entries].map(({ checkId }) => checkId).sort()).toEqual(
      [...looks].sort(),
    );
    expect(second.facets).toBeNull();
    expect(first.facets).toEqual({
      severities: { fits: 1, look: 3, doubtful: 1 },
      cellTypes: [
        { id: 'skerry-100', name: 'skerry-100', count: 3 },
        { id: 'tern-280', name: 'tern-280', count: 2 },
      ],
      rules: [
        { rule: 'endedByBms', count: 3 },
        { rule: 'meanVoltage', count: 1 },
      ],
    });
  });

  it.each([
    '?severity=bad',
    '?rule=x%27%20OR%201',
    '?cellType=A%20B',
    '?after=nonsense',
    '?limit=0',
    '?limit=1000',
    '?state=lost',
  ])('refuses %s beside its field', async (query) => {
    const answer = await moderator.get(`/api/screening${query}`).expect(422);
    expect(Object.keys(answer.body.error.fields)).toHaveLength(1);
  });

  it('is closed to visitors and owners', async () => {
    await (await server.client()).get('/api/screening').expect(401);
    await (await server.client('owner')).get('/api/screening').expect(403);
    await (await server.client('steward')).get('/api/screening').expect(200);
  });
});

describe('GET /api/screening/:checkId', () => {
  it('shows the submission with its evidence, and nothing of the owner', async () => {
    const owner = await addOwner();
    const bank = await addBank({ ownerId: owner.id });
    const first = await addCheck({ bankId: bank.id, years: 5, efc: 700, sohFraction: 0.93 });
    const upload = await Upload.create({
      ...{ ownerId: owner.id, bankId: bank.id, kind: 'log', filename: 'shed-of-anna.csv', storageKey: 'k' },
      ...{ sha256: 'a'.repeat(64), bytes: 10, state: 'ready', result: screenContext({ log: {} }).log },
    });
    const check = await addCheck({
      bankId: bank.id,
      years: 6,
      efc: 900,
      sohFraction: 0.91,
      state: 'submitted',
    });
    await check.update({ uploadId: upload.id });
    await BankEvent.create({ bankId: bank.id, happenedOn: '2025-12-01', kind: 'rebalanced', note: '' });
    const finding = {
      checkId: check.id,
      rule: 'testRate',
      title: 'Test rate',
      severity: 0,
      evidence: { meanIt: 0.2 },
    };
    await Finding.create({ ...finding, ownerText: 'for the owner', moderatorText: 'for moderators' });

    const answer = await moderator.get(`/api/screening/${check.id}`).expect(200);
    const submission = submissionSchema.parse(answer.body);
    expect(submission).toMatchObject({ isOwn: false, version: 1, state: 'submitted' });
    expect(submission.bank).toMatchObject({ pseudonym: bank.pseudonym, ratedAh: 100 });
    expect(submission.bank.events.map(({ kind }) => kind)).toEqual(['rebalanced']);
    expect(submission.findings).toEqual([
      {
        rule: 'testRate',
        title: 'Test rate',
        severity: 'fits',
        text: 'for moderators',
        evidence: { meanIt: 0.2 },
      },
    ]);
    expect(submission.history.map(({ checkId }) => checkId)).toEqual([first.id, check.id]);
    expect(submission.log?.capacityAh).toBe(437);
    expect(submission.working).toMatchObject({ absence: 'noFit', curve: [] });
    for (const secret of [owner.id, owner.email, bank.name, bank.id, 'shed-of-anna', 'for the owner'])
      expect(answer.text).not.toContain(secret);
  });

  it('carries the working curve of the cell type, though nothing is public yet', async () => {
    for (let seed = 1; seed <= 6; seed += 1) await addOwnerWithChecks(seed);
    const { check } = await addSubmission(0, '2026-11-01T08:00:00Z');
    await server.deps.db.transaction((transaction) => requestRefit(server.deps, transaction));
    await server.deps.jobs.settle();
    const { working, workingFittedAt } = submissionSchema.parse(
      (await moderator.get(`/api/screening/${check.id}`).expect(200)).body,
    );
    const few = { from: 5, to: 9 };
    expect(working.evidence).toEqual({ owners: few, banks: few, checks: 24 });
    expect(working.curve.length).toBeGreaterThan(30);
    expect(workingFittedAt).not.toBeNull();
  });

  it('says when a submission is the reader’s own', async () => {
    const bank = await addBank({ ownerId: moderator.userId! });
    const check = await addCheck({
      bankId: bank.id,
      years: 6,
      efc: 900,
      sohFraction: 0.9,
      state: 'submitted',
    });
    expect((await moderator.get(`/api/screening/${check.id}`)).body.isOwn).toBe(true);
  });

  it('answers 404 for what is not there, a draft, or no id at all', async () => {
    const bank = await addBank({ ownerId: (await addOwner()).id });
    const draft = await addCheck({ bankId: bank.id, years: 6, efc: 900, sohFraction: 0.9, state: 'draft' });
    for (const id of [unknownId, draft.id, 'not-an-id', '..%2f..'])
      await moderator.get(`/api/screening/${id}`).expect(404);
  });

  it('is closed to visitors and owners, the owner of the check too', async () => {
    const owner = await server.client('owner');
    const bank = await addBank({ ownerId: owner.userId! });
    const check = await addCheck({
      bankId: bank.id,
      years: 6,
      efc: 900,
      sohFraction: 0.9,
      state: 'submitted',
    });
    await owner.get(`/api/screening/${check.id}`).expect(403);
    await (await server.client()).get(`/api/screening/${check.id}`).expect(401);
    expect(await TrailEntry.count()).toBe(0);
    expect(await Job.count()).toBe(0);
  });
});
