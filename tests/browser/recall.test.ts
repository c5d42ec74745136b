import type { Page } from 'playwright-core';

import { cellPageSchema } from '@/lib/contract/cells';
import { Bank, Check, User } from '@/server/db/models';
import { findCurrentFit } from '@/server/fits/currentFit';
import { decide } from '@/server/moderation/decide';
import { findWorkingPool } from '@/server/moderation/workingPool';

import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';

jest.setTimeout(300_000);

const cellTypeId = 'skerry-240';
let demo: Demo;
let page: Page;

beforeAll(async () => {
  demo = await startDemo();
  page = await demo.open();
  await signInOn(page, 'moderator@demo.example');
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

/** Approved checks of the cell type, each of another owner, on none of which a published figure hangs much. */
async function findRecallable(count: number): Promise<Check[]> {
  const influence = (await findWorkingPool(demo.deps))!.influence;
  const banks = await Bank.findAll({ where: { cellTypeId, bought: 'new' }, order: [['id', 'ASC']] });
  const found = new Map<string, Check>();
  for (const { id, ownerId } of banks) {
    if (found.size === count) break;
    const [check] = await Check.findAll({ where: { bankId: id, state: 'approved' }, order: [['id', 'ASC']] });
    if (check && !influence.has(id)) found.set(ownerId, check);
  }
  return [...found.values()];
}

const checksIn = async (kind: 'working' | 'public') =>
  (await findCurrentFit(demo.deps, kind))!.output.views.find(
    (view) => view.cellType === cellTypeId && view.bandKey === null,
  )!.evidence!.checks;
const publicPage = async () =>
  cellPageSchema.parse(await (await fetch(`${demo.url}/api/cells/${cellTypeId}`)).json());

it('a recalled check leaves the working figure at once, and the public one with the fifth owner', async () => {
  const [first, ...others] = await findRecallable(5);
  const [working, shown] = [await checksIn('working'), await checksIn('public')];
  await page.goto(`/screening/${first!.id}`);
  await page.getByRole('button', { name: 'More decisions' }).click();
  await page.getByRole('button', { name: 'Recall' }).click();
  const dialog = page.getByRole('dialog', { name: 'Recall' });
  await dialog.getByRole('textbox', { name: 'Reason' }).fill('The meter turned out to be of another bank.');
  await dialog.getByRole('button', { name: 'Recall' }).click();
  await page.getByText(/recalled with your reason\. It takes effect/).waitFor();
  await demo.pass(31);
  expect(await checksIn('working')).toBe(working - 1);
  expect(await checksIn('public')).toBe(shown);
  expect((await publicPage()).pool.waiting).toBe('fewerThanFiveOwners');

  const moderator = await User.findOne({ where: { role: 'moderator' }, rejectOnEmpty: true });
  const actor = { role: 'moderator', userId: moderator.id, familyId: '' } as const;
  for (const { id, version } of others)
    await decide(demo.deps, actor, id, { action: 'recall', version, reason: 'The same meter.' });
  await demo.pass(31);
  expect(await checksIn('working')).toBe(working - 5);
  expect(await checksIn('public')).toBe(shown - 5);

  const visitor = await demo.open();
  await visitor.goto(`/cells/${cellTypeId}`);
  const { evidence } = (await publicPage()).view;
  await visitor
    .getByText(new RegExp(`${evidence!.checks} checks`))
    .first()
    .waitFor();
  await visitor.context().close();
});
