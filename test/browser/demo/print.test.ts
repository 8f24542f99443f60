import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { launchChromium } from '../chromium.ts';
import { type DemoSite, startDemo } from './demo-site.ts';
import { openPage, pondsFound } from './town-page.ts';

let site: DemoSite;
let browser: Browser;

beforeAll(async () => {
  site = await startDemo('print');
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
  await site?.stop();
});

/** CSS pixels of a millimetre: 96 to the inch of 25.4 mm (CSS Values and Units Level 3, section 6.2). */
const mmPx = 96 / 25.4;

it('prints what the map shows whole, and shows it as before afterwards', async () => {
  const { page, complaints } = await openPage(browser, site.url);
  await pondsFound(page);
  const shown = () =>
    page.evaluate(() => {
      const map = document.querySelector('brim-host')?.session.state.map;
      const size = map?.getSize() ?? [];
      return { size, extent: map?.getView().calculateExtent(size) ?? [] };
    });
  const before = await shown();
  await page.evaluate(() => dispatchEvent(new Event('beforeprint')));
  const onPaper = await shown();
  expect(Math.abs(onPaper.size[0] - 180 * mmPx)).toBeLessThan(3);
  expect(Math.abs(onPaper.size[1] - 120 * mmPx)).toBeLessThan(3);
  for (const [i, side] of before.extent.entries()) {
    const outwards = i < 2 ? side - onPaper.extent[i] : onPaper.extent[i] - side;
    expect(outwards).toBeGreaterThan(-1e-3);
  }
  await page.evaluate(() => dispatchEvent(new Event('afterprint')));
  expect(await shown()).toEqual(before);
  await page.emulateMedia({ media: 'print' });
  expect(await page.locator('.cards').evaluate((cards) => getComputedStyle(cards).overflowY)).toBe('visible');
  expect(complaints).toEqual([]);
});
