import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { launchChromium } from '../chromium.ts';
import { openPage, type Stage, serveStage } from './stage.ts';

let stage: Stage;
let browser: Browser;

beforeAll(async () => {
  const elements = `
<div id="map"></div>
<main>
  <brim-host map="townMap" worker-url="/overbrim-worker.js">
    <brim-terrain src="town.tif"></brim-terrain>
    <brim-pour-points></brim-pour-points>
    <brim-spill-path></brim-spill-path>
    <brim-legend></brim-legend>
  </brim-host>
</main>`;
  stage = await serveStage(elements, {}, 'ol7');
  browser = await launchChromium(['--disable-webgl', '--disable-3d-apis']);
});

afterAll(async () => {
  await browser?.close();
  await stage?.close();
});

it('does the main job on OpenLayers 7.5 without WebGL: a click selects, a second one starts a path', async () => {
  const { page, complaints } = await openPage(browser, stage.url);
  await page.locator('brim-pour-points .pond').first().waitFor();
  const { x, y } = await page.evaluate(() => window.elementsStage.pixelInside(0));
  await page.mouse.click(x, y);
  await page.locator('brim-pour-points [part=detail]', { hasText: 'Pond 1' }).waitFor();
  await page.getByRole('button', { name: 'Pick on the map' }).click();
  await page.mouse.click(x, y);
  await page.locator('brim-spill-path .leg', { hasText: 'through pond 1' }).waitFor();
  await page.locator('brim-legend', { hasText: 'leaves at an outlet' }).waitFor();
  expect(complaints).toEqual([]);
  await page.close();
});
