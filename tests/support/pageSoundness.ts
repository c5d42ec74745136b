import axe, { type AxeResults } from 'axe-core';
import type { Page } from 'playwright-core';

const widths = [320, 390, 768, 1280, 1920];
const audited = [390, 1280];

/**
 * What stands against a page as it is: whatever axe finds in both themes at a phone's and a desk's width, and the
 * widths at which the page can be scrolled sideways. Leaves the page as it was.
 */
export async function unsoundness(page: Page): Promise<string[]> {
  const before = page.viewportSize()!;
  const found: string[] = [];
  for (const width of widths) {
    await page.setViewportSize({ width, height: 900 });
    await settled(page);
    const excess = await page.evaluate(() => document.scrollingElement!.scrollWidth - window.innerWidth);
    if (excess > 0) found.push(`${width} px: ${excess} px too wide`);
    if (!audited.includes(width)) continue;
    for (const colorScheme of ['light', 'dark'] as const) {
      await page.emulateMedia({ colorScheme });
      await settled(page);
      found.push(...(await audit(page)).map((violation) => `${width} px, ${colorScheme}: ${violation}`));
    }
  }
  await page.emulateMedia({ colorScheme: 'light' });
  await page.setViewportSize(before);
  await settled(page);
  return found;
}

/**
 * Targets that something covers in part at any place the page can be scrolled to, at a phone's width: what axe says of
 * them. Leaves the page as it was, at its top.
 */
export async function coveredTargets(page: Page): Promise<string[]> {
  const before = page.viewportSize()!;
  await page.setViewportSize({ width: 390, height: 844 });
  await settled(page);
  const height = await page.evaluate(() => document.scrollingElement!.scrollHeight);
  const found = new Set<string>();
  // Less than the least target, so that none is half covered in between only.
  for (let top = 0; top <= height - 844; top += 20) {
    await page.evaluate((to) => window.scrollTo(0, to), top);
    await settled(page);
    for (const violation of await audit(page, ['target-size'])) found.add(violation);
  }
  await page.evaluate(() => window.scrollTo(0, 0));
  await page.setViewportSize(before);
  await settled(page);
  return [...found];
}

/** Two frames: the first applies the change, the second has it drawn. */
const settled = (page: Page) =>
  page.evaluate(() => new Promise((resolve) => requestAnimationFrame(() => requestAnimationFrame(resolve))));

/** All rules unless some are named. */
async function audit(page: Page, rules?: string[]): Promise<string[]> {
  await page.evaluate(axe.source);
  const only = rules ? `, runOnly: ${JSON.stringify(rules)}` : '';
  const { violations } = await page.evaluate<AxeResults>(
    `axe.run(document, { resultTypes: ['violations'], elementRef: false${only} })`,
  );
  return violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(' | ')}`);
}
