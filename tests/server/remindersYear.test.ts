import { calendarDateOf } from '@/lib/units';
import { Job, OutboxMail, User } from '@/server/db/models';
import { JobRunner } from '@/server/jobs/JobRunner';
import { registerJobs } from '@/server/registerJobs';
import { scheduleDailyTick } from '@/server/reminders/dailyTick';

import { checkInput, createBankOf, createCellType } from '../support/bankFixtures';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

const dayMs = 86_400_000;
let server: TestServer;
let owner: TestClient;

beforeEach(async () => {
  server = await startTestServer();
  await createCellType();
  owner = await server.client('owner');
});
afterEach(() => server.stop());

async function bankWith(testedOn: string | null, name = 'Barn'): Promise<string> {
  const bankId = await createBankOf(owner, { name });
  if (testedOn !== null)
    await owner.send('post', `/api/banks/${bankId}/checks`, checkInput({ reading: { testedOn } }));
  return bankId;
}

/** Lets days pass, at nine each; the outbox tells when each reminder was written. */
async function pass(from: string, days: number, eachDay: (day: string) => Promise<void> = async () => {}) {
  for (let count = 0; count < days; count += 1) {
    const day = calendarDateOf(new Date(Date.parse(`${from}T00:00:00Z`) + count * dayMs));
    server.setNow(`${day}T09:00:00Z`);
    await server.deps.jobs.settle();
    await eachDay(day);
  }
}

const reminders = async () => {
  const mails = await OutboxMail.findAll({ order: [['rowid', 'ASC']] });
  return mails.filter(({ onceKey }) => onceKey?.startsWith('reminder:'));
};
const sentDays = async () => (await reminders()).map(({ onceKey }) => onceKey!.split(':')[2]);
const linkIn = (mail: OutboxMail, page: string) =>
  new RegExp(`${page}\\?token=(\\S+)`).exec(mail.text)?.[1] ?? '';

it('writes once a year, a month later where asked, through a year of mornings', async () => {
  const bankId = await bankWith('2025-12-10');
  await bankWith(null, 'Never tested');
  await scheduleDailyTick(server.deps);
  const written: string[] = [];
  let seen = 0;
  await pass('2026-12-01', 400, async (day) => {
    const mails = await reminders();
    if (mails.length > seen) written.push(day);
    // The first is put off twice, then the check is made.
    const newest = mails.at(-1);
    if (mails.length > seen && mails.length <= 2)
      await owner.send('post', '/api/reminders/later', { token: linkIn(newest!, 'remind-later') });
    if (day === '2027-02-20')
      await owner.send(
        'post',
        `/api/banks/${bankId}/checks`,
        checkInput({ reading: { testedOn: '2027-02-20' }, conditions: { counterValue: 1100 } }),
      );
    seen = mails.length;
  });
  // 10 Dec; a month later, 10 Jan; a month later, 10 Feb; then the check, so nothing before 20 Feb 2028.
  expect(await sentDays()).toEqual(['2026-12-10', '2027-01-10', '2027-02-10']);
  expect(written).toEqual(['2026-12-10', '2027-01-10', '2027-02-10']);
  expect(await Job.count({ where: { kind: 'dailyTick', state: 'queued' } })).toBe(1);
}, 120_000);

it('is written once across restarts, and for the days the server was down', async () => {
  await bankWith('2025-12-05');
  await scheduleDailyTick(server.deps);
  await scheduleDailyTick(server.deps);
  expect(await Job.count({ where: { kind: 'dailyTick' } })).toBe(1);
  // Down from the 1st to the 9th.
  server.setNow('2026-12-09T15:00:00Z');
  for (let start = 0; start < 3; start += 1) {
    await Job.update({ state: 'running' }, { where: { kind: 'dailyTick', state: 'queued' } });
    const { db, logger, clock } = server.deps;
    const jobs = new JobRunner(db, logger, clock);
    const deps = { ...server.deps, jobs };
    const close = registerJobs(deps);
    await jobs.start();
    await scheduleDailyTick(deps);
    await jobs.settle();
    await jobs.stop();
    await close();
  }
  expect(await sentDays()).toEqual(['2026-12-05']);
  expect(await OutboxMail.count({ where: { state: 'sent' } })).toBe(1);
});

it('says what is due, and carries what lets it be put off and stopped', async () => {
  const bankId = await bankWith('2025-12-01', 'Barn, left');
  await scheduleDailyTick(server.deps);
  await pass('2026-12-02', 1);
  const [mail] = await reminders();
  expect(mail).toMatchObject({ recipient: owner.email, userId: owner.userId, state: 'sent' });
  expect(mail!.subject).toBe('A capacity check is due: Barn, left');
  expect(mail!.text).toContain('was on 1 Dec 2025, and the next one has been due since 1 Dec 2026.');
  expect(mail!.text).toContain(`http://localhost:8080/banks/${bankId}/check`);
  const token = linkIn(mail!, '/unsubscribe');
  expect(mail!.headers).toEqual({
    'List-Unsubscribe': `<http://localhost:8080/api/unsubscribe?token=${token}>`,
    'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click',
  });
});

it.each<[string, (bankId: string) => Promise<unknown>]>([
  ['wants no reminders', () => User.update({ noticeReminders: false }, { where: { id: owner.userId! } })],
  [
    'switched this bank off',
    (bankId) => owner.send('put', `/api/banks/${bankId}/reminder`, { isOn: false, dueOn: null }),
  ],
  [
    'noted the bank as sold',
    (bankId) =>
      owner.send('post', `/api/banks/${bankId}/events`, { happenedOn: '2026-11-01', kind: 'sold', note: '' }),
  ],
  [
    'chose a later day',
    (bankId) => owner.send('put', `/api/banks/${bankId}/reminder`, { isOn: true, dueOn: '2027-06-01' }),
  ],
])('is not written to an owner who %s', async (_name, choose) => {
  const bankId = await bankWith('2025-12-05');
  await choose(bankId);
  await scheduleDailyTick(server.deps);
  await pass('2026-12-02', 10);
  expect(await reminders()).toEqual([]);
});

it('is not written of a bank whose day is more than two months past', async () => {
  await bankWith('2025-10-01');
  await bankWith('2025-10-03', 'Shed');
  await scheduleDailyTick(server.deps);
  await pass('2026-12-02', 1);
  expect((await reminders()).map(({ subject }) => subject)).toEqual(['A capacity check is due: Shed']);
});
