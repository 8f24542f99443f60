import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { launchChromium } from '../chromium.ts';
import { openPage, type Stage, serveStage } from './stage.ts';

let stage: Stage;
let browser: Browser;

beforeAll(async () => {
  stage = await serveStage(`
    <div id="map"></div>
    <main>
      <brim-host map="townMap" worker-url="/overbrim-worker.js">
        <brim-pour-points></brim-pour-points><brim-spill-path></brim-spill-path><brim-legend></brim-legend>
      </brim-host>
    </main>`);
  browser = await launchChromium();
});

afterAll(async () => {
  await browser?.close();
  await stage?.close();
});

const addTerrain = () =>
  document.querySelector('brim-host')?.insertAdjacentHTML('beforeend', '<brim-terrain src="town.tif">');

describe('a map', () => {
  it('in a projection without a way to others is told in words, and works again in another', async () => {
    const { page, complaints } = await openPage(browser, stage.url);
    await page.evaluate(() => window.elementsStage.useUnknownProjection());
    await page.evaluate(addTerrain);
    const fault = page.locator('brim-host [part=fault] span');
    await fault.waitFor();
    expect(await fault.textContent()).toMatch(/the view's projection is LOCAL-GRID.*proj4/i);
    await page.locator('brim-pour-points .pond').first().click();
    await page.mouse.move(300, 300);
    await page.mouse.click(310, 310);
    await page.locator('brim-pour-points .pond').first().click();
    await page.getByRole('button', { name: 'Trace its overflow' }).click();
    await page.getByRole('list', { name: 'Legs, from the start' }).waitFor();
    expect(await fault.count()).toBe(1);
    await page.evaluate(() => window.elementsStage.useMercator());
    await fault.waitFor({ state: 'detached' });
    const drawn = await page.evaluate(() => window.elementsStage.state().layers?.ponds.size);
    expect(drawn).toBeGreaterThan(0);
    expect(complaints).toEqual([]);
    await page.close();
  });

  it('that is hidden is moved to the terrain once it shows', async () => {
    const { page } = await openPage(browser, stage.url);
    await page.evaluate(() => {
      const target = document.getElementById('map');
      if (target) target.style.display = 'none';
      window.townMap.updateSize();
    });
    await page.evaluate(addTerrain);
    await page.locator('brim-pour-points .pond').first().waitFor();
    const widthM = () =>
      page.evaluate(() => {
        const view = window.townMap.getView();
        return (view.getResolution() ?? 0) * (window.townMap.getSize()?.[0] ?? 0);
      });
    await page.evaluate(() => {
      document.getElementById('map')?.style.removeProperty('display');
      window.townMap.updateSize();
    });
    // The town is 2 km wide and high, in web mercator at 48.9° S 1/cos 48.9° = 1.52 times that; the sheet is 1056 × 900 px.
    await expect.poll(widthM).toBeGreaterThan(3040);
    await expect.poll(widthM).toBeLessThan(4200);
    await page.close();
  });

  it('goes on paper with words for buttons and without controls', async () => {
    const { page } = await openPage(browser, stage.url);
    await page.evaluate(addTerrain);
    await page.locator('brim-pour-points .pond').first().click();
    await page.getByRole('button', { name: 'Trace its overflow' }).click();
    await page.getByRole('list', { name: 'Legs, from the start' }).waitFor();
    await page.emulateMedia({ media: 'print' });
    const shown = await page.evaluate(() => {
      const roots = [...document.querySelectorAll('*')].flatMap(({ shadowRoot }) => shadowRoot ?? []);
      const all = (selector: string) =>
        roots
          .flatMap((root) => [...root.querySelectorAll<HTMLElement>(selector)])
          .filter((element) => element.checkVisibility());
      const legs = window.elementsStage.state().path?.legs.length;
      const status = all('section.status')[0];
      return {
        boxes: all('input, button:not(.plain, .leg)').length,
        legs: all('.leg').length === legs,
        status: status && getComputedStyle(status).position,
        cards: all('section.card:not(.status)').map((card) => getComputedStyle(card).breakInside),
      };
    });
    const cards = ['avoid', 'avoid', 'avoid', 'avoid'];
    expect(shown).toEqual({ boxes: 0, legs: true, status: 'static', cards });
    await page.close();
  });
});
