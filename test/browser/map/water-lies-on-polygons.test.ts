import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type Analysed, analysed } from './analysed.ts';
import { middle, noisyGround, start } from './noisy-ground.ts';
import { openBrowser, openStage, pageScript, serve } from './stage.ts';

let browser: Browser;
let scene: Analysed;

beforeAll(async () => {
  scene = await analysed(await noisyGround(), start);
  browser = await openBrowser();
});
afterAll(() => browser.close());

describe.each([
  ['ol', '10.'],
  ['ol7', '7.5'],
] as const)('on the package %s', (ol, version) => {
  let site: Awaited<ReturnType<typeof serve>>;
  beforeAll(async () => {
    site = await serve(scene, await pageScript(ol));
  });
  afterAll(() => site.close());

  // The outlines come from core's tracing of cell sides and are placed by the map library; the pixels come from
  // the grid by the lattice. The browser's screenshot joins them.
  it.each([1, 1.25, 2])(
    'each pixel is wet where its centre lies in a pond, at pixel ratio %d',
    async (ratio) => {
      const page = await openStage(browser, site.url, { width: 230, height: 170, deviceScaleFactor: ratio });
      expect(await page.evaluate(() => window.stage.version)).toMatch(version);
      expect(await page.evaluate(() => document.createElement('canvas').getContext('webgl'))).toBeNull();
      await page.evaluate(() => window.stage.onlyWater());
      for (const projection of ['EPSG:3857', 'terrain'] as const) {
        for (const rotationDeg of [0, 30]) {
          for (const cellsPerPixel of [0.31, 0.93]) {
            const wish = { projection, rotationDeg, cellsPerPixel, center: middle };
            await page.evaluate((asked) => window.stage.look(asked), wish);
            const png = (await page.screenshot()).toString('base64');
            const found = await page.evaluate((shot) => window.stage.compare(shot), png);
            const told = JSON.stringify(wish);
            expect(found.pixels, told).toBeGreaterThan(190 * 140 * ratio * ratio);
            expect(found.wet / found.pixels, told).toBeGreaterThan(0.02);
            expect(found.wet / found.pixels, told).toBeLessThan(0.9);
            expect(found.blurred, told).toBe(0);
            expect(found.wrong, told).toEqual([]);
          }
        }
      }
      await page.close();
    },
    180_000,
  );
});
