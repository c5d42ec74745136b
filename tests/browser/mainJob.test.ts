import { join } from 'node:path';

import type { Page } from 'playwright-core';

import truth from '@/data/demo/logs/truth.json';
import { leastOf } from '@/lib/contract/counts';
import type { CellPage } from '@/lib/contract/cells';
import { undoSeconds } from '@/lib/contract/moderation';
import { Bank, CurrentFit, Fit, User } from '@/server/db/models';

import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';
import { addBank, describeTest, newPassword, register, uploadLog } from '../support/ownerSteps';

jest.setTimeout(240_000);

const log = 'barn-2026-11-14.csv';
const email = 'new-owner@example.org';

let demo: Demo;
let owner: Page;
let moderator: Page;
let visitor: Page;
let before: CellPage;
let workingBefore: Fit;

beforeAll(async () => {
  demo = await startDemo();
  owner = await demo.open();
  moderator = await demo.open();
  visitor = await demo.open({ viewport: { width: 390, height: 844 } });
  before = await publicPage();
  workingBefore = await fitInForce('working');
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

async function publicPage(): Promise<CellPage> {
  return (await visitor.request.get('/api/cells/skerry-240')).json();
}

async function fitInForce(kind: 'working' | 'public'): Promise<Fit> {
  const { fitId } = await CurrentFit.findByPk(kind, { rejectOnEmpty: true });
  return await Fit.findByPk(fitId, { rejectOnEmpty: true });
}

/** The five characters by which moderators know the new owner's bank. */
async function pseudonymOf(name: string): Promise<string> {
  const { id: ownerId } = await User.findOne({ where: { email }, rejectOnEmpty: true });
  return (await Bank.findOne({ where: { ownerId, name }, rejectOnEmpty: true })).pseudonym;
}

/** Opens the first submission of the queue with these words. */
async function openSubmission(words: string): Promise<void> {
  await moderator.goto('/screening');
  const queue = moderator.getByRole('list', { name: 'Submissions' });
  await queue.getByRole('link').filter({ hasText: words }).first().click();
}

/** Approves the submission that is open. */
async function approve(): Promise<void> {
  const answer = moderator.waitForResponse((response) => response.url().endsWith('/decision'));
  await moderator
    .getByRole('toolbar', { name: 'Decision' })
    .getByRole('button', { name: 'Approve', exact: true })
    .click();
  expect((await answer).status()).toBe(200);
}

/** The steps are one story: each stands on the one before. */
describe('from a log to the published curve', () => {
  it('an owner registers, confirms the address through the outbox and signs in', async () => {
    await register(owner, email);
    await signInOn(owner, email, newPassword);
    await owner.getByRole('heading', { name: 'No bank yet' }).waitFor();
  });

  it('adds a bank', async () => {
    await addBank(owner, 'Barn');
    await owner.getByRole('heading', { name: 'No check yet' }).waitFor();
  });

  it('uploads the log of a discharge, and sees what it comes to', async () => {
    await uploadLog(owner, join(__dirname, '../../data/demo/logs', log));
    const { capacityAh, energyWh } = truth[log];
    const shown = async (term: string) => {
      const value = owner
        .getByRole('term')
        .filter({ hasText: term })
        .locator('xpath=following-sibling::*[1]');
      return parseFloat((await value.textContent())!);
    };
    // The simulation behind the log counted every second of it; data/demo/logs/README.md: within 0.2 %.
    expect((await shown('Charge')) / capacityAh).toBeCloseTo(1, 2);
    expect((await shown('Energy')) / (energyWh / 1000)).toBeCloseTo(1, 2);
    await owner.getByRole('figure', { name: 'The discharge in the log' }).locator('svg').first().waitFor();
  });

  it('says how the bank was tested and lived, and sends the check', async () => {
    await describeTest(owner);
    await owner.getByRole('button', { name: 'Send the check' }).click();
    await owner.getByText('Sent. A moderator looks at it next.').waitFor();
    await owner.getByText('submitted', { exact: true }).first().waitFor();
  });

  it('a moderator sees the log behind it and approves', async () => {
    await signInOn(moderator, 'moderator@demo.example');
    await moderator.goto('/screening');
    await moderator.getByText('15 waiting.').waitFor();
    await openSubmission(await pseudonymOf('Barn'));
    const drawn = moderator.getByRole('figure', { name: 'The log behind this check' }).locator('svg');
    await drawn.first().waitFor();
    await approve();
    await moderator.getByText(/approved\. It takes effect/).waitFor();
  });

  it('the working fit moves, the public one does not', async () => {
    await demo.pass(undoSeconds + 1);
    const after = await fitInForce('working');
    expect(after.id).not.toBe(workingBefore.id);
    expect(after.checks).toBe(workingBefore.checks + 1);
    expect(after.curves).not.toEqual(workingBefore.curves);
    await moderator.goto('/screening');
    await moderator.getByText(new RegExp(`${after.checks.toLocaleString('en')} checks on`)).waitFor();
    const { pool: _pool, ...figures } = await publicPage();
    const { pool: _poolBefore, ...figuresBefore } = before;
    expect(figures).toEqual(figuresBefore);
  });

  it('a visitor is told that a check waits', async () => {
    await visitor.goto('/cells/skerry-240');
    await visitor.getByText('Approved checks wait to be published.').waitFor();
    await visitor.goto('/');
    await visitor.getByText('Approved checks wait to be published.').waitFor();
  });

  it('the owner reads that the check counts, and got a mail', async () => {
    await owner.reload();
    await owner.getByRole('main').getByText('approved', { exact: true }).first().waitFor();
    await owner.goto('/outbox');
    await owner.getByText(`To ${email},`).nth(1).waitFor();
  });

  it('with the checks of four more owners the public curve moves', async () => {
    for (let more = 0; more < 4; more += 1) {
      await openSubmission('Nothing found');
      await approve();
    }
    await demo.pass(undoSeconds + 1);
    await visitor.goto('/cells/skerry-240');
    const after = await publicPage();
    expect(after.view.dots).toHaveLength(before.view.dots.length + 5);
    expect(after.view.evidence!.checks).toBe(leastOf(before.view.evidence!.checks) + 5);
    expect(after.view.curve).not.toEqual(before.view.curve);
    await visitor.getByText(`${after.view.dots.length} single checks are drawn.`).waitFor();
    expect(await visitor.getByText('wait to be published').count()).toBe(0);
  });
});
