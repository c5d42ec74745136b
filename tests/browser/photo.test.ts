import { join } from 'node:path';

import type { Page } from 'playwright-core';

import { Bank, Upload } from '@/server/db/models';

import { type Demo, demoStartMs, signInOn, startDemo } from '../support/demo';
import { addBank, describeTest, uploadLog } from '../support/ownerSteps';
import { unsoundness } from '../support/pageSoundness';
import { drawPicture } from '../support/pictures';

jest.setTimeout(180_000);

let demo: Demo;
let owner: Page;
let moderator: Page;

beforeAll(async () => {
  demo = await startDemo();
  owner = await demo.open({ viewport: { width: 390, height: 844 } });
  moderator = await demo.open();
}, demoStartMs);
afterAll(() => demo.stop());
afterEach(() => expect(demo.takeFaults()).toEqual([]));

const opener = (page: Page) => page.getByRole('button', { name: 'Open the photo of the meter' });

async function give(page: Page, button: string, name: string, buffer: Buffer): Promise<void> {
  const chooser = page.waitForEvent('filechooser');
  await page.getByRole('button', { name: button }).click();
  await (await chooser).setFiles({ name, mimeType: 'image/jpeg', buffer });
}

/** Opens the photo, looks at it closer by key and button, and closes it; the focus comes back. */
async function lookCloser(page: Page, look = async () => {}): Promise<void> {
  await opener(page).click();
  const dialog = page.getByRole('dialog', { name: 'Photo of the meter' });
  const picture = dialog.getByRole('img');
  await picture.waitFor();
  const width = async () => (await picture.boundingBox())!.width;
  const whole = await width();
  await page.keyboard.press('+');
  await dialog.getByText('150 %', { exact: true }).waitFor();
  expect((await width()) / whole).toBeCloseTo(1.5, 2);
  await dialog.getByRole('button', { name: 'Larger' }).click();
  expect((await width()) / whole).toBeCloseTo(2, 2);
  // Zoomed about the middle: as much is hidden above as below.
  const frame = dialog.getByRole('region', { name: 'The photo, to be moved about' });
  const [above, hidden] = await frame.evaluate((node) => [
    node.scrollTop,
    node.scrollHeight - node.clientHeight,
  ]);
  expect(hidden).toBeGreaterThan(100);
  expect(above! / hidden!).toBeCloseTo(0.5, 1);
  await look();
  await page.keyboard.press('0');
  await dialog.getByText('100 %', { exact: true }).waitFor();
  await page.keyboard.press('Escape');
  await dialog.waitFor({ state: 'hidden' });
  expect(await opener(page).evaluate((node) => node === document.activeElement)).toBe(true);
}

/** The steps are one story: each stands on the one before. */
describe('a photo of the meter', () => {
  it('is taken at the step of the meter, refused in words, removed, kept over a reload, and sent', async () => {
    await signInOn(owner, 'owner@demo.example');
    await owner.goto('/banks');
    await addBank(owner, 'Photographed');
    await uploadLog(owner, join(__dirname, '../../data/demo/logs/barn-2026-11-14.csv'));
    await describeTest(owner, async (step) => {
      if (step !== 'meter') return;
      await give(owner, 'Choose a picture', 'meter.jpg', Buffer.from('no picture at all'));
      await owner.getByText('This is not a picture that can be read here.').waitFor();
      expect(await owner.getByRole('button', { name: 'Send meter.jpg again' }).count()).toBe(0);
      expect(await unsoundness(owner)).toEqual([]);

      await give(owner, 'Take a photo', 'meter.jpg', await drawPicture(900, 1200).jpeg().toBuffer());
      await opener(owner).waitFor();
      const removed = owner.waitForResponse((answer) => answer.request().method() === 'DELETE');
      await owner.getByRole('button', { name: 'Remove the photo' }).click();
      expect((await removed).status()).toBe(200);
      await owner.getByRole('button', { name: 'Choose a picture' }).waitFor();
      expect(await Upload.count({ where: { kind: 'photo' } })).toBe(0);

      await owner.context().setOffline(true);
      await give(owner, 'Take a photo', 'meter.jpg', await drawPicture(900, 1200).jpeg().toBuffer());
      await owner.getByText('meter.jpg is kept on this device and goes with the check.').waitFor();
      await owner.context().setOffline(false);
      await opener(owner).waitFor();
      expect(await unsoundness(owner)).toEqual([]);
      await owner.reload();
      await opener(owner).waitFor();
      await owner.getByRole('button', { name: 'Go on' }).click();
    });
    await opener(owner).waitFor();
    await owner.getByRole('button', { name: 'Send the check' }).click();
    await owner.getByText('Sent. A moderator looks at it next.').waitFor();
  });

  it('is shown to its owner with the check, and can be looked at closer', async () => {
    await lookCloser(owner, async () => expect(await unsoundness(owner)).toEqual([]));
  });

  it('is shown to a moderator beside the figures', async () => {
    const { pseudonym } = await Bank.findOne({ where: { name: 'Photographed' }, rejectOnEmpty: true });
    await signInOn(moderator, 'moderator@demo.example');
    await moderator.goto('/screening');
    const queue = moderator.getByRole('list', { name: 'Submissions' });
    await queue.getByRole('link').filter({ hasText: pseudonym }).first().click();
    await moderator.getByRole('heading', { name: 'Photo of the meter' }).waitFor();
    await lookCloser(moderator);
  });
});
