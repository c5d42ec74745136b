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

/** Two frames: the first applies the change, the second has it drawn. */
const settled = (page: Page) =>
  page.evaluate(() => new Promise((resolve) => requestAnimationFrame(() => requestAnimationFrame(resolve))));

async function audit(page: Page): Promise<string[]> {
  await page.evaluate(axe.source);
  const { violations } = await page.evaluate<AxeResults>(
    "axe.run(document, { resultTypes: ['violations'], elementRef: false })",
  );
  return violations.map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html).join(' | ')}`);
}
