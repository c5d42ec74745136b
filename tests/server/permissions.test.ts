import { randomBytes } from 'node:crypto';

import { hashToken } from '@/server/accounts/secretTokens';
import { Fit, HealthRecord, Job, OutboxMail, QuotedClaim, Upload } from '@/server/db/models';
import { createCsrf } from '@/server/http/csrf';
import { createRoutes } from '@/server/routes';

import { bankInput, checkInput, createBankOf, createCellType } from '../support/bankFixtures';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

type Outcome = 'allowed' | 'notSignedIn' | 'forbidden' | 'hidden';
type Who = 'visitor' | 'owner' | 'anotherOwner' | 'moderator' | 'steward';

/** The owner's own records, made afresh for each try. */
interface Records {
  bankId: string;
  checkId: string;
  uploadId: string;
  /** Of a check that was sent in with it. */
  photoId: string;
  fitId: string;
  recordId: string;
  recordToken: string;
  claimId: string;
  userId: string;
  /** Both failed. */
  jobId: string;
  mailId: string;
}

interface Row {
  rule: Record<Who, Outcome>;
  /** Fills in the address's parameters. */
  at?: keyof Records;
  body?: () => object;
  file?: string;
}

const statuses: Record<Exclude<Outcome, 'allowed'>, number> = {
  notSignedIn: 401,
  forbidden: 403,
  hidden: 404,
};

const everyone: Row['rule'] = {
  visitor: 'allowed',
  owner: 'allowed',
  anotherOwner: 'allowed',
  moderator: 'allowed',
  steward: 'allowed',
};
const signedIn: Row['rule'] = { ...everyone, visitor: 'notSignedIn' };
const stewards: Row['rule'] = {
  ...signedIn,
  owner: 'forbidden',
  anotherOwner: 'forbidden',
  moderator: 'forbidden',
};
const ownRecord: Row['rule'] = {
  visitor: 'notSignedIn',
  owner: 'allowed',
  anotherOwner: 'hidden',
  moderator: 'hidden',
  steward: 'hidden',
};
const ownOrScreened: Row['rule'] = { ...ownRecord, moderator: 'allowed', steward: 'allowed' };
const screeners: Row['rule'] = { ...signedIn, owner: 'forbidden', anotherOwner: 'forbidden' };

const nobodyElse: Row['rule'] = { ...screeners, moderator: 'hidden', steward: 'hidden' };

const token = 'x'.repeat(43);
const version = 1;
const mapping = {
  delimiter: ',',
  decimal: '.',
  headerLine: 0,
  columns: [{ index: 0, quantity: 'time', unit: 's' }],
  timeFormat: 'seconds',
  window: null,
};
const event = { happenedOn: '2025-05-04', kind: 'rebalanced', note: '' };
const { reading, conditions, uploadId, sources, note } = checkInput();
const unknownId = '6f9619ff-8b86-4011-b42d-00c04fc964ff';

/** Every route of the API and who may use it. Refusals by 404 tell nothing of others' records. */
const table: Record<string, Row> = {
  'GET /account/session': { rule: everyone },
  'GET /account/demo-accounts': { rule: everyone },
  'POST /account/register': {
    rule: everyone,
    body: () => ({ email: 'new@example.org', password: 'tide table in the hall' }),
  },
  'POST /account/verify': { rule: everyone, body: () => ({ token }) },
  'POST /account/resend-verification': { rule: everyone, body: () => ({ email: 'a@example.org' }) },
  'POST /account/request-reset': { rule: everyone, body: () => ({ email: 'a@example.org' }) },
  'POST /account/reset': { rule: everyone, body: () => ({ token, password: 'tide table in the hall' }) },
  // Refused by wrong credentials and ended sessions only, so what is not sent tells: 422.
  'POST /account/sign-in': { rule: everyone, body: () => ({}) },
  'POST /account/sign-out': { rule: everyone, body: () => ({}) },
  'POST /account/change-password': { rule: signedIn, body: () => ({}) },
  'POST /account/change-email': { rule: signedIn, body: () => ({}) },
  'POST /account/confirm-email': { rule: everyone, body: () => ({ token }) },
  'GET /account/notices': { rule: signedIn },
  'PUT /account/notices': {
    rule: signedIn,
    body: () => ({ reminders: true, decisions: true, releases: false }),
  },
  // Without a password just before it, the step is over: 410.
  'POST /account/sign-in-code': { rule: everyone, body: () => ({ code: '123456' }) },
  'GET /account/second-factor': { rule: signedIn },
  'POST /account/second-factor/begin': { rule: signedIn, body: () => ({}) },
  'POST /account/second-factor/confirm': { rule: signedIn, body: () => ({ code: '123456' }) },
  'POST /account/second-factor/recovery-codes': { rule: signedIn, body: () => ({}) },
  'POST /account/second-factor/turn-off': { rule: signedIn, body: () => ({}) },
  'GET /account/own-data.json': { rule: signedIn },
  'GET /account/checks.csv': { rule: signedIn },
  'POST /account/delete': { rule: signedIn, body: () => ({}) },
  // Tokens that are not ours answer 404 to everybody; without one it is 422.
  'POST /reminders/later': { rule: everyone, body: () => ({}) },
  'POST /unsubscribe': { rule: everyone },
  'GET /unsubscribe': { rule: everyone },
  'GET /outbox': { rule: everyone },
  'GET /cell-types': { rule: everyone },
  'POST /cell-types': {
    rule: signedIn,
    body: () => ({ maker: 'Kittiwake', name: 'Ledge 260', format: 'prismatic', ratedAh: 260, nominalV: 3.2 }),
  },
  'GET /cells': { rule: everyone },
  'GET /cells/:cellId': { rule: everyone },
  'GET /catalogue': { rule: screeners },
  'GET /catalogue/:cellId': { rule: screeners },
  'PUT /catalogue/:cellId': { rule: screeners, body: () => ({}) },
  'POST /catalogue/:cellId/list': { rule: screeners, body: () => ({}) },
  'POST /catalogue/:cellId/decline': { rule: screeners, body: () => ({}) },
  'GET /catalogue/:cellId/merge': { rule: screeners },
  'POST /catalogue/:cellId/merge': { rule: screeners, body: () => ({}) },
  'POST /catalogue/:cellId/claims': { rule: screeners, body: () => ({}) },
  'PUT /catalogue/:cellId/claims/:claimId': { rule: screeners, at: 'claimId', body: () => ({}) },
  'DELETE /catalogue/:cellId/claims/:claimId': { rule: screeners, at: 'claimId' },
  'GET /agreement': { rule: screeners },
  'GET /blind-reviews': { rule: screeners },
  // A review is one moderator's alone (blindReviews.test.ts).
  'GET /blind-reviews/:reviewId': { rule: nobodyElse },
  'POST /blind-reviews/:reviewId': { rule: nobodyElse, body: () => ({ verdict: 'approve' }) },
  'GET /fits': { rule: screeners },
  'GET /fits/public': { rule: everyone },
  'GET /releases': { rule: everyone },
  'GET /releases/preview': { rule: stewards },
  // Refused as there is nothing to release: 409.
  'POST /releases': { rule: stewards, body: () => ({ note: 'New checks.' }) },
  'GET /v1/openapi.json': { rule: everyone },
  'GET /v1/cells': { rule: everyone },
  'GET /v1/cells/:cellId': { rule: everyone },
  'GET /v1/fit': { rule: everyone },
  'GET /v1/releases': { rule: everyone },
  'GET /fits/:fitId': { rule: screeners, at: 'fitId' },
  'GET /banks': { rule: signedIn },
  'POST /banks': { rule: signedIn, body: () => bankInput() },
  'GET /banks/:bankId': { rule: ownRecord, at: 'bankId' },
  'PUT /banks/:bankId': { rule: ownRecord, at: 'bankId', body: () => ({ ...bankInput(), version }) },
  'POST /banks/:bankId/events': { rule: ownRecord, at: 'bankId', body: () => event },
  'GET /banks/:bankId/standing': { rule: ownRecord, at: 'bankId' },
  // Without an approved check the owner is told of a conflict.
  'GET /banks/:bankId/what-if': { rule: ownRecord, at: 'bankId' },
  'GET /banks/:bankId/records': { rule: ownRecord, at: 'bankId' },
  'POST /banks/:bankId/records': { rule: ownRecord, at: 'bankId', body: () => ({}) },
  'POST /records/:recordId/revoke': { rule: ownRecord, at: 'recordId', body: () => ({}) },
  // For whoever was given the link.
  'GET /records/:recordToken': { rule: everyone, at: 'recordToken' },
  'GET /banks/:bankId/reminder': { rule: ownRecord, at: 'bankId' },
  'PUT /banks/:bankId/reminder': {
    rule: ownRecord,
    at: 'bankId',
    body: () => ({ isOn: true, dueOn: null }),
  },
  'GET /banks/:bankId/reminder.ics': { rule: ownRecord, at: 'bankId' },
  'GET /banks/:bankId/checks': { rule: ownRecord, at: 'bankId' },
  'POST /banks/:bankId/checks': { rule: ownRecord, at: 'bankId', body: () => checkInput() },
  'POST /banks/:bankId/logs': { rule: ownRecord, at: 'bankId', file: 'time,current\n0,1\n' },
  'GET /uploads/:uploadId': { rule: ownRecord, at: 'uploadId' },
  'PUT /uploads/:uploadId/mapping': { rule: ownRecord, at: 'uploadId', body: () => ({ mapping }) },
  'POST /banks/:bankId/photos': { rule: ownRecord, at: 'bankId', file: 'no picture' },
  'GET /photos/:photoId': { rule: ownOrScreened, at: 'photoId' },
  'GET /photos/:photoId/thumb': { rule: ownOrScreened, at: 'photoId' },
  // A check shows it, so that its owner is told of a conflict.
  'DELETE /photos/:photoId': { rule: ownRecord, at: 'photoId' },
  'GET /checks/:checkId': { rule: ownRecord, at: 'checkId' },
  'PUT /checks/:checkId': {
    rule: ownRecord,
    at: 'checkId',
    body: () => ({ reading, conditions, uploadId, sources, note, version }),
  },
  'POST /checks/:checkId/answer': {
    rule: ownRecord,
    at: 'checkId',
    body: () => ({ version, answer: 'It was the other meter.' }),
  },
  'POST /checks/:checkId/withdraw': { rule: ownRecord, at: 'checkId', body: () => ({ version }) },
  'GET /earlier-checks/template.csv': { rule: signedIn },
  'POST /earlier-checks/preview': { rule: signedIn, file: 'no table' },
  'POST /earlier-checks': { rule: signedIn, file: 'no table' },
  'GET /screening': { rule: screeners },
  'GET /screening/:checkId': { rule: screeners, at: 'checkId' },
  'POST /screening/:checkId/decision': {
    rule: screeners,
    at: 'checkId',
    body: () => ({ action: 'approve', version }),
  },
  'GET /screening/:checkId/effect': { rule: screeners, at: 'checkId' },
  'POST /screening/:checkId/claim': { rule: screeners, at: 'checkId' },
  'POST /screening/:checkId/release': { rule: screeners, at: 'checkId' },
  'POST /screening/approve-clean': {
    rule: screeners,
    body: () => ({ checks: [{ checkId: unknownId, version }] }),
  },
  'POST /screening/undo': { rule: screeners, body: () => ({ decisionIds: [unknownId] }) },
  // Nothing there: a conflict, as it is not public.
  'POST /screening/:checkId/recall-at-once': {
    rule: stewards,
    at: 'checkId',
    body: () => ({ version, reason: 'It names its owner.' }),
  },
  'GET /steward/people': { rule: stewards },
  'POST /steward/people/find': { rule: stewards, body: () => ({ who: 'nobody@example.org' }) },
  // Without the fields, so that what is not sent tells: 422.
  'POST /steward/people/appoint': { rule: stewards, body: () => ({}) },
  'POST /steward/people/:userId/dismiss': { rule: stewards, at: 'userId', body: () => ({}) },
  'POST /steward/people/:userId/lock': { rule: stewards, at: 'userId', body: () => ({}) },
  'POST /steward/people/:userId/unlock': { rule: stewards, at: 'userId', body: () => ({}) },
  'POST /steward/people/:userId/clear-second-factor': { rule: stewards, at: 'userId', body: () => ({}) },
  'GET /steward/health': { rule: stewards },
  'POST /steward/jobs/:jobId/retry': { rule: stewards, at: 'jobId' },
  'POST /steward/mails/:mailId/retry': { rule: stewards, at: 'mailId' },
  'GET /steward/trail': { rule: stewards },
  'POST /steward/trail/check': { rule: stewards },
  // Nothing was corrected, so that the owner is told of a conflict.
  'POST /checks/:checkId/objection': {
    rule: ownRecord,
    at: 'checkId',
    body: () => ({ version, reason: 'The photo is of last year.' }),
  },
};

/** Not tried like the rest: it answers 401 to everybody who brings no refresh token (accountsRefresh.test.ts). */
const elsewhere = [
  'POST /account/refresh',
  // Of releases, of which there are none here: 404.
  'GET /releases/:number/files/:name',
  'GET /v1/checks',
];

let server: TestServer;
let clients: Record<Who, TestClient>;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  clients = {
    visitor: await server.client(),
    owner: await server.client('owner'),
    anotherOwner: await server.client('owner'),
    moderator: await server.client('moderator'),
    steward: await server.client('steward'),
  };
});
afterAll(() => server.stop());

const keep = (content: string) => server.deps.storage.write(Buffer.from(content));

async function createRecords(owner: TestClient): Promise<Records> {
  const bankId = await createBankOf(owner);
  const file = { ownerId: owner.userId!, bankId, filename: 'file', sha256: 'a'.repeat(64), bytes: 1 };
  const upload = await Upload.create({ ...file, kind: 'log', storageKey: bankId, state: 'unclear' });
  const [storageKey, thumbKey] = [await keep('large'), await keep('small')];
  const kept = { storageKey, thumbKey, width: 40, height: 30, state: 'ready' } as const;
  const photo = await Upload.create({ ...file, ...kept, kind: 'photo' });
  const input = checkInput({ photoId: photo.id });
  const check = await owner.send('post', `/api/banks/${bankId}/checks`, input);
  const counts = { owners: 0, banks: 0, checks: 0 };
  const nothing = { parameters: null, covariance: null, diagnostics: null, curves: null };
  const fit = await Fit.create({
    ...{
      kind: 'working',
      trigger: 'refit',
      isGood: false,
      reason: 'noData',
      codeVersion: 'test',
      durationMs: 1,
    },
    ...{ ...counts, ...nothing, dataHash: 'a'.repeat(64) },
  });
  const recordToken = randomBytes(32).toString('base64url');
  const record = await HealthRecord.create({
    ...{ bankId, tokenHash: hashToken(recordToken), content: null, digest: 'a'.repeat(64) },
    ...{ issuedAt: new Date(), revokedAt: new Date() },
  });
  const claim = await QuotedClaim.create({
    ...{ cellTypeId: 'gannet-280', cycles: 6000, endOfLifeFraction: 0.8, depthFraction: 1 },
    ...{ chargeIt: null, dischargeIt: null, temperatureC: null, clamping: 'notStated', clampForceN: null },
    whereItStands: 'Data sheet, page 2',
  });
  const job = await Job.create({
    ...{ kind: 'unknown', payload: {}, dedupeKey: null, state: 'failed', runAfter: new Date(), error: 'no' },
  });
  const mail = await OutboxMail.create({
    ...{ recipient: 'a@example.org', subject: 'A', text: 'B', state: 'failed' },
  });
  return {
    ...{ userId: owner.userId!, jobId: job.id, mailId: mail.id },
    ...{ bankId, checkId: check.body.id, uploadId: upload.id, photoId: photo.id, fitId: fit.id },
    ...{ recordId: record.id, recordToken, claimId: claim.id },
  };
}

async function attempt(client: TestClient, key: string, row: Row): Promise<number> {
  const records = row.at && (await createRecords(clients.owner));
  const [method = '', pattern = ''] = key.split(' ');
  const path = `/api${pattern.replace(/:(\w+)/g, (_all, name: string) =>
    name === row.at && records ? records[row.at] : 'gannet-280',
  )}`;
  if (method === 'GET') return (await client.get(path)).status;
  const request = client.send(method.toLowerCase() as 'post' | 'put' | 'delete', path, row.body?.());
  return (await (row.file ? request.attach('file', Buffer.from(row.file), 'log.csv') : request)).status;
}

it('knows every route, and none that is not there', () => {
  const routes = createRoutes(createCsrf(server.deps.config));
  const keys = routes.map(({ method, path }) => `${method.toUpperCase()} ${path}`);
  expect([...Object.keys(table), ...elsewhere].sort()).toEqual(keys.sort());
});

describe.each(Object.entries(table))('%s', (key, row) => {
  it.each(Object.entries(row.rule) as [Who, Outcome][])('as %s is %s', async (who, outcome) => {
    const status = await attempt(clients[who], key, row);
    if (outcome === 'allowed') expect([401, 403, 404, 500]).not.toContain(status);
    else expect(status).toBe(statuses[outcome]);
  });
});

it.each(['moderator', 'steward'] as const)('lets no %s decide on their own check', async (who) => {
  const { checkId } = await createRecords(clients[who]);
  const decision = { action: 'approve', version };
  const { status } = await clients[who].send('post', `/api/screening/${checkId}/decision`, decision);
  expect(status).toBe(403);
});

it('takes the role from the signed token only', async () => {
  const { status } = await clients.owner.get('/api/fits?role=moderator').set('x-role', 'moderator');
  expect(status).toBe(403);
});
